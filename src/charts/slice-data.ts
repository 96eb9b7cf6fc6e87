import type { GridField } from './geometry/contours.ts';
import { type Point, type Polyline, simplify } from './geometry/polyline.ts';
import type { PixelMap } from './panel.ts';
import type { ChartHeading } from './sheet.ts';

/** A numeric axis of a dense grid. */
export interface GridAxis {
  /** With unit: `Span [m]`. */
  readonly title: string;
  /** Ascending, at least 2, in the unit of the title. */
  readonly values: ArrayLike<number>;
}

export interface SliceRequirement {
  readonly name: string;
  /** At `[iy * nx + ix]`: ≥ 0 where the requirement is kept, in any unit; NaN: not computed, which counts as not kept. */
  readonly slack: ArrayLike<number>;
}

/** A combination to mark, at its values of the two axes. */
export interface SlicePick {
  readonly x: number;
  readonly y: number;
  /** `#1234` */
  readonly label: string;
}

export interface SliceChartData {
  readonly heading: ChartHeading;
  readonly x: GridAxis;
  readonly y: GridAxis;
  /** Aft static margin [% MAC] at `[iy * nx + ix]`; NaN: not computed. */
  readonly aftMargin: ArrayLike<number>;
  readonly requirements: readonly SliceRequirement[];
  readonly baseline?: { readonly x: number; readonly y: number };
  /** Shortlisted combinations, drawn at their two values though their other numbers may differ from the baseline. */
  readonly picks: readonly SlicePick[];
}

/** Plot size [px]. */
export const slicePlot = { width: 620, height: 460 } as const;
/** How far a drawn line may leave the computed one [px]. */
const smoothness = 0.15;

export function gridField(data: SliceChartData, values: ArrayLike<number>): GridField {
  return { xs: data.x.values, ys: data.y.values, values };
}

export function inPixels(lines: readonly Polyline[], map: PixelMap): Point[][] {
  return lines.map((line) => simplify(line.map(map.toPixels), smoothness));
}
export function inValues(lines: readonly Polyline[], map: PixelMap): Point[][] {
  return lines.map((line) => line.map(map.fromPixels));
}
