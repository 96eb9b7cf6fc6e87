import { balanceFigures } from './catalogue/balance-figures.ts';
import { type Entry, entry, sources } from './catalogue/entry.ts';
import { tailFigures } from './catalogue/tail-figures.ts';
import { verdictFigures } from './catalogue/verdict-figures.ts';
import { wingFigures } from './catalogue/wing-figures.ts';
import type { Figure } from './figure.ts';

/**
 * Every figure that the program works out, in the order in which it is worked out: the single
 * source of column names, units, meanings, formulas and sources for the table, the worksheet,
 * the data package and the list of figures.
 */
const entries = {
  combination: entry(
    'no.',
    'count',
    'Number of the combination, from 0.',
    'position in the plan',
    sources.study,
  ),
  ...wingFigures,
  ...tailFigures,
  ...balanceFigures,
  ...verdictFigures,
} as const satisfies Record<string, Entry>;

export type FigureName = keyof typeof entries;

/** Figures that show the inside of the calculation: in worksheets, not in the bulk table. */
const worksheetOnly: ReadonlySet<FigureName> = new Set<FigureName>([
  'wing_formula_sweep_half_chord',
  'neutral_point_height_datum',
  'body_moment_forward',
  'body_moment_aft',
  'tail_lift_share',
  'mac_height',
  'mac_leading_edge_offset',
  'body_width_at_wing',
  'wake_length',
  'root_angle_of_attack',
  'wing_lift_slope_ratio',
  'body_wing_place',
]);

export function isWorksheetOnly(name: string): boolean {
  return worksheetOnly.has(name as FigureName);
}

/** Names of all figures worked out, in order. */
export const figureNames = Object.keys(entries) as FigureName[];

/** The catalogue's entry of a figure; `labels` belong to the study. */
export function catalogueFigure(name: FigureName, labels?: readonly string[]): Figure {
  const { kind = 'number', ...rest }: Entry = entries[name];
  return labels === undefined ? { name, kind, ...rest } : { name, kind, ...rest, labels };
}
