import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { flapEffectiveness } from '../../src/methods/section.ts';
import { sectionByName, sections } from '../../src/methods/sections-table.ts';
import { camberLineAerodynamics } from '../published/textbook-forms.ts';

describe('flap effectiveness', () => {
  it('is nil without a flap, 1 for the whole chord, NaN outside', () => {
    expect(flapEffectiveness(0)).toBeCloseTo(0, 12);
    expect(flapEffectiveness(1)).toBeCloseTo(1, 12);
    expect(flapEffectiveness(-0.01)).toBeNaN();
    expect(flapEffectiveness(1.01)).toBeNaN();
  });

  it('equals the thin-aerofoil integral of a hinged camber line', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 0.6, noNaN: true }), (chordFraction) => {
        const deflection = 0.01;
        const slope = (x: number) => (x < 1 - chordFraction ? 0 : -deflection);
        const { zeroLiftAngle } = camberLineAerodynamics(slope, [1 - chordFraction]);
        expect(flapEffectiveness(chordFraction)).toBeCloseTo(-zeroLiftAngle / deflection, 5);
      }),
      { numRuns: 20 },
    );
  });
});

describe('sections', () => {
  it('are found by name, and only by name', () => {
    expect(sectionByName('naca-2415')?.thickness).toBe(0.15);
    expect(sectionByName('naca-63-415')?.moment).toBe(-0.069);
    expect(sectionByName('constructor')).toBeUndefined();
    expect(sectionByName('NACA 2415')).toBeUndefined();
  });

  it.each(sections.map((section) => [section.name, section] as const))('%s is plausible', (name, section) => {
    expect(sectionByName(name)).toBe(section);
    // Section slopes lie within a few percent of 2π, the centre of lift near the quarter chord.
    expect(section.liftSlope / (2 * Math.PI)).toBeGreaterThan(0.93);
    expect(section.liftSlope / (2 * Math.PI)).toBeLessThan(1.09);
    expect(Math.abs(section.aerodynamicCentre - 0.25)).toBeLessThan(0.02);
    expect(section.zeroLiftAngle).toBeLessThanOrEqual(0);
    expect(section.moment).toBeLessThanOrEqual(0);
    expect(Number(name.slice(-2)) / 100).toBeCloseTo(section.thickness, 12);
    expect(section.source).toMatch(/from memory/);
  });

  /** NACA four-digit camber line: m at p (exact by the definition of the series). */
  const fourDigit = (m: number, p: number) => (x: number) =>
    x < p ? ((2 * m) / p ** 2) * (p - x) : ((2 * m) / (1 - p) ** 2) * (p - x);

  it.each([
    ['naca-1412', 0.01, 0.4],
    ['naca-2412', 0.02, 0.4],
    ['naca-2415', 0.02, 0.4],
    ['naca-4412', 0.04, 0.4],
    ['naca-4415', 0.04, 0.4],
  ])('%s agrees with thin-aerofoil theory within half a degree and 0.02', (name, camber, place) => {
    const theory = camberLineAerodynamics(fourDigit(camber, place), [place]);
    const measured = sectionByName(name)!;
    expect(Math.abs(measured.zeroLiftAngle - theory.zeroLiftAngle)).toBeLessThan(0.5 * (Math.PI / 180));
    expect(Math.abs(measured.moment - theory.quarterChordMoment)).toBeLessThan(0.02);
  });
});
