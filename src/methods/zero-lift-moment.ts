/**
 * Couples at nil wing lift: of the wing's sections, of twist with sweep, of the body. Coefficients on the
 * wing's area S and MAC c, nose-up positive. Panels as in panel-planform.ts; numbers that belong to panel
 * ends are one more than the panels, from the centreline outward, linear between.
 */
import { quarterChord } from './planform.ts';

/** Where `panelCouples` puts each figure in its `out` array. */
export const coupleFigure = {
  /** (2/(S c)) ∫ c_m c² dy [-] */
  sections: 0,
  /** of the basic lift by twist, with sweep and taper [-] */
  twist: 1,
  /** chord-weighted mean of the twist, which turns the root chord's zero-lift angle by its opposite [rad] */
  meanTwist: 2,
} as const;

/** Length that the `out` array of `panelCouples` needs. */
export const coupleFigureCount = 3;

/**
 * Couples of a wing of straight panels, by strips, written into `out` at the places of `coupleFigure`.
 * @param count               panels used, ≥ 1
 * @param rootChord           chord on the centreline, > 0 [m]
 * @param widths              panel widths on the ground plan [m]
 * @param tapers              outboard chord / inboard chord of each panel [-]
 * @param leadingEdgeTangents tangent of each panel's leading-edge sweep [-]
 * @param moments             section c_m about the aerodynamic centre at the panel ends, count + 1 [-]
 * @param twists              twist at the panel ends against the root chord, nose-up positive, count + 1 [rad]
 * @param liftSlope           a, with which a strip takes up lift by its twist; the wing's own [1/rad]
 * @param out                 at least `coupleFigureCount` long
 * Exact integrals of the strips (Simpson's rule on cubics), strips at their quarter chord; ours. That a
 * strip's basic lift is a c (twist − mean) leaves induction by the twist to the wing's mean slope.
 */
export function panelCouples(
  count: number,
  rootChord: number,
  widths: Float64Array,
  tapers: Float64Array,
  leadingEdgeTangents: Float64Array,
  moments: Float64Array,
  twists: Float64Array,
  liftSlope: number,
  out: Float64Array,
): void {
  let chord = rootChord;
  let x = quarterChord * rootChord;
  let area = 0;
  let chordSquared = 0;
  let chordX = 0;
  let chordTwist = 0;
  let chordTwistX = 0;
  let sections = 0;
  // Add up the panels' integrals, walking outward; all integrands are cubic or less.
  for (let i = 0; i < count; i++) {
    const width = widths[i];
    const tip = chord * tapers[i];
    const xTip = x + width * leadingEdgeTangents[i] + quarterChord * (tip - chord);
    const middle = (chord + tip) / 2;
    const xMiddle = (x + xTip) / 2;
    const twist = twists[i];
    const twistTip = twists[i + 1];
    const twistMiddle = (twist + twistTip) / 2;
    const momentMiddle = (moments[i] + moments[i + 1]) / 2;
    const weight = width / 6;
    area += width * middle;
    chordSquared += weight * (chord * chord + 4 * middle * middle + tip * tip);
    chordX += weight * (chord * x + 4 * middle * xMiddle + tip * xTip);
    chordTwist += weight * (chord * twist + 4 * middle * twistMiddle + tip * twistTip);
    chordTwistX += weight * (chord * twist * x + 4 * middle * twistMiddle * xMiddle + tip * twistTip * xTip);
    sections +=
      weight * (moments[i] * chord * chord + 4 * momentMiddle * middle * middle + moments[i + 1] * tip * tip);
    chord = tip;
    x = xTip;
  }
  const mean = chordTwist / area;
  out[coupleFigure.sections] = sections / chordSquared;
  // S c = 2 area · chordSquared/area: the area cancels.
  out[coupleFigure.twist] = (-liftSlope * (chordTwistX - mean * chordX)) / chordSquared;
  out[coupleFigure.meanTwist] = mean;
}

/**
 * Couple of a straight-tapered wing by linear washout with sweep [-]: the `twist` figure of `panelCouples`
 * in closed form.
 * @param liftSlope           a of the wing [1/rad]
 * @param washout             tip nose-down against the root, positive [rad]
 * @param quarterChordTangent tan Λ_¼, aft positive [-]
 * @param aspectRatio         A [-]
 * @param taper               λ [-]
 * Exact integral of the strips, ours. Washout on a wing swept aft pitches up.
 */
export function washoutMoment(
  liftSlope: number,
  washout: number,
  quarterChordTangent: number,
  aspectRatio: number,
  taper: number,
): number {
  const k = 1 - taper;
  const mean = (1 + 2 * taper) / (3 * (1 + taper));
  // ∫(1 − kη)(η² − η_m η) dη, with the chord's squares and the semi-span over the root chord beside it.
  const integral = 1 / 3 - k / 4 - mean * (1 / 2 - k / 3);
  const semiSpanOverRoot = (aspectRatio * (1 + taper)) / 4;
  const chordSquared = (1 + taper + taper * taper) / 3;
  return (liftSlope * washout * quarterChordTangent * semiSpanOverRoot * integral) / chordSquared;
}

/**
 * Couple of the body at nil wing lift [-]: (π/2)(k2 − k1)/(S c) ∫ w² (α_0 + i) dx.
 * @param count                stations used, ≥ 2
 * @param stations             places, ascending [m]
 * @param widths               body widths there [m]
 * @param cambers              i, slope of the body's centre line to its axis there; an upswept tail and a
 *                             drooped nose are negative [rad]
 * @param angle                α_0 = α_L0 − i_w, the body's angle at nil wing lift [rad]
 * @param apparentMass         k2 − k1 of `munkApparentMass` [-]
 * @param area                 S [m²]
 * @param meanAerodynamicChord c [m]
 * Multhopp, NACA TM 1036, in the handbooks' form, from memory. Widths and camber linear between stations
 * (Simpson's rule, exact). Taken as the whole couple of the body at nil wing lift: a body slope by angle of
 * attack is counted from there.
 */
export function bodyZeroLiftMoment(
  count: number,
  stations: Float64Array,
  widths: Float64Array,
  cambers: Float64Array,
  angle: number,
  apparentMass: number,
  area: number,
  meanAerodynamicChord: number,
): number {
  let sum = 0;
  // Integrate segment by segment from the nose.
  for (let i = 0; i + 1 < count; i++) {
    const start = widths[i] ** 2 * (angle + cambers[i]);
    const end = widths[i + 1] ** 2 * (angle + cambers[i + 1]);
    const width = (widths[i] + widths[i + 1]) / 2;
    const middle = width * width * (angle + (cambers[i] + cambers[i + 1]) / 2);
    sum += ((stations[i + 1] - stations[i]) / 6) * (start + 4 * middle + end);
  }
  return ((Math.PI / 2) * apparentMass * sum) / (area * meanAerodynamicChord);
}
