import type { Field } from 'vega-lite/types_unstable/channeldef.js';
import type { LayerSpec, UnitSpec } from 'vega-lite/types_unstable/spec/index.js';
import { colours, textSize, type Weight, weight } from './theme.ts';

/** One layer of a panel. Positions `x`, `y` are in the panel's scales. */
export type Layer = LayerSpec<Field> | UnitSpec<Field>;

export interface Position {
  readonly x: number;
  readonly y: number;
}
/** A straight line between two positions, or the two opposite corners of a bar. */
export interface Segment extends Position {
  readonly x2: number;
  readonly y2: number;
}
export interface Label extends Position {
  readonly text: string;
  /** Degrees clockwise. */
  readonly angle?: number;
}

export type PointShape =
  | 'circle'
  | 'diamond'
  | 'square'
  | 'triangle-up'
  | 'triangle-down'
  | 'triangle-right'
  | 'stroke'
  | string;

export interface LineStyle {
  readonly color: string;
  /** [px] */
  readonly width: number;
  /** Lengths of stroke and gap [px]. */
  readonly dash?: readonly number[];
}
export interface TextStyle {
  readonly color?: string;
  readonly size?: number;
  readonly weight?: Weight;
  readonly align?: 'left' | 'center' | 'right';
  readonly baseline?: 'top' | 'middle' | 'bottom' | 'alphabetic';
  /** Shift from the position [px]. */
  readonly dx?: number;
  readonly dy?: number;
}

const significantDigits = 6;
/** Six significant digits: far finer than a pixel, and short in the file. */
export function short(value: number): number {
  return Number(value.toPrecision(significantDigits));
}

function shortened<T extends object>(rows: readonly T[]): Record<string, unknown>[] {
  return rows.map((row) =>
    Object.fromEntries(
      Object.entries(row).map(([key, value]) => [key, typeof value === 'number' ? short(value) : value]),
    ),
  );
}

export function segments(rows: readonly Segment[], style: LineStyle): Layer {
  return {
    data: { values: shortened(rows) },
    mark: { type: 'rule', strokeCap: 'butt', ...stroke(style) },
    encoding: { x2: { field: 'x2' }, y2: { field: 'y2' } },
  };
}

export function bars(
  rows: readonly Segment[],
  style: { fill: string; stroke?: string; opacity?: number },
): Layer {
  return {
    data: { values: shortened(rows) },
    mark: {
      type: 'rect',
      fill: style.fill,
      fillOpacity: style.opacity ?? 1,
      ...(style.stroke === undefined ? {} : { stroke: style.stroke, strokeWidth: 1 }),
    },
    encoding: { x2: { field: 'x2' }, y2: { field: 'y2' } },
  };
}

/** Open lines, each drawn in the order of its positions. */
export function polylines(lines: readonly (readonly Position[])[], style: LineStyle): Layer {
  return {
    data: { values: pathRows(lines) },
    mark: { type: 'line', order: false, strokeJoin: 'round', strokeCap: 'butt', ...stroke(style) },
    encoding: { detail: { field: 'path', type: 'nominal' } },
  };
}

/** Closed outlines, filled. */
export function polygons(
  rings: readonly (readonly Position[])[],
  style: { fill: string; stroke?: string; width?: number },
): Layer {
  return {
    data: { values: pathRows(rings) },
    mark: {
      type: 'line',
      order: false,
      interpolate: 'linear-closed',
      fill: style.fill,
      stroke: style.stroke ?? 'transparent',
      strokeWidth: style.width ?? 0,
      strokeJoin: 'round',
    },
    encoding: { detail: { field: 'path', type: 'nominal' } },
  };
}

function pathRows(paths: readonly (readonly Position[])[]): Record<string, unknown>[] {
  return paths.flatMap((path, index) => shortened(path.map(({ x, y }) => ({ x, y, path: index }))));
}

export function points(
  rows: readonly Position[],
  style: { shape: PointShape; size: number; fill: string; stroke?: string; width?: number },
): Layer {
  return {
    data: { values: shortened(rows.map(({ x, y }) => ({ x, y }))) },
    mark: {
      type: 'point',
      shape: style.shape,
      size: style.size,
      fill: style.fill,
      stroke: style.stroke ?? colours.paper,
      strokeWidth: style.width ?? 1.5,
      opacity: 1,
    },
  };
}

export function labels(rows: readonly Label[], style: TextStyle = {}): Layer {
  const turned = rows.some(({ angle }) => angle !== undefined);
  return {
    data: { values: shortened(rows) },
    mark: {
      type: 'text',
      color: style.color ?? colours.ink,
      fontSize: style.size ?? textSize.label,
      fontWeight: style.weight ?? weight.normal,
      align: style.align ?? 'center',
      baseline: style.baseline ?? 'middle',
      dx: style.dx ?? 0,
      dy: style.dy ?? 0,
    },
    encoding: {
      text: { field: 'text', type: 'nominal' },
      ...(turned ? { angle: { field: 'angle', type: 'quantitative' as const, scale: null } } : {}),
    },
  };
}

function stroke({ color, width, dash }: LineStyle) {
  return { stroke: color, strokeWidth: width, ...(dash === undefined ? {} : { strokeDash: [...dash] }) };
}

/**
 * Layers that differ in their data only, drawn as one: a sheet of many alike rows is several times
 * quicker so. Not for lines and outlines, whose paths are numbered within their own layer.
 */
export function mergeAlike(layers: readonly Layer[]): Layer[] {
  const alike = new Map<string, { layer: Layer; rows: unknown[] }>();
  for (const layer of layers) {
    const { data, ...look } = layer;
    const key = JSON.stringify(look);
    const group = alike.get(key) ?? { layer, rows: [] };
    if (data != null && 'values' in data && Array.isArray(data.values)) group.rows.push(...data.values);
    alike.set(key, group);
  }
  return [...alike.values()].map(({ layer, rows }) => ({ ...layer, data: { values: rows as object[] } }));
}

/** A layer that marks nothing is left out of its panel. */
export function isEmpty(layer: Layer): boolean {
  const data = layer.data;
  return data != null && 'values' in data && Array.isArray(data.values) && data.values.length === 0;
}
