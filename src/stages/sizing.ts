import { sizeOutcomeFigure } from '../figures/size-outcomes.ts';
import type { Sizing } from '../study/study.ts';
import { ColumnRoots } from './column-roots.ts';
import type { Stage } from './stage.ts';
import { StageChain, stagesDependingOn, stagesLeadingTo } from './stage-chain.ts';

/** Evaluations of the chain that a row takes, about: the grid and the steps that close in. */
const evaluationsPerRow = 14;

/**
 * Puts the stage that chooses a number into a study's stages: before all that depend on it.
 * @param chosen figure name of the number
 */
export function withSizing(stages: readonly Stage[], sizing: Sizing, chosen: string): Stage[] {
  const dependent = stagesDependingOn(stages, [chosen, sizeOutcomeFigure]);
  const after = stages.filter((stage) => dependent.has(stage));
  const before = stages.filter((stage) => !dependent.has(stage));
  return [...before, sizingStage(after, sizing, chosen), ...after];
}

/** The same stages for a calculation in which the number is given after all. */
export function withNumberGiven(stages: readonly Stage[]): Stage[] {
  return stages.map((stage) => (stage.writes.includes(sizeOutcomeFigure) ? givenStage : stage));
}

const givenStage: Stage = {
  name: 'number given',
  reads: [],
  writes: [sizeOutcomeFigure],
  cost: 1,
  kernel: (count, _, [outcome]) => {
    outcome.fill(0, 0, count);
  },
};

/** Finds in every row the number with which the stages that follow from it give the figure its value. */
function sizingStage(dependent: readonly Stage[], sizing: Sizing, chosen: string): Stage {
  const { figure, value, from, to } = sizing;
  const stages = stagesLeadingTo(dependent, figure);
  const chain = new StageChain(stages, chosen, figure, [sizeOutcomeFigure]);
  const roots = new ColumnRoots(chain, value, from, to);
  return {
    name: `sizing of ${chosen}`,
    reads: chain.reads,
    writes: [chosen, sizeOutcomeFigure],
    cost: evaluationsPerRow * (chain.cost + 1),
    kernel: (count, inputs, [number, outcome]) => {
      roots.solve(count, inputs, number, outcome);
    },
  };
}
