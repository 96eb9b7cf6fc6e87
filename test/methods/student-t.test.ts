import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { studentQuantile, studentTwoSided } from '../../src/methods/student-t.ts';
import { integrate } from './quadrature.ts';

describe('Student’s t', () => {
  /** Two-sided 95 % values of the usual printed table; from memory, half the last digit. */
  it.each([
    [1, 12.706],
    [2, 4.303],
    [3, 3.182],
    [5, 2.571],
    [10, 2.228],
    [20, 2.086],
    [30, 2.042],
    [60, 2.0],
    [120, 1.98],
  ])('%i degrees of freedom: %f', (degreesOfFreedom, value) => {
    expect(Math.abs(studentQuantile(0.95, degreesOfFreedom) - value)).toBeLessThan(0.0006);
  });
  it('one and two degrees of freedom in closed form', () => {
    // tan(πp/2), and p √(2/(1 − p²)).
    expect(studentQuantile(0.9, 1) / Math.tan((Math.PI * 0.9) / 2)).toBeCloseTo(1, 10);
    expect(studentQuantile(0.9, 2) / (0.9 * Math.sqrt(2 / (1 - 0.81)))).toBeCloseTo(1, 10);
  });
  it('the probability is the integral of the density', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 40 }), fc.double({ min: 0.1, max: 5, noNaN: true }), (nu, t) => {
        const density = (x: number) => (1 + (x * x) / nu) ** (-(nu + 1) / 2);
        // Over x = √ν tan θ the whole line is −π/2…π/2.
        const overAngle = (angle: number) => Math.cos(angle) ** (nu - 1) * Math.sqrt(nu);
        const whole = integrate(overAngle, -Math.PI / 2, Math.PI / 2);
        expect(studentTwoSided(t, nu)).toBeCloseTo(integrate(density, -t, t) / whole, 8);
      }),
    );
  });
  it('there and back', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 300 }),
        fc.double({ min: 0.01, max: 0.999, noNaN: true }),
        (nu, p) => {
          expect(studentTwoSided(studentQuantile(p, nu), nu)).toBeCloseTo(p, 10);
        },
      ),
    );
    expect(studentQuantile(1, 5)).toBeNaN();
  });
});
