import { type KeyItem, keyRow } from './key-row.ts';
import { bars, type Layer, type Position, points, polygons, polylines, segments } from './marks.ts';
import { type Panel, panel, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, grid, sheet } from './sheet.ts';
import { ellipsize, wrapText } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

/** A place on the right half of the ground plan, in the drawing's unit of length. */
export interface PlanPoint {
  /** Station, aft from the datum. */
  readonly station: number;
  /** Distance to the right of the centreline, ≥ 0. */
  readonly aside: number;
}

/** One combination's plan; lengths and stations in the drawing's unit. */
export interface PlanOutline {
  /** `#1234` */
  readonly label: string;
  readonly detail: string;
  /** Right half of the wing: leading edge from the centreline out, then trailing edge back in. */
  readonly wing: readonly PlanPoint[];
  readonly tail: readonly PlanPoint[];
  /** Right half of the body from the nose aft; absent when the study has none. */
  readonly body?: readonly PlanPoint[];
  /** The mean aerodynamic chord where it stands on the right wing. */
  readonly mac: { readonly aside: number; readonly leadingEdge: number; readonly length: number };
  readonly aerodynamicCentre: number;
  readonly neutralPoint: number;
  readonly cg: { readonly forward: number; readonly aft: number };
}
export interface PlanViewData {
  readonly heading: ChartHeading;
  /** Unit of every length: `m`, `ft`. */
  readonly unit: string;
  readonly outlines: readonly PlanOutline[];
}

/** Room for one plan [px] in sheets of one, two and three columns. */
const rooms = [
  { width: 560, height: 480 },
  { width: 420, height: 380 },
  { width: 300, height: 300 },
] as const;
const margin = 0.06;
const neutralPointMark = { shape: 'diamond', size: 62, fill: colours.ink, width: 1 } as const;
const centreMark = {
  shape: 'triangle-right',
  size: 34,
  fill: colours.paper,
  stroke: colours.ink,
  width: 1,
} as const;
const macLine = { color: colours.accent, width: 2.2 } as const;

/** Plans of the shortlisted wings and tails, nose up, all to one scale, the same across and along. */
export function planView(data: PlanViewData): ChartSpec {
  const columns = Math.min(rooms.length, data.outlines.length);
  const frame = planFrame(data.outlines, rooms[columns - 1]!);
  const panels = data.outlines.map((outline) => planPanel(outline, frame));
  const width = Math.max(columns * (frame.width + 26), 560);
  return sheet(
    data.heading,
    width,
    [grid(panels, columns), keyRow(keyItems(data, frame), width)],
    ['Ground plan to scale, nose up, right side at the right; layout only'],
  );
}

/** One scale for every plan of a sheet. */
export interface PlanFrame {
  readonly x: Scale;
  /** Downward: stations grow toward the bottom. */
  readonly y: Scale;
  readonly width: number;
  readonly height: number;
  /** Pixels per unit of length, across and along alike. */
  readonly perUnit: number;
}

/** The frame that holds every outline, as large as `room` [px] allows, with equal scales. */
export function planFrame(
  outlines: readonly PlanOutline[],
  room: { readonly width: number; readonly height: number },
): PlanFrame {
  const places = outlines.flatMap(({ wing, tail, body = [] }) => [...wing, ...tail, ...body]);
  const marks = outlines
    .flatMap(({ neutralPoint, cg }) => [neutralPoint, cg.forward, cg.aft])
    .filter(Number.isFinite);
  const stations = [...places.map(({ station }) => station), ...marks];
  const aside = Math.max(...places.map((place) => place.aside)) * (1 + margin);
  const [nose, end] = [Math.min(...stations), Math.max(...stations)];
  const border = (end - nose) * margin;
  const [across, along] = [2 * aside, end - nose + 2 * border];
  const perUnit = Math.min(room.width / across, room.height / along);
  return {
    x: { from: -aside, to: aside, axis: null },
    y: { from: end + border, to: nose - border, axis: null },
    width: across * perUnit,
    height: along * perUnit,
    perUnit,
  };
}

function planPanel(outline: PlanOutline, frame: PlanFrame): Panel {
  const { mac, cg, body } = outline;
  const shape = { fill: colours.wash, stroke: colours.ink, width: 1 };
  const half = 2.2 / frame.perUnit;
  const layers: Layer[] = [
    ...(body === undefined
      ? []
      : [polygons([bothSides(body)], { fill: colours.paper, stroke: colours.rule, width: 1 })]),
    polygons([bothSides(outline.wing), bothSides(outline.tail)], shape),
    segments([{ x: 0, x2: 0, y: frame.y.to, y2: frame.y.from }], {
      color: colours.rule,
      width: 0.7,
      dash: [8, 3, 2, 3],
    }),
    polylines(
      [
        [
          { x: mac.aside, y: mac.leadingEdge },
          { x: mac.aside, y: mac.leadingEdge + mac.length },
        ],
      ],
      macLine,
    ),
    bars([{ x: -half, x2: half, y: cg.forward, y2: cg.aft }], { fill: colours.accent }),
    points(known(mac.aside, outline.aerodynamicCentre), centreMark),
    ...neutralPointLayers(outline.neutralPoint, frame.perUnit),
  ];
  return panel({
    width: frame.width,
    height: frame.height,
    x: frame.x,
    y: frame.y,
    layers,
    title: [ellipsize(outline.label, frame.width, textSize.panel, weight.strong)],
    subtitle: wrapText(outline.detail, frame.width, textSize.small, 2),
  });
}

const leader = 11;
/** The neutral point as a line out from the centreline to its mark: a mark on the centreline would hide the CG range. */
function neutralPointLayers(station: number, perUnit: number): Layer[] {
  if (!Number.isFinite(station)) return [];
  const reach = leader / perUnit;
  return [
    segments([{ x: -reach, x2: reach / 2, y: station, y2: station }], { color: colours.ink, width: 1 }),
    points(known(-reach, station), neutralPointMark),
  ];
}

function known(x: number, y: number): Position[] {
  return Number.isFinite(y) ? [{ x, y }] : [];
}

/** The right half with its mirror image, as one closed outline. */
export function bothSides(half: readonly PlanPoint[]): Position[] {
  const right = half.map(({ station, aside }) => ({ x: aside, y: station }));
  const left = half.map(({ station, aside }) => ({ x: aside === 0 ? 0 : -aside, y: station })).reverse();
  return [...right, ...left];
}

function keyItems(data: PlanViewData, frame: PlanFrame): KeyItem[] {
  const length = scaleBarLength(frame.perUnit);
  return [
    { symbol: { kind: 'length', pixels: length * frame.perUnit }, text: `${length} ${data.unit}` },
    { symbol: { kind: 'line', style: macLine }, text: 'mean aerodynamic chord (MAC)' },
    { symbol: { kind: 'point', point: centreMark }, text: 'wing aerodynamic centre, on the MAC' },
    { symbol: { kind: 'swatch', fill: colours.accent }, text: 'CG range' },
    { symbol: { kind: 'point', point: neutralPointMark }, text: 'neutral point' },
  ];
}

const longestScaleBar = 90;
/** The longest of 1, 2, 5 times a power of ten that is at most 90 px long, in the drawing's unit. */
export function scaleBarLength(perUnit: number): number {
  const most = longestScaleBar / perUnit;
  const power = 10 ** Math.floor(Math.log10(most));
  const step = [5, 2, 1].find((factor) => factor * power <= most) ?? 1;
  return Number((step * power).toPrecision(1));
}
