import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  areaFromVolume,
  customaryDynamicPressureRatio,
  tailVolume,
  vTailFactor,
} from '../../src/methods/tail.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('tail volume', () => {
  it('by hand, and there and back', () => {
    expect(tailVolume(2.1, 4.3, 11.4, 1.24)).toBeCloseTo(0.638795, 6);
    fc.assert(
      fc.property(number(0.1, 10), number(0.5, 10), number(1, 40), number(0.1, 4), (tail, arm, wing, mac) => {
        expect(areaFromVolume(tailVolume(tail, arm, wing, mac), arm, wing, mac)).toBeCloseTo(tail, 9);
      }),
    );
  });
});

describe('V-tail', () => {
  it('flat it is whole, upright it is nothing, at 35° two thirds', () => {
    expect(vTailFactor(0)).toBe(1);
    expect(vTailFactor(Math.PI / 2)).toBeCloseTo(0, 12);
    expect(vTailFactor((35 * Math.PI) / 180)).toBeCloseTo(0.67101, 5);
  });
});

describe('customary dynamic pressure', () => {
  // Common practice, no source: 0.85–0.90 in the wake, 0.95 half way up, 1.0 for a T-tail.
  it.each([
    ['conventional', 0.85, 0.9],
    ['mid', 0.95, 0.95],
    ['V', 0.9, 1],
    ['T', 1, 1],
  ] as const)('%s', (layout, from, to) => {
    expect(customaryDynamicPressureRatio(layout)).toBeGreaterThanOrEqual(from);
    expect(customaryDynamicPressureRatio(layout)).toBeLessThanOrEqual(to);
  });
});
