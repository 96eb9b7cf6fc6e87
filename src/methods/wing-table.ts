/**
 * Lift slope, aerodynamic centre and span efficiency of straight-tapered wings, interpolated in the
 * shipped table of 910 wings (aspect ratio 4…24, taper 0.2…1, quarter-chord sweep −20…40°). The data
 * are flat-plate lifting-surface results of our own (wing-table-data.ts).
 *
 * Cubic splines in ln A, √λ and the sweep, chosen by leaving out every other node of all three axes and
 * asking for the nodes left out. Largest error of the aerodynamic centre [MAC] and of the lift slope
 * [relative]: these splines 0.0004 and 0.0002; splines in A and λ 0.0026 and 0.0024; four-point Hermite
 * in ln A and λ 0.0016 and 0.0015; linear 0.0086 and 0.010. On the full table, with half that spacing,
 * the error is smaller still. One value takes about 150 ns (2 million wings, Node 20).
 */
import { fitSplineGrid, splineAxis, splineWeights } from './cubic-spline-grid.ts';
import {
  aerodynamicCentreValues,
  aspectRatioNodes,
  centreOfLiftValues,
  liftSlopeValues,
  spanEfficiencyValues,
  sweepNodesDegrees,
  taperNodes,
} from './wing-table-data.ts';

const radian = Math.PI / 180;

/** Edges of the table: aspect ratio [-], taper [-], quarter-chord sweep [rad]. */
export const wingTableRange = {
  aspectRatio: { from: aspectRatioNodes[0], to: aspectRatioNodes[aspectRatioNodes.length - 1] },
  taper: { from: taperNodes[0], to: taperNodes[taperNodes.length - 1] },
  sweepQuarter: {
    from: sweepNodesDegrees[0] * radian,
    to: sweepNodesDegrees[sweepNodesDegrees.length - 1] * radian,
  },
} as const;

const aspectRatioAxis = splineAxis(Float64Array.from(aspectRatioNodes, Math.log));
const taperAxis = splineAxis(Float64Array.from(taperNodes, Math.sqrt));
const sweepAxis = splineAxis(Float64Array.from(sweepNodesDegrees, (degrees) => degrees * radian));
const axes = [aspectRatioAxis, taperAxis, sweepAxis];
const taperCount = taperAxis.count;
const sweepCount = sweepAxis.count;

const liftSlopes = fitSplineGrid(axes, liftSlopeValues);
const aerodynamicCentres = fitSplineGrid(axes, aerodynamicCentreValues);
const spanEfficiencies = fitSplineGrid(axes, spanEfficiencyValues);
const centresOfLift = fitSplineGrid(axes, centreOfLiftValues);

/** Room for the four spline weights of each axis, used within one call only. */
const weights = new Float64Array(12);

/** A number moved to the nearest edge of a range when it lies outside. */
function held(value: number, range: { readonly from: number; readonly to: number }): number {
  return Math.min(Math.max(value, range.from), range.to);
}

/** Whether the wing lies in the table; arguments as of `tableLiftSlope`. Edges belong to it. */
export function insideWingTable(aspectRatio: number, taper: number, sweepQuarter: number): boolean {
  const { aspectRatio: a, taper: t, sweepQuarter: s } = wingTableRange;
  return (
    aspectRatio >= a.from &&
    aspectRatio <= a.to &&
    taper >= t.from &&
    taper <= t.to &&
    sweepQuarter >= s.from &&
    sweepQuarter <= s.to
  );
}

/** The spline of one quantity at one wing; what lies outside is held at the table's edge. */
function interpolate(
  coefficients: Float64Array,
  aspectRatio: number,
  taper: number,
  sweepQuarter: number,
): number {
  const logA = Math.log(held(aspectRatio, wingTableRange.aspectRatio));
  const rootTaper = Math.sqrt(held(taper, wingTableRange.taper));
  const sweep = held(sweepQuarter, wingTableRange.sweepQuarter);
  const firstA = splineWeights(aspectRatioAxis, logA, weights, 0);
  const firstTaper = splineWeights(taperAxis, rootTaper, weights, 4);
  const firstSweep = splineWeights(sweepAxis, sweep, weights, 8);
  const w0 = weights[8];
  const w1 = weights[9];
  const w2 = weights[10];
  const w3 = weights[11];
  let sum = 0;
  // Add up the 4 × 4 × 4 coefficients around the wing.
  for (let i = 0; i < 4; i++) {
    let row = ((firstA + i) * taperCount + firstTaper) * sweepCount + firstSweep;
    let plane = 0;
    for (let j = 4; j < 8; j++) {
      const line =
        w0 * coefficients[row] +
        w1 * coefficients[row + 1] +
        w2 * coefficients[row + 2] +
        w3 * coefficients[row + 3];
      plane += weights[j] * line;
      row += sweepCount;
    }
    sum += weights[i] * plane;
  }
  return sum;
}

/**
 * Lift slope a of a flat wing in incompressible flow, by the table [1/rad].
 * @param aspectRatio  A [-]
 * @param taper        λ, tip chord / root chord [-]
 * @param sweepQuarter Λ_¼, aft positive [rad]
 * Ours. Outside the table the value at its edge: ask `insideWingTable`.
 */
export function tableLiftSlope(aspectRatio: number, taper: number, sweepQuarter: number): number {
  return interpolate(liftSlopes, aspectRatio, taper, sweepQuarter);
}

/** Aerodynamic centre, fraction of the MAC aft of its leading edge [-]; arguments, source and edges as of `tableLiftSlope`. */
export function tableAerodynamicCentre(aspectRatio: number, taper: number, sweepQuarter: number): number {
  return interpolate(aerodynamicCentres, aspectRatio, taper, sweepQuarter);
}

/** Span efficiency e of the induced drag C_L²/(πAe) [-]; arguments, source and edges as of `tableLiftSlope`. */
export function tableSpanEfficiency(aspectRatio: number, taper: number, sweepQuarter: number): number {
  return interpolate(spanEfficiencies, aspectRatio, taper, sweepQuarter);
}

/** Spanwise centre of lift of the half wing, 2y/b [-]; arguments, source and edges as of `tableLiftSlope`. */
export function tableCentreOfLift(aspectRatio: number, taper: number, sweepQuarter: number): number {
  return interpolate(centresOfLift, aspectRatio, taper, sweepQuarter);
}
