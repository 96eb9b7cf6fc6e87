import type { ChartSpec } from '../../charts/index.ts';
import {
  carpetPlot,
  elevatorToTrim,
  loadingDiagram,
  macRuler,
  marginAlongAxis,
  neutralPointBuildUp,
  planView,
  regionMap,
  sliceChart,
  tailSizing,
} from '../../charts/index.ts';
import type { PlanAxis } from '../../plan/plan.ts';
import { assessesControl } from '../../stages/control.ts';
import type { RunView } from '../run-view.ts';
import { alongAxisData } from './along-axis-data.ts';
import { carpetAxes, carpetData, carpetFigure } from './carpet-data.ts';
import { elevatorToTrimData } from './elevator-to-trim-data.ts';
import { loadingDiagramData } from './loading-diagram-data.ts';
import { buildUpData, macRulerData, picksOf } from './pick-data.ts';
import { planViewData } from './plan-view-data.ts';
import { regionData } from './region-data.ts';
import { isSliceAxis, sliceData } from './slice-data.ts';
import { tailSizingData } from './tail-sizing-data.ts';

/** A figure and two axes asked for by the user instead of the default carpet. */
export interface CarpetChoice {
  readonly figure: string;
  readonly axes: [PlanAxis, PlanAxis];
}

export interface NamedChart {
  /** File name without its ending. */
  readonly name: string;
  readonly spec: ChartSpec;
}

/** Every chart of a run, one after the other, in the order in which a review wants them. */
export async function* chartsOf(view: RunView, carpet?: CarpetChoice): AsyncGenerator<NamedChart> {
  const picks = picksOf(view);
  yield { name: 'tail-sizing', spec: tailSizing(tailSizingData(view)) };
  yield { name: 'mac-ruler', spec: macRuler(macRulerData(view, picks)) };
  yield { name: 'neutral-point-build-up', spec: neutralPointBuildUp(buildUpData(view, picks)) };
  const trim = assessesControl(view.study) ? elevatorToTrimData(view, picks[0]) : undefined;
  if (trim !== undefined) yield { name: 'elevator-to-trim', spec: elevatorToTrim(trim) };
  yield { name: 'plan-views', spec: planView(planViewData(view, picks)) };

  const { loading } = view.study;
  if (loading !== undefined) {
    yield { name: 'loading-diagram', spec: loadingDiagram(loadingDiagramData(view, loading, picks[0])) };
  }

  const { plan } = view.laidOut;
  const varied = plan.authorOrder.map((position) => plan.axes[position]).filter((axis) => axis.size > 1);
  if (varied.length > 0)
    yield { name: 'margin-along-axes', spec: marginAlongAxis(await alongAxisData(view)) };
  for (const [x, y] of pairs(varied.filter(isSliceAxis))) {
    yield { name: `slice-${fileWord(x)}-${fileWord(y)}`, spec: sliceChart(sliceData(view, x, y)) };
  }
  for (const [x, y] of pairs(varied)) {
    yield { name: `region-${fileWord(x)}-${fileWord(y)}`, spec: regionMap(await regionData(view, x, y)) };
  }
  const figure = carpet?.figure ?? carpetFigure;
  const axes = carpet?.axes ?? carpetAxes(view, figure);
  if (axes !== undefined) yield { name: 'carpet', spec: carpetPlot(carpetData(view, figure, axes)) };
}

function* pairs<Item>(items: readonly Item[]): Generator<[Item, Item]> {
  for (let i = 0; i < items.length; i++) {
    for (let j = i + 1; j < items.length; j++) yield [items[i], items[j]];
  }
}

/** `wing.panels[3].taper` → `wing-panels-3-taper`. */
function fileWord(axis: PlanAxis): string {
  return axis.name.replaceAll(/[^A-Za-z0-9]+/g, '-').replaceAll(/^-|-$/g, '');
}
