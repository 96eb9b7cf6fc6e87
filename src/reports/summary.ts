import { showValue } from '../figures/display.ts';
import type { CaseRow, RunCounts } from '../results/run-queries.ts';
import { defaultPreferences, preferenceText } from '../selection/shortlist.ts';
import { figureNameOf } from '../study/inputs.ts';
import type { Preference } from '../study/study.ts';
import { axisLabel, figureWords } from './axis-text.ts';
import { cautionsOf, notAssessed, powerWords } from './cautions.ts';
import { conditionLines } from './condition-text.ts';
import { firstFlightCg } from './customary-ranges.ts';
import { countText } from './number-text.ts';
import { presetTexts } from './preset-text.ts';
import type { RunView } from './run-view.ts';
import { bandText, rowValue, valueShower } from './run-view.ts';

/** What the summary is made from, gathered beforehand. */
export interface SummaryFacts {
  readonly view: RunView;
  readonly counts: RunCounts;
  readonly closestMisses: readonly CaseRow[];
  /** Best feasible row by each preference; absent when none is feasible. */
  readonly best: readonly { readonly preference: Preference; readonly row: CaseRow }[];
  /** Rows per formula used outside its fitted range, and per reason why a row is empty. */
  readonly outsideRange: readonly { readonly label: string; readonly rows: number }[];
  readonly notComputed: readonly { readonly label: string; readonly rows: number }[];
  /** Rows per condition that governs an end of the loading range, and per kind of forward limit. */
  readonly governs: readonly {
    readonly words: string;
    readonly counts: readonly { readonly label: string; readonly rows: number }[];
  }[];
  /** Notes on customary ranges and on the study's layout. */
  readonly notes: readonly string[];
}

const percent = 100;

/** The summary of a run as Markdown. */
export function summaryMarkdown(facts: SummaryFacts): string {
  return [
    heading(facts),
    answer(facts),
    limits(facts),
    governing(facts),
    misses(facts),
    bestByPreference(facts),
    shortlistTable(facts),
    setup(facts),
    notesSection(facts),
    cautionsSection(facts),
  ]
    .filter((section) => section !== '')
    .join('\n\n')
    .concat('\n');
}

/** Text from a study inside Markdown: no markup of its own takes effect. */
function plain(text: string): string {
  return text
    .replaceAll(/[\\`*_{}[\]<>|#]/g, (sign) => (sign === '<' ? '&lt;' : sign === '>' ? '&gt;' : `\\${sign}`))
    .replaceAll(/\s+/g, ' ')
    .trim();
}

function heading({ view }: SummaryFacts): string {
  const { study, date, program } = view;
  const body =
    study.body === undefined
      ? ' **No body**: the study says `body: none`, so the body’s destabilising moment is left out.'
      : '';
  return [
    `# ${plain(study.title)}`,
    ...(study.question === undefined ? [] : [`_${plain(study.question)}_`]),
    `${date}, ${program}. ${powerWords(study)}${body}`,
  ].join('\n\n');
}

function answer({ view, counts }: SummaryFacts): string {
  const { rows, feasible } = counts;
  const share = rows === 0 ? 0 : (percent * feasible) / rows;
  const worst = [...counts.requirements].sort((p, q) => q.fails - p.fails)[0];
  const limit =
    worst === undefined || worst.fails === 0
      ? 'No requirement rejects any of them.'
      : `What rejects most is \`${worst.name}\`: ${countText(worst.fails)} fail it, ${countText(worst.failsAlone)} fail it alone.`;
  return [
    '## Answer',
    `**${countText(feasible)} of ${countText(rows)} combinations (${share.toFixed(1)} %) meet every requirement** (static-margin band: ${bandText(view.band)}). ` +
      `The share is of the combinations studied and depends on the ranges chosen. ${limit}`,
    ...(feasible > 0
      ? []
      : [
          `The band is not met by any combination. Without an analysis that meets it, a CG no further aft than ${percent * firstFlightCg} % MAC for a first flight is common practice (no source).`,
        ]),
  ].join('\n\n');
}

function limits({ view, counts }: SummaryFacts): string {
  const presets = presetTexts(view.study).map(({ name, text }) => `- ${plain(name)}: ${text}`);
  return [
    '## What limits the others',
    '| requirement | fails | fails alone | not computed |',
    '|---|---:|---:|---:|',
    ...counts.requirements.map(
      ({ name, fails, failsAlone, notComputed }) =>
        `| \`${name}\` | ${countText(fails)} | ${countText(failsAlone)} | ${countText(notComputed)} |`,
    ),
    ...(presets.length === 0 ? [] : ['', ...presets]),
  ].join('\n');
}

/** How often each condition governs, and what sets the forward limit of control. */
function governing({ view, governs }: SummaryFacts): string {
  const lines = governs
    .filter(({ counts }) => counts.length > 0)
    .map(({ words, counts }) => {
      const told = [...counts].sort((p, q) => q.rows - p.rows);
      return `- ${words}: ${told.map(({ label, rows }) => `${plain(label)} in ${countText(rows)}`).join(', ')}`;
    });
  if (lines.length === 0) return '';
  const more = view.study.conditions.length === 1 ? [] : ['Of the combinations studied:', ''];
  return ['## What governs', ...more, ...lines].join('\n');
}

function misses({ view, closestMisses }: SummaryFacts): string {
  if (closestMisses.length === 0) return '';
  const fails = (row: CaseRow) => {
    const { figure } = view.laidOut.columns.find((column) => column.figure.name === 'fails_first') ?? {};
    return figure?.labels?.[rowValue(view, row.values, 'fails_first')] ?? '–';
  };
  return [
    '## The closest misses',
    'Shortfall over the requirement’s own scale (1 % MAC for margins).',
    '',
    `| no. | shortfall | fails first | ${variedTitles(view).join(' | ')} |`,
    `|---:|---:|---|${'---:|'.repeat(variedTitles(view).length)}`,
    ...closestMisses.map(
      (row) =>
        `| ${row.combination} | ${shortfallText(rowValue(view, row.values, 'largest_shortfall'))} | \`${fails(row)}\` | ${variedValues(view, row).join(' | ')} |`,
    ),
  ].join('\n');
}

/** Two digits, however small: a miss by a hair is not a miss by nothing. */
function shortfallText(shortfall: number): string {
  return shortfall < 0.01 ? shortfall.toExponential(1) : shortfall.toPrecision(2);
}

function bestByPreference({ view, best }: SummaryFacts): string {
  if (best.length === 0) return '';
  const show = valueShower(view.study, view.laidOut);
  const lines = best.map(({ preference, row }) => {
    const value = shown(view, preference.figure, row);
    return `- ${preferenceText(preference, show)}: ${value}, combination ${row.combination}${edgeNote(view, row)}`;
  });
  const assumed =
    view.study.preferences.length === 0
      ? `The study prefers nothing; ${preferenceText(defaultPreferences[0], show)} is taken, as the least tail costs least drag and mass.\n\n`
      : '';
  return `## Best by each preference\n\n${assumed}${lines.join('\n')}`;
}

/** Says which axes end where the best combination lies: they may end too soon. */
function edgeNote(view: RunView, row: CaseRow): string {
  const { plan } = view.laidOut;
  const ends = plan.authorOrder.flatMap((position) => {
    const axis = plan.axes[position];
    if (axis.size < 3 || axis.figures.length > 1) return [];
    const value = rowValue(view, row.values, axis.figures[0]);
    const [least, greatest] = [Math.min(...axis.values[0]), Math.max(...axis.values[0])];
    const near = (edge: number) => Math.abs(value - edge) <= 1e-9 * Math.max(1, Math.abs(edge));
    return near(least) || near(greatest) ? [axis.name] : [];
  });
  return ends.length === 0
    ? ''
    : ` (at the end of ${ends.map((name) => `\`${name}\``).join(', ')}, which may end too soon)`;
}

const shortlistFigures = [
  'wing_aspect_ratio',
  'mac',
  'tail_area',
  'tail_volume',
  'neutral_point',
  'static_margin_forward',
  'static_margin_aft',
  'control_limit_forward',
] as const;

function shortlistTable({ view }: SummaryFacts): string {
  if (view.shortlist.length === 0) return '';
  const varied = variedFigures(view);
  const figures = shortlistFigures.filter((name) => hasColumn(view, name) && !varied.includes(name));
  const flagged = hasColumn(view, 'outside_fitted_range');
  return [
    '## Shortlist',
    'Best by each preference in turn; combinations alike in every preferred figure are passed over. All figures: shortlist.csv; drawings: charts/.',
    '',
    `| no. | why | ${variedTitles(view).join(' | ')} | ${figures.map(figureWords).join(' | ')} |${flagged ? ' outside its fitted range |' : ''}`,
    `|---:|---|${'---:|'.repeat(variedTitles(view).length + figures.length)}${flagged ? '---|' : ''}`,
    ...view.shortlist.map(
      ({ row, because }) =>
        `| ${row.combination} | ${plain(because)} | ${variedValues(view, row).join(' | ')} | ${figures.map((name) => shown(view, name, row)).join(' | ')} |${flagged ? ` ${flagsOf(view, row)} |` : ''}`,
    ),
  ].join('\n');
}

function flagsOf(view: RunView, row: CaseRow): string {
  const labels = view.laidOut.figures.get('outside_fitted_range')?.labels ?? [];
  const set = rowValue(view, row.values, 'outside_fitted_range');
  return labels.filter((_, bit) => Math.floor(set / 2 ** bit) % 2 === 1).join('; ') || 'none';
}

function hasColumn(view: RunView, name: string): boolean {
  return view.laidOut.columns.some((column) => column.figure.name === name);
}

function setup({ view }: SummaryFacts): string {
  const { study, laidOut } = view;
  const { plan } = laidOut;
  const axes = plan.authorOrder.map((position) => {
    const axis = plan.axes[position];
    const values = Array.from({ length: axis.size }, (_, i) => axisLabel(laidOut, axis, i, study.show));
    const listed =
      values.length <= 6
        ? values.join(', ')
        : `${values[0]} to ${values[values.length - 1]}, ${values.length} values`;
    return `- \`${axis.name}\`: ${listed}`;
  });
  const held = study.held.map(
    ({ varied, held: kept, follows }) =>
      `- while \`${varied}\` varies, held: ${kept.join(', ') || 'nothing else'}; follows: ${follows.join(', ') || 'nothing'}`,
  );
  const skips = study.skip.map(({ because }) => `- skipped: ${plain(because)}`);
  const assumed = study.assumptions.map(({ path, value, source }) => {
    const figure = laidOut.figures.get(figureNameOf(path));
    const text =
      typeof value === 'string'
        ? plain(value)
        : figure === undefined
          ? String(value)
          : showValue(value, figure.dimension, study.show);
    return `- \`${path}\` ${text}: ${plain(source)}`;
  });
  const methods = Object.entries(study.methods).map(
    ([topic, method]) => `${topic.replaceAll('_', ' ')} by ${method.replaceAll('_', ' ')}`,
  );
  return [
    '## What was studied',
    ...conditionLines(study).map((line) => `- ${line}`),
    ...axes,
    ...held,
    ...skips,
    '',
    `Methods: ${methods.join('; ')}.`,
    ...(assumed.length === 0 ? [] : ['', 'Assumed, because the study does not say:', '', ...assumed]),
  ].join('\n');
}

function notesSection({ notes, outsideRange, notComputed }: SummaryFacts): string {
  const lines = [
    ...notes,
    ...outsideRange.map(
      ({ label, rows }) =>
        `${label}: used outside its fitted range in ${countText(rows)} combinations; flagged in their rows, not rejected.`,
    ),
    ...notComputed.map(
      ({ label, rows }) => `${countText(rows)} combinations could not be worked out: ${label}.`,
    ),
  ];
  return lines.length === 0 ? '' : ['## Notes', ...lines.map((line) => `- ${line}`)].join('\n');
}

function cautionsSection({ view }: SummaryFacts): string {
  const accuracy =
    'How sure: closed formulas place the neutral point with a scatter near 3 % MAC (one standard deviation), so a band that is only just kept may not be kept in flight.';
  const downwash =
    view.study.methods.downwash === 'handbook'
      ? ' The handbook’s downwash is 10–20 % low on ordinary layouts, which puts the neutral point 2–3 % MAC too far aft.'
      : '';
  return [
    '## Cautions',
    ...cautionsOf(view.study).map((line) => `- ${line}`),
    `- ${accuracy}${downwash}`,
    `- ${notAssessed(view.study)}`,
  ].join('\n');
}

/** Varied numbers in the author's order. */
function variedFigures({ laidOut }: RunView): string[] {
  const { plan } = laidOut;
  return plan.authorOrder.flatMap((position) => plan.axes[position].figures);
}

function variedTitles(view: RunView): string[] {
  return variedFigures(view).map(figureWords);
}

function variedValues(view: RunView, row: CaseRow): string[] {
  return variedFigures(view).map((name) => shown(view, name, row));
}

function shown(view: RunView, name: string, row: CaseRow): string {
  const figure = view.laidOut.figures.get(name);
  if (figure === undefined) return '–';
  return showValue(rowValue(view, row.values, name), figure.dimension, view.study.show);
}
