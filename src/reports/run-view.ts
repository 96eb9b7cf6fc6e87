import type { ChartHeading } from '../charts/index.ts';
import type { LaidOut } from '../engine/lay-out.ts';
import { showValue } from '../figures/display.ts';
import type { RunQueries } from '../results/run-queries.ts';
import type { Shortlisted } from '../selection/shortlist.ts';
import type { Band, Study } from '../study/study.ts';

/** A finished run as reports and charts see it. */
export interface RunView {
  readonly study: Study;
  readonly laidOut: LaidOut;
  readonly queries: RunQueries;
  readonly shortlist: readonly Shortlisted[];
  /** The band judged by: the study's own, or another asked for afterwards. */
  readonly band: Band;
  /** Set when `band` is not the study's own. */
  readonly otherBand?: Band;
  /** Rows of the table. */
  readonly rows: number;
  /** Day of the run, `2026-12-01`. */
  readonly date: string;
  /** Program and version. */
  readonly program: string;
}

export function chartHeading(view: RunView, title: string): ChartHeading {
  const { study, date, program } = view;
  const band = view.otherBand === undefined ? '' : ` (band ${bandText(view.band)})`;
  const heading = { title: title + band, study: study.title, date, program };
  return study.question === undefined ? heading : { ...heading, question: study.question };
}

/** `5–20 % MAC`, `at least 5 % MAC`. */
export function bandText({ lower, upper }: Band): string {
  const percent = (value: number) => String(Number((100 * value).toFixed(4)));
  if (lower !== undefined && upper !== undefined) return `${percent(lower)}–${percent(upper)} % MAC`;
  if (lower !== undefined) return `at least ${percent(lower)} % MAC`;
  if (upper !== undefined) return `at most ${percent(upper)} % MAC`;
  return 'none';
}

/** Value of a figure in a row of the table, SI; NaN when the table lacks it. */
export function rowValue(view: RunView, values: ArrayLike<number>, figure: string): number {
  const place = view.laidOut.columns.findIndex((column) => column.figure.name === figure);
  return place < 0 ? Number.NaN : values[place];
}

/** Text of a figure's value as the study shows it: `9.400 m`. */
export function valueShower(study: Study, { figures }: LaidOut): (figure: string, value: number) => string {
  return (name, value) => {
    const figure = figures.get(name);
    return figure === undefined ? String(value) : showValue(value, figure.dimension, study.show);
  };
}
