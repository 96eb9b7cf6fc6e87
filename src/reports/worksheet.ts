import type { LaidOut } from '../engine/lay-out.ts';
import { edgeTolerance } from '../figures/band.ts';
import { displayUnit } from '../figures/display.ts';
import type { Figure } from '../figures/figure.ts';
import { figureOfInput } from '../figures/study-figures.ts';
import { digitsOf } from '../plan/plan.ts';
import { baselineInputs } from '../stages/build-stages.ts';
import { runOnce } from '../stages/run-once.ts';
import { withNumberGiven } from '../stages/sizing.ts';
import type { ShowSystem, Study } from '../study/study.ts';
import { cautionsOf } from './cautions.ts';

/** Digits of a worksheet: enough to follow with a pocket calculator. */
const digits = 6;

export interface WorksheetRow {
  readonly name: string;
  readonly symbol: string;
  readonly value: string;
  readonly unit: string;
  readonly meaning: string;
  readonly formula: string;
  readonly source: string;
}

export interface Worksheet {
  readonly title: string;
  readonly subject: string;
  readonly given: readonly WorksheetRow[];
  readonly workedOut: readonly WorksheetRow[];
  readonly requirements: readonly string[];
  readonly cautions: readonly string[];
}

/** Input figures of one combination of the plan: the fixed numbers and those of its axes. */
export function inputsOfCombination({ plan }: LaidOut, combination: number): Map<string, number> {
  const inputs = new Map(plan.fixed);
  digitsOf(plan, combination).forEach((digit, position) => {
    const axis = plan.axes[position];
    axis.figures.forEach((figure, k) => {
      inputs.set(figure, axis.values[k][digit]);
    });
  });
  return inputs;
}

/**
 * Works one combination through, every figure in the order of computation.
 * @param inputs input figures, SI (`inputsOfCombination`, or the baseline's)
 */
export function makeWorksheet(
  study: Study,
  laidOut: LaidOut,
  inputs: ReadonlyMap<string, number>,
  subject: string,
): Worksheet {
  const values = runOnce(laidOut.plan.stages, inputs);
  const rows = (names: Iterable<string>) =>
    [...names].flatMap((name) => {
      const figure = laidOut.figures.get(name);
      return figure === undefined ? [] : [worksheetRow(figure, values.get(name) ?? Number.NaN, study.show)];
    });
  const given = new Set(inputs.keys());
  return {
    title: study.title,
    subject,
    given: rows(given),
    workedOut: rows([...values.keys()].filter((name) => !given.has(name))),
    requirements: requirementLines(laidOut, values, study.show),
    cautions: cautionsOf(study),
  };
}

/** The worksheet of the study's baseline, with some of its numbers replaced. */
export function baselineWorksheet(
  study: Study,
  laidOut: LaidOut,
  replaced: ReadonlyMap<string, number>,
): Worksheet {
  const inputs = new Map([...baselineInputs(study), ...replaced]);
  const subject =
    replaced.size === 0 ? 'the baseline' : `the baseline with ${[...replaced.keys()].join(', ')} replaced`;
  return makeWorksheet(study, withReplacedGiven(study, laidOut, replaced), inputs, subject);
}

/** A number that sizing chooses is given where it is among those replaced. */
function withReplacedGiven(study: Study, laidOut: LaidOut, replaced: ReadonlyMap<string, number>): LaidOut {
  const { size } = study;
  if (size === undefined || !replaced.has(figureOfInput(study)(size.path))) return laidOut;
  const { plan } = laidOut;
  return { ...laidOut, plan: { ...plan, stages: withNumberGiven(plan.stages) } };
}

function worksheetRow(figure: Figure, value: number, show: ShowSystem): WorksheetRow {
  const { name, symbol, meaning, formula, source } = figure;
  const { text, unit } = valueText(figure, value, show);
  return { name, symbol, value: text, unit, meaning, formula, source };
}

function valueText(figure: Figure, value: number, show: ShowSystem): { text: string; unit: string } {
  const { labels = [], kind, dimension } = figure;
  if (Number.isNaN(value)) return { text: 'empty', unit: '' };
  if (kind === 'yes_no') return { text: value === 1 ? 'yes' : 'no', unit: '' };
  if (kind === 'choice') return { text: labels[value] ?? String(value), unit: '' };
  if (kind === 'flags') {
    const set = labels.filter((_, bit) => Math.floor(value / 2 ** bit) % 2 === 1);
    return { text: set.length === 0 ? 'none' : set.join('; '), unit: '' };
  }
  const { unit, factor } = displayUnit(dimension, show);
  const shown = value * factor;
  const rounded = Math.abs(shown) < 1e-12 ? 0 : Number(shown.toPrecision(digits));
  return { text: dimension === 'count' ? String(shown) : String(rounded), unit };
}

function requirementLines(
  { edges, figures }: LaidOut,
  values: ReadonlyMap<string, number>,
  show: ShowSystem,
): string[] {
  return edges.map(({ label, figure: name, sign, limit }) => {
    const figure = figures.get(name);
    const value = values.get(name) ?? Number.NaN;
    if (figure === undefined || Number.isNaN(value)) return `${label}: not computed`;
    const shortfall = sign * (limit - value);
    const verdict = shortfall > edgeTolerance ? 'NOT met' : 'met';
    if (figure.kind !== 'number') return `${label}: ${valueText(figure, value, show).text}, ${verdict}`;
    const found = valueText(figure, value, show);
    const wanted = valueText(figure, limit, show);
    return `${label}: ${name} ${found.text} ${found.unit}, ${sign === 1 ? 'at least' : 'at most'} ${wanted.text} ${wanted.unit}: ${verdict}`;
  });
}

/** The worksheet as plain text: two lines a figure. */
export function worksheetText(sheet: Worksheet): string {
  const rows = [...sheet.given, ...sheet.workedOut];
  const symbolWidth = Math.max(...rows.map((row) => row.symbol.length));
  const valueWidth = Math.max(...rows.map((row) => row.value.length).filter((length) => length <= 12));
  const line = (row: WorksheetRow) => {
    const head = `${row.symbol.padEnd(symbolWidth)} = ${row.value.padStart(valueWidth)} ${row.unit}`;
    return `${head.padEnd(symbolWidth + valueWidth + 12)} ${row.name}: ${row.meaning}`;
  };
  const formula = (row: WorksheetRow) => `${' '.repeat(symbolWidth + 3)}${row.formula}   [${row.source}]`;
  return [
    `${sheet.title}: worksheet of ${sheet.subject}`,
    '',
    'Given',
    ...sheet.given.map(line),
    '',
    'Worked out, in this order',
    ...sheet.workedOut.flatMap((row) => [line(row), formula(row)]),
    '',
    'Requirements',
    ...sheet.requirements,
    '',
    ...sheet.cautions,
    '',
  ].join('\n');
}

/** The worksheet as Markdown tables. */
export function worksheetMarkdown(sheet: Worksheet): string {
  const cell = (text: string) => text.replaceAll('|', '\\|').replaceAll('<', '&lt;');
  const table = (rows: readonly WorksheetRow[]) => [
    '| symbol | value | unit | figure | formula | source |',
    '|---|---:|---|---|---|---|',
    ...rows.map(
      (row) =>
        `| ${cell(row.symbol)} | ${cell(row.value)} | ${row.unit} | \`${row.name}\`: ${cell(row.meaning)} | ${cell(row.formula)} | ${cell(row.source)} |`,
    ),
  ];
  return [
    `# ${cell(sheet.title)}: worksheet of ${cell(sheet.subject)}`,
    '',
    '## Given',
    '',
    ...table(sheet.given),
    '',
    '## Worked out, in this order',
    '',
    ...table(sheet.workedOut),
    '',
    '## Requirements',
    '',
    ...sheet.requirements.map((line) => `- ${cell(line)}`),
    '',
    '## Cautions',
    '',
    ...sheet.cautions.map((line) => `- ${line}`),
    '',
  ].join('\n');
}
