import { describe, expect, it } from 'vitest';
import { handbookDownwashGradient, torenbeekDownwashGradient } from '../../src/methods/downwash.ts';
import { jonesLiftSlope, polhamusLiftSlope, semiperimeterRatio } from '../../src/methods/lift-slope.ts';
import { tableAerodynamicCentre, tableLiftSlope } from '../../src/methods/wing-table.ts';
import { testStudy } from '../studies.ts';
import { figure, figuresOf } from './aeroplane.ts';

type Changes = Parameters<typeof testStudy>[0];
const of = (changes: Changes, name: string) => figure(figuresOf(testStudy(changes)), name);
const by = (method: string): Changes => ({ rest: `methods: {${method}}` });

const degree = Math.PI / 180;
const A = 9.4 ** 2 / 11.4;
const taper = 0.6;
const sweep = 2 * degree;
const tailA = 4.4;
const tailTaper = 0.7;
const tailSweep = 5 * degree;
const mach = of({}, 'mach');

/** tan Λ_½ from tan Λ_¼ (exact). */
const half = (tangent: number, ratio: number, lambda: number) =>
  tangent - (1 / ratio) * ((1 - lambda) / (1 + lambda));

describe('the method that a study names is the one used', () => {
  it('lift slope by Lowry and Polhamus, of wing and tail alike', () => {
    const wing = polhamusLiftSlope(A, half(Math.tan(sweep), A, taper), 6.1 / (2 * Math.PI), mach);
    const tail = polhamusLiftSlope(
      tailA,
      half(Math.tan(tailSweep), tailA, tailTaper),
      6.2 / (2 * Math.PI),
      mach,
    );
    for (const changes of [{}, by('lift_slope: polhamus')]) {
      expect(of(changes, 'wing_lift_slope')).toBeCloseTo(wing, 12);
      expect(of(changes, 'tail_lift_slope')).toBeCloseTo(tail, 12);
    }
  });

  it('lift slope by Jones, of wing and tail alike', () => {
    const changes = by('lift_slope: jones');
    const wing = jonesLiftSlope(A, semiperimeterRatio(A, taper, Math.tan(sweep)), 6.1, mach);
    const tail = jonesLiftSlope(tailA, semiperimeterRatio(tailA, tailTaper, Math.tan(tailSweep)), 6.2, mach);
    expect(of(changes, 'wing_lift_slope')).toBeCloseTo(wing, 12);
    expect(of(changes, 'tail_lift_slope')).toBeCloseTo(tail, 12);
  });

  it('lift slope by the table, scaled for section and Mach number', () => {
    const changes = by('lift_slope: table');
    const tangent = half(Math.tan(sweep), A, taper);
    const scale =
      polhamusLiftSlope(A, tangent, 6.1 / (2 * Math.PI), mach) / polhamusLiftSlope(A, tangent, 1, 0);
    expect(of(changes, 'wing_lift_slope')).toBeCloseTo(tableLiftSlope(A, taper, sweep) * scale, 12);
    expect(of(changes, 'tail_lift_slope')).toBeLessThan(of({}, 'tail_lift_slope'));
  });

  it('the three lift slopes lie within a tenth of each other', () => {
    const slopes = ['polhamus', 'jones', 'table'].map((name) =>
      of(by(`lift_slope: ${name}`), 'wing_lift_slope'),
    );
    expect(Math.max(...slopes) / Math.min(...slopes)).toBeLessThan(1.1);
    expect(new Set(slopes).size).toBe(3);
  });

  it('downwash by Torenbeek and by the handbook: both shown, one used', () => {
    const length = 9.4;
    const wake = of({}, 'wake_height');
    const a = of({}, 'wing_lift_slope');
    const torenbeek = torenbeekDownwashGradient(a, A, taper, (2 * 4.3) / length, (2 * wake) / length);
    const low = polhamusLiftSlope(A, half(Math.tan(sweep), A, taper), 6.1 / (2 * Math.PI), 0);
    const handbook = handbookDownwashGradient(A, taper, sweep, 0.45 / length, 4.3 / length, a / low);
    for (const [method, used] of [
      ['torenbeek', torenbeek],
      ['handbook', handbook],
    ] as const) {
      const changes = by(`downwash: ${method}`);
      expect(of(changes, 'downwash_torenbeek')).toBeCloseTo(torenbeek, 12);
      expect(of(changes, 'downwash_handbook')).toBeCloseTo(handbook, 12);
      expect(of(changes, 'downwash_gradient')).toBeCloseTo(used, 12);
    }
    expect(Math.abs(torenbeek - handbook)).toBeGreaterThan(0.01);
  });

  it('aerodynamic centre by the table and at the quarter MAC: both shown, one used', () => {
    const shift = 0.243 - 0.25;
    const table = tableAerodynamicCentre(A, taper, sweep) + shift;
    for (const [method, wing, tail] of [
      ['table', table, tableAerodynamicCentre(tailA, tailTaper, tailSweep) + 0.248 - 0.25],
      ['quarter_mac', 0.243, 0.248],
    ] as const) {
      const changes = by(`aerodynamic_centre: ${method}`);
      expect(of(changes, 'wing_aerodynamic_centre_table')).toBeCloseTo(table, 12);
      expect(of(changes, 'wing_aerodynamic_centre_quarter_mac')).toBeCloseTo(0.243, 12);
      expect(of(changes, 'wing_aerodynamic_centre')).toBeCloseTo(wing, 12);
      expect(of(changes, 'neutral_point_wing')).toBeCloseTo(wing, 12);
      expect(of(changes, 'tail_aerodynamic_centre')).toBeCloseTo(tail, 12);
    }
  });

  it('the height of the CG counts only where the study gives it', () => {
    const low = (cg: string): Changes => ({ cg: `{as: percent_mac, forward: 24 %, aft: 33 %${cg}}` });
    expect(of(low(''), 'neutral_point_height')).toBe(0);
    // wing 0.25 m below the datum, its MAC raised by dihedral; a low wing moves the point forward
    const height = of(low(', above_datum: 0.1 m'), 'neutral_point_height');
    const arm = -0.25 + of({}, 'mac_spanwise_station') * Math.tan(4 * degree) - 0.1;
    const tilt = 2 / of({}, 'wing_lift_slope') - 2 / (Math.PI * A * of({}, 'span_efficiency'));
    // heights run square to the datum line, which no incidence turns from the root chord here
    const noLift = -1.2 * degree + 2 * degree * ((2 * of({}, 'mac_spanwise_station')) / of({}, 'wing_span'));
    expect(height).toBeCloseTo((arm / of({}, 'mac')) * (of({}, 'lift_coefficient') * tilt + noLift), 12);
    expect(height).toBeLessThan(0);
  });
});
