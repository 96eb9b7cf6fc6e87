import { hatchTicks } from './geometry/hatch.ts';
import { type LineLabel, placeOnLines } from './geometry/line-labels.ts';
import { cutOut, type Point, type Spot, spotsAlong } from './geometry/polyline.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import { bars, type Layer, labels, points, polylines, segments } from './marks.ts';
import { type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, sheet } from './sheet.ts';
import { cleanText, ellipsize, numberText, textWidth } from './text-width.ts';
import { colours, textSize } from './theme.ts';

/** A limit of the CG against tail size: CG positions on one side of the line are forbidden. */
export interface CgLimit {
  /** `aft: neutral point − 5 %`, `too stable: neutral point − 20 %` */
  readonly label: string;
  /** CG at the limit [% MAC] for each size; NaN: no limit there. */
  readonly cg: ArrayLike<number>;
  /** Which CG positions are forbidden: those ahead of the line, or those behind it. */
  readonly forbidden: 'forward' | 'aft';
}

export interface TailSizingData {
  readonly heading: ChartHeading;
  /** With unit: `Tail volume`, `Tail area [m²]`. */
  readonly sizeTitle: string;
  /** Tail sizes, ascending, at least 2, in the unit of the title. */
  readonly sizes: readonly number[];
  /** Decimals of a printed size. */
  readonly sizeDecimals: number;
  /** The aft line first, then the too-stable line, then any control limits. */
  readonly limits: readonly CgLimit[];
  /** Loading range [% MAC]. */
  readonly loading: { readonly forward: number; readonly aft: number };
  /** Tail size of the baseline. */
  readonly baseline?: number;
}

const plot = { width: 620, height: 420 } as const;
const tick = { spacing: 9, length: 8 } as const;
const lineWidths = { first: 2, other: 1.6 } as const;
const dashes: readonly (readonly number[] | undefined)[] = [undefined, [8, 3], [3, 3], [9, 3, 2, 3]];
const loadingThickness = 9;

/**
 * Tail-sizing chart: CG across with forward at the left, tail size upward, limits hatched on their
 * forbidden side, the loading range at the smallest tail that keeps all of it allowed.
 */
export function tailSizing(data: TailSizingData): ChartSpec {
  const scales = { x: cgScale(data), y: sizeScale(data) };
  const map = pixelMap(plot.width, plot.height, scales.x, scales.y);
  const fit = smallestFittingTail(data);
  const clear = [
    ...(fit === null ? [] : rangeSpots(data, fit, map)),
    ...(data.baseline === undefined ? [] : rangeSpots(data, data.baseline, map)),
  ];
  const lines = data.limits.map((limit) => limitLine(limit, data.sizes, map));
  const placed = placeLimitLabels(data.limits, lines, clear);
  const spots = placed.flatMap((label) => label?.spots ?? []);
  const layers = [
    ...lines.flatMap((line, index) => limitLayers(line, data.limits[index]!, index, spots, map)),
    labels(
      placed.flatMap((label) =>
        label === null ? [] : [{ ...map.fromPixels(label), text: label.text, angle: label.angle }],
      ),
      {},
    ),
    ...(data.baseline === undefined ? [] : baselineLayers(data, data.baseline)),
    ...(fit === null ? [] : fitLayers(data, fit, map)),
  ];
  const unplaced = data.limits.flatMap((limit, index) =>
    placed[index] === null ? [limitKey(limit, index)] : [],
  );
  return sheet(
    data.heading,
    plot.width + 50,
    [panel({ ...plot, ...scales, layers }), keyRow([...keyItems(data, fit), ...unplaced], plot.width)],
    [fitInWords(data, fit)],
  );
}

function fitInWords(data: TailSizingData, fit: number | null): string {
  const { forward, aft } = data.loading;
  const range = `CG range ${numberText(forward, 1)} to ${numberText(aft, 1)} % MAC`;
  const name = cleanText(data.sizeTitle);
  const size = (value: number) => numberText(value, data.sizeDecimals);
  const [least, greatest] = [data.sizes[0]!, data.sizes.at(-1)!];
  if (fit === null)
    return `${range}: it fits at no tail drawn here (${name} ${size(least)} to ${size(greatest)})`;
  if (fit === least)
    return `${range}: it fits at the smallest tail drawn here (${name} ${size(least)}); a smaller one may do`;
  return `${range}: the smallest tail that fits it is ${name} ${size(fit)}`;
}

/**
 * The smallest tail at which the whole loading range is allowed by every limit, in the unit of the
 * sizes; null when there is none. Limits are straight between the sizes given; a limit that is NaN
 * at either end of a stretch forbids that stretch.
 */
export function smallestFittingTail({
  sizes,
  limits,
  loading,
}: Pick<TailSizingData, 'sizes' | 'limits' | 'loading'>): number | null {
  for (let i = 0; i + 1 < sizes.length; i++) {
    let [from, to] = [0, 1];
    for (const { cg, forbidden } of limits) {
      const slackAt = (k: number) => (forbidden === 'aft' ? cg[k]! - loading.aft : loading.forward - cg[k]!);
      const [a, b] = [slackAt(i), slackAt(i + 1)];
      if (Number.isNaN(a) || Number.isNaN(b) || (a < 0 && b < 0)) from = 2;
      else if (a < 0) from = Math.max(from, a / (a - b));
      else if (b < 0) to = Math.min(to, a / (a - b));
    }
    if (from <= to) return sizes[i]! + from * (sizes[i + 1]! - sizes[i]!);
  }
  return null;
}

function cgScale({ limits, loading }: TailSizingData): Scale {
  const all = [loading.forward, loading.aft, ...limits.flatMap(({ cg }) => Array.from(cg))].filter(
    Number.isFinite,
  );
  const [least, greatest] = [Math.min(...all), Math.max(...all)];
  const room = Math.max(2, (greatest - least) * 0.06);
  return {
    from: least - room,
    to: greatest + room,
    axis: { title: '← forward · CG [% MAC] · aft →', more: { tickCount: 9 } },
  };
}

function sizeScale({ sizes, sizeTitle, baseline }: TailSizingData): Scale {
  const all = [...sizes, ...(baseline === undefined ? [] : [baseline])];
  return {
    from: Math.min(...all),
    to: Math.max(...all),
    axis: { title: cleanText(sizeTitle), more: { tickCount: 7 } },
  };
}

function limitLine({ cg }: CgLimit, sizes: readonly number[], map: PixelMap): Point[] {
  return sizes.flatMap((size, index) =>
    Number.isNaN(cg[index]!) ? [] : [map.toPixels({ x: cg[index]!, y: size })],
  );
}

const longestLabel = 260;
function placeLimitLabels(
  limits: readonly CgLimit[],
  lines: readonly Point[][],
  clear: readonly Spot[],
): (LineLabel | null)[] {
  const placed: (LineLabel | null)[] = [];
  limits.forEach(({ label }, index) => {
    const text = ellipsize(label, longestLabel, textSize.label);
    const others = lines.filter((_, other) => other !== index).flatMap(lineSpots);
    const taken = placed.flatMap((each) => each?.spots ?? []);
    const request = {
      text,
      width: textWidth(text, textSize.label) + 4,
      height: textSize.label + 2,
      lines: [lines[index]!],
      best: 0.7,
    };
    placed.push(placeOnLines([request], [...clear, ...others, ...taken], plot)[0] ?? null);
  });
  return placed;
}

/** Room that a line and its hatch take. */
function lineSpots(line: readonly Point[]): Spot[] {
  return spotsAlong(line, tick.length, tick.length);
}

const rangeRoom = 20;
/** Room that a loading range and its text take. */
function rangeSpots({ loading }: TailSizingData, size: number, map: PixelMap): Spot[] {
  const from = map.toPixels({ x: loading.forward, y: size });
  const to = map.toPixels({ x: loading.aft, y: size });
  return spotsAlong([from, to], rangeRoom, rangeRoom);
}

function styleOf(index: number) {
  const dash = dashes[index % dashes.length];
  return {
    color: colours.ink,
    width: index === 0 ? lineWidths.first : lineWidths.other,
    ...(dash === undefined ? {} : { dash }),
  };
}

function limitLayers(
  line: readonly Point[],
  limit: CgLimit,
  index: number,
  spots: readonly Spot[],
  map: PixelMap,
): Layer[] {
  const ticks = hatchTicks(line, tick.spacing, tick.length, (_, normal) =>
    normal.x > 0 === (limit.forbidden === 'aft') ? 1 : -1,
  );
  const inPlot = ({ x, y }: Point) => x >= 0 && y >= 0 && x <= plot.width && y <= plot.height;
  const free = ticks
    .filter(({ to }) => inPlot(to))
    .filter(({ from, to }) =>
      [from, to].every((end) =>
        spots.every((spot) => Math.hypot(end.x - spot.x, end.y - spot.y) > spot.radius),
      ),
    );
  const rows = free.map(({ from, to }) => {
    const [a, b] = [map.fromPixels(from), map.fromPixels(to)];
    return { x: a.x, y: a.y, x2: b.x, y2: b.y };
  });
  return [
    polylines(
      cutOut(line, spots).map((part) => part.map(map.fromPixels)),
      styleOf(index),
    ),
    segments(rows, { color: colours.ink, width: 1 }),
  ];
}

const baselinePoint = { shape: 'square', size: 80, fill: colours.ink } as const;
function baselineLayers({ loading }: TailSizingData, size: number): Layer[] {
  const { forward, aft } = loading;
  return [
    segments([{ x: forward, x2: aft, y: size, y2: size }], { color: colours.ink, width: 1, dash: [3, 2] }),
    points(
      [forward, aft].map((x) => ({ x, y: size })),
      baselinePoint,
    ),
  ];
}

function fitLayers(data: TailSizingData, fit: number, map: PixelMap): Layer[] {
  const { forward, aft } = data.loading;
  const half = Math.abs(
    map.fromPixels({ x: 0, y: 0 }).y - map.fromPixels({ x: 0, y: loadingThickness / 2 }).y,
  );
  return [bars([{ x: forward, x2: aft, y: fit - half, y2: fit + half }], { fill: colours.accent })];
}

function limitKey({ label }: CgLimit, index: number): KeyItem {
  return { symbol: { kind: 'line', style: styleOf(index), ticks: true }, text: label };
}

function keyItems(data: TailSizingData, fit: number | null): KeyItem[] {
  return [
    ...(fit === null
      ? [{ symbol: { kind: 'none' as const }, text: 'No tail drawn here fits the loading range' }]
      : [
          {
            symbol: { kind: 'swatch' as const, fill: colours.accent },
            text: `loading range at the smallest tail that fits, ${numberText(fit, data.sizeDecimals)}`,
          },
        ]),
    ...(data.baseline === undefined
      ? []
      : [
          {
            symbol: { kind: 'point' as const, point: baselinePoint },
            text: `loading range at the baseline, ${numberText(data.baseline, data.sizeDecimals)}`,
          },
        ]),
    { symbol: { kind: 'none' }, text: 'Hatch ticks stand on the forbidden side' },
  ];
}
