import { describe, expect, it } from 'vitest';
import { standardDensity } from '../../src/methods/atmosphere.ts';
import { freeStickFactor, stickFreeStep } from '../../src/methods/free-stick.ts';
import {
  bodyStep,
  neutralPoint,
  staticMargin,
  tailLiftShare,
  tailStep,
  wholeLiftSlope,
} from '../../src/methods/neutral-point.ts';
import { tailVolume } from '../../src/methods/tail.ts';
import {
  elevatorLiftSlope,
  elevatorToTrim,
  tailLiftAtWingZeroLift,
  zeroLiftMoment,
} from '../../src/methods/trim.ts';
import { shortFormNeutralPoint } from './textbook-forms.ts';

/**
 * J. D. Anderson, Introduction to Flight, ch. 7, the chain of worked examples, from memory. Slopes per
 * degree there; the tail arm is measured from the CG at h 0.35. The book's short form leaves the tail
 * out of the whole lift slope.
 */
const wing = { slope: 0.52 / (5 + 1.5), momentSlope: (0.05 + 0.01) / (7.88 - 1), place: 0.24 };
const offset = wing.momentSlope / wing.slope;
const tail = { slope: 0.1, incidence: 2.7, downwash: 0.35, area: 0.02, arm: 0.17 };
const [cg, area, chord] = [0.35, 0.1, 0.1];
const volume = tailVolume(tail.area, tail.arm, area, chord);
const tailMomentSlope = -tailLiftShare(tail.slope, 1, volume, tail.downwash);
const momentAtZeroLift = -0.032 + volume * tail.slope * tail.incidence;
/** With the book's printed h − h_ac of 0.11. */
const slope = wing.slope * 0.11 + tailMomentSlope;

describe('wing and body', () => {
  it('lift slope 0.08 /deg', () => expect(Math.abs(wing.slope - 0.08)).toBeLessThan(1e-6));
  it('CG 0.11 behind the aerodynamic centre', () => expect(Math.abs(offset - 0.11)).toBeLessThan(0.002));
  it('moment about the aerodynamic centre −0.032', () => {
    expect(Math.abs(-0.01 - wing.slope * (1 + 1.5) * offset + 0.032)).toBeLessThan(0.001);
  });
});

describe('with the tail', () => {
  it('volume 0.34', () => expect(Math.abs(volume - 0.34)).toBeLessThan(1e-9));
  it('moment at 9.38° −0.065', () => {
    expect(Math.abs(momentAtZeroLift + slope * 9.38 + 0.065)).toBeLessThan(0.001);
  });
  it('moment slope −0.0133 /deg', () => expect(Math.abs(slope + 0.0133)).toBeLessThan(0.0001));
  it('moment at zero lift 0.06', () => expect(Math.abs(momentAtZeroLift - 0.06)).toBeLessThan(0.0005));
  it('trims at 4.5°', () => expect(Math.abs(-momentAtZeroLift / slope - 4.5)).toBeLessThan(0.05));
});

describe('elevator to trim', () => {
  // 0.04 /deg of elevator on the tail's area; the book's lever is the tail volume, from the CG.
  const elevatorSlope = elevatorLiftSlope(0.1, 1, tail.area / area, 0.4);
  const place = cg + tail.arm / chord;
  /** The closed form with the book's quantities: its moment slope, and its lever in place of h_t − h_n. */
  const byBook = (lift: number, moment: number, momentSlope: number, liftSlope: number) => {
    const neutral = cg - momentSlope / liftSlope;
    return elevatorToTrim(lift, cg, moment, neutral, elevatorSlope, neutral + tail.arm / chord);
  };
  const speed = 61;
  const lift = 2.27e4 / (0.5 * standardDensity(0) * speed ** 2 * 19);

  it('with the book’s roundings −1.94°', () => {
    expect(Math.abs(byBook(0.08 * 6.5, 0.06, -0.0133, 0.08) + 1.94)).toBeLessThan(0.01);
  });

  it('unrounded within 0.1° of it, and by shares −1.84°', () => {
    const unrounded = byBook(lift, momentAtZeroLift, slope, wing.slope);
    expect(Math.abs(unrounded + 1.94)).toBeLessThan(0.1);
    const share = tailLiftShare(tail.slope, 1, tail.area / area, tail.downwash);
    const whole = wholeLiftSlope(wing.slope, share);
    const neutral = neutralPoint(wing.place, tailStep(wing.place, place, share, whole), 0, 0);
    const tailLift = tailLiftAtWingZeroLift(tail.slope, 1, tail.area / area, 0, 0, -tail.incidence, 0);
    const moment = zeroLiftMoment(-0.032, tailLift, place, neutral);
    const byShares = elevatorToTrim(lift, cg, moment, neutral, elevatorSlope, place);
    console.info(
      `Introduction to Flight, ch. 7, elevator to trim: printed −1.94°, unrounded ${unrounded.toFixed(2)}°, ` +
        `by shares ${byShares.toFixed(2)}°`,
    );
    // (−0.032 + 0.054 · 1.55699 − 0.14301 · 0.52421)/(0.008 · 1.55699), by pocket calculator.
    expect(byShares).toBeCloseTo(-1.838, 2);
  });
});

describe('neutral point', () => {
  const short = shortFormNeutralPoint(wing.place, volume, tail.slope / wing.slope, tail.downwash, 0);
  const freeFactor = freeStickFactor(0.04 / tail.slope, -0.007, -0.012);
  const free = shortFormNeutralPoint(
    wing.place,
    volume,
    (freeFactor * tail.slope) / wing.slope,
    tail.downwash,
    0,
  );

  it('short form 0.516, margin 0.166', () => {
    expect(Math.abs(short - 0.516)).toBeLessThan(0.001);
    expect(Math.abs(staticMargin(short, cg) - 0.166)).toBeLessThan(0.001);
  });

  it('elevator free: factor 0.767, short form 0.452, margin 0.102', () => {
    expect(Math.abs(freeFactor - 0.767)).toBeLessThan(0.001);
    expect(Math.abs(free - 0.452)).toBeLessThan(0.001);
    expect(Math.abs(staticMargin(free, cg) - 0.102)).toBeLessThan(0.001);
  });

  it('by shares 0.493, and free 0.441: the short form is 0.023 and 0.011 too far aft', () => {
    const place = cg + tail.arm / chord;
    const byShares = (factor: number) => {
      const share = tailLiftShare(factor * tail.slope, 1, tail.area / area, tail.downwash);
      const whole = wholeLiftSlope(wing.slope, share);
      return neutralPoint(wing.place, tailStep(wing.place, place, share, whole), bodyStep(0, whole), 0);
    };
    console.info(
      `Introduction to Flight, ch. 7: short form ${short.toFixed(3)} fixed, ${free.toFixed(3)} free; ` +
        `by shares ${byShares(1).toFixed(3)} fixed, ${byShares(freeFactor).toFixed(3)} free`,
    );
    // 0.24 + 0.013 · 1.81/0.093, by pocket calculator.
    expect(byShares(1)).toBeCloseTo(0.493, 3);
    expect(byShares(freeFactor)).toBeCloseTo(0.441, 3);
    const fixedShare = tailLiftShare(tail.slope, 1, tail.area / area, tail.downwash);
    const step = stickFreeStep(byShares(1), place, fixedShare, wing.slope + fixedShare, freeFactor);
    expect(byShares(1) + step).toBeCloseTo(byShares(freeFactor), 12);
    expect(short - byShares(1)).toBeGreaterThan(0.005);
    expect(short - byShares(1)).toBeLessThan(0.039);
  });
});
