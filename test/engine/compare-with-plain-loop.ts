/** The engine's columns held against the plain loop, combination by combination. */
import { combinationFigure, Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { blockCount, blockSize, digitsOf } from '../../src/plan/plan.ts';
import type { Study } from '../../src/study/study.ts';
import { evaluatePlain, isPlainPath, plainFigures, plainInputs } from './plain-loop.ts';

/** Below this, where margins cancel, differences count as absolute; shortfalls are margins times a hundred. */
const smallest = (figure: string) => (figure === 'largest_shortfall' ? 1 : 0.01);

/** Difference of a value from the plain loop's, relative; infinite where one of the two is empty. */
function difference(figure: string, value: number, plain: number): number {
  if (Number.isNaN(value) || Number.isNaN(plain)) {
    return Number.isNaN(value) && Number.isNaN(plain) ? 0 : Number.POSITIVE_INFINITY;
  }
  return Math.abs(value - plain) / Math.max(smallest(figure), Math.abs(plain));
}

export interface Comparison {
  worst: number;
  where: string;
  rows: number;
  empty: number;
  flagged: number;
  feasible: number;
}

/** Compares the blocks of a study in the given order, all of them once by default. */
export function compareWithPlainLoop(study: Study, blocks?: readonly number[]): Comparison {
  const { plan } = layOut(study);
  const evaluator = new Evaluator(plan, [combinationFigure, ...plainFigures]);
  const inputs = plainInputs(study);
  const out = new Float64Array(plainFigures.length);
  const found = { worst: 0, where: '', rows: 0, empty: 0, flagged: 0, feasible: 0 };
  const place = (name: (typeof plainFigures)[number]) => plainFigures.indexOf(name);
  for (const block of blocks ?? Array(blockCount(plan)).keys()) {
    const count = evaluator.evaluate(block * blockSize, blockSize);
    for (let row = 0; row < count; row++) {
      const combination = evaluator.columns[0][row];
      const digits = digitsOf(plan, combination);
      for (const { name, paths, values } of study.axes) {
        const digit = digits[plan.axes.findIndex((axis) => axis.name === name)];
        paths.forEach((path, k) => {
          if (!isPlainPath(path)) throw new Error(`the plain loop does not know ${path}`);
          inputs.numbers[path] = values[k][digit];
        });
      }
      evaluatePlain(inputs, out);
      if (Number.isNaN(out[place('neutral_point')])) found.empty++;
      if (out[place('outside_fitted_range')] !== 0) found.flagged++;
      if (out[place('feasible')] === 1) found.feasible++;
      for (let k = 0; k < plainFigures.length; k++) {
        const off = difference(plainFigures[k], evaluator.columns[k + 1][row], out[k]);
        if (off > found.worst) {
          found.worst = off;
          found.where = `${plainFigures[k]} of ${combination}: ${evaluator.columns[k + 1][row]} for ${out[k]}`;
        }
      }
    }
    found.rows += count;
  }
  return found;
}
