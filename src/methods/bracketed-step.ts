/**
 * Where between the ends of a bracket to look next for the place at which a function is nil: the fraction
 * of the way from the latest place to the opposite end [-].
 * @param x1 latest place, f1 the function there
 * @param x2 opposite end, f2 the function there, of the other sign
 * @param x3 the place before, such that x1 lies between x2 and x3; not a number where there is none
 * @param f3 the function there
 * T. R. Chandrupatla, Advances in Engineering Software 28 (1997), from memory: inverse quadratic
 * interpolation where the three values are monotonic enough for it, else the middle. Always within 0…1.
 */
export function bracketedStep(
  x1: number,
  f1: number,
  x2: number,
  f2: number,
  x3: number,
  f3: number,
): number {
  const xi = (x1 - x2) / (x3 - x2);
  const phi = (f1 - f2) / (f3 - f2);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 1 / 2;
  const opposite = (f1 / (f2 - f1)) * (f3 / (f2 - f3));
  const before = ((x3 - x1) / (x2 - x1)) * (f1 / (f3 - f1)) * (f2 / (f3 - f2));
  return Math.min(1, Math.max(0, opposite + before));
}

/**
 * Where the parabola through three places turns.
 * @param x1 @param x2 @param x3 places, all different
 * @param f1 @param f2 @param f3 values there
 * Exact for a parabola; not a number, or infinite, for a straight line.
 */
export function parabolaVertex(
  x1: number,
  f1: number,
  x2: number,
  f2: number,
  x3: number,
  f3: number,
): number {
  const before = (x2 - x1) * (f2 - f3);
  const after = (x2 - x3) * (f2 - f1);
  return x2 - ((x2 - x1) * before - (x2 - x3) * after) / (2 * (before - after));
}
