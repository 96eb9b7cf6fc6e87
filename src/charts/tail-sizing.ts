import { clipToFrame } from './geometry/clip.ts';
import { type Spot, spotsAlong } from './geometry/polyline.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import { bars, type Layer, points, segments } from './marks.ts';
import {
  cgAbsent,
  cgAcross,
  cgSide,
  limitKey,
  limitStyle,
  type NamedLine,
  namedLineLayers,
  nameLabels,
  placeNames,
  placeTags,
} from './named-lines.ts';
import { type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, sheet } from './sheet.ts';
import { cleanText, numberText } from './text-width.ts';
import { colours } from './theme.ts';

/** A limit of the CG against tail size: CG positions on one side of the line are forbidden. */
export interface CgLimit {
  /** `aft: neutral point − 5 %`, `too stable: neutral point − 20 %` */
  readonly label: string;
  /**
   * CG at the limit [% MAC] for each size. NaN: not known, so nothing fits there. Where it does not
   * bind: −Infinity if `forbidden` is forward, Infinity if it is aft.
   */
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
const loadingThickness = 9;
/** How many of the limits come first as lines of the margin. */
const marginLines = 2;

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
  const limits = data.limits.map((limit, index) => limitLine(limit, index, data.sizes, scales.x, map));
  const names = placeNames(limits, clear, plot);
  const tags = placeTags(limits, names, clear, plot);
  const texts = [...names, ...tags].flatMap((text) => text?.spots ?? []);
  const layers = [
    ...limits.flatMap((limit) => namedLineLayers(limit, texts, plot, map)),
    nameLabels(names, map),
    nameLabels(tags, map),
    ...(data.baseline === undefined ? [] : baselineLayers(data, data.baseline)),
    ...(fit === null ? [] : fitLayers(data, fit, map)),
  ];
  const unnamed = limits.flatMap((limit, index) =>
    names[index] === null ? [limitKey(limit, tags[index]!)] : [],
  );
  return sheet(
    data.heading,
    plot.width + 50,
    [panel({ ...plot, ...scales, layers }), keyRow([...keyItems(data, fit), ...unnamed], plot.width)],
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
 * at either end of a stretch forbids that stretch, an infinite one changes at the stretch's safe end.
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
      else if (a < 0) from = Math.max(from, Number.isFinite(a - b) ? a / (a - b) : 1);
      else if (b < 0) to = Math.min(to, Number.isFinite(a - b) ? a / (a - b) : 0);
    }
    if (from <= to) return sizes[i]! + from * (sizes[i + 1]! - sizes[i]!);
  }
  return null;
}

/** Limits beyond the two margin lines widen the plot by at most this part of the rest. */
const mostWidening = 0.4;

function cgScale({ limits, loading }: TailSizingData): Scale {
  const finite = (of: readonly CgLimit[]) => of.flatMap(({ cg }) => Array.from(cg)).filter(Number.isFinite);
  const core = [loading.forward, loading.aft, ...finite(limits.slice(0, marginLines))].filter(
    Number.isFinite,
  );
  const [least, greatest] = [Math.min(...core), Math.max(...core)];
  const further = finite(limits.slice(marginLines));
  const widening = (greatest - least) * mostWidening;
  const from = Math.max(least - widening, Math.min(least, ...further));
  const to = Math.min(greatest + widening, Math.max(greatest, ...further));
  const room = Math.max(2, (to - from) * 0.06);
  return { from: from - room, to: to + room, axis: { title: cgAcross, more: { tickCount: 9 } } };
}

function sizeScale({ sizes, sizeTitle, baseline }: TailSizingData): Scale {
  const all = [...sizes, ...(baseline === undefined ? [] : [baseline])];
  return {
    from: Math.min(...all),
    to: Math.max(...all),
    axis: { title: cleanText(sizeTitle), more: { tickCount: 7 } },
  };
}

function limitLine(
  { label, cg, forbidden }: CgLimit,
  index: number,
  sizes: readonly number[],
  x: Scale,
  map: PixelMap,
): NamedLine {
  const line = sizes.map((size, k) => map.toPixels({ x: cg[k]!, y: size }));
  return {
    label,
    lines: clipToFrame(line, plot),
    style: limitStyle(index),
    side: cgSide(forbidden),
    absent: cgAbsent(Array.from(cg), forbidden, x),
  };
}

const rangeRoom = 20;
/** Room that a loading range and its text take. */
function rangeSpots({ loading }: TailSizingData, size: number, map: PixelMap): Spot[] {
  const from = map.toPixels({ x: loading.forward, y: size });
  const to = map.toPixels({ x: loading.aft, y: size });
  return spotsAlong([from, to], rangeRoom, rangeRoom);
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
