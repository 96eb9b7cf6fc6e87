import type { AxisMargins, BandEdges, MarginAlongAxisData } from '../../charts/index.ts';
import { evaluateSlice } from '../../engine/slice.ts';
import { displayUnit } from '../../figures/display.ts';
import type { PlanAxis } from '../../plan/plan.ts';
import type { Band } from '../../study/study.ts';
import { axisLabel, axisTitle } from '../axis-text.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading } from '../run-view.ts';
import { axisDigit } from './region-data.ts';

const percent = 100;
const marginFigures = { aft: 'static_margin_aft', forward: 'static_margin_forward' } as const;

/** Band edges in % MAC. */
export function bandEdges({ lower, upper }: Band): BandEdges {
  return {
    ...(lower === undefined ? {} : { lower: percent * lower }),
    ...(upper === undefined ? {} : { upper: percent * upper }),
  };
}

/** Margin along every axis: the slice through the baseline within the envelope of all combinations. */
export async function alongAxisData(view: RunView): Promise<MarginAlongAxisData> {
  const axes: AxisMargins[] = [];
  for (const position of view.laidOut.plan.authorOrder) {
    const axis = view.laidOut.plan.axes[position];
    if (axis.size > 1) axes.push(await axisMargins(view, axis));
  }
  return { heading: chartHeading(view, 'Static margin along each axis'), band: bandEdges(view.band), axes };
}

async function axisMargins(view: RunView, axis: PlanAxis): Promise<AxisMargins> {
  const { laidOut, study, queries } = view;
  const { plan } = laidOut;
  const authored = study.axes[plan.authorOrder.indexOf(plan.axes.indexOf(axis))];
  const slice = evaluateSlice(study, plan.stages, [authored], Object.values(marginFigures));
  const order = ascendingOrder(axis);
  const digit = axisDigit(plan.axes, axis);
  const envelope = async (figure: string) => {
    const { axis: positions, least, greatest } = await queries.alongAxisOf(digit, figure);
    const place = (column: Float64Array) => {
      const byPosition = new Float64Array(axis.size).fill(Number.NaN);
      positions.forEach((position, k) => {
        byPosition[position] = percent * column[k];
      });
      return order.map((position) => byPosition[position]);
    };
    return { least: place(least), greatest: place(greatest) };
  };
  const sliced = (figure: string) => {
    const column = slice.get(figure) ?? new Float64Array(axis.size);
    return order.map((position) => percent * column[position]);
  };
  return {
    title: axisTitle(laidOut, axis, study.show),
    values: axisValues(view, axis, order),
    aft: sliced(marginFigures.aft),
    forward: sliced(marginFigures.forward),
    aftRange: await envelope(marginFigures.aft),
    forwardRange: await envelope(marginFigures.forward),
  };
}

/** Positions of an axis in ascending order of its values; tied numbers keep the author's order. */
function ascendingOrder(axis: PlanAxis): number[] {
  const positions = Array.from({ length: axis.size }, (_, i) => i);
  if (axis.figures.length > 1) return positions;
  return positions.sort((p, q) => axis.values[0][p] - axis.values[0][q]);
}

function axisValues(
  view: RunView,
  axis: PlanAxis,
  order: readonly number[],
): readonly number[] | readonly string[] {
  const { laidOut, study } = view;
  const figure = laidOut.figures.get(axis.figures[0]);
  if (axis.figures.length > 1 || figure === undefined) {
    return order.map((position) => axisLabel(laidOut, axis, position, study.show));
  }
  const { factor } = displayUnit(figure.dimension, study.show);
  return order.map((position) => axis.values[0][position] * factor);
}
