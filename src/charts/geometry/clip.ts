import type { Point, Polyline } from './polyline.ts';

export interface Frame {
  /** [px] */
  readonly width: number;
  readonly height: number;
}

/** The parts of a line that lie within 0…width, 0…height. Points that are not finite part the line. */
export function clipToFrame(line: Polyline, frame: Frame): Point[][] {
  const parts: Point[][] = [];
  let joined = false;
  for (let i = 1; i < line.length; i++) {
    const [a, b] = [line[i - 1]!, line[i]!];
    const within = partWithin(a, b, frame);
    if (within === null) {
      joined = false;
      continue;
    }
    const [start, end] = within;
    if (!joined || start > 0) parts.push([at(a, b, start)]);
    parts.at(-1)!.push(at(a, b, end));
    joined = end === 1;
  }
  return parts;
}

function at(a: Point, b: Point, t: number): Point {
  if (t === 0) return a;
  return t === 1 ? b : { x: a.x + t * (b.x - a.x), y: a.y + t * (b.y - a.y) };
}

/** Where a straight piece enters and leaves the frame, as fractions of it (Liang and Barsky 1984, from memory). */
function partWithin(a: Point, b: Point, { width, height }: Frame): [number, number] | null {
  if (![a.x, a.y, b.x, b.y].every(Number.isFinite)) return null;
  let [start, end] = [0, 1];
  const sides: readonly (readonly [number, number])[] = [
    [a.x - b.x, a.x],
    [b.x - a.x, width - a.x],
    [a.y - b.y, a.y],
    [b.y - a.y, height - a.y],
  ];
  for (const [outward, room] of sides) {
    if (outward === 0 && room < 0) return null;
    if (outward < 0) start = Math.max(start, room / outward);
    if (outward > 0) end = Math.min(end, room / outward);
  }
  return start < end ? [start, end] : null;
}
