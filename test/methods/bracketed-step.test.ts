import fc from 'fast-check';
import { expect, it } from 'vitest';
import { bracketedStep, parabolaVertex } from '../../src/methods/bracketed-step.ts';

const places = fc.double({ min: -5, max: 5, noNaN: true });

it('finds the root at once where the place is a parabola of the value', () => {
  // x = 2 + 3f + 0.4f²: the root lies at x = 2.
  const x = (f: number) => 2 + 3 * f + 0.4 * f ** 2;
  const [f1, f2, f3] = [0.3, -0.7, 1.1];
  const share = bracketedStep(x(f1), f1, x(f2), f2, x(f3), f3);
  expect(x(f1) + share * (x(f2) - x(f1))).toBeCloseTo(2, 12);
});

it('halves the bracket where there is no third place, or the values are far from monotonic', () => {
  expect(bracketedStep(1, 0.3, 0, -0.7, Number.NaN, Number.NaN)).toBe(1 / 2);
  expect(bracketedStep(1, 0.3, 0, -0.7, 2, 0.01)).toBe(1 / 2);
  expect(bracketedStep(1, 0.3, 0, -0.7, 1.0001, 500)).toBe(1 / 2);
});

it('never leaves the bracket', () => {
  fc.assert(
    fc.property(places, places, places, places, places, places, (x1, f1, x2, f2, x3, f3) => {
      const share = bracketedStep(x1, f1, x2, f2, x3, f3);
      expect(share).toBeGreaterThanOrEqual(0);
      expect(share).toBeLessThanOrEqual(1);
    }),
    { seed: 5, numRuns: 500 },
  );
});

it('gives the place where a parabola turns, and none of a straight line', () => {
  const parabola = (x: number) => 3 * (x - 0.31) ** 2 - 7;
  const vertex = parabolaVertex(-1, parabola(-1), 0.4, parabola(0.4), 1.7, parabola(1.7));
  expect(vertex).toBeCloseTo(0.31, 12);
  expect(parabolaVertex(-1, 1, 0, 2, 1, 3)).not.toBeLessThan(Number.POSITIVE_INFINITY);
});
