/** Round values from `from` to `to`, steps of 1, 2 or 5 times a power of ten, about `count` of them. */
export function niceValues(from: number, to: number, count: number): { values: number[]; decimals: number } {
  const rough = (to - from) / count;
  if (!(rough > 0)) return { values: [], decimals: 0 };
  const power = Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((factor) => factor * 10 ** power).find((each) => each >= rough * 0.999)!;
  const [first, last] = [Math.ceil(from / step - 1e-9), Math.floor(to / step + 1e-9)];
  const values = Array.from({ length: last - first + 1 }, (_, k) => (first + k) * step);
  return { values, decimals: Math.max(0, -Math.floor(Math.log10(step) + 1e-9)) };
}
