import { contours } from 'd3-contour';
import type { Point } from './polyline.ts';

/** Values on a rectangular grid. `values[j * xs.length + i]` belongs to `xs[i]`, `ys[j]`; NaN is an empty place. */
export interface GridField {
  /** Ascending, at least 2. */
  readonly xs: ArrayLike<number>;
  /** Ascending, at least 2. */
  readonly ys: ArrayLike<number>;
  readonly values: ArrayLike<number>;
}

/** d3-contour counts from the corner of the first cell, whose value stands in its middle. */
const cellMiddle = 0.5;

/**
 * Lines along which the field has the value `level`, in the units of `xs` and `ys`, by linear
 * interpolation between grid points. Lines end at the edge of the grid and beside empty places.
 */
export function isolines(field: GridField, level: number): Point[][] {
  const lines: Point[][] = [];
  for (const ring of rings(field, level)) lines.push(...openParts(ring, field, level));
  return lines;
}

/** The area in which the field is at least `level`: one closed outline a piece, holes joined to it by a cut of no width. */
export function areaAtLeast(field: GridField, level: number): Point[][] {
  const shape = contourOf(field, level);
  return shape.coordinates.map((polygon) => {
    const [outer = [], ...holes] = polygon.map((ring) =>
      ring.slice(0, -1).map(([x, y]) => place(field, x!, y!)),
    );
    return [...outer, ...holes.flatMap((hole) => [outer[0]!, ...hole, hole[0]!]), outer[0]!];
  });
}

function contourOf(field: GridField, level: number) {
  const values = Array.from(field.values, (value) =>
    Number.isNaN(value) ? Number.NEGATIVE_INFINITY : value,
  );
  return contours().size([field.xs.length, field.ys.length]).contour(values, level);
}

function rings(field: GridField, level: number): [number, number][][] {
  return contourOf(field, level).coordinates.flat() as [number, number][][];
}

/** Cuts a closed ring where it leaves the grid or runs beside an empty place. */
function openParts(ring: readonly [number, number][], field: GridField, level: number): Point[][] {
  const onLine = ring
    .slice(0, -1)
    .map(([x, y]) => crossesBetweenValues(field, level, x - cellMiddle, y - cellMiddle));
  const start = onLine.indexOf(false);
  if (start < 0) return [ring.map(([x, y]) => place(field, x, y))];
  const parts: Point[][] = [[]];
  for (let k = 1; k <= onLine.length; k++) {
    const at = (start + k) % onLine.length;
    if (onLine[at]) parts.at(-1)!.push(place(field, ring[at]![0], ring[at]![1]));
    else if (parts.at(-1)!.length > 0) parts.push([]);
  }
  return parts.filter((part) => part.length > 1);
}

function crossesBetweenValues({ xs, ys, values }: GridField, level: number, i: number, j: number): boolean {
  const [i0, i1, j0, j1] = [Math.floor(i), Math.ceil(i), Math.floor(j), Math.ceil(j)];
  if (i0 < 0 || j0 < 0 || i1 >= xs.length || j1 >= ys.length) return false;
  const low = values[j0 * xs.length + i0]!;
  const high = values[j1 * xs.length + i1]!;
  // Beside an empty place the ring stands on grid points that have not the level's value.
  if (i0 === i1 && j0 === j1 && low !== level) return !besideEmpty(values, xs.length, i0, j0);
  return !Number.isNaN(low) && !Number.isNaN(high);
}

function besideEmpty(values: ArrayLike<number>, n: number, i: number, j: number): boolean {
  const at = j * n + i;
  const sideways = [i > 0 ? at - 1 : at, i < n - 1 ? at + 1 : at];
  // Beyond the first and last row there is no value at all, which is no empty place.
  return [at, ...sideways, at - n, at + n].some((index) => Number.isNaN(values[index] ?? 0));
}

function place(field: GridField, x: number, y: number): Point {
  return { x: alongAxis(field.xs, x - cellMiddle), y: alongAxis(field.ys, y - cellMiddle) };
}

/** Value of an axis at a fractional index; beyond the ends it is held. */
function alongAxis(axis: ArrayLike<number>, index: number): number {
  const held = Math.min(axis.length - 1, Math.max(0, index));
  const i = Math.min(axis.length - 2, Math.floor(held));
  return axis[i]! + (held - i) * (axis[i + 1]! - axis[i]!);
}

/** The field at any place of the grid, bilinear between grid points; NaN beyond it or beside an empty place. */
export function fieldAt({ xs, ys, values }: GridField, x: number, y: number): number {
  const i = cellOf(xs, x);
  const j = cellOf(ys, y);
  if (i < 0 || j < 0) return Number.NaN;
  const n = xs.length;
  const u = (x - xs[i]!) / (xs[i + 1]! - xs[i]!);
  const v = (y - ys[j]!) / (ys[j + 1]! - ys[j]!);
  const low = values[j * n + i]! * (1 - u) + values[j * n + i + 1]! * u;
  const high = values[(j + 1) * n + i]! * (1 - u) + values[(j + 1) * n + i + 1]! * u;
  return low * (1 - v) + high * v;
}

function cellOf(axis: ArrayLike<number>, value: number): number {
  if (!(value >= axis[0]! && value <= axis[axis.length - 1]!)) return -1;
  let i = 0;
  while (i < axis.length - 2 && axis[i + 1]! < value) i++;
  return i;
}
