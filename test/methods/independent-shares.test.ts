import fc from 'fast-check';
import { expect, it } from 'vitest';
import {
  bodyStep,
  neutralPoint,
  tailLiftShare,
  tailPosition,
  tailStep,
  wholeLiftSlope,
} from '../../src/methods/neutral-point.ts';

/**
 * The neutral point found again without shares: forces and moments of wing, tail and body as functions of
 * the angle of attack, about any CG, differentiated by finite differences. −dC_m/dC_L must be h_n − h.
 */
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const aeroplane = fc.record({
  wingSlope: number(3, 6),
  wingPlace: number(0.15, 0.35),
  zeroLift: number(-0.1, 0),
  wingMoment: number(-0.15, 0.02),
  wingArea: number(0.5, 40),
  mac: number(0.2, 4),
  tailSlope: number(2.5, 5),
  tailPlace: number(0.2, 0.28),
  tailIncidence: number(-0.1, 0.05),
  tailArea: number(0.05, 8),
  tailMac: number(0.1, 2),
  arm: number(1, 9),
  pressure: number(0.8, 1),
  downwash: number(0.1, 0.7),
  bodySlope: number(0, 0.5),
  bodyMoment: number(-0.05, 0.05),
  cg: number(-0.2, 0.9),
});

type Aeroplane = typeof aeroplane extends fc.Arbitrary<infer T> ? T : never;

/** Lift and moment coefficients at an angle of attack, for a unit dynamic pressure, from forces in newtons. */
function liftAndMoment(p: Aeroplane, alpha: number): { lift: number; moment: number } {
  const cgStation = p.cg * p.mac;
  const wingLift = p.wingArea * p.wingSlope * (alpha - p.zeroLift);
  const wingStation = p.wingPlace * p.mac;
  const stream = alpha - p.downwash * (alpha - p.zeroLift) + p.tailIncidence;
  const tailLift = p.pressure * p.tailArea * p.tailSlope * stream;
  // Tail quarter-MAC one arm behind the wing's; the lift acts off it by the tail's own centre.
  const tailStation = 0.25 * p.mac + p.arm + (p.tailPlace - 0.25) * p.tailMac;
  const couple = p.wingArea * p.mac * (p.wingMoment + p.bodyMoment + p.bodySlope * alpha);
  const moment = couple + wingLift * (cgStation - wingStation) + tailLift * (cgStation - tailStation);
  return { lift: (wingLift + tailLift) / p.wingArea, moment: moment / (p.wingArea * p.mac) };
}

it('−dC_m/dC_L about any CG is the neutral point by shares less the CG', () => {
  fc.assert(
    fc.property(aeroplane, number(-0.05, 0.2), (p, alpha) => {
      const step = 1e-3;
      const below = liftAndMoment(p, alpha - step);
      const above = liftAndMoment(p, alpha + step);
      const margin = -(above.moment - below.moment) / (above.lift - below.lift);

      const share = tailLiftShare(p.tailSlope, p.pressure, p.tailArea / p.wingArea, p.downwash);
      const whole = wholeLiftSlope(p.wingSlope, share);
      const place = tailPosition(p.arm, p.mac, p.tailMac, p.tailPlace);
      const byTail = tailStep(p.wingPlace, place, share, whole);
      const neutral = neutralPoint(p.wingPlace, byTail, bodyStep(p.bodySlope, whole), 0);
      expect(Math.abs(margin - (neutral - p.cg))).toBeLessThan(1e-7 * (1 + Math.abs(neutral)));
    }),
  );
});
