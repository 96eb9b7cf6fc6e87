import { readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import type { LaidOut } from '../engine/lay-out.ts';
import { displayUnit, tableColumn } from '../figures/display.ts';
import type { TableColumn } from '../figures/figure.ts';
import { writeFileAtomically } from '../results/atomic-file.ts';
import { writeDataPackage } from '../results/data-package.ts';
import { makeFolder } from '../results/part-files.ts';
import type { RunRecord } from '../results/run-folder.ts';
import { runPaths } from '../results/run-folder.ts';
import type { RunCounts } from '../results/run-queries.ts';
import { RunQueries } from '../results/run-queries.ts';
import { smallCells, writeSmallTable } from '../results/small-table.ts';
import { chooseShortlist, defaultPreferences } from '../selection/shortlist.ts';
import type { Band, Study } from '../study/study.ts';
import type { CarpetChoice } from './charts/draw-charts.ts';
import type { Span } from './customary-ranges.ts';
import { customaryNotes } from './customary-ranges.ts';
import type { RunView } from './run-view.ts';
import { valueShower } from './run-view.ts';
import type { SummaryFacts } from './summary.ts';
import { summaryMarkdown } from './summary.ts';

export interface ReportRequest {
  readonly folder: string;
  readonly study: Study;
  readonly laidOut: LaidOut;
  readonly record: RunRecord;
  readonly charts: boolean;
  /** Another band to judge by; then only charts are drawn. */
  readonly otherBand?: Band;
  readonly carpet?: CarpetChoice;
}

const closestMissesShown = 5;
/** Pictures are set and compressed on threads of their own; more at once only take memory. */
const chartsAtOnce = 4;

/** Shortlist, charts, summary and data package of a run whose table is there. */
export async function writeReports(request: ReportRequest): Promise<RunCounts> {
  const { folder, study, laidOut, record } = request;
  const queries = await RunQueries.open(folder, laidOut.columns);
  try {
    const view = await viewRun(request, queries);
    const counts = await queries.counts();
    if (request.charts) await drawCharts(view, runPaths(folder).charts);
    await writeShortlist(view, folder);
    writeFileAtomically(runPaths(folder).summary, summaryMarkdown(await gatherFacts(view, counts)));
    writeDataPackage(folder, {
      title: study.title,
      version: record.version,
      created: record.started,
      columns: laidOut.columns,
      cases: record.cases ?? { csv: [], parquet: [] },
      shortlist: [becauseColumn(view), ...laidOut.columns],
    });
    return counts;
  } finally {
    queries.close();
  }
}

/** Draws the charts of a finished run again, by another band where one is asked for. */
export async function redrawCharts(
  request: ReportRequest,
): Promise<{ readonly counts: RunCounts; readonly drawn: number }> {
  const queries = await RunQueries.open(request.folder, request.laidOut.columns);
  try {
    const view = await viewRun(request, queries);
    const drawn = await drawCharts(view, runPaths(request.folder).charts, request.carpet);
    return { counts: await queries.counts(request.otherBand), drawn };
  } finally {
    queries.close();
  }
}

async function viewRun(
  { study, laidOut, record, otherBand }: ReportRequest,
  queries: RunQueries,
): Promise<RunView> {
  const shortlist = await chooseShortlist(
    queries,
    laidOut.columns,
    study.preferences,
    study.keep,
    valueShower(study, laidOut),
    otherBand,
  );
  return {
    study,
    laidOut,
    queries,
    shortlist,
    band: otherBand ?? study.band,
    ...(otherBand === undefined ? {} : { otherBand }),
    rows: record.rows,
    date: record.started.slice(0, 'yyyy-mm-dd'.length),
    program: `${record.program} ${record.version}`,
  };
}

/** Draws every chart; pictures of an earlier drawing that have no successor are removed. */
async function drawCharts(view: RunView, folder: string, carpet?: CarpetChoice): Promise<number> {
  const { chartsOf } = await import('./charts/draw-charts.ts');
  const { renderChart } = await import('../charts/index.ts');
  makeFolder(folder);
  const names = new Set<string>();
  const drawing = new Set<Promise<unknown>>();
  const failures: unknown[] = [];
  for await (const { name, spec } of chartsOf(view, carpet)) {
    names.add(name);
    const drawn: Promise<unknown> = renderChart(name, spec, folder)
      .catch((error: unknown) => failures.push(error))
      .finally(() => drawing.delete(drawn));
    drawing.add(drawn);
    if (drawing.size >= chartsAtOnce) await Promise.race(drawing);
  }
  await Promise.all(drawing);
  if (failures.length > 0) throw failures[0];
  for (const file of readdirSync(folder)) {
    const name = /^(.+?)\.(vl\.json|svg|png)$/.exec(file)?.[1];
    if (name !== undefined && !names.has(name)) rmSync(join(folder, file));
  }
  return names.size;
}

/** Why each shortlisted combination is there, as the first column of shortlist.csv. */
function becauseColumn({ shortlist }: RunView): TableColumn {
  return tableColumn({
    name: 'because',
    symbol: '–',
    dimension: 'count',
    kind: 'choice',
    meaning: 'Why the combination is on the shortlist.',
    formula: 'best by each preference in turn',
    source: 'the study',
    labels: shortlist.map((entry) => entry.because),
  });
}

async function writeShortlist(view: RunView, folder: string): Promise<void> {
  const columns = [becauseColumn(view), ...view.laidOut.columns];
  await writeSmallTable(
    runPaths(folder).shortlist,
    columns.map((column) => column.name),
    view.shortlist.map(({ row }, k) => smallCells(columns, [k, ...row.values])),
  );
}

async function gatherFacts(view: RunView, counts: RunCounts): Promise<SummaryFacts> {
  const { study, queries, laidOut } = view;
  const preferences = study.preferences.length === 0 ? defaultPreferences : study.preferences;
  const best: SummaryFacts['best'][number][] = [];
  for (const preference of preferences) {
    const [row] = await queries.bestBy(preference.figure, preference, 1);
    if (row !== undefined) best.push({ preference, row });
  }
  const spans = await spansOf(view);
  const notes = customaryNotes({
    ...(study.aircraftClass === undefined ? {} : { aircraftClass: study.aircraftClass }),
    spans,
    show: valueShower(study, laidOut),
  });
  const has = (name: string) => laidOut.columns.some((column) => column.figure.name === name);
  return {
    view,
    counts,
    closestMisses: await queries.closestMisses(closestMissesShown),
    best,
    outsideRange: has('outside_fitted_range') ? await queries.labelCounts('outside_fitted_range') : [],
    notComputed: has('not_computed_because') ? await queries.labelCounts('not_computed_because') : [],
    governs: await governingCounts(view, has),
    notes: [...notes, ...travelNotes(view, spans)],
  };
}

/** Figures that name a condition or a kind of limit, and what the summary calls them. */
const governingFigures = [
  ['governing_condition_aft', 'the least neutral point'],
  ['governing_condition_forward', 'the greatest neutral point'],
  ['control_limit_condition', 'the forward limit of control, by condition'],
  ['control_limit_kind', 'the forward limit of control, by what sets it'],
] as const;

/** Rows per label of those figures, where the table has them and there is a choice. */
async function governingCounts(
  { queries, study }: RunView,
  has: (name: string) => boolean,
): Promise<SummaryFacts['governs']> {
  const governs: SummaryFacts['governs'][number][] = [];
  for (const [name, words] of governingFigures) {
    const chosen = name === 'control_limit_kind' || study.conditions.length > 1;
    if (chosen && has(name)) governs.push({ words, counts: await queries.labelCounts(name) });
  }
  return governs;
}

/** Figures whose least and greatest value the notes look at, where the table has them. */
const spannedFigures = [
  'tail_volume',
  'wing_aspect_ratio',
  'wing_formula_taper',
  'static_margin_aft',
  'neutral_point',
  'mac',
  'cg_forward',
  'cg_forward_station',
];

async function spansOf({ queries, laidOut }: RunView): Promise<Map<string, Span>> {
  const present = spannedFigures.filter((name) =>
    laidOut.columns.some((column) => column.figure.name === name),
  );
  return queries.spans(present);
}

/** Part of the MAC that a CG held in % MAC may wander in station before the summary says so. */
const wanderingCg = 0.02;

/** A CG held in % MAC rides with the wing: says how far that is in station. */
function travelNotes({ study, laidOut }: RunView, spans: ReadonlyMap<string, Span>): string[] {
  const station = spans.get('cg_forward_station');
  const mac = spans.get('mac');
  const fraction = spans.get('cg_forward');
  const varied = study.axes.some(({ paths }) => paths.includes('cg.forward'));
  if (
    study.cg.forward !== 'percent_mac' ||
    station === undefined ||
    mac === undefined ||
    fraction === undefined
  )
    return [];
  const ownTravel = varied ? (fraction.greatest - fraction.least) * mac.least : 0;
  const travel = station.greatest - station.least - ownTravel;
  if (travel <= wanderingCg * mac.least) return [];
  const { unit, factor, decimals } = displayUnit('length', study.show);
  const figure = laidOut.figures.get('cg_forward_station');
  return [
    `The CG is held in % MAC and rides with the wing: over the combinations the same forward CG wanders by ${(travel * factor).toFixed(decimals)} ${unit} in station${figure === undefined ? '' : ` (${figure.symbol})`}. A real load does not; give it as a station to see what the wing’s place does.`,
  ];
}
