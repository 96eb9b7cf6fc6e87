/** Textbook forms that the program does not use; they reproduce printed examples beside our own figures. */
import { integrate } from '../methods/quadrature.ts';

/** Lifting line with a span factor e1: a = a0/(β + a0/(π e1 A)); per rad. Anderson, Aircraft Performance and Design, ch. 2. */
export function liftingLineSlope(
  sectionSlope: number,
  aspectRatio: number,
  spanFactor: number,
  mach: number,
): number {
  const beta = Math.sqrt(1 - mach ** 2);
  return sectionSlope / (beta + sectionSlope / (Math.PI * spanFactor * aspectRatio));
}

/** Helmbold: a = a0/(√(1 + (a0/πA)²) + a0/(πA)); per rad. */
export function helmboldLiftSlope(sectionSlope: number, aspectRatio: number): number {
  const k = sectionSlope / (Math.PI * aspectRatio);
  return sectionSlope / (Math.sqrt(1 + k ** 2) + k);
}

/** The textbooks' short form of the neutral point, h_ac + η V (a_t/a)(1 − ε_α) − C_mα,body/a. */
export function shortFormNeutralPoint(
  wingAerodynamicCentre: number,
  tailVolume: number,
  slopeRatio: number,
  downwashGradient: number,
  bodyMomentOverSlope: number,
): number {
  return wingAerodynamicCentre + tailVolume * slopeRatio * (1 - downwashGradient) - bodyMomentOverSlope;
}

/**
 * Thin-aerofoil theory of a camber line of slope dz/dx, by quadrature over θ with x = (1 − cos θ)/2;
 * `breaks` are the places x where the slope is not smooth.
 */
export function camberLineAerodynamics(
  slope: (x: number) => number,
  breaks: readonly number[],
): { zeroLiftAngle: number; quarterChordMoment: number } {
  const ends = [0, ...breaks.map((x) => Math.acos(1 - 2 * x)), Math.PI];
  const over = (weight: (theta: number) => number) => {
    let sum = 0;
    for (let i = 0; i + 1 < ends.length; i++) {
      // Nudge the ends inward so that each piece sees its own side of a break.
      const nudge = 1e-9;
      const f = (theta: number) => slope((1 - Math.cos(theta)) / 2) * weight(theta);
      sum += integrate(f, ends[i] + nudge, ends[i + 1] - nudge, 1e-12);
    }
    return sum;
  };
  const zeroLiftAngle = (-1 / Math.PI) * over((theta) => Math.cos(theta) - 1);
  const a1 = (2 / Math.PI) * over(Math.cos);
  const a2 = (2 / Math.PI) * over((theta) => Math.cos(2 * theta));
  return { zeroLiftAngle, quarterChordMoment: (Math.PI / 4) * (a2 - a1) };
}
