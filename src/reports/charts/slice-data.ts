import type { GridAxis, SliceChartData, SlicePick } from '../../charts/index.ts';
import { evaluateSlice } from '../../engine/slice.ts';
import { displayUnit } from '../../figures/display.ts';
import type { PlanAxis } from '../../plan/plan.ts';
import { requirementEdges, withOtherBand } from '../../stages/requirements.ts';
import { axisTitle, axisWords } from '../axis-text.ts';
import type { RunView } from '../run-view.ts';
import { chartHeading, rowValue } from '../run-view.ts';

/** Points along each side of a slice: smooth contours at a small cost. */
const pointsPerSide = 61;
const percent = 100;

/** An axis a slice can be drawn over: one number with different values. */
export function isSliceAxis(axis: PlanAxis): boolean {
  return axis.figures.length === 1 && axis.size >= 2;
}

/** Evenly spaced values over the range of an axis, ascending, SI. */
export function denseValues(axis: PlanAxis, count: number): Float64Array {
  const least = Math.min(...axis.values[0]);
  const greatest = Math.max(...axis.values[0]);
  return Float64Array.from({ length: count }, (_, i) => least + ((greatest - least) * i) / (count - 1));
}

function factorOf(view: RunView, axis: PlanAxis): number {
  const figure = view.laidOut.figures.get(axis.figures[0]);
  return figure === undefined ? 1 : displayUnit(figure.dimension, view.study.show).factor;
}

function gridAxis(view: RunView, axis: PlanAxis, values: Float64Array): GridAxis {
  const factor = factorOf(view, axis);
  return {
    title: axisTitle(view.laidOut, axis, view.study.show),
    values: values.map((value) => value * factor),
  };
}

/** Path of the number that a one-number axis varies. */
export function pathOf(view: RunView, axis: PlanAxis): string {
  return view.study.axes[view.laidOut.plan.authorOrder.indexOf(view.laidOut.plan.axes.indexOf(axis))]
    .paths[0];
}

/** The slice through the baseline over two axes: margin, and slack of every requirement. */
export function sliceData(view: RunView, x: PlanAxis, y: PlanAxis): SliceChartData {
  const { study, laidOut } = view;
  const edges = requirementEdges({ requirements: withOtherBand(study.requirements, view.band) });
  const values = { x: denseValues(x, pointsPerSide), y: denseValues(y, pointsPerSide) };
  const figures = [...new Set(['static_margin_aft', ...edges.map((edge) => edge.figure)])];
  const columns = evaluateSlice(
    study,
    laidOut.plan.stages,
    [
      { name: y.name, paths: [pathOf(view, y)], values: [values.y] },
      { name: x.name, paths: [pathOf(view, x)], values: [values.x] },
    ],
    figures,
  );
  const column = (name: string) => columns.get(name) ?? new Float64Array(0);
  const baseline = {
    x: (study.inputs.get(pathOf(view, x)) ?? Number.NaN) * factorOf(view, x),
    y: (study.inputs.get(pathOf(view, y)) ?? Number.NaN) * factorOf(view, y),
  };
  return {
    heading: chartHeading(view, `Slice through the baseline: ${axisWords(x)} and ${axisWords(y)}`),
    x: gridAxis(view, x, values.x),
    y: gridAxis(view, y, values.y),
    aftMargin: column('static_margin_aft').map((margin) => percent * margin),
    requirements: edges.map(({ label, figure, sign, limit }) => ({
      name: label,
      slack: column(figure).map((value) => sign * (value - limit)),
    })),
    baseline,
    picks: view.shortlist.map(
      (entry): SlicePick => ({
        x: rowValue(view, entry.row.values, x.figures[0]) * factorOf(view, x),
        y: rowValue(view, entry.row.values, y.figures[0]) * factorOf(view, y),
        label: `#${entry.row.combination}`,
      }),
    ),
  };
}
