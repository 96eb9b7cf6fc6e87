/**
 * Planform of a wing made of straight panels, from the centreline outward. Exact for straight edges
 * and square tips. Arrays hold one number a panel; panel i joins the tip of panel i−1, so chords and
 * edges are continuous. Lengths in m, areas in m², slopes as tangents.
 */
import { quarterChord } from './planform.ts';

/**
 * Where `panelPlanform` puts each figure in its `out` array. Whole-wing figures (both halves);
 * places are aft of the root's leading edge and above the root-chord plane.
 */
export const panelFigure = {
  /** S, both halves [m²] */
  area: 0,
  /** b, tip to tip, on the ground plan [m] */
  span: 1,
  /** mean aerodynamic chord [m] */
  meanAerodynamicChord: 2,
  /** spanwise station of the MAC, from the centreline [m] */
  spanwiseStationOfMac: 3,
  /** leading edge of the MAC aft of the root's [m] */
  leadingEdgeOfMac: 4,
  /** quarter point of the MAC above the root-chord plane [m] */
  heightOfMac: 5,
  tipChord: 6,
  /** leading edge of the tip aft of the root's [m] */
  leadingEdgeOfTip: 7,
  /** quarter point of the tip chord above the root-chord plane [m] */
  heightOfTip: 8,
  /** half the length of all outer edges of both halves [m] */
  semiperimeter: 9,
} as const;

/** Length that the `out` array of `panelPlanform` needs. */
export const panelFigureCount = 10;

/**
 * Whole-wing planform of straight panels, written into `out` at the places of `panelFigure`.
 * @param count               panels used, ≥ 1
 * @param rootChord           chord on the centreline, > 0 [m]
 * @param widths              panel widths on the ground plan, > 0 [m]
 * @param tapers              outboard chord / inboard chord of each panel, ≥ 0 [-]
 * @param leadingEdgeTangents tangent of each panel's leading-edge sweep, aft positive [-]
 * @param dihedrals           dihedral of each panel's quarter-chord line, up positive [rad]
 * @param out                 at least `panelFigureCount` long
 * Exact: MAC = (2/S)∫c² dy, y = (2/S)∫c y dy, x_LE = (2/S)∫c x_LE dy, z = (2/S)∫c z dy over the half
 * span, in closed form per panel. Dihedral enters the heights only. Where S is 0 the means are NaN.
 */
export function panelPlanform(
  count: number,
  rootChord: number,
  widths: Float64Array,
  tapers: Float64Array,
  leadingEdgeTangents: Float64Array,
  dihedrals: Float64Array,
  out: Float64Array,
): void {
  let chord = rootChord;
  let y = 0;
  let x = 0;
  let z = 0;
  let halfArea = 0;
  let chordSquared = 0;
  let chordY = 0;
  let chordX = 0;
  let chordZ = 0;
  let edges = 0;
  // Add up the moments of each panel, walking outward.
  for (let i = 0; i < count; i++) {
    const width = widths[i];
    const outer = chord * tapers[i];
    const slope = leadingEdgeTangents[i];
    const rise = Math.tan(dihedrals[i]);
    const panelArea = (width * (chord + outer)) / 2;
    // ∫ c(y) (y − y_inner) dy with c linear.
    const panelMoment = (width ** 2 * (chord + 2 * outer)) / 6;
    halfArea += panelArea;
    chordSquared += (width * (chord ** 2 + chord * outer + outer ** 2)) / 3;
    chordY += y * panelArea + panelMoment;
    chordX += x * panelArea + slope * panelMoment;
    chordZ += z * panelArea + rise * panelMoment;
    const trailing = slope + (outer - chord) / width;
    edges += width * (Math.sqrt(1 + slope ** 2) + Math.sqrt(1 + trailing ** 2));
    y += width;
    x += slope * width;
    z += rise * width;
    chord = outer;
  }
  out[panelFigure.area] = 2 * halfArea;
  out[panelFigure.span] = 2 * y;
  out[panelFigure.meanAerodynamicChord] = chordSquared / halfArea;
  out[panelFigure.spanwiseStationOfMac] = chordY / halfArea;
  out[panelFigure.leadingEdgeOfMac] = chordX / halfArea;
  out[panelFigure.heightOfMac] = chordZ / halfArea;
  out[panelFigure.tipChord] = chord;
  out[panelFigure.leadingEdgeOfTip] = x;
  out[panelFigure.heightOfTip] = z;
  out[panelFigure.semiperimeter] = edges + chord;
}

/**
 * Root chord [m] of a wing of straight panels with the whole area given; S is proportional to c_r.
 * @param count  panels used, ≥ 1
 * @param area   S, both halves, > 0 [m²]
 * @param widths panel widths on the ground plan, > 0 [m]
 * @param tapers outboard chord / inboard chord of each panel, ≥ 0 [-]
 * Exact.
 */
export function panelRootChordFromArea(
  count: number,
  area: number,
  widths: Float64Array,
  tapers: Float64Array,
): number {
  let chordRatio = 1;
  let areaPerRootChord = 0;
  // Add up the area of both halves for a root chord of 1.
  for (let i = 0; i < count; i++) {
    areaPerRootChord += widths[i] * chordRatio * (1 + tapers[i]);
    chordRatio *= tapers[i];
  }
  return area / areaPerRootChord;
}

/**
 * Tangent of one panel's leading-edge sweep from that of its quarter-chord line [-]:
 * tan Λ_LE = tan Λ_¼ + (c_i − c_o)/(4 w).
 * @param quarterChordTangent tangent of the quarter-chord sweep, aft positive [-]
 * @param innerChord          chord at the panel's inboard end [m]
 * @param taper               outboard chord / inboard chord of the panel [-]
 * @param width               panel width on the ground plan, > 0 [m]
 * Exact.
 */
export function panelLeadingEdgeTangent(
  quarterChordTangent: number,
  innerChord: number,
  taper: number,
  width: number,
): number {
  return quarterChordTangent + (quarterChord * innerChord * (1 - taper)) / width;
}

/**
 * Taper λ of the trapezoid that has the same area, span and MAC [-]: the one taper that formulas for
 * straight-tapered wings get for a wing of several panels. From MAC·b/S = (4/3)(1+λ+λ²)/(1+λ)², with
 * p = λ/(1+λ)² = 1 − (3/4) MAC·b/S: λ = 2p / (1 − 2p + √(1 − 4p)).
 * @param meanAerodynamicChord MAC, > 0 [m]
 * @param span                 b, > 0 [m]
 * @param area                 S, > 0 [m²]
 * Exact for MAC·b/S from 1 (rectangle) to 4/3 (triangle). No wing has less than 1; a wing that widens
 * outward has the λ ≤ 1 of its mirror; above 4/3 (a hollow plan) the triangle's 0 is returned.
 */
export function equivalentTaper(meanAerodynamicChord: number, span: number, area: number): number {
  const chordRatio = (meanAerodynamicChord * span) / area;
  const rectangle = 0.25;
  const p = Math.min(rectangle, Math.max(0, 1 - (3 / 4) * chordRatio));
  return (2 * p) / (1 - 2 * p + Math.sqrt(1 - 4 * p));
}

/**
 * Tangent of the quarter-chord sweep of the equivalent trapezoid [-]: the line from the root's quarter
 * chord through the quarter point of the MAC.
 * @param leadingEdgeOfMac     MAC's leading edge aft of the root's [m]
 * @param meanAerodynamicChord MAC [m]
 * @param spanwiseStationOfMac station of the MAC from the centreline, > 0 [m]
 * @param rootChord            chord on the centreline [m]
 * Ours, a rule of equivalence; exact for one straight-tapered wing.
 */
export function equivalentSweepTangent(
  leadingEdgeOfMac: number,
  meanAerodynamicChord: number,
  spanwiseStationOfMac: number,
  rootChord: number,
): number {
  const rise = leadingEdgeOfMac + quarterChord * (meanAerodynamicChord - rootChord);
  return rise / spanwiseStationOfMac;
}
