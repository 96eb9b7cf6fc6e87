/** The neutral point that flown points tell, stick fixed from elevator angles and stick free from forces. */
import {
  type FittedSlope,
  type FlightTestFit,
  type FlightTestSeries,
  fitFlightTest,
  fitSlope,
} from '../methods/flight-test-fit.ts';
import { studentQuantile } from '../methods/student-t.ts';
import type { FlownPoint } from './read-data.ts';
import { cgPositions, type FlownState } from './states.ts';
import type { Warning, WarningCode } from './warnings.ts';

export const confidence = 0.95;

export type PointKind = 'stick-fixed' | 'stick-free';

/** What was flown at one CG position, and its slope where there are points enough. */
export interface FlownSeries {
  /** Mean CG [-] */
  readonly cg: number;
  readonly points: readonly FlownPoint[];
  readonly liftCoefficients: readonly number[];
  /** Elevator [rad], or stick force over dynamic pressure [m²]. */
  readonly controls: readonly number[];
  readonly slope?: FittedSlope;
  /** Half width of the slope's 95 % limits, from the scatter of these points alone. */
  readonly slopeUncertainty?: number;
}

export interface MeasuredNeutralPoint {
  readonly kind: PointKind;
  /** From forward to aft. */
  readonly series: readonly FlownSeries[];
  /** Absent where the points tell none. */
  readonly fit?: FlightTestFit;
  /** The fit, where it is worth correcting a study by: limits with ends, and slopes that go the right way. */
  readonly sound?: SoundFit;
  readonly warnings: readonly Warning[];
}

export type SoundFit = FlightTestFit & Required<Pick<FlightTestFit, 'limits'>>;

const leastPoints = 3;
/** Greatest over least lift coefficient that a slope needs [-]: speeds 5 % apart. A choice of ours. */
const leastLiftRatio = 1.1;
/** Flown CGs should be this far apart [-]. A choice of ours, about the scatter of good data. */
const leastCgRange = 0.03;
/** Spread of CG within one position that is told [-]. */
const tellCgSpread = 0.005;
/** Distance to the neutral point that is kept when flying [-]: common practice, no source. */
const keptMargin = 0.05;
/** Extrapolation over more than so many times the flown range is told [-]. A choice of ours. */
const farTimes = 2;

const percent = (fraction: number) => (100 * fraction).toFixed(1);

/** Measured neutral points of one state: stick fixed, and stick free where there are forces. */
export function measureState(state: FlownState): MeasuredNeutralPoint[] {
  const withForce = state.points.filter(({ stickForce }) => stickForce !== undefined);
  const fixed = measure('stick-fixed', state, state.points, []);
  if (withForce.length === 0) return [fixed];
  const missing = state.points.length - withForce.length;
  const told: Warning[] =
    missing === 0
      ? []
      : [
          {
            code: 'FORCES_MISSING',
            text: `${missing} of ${state.points.length} points have no stick force.`,
          },
        ];
  return [fixed, measure('stick-free', state, withForce, told)];
}

function measure(
  kind: PointKind,
  state: FlownState,
  points: readonly FlownPoint[],
  told: readonly Warning[],
): MeasuredNeutralPoint {
  const warnings = [...told];
  const warn = (code: WarningCode, text: string) => warnings.push({ code, text });
  const series = cgPositions(points).map((own) => seriesOf(kind, own, warn));
  const sound = series.filter(({ slope }) => slope !== undefined);
  if (sound.length < 2) {
    const flown =
      sound.length === 1 ? `only CG ${percent(sound[0]!.cg)} % MAC gives a slope` : 'no CG gives a slope';
    warn('FEWER_THAN_TWO_CGS', `A neutral point needs slopes at two CG positions, and ${flown}.`);
    return { kind, series, warnings };
  }
  const fit = fitFlightTest(sound.map(forFit), confidence);
  if (fit.kind !== 'fitted') throw new Error(`checked flight-test data were refused: ${fit.reason}`);
  warnCgs(sound, warn);
  warnFit(kind, sound, fit, warn);
  if (!state.idle) {
    warn(
      'POWER_ON',
      'With power on the thrust line and the slipstream bend the curve as well: what is found is the CG at which the control goes flat against speed (trim slope limit, force slope limit), not the neutral point at constant speed. A correction is better taken from a state at idle.',
    );
  }
  const { limits } = fit;
  const isSound = limits !== undefined && flattens(kind, fit);
  return { kind, series, fit, ...(isSound && { sound: { ...fit, limits } }), warnings };
}

/** Trailing edge down and pull have opposite signs; of a stable aeroplane an aft CG flattens both curves. */
function flattens(kind: PointKind, { slopeByCentreOfGravity: trend }: FlightTestFit): boolean {
  return kind === 'stick-fixed' ? trend > 0 : trend < 0;
}

type Warn = (code: WarningCode, text: string) => void;

function forFit({ cg, liftCoefficients, controls }: FlownSeries): FlightTestSeries {
  return { centreOfGravity: cg, liftCoefficients, controls };
}

function seriesOf(kind: PointKind, points: readonly FlownPoint[], warn: Warn): FlownSeries {
  const cg = points.reduce((sum, point) => sum + point.cg, 0) / points.length;
  const liftCoefficients = points.map((point) => point.liftCoefficient);
  const controls = points.map((point) => controlOf(kind, point));
  const series = { cg, points, liftCoefficients, controls };
  const at = `At CG ${percent(cg)} % MAC`;
  if (points.length < leastPoints) {
    warn(
      'TOO_FEW_POINTS',
      `${at} there are ${points.length} points; ${leastPoints} at least make a slope. They are left out.`,
    );
    return series;
  }
  if (Math.max(...liftCoefficients) < leastLiftRatio * Math.min(...liftCoefficients)) {
    warn(
      'NARROW_SPEEDS',
      `${at} all points have nearly the same lift coefficient. They are left out: fly slower and faster.`,
    );
    return series;
  }
  const slope = fitSlope(forFit(series));
  const slopeUncertainty = studentQuantile(confidence, points.length - 2) * slope.standardError;
  return { ...series, slope, slopeUncertainty };
}

/** Stick force over dynamic pressure is straight in the lift coefficient, as the elevator angle is (report.ts). */
function controlOf(
  kind: PointKind,
  { elevator, stickForce = Number.NaN, dynamicPressure }: FlownPoint,
): number {
  return kind === 'stick-fixed' ? elevator : stickForce / dynamicPressure;
}

function warnCgs(series: readonly FlownSeries[], warn: Warn): void {
  const range = series.at(-1)!.cg - series[0]!.cg;
  if (range < leastCgRange) {
    warn(
      'CGS_CLOSE',
      `The CG positions lie ${percent(range)} % MAC apart; ${percent(leastCgRange)} % at least are wanted.`,
    );
  }
  for (const { cg, points } of series) {
    const spread = points.at(-1)!.cg - points[0]!.cg;
    if (spread <= tellCgSpread) continue;
    warn(
      'CG_SPREAD',
      `Points from ${percent(points[0]!.cg)} to ${percent(points.at(-1)!.cg)} % MAC count as CG ${percent(cg)} %.`,
    );
  }
}

function warnFit(kind: PointKind, series: readonly FlownSeries[], fit: FlightTestFit, warn: Warn): void {
  const { neutralPoint, limits, slopeByCentreOfGravityT, curvature } = fit;
  if (curvature !== undefined && !curvature.straight) {
    warn(
      'NOT_STRAIGHT',
      `The curves are not straight (C_L² with t ${curvature.t.toFixed(1)}, limit ±${curvature.limit.toFixed(1)}): the slope depends on the speed. Look for flow separation, thrust, or a speed that is not calibrated.`,
    );
  }
  const needed = studentQuantile(confidence, fit.degreesOfFreedom);
  if (Math.abs(slopeByCentreOfGravityT) < needed) {
    warn(
      'SLOPES_ALIKE',
      `The slopes do not differ significantly between the CG positions (t ${slopeByCentreOfGravityT.toFixed(1)}, needed ±${needed.toFixed(1)}).`,
    );
  }
  if (limits === undefined) {
    warn(
      'LIMITS_OPEN',
      'The 95 % limits have no end: the data do not fix the neutral point. Fly CG positions farther apart, or more points.',
    );
  }
  if (!flattens(kind, fit)) {
    warn(
      'WRONG_WAY',
      'The slopes grow steeper as the CG goes aft, which no aeroplane does: check signs, CGs and speeds.',
    );
    return;
  }
  warnPlace(series, neutralPoint, limits?.lower ?? neutralPoint, warn);
}

function warnPlace(series: readonly FlownSeries[], neutralPoint: number, lower: number, warn: Warn): void {
  const [forward, aft] = [series[0]!.cg, series.at(-1)!.cg];
  if (Math.min(neutralPoint, lower) - aft < keptMargin) {
    warn(
      'NEAR_NEUTRAL',
      `The aftmost CG flown, ${percent(aft)} % MAC, may lie within ${percent(keptMargin)} % of the neutral point, or behind it. Do not go farther aft; fly farther forward instead.`,
    );
  }
  if (neutralPoint - aft > farTimes * (aft - forward)) {
    const [beyond, flown] = [percent(neutralPoint - aft), percent(aft - forward)];
    warn(
      'FAR_EXTRAPOLATION',
      `The neutral point lies ${beyond} % MAC behind the aftmost CG flown, and only ${flown} % were flown.`,
    );
  }
}
