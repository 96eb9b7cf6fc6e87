import type { AxisSet } from './dependencies.ts';

/** Up to this many axes every order is tried (7! = 5040). */
const exhaustiveLimit = 7;

interface CostedStage {
  readonly axes: AxisSet;
  readonly cost: number;
}

/**
 * Orders the axes, slowest first, so that evaluating each stage anew whenever one of its axes
 * moves costs least. Equal costs keep the author's order, so the order is the same on every
 * machine.
 * @param sizes number of values of each axis, in the author's order
 * @returns positions of the axes, slowest first
 */
export function orderAxes(sizes: readonly number[], stages: readonly CostedStage[]): number[] {
  const author = sizes.map((_, position) => position);
  if (sizes.length > exhaustiveLimit) return orderByDependentCost(author, stages);
  let best = author;
  let bestCost = odometerCost(author, sizes, stages);
  for (const order of permutations(author)) {
    const cost = odometerCost(order, sizes, stages);
    if (cost < bestCost * (1 - 1e-12)) {
      best = order;
      bestCost = cost;
    }
  }
  return best;
}

/** Total cost when a stage is evaluated each time any of its axes, counted as digits, moves. */
export function odometerCost(
  order: readonly number[],
  sizes: readonly number[],
  stages: readonly CostedStage[],
): number {
  let total = 0;
  for (const { axes, cost } of stages) {
    let evaluations = 1;
    let product = 1;
    for (const axis of order) {
      product *= sizes[axis];
      if (axes.has(axis)) evaluations = product;
    }
    total += evaluations * cost;
  }
  return total;
}

/** For many axes: the axis whose dependent stages cost most together changes slowest. */
function orderByDependentCost(author: readonly number[], stages: readonly CostedStage[]): number[] {
  const dependentCost = (axis: number) =>
    stages.reduce((sum, stage) => (stage.axes.has(axis) ? sum + stage.cost : sum), 0);
  return [...author].sort((p, q) => dependentCost(q) - dependentCost(p) || p - q);
}

function* permutations(items: readonly number[]): Generator<number[]> {
  if (items.length <= 1) {
    yield [...items];
    return;
  }
  for (const first of items) {
    for (const rest of permutations(items.filter((item) => item !== first))) yield [first, ...rest];
  }
}
