import type { LaidOut } from '../engine/lay-out.ts';
import { showValue } from '../figures/display.ts';
import { figureOfInput } from '../figures/study-figures.ts';
import { baselineInputs } from '../stages/build-stages.ts';
import type { RequirementEdge } from '../stages/requirements.ts';
import { runOnce } from '../stages/run-once.ts';
import { figureNameOf } from '../study/inputs.ts';
import type { Study } from '../study/study.ts';
import { axisLabel } from './axis-text.ts';
import { byteText, countText, durationText } from './number-text.ts';
import { presetTexts } from './preset-text.ts';
import { bandText } from './run-view.ts';

export interface CheckFacts {
  readonly study: Study;
  readonly laidOut: LaidOut;
  readonly workers: number;
  readonly bytesNeeded: number;
  readonly bytesFree: number;
  readonly seconds: number;
}

const listedValues = 8;
/** Figures of the baseline that tell at a glance whether the study is what its author means. */
const baselineFigures = [
  'wing_area',
  'wing_span',
  'wing_aspect_ratio',
  'mac',
  'tail_area',
  'tail_volume',
  'tail_arm',
  'downwash_gradient',
  'neutral_point',
  'cg_forward',
  'cg_aft',
  'static_margin_forward',
  'static_margin_aft',
] as const;

/** What a study is, how it would be evaluated and what that takes, as plain text. */
export function checkReport({
  study,
  laidOut,
  workers,
  bytesNeeded,
  bytesFree,
  seconds,
}: CheckFacts): string {
  const { plan } = laidOut;
  const section = (title: string, lines: readonly string[]) =>
    lines.length === 0 ? [] : ['', title, ...lines.map((line) => `  ${line}`)];
  return [
    `${study.title}: no fault found.`,
    ...section('Combinations', [
      `${countText(plan.combinations)} from ${plan.axes.length} ax${plan.axes.length === 1 ? 'is' : 'es'}, slowest first: ${plan.axes.map(({ name, size }) => `${name} (${size})`).join(', ') || 'none'}`,
      ...study.skip.map(({ because }) => `fewer by a skip rule: ${because}`),
    ]),
    ...section('Varied', axisLines(study, laidOut)),
    ...section(
      'Held while that varies',
      study.held.map(
        ({ varied, held, follows }) =>
          `${varied}: held ${held.join(', ') || 'nothing'}; follows ${follows.join(', ') || 'nothing'}`,
      ),
    ),
    ...section('Sized in every combination', sizingLines(study, laidOut)),
    ...section('Assumed, because the study does not say', assumptionLines(study, laidOut)),
    ...section('Required', [
      `static-margin band: ${bandText(study.band)}`,
      ...laidOut.edges.map((edge) => requirementText(edge, study, laidOut)),
      ...presetTexts(study).map(({ name, text }) => `${name}: ${text}`),
    ]),
    ...section('The baseline', baselineLines(study, laidOut)),
    ...section('Stages, and how often each is evaluated', stageLines(laidOut)),
    ...section('A run takes', [
      `about ${durationText(seconds)} on ${workers} worker${workers === 1 ? '' : 's'} of this machine`,
      `${byteText(bytesNeeded)} of disk (${byteText(bytesFree)} free), the table and its parts at their largest`,
      `${laidOut.columns.length} columns in the table`,
    ]),
    '',
  ].join('\n');
}

/** `hangar_door.at_most: wing_span ≤ 10.600 m`. */
function requirementText(
  { label, figure: name, sign, limit }: RequirementEdge,
  study: Study,
  { figures }: LaidOut,
): string {
  const figure = figures.get(name);
  if (figure?.kind === 'choice') return `${label}: ${name} is '${figure.labels?.[limit] ?? limit}'`;
  const text = figure?.kind === 'number' ? showValue(limit, figure.dimension, study.show) : String(limit);
  return `${label}: ${name} ${sign === 1 ? '≥' : '≤'} ${text}`;
}

/** `tail_area: S_t so that K_aft = 8.00 % MAC, between 0.600 m² and 2.500 m²`. */
function sizingLines(study: Study, { figures }: LaidOut): string[] {
  const { size } = study;
  const figure = size && figures.get(figureOfInput(study)(size.path));
  if (size === undefined || figure === undefined) return [];
  const [from, to] = [size.from, size.to].map((end) => showValue(end, figure.dimension, study.show));
  return [`${figure.name}: ${figure.formula}, between ${from} and ${to}`];
}

function axisLines(study: Study, laidOut: LaidOut): string[] {
  const { plan } = laidOut;
  return plan.authorOrder.map((position) => {
    const axis = plan.axes[position];
    const values = Array.from({ length: axis.size }, (_, i) => axisLabel(laidOut, axis, i, study.show));
    const shown =
      values.length <= listedValues
        ? values.join(', ')
        : `${values[0]}, ${values[1]} … ${values[values.length - 1]}`;
    return `${axis.name}: ${values.length} value${values.length === 1 ? '' : 's'}: ${shown}`;
  });
}

function assumptionLines(study: Study, { figures }: LaidOut): string[] {
  return study.assumptions.map(({ path, value, source }) => {
    const figure = figures.get(figureNameOf(path));
    const text =
      typeof value === 'number' && figure !== undefined
        ? showValue(value, figure.dimension, study.show)
        : String(value);
    return `${path}: ${text} (${source})`;
  });
}

function baselineLines(study: Study, { plan, figures }: LaidOut): string[] {
  const values = runOnce(plan.stages, baselineInputs(study));
  const width = Math.max(...baselineFigures.map((name) => name.length));
  return baselineFigures.map((name) => {
    const figure = figures.get(name);
    const value = values.get(name) ?? Number.NaN;
    return `${name.padEnd(width)}  ${figure === undefined ? '–' : showValue(value, figure.dimension, study.show)}`;
  });
}

/** Number of distinct settings of the axes that each costly stage depends on. */
function stageLines({ plan }: LaidOut): string[] {
  return plan.stages.map((stage, index) => {
    const settings = plan.axes.reduce(
      (product, { size }, axis) => (plan.axesOfStage[index].has(axis) ? product * size : product),
      1,
    );
    return `${stage.name}: ${countText(settings)}`;
  });
}
