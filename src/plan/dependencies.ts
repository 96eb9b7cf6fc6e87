import type { Stage } from '../stages/stage.ts';

/** Positions of the axes that a figure or stage depends on. */
export type AxisSet = ReadonlySet<number>;

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
    ofFigure.set(name, new Set(axis === undefined ? [] : [axis]));
  }
  const ofStage = stages.map((stage) => {
    const axes = new Set<number>();
    for (const name of stage.reads) {
      const known = ofFigure.get(name);
      if (known === undefined) throw new Error(`stage ${stage.name} reads ${name}, which nothing wrote`);
      for (const axis of known) axes.add(axis);
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
