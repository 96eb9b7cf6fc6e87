import type { Dimension, FigureKind } from '../figure.ts';

/** What the catalogue says of one figure; see figure.ts. Symbols in formulas are those of other figures. */
export interface Entry {
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly meaning: string;
  readonly formula: string;
  readonly source: string;
  readonly kind?: FigureKind;
}

export function entry(
  symbol: string,
  dimension: Dimension,
  meaning: string,
  formula: string,
  source: string,
  kind?: FigureKind,
): Entry {
  return kind === undefined
    ? { symbol, dimension, meaning, formula, source }
    : { symbol, dimension, meaning, formula, source, kind };
}

/** Sources that many entries share. */
export const sources = {
  exact: 'exact',
  definition: 'definition',
  ours: 'our own lifting-surface results',
  polhamus: 'Lowry and Polhamus, NACA TN 3911, from memory',
  shares: 'exact for linear parts',
  study: 'the study',
} as const;
