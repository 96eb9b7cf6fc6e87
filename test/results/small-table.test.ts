import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { afterAll, describe, expect, test } from 'vitest';
import { neutralText, originalText } from '../../src/results/cells.ts';
import { CsvBlockWriter } from '../../src/results/csv-block.ts';
import { readSmallTable, smallCells, writeSmallTable } from '../../src/results/small-table.ts';
import { mixedBlock, mixedColumns } from './sample-table.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-small-'));
afterAll(() => rmSync(folder, { recursive: true }));
const path = join(folder, 'shortlist.csv');

describe('a small table', () => {
  test('is written with seven digits, yes and no, and texts that no spreadsheet executes', async () => {
    await writeSmallTable(
      path,
      ['rank', 'span_m', 'kept', 'why'],
      [
        [1, 1 / 3, true, '=1+2'],
        [12_345_678, -0.25, false, 'a, "b"'],
        [null, Number.NaN, null, ''],
      ],
    );
    expect(readFileSync(path, 'utf8')).toBe(
      `rank,span_m,kept,why\n1,0.3333333,yes,'=1+2\n12345678,-0.25,no,"a, ""b"""\n,,,\n`,
    );
    expect(await readSmallTable(path)).toEqual({
      header: ['rank', 'span_m', 'kept', 'why'],
      rows: [
        ['1', '0.3333333', 'yes', '=1+2'],
        ['12345678', '-0.25', 'no', 'a, "b"'],
        ['', '', '', ''],
      ],
    });
  });

  test('gives back any text', async () => {
    const sign = fc.constantFrom('=', '+', '-', '@', '\t', '\n', "'", '"', ',', 'ü', 'a', ' ');
    const text = fc.array(sign, { maxLength: 8 }).map((signs) => signs.join(''));
    await fc.assert(
      fc.asyncProperty(fc.array(text, { minLength: 1, maxLength: 5 }), async (cells) => {
        await writeSmallTable(path, ['first', ...cells.map((_, k) => `c${k}`)], [['x', ...cells]]);
        expect((await readSmallTable(path)).rows).toEqual([['x', ...cells]]);
      }),
      { numRuns: 200 },
    );
  });

  test('holds rows of the cases as the cases file does', async () => {
    const block = mixedBlock(3, 200);
    const writer = new CsvBlockWriter(mixedColumns);
    writer.append(block);
    const rows = Array.from({ length: block.rows }, (_, i) =>
      smallCells(
        mixedColumns,
        block.values.map((values) => values[i]),
      ),
    );
    await writeSmallTable(
      path,
      mixedColumns.map(({ name }) => name),
      rows,
    );
    expect(readFileSync(path, 'utf8')).toBe(
      new TextDecoder().decode(writer.header()) + new TextDecoder().decode(writer.bytes()),
    );
  });

  test('with a header alone is a header alone', async () => {
    await writeSmallTable(path, ['a', 'b'], []);
    expect(readFileSync(path, 'utf8')).toBe('a,b\n');
    expect(await readSmallTable(path)).toEqual({ header: ['a', 'b'], rows: [] });
  });

  test('with a row too short is a bug, and a missing file is NO_SUCH_FILE', async () => {
    await expect(writeSmallTable(path, ['a', 'b'], [[1]])).rejects.toThrow('row 1 has 1 of 2 cells');
    const missing = readSmallTable(join(folder, 'nothing.csv'));
    await expect(missing).rejects.toMatchObject({ name: 'UsageError', code: 'NO_SUCH_FILE' });
  });
});

test('neutralised text comes back exactly', () => {
  fc.assert(
    fc.property(fc.string(), (text) => {
      expect(originalText(neutralText(text))).toBe(text);
    }),
  );
  for (const text of ["'=x", "''-1", "'plain", '-']) expect(originalText(neutralText(text))).toBe(text);
});
