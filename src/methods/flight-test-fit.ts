/**
 * Neutral point from flight test: elevator angle against lift coefficient at several CG positions, the
 * slopes extrapolated over the CG to nil. With stick force over dynamic pressure in place of the elevator
 * it is the stick-free one. Least squares throughout.
 */
import { studentQuantile } from './student-t.ts';

/** Points flown at one CG position, in one state of flaps and power. */
export interface FlightTestSeries {
  /** h, fraction of the MAC [-] */
  readonly centreOfGravity: number;
  /** C_L of each point [-] */
  readonly liftCoefficients: readonly number[];
  /** Elevator angle [rad], or stick force over dynamic pressure, of each point. */
  readonly controls: readonly number[];
}

export interface FittedSlope {
  readonly centreOfGravity: number;
  readonly points: number;
  /** Slope of the control by C_L, in the control's unit. */
  readonly slope: number;
  /** Control at C_L 0. */
  readonly intercept: number;
  /** Standard error of the slope, from this series' own scatter. */
  readonly standardError: number;
}

/** Whether the curves are straight: one coefficient of C_L², common to all series, against its scatter. */
export interface CurvatureTest {
  /** Coefficient of C_L², in the control's unit. */
  readonly coefficient: number;
  /** Coefficient over its standard error [-]. */
  readonly t: number;
  /** |t| from which on the curves count as bent, at the confidence asked for [-]. */
  readonly limit: number;
  readonly straight: boolean;
}

export interface FlightTestFit {
  readonly kind: 'fitted';
  readonly slopes: readonly FittedSlope[];
  /** h_n [-] */
  readonly neutralPoint: number;
  /** Fieller's limits of h_n [-]; absent where the slopes do not differ enough over the CG to give any. */
  readonly limits?: { readonly lower: number; readonly upper: number };
  /** d(slope)/dh, in the control's unit. */
  readonly slopeByCentreOfGravity: number;
  /** That over its standard error [-]: small means that the CG positions are too close. */
  readonly slopeByCentreOfGravityT: number;
  /** Standard deviation of a point about the fit, in the control's unit. */
  readonly scatter: number;
  readonly degreesOfFreedom: number;
  /** Absent where too few points are left to tell. */
  readonly curvature?: CurvatureTest;
}

export interface NoFlightTestFit {
  readonly kind: 'not-computed';
  readonly reason:
    | 'one CG position'
    | 'fewer than three points in a series'
    | 'one lift coefficient in a series';
  /** Series that is at fault, in the order given. */
  readonly series?: number;
}

/** Sums of one series about its means: enough for every fit below. */
interface SeriesSums {
  readonly centreOfGravity: number;
  readonly points: number;
  readonly meanLift: number;
  readonly meanControl: number;
  /** Σ(x − x̄)², Σ(x − x̄)(y − ȳ) */
  readonly sxx: number;
  readonly sxy: number;
  /** Σ of the squared residuals of the straight line. */
  readonly residual: number;
  /** With q = x² less its own straight line: Σq², Σq y. */
  readonly sqq: number;
  readonly sqy: number;
}

const leastPoints = 3;

function sumsOf(series: FlightTestSeries): SeriesSums {
  const { centreOfGravity, liftCoefficients, controls } = series;
  const points = liftCoefficients.length;
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / points;
  const meanLift = mean(liftCoefficients);
  const meanControl = mean(controls);
  const x = liftCoefficients.map((value) => value - meanLift);
  const y = controls.map((value) => value - meanControl);
  const product = (a: readonly number[], b: readonly number[]) =>
    a.reduce((sum, value, i) => sum + value * b[i]!, 0);
  const sxx = product(x, x);
  const sxy = product(x, y);
  const slope = sxy / sxx;
  const rest = y.map((value, i) => value - slope * x[i]!);
  const cubic = x.reduce((sum, value) => sum + value ** 3, 0) / sxx;
  const q = x.map((value) => value ** 2 - sxx / points - cubic * value);
  return {
    centreOfGravity,
    points,
    meanLift,
    meanControl,
    sxx,
    sxy,
    residual: product(rest, rest),
    sqq: product(q, q),
    sqy: product(q, y),
  };
}

function slopeOf({
  centreOfGravity,
  points,
  meanLift,
  meanControl,
  sxx,
  sxy,
  residual,
}: SeriesSums): FittedSlope {
  const slope = sxy / sxx;
  return {
    centreOfGravity,
    points,
    slope,
    intercept: meanControl - slope * meanLift,
    standardError: Math.sqrt(residual / (points - 2) / sxx),
  };
}

/**
 * Straight line of one series, which by itself tells no neutral point.
 * @param series at least three points, with lift coefficients that differ
 */
export function fitSlope(series: FlightTestSeries): FittedSlope {
  return slopeOf(sumsOf(series));
}

function curvatureOf(sums: readonly SeriesSums[], confidence: number): CurvatureTest | undefined {
  const total = (key: 'points' | 'residual' | 'sqq' | 'sqy') => sums.reduce((sum, s) => sum + s[key], 0);
  const degreesOfFreedom = total('points') - 2 * sums.length - 1;
  const sqq = total('sqq');
  if (degreesOfFreedom < 1 || !(sqq > 0)) return undefined;
  const coefficient = total('sqy') / sqq;
  // Rounding may take a perfect fit just below nil.
  const residual = Math.max(0, total('residual') - coefficient ** 2 * sqq);
  const t = coefficient === 0 ? 0 : coefficient / Math.sqrt(residual / degreesOfFreedom / sqq);
  const limit = studentQuantile(confidence, degreesOfFreedom);
  return { coefficient, t, limit, straight: Math.abs(t) < limit };
}

/**
 * Interval of h in which the line of slopes, s̄ + β (h − h̄), may cross nil: Fieller's limits, the roots of
 * (s̄ + β d)² = t² s² (1/W + d²/D) in d = h − h̄; undefined where the interval has no end.
 */
function fiellerLimits(
  meanPlace: number,
  meanSlope: number,
  trend: number,
  meanVariance: number,
  trendVariance: number,
  t: number,
): { lower: number; upper: number } | undefined {
  const a = trend ** 2 - t * t * trendVariance;
  if (!(a > 0)) return undefined;
  const b = meanSlope * trend;
  const c = meanSlope ** 2 - t * t * meanVariance;
  const root = Math.sqrt(Math.max(0, b * b - a * c));
  return { lower: meanPlace + (-b - root) / a, upper: meanPlace + (-b + root) / a };
}

/**
 * Neutral point from series at two or more CG positions.
 * @param series     at least two CG positions, three points each
 * @param confidence of the limits and of the test for straightness (0.95 for 95 %) [-]
 * One least-squares fit of all points: each series has its own intercept, the slopes are linear in h, and the
 * scatter is the same throughout. Its slopes' weights are Σ(C_L − mean)². Linear in h is exact where the
 * shares of wing and tail are (trim.ts). Limits by Fieller (1954, from memory) with Student's t; they are not
 * symmetrical about h_n. Errors of C_L and of the CG itself are not in them.
 */
export function fitFlightTest(
  series: readonly FlightTestSeries[],
  confidence: number,
): FlightTestFit | NoFlightTestFit {
  const few = series.findIndex(({ liftCoefficients }) => liftCoefficients.length < leastPoints);
  if (few >= 0) {
    return { kind: 'not-computed', reason: 'fewer than three points in a series', series: few };
  }
  const sums = series.map(sumsOf);
  const even = sums.findIndex(({ sxx }) => !(sxx > 0));
  if (even >= 0) return { kind: 'not-computed', reason: 'one lift coefficient in a series', series: even };
  const weight = sums.reduce((sum, s) => sum + s.sxx, 0);
  const meanPlace = sums.reduce((sum, s) => sum + s.sxx * s.centreOfGravity, 0) / weight;
  const spread = sums.reduce((sum, s) => sum + s.sxx * (s.centreOfGravity - meanPlace) ** 2, 0);
  if (!(new Set(series.map((s) => s.centreOfGravity)).size > 1 && spread > 0)) {
    return { kind: 'not-computed', reason: 'one CG position' };
  }
  const meanSlope = sums.reduce((sum, s) => sum + s.sxy, 0) / weight;
  const trend = sums.reduce((sum, s) => sum + (s.centreOfGravity - meanPlace) * s.sxy, 0) / spread;
  const residual = sums.reduce((sum, s) => {
    const off = s.sxy / s.sxx - meanSlope - trend * (s.centreOfGravity - meanPlace);
    return sum + s.residual + s.sxx * off * off;
  }, 0);
  const degreesOfFreedom = sums.reduce((sum, s) => sum + s.points, 0) - sums.length - 2;
  const variance = residual / degreesOfFreedom;
  const t = studentQuantile(confidence, degreesOfFreedom);
  const limits = fiellerLimits(meanPlace, meanSlope, trend, variance / weight, variance / spread, t);
  const curvature = curvatureOf(sums, confidence);
  return {
    kind: 'fitted',
    slopes: sums.map(slopeOf),
    neutralPoint: meanPlace - meanSlope / trend,
    ...(limits && { limits }),
    slopeByCentreOfGravity: trend,
    slopeByCentreOfGravityT: trend / Math.sqrt(variance / spread),
    scatter: Math.sqrt(variance),
    degreesOfFreedom,
    ...(curvature && { curvature }),
  };
}
