/** Adaptive Simpson quadrature, for checks of closed forms only; absolute tolerance. */
export function integrate(f: (x: number) => number, from: number, to: number, tolerance = 1e-11): number {
  const middle = (from + to) / 2;
  return refine(f, from, to, f(from), f(middle), f(to), tolerance, 40);
}

function refine(
  f: (x: number) => number,
  a: number,
  b: number,
  fa: number,
  fm: number,
  fb: number,
  tolerance: number,
  depth: number,
): number {
  const m = (a + b) / 2;
  const fl = f((a + m) / 2);
  const fr = f((m + b) / 2);
  const whole = ((b - a) / 6) * (fa + 4 * fm + fb);
  const parts = ((b - a) / 12) * (fa + 4 * fl + 2 * fm + 4 * fr + fb);
  if (depth === 0 || Math.abs(parts - whole) < 15 * tolerance) return parts + (parts - whole) / 15;
  return (
    refine(f, a, m, fa, fl, fm, tolerance / 2, depth - 1) +
    refine(f, m, b, fm, fr, fb, tolerance / 2, depth - 1)
  );
}
