import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { type DuckDBConnection, DuckDBInstance } from '@duckdb/node-api';
import { MachineError, UsageError } from '../errors.ts';
import type { TableColumn } from '../figures/figure.ts';
import { casesFileName } from './assemble.ts';
import { type BandOverride, bandLabels, CaseSql, literal } from './query-sql.ts';

/** DuckDB's own limits; it runs in the main thread's process, beside the program. */
const databaseOptions = {
  memory_limit: '150MB',
  threads: '2',
  temp_directory: '',
  autoinstall_known_extensions: 'false',
  autoload_known_extensions: 'false',
  preserve_insertion_order: 'false',
};

export interface RequirementCount {
  readonly name: string;
  /** Rows that fail it. */
  readonly fails: number;
  /** Rows that fail it, nothing else, and have every other requirement computed. */
  readonly failsAlone: number;
  /** Rows whose figure for it is empty. */
  readonly notComputed: number;
}

export interface RunCounts {
  readonly rows: number;
  readonly feasible: number;
  readonly requirements: readonly RequirementCount[];
}

/** One entry per cell that has rows, in order of a, then b; SI. */
export interface RegionCells {
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly studied: Float64Array;
  readonly feasible: Float64Array;
  /** Largest static_margin_aft of all rows of the cell, fraction of the MAC; NaN when none is computed. */
  readonly bestAftMargin: Float64Array;
}

/** One entry per value of the axis, ascending; SI; NaN where no row has the figure. */
export interface AlongAxis {
  readonly axis: Float64Array;
  readonly least: Float64Array;
  readonly greatest: Float64Array;
  readonly mean: Float64Array;
}

/** One row of the table in SI, as blocks hold it: yes/no 0 or 1, choice an index, flags a bit set, NaN empty. */
export interface CaseRow {
  readonly combination: number;
  /** One per table column. Off by an ulp at most where the column's unit is not SI. */
  readonly values: Float64Array;
}

/** An axis of a factorial, by how a combination's number gives the position on it: ⌊number/stride⌋ mod size. */
export interface AxisDigit {
  readonly stride: number;
  readonly size: number;
}

export interface EnvelopeOptions {
  readonly onlyFeasible?: boolean;
  readonly band?: BandOverride;
}

/** Least and greatest value of a figure over the rows that have it, SI. */
export interface FigureSpan {
  readonly least: number;
  readonly greatest: number;
}

/** How many rows carry a label of a choice or flags figure. */
export interface LabelCount {
  readonly label: string;
  readonly rows: number;
}

export interface Wanted {
  readonly want: 'less' | 'more' | 'nearest';
  /** SI; for `nearest`. */
  readonly nearest?: number;
}

/**
 * Questions put to a finished run. Figures are named as in the catalogue (`wing_span`); results are
 * SI. Each question takes another static-margin band, if wished: rows are then judged by their
 * margins against it, and by what they fail besides the study's own band.
 */
export class RunQueries {
  readonly #database: DuckDBInstance;
  readonly #connection: DuckDBConnection;
  readonly #columns: readonly TableColumn[];
  readonly #sql: CaseSql;

  private constructor(
    database: DuckDBInstance,
    connection: DuckDBConnection,
    columns: readonly TableColumn[],
    sql: CaseSql,
  ) {
    this.#database = database;
    this.#connection = connection;
    this.#columns = columns;
    this.#sql = sql;
  }

  /**
   * Opens the Parquet files of a run folder; RUN_NOT_FINISHED when there are none, READ_FAILED when
   * they are damaged or hold another table.
   */
  static async open(folder: string, columns: readonly TableColumn[]): Promise<RunQueries> {
    const files = parquetFiles(folder);
    if (files.length === 0) {
      throw new UsageError(
        'RUN_NOT_FINISHED',
        `${folder} has no finished table.`,
        'Run the study to its end first: the same command goes on where it stopped.',
      );
    }
    const database = await DuckDBInstance.create(':memory:', databaseOptions);
    const sql = new CaseSql(files, columns);
    const queries = new RunQueries(database, await database.connect(), columns, sql);
    try {
      await queries.#numbers(`SELECT ${sql.everyColumn()} FROM ${sql.cases} LIMIT 0`);
    } catch (error) {
      queries.close();
      throw new MachineError(
        'READ_FAILED',
        `The table in ${folder} cannot be read: ${error instanceof Error ? error.message : error}`,
        'Delete the cases files in that folder and run the same study again.',
      );
    }
    return queries;
  }

  close(): void {
    this.#connection.closeSync();
    this.#database.closeSync();
  }

  async counts(band?: BandOverride): Promise<RunCounts> {
    const sql = this.#sql;
    const names = [...sql.requirements];
    if (band !== undefined) {
      if (band.lower !== undefined && !names.includes(bandLabels.lower)) names.push(bandLabels.lower);
      if (band.upper !== undefined && !names.includes(bandLabels.upper)) names.push(bandLabels.upper);
    }
    const [fails, empty, lower, upper, feasible, rows] = await this.#numbers(
      `SELECT ${sql.failsBits(band)}, ${sql.notComputedBits(band)},
        ${sql.edgeState('lower', band)}, ${sql.edgeState('upper', band)},
        ${sql.feasible(band)}, count(*) FROM ${sql.cases} GROUP BY 1, 2, 3, 4, 5`,
    );
    const tally = names.map((name) => ({ name, fails: 0, failsAlone: 0, notComputed: 0 }));
    let [allRows, allFeasible] = [0, 0];
    for (let g = 0; g < rows.length; g++) {
      const judged = { fails: fails[g], empty: empty[g], lower: lower[g], upper: upper[g] };
      const failed = tally.filter(({ name }) => sql.fails(name, judged));
      const missing = tally.filter(({ name }) => sql.isEmpty(name, judged));
      for (const requirement of failed) requirement.fails += rows[g];
      for (const requirement of missing) requirement.notComputed += rows[g];
      if (failed.length === 1 && missing.length === 0) failed[0].failsAlone += rows[g];
      allRows += rows[g];
      if (feasible[g] !== 0) allFeasible += rows[g];
    }
    return { rows: allRows, feasible: allFeasible, requirements: tally };
  }

  /** What each cell of two figures (as a rule the first figures of two axes) holds. */
  async region(figureA: string, figureB: string, band?: BandOverride): Promise<RegionCells> {
    return this.#cells(this.#sql.si(figureA), this.#sql.si(figureB), band);
  }

  /** What each cell of two axes holds; `a` and `b` are positions on them. */
  async regionOfAxes(axisA: AxisDigit, axisB: AxisDigit, band?: BandOverride): Promise<RegionCells> {
    return this.#cells(this.#position(axisA), this.#position(axisB), band);
  }

  async #cells(first: string, second: string, band: BandOverride | undefined): Promise<RegionCells> {
    const sql = this.#sql;
    const [a, b, studied, feasible, bestAftMargin] = await this.#numbers(
      `SELECT ${first}, ${second}, count(*),
        count(*) FILTER (WHERE ${sql.feasible(band)}), max(${sql.si('static_margin_aft')})
        FROM ${sql.cases} GROUP BY 1, 2 ORDER BY 1, 2`,
    );
    return { a, b, studied, feasible, bestAftMargin };
  }

  /** Position of a row on an axis, from its number. */
  #position({ stride, size }: AxisDigit): string {
    return `((CAST(${this.#sql.si('combination')} AS BIGINT) // ${stride}) % ${size})`;
  }

  /** Envelope of a figure along another; with `onlyFeasible`, of feasible rows. */
  async alongAxis(axisFigure: string, figure: string, options: EnvelopeOptions = {}): Promise<AlongAxis> {
    return this.#envelope(this.#sql.si(axisFigure), figure, options);
  }

  /** Envelope of a figure along an axis; `axis` holds positions on it. */
  async alongAxisOf(axis: AxisDigit, figure: string, options: EnvelopeOptions = {}): Promise<AlongAxis> {
    return this.#envelope(this.#position(axis), figure, options);
  }

  async #envelope(along: string, figure: string, options: EnvelopeOptions): Promise<AlongAxis> {
    const sql = this.#sql;
    const where = options.onlyFeasible === true ? `WHERE ${sql.feasible(options.band)}` : '';
    const value = sql.si(figure);
    const [axis, least, greatest, mean] = await this.#numbers(
      `SELECT ${along}, min(${value}), max(${value}), avg(${value})
        FROM ${sql.cases} ${where} GROUP BY 1 ORDER BY 1`,
    );
    return { axis, least, greatest, mean };
  }

  /** Spans of several figures in one pass; a figure that is empty in every row is left out. */
  async spans(figures: readonly string[]): Promise<Map<string, FigureSpan>> {
    if (figures.length === 0) return new Map();
    const ends = figures.map((figure) => `min(${this.#sql.si(figure)}), max(${this.#sql.si(figure)})`);
    const columns = await this.#numbers(`SELECT ${ends.join(', ')} FROM ${this.#sql.cases}`);
    const spans = figures.map((figure, k) => {
      const [least, greatest] = [columns[2 * k][0], columns[2 * k + 1][0]];
      return [figure, { least, greatest }] as const;
    });
    return new Map(spans.filter(([, { least }]) => !Number.isNaN(least)));
  }

  /** Rows per label of a choice or flags figure, labels without rows left out, in the order of the labels. */
  async labelCounts(figure: string): Promise<LabelCount[]> {
    const column = this.#columns.find((candidate) => candidate.figure.name === figure);
    const { kind, labels = [] } = column?.figure ?? {};
    const [values, rows] = await this.#numbers(
      `SELECT ${this.#sql.si(figure)} AS v, count(*) FROM ${this.#sql.cases} GROUP BY v`,
    );
    return labels
      .map((label, k) => {
        const carries = (value: number) =>
          kind === 'flags' ? Math.floor(value / 2 ** k) % 2 === 1 : value === k;
        return { label, rows: rows.reduce((sum, count, g) => (carries(values[g]) ? sum + count : sum), 0) };
      })
      .filter((counted) => counted.rows > 0);
  }

  /**
   * Infeasible rows that miss by least, ties in order of the combination; rows with an empty
   * required figure are left out, as nobody knows by how much they miss. For another band: rows
   * that fail nothing but the band, by the distance of their margin from it (its scale for other
   * requirements is the study's and does not apply).
   */
  async closestMisses(count: number, band?: BandOverride): Promise<CaseRow[]> {
    const sql = this.#sql;
    const shortfall = sql.shortfall(band);
    const onlyBand = band === undefined ? '' : `AND ${sql.failsBits(band)} = 0`;
    return this.#first(
      count,
      `WHERE NOT ${sql.feasible(band)} AND ${sql.notComputedBits(band)} = 0 ${onlyBand}
        AND ${shortfall} IS NOT NULL ORDER BY ${shortfall}`,
    );
  }

  /** Feasible rows that are best by one figure, ties in order of the combination. */
  async bestBy(
    figure: string,
    { want, nearest }: Wanted,
    count: number,
    band?: BandOverride,
  ): Promise<CaseRow[]> {
    const sql = this.#sql;
    const value = sql.si(figure);
    if (want === 'nearest' && nearest === undefined) throw new Error('nearest to what');
    const order = { less: value, more: `-${value}`, nearest: `abs(${value} - ${literal(nearest ?? 0)})` }[
      want
    ];
    return this.#first(count, `WHERE ${sql.feasible(band)} AND ${value} IS NOT NULL ORDER BY ${order}`);
  }

  async #first(count: number, whereAndOrder: string): Promise<CaseRow[]> {
    const number = this.#sql.si('combination');
    const limit = Math.max(0, Math.floor(count));
    const [found] = await this.#numbers(
      `SELECT ${number} FROM ${this.#sql.cases} ${whereAndOrder}, ${number} LIMIT ${limit}`,
    );
    return this.rows(Array.from(found));
  }

  /** Whole rows by combination number, in the order asked for; NO_SUCH_COMBINATION when one is not in the table. */
  async rows(combinations: readonly number[]): Promise<CaseRow[]> {
    if (combinations.length === 0) return [];
    const sql = this.#sql;
    const cells = this.#columns.map(({ figure }) => sql.si(figure.name));
    const columns = await this.#numbers(
      `SELECT ${sql.si('combination')}, ${cells.join(', ')} FROM ${sql.cases}
        WHERE ${sql.si('combination')} IN (${combinations.map(literal).join(', ')})`,
    );
    const places = new Map(Array.from(columns[0], (combination, row) => [combination, row]));
    return combinations.map((combination) => {
      const row = places.get(combination);
      if (row === undefined) {
        throw new UsageError(
          'NO_SUCH_COMBINATION',
          `The run has no combination ${combination}.`,
          'It is beyond the study, or one of its skip rules drops it.',
        );
      }
      return { combination, values: Float64Array.from(columns.slice(1), (column) => column[row]) };
    });
  }

  /**
   * Hands on the named figures of all feasible rows, some thousand rows at a time and in no
   * particular order: for choices that need more than an order by one figure.
   */
  async eachFeasible(
    figures: readonly string[],
    take: (columns: readonly Float64Array[], rows: number) => void,
    band?: BandOverride,
  ): Promise<void> {
    const sql = this.#sql;
    const result = await this.#connection.stream(
      `SELECT ${figures.map((figure) => `CAST(${sql.si(figure)} AS DOUBLE)`).join(', ')}
        FROM ${sql.cases} WHERE ${sql.feasible(band)}`,
    );
    for (;;) {
      const chunk = await result.fetchChunk();
      if (chunk === null || chunk.rowCount === 0) return;
      take(
        figures.map((_, c) => doubles(chunk.getColumnValues(c))),
        chunk.rowCount,
      );
    }
  }

  /** All columns of a result as doubles, nulls as NaN. */
  async #numbers(query: string): Promise<Float64Array[]> {
    const reader = await this.#connection.runAndReadAll(query);
    const columns = reader.getColumns();
    return Array.from({ length: reader.columnCount }, (_, c) => doubles(columns[c] ?? []));
  }
}

function doubles(values: readonly unknown[]): Float64Array {
  return Float64Array.from(values, (value) => (value === null ? Number.NaN : Number(value)));
}

/** The run's Parquet files in their order. */
function parquetFiles(folder: string): string[] {
  let names: string[];
  try {
    names = readdirSync(folder);
  } catch {
    throw new UsageError('NO_SUCH_RUN', `${folder} is no folder that can be read.`, 'Check its name.');
  }
  return names
    .map((name) => ({ name, match: casesFileName.exec(name) }))
    .filter(({ match }) => match?.[2] === 'parquet')
    .sort((a, b) => Number(a.match?.[1] ?? 0) - Number(b.match?.[1] ?? 0))
    .map(({ name }) => join(folder, name));
}
