import { arcLengths, type Point, type Polyline, pointAlong } from './polyline.ts';

export interface Tick {
  readonly from: Point;
  readonly to: Point;
}

/** Slant of a tick against the line, so that it reads as a hatch and not as a scale [rad]. */
const slant = Math.PI / 4;

/**
 * Short slanted ticks along a line, on its forbidden side.
 * @param spacing distance between ticks along the line [px]
 * @param length  length of a tick [px]
 * @param side    for a point of the line and the unit normal to its right: +1 when the forbidden
 *                side is where the normal points, −1 when it is the other
 */
export function hatchTicks(
  line: Polyline,
  spacing: number,
  length: number,
  side: (at: Point, normal: Point) => 1 | -1,
): Tick[] {
  if (line.length < 2) return [];
  const lengths = arcLengths(line);
  const total = lengths.at(-1)!;
  const ticks: Tick[] = [];
  for (let s = Math.min(spacing, total) / 2; s < total; s += spacing) {
    const { x, y, ux, uy } = pointAlong(line, lengths, s);
    const sign = side({ x, y }, { x: -uy, y: ux });
    const dx = Math.cos(slant) * ux - sign * Math.sin(slant) * uy;
    const dy = Math.cos(slant) * uy + sign * Math.sin(slant) * ux;
    ticks.push({ from: { x, y }, to: { x: x + length * dx, y: y + length * dy } });
  }
  return ticks;
}
