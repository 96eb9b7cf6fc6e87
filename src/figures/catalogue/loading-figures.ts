import { entry, sources } from './entry.ts';

const { definition, exact } = sources;

/** What follows from the masses of a loading; given by the study where it has none. */
export const loadingFigures = {
  mass: entry(
    'm',
    'mass',
    'Mass of the aeroplane: that of its heaviest loading case with all aboard.',
    'm = max over cases of Σ m_i',
    definition,
  ),
  cg_above_datum: entry(
    'z_cg',
    'length',
    'Height of the CG of the heaviest loading case above the datum line.',
    'z_cg = Σ m_i z_i/Σ m_i',
    exact,
  ),
  cg_forward_case: entry(
    '–',
    'count',
    'Loading case in which the CG is foremost.',
    'case of min Σ m x/Σ m over the breaks of its burn',
    exact,
    'choice',
  ),
  cg_aft_case: entry(
    '–',
    'count',
    'Loading case in which the CG is aftmost.',
    'case of max Σ m x/Σ m over the breaks of its burn',
    exact,
    'choice',
  ),
} as const;
