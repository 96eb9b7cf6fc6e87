import type { ChartHeading } from './sheet.ts';

/** One combination's places on its mean aerodynamic chord, all in % MAC. */
export interface MacRulerRow {
  /** `#1234` */
  readonly label: string;
  /** Its key values in words: `span 9.5 m, tail arm 4.3 m`. */
  readonly detail: string;
  readonly cg: { readonly forward: number; readonly aft: number };
  /** CG positions that the band allows; reversed means that it allows none. An edge that the band leaves open is absent. */
  readonly window: { readonly from?: number; readonly to?: number };
  readonly neutralPoint: number;
  /** Aerodynamic centre of the wing. */
  readonly aerodynamicCentre: number;
  /** Neutral point in each condition of the chart, in their order; NaN: not computed. */
  readonly neutralPoints?: readonly number[];
  /** Governing neutral point with the stick free. */
  readonly freeStickNeutralPoint?: number;
  /** Governing manoeuvre points. */
  readonly manoeuvrePoint?: number;
  readonly freeStickManoeuvrePoint?: number;
  /** The aftmost control limit of the CG and what sets it: `elevator travel at the stall`. */
  readonly controlLimit?: { readonly at: number; readonly name: string };
}
export interface MacRulerData {
  readonly heading: ChartHeading;
  /** Names of the conditions that `neutralPoints` of the rows stand for. */
  readonly conditions?: readonly string[];
  readonly rows: readonly MacRulerRow[];
}
