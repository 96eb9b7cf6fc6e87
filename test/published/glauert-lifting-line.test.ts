import { describe, expect, it } from 'vitest';
import { tableCentreOfLift, tableLiftSlope, tableSpanEfficiency } from '../../src/methods/wing-table.ts';
import { elliptic, liftingLine, tapered } from './lifting-line.ts';

describe('lifting line itself', () => {
  it('elliptic wing of aspect ratio 8: 5.02655 /rad, lift at 0.42441 semi-spans (exact)', () => {
    const wing = liftingLine(8, elliptic(8));
    expect(Math.abs(wing.liftSlope - 5.026548245743669)).toBeLessThan(1e-4);
    expect(Math.abs(wing.centreOfLift - 0.4244131815783876)).toBeLessThan(1e-4);
    expect(Math.abs(wing.delta)).toBeLessThan(1e-6);
  });

  it('rectangular wing with A/a0 = 1: δ 0.049, τ 0.18 (Glauert, Elements, few terms; from memory)', () => {
    const wing = liftingLine(2 * Math.PI, tapered(2 * Math.PI, 1));
    expect(Math.abs(wing.delta - 0.049)).toBeLessThan(0.003);
    expect(Math.abs(wing.tau - 0.18)).toBeLessThan(0.02);
  });
});

describe('the wing table approaches the lifting line as the aspect ratio grows', () => {
  const tapers = [0.2, 0.3, 0.4, 0.6, 0.8, 1];
  const gaps = (a: number) =>
    tapers.map((taper) => {
      const line = liftingLine(a, tapered(a, taper));
      return {
        slope: tableLiftSlope(a, taper, 0) / line.liftSlope - 1,
        efficiency: tableSpanEfficiency(a, taper, 0) * (1 + line.delta) - 1,
        centre: tableCentreOfLift(a, taper, 0) - line.centreOfLift,
      };
    });
  const [short, long] = [gaps(6), gaps(24)];

  it('lift slope: lower than the line, within 2 % at aspect ratio 24 and more at 6', () => {
    tapers.forEach((taper, i) => {
      expect(long[i].slope, `λ ${taper}`).toBeLessThan(0);
      expect(long[i].slope, `λ ${taper}`).toBeGreaterThan(-0.02);
      expect(short[i].slope, `λ ${taper}`).toBeLessThan(long[i].slope);
    });
  });

  it('span efficiency: above the line’s, within 6 % at aspect ratio 24', () => {
    tapers.forEach((taper, i) => {
      expect(long[i].efficiency, `λ ${taper}`).toBeGreaterThan(0);
      expect(long[i].efficiency, `λ ${taper}`).toBeLessThan(0.06);
    });
  });

  it('spanwise centre of lift: within 0.01 semi-spans at aspect ratio 24', () => {
    tapers.forEach((taper, i) => {
      expect(Math.abs(long[i].centre), `λ ${taper}`).toBeLessThan(0.01);
    });
  });
});
