import type { TableColumn } from '../figures/figure.ts';
import type { BandOverride } from '../results/query-sql.ts';
import type { CaseRow, RunQueries } from '../results/run-queries.ts';
import type { Preference } from '../study/study.ts';

/** One combination of the shortlist and why it is there. */
export interface Shortlisted {
  readonly row: CaseRow;
  readonly because: string;
}

/** What a study that prefers nothing is taken to prefer: least tail costs least drag and mass. */
export const defaultPreferences: readonly Preference[] = [{ figure: 'tail_area', want: 'less' }];

/** Rows looked at per place wanted, so that combinations alike in every preferred figure can be passed over. */
const candidatesPerPlace = 25;
/** Preferred figures that agree to this many digits count as alike. */
const alikeDigits = 9;

/**
 * Takes the best by each preference in turn until `keep` are found, passing over combinations
 * that are alike in every preferred figure.
 */
export async function chooseShortlist(
  queries: RunQueries,
  columns: readonly TableColumn[],
  preferences: readonly Preference[],
  keep: number,
  show: (figure: string, value: number) => string,
  band?: BandOverride,
): Promise<Shortlisted[]> {
  const preferred = preferences.length === 0 ? defaultPreferences : preferences;
  const places = preferred.map(({ figure }) => columns.findIndex((column) => column.figure.name === figure));
  const ranked: CaseRow[][] = [];
  for (const preference of preferred) {
    ranked.push(await queries.bestBy(preference.figure, preference, keep * candidatesPerPlace, band));
  }
  const chosen: Shortlisted[] = [];
  const met = new Set<string>();
  const next = ranked.map(() => 0);
  const rank = ranked.map(() => 0);
  for (let turn = 0, idle = 0; chosen.length < keep && idle < preferred.length; turn++) {
    const p = turn % preferred.length;
    const row = nextUnlike(ranked[p], next, p, places, met);
    idle = row === undefined ? idle + 1 : 0;
    if (row === undefined) continue;
    rank[p]++;
    chosen.push({ row, because: `${ordinal(rank[p])} by ${preferenceText(preferred[p], show)}` });
  }
  return chosen;
}

/** Walks down one ranking to the next row unlike all chosen ones. */
function nextUnlike(
  rows: readonly CaseRow[],
  next: number[],
  ranking: number,
  places: readonly number[],
  met: Set<string>,
): CaseRow | undefined {
  while (next[ranking] < rows.length) {
    const row = rows[next[ranking]++];
    const key = places.map((place) => row.values[place].toPrecision(alikeDigits)).join(' ');
    if (met.has(key)) continue;
    met.add(key);
    return row;
  }
  return undefined;
}

/** A preference in words; `show` gives the value sought as text. */
export function preferenceText(
  { figure, want, nearest }: Preference,
  show: (figure: string, value: number) => string,
): string {
  if (want === 'less') return `least ${figure}`;
  if (want === 'more') return `most ${figure}`;
  return `${figure} nearest to ${show(figure, nearest ?? Number.NaN)}`;
}

function ordinal(rank: number): string {
  return rank === 1 ? 'best' : `no. ${rank}`;
}
