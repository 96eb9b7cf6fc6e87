import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  bodyCarryOver,
  bodyCarryOverInRange,
  jonesInRange,
  jonesLiftSlope,
  polhamusLiftSlope,
  semiperimeterRatio,
  tableScaledLiftSlope,
} from '../../src/methods/lift-slope.ts';
import { panelFigure, panelFigureCount, panelPlanform } from '../../src/methods/panel-planform.ts';
import { sweepTangentAt } from '../../src/methods/planform.ts';
import { tableLiftSlope } from '../../src/methods/wing-table.ts';
import { helmboldLiftSlope } from '../published/textbook-forms.ts';

const degree = Math.PI / 180;
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('polhamusLiftSlope', () => {
  it('tends to the section slope for a long wing and to πA/2 for a slender one', () => {
    expect(polhamusLiftSlope(1e7, 0, 0.93, 0)).toBeCloseTo(0.93 * 2 * Math.PI, 5);
    expect(polhamusLiftSlope(1e-4, 0.4, 0.93, 0) / ((Math.PI * 1e-4) / 2)).toBeCloseTo(1, 5);
  });

  it('long swept wing with Mach: a0 cos Λ / √(1 − M² cos² Λ), simple sweep theory', () => {
    const [tangent, mach] = [0.6, 0.5];
    const cos = 1 / Math.sqrt(1 + tangent ** 2);
    const expected = (2 * Math.PI * cos) / Math.sqrt(1 - (mach * cos) ** 2);
    expect(polhamusLiftSlope(1e7, tangent, 1, mach)).toBeCloseTo(expected, 5);
  });

  it('unswept it is Helmbold’s formula', () => {
    fc.assert(
      fc.property(number(1, 30), number(0.7, 1.1), (a, kappa) => {
        expect(polhamusLiftSlope(a, 0, kappa, 0)).toBeCloseTo(helmboldLiftSlope(2 * Math.PI * kappa, a), 10);
      }),
    );
  });

  it('obeys Prandtl and Glauert: a(A, Λ, M) = a(βA, tan Λ/β, 0)/β', () => {
    fc.assert(
      fc.property(number(2, 20), number(-0.6, 0.8), number(0, 0.8), (a, tangent, mach) => {
        const beta = Math.sqrt(1 - mach ** 2);
        const stretched = polhamusLiftSlope(beta * a, tangent / beta, 1, 0) / beta;
        expect(polhamusLiftSlope(a, tangent, 1, mach)).toBeCloseTo(stretched, 9);
      }),
    );
  });

  it('has no value above Mach 1', () => {
    expect(polhamusLiftSlope(8, 0.9, 1, 1.1)).toBeNaN();
    expect(jonesLiftSlope(8, 1.125, 6, 1.1)).toBeNaN();
  });

  it('is 1–4 % above the wing table at taper 0.4 and 4–8 % at taper 1, unswept', () => {
    for (const a of [4, 6, 8, 12, 20, 24]) {
      const over = (taper: number) =>
        polhamusLiftSlope(a, sweepTangentAt(0, 0.25, 0.5, a, taper), 1, 0) / tableLiftSlope(a, taper, 0) - 1;
      expect(over(0.4)).toBeGreaterThan(0.005);
      expect(over(0.4)).toBeLessThan(0.045);
      expect(over(1)).toBeGreaterThan(0.035);
      expect(over(1)).toBeLessThan(0.085);
    }
  });
});

describe('jonesLiftSlope', () => {
  it('is within 1.5 % of the wing table for straight wings', () => {
    for (const a of [5, 6, 8, 10, 12, 16, 20]) {
      for (const taper of [0.4, 0.6, 1]) {
        const edge = semiperimeterRatio(a, taper, 0);
        const ratio = jonesLiftSlope(a, edge, 2 * Math.PI, 0) / tableLiftSlope(a, taper, 0);
        expect(Math.abs(ratio - 1), `A ${a}, λ ${taper}`).toBeLessThan(0.015);
      }
    }
  });

  it('obeys Prandtl and Glauert for a rectangle', () => {
    fc.assert(
      fc.property(number(3, 20), number(0, 0.8), (a, mach) => {
        const beta = Math.sqrt(1 - mach ** 2);
        const stretched = jonesLiftSlope(beta * a, 1 + 1 / (beta * a), 6, 0) / beta;
        expect(jonesLiftSlope(a, 1 + 1 / a, 6, mach)).toBeCloseTo(stretched, 9);
      }),
    );
  });

  it('counts as in range for straight wings only', () => {
    expect(jonesInRange(4 * degree)).toBe(true);
    expect(jonesInRange(-6 * degree)).toBe(false);
    expect(jonesInRange(6 * degree)).toBe(false);
  });
});

describe('semiperimeterRatio', () => {
  it('equals the panels’ semiperimeter over the span', () => {
    fc.assert(
      fc.property(number(3, 20), number(0.1, 1.2), number(-0.4, 0.7), (a, taper, quarter) => {
        const [span, out] = [10, new Float64Array(panelFigureCount)];
        const rootChord = (2 * span) / (a * (1 + taper));
        const leading = sweepTangentAt(quarter, 0.25, 0, a, taper);
        const one = (x: number) => Float64Array.of(x);
        panelPlanform(1, rootChord, one(span / 2), one(taper), one(leading), one(0), out);
        expect(semiperimeterRatio(a, taper, quarter)).toBeCloseTo(out[panelFigure.semiperimeter] / span, 10);
      }),
    );
  });
});

describe('tableScaledLiftSlope', () => {
  it('is the table at κ 1 and M 0, and rises with both', () => {
    fc.assert(
      fc.property(number(4, 24), number(0.2, 1), number(-0.3, 0.69), (a, taper, sweep) => {
        const plain = tableScaledLiftSlope(a, taper, sweep, 1, 0);
        expect(plain).toBeCloseTo(tableLiftSlope(a, taper, sweep), 10);
        expect(tableScaledLiftSlope(a, taper, sweep, 0.9, 0)).toBeLessThan(plain);
        expect(tableScaledLiftSlope(a, taper, sweep, 1, 0.5)).toBeGreaterThan(plain);
      }),
    );
  });

  it('goes on below the table’s aspect ratios without a jump, toward πA/2', () => {
    expect(tableScaledLiftSlope(3.9999999, 0.6, 0.1, 0.95, 0.1)).toBeCloseTo(
      tableScaledLiftSlope(4.0000001, 0.6, 0.1, 0.95, 0.1),
      5,
    );
    // A rectangular flat plate of A 2 has 2.47 /rad by lifting-surface theory (from memory, 2.474).
    expect(Math.abs(tableScaledLiftSlope(2, 1, 0, 1, 0) / 2.474 - 1)).toBeLessThan(0.03);
  });
});

describe('bodyCarryOver', () => {
  it('by hand, and its range', () => {
    expect(bodyCarryOver(0)).toBe(1);
    expect(bodyCarryOver(0.12)).toBeCloseTo(0.9994, 12);
    expect(bodyCarryOverInRange(0.12)).toBe(true);
    expect(bodyCarryOverInRange(0.25)).toBe(false);
  });
});
