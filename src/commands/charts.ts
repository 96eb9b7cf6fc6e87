import type { LaidOut } from '../engine/lay-out.ts';
import { layOut } from '../engine/lay-out.ts';
import { UsageError } from '../errors.ts';
import { readStudyText } from '../read-study-file.ts';
import type { CarpetChoice } from '../reports/charts/draw-charts.ts';
import { countText } from '../reports/number-text.ts';
import { bandText } from '../reports/run-view.ts';
import { redrawCharts } from '../reports/write-reports.ts';
import { readRun, runPaths } from '../results/run-folder.ts';
import { nearestKnown } from '../study/nearest-known.ts';
import type { Band } from '../study/study.ts';
import { usageFailure } from './failure.ts';

export interface ChartsArguments {
  readonly run: string;
  readonly band: string | undefined;
  readonly carpet: string | undefined;
}

/** Draws the charts of a finished run again, judged by another band where one is given. */
export async function charts({ run: folder, band: bandArgument, carpet }: ChartsArguments): Promise<void> {
  const record = readRun(folder);
  if (record.cases === undefined) {
    throw new UsageError(
      'RUN_NOT_FINISHED',
      `The run in ${folder} is not finished.`,
      'Run its study again; it goes on from where it stopped.',
    );
  }
  const study = readStudyText(record.studyText, record.studyFile);
  const laidOut = layOut(study);
  const otherBand = bandArgument === undefined ? undefined : readBand(bandArgument);
  const { counts, drawn } = await redrawCharts({
    folder,
    study,
    laidOut,
    record,
    charts: true,
    ...(otherBand === undefined ? {} : { otherBand }),
    ...(carpet === undefined ? {} : { carpet: readCarpet(carpet, laidOut) }),
  });
  process.stdout.write(
    `${countText(counts.feasible)} of ${countText(counts.rows)} combinations are feasible with the band ${bandText(otherBand ?? study.band)}; ` +
      `${drawn} charts in ${runPaths(folder).charts}\n`,
  );
}

/** Reads `8%:18%`, `8 %:`, `:0.18` as fractions of the MAC. */
export function readBand(text: string): Band {
  const wrong = () =>
    usageFailure(`--band is written lower:upper, such as 8%:18%, 8%: or :18%; '${text}' is not.`);
  const edges = text.split(':');
  if (edges.length !== 2) throw wrong();
  const [lower, upper] = edges.map((edge) => {
    const [, digits, percent] = /^\s*(?:(-?\d+(?:\.\d+)?)\s*(%?))?\s*$/.exec(edge) ?? [edge];
    if (digits === undefined) {
      if (edge.trim() !== '') throw wrong();
      return undefined;
    }
    return percent === '%' ? Number(digits) / 100 : Number(digits);
  });
  if (lower === undefined && upper === undefined) throw wrong();
  if ([lower, upper].some((edge) => edge !== undefined && Math.abs(edge) > 1)) {
    throw usageFailure(
      `--band ${text}: an edge is a per cent of the MAC (8%) or a fraction of it (0.08), from -100 to 100 %.`,
    );
  }
  if (lower !== undefined && upper !== undefined && lower > upper) {
    throw usageFailure(`--band ${text}: the lower edge is above the upper one.`);
  }
  return { ...(lower === undefined ? {} : { lower }), ...(upper === undefined ? {} : { upper }) };
}

/** Reads `tail_area tail.arm tail.volume`: a figure and two varied numbers. */
function readCarpet(text: string, { plan, figures }: LaidOut): CarpetChoice {
  const words = text.trim().split(/[\s,]+/);
  if (words.length !== 3)
    throw usageFailure('--carpet takes a figure and two varied numbers: "tail_area tail.arm tail.volume".');
  const [figure, ...names] = words;
  const known = [...figures.values()].filter(
    ({ kind, name }) => kind === 'number' && plan.axesOfFigure.has(name),
  );
  if (!known.some(({ name }) => name === figure)) {
    const nearest = nearestKnown(
      figure,
      known.map(({ name }) => name),
    );
    throw usageFailure(
      `--carpet: there is no figure ${figure}${nearest === undefined ? '' : `; did you mean ${nearest}`}.`,
    );
  }
  const [a, b] = names.map((name) => {
    const axis = plan.axes.find((candidate) => candidate.name === name);
    if (axis !== undefined && axis.size >= 2) return axis;
    throw usageFailure(
      `--carpet: ${name} is not varied; ${plan.axes.map((candidate) => candidate.name).join(', ')} are.`,
    );
  });
  if (a === b) throw usageFailure('--carpet takes two different varied numbers.');
  return { figure, axes: [a, b] };
}
