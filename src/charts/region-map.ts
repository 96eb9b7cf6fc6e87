import { crossMark, type KeyItem, keyRow } from './key-row.ts';
import { panelTitle } from './panel.ts';
import { type ChartHeading, type ChartSpec, type SheetRow, sheet } from './sheet.ts';
import { cleanText, countText, ellipsize, numberText, textWidth, wrapText } from './text-width.ts';
import { colours, ramp, textSize } from './theme.ts';

/** A varied axis as cells in the author's order. */
export interface CellAxis {
  /** With unit: `Span [m]`; for tied numbers `CG range [% MAC]`. */
  readonly title: string;
  /** Text of each value: `9.25`, `24–33`. */
  readonly labels: readonly string[];
}

export interface RegionMapData {
  readonly heading: ChartHeading;
  readonly x: CellAxis;
  readonly y: CellAxis;
  /** Combinations studied in all. */
  readonly combinations: number;
  /** Share of the cell's combinations that are feasible, 0…1, at `[iy * nx + ix]`; NaN: none studied there. */
  readonly feasibleShare: ArrayLike<number>;
  /** Largest aft margin of the cell's combinations [% MAC], feasible or not; NaN: none computed. */
  readonly bestAftMargin: ArrayLike<number>;
}

interface Cell {
  readonly x: number;
  readonly y: number;
  /** Null: an empty cell. */
  readonly value: number | null;
  readonly text: string;
  readonly mark: 'cross' | 'dash' | 'none';
}
interface CellSize {
  readonly width: number;
  readonly height: number;
}

const plotSide = 380;
const largestCell = 100;
const smallestCell = 4;
const numberRoom = { width: 4, height: 15 } as const;
/** Part of the lightness ramp from which white numbers read better than dark ones. */
const darkFrom = 0.7;

/**
 * Region map over two varied axes: share of the combinations studied that are feasible, and beside
 * it the best attainable aft margin, cell by cell. No band curves: they have no meaning while
 * other numbers vary.
 */
export function regionMap(data: RegionMapData): ChartSpec {
  const size = { width: cellSide(data.x.labels.length), height: cellSide(data.y.labels.length) };
  const share = cells(data, (index) => shareCell(data.feasibleShare[index]!));
  const margin = cells(data, (index) => marginCell(data.bestAftMargin[index]!));
  const plots: SheetRow = {
    hconcat: [
      cellPanel(data, size, share, ['Feasible, % of the cell'], { from: 0, to: 100 }, true),
      cellPanel(data, size, margin, ['Best aft margin, % MAC'], extent(margin), false),
    ],
    spacing: 34,
    resolve: { scale: { color: 'independent', fill: 'independent' } },
  };
  const width = Math.max(2 * size.width * data.x.labels.length + 150, 480);
  const count = countText(data.combinations);
  return sheet(
    data.heading,
    width,
    [plots, keyRow(keyItems(share, margin, numbersFit(size, margin)), width)],
    [`Share of the ${count} combinations studied; depends on the ranges chosen`],
  );
}

function keyItems(share: readonly Cell[], margin: readonly Cell[], printed: boolean): KeyItem[] {
  const items: KeyItem[] = [];
  if (share.some(({ mark }) => mark === 'cross'))
    items.push({ symbol: { kind: 'cross' }, text: 'no feasible combination' });
  if (!printed && margin.some(({ mark }) => mark === 'dash'))
    items.push({ symbol: { kind: 'point', point: dashMark(10) }, text: 'negative margin' });
  if ([...share, ...margin].some(({ value }) => value === null)) {
    items.push({
      symbol: { kind: 'swatch', fill: colours.paper, stroke: colours.faint },
      text: 'not studied or not computed',
    });
  }
  if (items.length === 0)
    items.push({ symbol: { kind: 'none' }, text: 'Every cell holds a feasible combination' });
  return items;
}

function cellSide(count: number): number {
  return Math.max(smallestCell, Math.min(largestCell, Math.floor(plotSide / count)));
}

function cells(data: RegionMapData, cell: (index: number) => Omit<Cell, 'x' | 'y'>): Cell[] {
  const nx = data.x.labels.length;
  return Array.from({ length: nx * data.y.labels.length }, (_, index) => ({
    x: index % nx,
    y: Math.floor(index / nx),
    ...cell(index),
  }));
}

function shareCell(share: number): Omit<Cell, 'x' | 'y'> {
  if (Number.isNaN(share)) return { value: null, text: '', mark: 'none' };
  return {
    value: Number((share * 100).toPrecision(4)),
    text: shareText(share * 100),
    mark: share > 0 ? 'none' : 'cross',
  };
}

/** Whole percent; a cell that holds some but not all never reads 0 or 100. */
function shareText(percent: number): string {
  if (percent <= 0) return '';
  if (percent < 1) return '<1';
  if (percent < 100 && percent > 99) return '>99';
  return numberText(percent, 0);
}

function marginCell(margin: number): Omit<Cell, 'x' | 'y'> {
  if (Number.isNaN(margin)) return { value: null, text: '', mark: 'none' };
  return {
    value: Number(margin.toPrecision(4)),
    text: numberText(margin, 0),
    mark: margin < 0 ? 'dash' : 'none',
  };
}

function extent(all: readonly Cell[]): { from: number; to: number } {
  const values = all.flatMap(({ value }) => (value === null ? [] : [value]));
  if (values.length === 0) return { from: 0, to: 1 };
  const from = Math.floor(Math.min(...values));
  return { from, to: Math.max(from + 1, Math.ceil(Math.max(...values))) };
}

function cellPanel(
  data: RegionMapData,
  size: CellSize,
  all: readonly Cell[],
  title: readonly string[],
  domain: { from: number; to: number },
  first: boolean,
) {
  const [nx, ny] = [data.x.labels.length, data.y.labels.length];
  const printed = numbersFit(size, all);
  const dark = domain.from + darkFrom * (domain.to - domain.from);
  const rows = all.map(({ x, y, value, text }) => ({
    x,
    y,
    value,
    ...(printed ? { text, ink: value !== null && value > dark ? colours.paper : colours.ink } : {}),
  }));
  const marked = (mark: Cell['mark']) =>
    all.filter((cell) => cell.mark === mark).map(({ x, y }) => ({ x, y }));
  const side = Math.min(size.width, size.height);
  return {
    width: nx * size.width,
    height: ny * size.height,
    title: panelTitle(
      title.flatMap((line) => wrapText(line, Math.max(200, nx * size.width), textSize.panel, 2, 600)),
    ),
    encoding: {
      x: cellChannel('x', data.x, size.width, true),
      y: cellChannel('y', data.y, size.height, first),
    },
    data: { values: rows },
    layer: [
      filledCells(domain, side > 8),
      ...(printed ? [cellNumbers()] : []),
      ...symbolLayer(marked('cross'), crossMark(Math.min(14, side * 0.5))),
      ...(printed ? [] : symbolLayer(marked('dash'), dashMark(Math.min(10, side * 0.5)))),
    ],
  };
}

function numbersFit(size: CellSize, all: readonly Cell[]): boolean {
  const widest = Math.max(...all.map(({ text }) => textWidth(text, textSize.small)));
  return size.width >= widest + numberRoom.width && size.height >= numberRoom.height;
}

function filledCells(domain: { from: number; to: number }, edged: boolean) {
  return {
    mark: { type: 'rect' as const, stroke: colours.paper, strokeWidth: edged ? 1 : 0, invalid: null },
    encoding: {
      fill: {
        field: 'value',
        type: 'quantitative' as const,
        scale: { domain: [domain.from, domain.to], range: [...ramp], zero: false, nice: false },
        condition: { test: 'datum.value === null', value: colours.paper },
        legend: {
          title: null,
          orient: 'bottom' as const,
          direction: 'horizontal' as const,
          gradientLength: 160,
          gradientThickness: 8,
          tickCount: 4,
          offset: 10,
        },
      },
    },
  };
}

function cellNumbers() {
  return {
    mark: { type: 'text' as const, fontSize: textSize.small },
    encoding: {
      text: { field: 'text', type: 'nominal' as const },
      color: { field: 'ink', type: 'nominal' as const, scale: null },
    },
  };
}

function symbolLayer(rows: readonly { x: number; y: number }[], point: ReturnType<typeof crossMark>) {
  if (rows.length === 0) return [];
  const { shape, size, fill, stroke, width } = point;
  return [
    {
      data: { values: [...rows] },
      mark: {
        type: 'point' as const,
        shape,
        size,
        fill,
        stroke: stroke ?? colours.muted,
        strokeWidth: width ?? 1,
        opacity: 1,
      },
    },
  ];
}

function dashMark(side: number) {
  return { shape: 'M-0.5,0L0.5,0', size: side * side, fill: 'transparent', stroke: colours.ink, width: 1.5 };
}

const labelRoom = { flat: 10, turned: 14, short: 44, longest: 130 } as const;

/** Cells by their index, so that two values that print alike stay two cells; the text comes from the axis. */
function cellChannel(field: 'x' | 'y', axis: CellAxis, step: number, titled: boolean) {
  const count = axis.labels.length;
  const indices = Array.from({ length: count }, (_, index) => index);
  const texts = axis.labels.map((label) => ellipsize(label, labelRoom.longest, textSize.axis));
  const widest = Math.max(...texts.map((text) => textWidth(text, textSize.axis)));
  const flatEvery = Math.ceil((widest + labelRoom.flat) / step);
  const turned = field === 'x' && flatEvery > 1 && widest > labelRoom.short;
  const every = field === 'y' || turned ? Math.ceil(labelRoom.turned / step) : flatEvery;
  return {
    field,
    type: 'ordinal' as const,
    scale: { domain: field === 'y' ? indices.reverse() : indices, padding: 0 },
    axis: {
      title: titled ? cleanText(axis.title) : null,
      values: indices.filter((index) => index % every === 0),
      labelExpr: `${JSON.stringify(texts)}[datum.value]`,
      labelAngle: turned ? -90 : 0,
      labelOverlap: false,
      domain: false,
      ticks: every > 1,
    },
  };
}
