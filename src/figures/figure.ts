/** What a figure is. The catalogue of all figures stands in catalogue.ts. */

/** Kinds of quantity; each has one SI unit and the units it is shown in (display.ts). */
export type Dimension =
  | 'length'
  | 'area'
  | 'mass'
  | 'mass_per_area'
  | 'speed'
  | 'angle'
  | 'per_angle'
  | 'volume'
  | 'force'
  | 'power'
  | 'moment'
  | 'per_length'
  | 'force_per_speed'
  | 'ratio'
  | 'fraction_of_mac'
  | 'count';

/** `number`: a double. `yes_no`: 0 or 1. `choice`: an index into labels. `flags`: a bit set over labels. All live in doubles; NaN is an empty cell. */
export type FigureKind = 'number' | 'yes_no' | 'choice' | 'flags';

export interface Figure {
  /** snake_case, without unit: `wing_span`. */
  readonly name: string;
  /** The literature's symbol, plain text: `b`, `Λ¼`, `h_n`. */
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly kind: FigureKind;
  /** One sentence for a designer. */
  readonly meaning: string;
  /** The formula in the symbols of other figures, or 'given'. */
  readonly formula: string;
  /** Where the formula comes from. */
  readonly source: string;
  /** For `choice` and `flags`: the text of each index or bit. */
  readonly labels?: readonly string[];
}

/** A column of the bulk table: a figure under the name that carries its SI unit. */
export interface TableColumn {
  /** `wing_span_m`, `static_margin_aft_percent_mac` … */
  readonly name: string;
  readonly figure: Figure;
  /** What a stored SI value is multiplied with to give the column's unit (100 for percent, 180/π for degrees). */
  readonly factor: number;
  /** Unit text of the column for the data package: `m`, `%`, `deg`, `1/rad`, ``. */
  readonly unit: string;
}
