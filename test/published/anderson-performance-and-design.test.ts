import { describe, expect, it } from 'vitest';
import { polhamusLiftSlope } from '../../src/methods/lift-slope.ts';
import { rootAngleOfAttack } from '../../src/methods/neutral-point.ts';
import { sectionByName } from '../../src/methods/sections-table.ts';
import { tableSpanEfficiency } from '../../src/methods/wing-table.ts';
import { helmboldLiftSlope, liftingLineSlope } from './textbook-forms.ts';

/** J. D. Anderson, Aircraft Performance and Design: examples 2.5, 2.6, 2.8, figure 2.6, p. 110. Read. */
const degrees = 180 / Math.PI;
const [sectionSlope, aspectRatio, spanFactor] = [6.02, 6, 0.95];
const kappa = sectionSlope / (2 * Math.PI);

describe('lift slope of a straight wing of aspect ratio 6', () => {
  it('lifting line, example 2.5: 4.51 /rad; ours within 3 %', () => {
    expect(Math.abs(liftingLineSlope(sectionSlope, aspectRatio, spanFactor, 0) - 4.51)).toBeLessThan(0.01);
    expect(Math.abs(polhamusLiftSlope(aspectRatio, 0, kappa, 0) / 4.51 - 1)).toBeLessThan(0.03);
  });

  it('lift coefficient at 6°: 0.648', () => {
    // Slope 0.079 /deg as printed, zero-lift angle −2.2°.
    const slope = liftingLineSlope(sectionSlope, aspectRatio, spanFactor, 0) / degrees;
    expect(slope).toBeCloseTo(0.079, 3);
    // 0.001 in lift coefficient is 0.013° here.
    const angle = rootAngleOfAttack(0.648, 0.079 * degrees, -2.2 / degrees, 0, 0) * degrees;
    expect(Math.abs(angle - 6)).toBeLessThan(0.013);
  });

  it('at Mach 0.7, example 2.6: 5.73 /rad; ours within 7 %, the form for wings of any sweep', () => {
    expect(Math.abs(liftingLineSlope(sectionSlope, aspectRatio, spanFactor, 0.7) - 5.73)).toBeLessThan(0.02);
    expect(Math.abs(polhamusLiftSlope(aspectRatio, 0, kappa, 0.7) / 5.73 - 1)).toBeLessThan(0.07);
  });

  it('Helmbold, example 2.8: printed 4.4 /rad; ours is the same formula unswept', () => {
    expect(Math.abs(helmboldLiftSlope(sectionSlope, aspectRatio) - 4.4)).toBeLessThan(0.05);
    expect(Math.abs(polhamusLiftSlope(aspectRatio, 0, kappa, 0) - 4.4)).toBeLessThan(0.05);
  });
});

describe('sections and span efficiency', () => {
  it('NACA 2412, figure 2.6 (after Abbott & von Doenhoff): zero lift at −2.2° ± 0.2°, 0.105 /deg', () => {
    const section = sectionByName('naca-2412')!;
    // The reading of the figure and the printed table differ by the whole tolerance; 1e-9 for rounding.
    expect(Math.abs(section.zeroLiftAngle * degrees + 2.2)).toBeLessThanOrEqual(0.2 + 1e-9);
    expect(section.liftSlope / degrees).toBeCloseTo(0.105, 9);
  });

  it('p. 110: δ of usual wings is of the order of 0.05 or smaller; the lifting-surface table is well under', () => {
    let largest = 0;
    for (let a = 4; a <= 8; a += 0.5) {
      for (let taper = 0.2; taper <= 1; taper += 0.05) {
        largest = Math.max(largest, 1 / tableSpanEfficiency(a, taper, 0) - 1);
      }
    }
    // Aspect ratio 8, taper 1. The lifting line, which the page speaks of, has 0.068 there.
    expect(largest).toBeLessThan(0.05);
    expect(largest).toBeGreaterThan(0.02);
  });
});
