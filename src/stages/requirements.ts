import type { Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

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

/** An edge counts as kept when it is missed by no more than this, in the figure's SI unit. */
export const edgeTolerance = 1e-9;

/** One per cent of the MAC: the scale on which shortfalls of a margin are compared with others. */
export const marginScale = 0.01;

export const bandLabels = { lower: 'static_margin.at_least', upper: 'static_margin.at_most' } as const;

/** All edges of a study in the order in which ties are settled: the band, then the file's order. */
export function requirementEdges(study: Pick<Study, 'band' | 'requirements'>): RequirementEdge[] {
  const edges: RequirementEdge[] = [];
  const { lower, upper } = study.band;
  if (lower !== undefined) {
    edges.push({ label: bandLabels.lower, figure: 'static_margin_aft', sign: 1, limit: lower, scale: marginScale });
  }
  if (upper !== undefined) {
    edges.push({
      label: bandLabels.upper,
      figure: 'static_margin_forward',
      sign: -1,
      limit: upper,
      scale: marginScale,
    });
  }
  for (const { name, figure, atLeast, atMost, scale } of study.requirements) {
    if (figure === 'in_range') {
      edges.push({ label: name, figure: 'outside_fitted_range', sign: -1, limit: 0, scale });
      continue;
    }
    if (atLeast !== undefined) edges.push({ label: `${name}.at_least`, figure, sign: 1, limit: atLeast, scale });
    if (atMost !== undefined) edges.push({ label: `${name}.at_most`, figure, sign: -1, limit: atMost, scale });
  }
  return edges;
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
        const { sign, limit, scale } = edges[e];
        const values = inputs[e];
        const bit = 2 ** e;
        for (let row = 0; row < count; row++) {
          const shortfall = sign * (limit - values[row]);
          if (shortfall > edgeTolerance) {
            failsCount[row] += 1;
            fails[row] += bit;
            if (shortfall / scale > largest[row]) {
              largest[row] = shortfall / scale;
              failsFirst[row] = e;
            }
          } else if (shortfall !== shortfall) {
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
