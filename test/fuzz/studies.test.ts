/**
 * Whole studies at random, from text to files. AFTLIMIT_FUZZ_RUNS and AFTLIMIT_FUZZ_SEED ask for a longer
 * campaign or another one; seed and failing case are printed by fast-check.
 */
import fc from 'fast-check';
import { parquetReadObjects } from 'hyparquet';
import { describe, expect, it } from 'vitest';
import { Evaluator } from '../../src/engine/evaluator.ts';
import { type LaidOut, layOut } from '../../src/engine/lay-out.ts';
import { StudyError } from '../../src/errors.ts';
import { displayUnit } from '../../src/figures/display.ts';
import { figureOfInput } from '../../src/figures/study-figures.ts';
import { blockCount, blockSize } from '../../src/plan/plan.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { inputsOfCombination, makeWorksheet } from '../../src/reports/worksheet.ts';
import type { Block } from '../../src/results/block.ts';
import { CsvBlockWriter } from '../../src/results/csv-block.ts';
import { ParquetBlockWriter } from '../../src/results/parquet-block.ts';
import { parquetFooter, parquetMagic } from '../../src/results/parquet-schema.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import type { Study } from '../../src/study/study.ts';
import { parsed, storedCell } from '../results/reading.ts';
import { type ExpectedEdge, type RandomStudy, randomStudies } from './random-study.ts';

const runs = Number(process.env.AFTLIMIT_FUZZ_RUNS ?? 150);
/** Shrinking a failing study takes minutes; the study itself is printed in any case. */
const shrinks = process.env.AFTLIMIT_FUZZ_SHRINK === 'yes';
const seed = Number(process.env.AFTLIMIT_FUZZ_SEED ?? 20_260);

/** Faults that a study drawn at random may have: its parts do not fit each other. */
const misfits = new Set([
  'TAIL_AHEAD_OF_WING',
  'TAIL_BEYOND_BODY',
  'CG_REVERSED',
  'OUT_OF_RANGE',
  'STATIONS_NOT_ASCENDING',
]);

interface Evaluated extends LaidOut {
  readonly study: Study;
  readonly drawn: RandomStudy;
  readonly block: Block;
  /** SI value of a figure in a row. */
  readonly value: (figure: string, row: number) => number;
}

/** The study read and its first block evaluated; undefined where its parts do not fit each other. */
function evaluated(drawn: RandomStudy): Evaluated | undefined {
  let study: Study;
  try {
    study = readStudyText(drawn.text, 'drawn.yaml');
  } catch (error) {
    if (!(error instanceof StudyError)) throw error;
    // other faults may follow from a misfit: a skip of an axis that was refused
    if (error.faults.some(({ code }) => misfits.has(code))) return undefined;
    throw new Error(
      `${error.faults.map(({ code, found }) => `${code}: ${found}`).join('\n')}\n${drawn.text}`,
    );
  }
  const laidOut = layOut(study);
  expect(blockCount(laidOut.plan)).toBe(1);
  const names = laidOut.columns.map(({ figure }) => figure.name);
  const evaluator = new Evaluator(laidOut.plan, names);
  const rows = evaluator.evaluate(0, blockSize);
  const block = { rows, values: evaluator.columns };
  const place = new Map(names.map((name, k) => [name, k]));
  const value = (figure: string, row: number) => {
    const k = place.get(figure);
    if (k === undefined) throw new Error(`no column of ${figure}`);
    return block.values[k][row];
  };
  return { ...laidOut, study, drawn, block, value };
}

/** Position of each axis of the plan in a combination: mixed radix, the last axis fastest. */
function positionsOf({ plan }: LaidOut, combination: number): Map<string, number> {
  const positions = new Map<string, number>();
  let below = 1;
  for (const { name, size } of [...plan.axes].reverse()) {
    positions.set(name, Math.floor(combination / below) % size);
    below *= size;
  }
  return positions;
}

const near = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b));

/** A limit that a value meets but for rounding is met. */
const beyond = (value: number, { side, limit }: NonNullable<RandomStudy['skip']>) =>
  !near(value, limit) && (side === 'above' ? value > limit : value < limit);

function expectAxes(found: Evaluated): void {
  const { study, drawn, block, value, plan } = found;
  expect(study.axes.map(({ name }) => name)).toEqual(drawn.axes.map(({ path }) => path));
  const total = drawn.axes.reduce((product, { values }) => product * values.length, 1);
  expect(plan.combinations).toBe(total);
  const figureName = figureOfInput(study);
  const kept: number[] = [];
  for (let combination = 0; combination < total; combination++) {
    const positions = positionsOf(found, combination);
    const dropped = drawn.axes.some(
      ({ path, values }) =>
        path === drawn.skip?.path && beyond(values[positions.get(path) as number], drawn.skip),
    );
    if (!dropped) kept.push(combination);
  }
  expect(Array.from({ length: block.rows }, (_, row) => value('combination', row))).toEqual(kept);
  for (let row = 0; row < block.rows; row++) {
    const positions = positionsOf(found, kept[row]);
    for (const { path, values } of drawn.axes) {
      const wanted = values[positions.get(path) as number];
      const is = value(figureName(path), row);
      if (!near(is, wanted)) throw new Error(`${path} of ${kept[row]}: ${is} for ${wanted}`);
    }
  }
}

/** Figures that are empty for a reason of their own, whatever the row. */
function mayBeEmpty(found: Evaluated, figure: string, row: number): boolean {
  const { drawn, study, value } = found;
  if (figure === 'not_computed_because' || figure === 'fails_first') return true;
  if (figure === 'cg_window_aft') return drawn.band.lower === undefined;
  if (figure === 'cg_window_forward') return drawn.band.upper === undefined;
  // a wing hollower than a triangle has no equivalent taper
  if (figure === 'downwash_torenbeek') return value('wing_formula_taper', row) === 0;
  const height = study.inputs.get('tail.above_wing_root_chord') ?? 0;
  return figure === 'downwash_handbook' && Math.abs(height) * 2 >= value('wing_span', row);
}

const reasons = { cgReversed: 2 } as const;
const emptyWhenReversed = new Set(['static_margin_forward', 'static_margin_aft']);

function expectCells(found: Evaluated): void {
  const { block, columns, value } = found;
  for (let row = 0; row < block.rows; row++) {
    const reason = value('not_computed_because', row);
    if (Number.isNaN(value('static_margin_aft', row)) === Number.isNaN(reason))
      throw new Error(`row ${row} has reason ${reason} and a margin of ${value('static_margin_aft', row)}`);
    columns.forEach(({ figure: { name } }, k) => {
      const cell = block.values[k][row];
      if (Number.isFinite(cell)) return;
      const where = `${name} of row ${row} is ${cell}, reason ${reason}`;
      if (!Number.isNaN(cell)) throw new Error(where);
      if (reason === reasons.cgReversed ? emptyWhenReversed.has(name) : !Number.isNaN(reason)) return;
      if (!mayBeEmpty(found, name, row)) throw new Error(where);
    });
  }
}

/** Rounding of a sum of a few numbers of the size of one. */
const rounding = 1e-13;

function expectSums({ block, value, drawn }: Evaluated): void {
  const same = (a: number, b: number, what: string) => {
    if (Number.isNaN(a) && Number.isNaN(b)) return;
    if (!(Math.abs(a - b) <= rounding * Math.max(1, Math.abs(a)))) throw new Error(`${what}: ${a} for ${b}`);
  };
  for (let row = 0; row < block.rows; row++) {
    const of = (figure: string) => value(figure, row);
    const hn = of('neutral_point');
    const steps = ['wing', 'tail', 'body', 'height'].map((part) => of(`neutral_point_${part}`));
    same(
      steps.reduce((sum, step) => sum + step, 0),
      hn,
      'build-up',
    );
    if (of('not_computed_because') !== reasons.cgReversed) {
      same(of('static_margin_aft'), hn - of('cg_aft'), 'aft margin');
      same(of('static_margin_forward'), hn - of('cg_forward'), 'forward margin');
    }
    same(of('neutral_point_station'), of('mac_leading_edge') + hn * of('mac'), 'station');
    same(of('cg_window_aft'), hn - (drawn.band.lower ?? Number.NaN), 'window aft');
    same(of('cg_window_forward'), hn - (drawn.band.upper ?? Number.NaN), 'window forward');
    same(of('tail_volume') * of('wing_area') * of('mac'), of('tail_area') * of('tail_arm'), 'volume');
    same(of('wing_aspect_ratio') * of('wing_area'), of('wing_span') ** 2, 'aspect ratio');
  }
}

interface Verdict {
  readonly fails: number;
  readonly empty: number;
  readonly worst: number;
  readonly first: number;
}

/** What a row's own figures say of the edges: the definition once more, in the order of the file. */
function judge(edges: readonly ExpectedEdge[], figureValue: (figure: string) => number): Verdict {
  const shortfalls = edges.map(({ figure, sign, limit }) => sign * (limit - figureValue(figure)));
  const failing = shortfalls.map((shortfall) => shortfall > 1e-9);
  const relative = shortfalls.map((shortfall, k) => {
    if (!failing[k]) return 0;
    // flags either are there or not
    return edges[k].figure === 'outside_fitted_range' ? 1 : shortfall / edges[k].scale;
  });
  const worst = Math.max(0, ...relative);
  return {
    fails: failing.reduce((bits, fails, k) => bits + (fails ? 2 ** k : 0), 0),
    empty: shortfalls.reduce((bits, shortfall, k) => bits + (Number.isNaN(shortfall) ? 2 ** k : 0), 0),
    worst,
    first: worst > 0 ? relative.indexOf(worst) : Number.NaN,
  };
}

function expectVerdicts({ block, value, drawn }: Evaluated): void {
  for (let row = 0; row < block.rows; row++) {
    const of = (figure: string) => value(figure, row);
    const wanted = judge(drawn.edges, of);
    const wantedOf = {
      fails: wanted.fails,
      not_computed: wanted.empty,
      feasible: wanted.fails === 0 && wanted.empty === 0 ? 1 : 0,
      fails_count: wanted.fails.toString(2).replaceAll('0', '').length,
    };
    for (const [figure, verdict] of Object.entries(wantedOf)) {
      if (of(figure) !== verdict) throw new Error(`${figure} of row ${row}: ${of(figure)} for ${verdict}`);
    }
    const off = (worst: number) => Math.abs(worst - wanted.worst) > 1e-9 * Math.max(1, wanted.worst);
    if (off(of('largest_shortfall'))) throw new Error(`shortfall of row ${row}: ${of('largest_shortfall')}`);
    // ties by rounding are left to the program
    const first = of('fails_first');
    const right = Number.isNaN(wanted.first)
      ? Number.isNaN(first)
      : !off(judge([drawn.edges[first]], of).worst);
    if (!right) throw new Error(`row ${row} fails first by ${first}, not ${wanted.first}`);
  }
}

/** Rows whose worksheet is compared: the first, the last and some between. */
function someRows(rows: number): number[] {
  return [...new Set([0, 1, Math.floor(rows / 3), Math.floor(rows / 2), rows - 1])].filter(
    (row) => row >= 0 && row < rows,
  );
}

function expectWorksheets(found: Evaluated): void {
  const { block, columns, study, value, plan } = found;
  for (const row of someRows(block.rows)) {
    const inputs = inputsOfCombination(found, value('combination', row));
    const alone = runOnce(plan.stages, inputs);
    const sheet = makeWorksheet(study, found, inputs, 'one row');
    const lines = new Map([...sheet.given, ...sheet.workedOut].map((line) => [line.name, line]));
    for (const { figure } of columns) {
      if (figure.name === 'combination') continue;
      const cell = value(figure.name, row);
      const single = alone.get(figure.name);
      if (!Object.is(cell, single)) throw new Error(`${figure.name} of row ${row}: ${cell}, alone ${single}`);
      const line = lines.get(figure.name);
      if (line === undefined) throw new Error(`the worksheet lacks ${figure.name}`);
      if (Number.isNaN(cell)) expect(line.value).toBe('empty');
      else if (figure.kind === 'number') {
        const { unit, factor } = displayUnit(figure.dimension, study.show);
        const shown = cell * factor;
        expect(line.unit).toBe(unit);
        expect(Math.abs(Number(line.value) - shown)).toBeLessThanOrEqual(5.1e-6 * Math.abs(shown) + 1e-12);
      }
    }
  }
}

async function expectFiles({ block, columns }: Evaluated): Promise<void> {
  const csv = new CsvBlockWriter(columns);
  csv.append(block);
  const [header, ...lines] = await parsed(Buffer.concat([csv.header(), csv.bytes()]).toString('utf8'));
  expect(header).toEqual(columns.map(({ name }) => name));
  expect(lines).toHaveLength(block.rows);
  const parquet = new ParquetBlockWriter(columns);
  const group = parquet.append(block);
  const footer = parquetFooter(columns, [{ at: parquetMagic.length, group }]);
  const bytes = Buffer.concat([parquetMagic, parquet.bytes(), footer]);
  const file = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength) as ArrayBuffer;
  const rows = await parquetReadObjects({ file });
  expect(rows).toHaveLength(block.rows);
  for (let row = 0; row < block.rows; row++) {
    columns.forEach((column, k) => {
      const wanted = storedCell(column, block.values[k][row]);
      const stored = rows[row][column.name] ?? null;
      if (!Object.is(stored, wanted)) throw new Error(`${column.name}[${row}]: ${stored} for ${wanted}`);
      // seven significant digits, labels as they are
      const text = lines[row][k];
      const same =
        typeof wanted === 'number'
          ? text !== '' && Math.abs(Number(text) - wanted) <= 5.1e-7 * Math.abs(wanted)
          : text === (wanted === null ? '' : typeof wanted === 'boolean' ? yesNo(wanted) : wanted);
      if (!same) throw new Error(`${column.name}[${row}] in the CSV: ${text} for ${wanted}`);
    });
  }
}

const yesNo = (value: boolean) => (value ? 'yes' : 'no');

describe('studies drawn at random', () => {
  it(`keep their word from text to file, ${runs} of them`, { timeout: 3_600_000 }, async () => {
    let whole = 0;
    let rows = 0;
    let feasible = 0;
    let empty = 0;
    await fc.assert(
      fc.asyncProperty(randomStudies, async (drawn) => {
        const found = evaluated(drawn);
        if (found === undefined) return;
        try {
          expectAxes(found);
          expectCells(found);
          expectSums(found);
          expectVerdicts(found);
          expectWorksheets(found);
          await expectFiles(found);
        } catch (error) {
          throw new Error(`${error instanceof Error ? error.message : error}\n${drawn.text}`);
        }
        whole++;
        rows += found.block.rows;
        for (let row = 0; row < found.block.rows; row++) {
          feasible += found.value('feasible', row);
          if (!Number.isNaN(found.value('not_computed_because', row))) empty++;
        }
      }),
      { seed, numRuns: runs, endOnFailure: !shrinks },
    );
    // the campaign means something only if most studies run, and rows of all kinds occur
    console.info(`${whole} of ${runs} studies, ${rows} rows, ${feasible} feasible, ${empty} not computed`);
    expect(whole).toBeGreaterThan(0.6 * runs);
    expect(feasible).toBeGreaterThan(0);
    expect(feasible).toBeLessThan(rows);
    expect(empty).toBeGreaterThan(0);
  });
});
