/** Lift-curve slope of wings and tails. Per rad, referred to the surface's own area. */
import { halfChord, quarterChord, sweepTangentAt } from './planform.ts';
import { tableLiftSlope, wingTableRange } from './wing-table.ts';

/**
 * Lift slope a = 2πA / (2 + √(A²β²/κ² (1 + tan²Λ_½/β²) + 4)), β² = 1 − M² [1/rad].
 * @param aspectRatio      A, > 0 [-]
 * @param halfChordTangent tangent of the half-chord sweep [-]
 * @param kappa            κ = a0/2π with the incompressible section slope a0 [-]
 * @param mach             M, < 1 [-]
 * Lowry & Polhamus, NACA TN 3911, from memory. Unswept and at M 0 it is Helmbold's formula.
 * Against lifting-surface theory 1–4 % high at λ 0.4 and 4–8 % high at λ 1 (ours, A 4–24).
 * Subsonic without shocks; NaN above Mach 1.
 */
export function polhamusLiftSlope(
  aspectRatio: number,
  halfChordTangent: number,
  kappa: number,
  mach: number,
): number {
  const beta = Math.sqrt(1 - mach ** 2);
  const stretched = (aspectRatio / kappa) ** 2 * (beta ** 2 + halfChordTangent ** 2);
  return (2 * Math.PI * aspectRatio) / (2 + Math.sqrt(stretched + 4));
}

/**
 * Semiperimeter of the plan divided by the span, E [-]: half the sum of the edges' secants plus the
 * tip chord over the span. E = 1 + 1/A for a rectangular wing.
 * @param aspectRatio         A, > 0 [-]
 * @param taper               tip chord / root chord, ≥ 0 [-]
 * @param quarterChordTangent tangent of the quarter-chord sweep [-]
 * Exact for one straight-tapered wing; of several panels: panel-planform.ts, `panelFigure.semiperimeter`.
 */
export function semiperimeterRatio(aspectRatio: number, taper: number, quarterChordTangent: number): number {
  const leading = sweepTangentAt(quarterChordTangent, quarterChord, 0, aspectRatio, taper);
  const trailing = sweepTangentAt(quarterChordTangent, quarterChord, 1, aspectRatio, taper);
  const tipChordOverSpan = (2 * taper) / (aspectRatio * (1 + taper));
  return (Math.sqrt(1 + leading ** 2) + Math.sqrt(1 + trailing ** 2)) / 2 + tipChordOverSpan;
}

/**
 * Lift slope a0 A / ((E − 1 + β) A + a0/π), β = √(1 − M²) [1/rad].
 * @param aspectRatio     A, > 0 [-]
 * @param semiperimeterRatio E, semiperimeter / span [-]
 * @param sectionSlope    a0, incompressible [1/rad]
 * @param mach            M, < 1 [-]
 * R. T. Jones, NACA TN 817, from memory (M 0: a0 A/(E A + a0/π)). Mach by Prandtl and Glauert, ours: the
 * wing stretched to βA has E − 1 larger by 1/β, exact where E − 1 comes from the tip chord alone.
 * Unswept wings, within about 1 % of lifting-surface theory (ours); it does not know sweep. NaN above Mach 1.
 */
export function jonesLiftSlope(
  aspectRatio: number,
  semiperimeterRatio: number,
  sectionSlope: number,
  mach: number,
): number {
  const beta = Math.sqrt(1 - mach ** 2);
  return (
    (sectionSlope * aspectRatio) / ((semiperimeterRatio - 1 + beta) * aspectRatio + sectionSlope / Math.PI)
  );
}

/** Largest quarter-chord sweep, either way, for which `jonesLiftSlope` counts as in range [rad]. A choice of ours. */
export const jonesSweepLimit = 5 * (Math.PI / 180);

/** Whether a quarter-chord sweep [rad] is near enough to nil for `jonesLiftSlope`. */
export function jonesInRange(sweepQuarter: number): boolean {
  return Math.abs(sweepQuarter) <= jonesSweepLimit;
}

/**
 * Lift slope by the wing table, scaled for section and Mach number by the ratio of
 * `polhamusLiftSlope` at κ and M to the same at κ 1 and M 0 [1/rad].
 * @param aspectRatio  A, > 0 [-]
 * @param taper        λ [-]
 * @param sweepQuarter Λ_¼, aft positive [rad]
 * @param kappa        κ = a0/2π, incompressible [-]
 * @param mach         M, < 1 [-]
 * Ours. Outside the table the ratio of table to formula is held at the edge, so that a tail of aspect
 * ratio 3 still gets its own slope; ask `insideWingTable`.
 */
export function tableScaledLiftSlope(
  aspectRatio: number,
  taper: number,
  sweepQuarter: number,
  kappa: number,
  mach: number,
): number {
  const { aspectRatio: a, taper: t, sweepQuarter: s } = wingTableRange;
  const edgeA = Math.min(Math.max(aspectRatio, a.from), a.to);
  const edgeTaper = Math.min(Math.max(taper, t.from), t.to);
  const edgeSweep = Math.min(Math.max(sweepQuarter, s.from), s.to);
  const formula = polhamusLiftSlope(
    aspectRatio,
    halfChordTangent(aspectRatio, taper, sweepQuarter),
    kappa,
    mach,
  );
  const edgeFormula = polhamusLiftSlope(edgeA, halfChordTangent(edgeA, edgeTaper, edgeSweep), 1, 0);
  return (tableLiftSlope(edgeA, edgeTaper, edgeSweep) * formula) / edgeFormula;
}

function halfChordTangent(aspectRatio: number, taper: number, sweepQuarter: number): number {
  return sweepTangentAt(Math.tan(sweepQuarter), quarterChord, halfChord, aspectRatio, taper);
}

const carryOver = { linear: 0.025, quadratic: -0.25, limit: 0.25 } as const;

/**
 * Factor of the body on the wing's lift slope, K = 1 + 0.025 (d/b) − 0.25 (d/b)² [-].
 * @param widthOverSpan d/b, body width at the wing over span, ≥ 0 [-]
 * A handbook fit, from memory; fitted for d/b < 0.25 (`bodyCarryOverInRange`). Beyond it the same
 * polynomial goes on.
 */
export function bodyCarryOver(widthOverSpan: number): number {
  return 1 + carryOver.linear * widthOverSpan + carryOver.quadratic * widthOverSpan ** 2;
}

/** Whether d/b lies in the fitted range of `bodyCarryOver`. */
export function bodyCarryOverInRange(widthOverSpan: number): boolean {
  return widthOverSpan >= 0 && widthOverSpan < carryOver.limit;
}
