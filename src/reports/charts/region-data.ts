import type { CellAxis, RegionMapData } from '../../charts/index.ts';
import type { PlanAxis } from '../../plan/plan.ts';
import { axisLabel, axisTitle, axisWords } from '../axis-text.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading } from '../run-view.ts';

const percent = 100;

export function cellAxis(view: RunView, axis: PlanAxis): CellAxis {
  const { laidOut, study } = view;
  return {
    title: axisTitle(laidOut, axis, study.show),
    labels: Array.from({ length: axis.size }, (_, i) => axisLabel(laidOut, axis, i, study.show)),
  };
}

/** Which cell of two axes holds what share of feasible combinations, and how much margin at best. */
export async function regionData(view: RunView, x: PlanAxis, y: PlanAxis): Promise<RegionMapData> {
  const { axes } = view.laidOut.plan;
  const cells = await view.queries.regionOfAxes(axisDigit(axes, x), axisDigit(axes, y), view.otherBand);
  const feasibleShare = new Float64Array(x.size * y.size).fill(Number.NaN);
  const bestAftMargin = new Float64Array(x.size * y.size).fill(Number.NaN);
  for (let k = 0; k < cells.a.length; k++) {
    const place = cells.b[k] * x.size + cells.a[k];
    feasibleShare[place] = cells.feasible[k] / cells.studied[k];
    bestAftMargin[place] = percent * cells.bestAftMargin[k];
  }
  return {
    heading: chartHeading(view, `Where combinations are feasible: ${axisWords(x)} and ${axisWords(y)}`),
    x: cellAxis(view, x),
    y: cellAxis(view, y),
    combinations: view.rows,
    feasibleShare,
    bestAftMargin,
  };
}

/** How a combination's number gives its position on an axis: ⌊number/stride⌋ mod size. */
export function axisDigit(axes: readonly PlanAxis[], axis: PlanAxis): { stride: number; size: number } {
  const faster = axes.slice(axes.indexOf(axis) + 1);
  return { stride: faster.reduce((product, { size }) => product * size, 1), size: axis.size };
}
