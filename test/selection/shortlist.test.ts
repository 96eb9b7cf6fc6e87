import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { blockCount, blockSize } from '../../src/plan/plan.ts';
import { assembleCases } from '../../src/results/assemble.ts';
import { PartWriter } from '../../src/results/part-files.ts';
import { RunQueries } from '../../src/results/run-queries.ts';
import { chooseShortlist } from '../../src/selection/shortlist.ts';
import type { Preference } from '../../src/study/study.ts';
import { testStudy } from '../studies.ts';

const study = testStudy({
  vary: `wing.span: {from: 8 m, to: 11 m, count: 7}
tail.volume: {from: 0.4, to: 0.6, count: 9}
tail.arm: {from: 3.6 m, to: 5.2 m, count: 5}
cg: [{forward: 22 %, aft: 31 %}, {forward: 24 %, aft: 33 %}]`,
});
const laidOut = layOut(study);
const names = laidOut.columns.map((column) => column.figure.name);
const folder = mkdtempSync(join(tmpdir(), 'aftlimit-shortlist-'));
let queries: RunQueries;
/** Every row of the study, worked out here, by figure name. */
const rows: Record<string, number>[] = [];

beforeAll(async () => {
  const writer = new PartWriter(join(folder, 'parts'), laidOut.columns);
  const evaluator = new Evaluator(laidOut.plan, names);
  writer.begin(0, 0);
  for (let block = 0; block < blockCount(laidOut.plan); block++) {
    const count = evaluator.evaluate(block * blockSize, blockSize);
    writer.append({ rows: count, values: evaluator.columns });
    for (let row = 0; row < count; row++) {
      rows.push(Object.fromEntries(names.map((name, k) => [name, evaluator.columns[k][row]])));
    }
  }
  await assembleCases(folder, [writer.finish()], laidOut.columns);
  queries = await RunQueries.open(folder, laidOut.columns);
});

afterAll(() => {
  queries.close();
  rmSync(folder, { recursive: true, force: true });
});

const show = (figure: string, value: number) => `${figure} ${value}`;
const choose = (preferences: readonly Preference[], keep: number) =>
  chooseShortlist(queries, laidOut.columns, preferences, keep, show);
const figureIn = (row: { values: Float64Array }, figure: string) => row.values[names.indexOf(figure)];

describe('the shortlist', () => {
  it('starts with the best by each preference, found here row by row', async () => {
    const feasible = rows.filter((row) => row.feasible === 1);
    const chosen = await choose(
      [
        { figure: 'tail_area', want: 'less' },
        { figure: 'wing_aspect_ratio', want: 'more' },
        { figure: 'static_margin_aft', want: 'nearest', nearest: 0.07 },
      ],
      6,
    );
    expect(feasible.length).toBeGreaterThan(20);
    expect(figureIn(chosen[0].row, 'tail_area')).toBeCloseTo(
      Math.min(...feasible.map((row) => row.tail_area)),
      12,
    );
    expect(figureIn(chosen[1].row, 'wing_aspect_ratio')).toBeCloseTo(
      Math.max(...feasible.map((row) => row.wing_aspect_ratio)),
      12,
    );
    expect(Math.abs(figureIn(chosen[2].row, 'static_margin_aft') - 0.07)).toBeCloseTo(
      Math.min(...feasible.map((row) => Math.abs(row.static_margin_aft - 0.07))),
      12,
    );
    expect(chosen.map((entry) => entry.because)).toEqual([
      'best by least tail_area',
      'best by most wing_aspect_ratio',
      'best by static_margin_aft nearest to static_margin_aft 0.07',
      'no. 2 by least tail_area',
      'no. 2 by most wing_aspect_ratio',
      'no. 2 by static_margin_aft nearest to static_margin_aft 0.07',
    ]);
  });

  it('passes over combinations alike in every preferred figure', async () => {
    // The aspect ratio depends on the span alone: at most one row per span.
    const chosen = await choose([{ figure: 'wing_aspect_ratio', want: 'more' }], 20);
    const ratios = chosen.map((entry) => figureIn(entry.row, 'wing_aspect_ratio').toFixed(9));
    expect(new Set(ratios).size).toBe(ratios.length);
    expect(ratios.length).toBeLessThanOrEqual(7);
  });

  it('holds feasible combinations only, and takes the least tail when nothing is preferred', async () => {
    const chosen = await choose([], 5);
    expect(chosen.map((entry) => figureIn(entry.row, 'feasible'))).toEqual([1, 1, 1, 1, 1]);
    const areas = chosen.map((entry) => figureIn(entry.row, 'tail_area'));
    expect(areas).toEqual([...areas].sort((p, q) => p - q));
  });

  it('is judged by another band where one is asked for', async () => {
    const band = { lower: 0.1, upper: 0.25 };
    const chosen = await chooseShortlist(queries, laidOut.columns, [], 3, show, band);
    const least = Math.min(
      ...rows
        .filter((row) => row.static_margin_aft >= 0.1 && row.static_margin_forward <= 0.25)
        .map((row) => row.tail_area),
    );
    expect(figureIn(chosen[0].row, 'tail_area')).toBeCloseTo(least, 12);
  });
});

describe('questions by position on an axis', () => {
  it('count the cells of two axes as a walk over the rows does', async () => {
    const { axes } = laidOut.plan;
    const stride = (axis: number) => axes.slice(axis + 1).reduce((product, { size }) => product * size, 1);
    const [x, y] = [0, axes.length - 1];
    const cells = await queries.regionOfAxes(
      { stride: stride(x), size: axes[x].size },
      { stride: stride(y), size: axes[y].size },
    );
    expect(cells.a.length).toBe(axes[x].size * axes[y].size);
    cells.a.forEach((position, k) => {
      const inCell = rows.filter(
        (row) =>
          row[axes[x].figures[0]] === axes[x].values[0][position] &&
          row[axes[y].figures[0]] === axes[y].values[0][cells.b[k]],
      );
      expect(cells.studied[k]).toBe(inCell.length);
      expect(cells.feasible[k]).toBe(inCell.filter((row) => row.feasible === 1).length);
      expect(cells.bestAftMargin[k]).toBeCloseTo(Math.max(...inCell.map((row) => row.static_margin_aft)), 12);
    });
  });

  it('give spans and label counts as a walk over the rows does', async () => {
    const spans = await queries.spans(['neutral_point', 'tail_area']);
    expect(spans.get('neutral_point')?.least).toBeCloseTo(
      Math.min(...rows.map((row) => row.neutral_point)),
      12,
    );
    expect(spans.get('tail_area')?.greatest).toBeCloseTo(Math.max(...rows.map((row) => row.tail_area)), 12);
    const counted = await queries.labelCounts('fails');
    expect(counted.length).toBeGreaterThan(0);
    for (const { label, rows: count } of counted) {
      const bit = laidOut.edges.findIndex((edge) => edge.label === label);
      expect(count).toBe(rows.filter((row) => Math.floor(row.fails / 2 ** bit) % 2 === 1).length);
    }
  });
});
