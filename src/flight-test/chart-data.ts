/** Data of the flight-test chart: trailing edge up and pull upward, as in the other charts of control. */
import type { ChartHeading, FlightTestSlopesData, FlownCg, StraightLine } from '../charts/index.ts';
import type { FlownSeries, MeasuredNeutralPoint } from './measure.ts';
import type { Prediction } from './predict.ts';
import { shownControl } from './report.ts';

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
 * One measured neutral point as a chart; undefined where no CG gives a slope.
 * A predicted line has the study's slope and goes through the middle of the measured points, since slopes
 * alone tell of stability.
 */
export function flightTestChartData(
  { kind, series, fit }: MeasuredNeutralPoint,
  prediction: Prediction,
  heading: ChartHeading,
): FlightTestSlopesData | undefined {
  const upward = kind === 'stick-fixed' ? -1 : 1;
  const factor = upward * shownControl(kind).factor;
  const predicted = kind === 'stick-fixed' && Number.isFinite(prediction.neutralPoint);
  const flown = series.flatMap((one): FlownCg[] =>
    one.slope === undefined ? [] : [flownCg(one, one.slope, factor, predicted ? prediction : undefined)],
  );
  if (flown.length === 0) return undefined;
  const trend = fit === undefined ? Number.NaN : fit.slopeByCentreOfGravity * factor;
  return {
    heading,
    measuredTitle: titles[kind].measured,
    slopeTitle: titles[kind].slope,
    pointName: shownControl(kind).point,
    flown,
    slopeLine: fit === undefined ? null : { slope: trend / 100, atLeadingEdge: -trend * fit.neutralPoint },
    neutralPoint: fit === undefined ? null : { at: 100 * fit.neutralPoint, ...limitsOf(fit) },
    ...(predicted ? { predictedNeutralPoint: 100 * prediction.neutralPoint } : {}),
  };
}

function limitsOf({ limits }: NonNullable<MeasuredNeutralPoint['fit']>) {
  return limits === undefined ? {} : { least: 100 * limits.lower, greatest: 100 * limits.upper };
}

function flownCg(
  { cg, liftCoefficients, controls, slopeUncertainty }: FlownSeries,
  { slope, intercept }: NonNullable<FlownSeries['slope']>,
  factor: number,
  prediction: Prediction | undefined,
): FlownCg {
  const fitted: StraightLine = { slope: slope * factor, atNoLift: intercept * factor };
  const own = prediction === undefined ? Number.NaN : prediction.elevatorSlopeAt(cg) * factor;
  const meanLift = liftCoefficients.reduce((sum, lift) => sum + lift, 0) / liftCoefficients.length;
  const through = fitted.atNoLift + (fitted.slope - own) * meanLift;
  return {
    cg: 100 * cg,
    liftCoefficients,
    measured: controls.map((control) => control * factor),
    fitted,
    ...(slopeUncertainty === undefined ? {} : { slopeUncertainty: slopeUncertainty * Math.abs(factor) }),
    ...(Number.isFinite(own) ? { predicted: { slope: own, atNoLift: through } } : {}),
  };
}
