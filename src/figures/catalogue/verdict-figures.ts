import { entry, sources } from './entry.ts';

const { definition, study } = sources;

/** What could not be computed, what lies outside a fitted range, and what the requirements say. */
export const verdictFigures = {
  not_computed_because: entry(
    '–',
    'count',
    'Why the combination could not be worked out; empty when it could.',
    'checks of the geometry',
    definition,
    'choice',
  ),
  outside_fitted_range: entry(
    '–',
    'count',
    'Formulas used outside the range they were fitted to.',
    'each formula’s stated range',
    'as each formula',
    'flags',
  ),
  feasible: entry('–', 'count', 'Whether every requirement is met.', 'all requirements met', study, 'yes_no'),
  fails_first: entry(
    '–',
    'count',
    'Requirement with the largest shortfall over its own scale.',
    'largest shortfall/scale; ties in file order',
    study,
    'choice',
  ),
  fails_count: entry('–', 'count', 'Number of requirements not met.', 'count of shortfalls', study),
  fails: entry('–', 'count', 'Requirements not met.', 'shortfall > 1e-9', study, 'flags'),
  not_computed: entry(
    '–',
    'count',
    'Requirements whose figure is empty: neither met nor failed.',
    'figure empty',
    study,
    'flags',
  ),
  largest_shortfall: entry(
    '–',
    'ratio',
    'Largest shortfall over its scale; 0 when every requirement is met.',
    'max of shortfall/scale',
    study,
  ),
} as const;
