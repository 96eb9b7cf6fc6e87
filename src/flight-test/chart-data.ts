/** Data of the flight-test chart: trailing edge up and pull upward, as in the other charts of control. */
import type { ChartHeading, FlightTestSlopesData, FlownCg } from '../charts/index.ts';
import type { ComparedState } from './compare.ts';
import type { FlownSeries, MeasuredNeutralPoint } from './measure.ts';
import type { PredictedLine } from './predict.ts';
import { controlFactor, pointName } from './report.ts';

const titles = {
  'stick-fixed': {
    measured: 'Elevator, trailing edge up [°]',
    slope: 'Slope of the elevator [° per unit of lift coefficient]',
  },
  'stick-free': {
    measured: 'Stick force over dynamic pressure, pull [N/kPa]',
    slope: 'Slope of the force [N/kPa per unit of lift coefficient]',
  },
} as const;

/**
 * One measured neutral point as a chart; undefined where no CG gives a slope. Where the study does not
 * settle a predicted line's place, as that of a force with its tab, it goes through the middle of the
 * measured points: slopes alone tell of stability.
 */
export function flightTestChartData(
  { kind, series, fit }: MeasuredNeutralPoint,
  { state, prediction }: ComparedState,
  heading: ChartHeading,
): FlightTestSlopesData | undefined {
  const factor = (kind === 'stick-fixed' ? -1 : 1) * controlFactor(kind);
  const predicted = prediction.of[kind];
  const flown = series.flatMap((one): FlownCg[] =>
    one.slope === undefined ? [] : [flownCg(one, one.slope, predicted.lineAt(one.cg), factor)],
  );
  if (flown.length === 0) return undefined;
  const trend = fit === undefined ? Number.NaN : fit.slopeByCentreOfGravity * factor;
  return {
    heading,
    measuredTitle: titles[kind].measured,
    slopeTitle: titles[kind].slope,
    pointName: pointName(kind, state),
    flown,
    slopeLine: fit === undefined ? null : { slope: trend / 100, atLeadingEdge: -trend * fit.neutralPoint },
    neutralPoint: fit === undefined ? null : { at: 100 * fit.neutralPoint, ...limitsOf(fit) },
    ...(Number.isNaN(predicted.at) ? {} : { predictedNeutralPoint: 100 * predicted.at }),
  };
}

function limitsOf({ limits }: NonNullable<MeasuredNeutralPoint['fit']>) {
  return limits === undefined ? {} : { least: 100 * limits.lower, greatest: 100 * limits.upper };
}

function flownCg(
  { cg, liftCoefficients, controls, slopeUncertainty }: FlownSeries,
  { slope, intercept }: NonNullable<FlownSeries['slope']>,
  predicted: PredictedLine,
  factor: number,
): FlownCg {
  const meanLift = liftCoefficients.reduce((sum, lift) => sum + lift, 0) / liftCoefficients.length;
  const throughMiddle = intercept + (slope - predicted.slope) * meanLift;
  const atNoLift = Number.isNaN(predicted.atNoLift) ? throughMiddle : predicted.atNoLift;
  return {
    cg: 100 * cg,
    liftCoefficients,
    measured: controls.map((control) => control * factor),
    fitted: { slope: slope * factor, atNoLift: intercept * factor },
    ...(slopeUncertainty === undefined ? {} : { slopeUncertainty: slopeUncertainty * Math.abs(factor) }),
    ...(Number.isFinite(predicted.slope)
      ? { predicted: { slope: predicted.slope * factor, atNoLift: atNoLift * factor } }
      : {}),
  };
}
