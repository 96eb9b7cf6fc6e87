/**
 * Planform of a straight-tapered wing or tail. Lengths in m, areas in m², slopes as tangents.
 * All formulas are exact for straight edges and square tips; the reference area runs to the
 * centreline. Wings of several panels: panel-planform.ts.
 *
 * Symbols: S area, b span, A aspect ratio, c_r root chord, λ taper (tip chord / root chord).
 */

/** Chord fraction of the quarter-chord line, to which sweep, arms and heights refer [-]. */
export const quarterChord = 0.25;

/** Half chord, as a fraction of the chord [-]. */
export const halfChord = 0.5;

/** Root chord c_r = 2S / (b(1+λ)) [m] from area [m²], span [m] and taper [-]. Exact. */
export function rootChordFromArea(area: number, span: number, taper: number): number {
  return (2 * area) / (span * (1 + taper));
}

/** Area S = b c_r (1+λ)/2 [m²] from root chord [m], span [m] and taper [-]. Exact. */
export function areaFromRootChord(rootChord: number, span: number, taper: number): number {
  return (span * rootChord * (1 + taper)) / 2;
}

/** Span b = 2S / (c_r(1+λ)) [m] from area [m²], root chord [m] and taper [-]. Exact. */
export function spanFromRootChord(area: number, rootChord: number, taper: number): number {
  return (2 * area) / (rootChord * (1 + taper));
}

/** Span b = √(A S) [m] from area [m²] and aspect ratio [-]. Exact. */
export function spanFromAspectRatio(area: number, aspectRatio: number): number {
  return Math.sqrt(aspectRatio * area);
}

/** Span b = A c_r (1+λ)/2 [m] from aspect ratio [-], root chord [m] and taper [-]. Exact. */
export function spanFromAspectRatioAndRootChord(
  aspectRatio: number,
  rootChord: number,
  taper: number,
): number {
  return (aspectRatio * rootChord * (1 + taper)) / 2;
}

/** Area S = b²/A [m²] from span [m] and aspect ratio [-]. Exact. */
export function areaFromAspectRatio(span: number, aspectRatio: number): number {
  return span ** 2 / aspectRatio;
}

/** Aspect ratio A = b²/S [-] from span [m] and area [m²]. Exact. */
export function aspectRatio(span: number, area: number): number {
  return span ** 2 / area;
}

/** Mean geometric chord S/b [m] from area [m²] and span [m]. Not the MAC. Exact. */
export function meanGeometricChord(area: number, span: number): number {
  return area / span;
}

/** Span S/MAC [m] of the equivalent rectangular wing, whose chord is the MAC; area [m²], MAC [m]. Exact. */
export function equivalentRectangularSpan(area: number, meanAerodynamicChord: number): number {
  return area / meanAerodynamicChord;
}

/**
 * Mean aerodynamic chord (2/3) c_r (1+λ+λ²)/(1+λ) [m] of one straight-tapered panel.
 * @param rootChord chord at the inboard end, > 0 [m]
 * @param taper     outboard chord / inboard chord, ≥ 0 [-]
 * Exact: ∫c² dy / ∫c dy with c linear in y. Sweep and dihedral do not enter.
 */
export function meanAerodynamicChord(rootChord: number, taper: number): number {
  return ((2 / 3) * rootChord * (1 + taper + taper ** 2)) / (1 + taper);
}

/**
 * Spanwise station (b/6)(1+2λ)/(1+λ) of the MAC [m], from the centreline.
 * @param span  tip to tip, > 0 [m]
 * @param taper tip chord / root chord, ≥ 0 [-]
 * Exact: ∫c y dy / ∫c dy over the half span.
 */
export function spanwiseStationOfMac(span: number, taper: number): number {
  return ((span / 6) * (1 + 2 * taper)) / (1 + taper);
}

/**
 * Distance of the MAC's leading edge aft of the root's [m]: y tan Λ_LE.
 * @param spanwiseStation    station of the MAC from the centreline, ≥ 0 [m]
 * @param leadingEdgeTangent tangent of the leading edge's sweep, aft positive [-]
 * Exact, because the leading edge is straight.
 */
export function leadingEdgeOfMac(spanwiseStation: number, leadingEdgeTangent: number): number {
  return spanwiseStation * leadingEdgeTangent;
}

/**
 * Tangent of the sweep of the line at chord fraction `to`, from that at fraction `from` [-]:
 * tan Λ_to = tan Λ_from − (4/A)(to − from)(1−λ)/(1+λ).
 * @param tangentFrom tangent of the known sweep, aft positive [-]
 * @param from        chord fraction of the known line (0 leading edge, 0.25 quarter chord) [-]
 * @param to          chord fraction of the line sought [-]
 * @param aspectRatio A of the whole wing, > 0 [-]
 * @param taper       tip chord / root chord, ≥ 0 [-]
 * Exact for one straight-tapered wing.
 */
export function sweepTangentAt(
  tangentFrom: number,
  from: number,
  to: number,
  aspectRatio: number,
  taper: number,
): number {
  return tangentFrom - ((4 / aspectRatio) * (to - from) * (1 - taper)) / (1 + taper);
}

/**
 * Part of the area of a straight-tapered wing that lies between two spanwise stations, both halves
 * together [-]: (o − i)(2 − (1−λ)(i + o))/(1 + λ).
 * @param from  inner station over the semi-span, 0…1 [-]
 * @param to    outer station over the semi-span, from…1 [-]
 * @param taper tip chord / root chord λ, ≥ 0 [-]
 * Exact. Stations outside 0…1 carry the straight edges on; nothing is clamped.
 */
export function areaFractionBetween(from: number, to: number, taper: number): number {
  return ((to - from) * (2 - (1 - taper) * (from + to))) / (1 + taper);
}

/**
 * Part of ∫ c² dy of a straight-tapered wing between two spanwise stations [-]: the weight with which a
 * section moment there counts in the wing's, referred to S and MAC.
 * @param from  inner station over the semi-span, 0…1 [-]
 * @param to    outer station over the semi-span, from…1 [-]
 * @param taper tip chord / root chord λ, ≥ 0 [-]
 * Exact: c² integrated from station to station over the same from 0 to 1, (1+λ+λ²)/3 of the root's.
 */
export function momentFractionBetween(from: number, to: number, taper: number): number {
  const inner = 1 - (1 - taper) * from;
  const outer = 1 - (1 - taper) * to;
  return ((to - from) * (inner * inner + inner * outer + outer * outer)) / (1 + taper + taper * taper);
}
