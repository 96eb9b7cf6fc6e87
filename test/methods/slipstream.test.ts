import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { inflowFactor } from '../../src/methods/propeller.ts';
import {
  immersedFraction,
  poweredDownwashGradient,
  poweredPressureRatio,
  slipstreamDiameter,
  slipstreamDownwashGradient,
  slipstreamPressureRatio,
} from '../../src/methods/slipstream.ts';
import { integrate } from './quadrature.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('the stream itself', () => {
  it('pressure and diameter follow from the inflow factor: the same air passes disc and slipstream', () => {
    fc.assert(
      fc.property(number(-0.3, 3), number(0.3, 3), (tc, diameter) => {
        const a = inflowFactor(tc);
        expect(slipstreamPressureRatio(tc)).toBeCloseTo((1 + 2 * a) ** 2, 10);
        const behind = slipstreamDiameter(diameter, a) ** 2 * (1 + 2 * a);
        expect(behind).toBeCloseTo(diameter ** 2 * (1 + a), 9);
      }),
    );
    expect(slipstreamPressureRatio(0)).toBe(1);
  });
  it('turns toward the shaft: half the normal slope without thrust, all the way for a hovering disc', () => {
    expect(slipstreamDownwashGradient(0.12, 0, 1.1)).toBeCloseTo(0.066, 12);
    expect(slipstreamDownwashGradient(0.12, 1e6, 1)).toBeCloseTo(1, 5);
    // a 0.2: (0.06 + 0.48)/(1.2 · 1.4) · 1.1.
    expect(slipstreamDownwashGradient(0.12, 0.2, 1.1)).toBeCloseTo(0.353571, 6);
  });
});

describe('how much of the tail lies in it', () => {
  it('equals quadrature of the chord over the circle’s width', () => {
    fc.assert(
      fc.property(
        number(0.2, 3),
        number(-1.6, 1.6),
        number(0, 3),
        number(1, 5),
        number(0, 1.1),
        (diameter, height, offset, span, taper) => {
          const squared = diameter ** 2 / 4 - height ** 2;
          const half = squared > 0 ? Math.sqrt(squared) : 0;
          const tip = span / 2;
          const chord = (y: number) => 1 - (1 - taper) * (Math.abs(y) / tip);
          const clip = (y: number) => Math.min(Math.max(y, -tip), tip);
          const [from, to] = [clip(offset - half), clip(offset + half)];
          const piece = (a: number, b: number) => (b > a ? integrate(chord, a, b) : 0);
          const inside = piece(from, Math.min(0, to)) + piece(Math.max(0, from), to);
          const whole = 2 * integrate(chord, 0, tip);
          expect(immersedFraction(diameter, height, offset, span, taper)).toBeCloseTo(inside / whole, 8);
        },
      ),
    );
  });
  it('none of a tail above it, all of a small one in it', () => {
    expect(immersedFraction(1.6, 0.9, 0, 3, 0.6)).toBe(0);
    expect(immersedFraction(3, 0.2, 0, 2, 0.6)).toBeCloseTo(1, 12);
  });
});

describe('the tail', () => {
  it('without thrust or outside the stream the dynamic pressure is that of power off', () => {
    expect(poweredPressureRatio(0.9, 0.5, slipstreamPressureRatio(0))).toBeCloseTo(0.9, 12);
    expect(poweredPressureRatio(0.9, 0, 1.6)).toBeCloseTo(0.9, 12);
    expect(poweredDownwashGradient(0.4, 0.3, 0, 1.6)).toBeCloseTo(0.4, 12);
  });
  it('ratio times one less gradient is the sum over the two parts', () => {
    fc.assert(
      fc.property(number(0.8, 1), number(0, 1), number(0.7, 3), number(0.1, 0.6), number(0, 0.6), (...p) => {
        const [eta, part, r, wing, stream] = p;
        const both = eta * ((1 - part) * (1 - wing) + part * r * (1 - wing - stream));
        const mean =
          poweredPressureRatio(eta, part, r) * (1 - poweredDownwashGradient(wing, stream, part, r));
        expect(mean).toBeCloseTo(both, 12);
      }),
    );
  });
});
