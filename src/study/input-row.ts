/** One row of the table of numbers that a study can give, and words that several rows share. */
import type { Dimension } from '../figures/figure.ts';

/** What is taken for a number that is left out, and why. */
export interface InputDefault {
  readonly value: number;
  readonly source: string;
}

export interface InputDefinition {
  /** `wing.panels[n].taper` in the table, `wing.panels[2].taper` when asked for one path. */
  readonly path: string;
  /** The literature's symbol, plain text. */
  readonly symbol: string;
  readonly dimension: Dimension;
  /** One sentence for a designer. */
  readonly meaning: string;
  /** Hard limits, ends included [SI]. */
  readonly least: number;
  readonly most: number;
  /** Why the limits stand where they do. */
  readonly limits: string;
  readonly whenLeftOut?: InputDefault;
}

export const deg = Math.PI / 180;
export const hundred = 100;

export type Row = readonly [
  path: string,
  symbol: string,
  dimension: Dimension,
  meaning: string,
  least: number,
  most: number,
  limits: string,
  whenLeftOut?: InputDefault,
];

export const zero = (source: string): InputDefault => ({ value: 0, source });
export const level = zero('taken as level; common practice, no source');
export const symmetric = zero('taken as symmetric; common practice, no source');
export const datum = 'any datum near the aeroplane';
