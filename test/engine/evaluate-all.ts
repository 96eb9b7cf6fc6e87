/** Whole plans evaluated in one go, for tests that compare ways of evaluating. */
import { combinationFigure, Evaluator } from '../../src/engine/evaluator.ts';
import { figureOfInput } from '../../src/figures/study-figures.ts';
import type { Plan } from '../../src/plan/plan.ts';
import { blockSize, digitsOf, makePlan } from '../../src/plan/plan.ts';
import { buildStages } from '../../src/stages/build-stages.ts';
import type { Study } from '../../src/study/study.ts';

/** Columns by figure, one entry a kept row; `combination` is always among them. */
export type Columns = ReadonlyMap<string, Float64Array>;

export interface HowToEvaluate {
  /** Rows of a tile; the program's own by default. */
  readonly tileRows?: number;
  /** Combinations asked for in one call, ≤ blockSize. */
  readonly atOnce?: number;
}

export function planOf(study: Study): Plan {
  return makePlan(study, buildStages(study), figureOfInput(study));
}

/** Evaluates every combination of a plan in order. */
export function evaluateAll(plan: Plan, figures: readonly string[], how: HowToEvaluate = {}): Columns {
  const names = [combinationFigure, ...figures];
  const evaluator = new Evaluator(plan, names, how.tileRows);
  const whole = names.map(() => new Float64Array(plan.combinations));
  const atOnce = how.atOnce ?? blockSize;
  let rows = 0;
  for (let first = 0; first < plan.combinations; first += atOnce) {
    const count = evaluator.evaluate(first, atOnce);
    whole.forEach((column, k) => {
      column.set(evaluator.columns[k].subarray(0, count), rows);
    });
    rows += count;
  }
  return new Map(names.map((name, k) => [name, whole[k].subarray(0, rows)]));
}

export function columnOf(columns: Columns, name: string): Float64Array {
  const column = columns.get(name);
  if (column === undefined) throw new Error(`no column ${name}`);
  return column;
}

/** The first entry at which two sets of columns are not the same doubles; undefined when there is none. */
export function firstDifference(one: Columns, other: Columns): string | undefined {
  for (const [name, column] of one) {
    const against = columnOf(other, name);
    if (column.length !== against.length) return `${name}: ${column.length} rows for ${against.length}`;
    const row = column.findIndex((value, k) => !Object.is(value, against[k]));
    if (row >= 0) return `${name}[${row}]: ${column[row]} for ${against[row]}`;
  }
  return undefined;
}

/** Rows keyed by the positions of their values on the study's axes, whatever order a plan gives these. */
export function rowsByValues(study: Study, plan: Plan, columns: Columns): Map<string, number[]> {
  const places = study.axes.map(({ name }) => plan.axes.findIndex((axis) => axis.name === name));
  const names = [...columns.keys()].filter((name) => name !== combinationFigure);
  return new Map(
    [...columnOf(columns, combinationFigure)].map((combination, row) => {
      const digits = digitsOf(plan, combination);
      const values = names.map((name) => columnOf(columns, name)[row]);
      return [
        places
          .map((place, k) => `${study.axes[k].name}=${digits[place]}`)
          .sort()
          .join(' '),
        values,
      ];
    }),
  );
}
