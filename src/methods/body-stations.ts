/**
 * Body stations: where they go when the wing or the tail moves, and the width between them. Arrays as in
 * body.ts: places ascending aft [m] and widths [m].
 */

/**
 * Body width at a place [m]: linear between stations, nil beyond the first and the last.
 * @param count    stations used, ≥ 2
 * @param stations their places, ascending [m]
 * @param widths   widths there [m]
 * @param x        place, on the same axis [m]
 * Exact for the shape as given.
 */
export function bodyWidthAt(count: number, stations: Float64Array, widths: Float64Array, x: number): number {
  if (!(x >= stations[0] && x <= stations[count - 1])) return 0;
  let i = 0;
  // Find the segment that holds x.
  while (i < count - 2 && x > stations[i + 1]) i++;
  const share = (x - stations[i]) / (stations[i + 1] - stations[i]);
  return widths[i] + share * (widths[i + 1] - widths[i]);
}

/**
 * Place of a body station in a combination, on the wing's axis: aft of the root's leading edge [m].
 * Ahead of the leading edge a station keeps its distance from it; over the root chord it is mapped
 * linearly, edge to edge; aft of the trailing edge the body is stretched linearly so that the last
 * station keeps its distance from the tail's quarter-MAC, or, with a boom, keeps its distance from the
 * trailing edge.
 * @param x                 the station in the baseline, aft of the baseline's root leading edge [m]
 * @param baselineRootChord root chord in the baseline, > 0 [m]
 * @param baselineTail      tail's quarter-MAC in the baseline, aft of the root's leading edge [m]
 * @param lastStation       the last station in the baseline, aft of the root's leading edge [m]
 * @param rootChord         root chord of the combination [m]
 * @param tail              tail's quarter-MAC of the combination, aft of its root's leading edge [m]
 * @param boom              whether a boom runs from the last station to the tail
 * Ours, a rule of this program; the same that `multhoppForward` and `multhoppAft` integrate.
 */
export function bodyStationPlace(
  x: number,
  baselineRootChord: number,
  baselineTail: number,
  lastStation: number,
  rootChord: number,
  tail: number,
  boom: boolean,
): number {
  if (x <= 0) return x;
  if (x <= baselineRootChord) return (x * rootChord) / baselineRootChord;
  const behind = x - baselineRootChord;
  if (boom) return rootChord + behind;
  const newLast = tail + lastStation - baselineTail - rootChord;
  return rootChord + (behind * newLast) / (lastStation - baselineRootChord);
}
