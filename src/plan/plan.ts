import type { Stage } from '../stages/stage.ts';
import type { Axis, Study } from '../study/study.ts';
import type { AxisSet } from './dependencies.ts';
import { axesOfStages } from './dependencies.ts';
import { orderAxes } from './order-axes.ts';

/**
 * Rows of one block: the unit in which tables are written. It is fixed, so that the bytes of a
 * table do not depend on how many blocks a part has or how many workers there are.
 */
export const blockSize = 16_384;

/** One axis of the plan; `values[k][i]` is the value of its k-th number at position i. */
export interface PlanAxis {
  readonly name: string;
  readonly size: number;
  /** Figure names of the axis' numbers. */
  readonly figures: readonly string[];
  readonly values: readonly Float64Array[];
}

/** The study laid out as numbered combinations. */
export interface Plan {
  readonly stages: readonly Stage[];
  /** Slowest first: the last axis changes from one combination to the next. */
  readonly axes: readonly PlanAxis[];
  /** Axes in the order of the study file, as positions into `axes`. */
  readonly authorOrder: readonly number[];
  readonly combinations: number;
  /** Input figures that do not vary, SI. */
  readonly fixed: ReadonlyMap<string, number>;
  /** Axes (positions into `axes`) each stage depends on. */
  readonly axesOfStage: readonly AxisSet[];
  readonly axesOfFigure: ReadonlyMap<string, AxisSet>;
}

export interface PlanInput {
  readonly axes: readonly Axis[];
  readonly inputs: Study['inputs'];
  /** The number that it names is worked out in each combination: no input. */
  readonly size?: Study['size'];
}

/**
 * Lays out the combinations of a study.
 * @param figureOfInput name of the figure that an input's path stands for
 */
export function makePlan(
  study: PlanInput,
  stages: readonly Stage[],
  figureOfInput: (path: string) => string,
): Plan {
  const authorAxes = study.axes.map((axis) => planAxis(axis, figureOfInput));
  const inputs = new Set(givenPaths(study).map(figureOfInput));
  const sizes = authorAxes.map((axis) => axis.size);
  const authored = axesOfStages(stages, inputs, positionsByFigure(authorAxes));
  const order = orderAxes(
    sizes,
    stages.map((stage, index) => ({ axes: authored.ofStage[index], cost: stage.cost })),
  );
  const axes = order.map((position) => authorAxes[position]);
  const { ofStage, ofFigure } = axesOfStages(stages, inputs, positionsByFigure(axes));
  return {
    stages,
    axes,
    authorOrder: authorAxes.map((axis) => axes.indexOf(axis)),
    combinations: sizes.reduce((product, size) => product * size, 1),
    fixed: fixedInputs(study, axes, figureOfInput),
    axesOfStage: ofStage,
    axesOfFigure: ofFigure,
  };
}

function givenPaths({ inputs, size }: PlanInput): string[] {
  return [...inputs.keys()].filter((path) => path !== size?.path);
}

function planAxis(axis: Axis, figureOfInput: (path: string) => string): PlanAxis {
  return {
    name: axis.name,
    size: axis.values[0].length,
    figures: axis.paths.map(figureOfInput),
    values: axis.values,
  };
}

function positionsByFigure(axes: readonly PlanAxis[]): Map<string, number> {
  return new Map(axes.flatMap((axis, position) => axis.figures.map((figure) => [figure, position] as const)));
}

function fixedInputs(
  study: PlanInput,
  axes: readonly PlanAxis[],
  figureOfInput: (path: string) => string,
): Map<string, number> {
  const varied = new Set(axes.flatMap((axis) => axis.figures));
  const fixed = new Map<string, number>();
  for (const path of givenPaths(study)) {
    const figure = figureOfInput(path);
    const value = study.inputs.get(path);
    if (value !== undefined && !varied.has(figure)) fixed.set(figure, value);
  }
  return fixed;
}

/** Positions of a combination on each axis of the plan, slowest axis first. */
export function digitsOf(plan: Plan, combination: number): number[] {
  const digits = new Array<number>(plan.axes.length);
  let rest = combination;
  for (let position = plan.axes.length - 1; position >= 0; position--) {
    const { size } = plan.axes[position];
    digits[position] = rest % size;
    rest = Math.floor(rest / size);
  }
  return digits;
}

/** Number of the combination at the given positions; the reverse of `digitsOf`. */
export function combinationAt(plan: Plan, digits: readonly number[]): number {
  return plan.axes.reduce((number, axis, position) => number * axis.size + digits[position], 0);
}

/** A part: the blocks first … first+count−1. */
export interface Part {
  readonly number: number;
  readonly firstBlock: number;
  readonly blocks: number;
}

export function blockCount(plan: Plan): number {
  return Math.ceil(plan.combinations / blockSize);
}

/** Divides the blocks of a plan into parts of equal size, the last one shorter. */
export function partsOf(plan: Plan, blocksPerPart: number): Part[] {
  const blocks = blockCount(plan);
  const parts: Part[] = [];
  for (let firstBlock = 0; firstBlock < blocks; firstBlock += blocksPerPart) {
    parts.push({
      number: parts.length,
      firstBlock,
      blocks: Math.min(blocksPerPart, blocks - firstBlock),
    });
  }
  return parts;
}
