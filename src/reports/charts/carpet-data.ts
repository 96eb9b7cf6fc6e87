import type { CarpetPlotData } from '../../charts/index.ts';
import { evaluateSlice } from '../../engine/slice.ts';
import { displayUnit } from '../../figures/display.ts';
import type { PlanAxis } from '../../plan/plan.ts';
import { axisLabel, axisTitle, figureInSentence, figureTitle } from '../axis-text.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading } from '../run-view.ts';
import { isSliceAxis } from './slice-data.ts';

export const carpetFigure = 'static_margin_aft';

/** The two axes along which a figure changes most on slices through the baseline; undefined when there are none. */
export function carpetAxes(view: RunView, figure: string): [PlanAxis, PlanAxis] | undefined {
  const { plan } = view.laidOut;
  const swings = plan.authorOrder
    .map((position, author) => ({ axis: plan.axes[position], authored: view.study.axes[author] }))
    .filter(({ axis }) => isSliceAxis(axis))
    .map(({ axis, authored }) => {
      const column = evaluateSlice(view.study, plan.stages, [authored], [figure]).get(figure) ?? [];
      const computed = [...column].filter(Number.isFinite);
      return { axis, swing: computed.length === 0 ? 0 : Math.max(...computed) - Math.min(...computed) };
    })
    .sort((p, q) => q.swing - p.swing);
  return swings.length < 2 ? undefined : [swings[0].axis, swings[1].axis];
}

/** A figure over two axes at the baseline's other numbers. */
export function carpetData(view: RunView, figureName: string, [a, b]: [PlanAxis, PlanAxis]): CarpetPlotData {
  const { study, laidOut } = view;
  const { plan, figures } = laidOut;
  const figure = figures.get(figureName);
  if (figure === undefined) throw new Error(`the catalogue lacks the figure ${figureName}`);
  const { factor } = displayUnit(figure.dimension, study.show);
  const authored = (axis: PlanAxis) => study.axes[plan.authorOrder.indexOf(plan.axes.indexOf(axis))];
  const values = evaluateSlice(study, plan.stages, [authored(a), authored(b)], [figureName]).get(figureName);
  const labels = (axis: PlanAxis) =>
    Array.from({ length: axis.size }, (_, i) => axisLabel(laidOut, axis, i, study.show));
  return {
    heading: chartHeading(view, `Carpet of ${figureInSentence(figureName)} at the baseline`),
    a: { title: axisTitle(laidOut, a, study.show), labels: labels(a) },
    b: { title: axisTitle(laidOut, b, study.show), labels: labels(b) },
    figureTitle: figureTitle(figure, study.show),
    values: (values ?? new Float64Array(0)).map((value) => value * factor),
  };
}
