import { textWidth } from '../text-width.ts';
import { textSize, weight } from '../theme.ts';
import { inside, isClear, textSpots } from './line-labels.ts';
import type { Point, Polyline, Spot } from './polyline.ts';

/** A line of a family that wants its number at one of its ends. */
export interface NumberedLine {
  readonly line: Polyline;
  readonly text: string;
}
export interface EndLabel extends Point {
  readonly text: string;
}

interface Place {
  readonly label: EndLabel;
  readonly spots: readonly Spot[];
}

const gap = 5;
/** Sides of an end to try; the sideways ones first, where numbers line up best. */
const sides: readonly (readonly [number, number])[] = [
  [1, 0],
  [-1, 0],
  [1, -1],
  [1, 1],
  [-1, -1],
  [-1, 1],
  [0, -1],
  [0, 1],
];

/**
 * Numbers of a family of lines, all at the same end and on the same side of it, so that they read
 * as one scale: at whichever end and side the most of them stand clear of `keepClear`, of one
 * another and of the frame. One of them, as near the middle as may be, also says `name`.
 * @param keepClear spots that no text may touch, all lines of the plot among them
 * @returns middles of the texts; numbers without room are left out
 */
export function placeAtEnds(
  family: readonly NumberedLine[],
  name: string,
  keepClear: readonly Spot[],
  frame: { readonly width: number; readonly height: number },
): { labels: EndLabel[]; spots: Spot[] } {
  let best: Place[] = [];
  for (const atStart of [false, true]) {
    for (const side of sides) {
      const place = (index: number, text: string) =>
        placeFor(family[index]!, text, atStart, side, keepClear, frame);
      const plain = family.map(({ text }, index) => place(index, text));
      for (const placed of namings(plain, (index) => place(index, `${name} ${family[index]!.text}`))) {
        if (placed.length > best.length) best = placed;
      }
    }
  }
  return { labels: best.map(({ label }) => label), spots: best.flatMap(({ spots }) => spots) };
}

/** The ways to put the name to one number, the middle ones first, and the way without it. A name counts as much as a number. */
function* namings(
  plain: readonly (Place | null)[],
  named: (index: number) => Place | null,
): Generator<Place[]> {
  const middle = (plain.length - 1) / 2;
  const fromMiddle = [...plain.keys()].sort((i, j) => Math.abs(i - middle) - Math.abs(j - middle) || i - j);
  const unnamed = fill(plain, []);
  for (const index of fromMiddle) {
    const place = named(index);
    if (place === null) continue;
    const others = plain.map((each, other) => (other === index ? null : each));
    const filled = fill(others, [place]);
    if (filled.length >= unnamed.length) {
      yield filled;
      return;
    }
  }
  yield unnamed;
}

/** Takes places in order, the two ends of the family first since they tell its range, skipping those that would touch. */
function fill(places: readonly (Place | null)[], first: Place[]): Place[] {
  const taken = [...first];
  const last = places.length - 1;
  const order = [...new Set([0, last, ...places.keys()])];
  for (const index of order) {
    const place = places[index];
    if (place == null) continue;
    const others = taken.flatMap(({ spots }) => spots);
    if (place.spots.every((spot) => isClear(spot, others))) taken.push(place);
  }
  return taken;
}

function placeFor(
  { line }: NumberedLine,
  text: string,
  atStart: boolean,
  [right, down]: readonly [number, number],
  keepClear: readonly Spot[],
  frame: { readonly width: number; readonly height: number },
): Place | null {
  const end = atStart ? line[0] : line.at(-1);
  if (end === undefined) return null;
  const width = textWidth(text, textSize.small, weight.strong);
  const x = end.x + right * (gap + width / 2);
  const y = end.y + down * (gap + textSize.small / 2);
  const spots = textSpots(x, y, 0, width, textSize.small);
  const free = spots.every((spot) => inside(spot, frame) && isClear(spot, keepClear));
  return free ? { label: { x, y, text }, spots } : null;
}
