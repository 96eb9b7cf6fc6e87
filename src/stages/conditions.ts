import { conditionFigureName, isConditionFigure, isTabledFigure } from '../figures/condition-figures.ts';
import type { Condition, Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

/** Inputs of the first condition as the stages name them; each condition reads its own. */
const firstCondition = /^conditions_1_/;

/**
 * A stage as it stands in one of several conditions: figures that depend on the condition carry its
 * name, inputs of the first condition become those of this one.
 * @param number of the condition, from 1
 */
export function forCondition(stage: Stage, condition: Condition, number: number): Stage {
  const rename = (figure: string) => {
    if (firstCondition.test(figure)) return figure.replace(firstCondition, `conditions_${number}_`);
    return isConditionFigure(figure) ? conditionFigureName(figure, condition) : figure;
  };
  return {
    ...stage,
    name: `${stage.name}, ${condition.name}`,
    reads: stage.reads.map(rename),
    writes: stage.writes.map((figure) => (figure === null ? null : rename(figure))),
  };
}

/** The stages of all conditions, and the figures that each of several conditions has, under their plain names. */
export interface ConditionStages {
  readonly stages: readonly Stage[];
  readonly common: readonly string[];
}

/**
 * Stages of all conditions. With one condition its figures carry no name; with several each has its
 * own, and `governingStages` gives the plain names to the condition that governs.
 * @param stagesOf the stages of one condition, with the names they have when it is the only one
 */
export function stagesOfConditions(
  { conditions }: Pick<Study, 'conditions'>,
  stagesOf: (condition: Condition) => readonly Stage[],
): ConditionStages {
  if (conditions.length === 1) return { stages: stagesOf(conditions[0]), common: [] };
  const ofEach = conditions.map((condition) => stagesOf(condition));
  const written = ofEach.map((stages) => new Set(stages.flatMap((stage) => stage.writes)));
  const isFigure = (name: string | null): name is string => name !== null && isTabledFigure(name);
  return {
    stages: ofEach.flatMap((stages, index) =>
      stages.map((stage) => forCondition(stage, conditions[index], index + 1)),
    ),
    common: [...written[0]].filter(isFigure).filter((name) => written.every((names) => names.has(name))),
  };
}
