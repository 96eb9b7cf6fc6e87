/** Where a function of one number is nil, for sizing; says so when it is nowhere or in several places. */

/** What `findRoot` found. `evaluations` counts the calls of the function. */
export type RootResult =
  /** One root; `value` is the function's there. */
  | { readonly kind: 'found'; readonly root: number; readonly value: number; readonly evaluations: number }
  /**
   * No change of sign on the grid. `nearest` is the grid's place with the value closest to nil, `value` that
   * value: by how much it is missed. `jumps` counts changes of sign over a pole or a step, which are no roots.
   */
  | {
      readonly kind: 'none';
      readonly nearest: number;
      readonly value: number;
      readonly jumps: number;
      readonly evaluations: number;
    }
  /** More than one root, ascending. */
  | { readonly kind: 'several'; readonly roots: readonly number[]; readonly evaluations: number }
  /** The function is not a number anywhere on the grid. */
  | { readonly kind: 'not-computed'; readonly evaluations: number };

/** Intervals of the grid on which changes of sign are looked for, unless stated. */
export const defaultGridIntervals = 8;

const largestIterations = 100;

/**
 * Roots of f between two places, by changes of sign on an even grid and Brent's rule in each.
 * @param f         function; not a number where it can't be computed
 * @param from      one end
 * @param to        other end
 * @param tolerance how near the root is found, > 0, in the unit of the argument
 * @param intervals of the grid, ≥ 1; roots closer together than one may be missed, as are roots without a
 *                  change of sign
 * R. P. Brent, Algorithms for Minimization without Derivatives (1973), from memory: inverse quadratic
 * interpolation and secant, with bisection to fall back on; never worse than bisection by more than a factor.
 * Places where f is not a number part the grid: no root is looked for beside them.
 */
export function findRoot(
  f: (x: number) => number,
  from: number,
  to: number,
  tolerance: number,
  intervals: number = defaultGridIntervals,
): RootResult {
  let evaluations = 0;
  const counted = (x: number) => {
    evaluations++;
    return f(x);
  };
  const roots: { root: number; value: number }[] = [];
  let jumps = 0;
  let nearest = Number.NaN;
  let least = Number.NaN;
  let xBefore = Number.NaN;
  let yBefore = Number.NaN;
  // Walk the grid; a change of sign against the place before is followed up at once.
  for (let i = 0; i <= intervals; i++) {
    const x = i === intervals ? to : from + ((to - from) * i) / intervals;
    const y = counted(x);
    if (!(Math.abs(y) >= Math.abs(least)) && !Number.isNaN(y)) {
      nearest = x;
      least = y;
    }
    if (y === 0) {
      roots.push({ root: x, value: 0 });
    } else if ((yBefore < 0 && y > 0) || (yBefore > 0 && y < 0)) {
      const root = brent(counted, xBefore, yBefore, x, y, tolerance);
      if (root === undefined) jumps++;
      else roots.push(root);
    }
    xBefore = x;
    yBefore = y;
  }
  if (roots.length === 1) return { kind: 'found', ...roots[0], evaluations };
  if (roots.length > 1) {
    const places = roots.map(({ root }) => root).sort((a, b) => a - b);
    return { kind: 'several', roots: places, evaluations };
  }
  if (Number.isNaN(least)) return { kind: 'not-computed', evaluations };
  return { kind: 'none', nearest, value: least, jumps, evaluations };
}

/**
 * Root in a bracket whose ends differ in sign; undefined where f jumps: its value there comes no nearer to
 * nil than at the bracket's ends, or is not a number.
 */
function brent(
  f: (x: number) => number,
  from: number,
  fFrom: number,
  to: number,
  fTo: number,
  tolerance: number,
): { root: number; value: number } | undefined {
  // b is the best place, a the one before, c the other side of the root.
  let [a, fa, b, fb] = [from, fFrom, to, fTo];
  let [c, fc] = [a, fa];
  let step = b - a;
  let stepBefore = step;
  for (let i = 0; i < largestIterations; i++) {
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, fa] = [b, fb];
      [b, fb] = [c, fc];
      [c, fc] = [a, fa];
    }
    const within = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2;
    const half = (c - b) / 2;
    if (Math.abs(half) <= within || fb === 0) break;
    const fast = Math.abs(stepBefore) >= within && Math.abs(fa) > Math.abs(fb);
    const tried = fast ? interpolatedStep(a, fa, b, fb, c, fc) : Number.NaN;
    // Take the step if it stays well inside the bracket and is less than half the last but one.
    const inside = tried * half > 0 && Math.abs(tried) < (3 / 2) * Math.abs(half) - within / 2;
    if (inside && Math.abs(tried) < Math.abs(stepBefore / 2)) {
      stepBefore = step;
      step = tried;
    } else {
      step = half;
      stepBefore = half;
    }
    [a, fa] = [b, fb];
    b += Math.abs(step) > within ? step : Math.sign(half) * within;
    fb = f(b);
    if (Number.isNaN(fb)) return undefined;
    if (fb > 0 === fc > 0) {
      [c, fc] = [a, fa];
      step = b - a;
      stepBefore = step;
    }
  }
  const atEnds = Math.min(Math.abs(fFrom), Math.abs(fTo));
  const narrow = Math.abs(to - from) <= tolerance;
  return Math.abs(fb) < atEnds || narrow ? { root: b, value: fb } : undefined;
}

/** Step from b by inverse quadratic interpolation, or the secant where a and c are one place. */
function interpolatedStep(a: number, fa: number, b: number, fb: number, c: number, fc: number): number {
  const s = fb / fa;
  if (a === c) return ((c - b) * s) / (s - 1);
  const q = fa / fc;
  const r = fb / fc;
  const top = s * ((c - b) * q * (q - r) - (b - a) * (r - 1));
  return -top / ((q - 1) * (r - 1) * (s - 1));
}
