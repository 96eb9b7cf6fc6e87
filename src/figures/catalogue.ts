import { balanceFigures } from './catalogue/balance-figures.ts';
import { controlFigures, tabledControlFigures } from './catalogue/control-figures.ts';
import { type Entry, entry, sources } from './catalogue/entry.ts';
import { loadingFigures } from './catalogue/loading-figures.ts';
import { sizingFigures } from './catalogue/sizing-figures.ts';
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
  ...loadingFigures,
  ...balanceFigures,
  ...controlFigures,
  ...sizingFigures,
  ...verdictFigures,
} as const satisfies Record<string, Entry>;

export type FigureName = keyof typeof entries;

/** Figures that show the inside of the calculation: in worksheets, not in the bulk table. */
const worksheetOnly: ReadonlySet<FigureName> = new Set<FigureName>([
  'density_ratio',
  'flap_zero_lift_change',
  'flap_moment',
  'flap_maximum_lift',
  'flap_downwash',
  'maximum_lift',
  'stall_speed',
  'wing_lift_slope_away',
  'ground_induction',
  'thrust_coefficient',
  'thrust_on_wing',
  'propeller_inflow',
  'propeller_normal_slope',
  'propeller_stream_gradient',
  'tail_pressure_ratio',
  'tail_downwash_gradient',
  'lift_slope_rest',
  'propeller_lift_share',
  'propeller_position',
  'tail_position',
  'neutral_point_rest',

  'wing_formula_sweep_half_chord',
  'neutral_point_height_lift',
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

const tabledControl: ReadonlySet<string> = new Set(tabledControlFigures);

export function isWorksheetOnly(name: string): boolean {
  if (isControlFigure(name)) return !tabledControl.has(name);
  return worksheetOnly.has(name as FigureName);
}

/** Whether a figure is one of trim, free stick, manoeuvre, stick forces or the forward limit. */
export function isControlFigure(name: string): boolean {
  return Object.hasOwn(controlFigures, name);
}

/** Names of all figures worked out, in order. */
export const figureNames = Object.keys(entries) as FigureName[];

/** The catalogue's entry of a figure; `labels` belong to the study. */
export function catalogueFigure(name: FigureName, labels?: readonly string[]): Figure {
  const { kind = 'number', ...rest }: Entry = entries[name];
  return labels === undefined ? { name, kind, ...rest } : { name, kind, ...rest, labels };
}
