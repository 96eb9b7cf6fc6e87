import type { Frame } from './geometry/clip.ts';
import { hatchTicks } from './geometry/hatch.ts';
import { type LineLabel, placeOnLines } from './geometry/line-labels.ts';
import { cutOut, type Point, type Polyline, type Spot, spotsAlong } from './geometry/polyline.ts';
import type { KeyItem } from './key-row.ts';
import { type Layer, type LineStyle, labels, polylines, segments } from './marks.ts';
import type { PixelMap } from './panel.ts';
import { cleanText, ellipsize, textWidth } from './text-width.ts';
import { colours, textSize } from './theme.ts';

/** A line of a plot with its name on it; a limit is hatched on the side that it forbids. Positions in pixels. */
export interface NamedLine {
  readonly label: string;
  readonly lines: readonly Polyline[];
  readonly style: LineStyle;
  /** +1 when the given unit normal of the line points to the forbidden side, −1 when against it; absent: no hatch. */
  readonly side?: (normal: Point) => 1 | -1;
  /** What the key says of a line no part of which is in the plot. */
  readonly absent?: string;
  /** Where along the line its name would best stand: 0 at the start, 1 at the end. */
  readonly best?: number;
}

/** Distance between hatch ticks along a limit, and length of a tick [px]. */
const tick = { spacing: 9, length: 8 } as const;
const plainRoom = 3;
const longestName = 260;

/** Dash patterns that tell limits apart, in their order. */
const dashes: readonly (readonly number[] | undefined)[] = [
  undefined,
  [8, 3],
  [3, 3],
  [9, 3, 2, 3],
  [14, 4],
  [2, 5],
];
const widths = { first: 2, other: 1.6 } as const;

/** Title of a CG axis that has forward at its left. */
export const cgAcross = '← forward · CG [% MAC] · aft →';

/** The look of the limit at `index`; after six limits the patterns start anew, a little thinner. */
export function limitStyle(index: number): LineStyle {
  const dash = dashes[index % dashes.length];
  return {
    color: colours.ink,
    width: index === 0 ? widths.first : index < dashes.length ? widths.other : 1,
    ...(dash === undefined ? {} : { dash }),
  };
}

/** The forbidden side of a limit of the CG, in a plot with forward at the left. */
export function cgSide(forbidden: 'forward' | 'aft'): (normal: Point) => 1 | -1 {
  return (normal) => (normal.x > 0 === (forbidden === 'aft') ? 1 : -1);
}

/** What a limit of the CG does to a plot that it does not cross. */
export function cgAbsent(
  cgs: readonly number[],
  forbidden: 'forward' | 'aft',
  { from, to }: { readonly from: number; readonly to: number },
): string {
  if (cgs.every(Number.isNaN)) return 'not known';
  const [ahead, behind] = [cgs.every((cg) => cg < from), cgs.every((cg) => cg > to)];
  if (!ahead && !behind) return 'not in this plot';
  return ahead === (forbidden === 'forward') ? 'forbids nothing in this plot' : 'forbids all of this plot';
}

/** Room that a line and its hatch take. */
export function lineRoom({ lines, side }: NamedLine): Spot[] {
  const room = side === undefined ? plainRoom : tick.length;
  return lines.flatMap((line) => spotsAlong(line, room, room));
}

/** Names on their own lines, clear of `clear`, of the other lines and of one another; null where there is no room. */
export function placeNames(
  all: readonly NamedLine[],
  clear: readonly Spot[],
  frame: Frame,
  size: number = textSize.label,
): (LineLabel | null)[] {
  const placed: (LineLabel | null)[] = [];
  all.forEach(({ label, lines, side, best = 0.7 }, index) => {
    const text = ellipsize(label, longestName, size);
    const others = all.flatMap((line, other) => (other === index ? [] : lineRoom(line)));
    const taken = placed.flatMap((each) => each?.spots ?? []);
    const height = side === undefined ? size : size + 2;
    const request = { text, width: textWidth(text, size) + 4, height, lines, best };
    placed.push(placeOnLines([request], [...clear, ...others, ...taken], frame)[0] ?? null);
  });
  return placed;
}

const tagSize = 14;
/** A letter on each line whose name found no room, for the key; null where not even that fits. */
export function placeTags(
  all: readonly NamedLine[],
  names: readonly (LineLabel | null)[],
  clear: readonly Spot[],
  frame: Frame,
): (LineLabel | null)[] {
  const taken = [...clear, ...names.flatMap((name) => name?.spots ?? [])];
  let letter = 'A'.codePointAt(0)!;
  return names.map((name, index) => {
    if (name !== null) return null;
    const others = all.flatMap((line, other) => (other === index ? [] : lineRoom(line)));
    const text = String.fromCodePoint(letter++);
    const request = { text, width: tagSize, height: tagSize, lines: all[index]!.lines, best: 0.2 };
    const [tag = null] = placeOnLines([request], [...taken, ...others], frame);
    taken.push(...(tag?.spots ?? []));
    return tag;
  });
}

/** The names where they were placed. */
export function nameLabels(names: readonly (LineLabel | null)[], map: PixelMap, size?: number): Layer {
  const rows = names.flatMap((label) =>
    label === null ? [] : [{ ...map.fromPixels(label), text: label.text, angle: label.angle }],
  );
  return labels(rows, size === undefined ? {} : { size });
}

/** The line, open where texts stand, and its hatch. */
export function namedLineLayers(
  { lines, style, side }: NamedLine,
  texts: readonly Spot[],
  frame: Frame,
  map: PixelMap,
): Layer[] {
  const open = lines.flatMap((line) => cutOut(line, texts));
  const inFrame = ({ x, y }: Point) => x >= 0 && y >= 0 && x <= frame.width && y <= frame.height;
  const isFree = (end: Point) =>
    texts.every((spot) => Math.hypot(end.x - spot.x, end.y - spot.y) > spot.radius);
  const ticks =
    side === undefined
      ? []
      : lines.flatMap((line) => hatchTicks(line, tick.spacing, tick.length, (_, normal) => side(normal)));
  const rows = ticks
    .filter(({ from, to }) => inFrame(to) && isFree(from) && isFree(to))
    .map(({ from, to }) => {
      const [a, b] = [map.fromPixels(from), map.fromPixels(to)];
      return { x: a.x, y: a.y, x2: b.x, y2: b.y };
    });
  return [
    polylines(
      open.map((part) => part.map(map.fromPixels)),
      style,
    ),
    segments(rows, { color: style.color, width: 1 }),
  ];
}

/** Key of a line whose name found no room on it, with its letter if that did. */
export function limitKey(
  { label, lines, style, side, absent = 'not in this plot' }: NamedLine,
  tag: LineLabel | null,
): KeyItem {
  if (lines.length === 0) return { symbol: { kind: 'none' }, text: `${cleanText(label)}: ${absent}` };
  return tag === null
    ? { symbol: { kind: 'line', style, ticks: side !== undefined }, text: label }
    : { symbol: { kind: 'letter', letter: tag.text, style }, text: label };
}
