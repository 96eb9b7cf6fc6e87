import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  groundDownwashFactor,
  groundEffectInRange,
  groundInductionFactor,
  liftSlopeNearGround,
} from '../../src/methods/ground-effect.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('ground effect', () => {
  it('fades with height: slope and downwash go back to those of free air', () => {
    expect(groundInductionFactor(0.8)).toBe(0);
    expect(liftSlopeNearGround(4.6, 7.3, 0)).toBeCloseTo(4.6, 12);
    expect(groundDownwashFactor(500, 501, 9)).toBeCloseTo(1, 2);
    expect(groundDownwashFactor(0, 1.5, 9)).toBe(0);
    fc.assert(
      fc.property(number(0.03, 0.7), number(1.001, 2), (h, more) => {
        expect(groundInductionFactor(h * more)).toBeLessThan(groundInductionFactor(h));
      }),
    );
  });
  it('near it the slope is greater and the downwash less', () => {
    fc.assert(
      fc.property(number(0.3, 3), number(0.3, 5), number(5, 15), number(3, 6), (wing, tail, span, a) => {
        const factor = groundDownwashFactor(wing, tail, span);
        expect(factor).toBeGreaterThan(0);
        expect(factor).toBeLessThan(1);
        const sigma = groundInductionFactor(Math.min(wing / span, 0.7));
        const near = liftSlopeNearGround(a, 8, sigma);
        expect(near).toBeGreaterThan(a);
        // Less than the section's slope, which has no induced angle at all.
        expect(1 / near).toBeGreaterThan(1 / a - 1 / (Math.PI * 8));
      }),
    );
  });
  it('downwash factor: the vortex pair and its image, by Biot and Savart', () => {
    fc.assert(
      fc.property(number(0.3, 3), number(0.3, 5), number(5, 15), (wing, tail, span) => {
        const s = ((Math.PI / 4) * span) / 2;
        const speed = (dz: number) => s / (s * s + dz * dz);
        const net = 1 - speed(tail + wing) / speed(tail - wing);
        expect(groundDownwashFactor(wing, tail, span)).toBeCloseTo(net, 10);
      }),
    );
  });
  it('by hand, and its range', () => {
    // (1 − 0.132)/(1.05 + 0.74).
    expect(groundInductionFactor(0.1)).toBeCloseTo(0.484916, 6);
    expect(groundEffectInRange(0.1)).toBe(true);
    expect(groundEffectInRange(0.02)).toBe(false);
    expect(groundEffectInRange(0.3)).toBe(false);
  });
});
