import { figureOfInput } from '../figures/study-figures.ts';
import { blockCount, blockSize, digitsOf, makePlan } from '../plan/plan.ts';
import { withNumberGiven } from '../stages/sizing.ts';
import type { Stage } from '../stages/stage.ts';
import type { Axis, Study } from '../study/study.ts';
import { combinationFigure, Evaluator, skippedFigure } from './evaluator.ts';

/**
 * Evaluates a slice: the baseline with one or two axes varied, each over values of its own. A number that
 * the study's sizing chooses is chosen anew at every point, unless it is varied itself.
 * @param axes    in the order of the result, the last running fastest
 * @param figures names of the figures wanted
 * @returns one column per figure, SI, entry `i · n₂ + j` for positions i, j of two axes; skip rules
 *          do not apply
 */
export function evaluateSlice(
  study: Study,
  stages: readonly Stage[],
  axes: readonly Axis[],
  figures: readonly string[],
): Map<string, Float64Array> {
  const unskipped = stages.filter((stage) => !stage.writes.includes(skippedFigure));
  const { inputs, size } = study;
  const sized = size !== undefined && !axes.some(({ paths }) => paths.includes(size.path));
  const plan = sized
    ? makePlan({ axes, inputs, size }, unskipped, figureOfInput(study))
    : makePlan({ axes, inputs }, withNumberGiven(unskipped), figureOfInput(study));
  const evaluator = new Evaluator(plan, [combinationFigure, ...figures]);
  const result = new Map(figures.map((name) => [name, new Float64Array(plan.combinations)]));
  for (let block = 0; block < blockCount(plan); block++) {
    const count = evaluator.evaluate(block * blockSize, blockSize);
    for (let row = 0; row < count; row++) {
      const digits = digitsOf(plan, evaluator.columns[0][row]);
      const place = plan.authorOrder.reduce(
        (index, position) => index * plan.axes[position].size + digits[position],
        0,
      );
      figures.forEach((name, k) => {
        const column = result.get(name);
        if (column !== undefined) column[place] = evaluator.columns[k + 1][row];
      });
    }
  }
  return result;
}
