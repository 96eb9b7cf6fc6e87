import { arcLengths, type Polyline, pointAlong, type Spot } from './polyline.ts';

/** A text that wants a place on one of some lines. */
export interface LineLabelRequest {
  readonly text: string;
  /** Width and height of the text [px]. */
  readonly width: number;
  readonly height: number;
  readonly lines: readonly Polyline[];
  /** Where along the line it would best stand: 0 at the start, 1 at the end. */
  readonly best?: number;
}

export interface LineLabel {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  /** Degrees clockwise, −90…90, so that the text is never upside down. */
  readonly angle: number;
  /** The room it takes. */
  readonly spots: readonly Spot[];
}

interface Candidate extends LineLabel {
  readonly score: number;
}

const stepAlong = 6;
const endClearance = 5;
const padding = 2;
/** Chord over arc below which a line bends too much to carry a text. */
const straightEnough = 0.96;

/**
 * Places texts on their lines, the first requests first, clear of one another, of the spots given
 * and of the frame. Null where a text finds no place.
 */
export function placeOnLines(
  requests: readonly LineLabelRequest[],
  keepClear: readonly Spot[],
  frame: { readonly width: number; readonly height: number },
): (LineLabel | null)[] {
  const taken = [...keepClear];
  return requests.map((request) => {
    const candidates = request.lines
      .flatMap((line) => candidatesOn(line, request))
      .sort((a, b) => a.score - b.score);
    const free = candidates.find(({ spots }) =>
      spots.every((spot) => inside(spot, frame) && isClear(spot, taken)),
    );
    if (free === undefined) return null;
    taken.push(...free.spots);
    const { text, x, y, angle, spots } = free;
    return { text, x, y, angle, spots };
  });
}

function candidatesOn(line: Polyline, request: LineLabelRequest): Candidate[] {
  if (line.length < 2) return [];
  const { text, width, height, best = 0.5 } = request;
  const lengths = arcLengths(line);
  const total = lengths.at(-1)!;
  const margin = width / 2 + endClearance;
  const found: Candidate[] = [];
  for (let s = margin; s <= total - margin; s += stepAlong) {
    const a = pointAlong(line, lengths, s - width / 2);
    const b = pointAlong(line, lengths, s + width / 2);
    const straight = Math.hypot(b.x - a.x, b.y - a.y) / width;
    if (straight < straightEnough) continue;
    const middle = pointAlong(line, lengths, s);
    const angle = uprightAngle(b.x - a.x, b.y - a.y);
    const spots = textSpots(middle.x, middle.y, angle, width, height);
    found.push({
      text,
      x: middle.x,
      y: middle.y,
      angle,
      spots,
      score: Math.abs(s / total - best) + (1 - straight) * 4,
    });
  }
  return found;
}

function uprightAngle(dx: number, dy: number): number {
  const angle = (Math.atan2(dy, dx) * 180) / Math.PI;
  if (angle > 90) return angle - 180;
  return angle < -90 ? angle + 180 : angle;
}

/** The room of a turned text, as a row of spots. */
export function textSpots(x: number, y: number, angle: number, width: number, height: number): Spot[] {
  const radius = height / 2 + padding;
  const reach = Math.max(0, width / 2 + padding - radius);
  const count = Math.max(1, Math.ceil((2 * reach) / radius) + 1);
  const turn = (angle * Math.PI) / 180;
  return Array.from({ length: count }, (_, k) => {
    const along = count === 1 ? 0 : -reach + (2 * reach * k) / (count - 1);
    return { x: x + along * Math.cos(turn), y: y + along * Math.sin(turn), radius };
  });
}

export function inside(
  { x, y, radius }: Spot,
  frame: { readonly width: number; readonly height: number },
): boolean {
  return x >= radius && y >= radius && x <= frame.width - radius && y <= frame.height - radius;
}

export function isClear(spot: Spot, taken: readonly Spot[]): boolean {
  for (const other of taken) {
    const dx = spot.x - other.x;
    const dy = spot.y - other.y;
    const apart = spot.radius + other.radius;
    if (dx * dx + dy * dy < apart * apart) return false;
  }
  return true;
}
