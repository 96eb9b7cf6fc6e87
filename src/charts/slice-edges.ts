import { fieldAt, type GridField, isolines } from './geometry/contours.ts';
import { hatchTicks } from './geometry/hatch.ts';
import { type LineLabel, placeOnLines } from './geometry/line-labels.ts';
import { cutOut, type Point, type Polyline, type Spot, spotsAlong } from './geometry/polyline.ts';
import { type Layer, type LineStyle, polylines, type Segment, segments } from './marks.ts';
import type { PixelMap } from './panel.ts';
import {
  gridField,
  inPixels,
  inValues,
  type SliceChartData,
  type SliceRequirement,
  slicePlot,
} from './slice-data.ts';
import { colours } from './theme.ts';

/** Hatch of an edge: distance between ticks, length of a tick [px]. */
const tick = { spacing: 9, length: 7 } as const;
const edgeDashes: readonly (readonly number[] | undefined)[] = [
  undefined,
  [9, 3],
  [3, 3],
  [9, 3, 2, 3],
  [14, 4],
  [2, 5],
];

/** One requirement's edge in pixels, with its hatch on the failing side. */
export interface Edge {
  readonly letter: string;
  readonly name: string;
  readonly lines: readonly Polyline[];
  readonly ticks: readonly { from: Point; to: Point }[];
  readonly style: LineStyle;
  /** When no edge crosses the slice: whether all of it passes. */
  readonly everywhere?: 'kept' | 'failed';
}

export function requirementEdge(
  { name, slack }: SliceRequirement,
  index: number,
  data: SliceChartData,
  map: PixelMap,
): Edge {
  const slackField = gridField(data, slack);
  const lines = inPixels(isolines(slackField, 0), map);
  const side = failingSide(slackField, map);
  const dash = edgeDashes[index % edgeDashes.length];
  const kept = Array.from(slack).every((value) => value >= 0);
  return {
    letter: String.fromCodePoint('A'.codePointAt(0)! + (index % 26)),
    name,
    lines,
    ticks: lines.flatMap((line) => hatchTicks(line, tick.spacing, tick.length, side)),
    style: { color: colours.ink, width: 2, ...(dash === undefined ? {} : { dash }) },
    ...(lines.length > 0 ? {} : { everywhere: kept ? ('kept' as const) : ('failed' as const) }),
  };
}

const probe = 2;
/** Tells the failing side of an edge by looking at the slack a little to either side of it. */
export function failingSide(slackField: GridField, map: PixelMap) {
  const slackAt = (at: Point) => {
    const { x, y } = map.fromPixels(at);
    return fieldAt(slackField, x, y);
  };
  return (at: Point, normal: Point): 1 | -1 => {
    const along = slackAt({ x: at.x + probe * normal.x, y: at.y + probe * normal.y });
    const against = slackAt({ x: at.x - probe * normal.x, y: at.y - probe * normal.y });
    // Beyond the grid there is no slack: the side that is known decides.
    if (Number.isNaN(along)) return against < 0 ? -1 : 1;
    if (Number.isNaN(against)) return along < 0 ? 1 : -1;
    return along <= against ? 1 : -1;
  };
}

/** Room that an edge and its hatch take. */
export function edgeSpots({ lines }: Edge): Spot[] {
  return lines.flatMap((line) => spotsAlong(line, tick.length, tick.length));
}

/** The edge's letter, on its own line and clear of the other edges. */
export function placeTags(edges: readonly Edge[], clear: readonly Spot[]): (LineLabel | null)[] {
  const placed: Spot[] = [];
  return edges.map((edge) => {
    const own = new Set(edgeSpots(edge).map(({ x, y }) => `${x} ${y}`));
    const others = clear.filter(({ x, y }) => !own.has(`${x} ${y}`));
    const request = { text: edge.letter, width: 14, height: 14, lines: edge.lines, best: 0.2 };
    const [tag] = placeOnLines([request], [...others, ...placed], slicePlot);
    placed.push(...(tag?.spots ?? []));
    return tag ?? null;
  });
}

/** The edge, open where its letter stands, and its hatch. */
export function edgeLayers(edge: Edge, tagSpots: readonly Spot[], map: PixelMap): Layer[] {
  const lines = edge.lines.flatMap((line) => cutOut(line, tagSpots));
  const ticks: Segment[] = edge.ticks
    .filter(({ from }) =>
      tagSpots.every((spot) => Math.hypot(from.x - spot.x, from.y - spot.y) > spot.radius + tick.length / 2),
    )
    .filter(({ to }) => to.x >= 0 && to.y >= 0 && to.x <= slicePlot.width && to.y <= slicePlot.height)
    .map(({ from, to }) => {
      const start = map.fromPixels(from);
      const end = map.fromPixels(to);
      return { x: start.x, y: start.y, x2: end.x, y2: end.y };
    });
  return [polylines(inValues(lines, map), edge.style), segments(ticks, { color: colours.ink, width: 1 })];
}
