import { describe, expect, it } from 'vitest';
import { jonesLiftSlope, polhamusLiftSlope, semiperimeterRatio } from '../../src/methods/lift-slope.ts';
import { tableLiftSlope } from '../../src/methods/wing-table.ts';

/** R. T. Jones, NACA TN 817 (edge-velocity correction, from memory) and TR 835 (slender wings, a limit). */
describe('rectangular wing of aspect ratio 8', () => {
  it('semiperimeter over span 1.125', () => expect(semiperimeterRatio(8, 1, 0)).toBeCloseTo(1.125, 12));

  it('2πA/(EA + 2) = 4.5696 /rad; the lifting-surface table agrees within 0.03', () => {
    const slope = jonesLiftSlope(8, 1.125, 2 * Math.PI, 0);
    expect(slope).toBeCloseTo(4.569589314312426, 9);
    expect(Math.abs(tableLiftSlope(8, 1, 0) - 4.569589314312426)).toBeLessThan(0.03);
  });
});

it('slender wing of aspect ratio 0.1: πA/2, within 0.002 of it', () => {
  expect(Math.abs(polhamusLiftSlope(0.1, 0, 1, 0) / ((Math.PI * 0.1) / 2) - 1)).toBeLessThan(0.002);
});
