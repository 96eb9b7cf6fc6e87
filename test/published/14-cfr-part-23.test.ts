import { describe, expect, it } from 'vitest';
import { greatestTemporaryForce, leastLimitLoadForce } from '../../src/methods/control-force-rules.ts';
import { forcePresets } from '../../src/study/force-presets.ts';

/**
 * 14 CFR 23.155(a) and 23.143(c) as in force until 2017; figures as read in the regulation text.
 * 1 lb = 0.453 592 37 kg (international agreement of 1959) and 1 lbf = 4.448 221 615 260 5 N, both exact.
 */
const lb = 0.45359237;
const lbf = 4.4482216152605;

describe('23.155(a): least elevator force to reach the positive limit load factor', () => {
  it.each([
    // Stick: W/140 or 15 lbf, whichever is greater, but not more than 35 lbf.
    ['stick', 700, 15],
    ['stick', 2100, 15],
    ['stick', 2800, 20],
    ['stick', 4200, 30],
    ['stick', 4900, 35],
    ['stick', 12_500, 35],
    // Wheel: W/100 or 20 lbf, whichever is greater, but not more than 50 lbf.
    ['wheel', 700, 20],
    ['wheel', 2000, 20],
    ['wheel', 2800, 28],
    ['wheel', 4200, 42],
    ['wheel', 5000, 50],
    ['wheel', 12_500, 50],
  ] as const)('%s, %i lb: %i lbf', (control, weight, force) => {
    expect(leastLimitLoadForce(weight * lb, control)).toBeCloseTo(force * lbf, 9);
  });
});

describe('23.143(c): greatest pitch force for a short time', () => {
  it('60 lbf on a stick, 75 lbf on a wheel with two hands', () => {
    expect(greatestTemporaryForce('stick')).toBeCloseTo(60 * lbf, 10);
    expect(greatestTemporaryForce('wheel')).toBeCloseTo(75 * lbf, 10);
  });
});

it('each preset names its paragraph and edition, and weighs shortfalls by 5 lbf', () => {
  const presets = Object.values(forcePresets);
  expect(presets.map(({ paragraph }) => paragraph)).toEqual(['14 CFR 23.155(a)', '14 CFR 23.143(c)']);
  for (const { edition, scale, atLeast } of presets) {
    expect(edition).toBe('as in force until 2017');
    expect(scale).toBeCloseTo(5 * lbf, 11);
    expect(atLeast).toBe(0);
  }
});
