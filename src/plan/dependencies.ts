import type { Stage } from '../stages/stage.ts';

/** Which axes a figure or stage depends on, as a bit set over axis positions (≤ 30 axes). */
export type AxisSet = number;

export const maximumAxes = 30;

/**
 * Follows the figures from the varied inputs through the stages.
 * @param inputAxis position of the axis that varies an input figure; absent for fixed ones
 * @returns the axes of every figure that depends on any, and of every stage in order
 * Throws on a stage that reads what no earlier stage wrote and no input gives: a bug.
 */
export function axesOfStages(
  stages: readonly Stage[],
  inputs: ReadonlySet<string>,
  inputAxis: ReadonlyMap<string, number>,
): { readonly ofStage: readonly AxisSet[]; readonly ofFigure: ReadonlyMap<string, AxisSet> } {
  const ofFigure = new Map<string, AxisSet>();
  for (const name of inputs) {
    const axis = inputAxis.get(name);
    ofFigure.set(name, axis === undefined ? 0 : 1 << axis);
  }
  const ofStage = stages.map((stage) => {
    let axes = 0;
    for (const name of stage.reads) {
      const known = ofFigure.get(name);
      if (known === undefined) throw new Error(`stage ${stage.name} reads ${name}, which nothing wrote`);
      axes |= known;
    }
    for (const name of stage.writes) {
      if (name === null) continue;
      if (ofFigure.has(name)) throw new Error(`stage ${stage.name} writes ${name} a second time`);
      ofFigure.set(name, axes);
    }
    return axes;
  });
  return { ofStage, ofFigure };
}
