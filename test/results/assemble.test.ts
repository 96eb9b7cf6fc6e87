import { createHash } from 'node:crypto';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import type { TableColumn } from '../../src/figures/figure.ts';
import { assembleCases } from '../../src/results/assemble.ts';
import type { Block } from '../../src/results/block.ts';
import { CsvBlockWriter } from '../../src/results/csv-block.ts';
import { findParts, PartWriter, partPath } from '../../src/results/part-files.ts';
import { parsed, readByDuckDB, readByHyparquet } from './reading.ts';
import { column, mixedBlock, mixedColumns } from './sample-table.ts';

const base = mkdtempSync(join(tmpdir(), 'aftlimit-assemble-'));
afterAll(() => rmSync(base, { recursive: true }));

function run(name: string, columns: readonly TableColumn[], blocks: readonly Block[], blocksPerPart: number) {
  const folder = join(base, name);
  const writer = new PartWriter(join(folder, 'parts'), columns);
  for (let part = 0; part * blocksPerPart < blocks.length; part++) {
    writer.begin(part, part * blocksPerPart * 1000);
    for (const block of blocks.slice(part * blocksPerPart, (part + 1) * blocksPerPart)) writer.append(block);
    writer.finish();
  }
  return { folder, parts: findParts(join(folder, 'parts'), columns).finished };
}

function hashes(folder: string): Record<string, string> {
  const files = readdirSync(folder).filter((name) => name.startsWith('cases'));
  return Object.fromEntries(
    files.map((name) => [
      name,
      createHash('sha256')
        .update(readFileSync(join(folder, name)))
        .digest('hex'),
    ]),
  );
}

const mixed = Array.from({ length: 10 }, (_, k) => mixedBlock(k * 1000, k === 4 ? 0 : 700 + 30 * k));
const total = mixed.reduce((sum, { rows }) => sum + rows, 0);

describe('cases files', () => {
  test.each([undefined, 1100, 2500, 300])(
    'are the same bytes for 1, 2, 5 blocks a part, cut at %s rows',
    async (limit) => {
      const found = [];
      for (const perPart of [1, 2, 5, 10]) {
        const { folder, parts } = run(`same-${limit}-${perPart}`, mixedColumns, mixed, perPart);
        await assembleCases(folder, parts, mixedColumns, limit === undefined ? {} : { rowsPerFile: limit });
        found.push(hashes(folder));
      }
      expect(Object.keys(found[0]).length).toBeGreaterThanOrEqual(2);
      for (const other of found.slice(1)) expect(other).toEqual(found[0]);
    },
  );

  test('hold the header and all rows, as if written in one go', async () => {
    const { folder, parts } = run('one', mixedColumns, mixed, 3);
    const told: number[] = [];
    const files = await assembleCases(folder, parts, mixedColumns, {
      onPart: ({ part }) => {
        told.push(part);
      },
    });
    expect(told).toEqual([0, 1, 2, 3]);
    const csv = readFileSync(join(folder, 'cases.csv'));
    const parquet = readFileSync(join(folder, 'cases.parquet'));
    expect(files).toEqual({
      csv: [{ name: 'cases.csv', rows: total, bytes: csv.length }],
      parquet: [{ name: 'cases.parquet', rows: total, bytes: parquet.length }],
    });
    const whole = new CsvBlockWriter(mixedColumns);
    for (const block of mixed) whole.append(block);
    expect(csv.equals(Buffer.concat([whole.header(), whole.bytes()]))).toBe(true);
    const combinations = mixed.flatMap(({ values }) => Array.from(values[0]));
    for (const rows of [
      await readByDuckDB([join(folder, 'cases.parquet')]),
      await readByHyparquet(parquet),
    ]) {
      expect(rows.map((row) => row.combination)).toEqual(combinations);
      expect(rows.map((row) => row.static_margin_aft_percent_mac ?? Number.NaN)).toEqual(
        mixed.flatMap(({ values }) => Array.from(values[2], (margin) => margin * 100)),
      );
    }
  });

  test('are cut at exactly the limit, with line ends inside quotes counted as text', async () => {
    const limit = 1234;
    const { folder, parts } = run('cut', mixedColumns, mixed, 4);
    const { csv, parquet } = await assembleCases(folder, parts, mixedColumns, { rowsPerFile: limit });
    expect(csv.map(({ rows }) => rows)).toEqual([1234, 1234, 1234, 1234, 1234, 1234, total - 6 * limit]);
    const seen: string[] = [];
    for (const { name, rows } of csv) {
      const [header, ...body] = await parsed(readFileSync(join(folder, name), 'utf8'));
      expect(header).toEqual(mixedColumns.map((of) => of.name));
      expect(body).toHaveLength(rows);
      seen.push(...body.map(([combination]) => combination));
    }
    const combinations = mixed.flatMap(({ values }) => Array.from(values[0]));
    expect(seen).toEqual(combinations.map(String));
    // Parquet files end with the last block that fits.
    expect(parquet.map(({ rows }) => rows)).toEqual([700, 730, 760, 790, 850, 880, 910, 940, 970]);
    const rows = await readByDuckDB(parquet.map(({ name }) => join(folder, name)));
    expect(rows.map((row) => row.combination)).toEqual(combinations);
  });

  test('are one file at 1,000,000 rows and two at one more', async () => {
    const columns = [column('n', 'number', 'count')];
    const size = 16_000;
    const blocks = Array.from({ length: 63 }, (_, b) => ({
      rows: b === 62 ? 8000 : size,
      values: [Float64Array.from({ length: size }, (_, i) => b * size + i)],
    }));
    const even = run('million', columns, blocks, 10);
    const one = await assembleCases(even.folder, even.parts, columns);
    expect([one.csv, one.parquet].map((files) => files.map(({ name, rows }) => [name, rows]))).toEqual([
      [['cases.csv', 1_000_000]],
      [['cases.parquet', 1_000_000]],
    ]);
    const more = run(
      'million-and-one',
      columns,
      [...blocks, { rows: 1, values: [Float64Array.of(1_000_000)] }],
      10,
    );
    const two = await assembleCases(more.folder, more.parts, columns);
    expect(two.csv.map(({ name, rows }) => [name, rows])).toEqual([
      ['cases-0001.csv', 1_000_000],
      ['cases-0002.csv', 1],
    ]);
    expect(two.parquet.map(({ name, rows }) => [name, rows])).toEqual([
      ['cases-0001.parquet', 1_000_000],
      ['cases-0002.parquet', 1],
    ]);
    const first = readFileSync(join(more.folder, 'cases-0001.csv'), 'utf8');
    expect(first.slice(0, 4)).toBe('n\n0\n');
    expect(first.slice(-15)).toBe('\n999998\n999999\n');
    expect(readFileSync(join(more.folder, 'cases-0002.csv'), 'utf8')).toBe('n\n1000000\n');
  });

  test('of an older assembly do not stay behind', async () => {
    const { folder, parts } = run('older', mixedColumns, mixed, 5);
    await assembleCases(folder, parts, mixedColumns, { rowsPerFile: 3000 });
    expect(readdirSync(folder)).toContain('cases-0003.csv');
    writeFileSync(join(folder, 'cases-of-mine.csv'), 'kept');
    await assembleCases(folder, parts, mixedColumns);
    expect(readdirSync(folder).sort()).toEqual(['cases-of-mine.csv', 'cases.csv', 'cases.parquet', 'parts']);
  });

  test('of a study whose combinations are all skipped have a header and no rows', async () => {
    const { folder, parts } = run('none', mixedColumns, [mixedBlock(0, 0)], 1);
    const { csv } = await assembleCases(folder, parts, mixedColumns);
    expect(csv[0].rows).toBe(0);
    expect(await parsed(readFileSync(join(folder, 'cases.csv'), 'utf8'))).toEqual([
      mixedColumns.map(({ name }) => name),
    ]);
    expect(await readByDuckDB([join(folder, 'cases.parquet')])).toEqual([]);
  });

  test('are not left behind when a part is not as it was written', async () => {
    const { folder, parts } = run('altered', mixedColumns, mixed, 5);
    const path = partPath(join(folder, 'parts'), 1);
    const bytes = readFileSync(path);
    bytes[100] ^= 1;
    writeFileSync(path, bytes);
    const joined = assembleCases(folder, parts, mixedColumns);
    await expect(joined).rejects.toMatchObject({ name: 'MachineError', code: 'READ_FAILED' });
    expect(readdirSync(folder)).toEqual(['parts']);
  });

  test('are refused when a part is missing', async () => {
    const { folder, parts } = run('missing', mixedColumns, mixed, 2);
    await expect(assembleCases(folder, [parts[0], parts[2]], mixedColumns)).rejects.toThrow(
      'part 1 is missing',
    );
  });
});
