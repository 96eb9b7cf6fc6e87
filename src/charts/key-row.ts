import {
  bars,
  type Layer,
  type LineStyle,
  labels,
  type PointShape,
  points,
  polylines,
  segments,
} from './marks.ts';
import { type Panel, panel } from './panel.ts';
import { ellipsize, textWidth } from './text-width.ts';
import { colours, textSize } from './theme.ts';

/** What stands before a key's text. */
export type KeySymbol =
  | {
      readonly kind: 'line';
      readonly style: LineStyle;
      readonly ticks?: boolean;
      readonly point?: PointStyle;
    }
  | { readonly kind: 'swatch'; readonly fill: string; readonly stroke?: string; readonly opacity?: number }
  | { readonly kind: 'point'; readonly point: PointStyle }
  | { readonly kind: 'cross' }
  | { readonly kind: 'letter'; readonly letter: string; readonly style: LineStyle }
  | { readonly kind: 'length'; readonly pixels: number }
  | { readonly kind: 'none' };

export interface PointStyle {
  readonly shape: PointShape;
  readonly size: number;
  readonly fill: string;
  readonly stroke?: string;
  readonly width?: number;
}
export interface KeyItem {
  readonly symbol: KeySymbol;
  readonly text: string;
}

const lineHeight = 18;
const symbolWidth = 24;
const symbolGap = 7;
const itemGap = 20;
const tickLength = 5;

/** The key of a chart: symbols with their text from left to right, wrapped to `width` [px]. */
export function keyRow(items: readonly KeyItem[], width: number): Panel {
  const size = textSize.label;
  const layers: Layer[] = [];
  const texts: { x: number; y: number; text: string }[] = [];
  let x = 0;
  let line = 0;
  for (const { symbol, text: full } of items) {
    const lead = leadWidth(symbol);
    const text = ellipsize(full, width - lead, size);
    const taken = lead + textWidth(text, size);
    if (x > 0 && x + taken > width) {
      x = 0;
      line += 1;
    }
    const y = line * lineHeight + lineHeight / 2;
    layers.push(...drawSymbol(symbol, x, y));
    texts.push({ x: x + lead, y, text });
    x += taken + itemGap;
  }
  return panel({
    width,
    height: (line + 1) * lineHeight,
    x: 'pixels',
    y: 'pixels',
    framed: false,
    layers: [...layers, labels(texts, { size, align: 'left', color: colours.ink })],
  });
}

function leadWidth(symbol: KeySymbol): number {
  switch (symbol.kind) {
    case 'none':
      return 0;
    case 'point':
    case 'cross':
      return 12 + symbolGap;
    case 'length':
      return symbol.pixels + symbolGap;
    case 'letter':
      return symbolWidth + 18 + symbolGap;
    default:
      return symbolWidth + symbolGap;
  }
}

function drawSymbol(symbol: KeySymbol, x: number, y: number): Layer[] {
  switch (symbol.kind) {
    case 'line': {
      const middle = [{ x: x + symbolWidth / 2, y }];
      return [
        lineSample(x, y, symbol.style),
        ...(symbol.ticks === true ? [tickSample(x, y, symbol.style)] : []),
        ...(symbol.point === undefined ? [] : [points(middle, symbol.point)]),
      ];
    }
    case 'letter':
      return [
        lineSample(x, y, symbol.style),
        tickSample(x, y, symbol.style),
        labels([{ x: x + symbolWidth + 11, y, text: symbol.letter }], { weight: 600 }),
      ];
    case 'swatch': {
      const { fill, opacity = 1 } = symbol;
      const edge = symbol.stroke === undefined ? {} : { stroke: symbol.stroke };
      return [bars([{ x, y: y - 6, x2: x + symbolWidth, y2: y + 6 }], { fill, opacity, ...edge })];
    }
    case 'point':
      return [points([{ x: x + 6, y }], symbol.point)];
    case 'cross':
      return [points([{ x: x + 6, y }], crossMark(9))];
    case 'length': {
      const ends = [x, x + symbol.pixels];
      const style = { color: colours.ink, width: 1.5 };
      return [
        segments([{ x, y, x2: x + symbol.pixels, y2: y }], style),
        segments(
          ends.map((end) => ({ x: end, y: y - 4, x2: end, y2: y + 4 })),
          style,
        ),
      ];
    }
    case 'none':
      return [];
  }
}

function lineSample(x: number, y: number, style: LineStyle): Layer {
  return polylines(
    [
      [
        { x, y },
        { x: x + symbolWidth, y },
      ],
    ],
    style,
  );
}

function tickSample(x: number, y: number, { color }: LineStyle): Layer {
  const starts = [x + 3, x + 9, x + 15, x + 21];
  const rows = starts.map((start) => ({ x: start, y, x2: start + tickLength, y2: y + tickLength }));
  return segments(rows, { color, width: 1 });
}

/** The mark of 'none feasible': a thin diagonal cross, `side` [px] wide. */
export function crossMark(side: number): PointStyle {
  return {
    shape: 'M-0.5,-0.5L0.5,0.5M-0.5,0.5L0.5,-0.5',
    size: side * side,
    fill: 'transparent',
    stroke: colours.muted,
    width: 1,
  };
}
