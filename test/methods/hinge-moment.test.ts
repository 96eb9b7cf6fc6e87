import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  gearedTabHingeSlope,
  sectionHingeSlopeByAngle,
  sectionHingeSlopeByElevator,
  sectionHingeSlopeByTab,
  tailHingeSlopeByAngle,
  tailHingeSlopeByElevator,
} from '../../src/methods/hinge-moment.ts';
import { flapEffectiveness } from '../../src/methods/section.ts';
import { integrate } from './quadrature.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/**
 * Moment of the thin plate's load about the hinge by quadrature, with θ from the leading edge,
 * x = (1 − cos θ)/2; a flap or tab bent at θ_b has the load of Glauert's series summed to a logarithm.
 */
function hingeMoment(chord: number, load: (theta: number) => number, breaks: number[]): number {
  const hinge = 1 - chord;
  const from = Math.acos(2 * chord - 1);
  const f = (theta: number) => {
    const x = (1 - Math.cos(theta)) / 2;
    return load(theta) * (x - hinge) * (Math.sin(theta) / 2);
  };
  const ends = [from, ...breaks, Math.PI];
  let sum = 0;
  for (let i = 0; i + 1 < ends.length; i++) {
    // t³ at both ends takes the sting out of the logarithm.
    const [a, b] = [ends[i], (ends[i] + ends[i + 1]) / 2];
    const half = b - a;
    sum += integrate((t) => f(a + half * t ** 3) * 3 * half * t * t, 1e-4, 1);
    sum += integrate((t) => f(ends[i + 1] - half * t ** 3) * 3 * half * t * t, 1e-4, 1);
  }
  return -sum / chord ** 2;
}
const plate = (theta: number) => 4 / Math.tan(theta / 2);
const bent = (at: number) => (theta: number) => {
  const log = Math.log(Math.abs(Math.sin((theta + at) / 2) / Math.sin((theta - at) / 2)));
  return ((Math.PI - at) / Math.PI) * plate(theta) + (4 / Math.PI) * log;
};

describe('section', () => {
  it('by angle equals quadrature of the plate’s load', () => {
    fc.assert(
      fc.property(number(0.1, 0.9), (chord) => {
        expect(sectionHingeSlopeByAngle(chord, 1)).toBeCloseTo(hingeMoment(chord, plate, []), 7);
      }),
    );
  });
  it('by elevator equals quadrature of the bent plate’s load', () => {
    fc.assert(
      fc.property(number(0.1, 0.9), (chord) => {
        const at = Math.acos(2 * chord - 1);
        expect(sectionHingeSlopeByElevator(chord, 1)).toBeCloseTo(hingeMoment(chord, bent(at), []), 6);
      }),
      { numRuns: 30 },
    );
  });
  it('by tab equals quadrature', () => {
    fc.assert(
      fc.property(number(0.15, 0.9), number(0.1, 0.9), (chord, part) => {
        const at = Math.acos(2 * chord * part - 1);
        const value = sectionHingeSlopeByTab(chord, chord * part, 1);
        expect(value).toBeCloseTo(hingeMoment(chord, bent(at), [at]), 5);
      }),
      { numRuns: 30 },
    );
  });
  it('limits: all moving −π/2 both, small chords −(16/15)√E and −8/(3π)', () => {
    expect(sectionHingeSlopeByAngle(1, 1)).toBeCloseTo(-Math.PI / 2, 12);
    expect(sectionHingeSlopeByElevator(1, 1)).toBeCloseTo(-Math.PI / 2, 12);
    const small = 1e-3;
    expect(sectionHingeSlopeByAngle(small, 1) / ((-16 / 15) * Math.sqrt(small))).toBeCloseTo(1, 2);
    expect(sectionHingeSlopeByElevator(small, 1)).toBeCloseTo(-8 / (3 * Math.PI), 1);
    expect(sectionHingeSlopeByAngle(1.2, 1)).toBeNaN();
  });
  it('the factors are apart', () => {
    expect(sectionHingeSlopeByAngle(0.35, 0.6) / sectionHingeSlopeByAngle(0.35, 1)).toBeCloseTo(0.6, 12);
    expect(sectionHingeSlopeByElevator(0.35, 0.8) / sectionHingeSlopeByElevator(0.35, 1)).toBeCloseTo(
      0.8,
      12,
    );
  });
});

describe('tail', () => {
  it('of the section’s slope it has the section’s moments', () => {
    expect(tailHingeSlopeByAngle(-0.55, 6.1, 6.1)).toBeCloseTo(-0.55, 12);
    expect(tailHingeSlopeByElevator(-0.9, -0.55, 0.6, 6.1, 6.1)).toBeCloseTo(-0.9, 12);
  });
  it('held at a constant lift, the hinge moment is the section’s at that lift', () => {
    // C_L = a_t(α + τδ) and the section sees α less the induced angle C_L(1/a_t − 1/a0).
    fc.assert(
      fc.property(
        number(0.1, 0.9),
        number(2.5, 5),
        number(-0.2, 0.2),
        number(-0.4, 0.4),
        (e, a, alpha, delta) => {
          const [a0, tau] = [6.1, flapEffectiveness(e)];
          const [byAngle, byElevator] = [
            sectionHingeSlopeByAngle(e, 0.7),
            sectionHingeSlopeByElevator(e, 0.85),
          ];
          const lift = a * (alpha + tau * delta);
          const seen = alpha - lift * (1 / a - 1 / a0);
          const section = byAngle * seen + byElevator * delta;
          const tail =
            tailHingeSlopeByAngle(byAngle, a, a0) * alpha +
            tailHingeSlopeByElevator(byElevator, byAngle, tau, a, a0) * delta;
          expect(tail).toBeCloseTo(section, 10);
        },
      ),
    );
  });
  it('a balance tab lightens, an anti-balance tab makes heavier', () => {
    expect(gearedTabHingeSlope(-0.6, -0.3, -0.5)).toBeCloseTo(-0.45, 12);
    expect(gearedTabHingeSlope(-0.6, -0.3, 0.5)).toBeCloseTo(-0.75, 12);
  });
});
