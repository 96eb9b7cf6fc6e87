import { bandRequirements, edgeTolerance, marginScale } from '../figures/band.ts';
import { sizeOutcomeFigure } from '../figures/size-outcomes.ts';
import type { Band, Requirement, Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

/** Stands for the flags of formulas used outside their fitted range. */
const inRange = 'in_range';
const flagsFigure = 'outside_fitted_range';
/** Flags and outcomes are as they should be or not: whatever they name, they weigh as one unit of shortfall. */
const flagsShortfall = 1;

/** One edge that a combination must keep: value ≥ limit (`sign` 1) or value ≤ limit (`sign` −1). */
export interface RequirementEdge {
  /** `static_margin.at_least`, `handy_span.at_most`, `in_range`. */
  readonly label: string;
  readonly figure: string;
  readonly sign: 1 | -1;
  /** SI. */
  readonly limit: number;
  /** Shortfalls are divided by this; SI, > 0. */
  readonly scale: number;
}

/** All edges of a study, in the order of its file, which settles ties; first that its sizing has a solution. */
export function requirementEdges({
  requirements,
  size,
}: Pick<Study, 'requirements' | 'size'>): RequirementEdge[] {
  const solved: RequirementEdge = { label: 'size', figure: sizeOutcomeFigure, sign: -1, limit: 0, scale: 1 };
  const required = requirements.flatMap(({ name, figure, atLeast, atMost, scale }): RequirementEdge[] => {
    if (figure === inRange) return [{ label: name, figure: flagsFigure, sign: -1, limit: 0, scale }];
    const ofBand = name === bandRequirements.lower.name || name === bandRequirements.upper.name;
    const label = (edge: string) => (ofBand ? name : `${name}.${edge}`);
    return [
      ...(atLeast === undefined
        ? []
        : [{ label: label('at_least'), figure, sign: 1 as const, limit: atLeast, scale }]),
      ...(atMost === undefined
        ? []
        : [{ label: label('at_most'), figure, sign: -1 as const, limit: atMost, scale }]),
    ];
  });
  return size === undefined ? required : [solved, ...required];
}

/** A study's requirements with its band replaced by another. */
export function withOtherBand(requirements: Study['requirements'], { lower, upper }: Band): Requirement[] {
  const others = requirements.filter(
    ({ name }) => name !== bandRequirements.lower.name && name !== bandRequirements.upper.name,
  );
  return [
    ...(lower === undefined ? [] : [{ ...bandRequirements.lower, atLeast: lower, scale: marginScale }]),
    ...(upper === undefined ? [] : [{ ...bandRequirements.upper, atMost: upper, scale: marginScale }]),
    ...others,
  ];
}

/** Judges every edge: which fail, which first, by how much, and which could not be computed. */
export function requirementsStage(edges: readonly RequirementEdge[]): Stage {
  return {
    name: 'requirements',
    reads: edges.map((edge) => edge.figure),
    writes: ['feasible', 'fails_first', 'fails_count', 'fails', 'not_computed', 'largest_shortfall'],
    cost: 10 + 5 * edges.length,
    kernel: (count, inputs, [feasible, failsFirst, failsCount, fails, notComputed, largest]) => {
      const wholeColumns = [feasible, failsCount, fails, notComputed, largest];
      for (const column of wholeColumns) column.fill(0, 0, count);
      failsFirst.fill(Number.NaN, 0, count);
      for (let e = 0; e < edges.length; e++) {
        const { figure, sign, limit, scale } = edges[e];
        const most =
          figure === flagsFigure || figure === sizeOutcomeFigure ? flagsShortfall : Number.POSITIVE_INFINITY;
        const values = inputs[e];
        const bit = 2 ** e;
        for (let row = 0; row < count; row++) {
          const shortfall = sign * (limit - values[row]);
          if (shortfall > edgeTolerance) {
            failsCount[row] += 1;
            fails[row] += bit;
            const scaled = Math.min(shortfall, most) / scale;
            if (scaled > largest[row]) {
              largest[row] = scaled;
              failsFirst[row] = e;
            }
          } else if (Number.isNaN(shortfall)) {
            notComputed[row] += bit;
          }
        }
      }
      for (let row = 0; row < count; row++) {
        feasible[row] = failsCount[row] === 0 && notComputed[row] === 0 ? 1 : 0;
      }
    },
  };
}
