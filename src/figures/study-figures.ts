import type { LoadingChoices, Sizing, Study } from '../study/study.ts';
import { loadingFigures } from './catalogue/loading-figures.ts';
import type { FigureName } from './catalogue.ts';
import { catalogueFigure, figureNames } from './catalogue.ts';
import { conditionFigureName, isConditionFigure } from './condition-figures.ts';
import { controlLimitKinds } from './control-limit-kinds.ts';
import { showValue } from './display.ts';
import type { Figure } from './figure.ts';
import { inputFigure, inputFigureName } from './input-figures.ts';
import { sizeOutcomeFigure, sizeOutcomes } from './size-outcomes.ts';

type Wording = Partial<Pick<Figure, 'formula' | 'source'>>;

const tableSlope: Wording = {
  formula: 'a from the wing table at A, λ_e, Λ_e, times the Lowry–Polhamus slope at κ over that at κ = 1',
  source: 'our own lifting-surface results; scaling by Lowry and Polhamus, NACA TN 3911, from memory',
};
const jonesSlope: Wording = {
  formula: 'a = a_0 A/((E − 1 + β) A + a_0/π), E semiperimeter/span, β² = 1 − M²',
  source: 'R. T. Jones, NACA TN 817, from memory',
};

/** The tail's slope in the tail's own symbols, with what a V-tail loses. */
function tailSlopeWording({ tail, methods }: Study): Wording {
  const vTail = tail.layout === 'V' ? ', times cos²Γ_t' : '';
  const formula = {
    polhamus: 'a_t as a, with the tail’s own A_t, λ_t, Λ_t, a_0_t',
    table: 'a_t from the wing table at A_t, λ_t, Λ_t, scaled as a for κ and M',
    jones: 'a_t as a, with the tail’s own A_t, E, a_0_t',
  }[methods.lift_slope];
  const source = { polhamus: {}, table: tableSlope, jones: jonesSlope }[methods.lift_slope].source;
  return { formula: formula + vTail, ...(source !== undefined && { source }) };
}

/** Wording of figures whose formula the study's choice of methods settles. */
function chosenWording(study: Study): Partial<Record<FigureName, Wording>> {
  const { methods } = study;
  const slope = { polhamus: {}, table: tableSlope, jones: jonesSlope }[methods.lift_slope];
  return {
    wing_lift_slope: slope,
    tail_lift_slope: tailSlopeWording(study),
    ...(methods.aerodynamic_centre === 'quarter_mac' && {
      tail_aerodynamic_centre: { formula: 'h_ac,t = x_ac_t/c', source: 'common practice, no source' },
    }),
    wing_aerodynamic_centre: {
      formula: methods.aerodynamic_centre === 'table' ? 'h_ac = h_table' : 'h_ac = h_quarter',
    },
    downwash_gradient: { formula: methods.downwash === 'torenbeek' ? 'ε_α = ε_α,T' : 'ε_α = ε_α,H' },
    body_moment_slope: bodyWording(study),
    ...(study.loading === undefined ? {} : loadedWording(study.loading)),
  };
}

/** A CG range that follows from masses, and the masses of it that follow from the geometry. */
function loadedWording({ items }: LoadingChoices): Partial<Record<FigureName, Wording>> {
  const masses = items.flatMap(({ massAs, carriedBy }, index) =>
    massAs === 'mass' ? [] : [`m_${index + 1} = m_S${index + 1} ${carriedBy === 'wing' ? 'S' : 'S_t'}`],
  );
  const formula = (text: string) => [text, ...masses].join('; ');
  const travel = 'Σ m x/Σ m over all loading cases and every break of what burns in them';
  const { mass, cg_above_datum: height } = loadingFigures;
  return {
    cg_forward_station: { formula: formula(`x_fwd = min of ${travel}`), source: 'exact' },
    cg_aft_station: { formula: formula(`x_aft = max of ${travel}`), source: 'exact' },
    mass: { formula: formula(mass.formula) },
    cg_above_datum: { formula: formula(height.formula) },
  };
}

function bodyWording(study: Study): Wording {
  if (study.body === undefined)
    return { formula: 'C_mα,b = 0: the study says there is no body', source: 'the study' };
  if (study.methods.body_moment === 'quick_estimate') {
    return {
      formula: 'C_mα,b = K_f w² L/(S c)',
      source: 'Gilruth and White, NACA TR 711, from memory, unconfirmed',
    };
  }
  return {
    formula: 'C_mα,b = (π/2)(I_f + (1−ε_α) I_a)/(S c)',
    source: 'Multhopp, NACA TM 1036; upwash ours',
  };
}

/** Labels of the study's `choice` and `flags` figures. */
export interface StudyLabels {
  readonly requirements: readonly string[];
  readonly ranges: readonly string[];
  readonly reasons: readonly string[];
  /** Names of the flight conditions, in the file's order. */
  readonly conditions: readonly string[];
}

function labelsOf(name: FigureName, labels: StudyLabels, { loading }: Study): readonly string[] | undefined {
  switch (name) {
    case 'fails':
    case 'fails_first':
    case 'not_computed':
      return labels.requirements;
    case 'outside_fitted_range':
      return labels.ranges;
    case 'not_computed_because':
      return labels.reasons;
    case 'control_limit_kind':
      return controlLimitKinds.map(({ label }) => label);
    case 'control_limit_condition':
    case 'governing_condition_aft':
    case 'governing_condition_forward':
      return labels.conditions;
    case sizeOutcomeFigure:
      return sizeOutcomes;
    case 'cg_forward_case':
    case 'cg_aft_case':
      return loading?.cases.map((one) => one.name);
    default:
      return undefined;
  }
}

/**
 * Every figure of a study, by name: first the numbers it gives, then what is worked out, in the
 * order of computation. A number that the study gives itself keeps its catalogue wording but is
 * marked as given.
 */
export function figuresOfStudy(study: Study, labels: StudyLabels): Map<string, Figure> {
  const figures = new Map<string, Figure>();
  for (const path of study.inputs.keys()) {
    const figure = inputFigure(path, study.cg);
    figures.set(figure.name, figure);
  }
  const wording = chosenWording(study);
  for (const name of figureNames) {
    if (figures.has(name)) continue;
    const figure = { ...catalogueFigure(name, labelsOf(name, labels, study)), ...wording[name] };
    for (const own of figuresOfConditions(figure, study)) figures.set(own.name, own);
    figures.set(name, figure);
  }
  if (study.size !== undefined) tellChosen(figures, study, study.size);
  return figures;
}

/** The number that sizing chooses is given no longer. */
function tellChosen(figures: Map<string, Figure>, study: Study, size: Sizing): void {
  const name = figureOfInput(study)(size.path);
  const chosen = figures.get(name);
  const reached = figures.get(size.figure);
  if (chosen === undefined || reached === undefined) return;
  const value = showValue(size.value, reached.dimension, study.show);
  figures.set(name, { ...chosen, formula: `${chosen.symbol} so that ${reached.symbol} = ${value}` });
}

/** With several conditions, a figure as each of them has it. */
function figuresOfConditions(figure: Figure, { conditions }: Study): Figure[] {
  if (conditions.length === 1 || !isConditionFigure(figure.name)) return [];
  return conditions.map((condition) => ({
    ...figure,
    name: conditionFigureName(figure.name, condition),
    meaning: `${figure.meaning.replace(/\.$/, '')}; in ${condition.name}.`,
  }));
}

export function figureOfInput(study: Pick<Study, 'cg'>): (path: string) => string {
  return (path) => inputFigureName(path, study.cg);
}
