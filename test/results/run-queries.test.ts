import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { assembleCases } from '../../src/results/assemble.ts';
import type { Block } from '../../src/results/block.ts';
import { findParts, PartWriter } from '../../src/results/part-files.ts';
import { type CaseRow, RunQueries } from '../../src/results/run-queries.ts';
import { column, randomNumbers } from './sample-table.ts';

const labels = ['static_margin.at_least', 'wing\'s = "odd"; name', 'static_margin.at_most', '=tail; span'];
const columns = [
  column('combination', 'number', 'count'),
  column('wing_span', 'number', 'length'),
  column('tail_arm', 'number', 'length'),
  column('static_margin_forward', 'number', 'fraction_of_mac'),
  column('static_margin_aft', 'number', 'fraction_of_mac'),
  column('tail_span', 'number', 'length'),
  column('feasible', 'yes_no'),
  column('fails_first', 'choice', 'ratio', labels),
  column('fails', 'flags', 'ratio', labels),
  column('not_computed', 'flags', 'ratio', labels),
  column('largest_shortfall'),
];

interface Case {
  combination: number;
  span: number;
  arm: number;
  forward: number;
  aft: number;
  tail: number;
  feasible: boolean;
  fails: number;
  notComputed: number;
  shortfall: number;
}

/** Invented cases: a band of 5–20 %, a tail span of at most 3 m, and another requirement that fails at random. */
function invent(): Case[] {
  const random = randomNumbers(99);
  const cases: Case[] = [];
  for (let n = 0; n < 6000; n++) {
    // Every seventh combination was skipped.
    if (n % 7 === 3) continue;
    const aft = random() < 0.02 ? Number.NaN : Math.round((random() * 0.4 - 0.1) * 500) / 500;
    const forward = aft + 0.08;
    const tail = random() < 0.03 ? Number.NaN : 1.5 + Math.round(random() * 40) / 20;
    const missing = (Number.isNaN(aft) ? 1 + 4 : 0) + (Number.isNaN(tail) ? 8 : 0);
    const other = random() < 0.1 ? 2 : 0;
    const fails =
      (aft < 0.05 - 1e-9 ? 1 : 0) + other + (forward > 0.2 + 1e-9 ? 4 : 0) + (tail > 3 + 1e-9 ? 8 : 0);
    const misses = [0.05 - aft, forward - 0.2, tail - 3, other / 2].filter((miss) => miss > 0);
    cases.push({
      combination: n,
      span: 8 + (n % 5) * 0.3,
      arm: 3.6 + (Math.floor(n / 5) % 4) * 0.4,
      forward,
      aft,
      tail,
      feasible: fails === 0 && missing === 0,
      fails,
      notComputed: missing,
      shortfall: Math.max(0, ...misses),
    });
  }
  return cases;
}

const cases = invent();
const folder = mkdtempSync(join(tmpdir(), "aftlimit [odd] 'folder' *-"));
let queries: RunQueries;

function rowValues(c: Case): number[] {
  const first = c.fails === 0 ? Number.NaN : Math.log2(c.fails & -c.fails);
  const margins = [c.forward, c.aft];
  return [
    c.combination,
    c.span,
    c.arm,
    ...margins,
    c.tail,
    c.feasible ? 1 : 0,
    first,
    c.fails,
    c.notComputed,
    c.shortfall,
  ];
}

beforeAll(async () => {
  const writer = new PartWriter(join(folder, 'parts'), columns);
  for (let part = 0; part * 2000 < cases.length; part++) {
    const some = cases.slice(part * 2000, (part + 1) * 2000).map(rowValues);
    const block: Block = {
      rows: some.length,
      values: columns.map((_, c) => Float64Array.from(some, (row) => row[c])),
    };
    writer.begin(part, part);
    writer.append(block);
    writer.finish();
  }
  const { finished } = findParts(join(folder, 'parts'), columns);
  await assembleCases(folder, finished, columns, { rowsPerFile: 4000 });
  queries = await RunQueries.open(folder, columns);
});
afterAll(() => {
  queries.close();
  rmSync(folder, { recursive: true });
});

const numbersOf = (rows: readonly CaseRow[]) => rows.map(({ combination }) => combination);
const tally = (test: (c: Case) => boolean) => cases.filter(test).length;

/** Feasibility against another band, judged case by case in plain code. */
function keeps(c: Case, lower: number, upper: number): boolean {
  const others = (c.fails & (2 + 8)) === 0 && (c.notComputed & 8) === 0;
  return others && c.aft >= lower - 1e-9 && c.forward <= upper + 1e-9;
}

describe('counts', () => {
  test('equal those of a plain loop', async () => {
    const counts = await queries.counts();
    expect([counts.rows, counts.feasible]).toEqual([cases.length, tally((c) => c.feasible)]);
    expect(counts.requirements).toEqual(
      labels.map((name, bit) => ({
        name,
        fails: tally((c) => (c.fails & (1 << bit)) !== 0),
        failsAlone: tally((c) => c.fails === 1 << bit && c.notComputed === 0),
        notComputed: tally((c) => (c.notComputed & (1 << bit)) !== 0),
      })),
    );
    for (const { fails, failsAlone } of counts.requirements)
      expect(Math.min(fails, failsAlone)).toBeGreaterThan(0);
  });

  test('for another band equal those of a plain loop, edges included', async () => {
    // Margins are multiples of 0.2 %, so that many lie on these very edges.
    const counts = await queries.counts({ lower: 0.08, upper: 0.25 });
    expect(counts.feasible).toBe(tally((c) => keeps(c, 0.08, 0.25)));
    expect(tally((c) => c.aft === 0.08)).toBeGreaterThan(0);
    const lower = counts.requirements[0];
    expect(lower.fails).toBe(tally((c) => c.aft < 0.08 - 1e-9));
    expect(lower.failsAlone).toBe(
      tally(
        (c) =>
          c.aft < 0.08 - 1e-9 &&
          c.forward <= 0.25 &&
          c.fails < 8 &&
          (c.fails & 2) === 0 &&
          c.notComputed === 0,
      ),
    );
    expect(lower.notComputed).toBe(tally((c) => Number.isNaN(c.aft)));
    expect(counts.requirements[1].fails).toBe(tally((c) => (c.fails & 2) !== 0));
    expect(counts.rows).toBe(cases.length);
  });

  test("for the study's own band given again are the same", async () => {
    expect(await queries.counts({ lower: 0.05, upper: 0.2 })).toEqual(await queries.counts());
  });

  test('for a band of one edge ask nothing of the other margin', async () => {
    const { feasible } = await queries.counts({ lower: 0.1 });
    expect(feasible).toBe(tally((c) => keeps(c, 0.1, Number.POSITIVE_INFINITY)));
  });
});

describe('a region', () => {
  test('tells each cell as a plain loop does', async () => {
    for (const band of [undefined, { lower: 0.02, upper: 0.3 }]) {
      const cells = await queries.region('wing_span', 'tail_arm', band);
      expect(cells.a).toHaveLength(20);
      for (let k = 0; k < 20; k++) {
        const inCell = cases.filter((c) => c.span === cells.a[k] && c.arm === cells.b[k]);
        expect(cells.studied[k]).toBe(inCell.length);
        const feasible = (c: Case) => (band === undefined ? c.feasible : keeps(c, band.lower, band.upper));
        expect(cells.feasible[k]).toBe(inCell.filter(feasible).length);
        const margins = inCell.map((c) => c.aft).filter((aft) => !Number.isNaN(aft));
        expect(cells.bestAftMargin[k]).toBeCloseTo(Math.max(...margins), 14);
      }
      const order = Array.from(cells.a, (a, k) => a * 100 + cells.b[k]);
      expect(order).toEqual(order.toSorted((a, b) => a - b));
    }
  });
});

describe('along an axis', () => {
  test('least, greatest and mean equal those of a plain loop', async () => {
    for (const onlyFeasible of [false, true]) {
      const along = await queries.alongAxis('wing_span', 'static_margin_aft', { onlyFeasible });
      expect(Array.from(along.axis)).toEqual([...new Set(cases.map((c) => c.span))].sort((a, b) => a - b));
      along.axis.forEach((span, k) => {
        const chosen = cases.filter(
          (c) => c.span === span && !Number.isNaN(c.aft) && (!onlyFeasible || c.feasible),
        );
        const margins = chosen.map((c) => c.aft);
        expect(along.least[k]).toBeCloseTo(Math.min(...margins), 14);
        expect(along.greatest[k]).toBeCloseTo(Math.max(...margins), 14);
        expect(along.mean[k]).toBeCloseTo(margins.reduce((sum, m) => sum + m, 0) / margins.length, 12);
      });
    }
  });
});

describe('single rows', () => {
  const byThen = (key: (c: Case) => number) => (a: Case, b: Case) =>
    key(a) - key(b) || a.combination - b.combination;

  test('closest misses are those of a plain sort, ties by number', async () => {
    const wanted = cases.filter((c) => !c.feasible && c.notComputed === 0).sort(byThen((c) => c.shortfall));
    expect(numbersOf(await queries.closestMisses(25))).toEqual(wanted.slice(0, 25).map((c) => c.combination));
  });

  test('closest misses of another band fail that band and nothing else', async () => {
    const miss = (c: Case) => Math.max(0.12 - c.aft, c.forward - 0.22);
    const wanted = cases
      .filter((c) => (c.fails & 10) === 0 && c.notComputed === 0 && !keeps(c, 0.12, 0.22))
      .sort((a, b) => miss(a) - miss(b));
    const found = await queries.closestMisses(15, { lower: 0.12, upper: 0.22 });
    // Distances worked out from percent differ in the last bits, which may reorder equal ones.
    const missOf = new Map(wanted.map((c) => [c.combination, miss(c)]));
    expect(found.map((row) => missOf.get(row.combination)?.toFixed(9))).toEqual(
      wanted.slice(0, 15).map((c) => miss(c).toFixed(9)),
    );
  });

  test('the best by less, more and nearest are those of a plain sort, ties by number', async () => {
    const feasible = cases.filter((c) => c.feasible);
    const best = (key: (c: Case) => number) =>
      feasible
        .toSorted(byThen(key))
        .slice(0, 30)
        .map((c) => c.combination);
    expect(numbersOf(await queries.bestBy('tail_span', { want: 'less' }, 30))).toEqual(best((c) => c.tail));
    expect(numbersOf(await queries.bestBy('tail_span', { want: 'more' }, 30))).toEqual(best((c) => -c.tail));
    const nearest = await queries.bestBy('tail_span', { want: 'nearest', nearest: 2.21 }, 30);
    expect(numbersOf(nearest)).toEqual(best((c) => Math.abs(c.tail - 2.21)));
  });

  test('come whole, in the order asked for, in SI, with empty cells', async () => {
    const wanted = [5999, 0, 4, 2500, 17].filter((n) => n % 7 !== 3);
    const rows = await queries.rows(wanted);
    expect(numbersOf(rows)).toEqual(wanted);
    const all = await queries.rows(cases.map((c) => c.combination));
    let wrong = 0;
    cases.forEach((c, k) => {
      rowValues(c).forEach((value, at) => {
        const found = all[k].values[at];
        // A margin goes through percent and back: an ulp or two.
        const near = Math.abs(found - value) <= 4 * Number.EPSILON * Math.abs(value);
        if (!(Object.is(found, value) || (columns[at].factor !== 1 && near))) wrong++;
      });
    });
    expect(wrong).toBe(0);
  });

  test('that are skipped or beyond the study are NO_SUCH_COMBINATION', async () => {
    const wanted = { name: 'UsageError', code: 'NO_SUCH_COMBINATION' };
    await expect(queries.rows([0, 3])).rejects.toMatchObject({
      ...wanted,
      message: 'The run has no combination 3.',
    });
    await expect(queries.rows([6000])).rejects.toMatchObject(wanted);
    expect(await queries.rows([])).toEqual([]);
  });

  test('that are feasible come by, all of them', async () => {
    const found: number[][] = [];
    await queries.eachFeasible(['combination', 'tail_span'], ([numbers, tails], rows) => {
      expect([numbers.length, tails.length]).toEqual([rows, rows]);
      for (let k = 0; k < rows; k++) found.push([numbers[k], tails[k]]);
    });
    const feasible = cases.filter((c) => c.feasible).map((c) => [c.combination, c.tail]);
    expect(found.sort(([a], [b]) => a - b)).toEqual(feasible);
  });
});

describe('opening', () => {
  test('a folder without a table is RUN_NOT_FINISHED, and no folder is NO_SUCH_RUN', async () => {
    const opened = RunQueries.open(join(folder, 'parts'), columns);
    await expect(opened).rejects.toMatchObject({ name: 'UsageError', code: 'RUN_NOT_FINISHED' });
    const nowhere = RunQueries.open(join(folder, 'nowhere'), columns);
    await expect(nowhere).rejects.toMatchObject({ name: 'UsageError', code: 'NO_SUCH_RUN' });
  });

  test('damaged files, or those of another table, is READ_FAILED', async () => {
    const wanted = { name: 'MachineError', code: 'READ_FAILED' };
    await expect(RunQueries.open(folder, [...columns, column('more')])).rejects.toMatchObject(wanted);
    const damaged = join(folder, 'damaged');
    mkdirSync(damaged);
    const bytes = readFileSync(join(folder, 'cases-0001.parquet'));
    writeFileSync(join(damaged, 'cases.parquet'), bytes.subarray(0, bytes.length - 100));
    await expect(RunQueries.open(damaged, columns)).rejects.toMatchObject(wanted);
  });

  test('asking for a figure that the table lacks is a bug and says so', async () => {
    await expect(queries.region('wing_span', 'x" FROM y')).rejects.toThrow(
      'the table has no figure x" FROM y',
    );
  });
});
