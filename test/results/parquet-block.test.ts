import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { parquetMetadata } from 'hyparquet';
import { afterAll, describe, expect, test } from 'vitest';
import type { TableColumn } from '../../src/figures/figure.ts';
import { type Block, largestBlock } from '../../src/results/block.ts';
import { ParquetBlockWriter } from '../../src/results/parquet-block.ts';
import { parquetFooter, parquetMagic } from '../../src/results/parquet-schema.ts';
import { readByDuckDB, readByHyparquet, storedCell } from './reading.ts';
import { awkwardLabels, column, mixedBlock, mixedColumns, randomNumbers } from './sample-table.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-parquet-'));
afterAll(() => rmSync(folder, { recursive: true }));

/** A whole file of the blocks, a row group each. */
function file(columns: readonly TableColumn[], blocks: readonly Block[]): Uint8Array {
  const writer = new ParquetBlockWriter(columns);
  const pieces: Uint8Array[] = [parquetMagic];
  let at = parquetMagic.length;
  const groups = blocks.map((block) => {
    writer.reset();
    const group = writer.append(block);
    pieces.push(writer.bytes().slice());
    const placed = { at, group };
    at += group.bytes;
    return placed;
  });
  return Buffer.concat([...pieces, parquetFooter(columns, groups)]);
}

async function bothReaders(bytes: Uint8Array): Promise<Record<string, unknown>[][]> {
  const path = join(folder, 'cases.parquet');
  writeFileSync(path, bytes);
  return [await readByDuckDB([path]), await readByHyparquet(bytes)];
}

/** Compares every cell; doubles by `Object.is`, so that −0 and the last bit count. */
async function expectRoundTrip(columns: readonly TableColumn[], blocks: readonly Block[]): Promise<void> {
  for (const rows of await bothReaders(file(columns, blocks))) {
    expect(rows).toHaveLength(blocks.reduce((sum, block) => sum + block.rows, 0));
    let row = 0;
    let wrong = 0;
    for (const block of blocks) {
      for (let i = 0; i < block.rows; i++, row++) {
        columns.forEach((of, c) => {
          const value = block.values[c][i];
          const found = rows[row][of.name] ?? null;
          if (!Object.is(found, storedCell(of, value))) wrong++;
          if (of.figure.kind !== 'flags') return;
          if (!Object.is(rows[row][`${of.name}_bits`] ?? null, Number.isNaN(value) ? null : value)) wrong++;
        });
      }
    }
    expect(wrong).toBe(0);
  }
}

describe('a block as a Parquet row group', () => {
  test('comes back exactly through DuckDB and hyparquet, every kind, with empty cells', async () => {
    await expectRoundTrip(mixedColumns, [
      mixedBlock(0, 5000),
      mixedBlock(5000, 1),
      mixedBlock(5001, largestBlock),
    ]);
  });

  test('comes back exactly for columns of few, some thousand and all different doubles', async () => {
    const random = randomNumbers(11);
    const distinct = [1, 2, 3, 200, 4096, 4097, 6000, Number.POSITIVE_INFINITY];
    const columns = distinct.map((n) => column(`distinct_${n}`, 'number', 'angle'));
    const values = distinct.map((n) =>
      Float64Array.from({ length: largestBlock }, (_, i) => {
        if (n === Number.POSITIVE_INFINITY) return random() - 0.5;
        return (i < n ? i : Math.floor(random() * n)) / 3 - 1;
      }),
    );
    await expectRoundTrip(columns, [{ rows: largestBlock, values }]);
  });

  test('comes back exactly for runs of any length', async () => {
    const runs = fc.array(fc.tuple(fc.integer({ min: 0, max: 40 }), fc.integer({ min: 1, max: 200 })), {
      minLength: 1,
      maxLength: 20,
    });
    const law = fc.asyncProperty(runs, async (list) => {
      const cells = list.flatMap(([value, times]) =>
        new Array<number>(times).fill(value === 0 ? Number.NaN : value / 8),
      );
      await expectRoundTrip([column('a')], [{ rows: cells.length, values: [Float64Array.from(cells)] }]);
    });
    await fc.assert(law, { numRuns: 40 });
  }, 30_000);

  test('keeps both zeros, the least and the greatest doubles, and makes infinities empty', async () => {
    const values = Float64Array.of(-0, 0, 5e-324, Number.MAX_VALUE, -Number.MAX_VALUE, 1 / 3);
    await expectRoundTrip([column('a')], [{ rows: 6, values: [values] }]);
    const infinite = Float64Array.of(Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY);
    for (const rows of await bothReaders(file([column('a')], [{ rows: 2, values: [infinite] }]))) {
      expect(rows.map(({ a }) => a ?? null)).toEqual([null, null]);
    }
  });

  test('holds columns that are empty throughout', async () => {
    const columns = [
      column('n', 'number', 'count'),
      column('a'),
      column('b', 'yes_no'),
      column('c', 'choice', 'ratio', awkwardLabels),
      column('d', 'flags', 'ratio', awkwardLabels),
    ];
    const empty = new Float64Array(100).fill(Number.NaN);
    const values = [Float64Array.from(empty, (_, i) => i), empty, empty, empty, empty];
    await expectRoundTrip(columns, [{ rows: 100, values }]);
  });

  test('holds more flag sets than numbers may have in a dictionary', async () => {
    const labels = Array.from({ length: 30 }, (_, k) => `r${k}`);
    const random = randomNumbers(2);
    const sets = Float64Array.from({ length: largestBlock }, () => Math.floor(random() * 2 ** 30));
    await expectRoundTrip(
      [column('fails', 'flags', 'ratio', labels)],
      [{ rows: largestBlock, values: [sets] }],
    );
  });

  test('says the least and greatest value and the empty cells of each column', () => {
    const columns = [column('a', 'number', 'fraction_of_mac')];
    const values = [Float64Array.of(0.25, Number.NaN, -0.5, 0)];
    const bytes = file(columns, [{ rows: 4, values }]);
    const { row_groups } = parquetMetadata(
      bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length) as ArrayBuffer,
    );
    expect(row_groups[0].columns[0].meta_data?.statistics).toMatchObject({
      null_count: 1n,
      min_value: -50,
      max_value: 25,
    });
  });

  test('does not depend on the blocks written before it', () => {
    const blocks = [mixedBlock(0, 9000), mixedBlock(9000, 5000)];
    const used = new ParquetBlockWriter(mixedColumns);
    used.append(blocks[0]);
    used.reset();
    const after = used.append(blocks[1]);
    const fresh = new ParquetBlockWriter(mixedColumns);
    expect(fresh.append(blocks[1])).toEqual(after);
    expect(Buffer.compare(fresh.bytes(), used.bytes())).toBe(0);
  });
});
