import { describe, expect, it } from 'vitest';
import { bodyMomentSlope } from '../../src/methods/body.ts';
import { flatSheetDownwash, torenbeekDownwashGradient } from '../../src/methods/downwash.ts';
import { polhamusLiftSlope } from '../../src/methods/lift-slope.ts';
import {
  bodyStep,
  neutralPoint,
  tailLiftShare,
  tailPosition,
  tailStep,
  wholeLiftSlope,
} from '../../src/methods/neutral-point.ts';
import { meanAerodynamicChord, rootChordFromArea, sweepTangentAt } from '../../src/methods/planform.ts';
import { customaryDynamicPressureRatio, tailVolume } from '../../src/methods/tail.ts';
import { tableAerodynamicCentre } from '../../src/methods/wing-table.ts';
import { liftingLineSlope, shortFormNeutralPoint } from './textbook-forms.ts';

/**
 * R. C. Nelson, Flight Stability and Automatic Control, 2nd ed.: the worked example of a light aeroplane,
 * sec. 2.3 (pp. 56–61), and its measured derivatives, p. 400. Some numbers from memory, some read second-hand.
 * Feet and square feet, as printed: every check is a ratio. The tail arm is measured from the CG at 0.295.
 */
const [area, span, chord, taper] = [184, 33.4, 5.7, 0.54];
const aspectRatio = span ** 2 / area;
const [tailArea, arm, tailSlope, cg] = [43, 16, 3.91, 0.295];
const sectionSlope = 0.097 * (180 / Math.PI);
/** Σ w² (dε_u/dα) Δx of the body [ft³], as summed in the book. */
const stripSum = 85.1;
const bodySlope = bodyMomentSlope(stripSum, 0, 0, area, chord);
const measured = cg + 0.683 / 4.44;

describe('steps of the worked example', () => {
  it('tail volume 0.66', () => {
    expect(Math.abs(tailVolume(tailArea, arm, area, chord) - 0.66)).toBeLessThan(0.005);
  });
  it('the mean aerodynamic chord follows from area, span and taper', () => {
    expect(meanAerodynamicChord(rootChordFromArea(area, span, taper), taper)).toBeCloseTo(chord, 1);
  });
  it('wing lift slope 4.3 /rad by the book’s lifting line', () => {
    expect(Math.abs(liftingLineSlope(sectionSlope, 6.06, 1, 0) - 4.3)).toBeLessThan(0.02);
  });
  it('downwash gradient 0.45 by the flat sheet', () => {
    expect(Math.abs(flatSheetDownwash(4.3, 6.06) - 0.45)).toBeLessThan(0.005);
  });
  it('body 0.0022 /deg; 0.12 /rad in the book, which rounds 0.127', () => {
    expect(Math.abs((bodySlope * Math.PI) / 180 - 0.0022)).toBeLessThan(5e-5);
    expect(Math.abs(bodySlope - 0.12)).toBeLessThan(0.01);
  });
  it('tail moment slope −1.42 /rad', () => {
    expect(Math.abs(-tailLiftShare(tailSlope, 1, 0.66, 0.45) + 1.42)).toBeLessThan(0.005);
  });
  it('neutral point 0.449 by the measured derivatives', () => {
    expect(Math.abs(cg + bodyStep(-0.683, 4.44) - 0.449)).toBeLessThan(0.001);
  });
});

describe('the whole aeroplane, geometry to neutral point', () => {
  // Not in the book: sweep and tail height are taken as nil, and the customary dynamic-pressure ratio.
  const halfChord = sweepTangentAt(0, 0.25, 0.5, aspectRatio, taper);
  const wingSlope = polhamusLiftSlope(aspectRatio, halfChord, sectionSlope / (2 * Math.PI), 0);
  const wingPlace = tableAerodynamicCentre(aspectRatio, taper, 0);
  const armFromWing = arm + (cg - 0.25) * chord;
  const downwash = torenbeekDownwashGradient(wingSlope, aspectRatio, taper, (2 * armFromWing) / span, 0);
  const pressure = customaryDynamicPressureRatio('conventional');
  const share = tailLiftShare(tailSlope, pressure, tailArea / area, downwash);
  const whole = wholeLiftSlope(wingSlope, share);
  const tailPlace = tailPosition(armFromWing, chord, 3.3, 0.25);
  const byTail = tailStep(wingPlace, tailPlace, share, whole);
  const byBody = bodyStep(bodySlope, whole);
  const ours = neutralPoint(wingPlace, byTail, byBody, 0);
  const short = shortFormNeutralPoint(0.25, 0.66, tailSlope / 4.3, 0.45, 0.12 / 4.3);

  it('the book’s short form gives 0.55', () => expect(Math.abs(short - 0.55)).toBeLessThan(0.005));

  it('ours lies between the short form and the measured derivatives, within the scatter', () => {
    // One standard deviation of such an estimate; typical total of the methods' scatter, ours.
    const scatter = 0.03;
    console.info(
      `Nelson's light aeroplane: short form ${short.toFixed(3)}, ours ${ours.toFixed(3)} ± ${scatter} ` +
        `(wing ${wingPlace.toFixed(3)}, tail ${byTail.toFixed(3)}, body ${byBody.toFixed(3)}), ` +
        `measured derivatives ${measured.toFixed(3)}`,
    );
    expect(ours).toBeGreaterThan(measured - scatter);
    expect(ours).toBeLessThan(short + scatter);
    // Stronger, and true of this aeroplane: strictly between the two.
    expect(ours).toBeGreaterThan(measured);
    expect(ours).toBeLessThan(short);
  });

  it('the whole lift slope is near the measured 4.44 /rad', () => {
    expect(Math.abs(whole / 4.44 - 1)).toBeLessThan(0.06);
  });
});
