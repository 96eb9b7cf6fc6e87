import { spread } from './geometry/spread.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import {
  type Layer,
  labels,
  type Position,
  points,
  polygons,
  polylines,
  type Segment,
  segments,
} from './marks.ts';
import { type Panel, panel, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, grid, sheet } from './sheet.ts';
import { ellipsize, numberText, textWidth, wrapText } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

/** Margins along one varied axis. All lists run with the axis' values; NaN: not computed. */
export interface AxisMargins {
  /** With unit: `Span [m]`. */
  readonly title: string;
  /** Values in the unit of the title, ascending; for tied or map-valued axes the texts of the values. */
  readonly values: readonly number[] | readonly string[];
  /** Static margin on the slice through the baseline, CG aft and CG forward [% MAC]. */
  readonly aft: ArrayLike<number>;
  readonly forward: ArrayLike<number>;
  /** Least and greatest of all combinations at each value [% MAC]. */
  readonly aftRange: { readonly least: ArrayLike<number>; readonly greatest: ArrayLike<number> };
  readonly forwardRange: { readonly least: ArrayLike<number>; readonly greatest: ArrayLike<number> };
}

/** Edges of the static-margin band [% MAC]. */
export interface BandEdges {
  readonly lower?: number;
  readonly upper?: number;
}

export interface MarginAlongAxisData {
  readonly heading: ChartHeading;
  readonly band: BandEdges;
  readonly axes: readonly AxisMargins[];
}

const plotWidths = [480, 350, 264] as const;
const plotHeights = [300, 230, 190] as const;
interface PlotSize {
  readonly width: number;
  readonly height: number;
}
const aftPoint = { shape: 'circle', size: 34, fill: colours.accent, width: 1 } as const;
const forwardPoint = {
  shape: 'diamond',
  size: 40,
  fill: colours.paper,
  stroke: colours.ink,
  width: 1.3,
} as const;
const aftLine = { color: colours.accent, width: 1.8 } as const;
const forwardLine = { color: colours.ink, width: 1.4, dash: [5, 3] } as const;
const edgeLine = { color: colours.ink, width: 1, dash: [2, 2] } as const;
const forwardEdge = { color: colours.rule, width: 1, dash: [5, 3] } as const;

/** Small multiples: margin at aft and forward CG along each axis through the baseline, with the envelope of all combinations. */
export function marginAlongAxis(data: MarginAlongAxisData): ChartSpec {
  const columns = Math.min(plotWidths.length, data.axes.length);
  const plot = { width: plotWidths[columns - 1]!, height: plotHeights[columns - 1]! };
  const y = marginScale(data);
  const panels = data.axes.map((axis, index) => axisPanel(axis, data.band, y, plot, index % columns === 0));
  const width = Math.max(columns * (plot.width + 90), 560);
  return sheet(
    data.heading,
    width,
    [keyRow(keyItems(data.band), width), grid(panels, columns)],
    ['Lines: slice through the baseline. Envelopes: least to greatest of all combinations at each value'],
  );
}

function keyItems(band: BandEdges): KeyItem[] {
  const hasBand = band.lower !== undefined || band.upper !== undefined;
  return [
    { symbol: { kind: 'line', style: aftLine, point: aftPoint }, text: 'CG aft' },
    { symbol: { kind: 'swatch', fill: colours.accentTint }, text: 'its envelope' },
    { symbol: { kind: 'line', style: forwardLine, point: forwardPoint }, text: 'CG forward' },
    { symbol: { kind: 'line', style: forwardEdge }, text: 'its envelope' },
    ...(hasBand ? [{ symbol: { kind: 'line' as const, style: edgeLine }, text: 'edge of the band' }] : []),
  ];
}

function marginScale({ axes, band }: MarginAlongAxisData): Scale {
  const all = [
    band.lower,
    band.upper,
    ...axes.flatMap(({ aft, forward, aftRange, forwardRange }) =>
      [aft, forward, aftRange.least, aftRange.greatest, forwardRange.least, forwardRange.greatest].flatMap(
        (list) => Array.from(list),
      ),
    ),
  ].filter((value): value is number => value !== undefined && Number.isFinite(value));
  const least = all.reduce((a, b) => Math.min(a, b), 0);
  const greatest = all.reduce((a, b) => Math.max(a, b), 1);
  const room = (greatest - least) * 0.04;
  return {
    from: least < 0 ? least - room : 0,
    to: greatest + room,
    axis: { title: 'Static margin [% MAC]', more: { tickCount: 6 } },
  };
}

function axisPanel(axis: AxisMargins, band: BandEdges, y: Scale, plot: PlotSize, first: boolean): Panel {
  const { places, x } = axisPlaces(axis, plot.width);
  const at = (list: ArrayLike<number>): Position[] =>
    places.map((place, index) => ({ x: place, y: list[index]! }));
  const layers: Layer[] = [
    polygons(envelope(places, axis.aftRange), { fill: colours.accentTint }),
    polylines(outline(places, axis.forwardRange), forwardEdge),
    ...bandEdges(band, x, y, plot.height),
    polylines(unbroken(at(axis.forward)), forwardLine),
    polylines(unbroken(at(axis.aft)), aftLine),
    points(at(axis.forward).filter(isKnown), forwardPoint),
    points(at(axis.aft).filter(isKnown), aftPoint),
  ];
  const yScale = first ? y : { ...y, axis: { title: null, more: { tickCount: 6 } } };
  return panel({
    ...plot,
    x,
    y: yScale,
    layers,
    title: wrapText(axis.title, plot.width, textSize.panel, 2, weight.strong),
  });
}

/** Numbers stand at their value, texts one after another. */
function axisPlaces({ values }: AxisMargins, width: number): { places: number[]; x: Scale } {
  const numbers = values.filter((value): value is number => typeof value === 'number');
  if (numbers.length === values.length) {
    const [from, to] = [Math.min(...numbers), Math.max(...numbers)];
    const room = (to - from || Math.abs(to) || 1) * 0.03;
    return {
      places: numbers,
      x: { from: from - room, to: to + room, axis: { title: null, more: { tickCount: 6 } } },
    };
  }
  const places = values.map((_, index) => index);
  return {
    places,
    x: {
      from: -0.4,
      to: values.length - 0.6,
      axis: { title: null, more: textTicks(values.map(String), width) },
    },
  };
}

const longestTick = 110;
function textTicks(texts: readonly string[], width: number) {
  const shown = texts.map((text) => ellipsize(text, longestTick, textSize.axis));
  const widest = Math.max(...shown.map((text) => textWidth(text, textSize.axis)));
  const step = width / texts.length;
  const turned = widest + 8 > step;
  const every = turned ? Math.ceil(14 / step) : 1;
  return {
    values: texts.map((_, index) => index).filter((index) => index % every === 0),
    labelExpr: `${JSON.stringify(shown)}[datum.value]`,
    labelAngle: turned ? -90 : 0,
    ...(turned ? { labelAlign: 'right' as const, labelBaseline: 'middle' as const } : {}),
    labelOverlap: false,
  };
}

function isKnown({ y }: Position): boolean {
  return Number.isFinite(y);
}

/** Runs of known positions; a gap stays a gap. */
function unbroken(line: readonly Position[]): Position[][] {
  const runs: Position[][] = [[]];
  for (const position of line) {
    if (isKnown(position)) runs.at(-1)!.push(position);
    else runs.push([]);
  }
  return runs.filter((run) => run.length > 0);
}

function envelope(places: readonly number[], range: AxisMargins['aftRange']): Position[][] {
  const runs = unbroken(places.map((x, index) => ({ x, y: range.least[index]! })));
  return runs.map((run) => [
    ...run,
    ...run.map(({ x }) => ({ x, y: range.greatest[places.indexOf(x)]! })).reverse(),
  ]);
}

function outline(places: readonly number[], { least, greatest }: AxisMargins['forwardRange']): Position[][] {
  return [least, greatest].flatMap((list) => unbroken(places.map((x, index) => ({ x, y: list[index]! }))));
}

/** Rules at the band's edges; their numbers stand beside the plot, moved apart where they would touch. */
function bandEdges(band: BandEdges, x: Scale, y: Scale, height: number): Layer[] {
  const edges = [band.lower, band.upper].filter((edge): edge is number => edge !== undefined);
  const rules: Segment[] = edges.map((edge) => ({ x: x.from, x2: x.to, y: edge, y2: edge }));
  const perPixel = (y.to - y.from) / height;
  const middles = spread(
    edges.map((at) => ({ at, size: textSize.small * perPixel * 1.2 })),
    y.from,
    y.to,
  );
  const texts = edges.map((edge, index) => ({
    x: x.to,
    y: middles[index]!,
    text: `${numberText(edge, Number.isInteger(edge) ? 0 : 1)} %`,
  }));
  return [segments(rules, edgeLine), labels(texts, { size: textSize.small, align: 'left', dx: 5 })];
}
