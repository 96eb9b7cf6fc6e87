import type { CgLimit, TailSizingData } from '../../charts/index.ts';
import { evaluateSlice } from '../../engine/slice.ts';
import { conditionFigureName } from '../../figures/condition-figures.ts';
import { type ControlLimitKind, controlLimitKinds } from '../../figures/control-limit-kinds.ts';
import { displayUnit } from '../../figures/display.ts';
import { baselineInputs } from '../../stages/build-stages.ts';
import { runOnce } from '../../stages/run-once.ts';
import { figureTitle } from '../axis-text.ts';
import type { RunView } from '../run-view.ts';
import { bandText, chartHeading } from '../run-view.ts';

const points = 81;
const percent = 100;
/** Without an axis over the tail's size the chart runs from this fraction of the baseline's to that. */
const unvaried = { from: 0.5, to: 1.6 } as const;
/** A varied range is drawn somewhat beyond its ends. */
const margin = { below: 0.8, above: 1.15 } as const;
const sizeDecimals = 3;
const leastPoint = 'neutral_point';

/** Tail size upward, CG limits across, at the baseline's other numbers. */
export function tailSizingData(view: RunView): TailSizingData {
  const { study, laidOut, band } = view;
  const path = study.tail.size === 'area' ? 'tail.area' : 'tail.volume';
  const name = study.tail.size === 'area' ? 'tail_area' : 'tail_volume';
  const figure = laidOut.figures.get(name);
  const baseline = study.inputs.get(path);
  if (figure === undefined || baseline === undefined) throw new Error(`the study has no ${path}`);
  const sizes = sizeRange(view, path, baseline);
  const greatestPoint = study.conditions.length === 1 ? leastPoint : 'neutral_point_aftmost';
  const kinds = controlLimitsOf(view);
  const slice = evaluateSlice(
    study,
    laidOut.plan.stages,
    [{ name: path, paths: [path], values: [sizes] }],
    [...new Set([leastPoint, greatestPoint, ...kinds.flatMap(({ figures }) => figures)])],
  );
  const column = (figure: string) => slice.get(figure) ?? sizes;
  const { factor } = displayUnit(figure.dimension, study.show);
  const atBaseline = runOnce(laidOut.plan.stages, baselineInputs(study));
  const chosen = atBaseline.get(name) ?? baseline;
  const sizeAtBaseline = Number.isNaN(chosen) ? baseline : chosen;
  return {
    heading: chartHeading(view, 'Tail sizing at the baseline'),
    sizeTitle: figureTitle(figure, study.show),
    sizes: [...sizes].map((size) => size * factor),
    sizeDecimals,
    limits: [
      ...limitsOf(band, column(leastPoint), column(greatestPoint)),
      ...kinds.map(({ label, figures }) => controlLimit(label, figures.map(column))),
    ],
    loading: {
      forward: percent * (atBaseline.get('cg_forward') ?? Number.NaN),
      aft: percent * (atBaseline.get('cg_aft') ?? Number.NaN),
    },
    baseline: sizeAtBaseline * factor,
  };
}

/** Forward limits of one kind, in all conditions that have it. */
interface ControlLimits {
  readonly label: string;
  readonly figures: readonly string[];
}

/** The kinds of forward limit that the study works out. */
function controlLimitsOf({ study, laidOut }: RunView): ControlLimits[] {
  const workedOut = new Set(laidOut.plan.stages.flatMap(({ writes }) => writes));
  const named = ({ figure }: ControlLimitKind) =>
    study.conditions.length === 1
      ? [figure]
      : study.conditions.map((condition) => conditionFigureName(figure, condition));
  return controlLimitKinds
    .map((kind) => ({ label: kind.label, figures: named(kind).filter((name) => workedOut.has(name)) }))
    .filter(({ figures }) => figures.length > 0);
}

/** The aftmost of forward limits, size by size. */
function controlLimit(label: string, columns: readonly Float64Array[]): CgLimit {
  const cg = columns[0].map((_, i) => percent * Math.max(...columns.map((column) => column[i])));
  return { label, cg, forbidden: 'forward' };
}

function limitsOf(band: RunView['band'], least: Float64Array, greatest: Float64Array): CgLimit[] {
  const { lower, upper } = band;
  const limits: CgLimit[] = [];
  const line = (points: Float64Array, edge: number) => points.map((point) => percent * (point - edge));
  if (lower !== undefined) {
    limits.push({
      label: `aft limit: margin ${bandText({ lower })}`,
      cg: line(least, lower),
      forbidden: 'aft',
    });
  }
  if (upper !== undefined) {
    limits.push({
      label: `too stable: margin ${bandText({ upper })}`,
      cg: line(greatest, upper),
      forbidden: 'forward',
    });
  }
  if (limits.length === 0) limits.push({ label: 'neutral point', cg: line(least, 0), forbidden: 'aft' });
  return limits;
}

function sizeRange(view: RunView, path: string, baseline: number): Float64Array {
  const axis = view.study.axes.find(({ paths }) => paths.includes(path));
  const values = axis?.values[axis.paths.indexOf(path)];
  const least = values === undefined ? unvaried.from * baseline : margin.below * Math.min(...values);
  const greatest = values === undefined ? unvaried.to * baseline : margin.above * Math.max(...values);
  return Float64Array.from({ length: points }, (_, i) => least + ((greatest - least) * i) / (points - 1));
}
