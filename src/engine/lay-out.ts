import { figureNames, isWorksheetOnly } from '../figures/catalogue.ts';
import { conditionFigureName } from '../figures/condition-figures.ts';
import { tableColumn } from '../figures/display.ts';
import type { Figure, TableColumn } from '../figures/figure.ts';
import { sizeOutcomeFigure } from '../figures/size-outcomes.ts';
import { figureOfInput, figuresOfStudy } from '../figures/study-figures.ts';
import type { Plan } from '../plan/plan.ts';
import { makePlan } from '../plan/plan.ts';
import { buildStages } from '../stages/build-stages.ts';
import { rangeLabels, reasonLabels } from '../stages/out-of-range.ts';
import type { RequirementEdge } from '../stages/requirements.ts';
import { requirementEdges } from '../stages/requirements.ts';
import type { Study } from '../study/study.ts';
import { combinationFigure } from './evaluator.ts';

/** A study made ready for evaluation; the same on the main thread and in every worker. */
export interface LaidOut {
  readonly plan: Plan;
  readonly figures: ReadonlyMap<string, Figure>;
  /** Columns of the bulk table, in order. */
  readonly columns: readonly TableColumn[];
  readonly edges: readonly RequirementEdge[];
}

export function layOut(study: Study): LaidOut {
  const edges = requirementEdges(study);
  const plan = makePlan(study, buildStages(study), figureOfInput(study));
  const figures = figuresOfStudy(study, {
    requirements: edges.map((edge) => edge.label),
    ranges: rangeLabels,
    reasons: reasonLabels,
    conditions: study.conditions.map(({ name }) => name),
  });
  const columns = tableFigureNames(study, plan).map((name) => tableColumn(figureNamed(figures, name)));
  return { plan, figures, columns, edges };
}

function figureNamed(figures: ReadonlyMap<string, Figure>, name: string): Figure {
  const figure = figures.get(name);
  if (figure === undefined) throw new Error(`the catalogue lacks the figure ${name}`);
  return figure;
}

/** Figures that queries over a finished run need; they are in every table. */
const alwaysKept = [
  combinationFigure,
  'static_margin_forward',
  'static_margin_aft',
  'feasible',
  'fails_first',
  'fails_count',
  'fails',
  'not_computed',
  'largest_shortfall',
];

/** Figures of which the table has a column for each of several conditions; all others are in the worksheet. */
const tabledPerCondition = ['neutral_point', 'static_margin_forward', 'static_margin_aft'];

/** Figures that are columns only where a loading works them out, not as a fixed number of the study. */
const ofLoading: readonly string[] = ['mass', 'cg_above_datum'];

function ofConditions({ conditions }: Study): string[] {
  if (conditions.length === 1) return [];
  return tabledPerCondition.flatMap((name) =>
    conditions.map((condition) => conditionFigureName(name, condition)),
  );
}

/** The varied numbers in the author's order, then every result in the order of computation. */
function tableFigureNames(study: Study, plan: Plan): string[] {
  const varied = plan.authorOrder.flatMap((position) => plan.axes[position].figures);
  const isColumn = (name: string) =>
    name !== combinationFigure &&
    !isWorksheetOnly(name) &&
    !(ofLoading.includes(name) && plan.fixed.has(name));
  const results = figureNames.filter(isColumn);
  const workedOut = (name: string) => name === combinationFigure || plan.axesOfFigure.has(name);
  const chosen = study.size === undefined ? [] : [figureOfInput(study)(study.size.path), sizeOutcomeFigure];
  const all = [
    ...new Set([combinationFigure, ...varied, ...chosen, ...results, ...ofConditions(study)]),
  ].filter(workedOut);
  if (study.columns === undefined) return all;
  const wanted = new Set([
    ...alwaysKept,
    ...varied,
    ...chosen,
    ...study.columns,
    ...study.preferences.map((preference) => preference.figure),
  ]);
  return [...all.filter((name) => wanted.has(name)), ...study.columns.filter((name) => !all.includes(name))];
}
