/** Lines in a plane, in pixels from the top left unless a function says otherwise. */
export interface Point {
  readonly x: number;
  readonly y: number;
}
export type Polyline = readonly Point[];
/** A round spot that labels keep clear of. */
export interface Spot extends Point {
  readonly radius: number;
}

/** Distance along the line to each of its points, starting at 0. */
export function arcLengths(line: Polyline): number[] {
  const lengths = [0];
  for (let i = 1; i < line.length; i++) {
    lengths.push(lengths[i - 1]! + Math.hypot(line[i]!.x - line[i - 1]!.x, line[i]!.y - line[i - 1]!.y));
  }
  return lengths;
}

/** The point at distance `s` along the line, and the unit direction of the line there. Ends are held. */
export function pointAlong(
  line: Polyline,
  lengths: readonly number[],
  s: number,
): Point & { ux: number; uy: number } {
  let i = 1;
  while (i < line.length - 1 && lengths[i]! < s) i++;
  const a = line[i - 1]!;
  const b = line[i]!;
  const span = lengths[i]! - lengths[i - 1]! || 1;
  const t = Math.min(1, Math.max(0, (s - lengths[i - 1]!) / span));
  return {
    x: a.x + t * (b.x - a.x),
    y: a.y + t * (b.y - a.y),
    ux: (b.x - a.x) / span,
    uy: (b.y - a.y) / span,
  };
}

/** The line without points that lie closer than `tolerance` to the line through their neighbours (Ramer, Douglas and Peucker). */
export function simplify(line: Polyline, tolerance: number): Point[] {
  if (line.length < 3) return [...line];
  const first = line[0]!;
  const last = line.at(-1)!;
  let far = 0;
  let worst = -1;
  for (let i = 1; i < line.length - 1; i++) {
    const distance = distanceToSegment(line[i]!, first, last);
    if (distance > worst) [worst, far] = [distance, i];
  }
  if (worst <= tolerance) return [first, last];
  return [
    ...simplify(line.slice(0, far + 1), tolerance).slice(0, -1),
    ...simplify(line.slice(far), tolerance),
  ];
}

export function distanceToSegment(p: Point, a: Point, b: Point): number {
  const dx = b.x - a.x;
  const dy = b.y - a.y;
  const square = dx * dx + dy * dy;
  const t = square === 0 ? 0 : Math.min(1, Math.max(0, ((p.x - a.x) * dx + (p.y - a.y) * dy) / square));
  return Math.hypot(p.x - a.x - t * dx, p.y - a.y - t * dy);
}

/** The parts of a line that lie outside every spot; the cuts are true to about a pixel. */
export function cutOut(line: Polyline, spots: readonly Spot[]): Point[][] {
  const near = spots.filter((spot) => touches(line, spot));
  if (near.length === 0) return line.length > 1 ? [[...line]] : [];
  const parts: Point[][] = [[]];
  for (const point of subdivided(line, near)) {
    const hidden = near.some((spot) => Math.hypot(point.x - spot.x, point.y - spot.y) < spot.radius);
    if (!hidden) parts.at(-1)!.push(point);
    else if (parts.at(-1)!.length > 0) parts.push([]);
  }
  return parts.filter((part) => part.length > 1).map((part) => simplify(part, 0.1));
}

function touches(line: Polyline, spot: Spot): boolean {
  for (let i = 1; i < line.length; i++) {
    if (distanceToSegment(spot, line[i - 1]!, line[i]!) < spot.radius) return true;
  }
  return false;
}

const cutStep = 1;
/** The line with extra points about a pixel apart wherever it runs through a spot. */
function subdivided(line: Polyline, spots: readonly Spot[]): Point[] {
  const dense: Point[] = [line[0]!];
  for (let i = 1; i < line.length; i++) {
    const a = line[i - 1]!;
    const b = line[i]!;
    const crosses = spots.some((spot) => distanceToSegment(spot, a, b) < spot.radius);
    const steps = crosses ? Math.ceil(Math.hypot(b.x - a.x, b.y - a.y) / cutStep) : 1;
    for (let k = 1; k <= steps; k++)
      dense.push({ x: a.x + (k / steps) * (b.x - a.x), y: a.y + (k / steps) * (b.y - a.y) });
  }
  return dense;
}

/** Spots along a line, about `every` apart. */
export function spotsAlong(line: Polyline, every: number, radius: number): Spot[] {
  if (line.length < 2) return [];
  const lengths = arcLengths(line);
  const total = lengths.at(-1)!;
  const count = Math.ceil(total / every);
  return Array.from({ length: count + 1 }, (_, k) => {
    const { x, y } = pointAlong(line, lengths, Math.min(total, k * every));
    return { x, y, radius };
  });
}
