import { describe, expect, test } from 'vitest';
import { largestBlock } from '../../src/results/block.ts';
import { csvText, labelText } from '../../src/results/cells.ts';
import { CsvBlockWriter } from '../../src/results/csv-block.ts';
import { parsed } from './reading.ts';
import { awkwardLabels, column, mixedBlock, mixedColumns, randomNumbers } from './sample-table.ts';

function decoded(writer: CsvBlockWriter): string {
  return new TextDecoder().decode(writer.bytes());
}

describe('a block as CSV', () => {
  test('is read by fast-csv with every number equal to seven digits and every text as it was', async () => {
    const writer = new CsvBlockWriter(mixedColumns);
    const blocks = [mixedBlock(0, 3000), mixedBlock(3000, 1), mixedBlock(3001, 700)];
    for (const block of blocks) writer.append(block);
    expect(writer.rows).toBe(3701);
    const [header, ...rows] = await parsed(new TextDecoder().decode(writer.header()) + decoded(writer));
    expect(header).toEqual(mixedColumns.map(({ name }) => name));
    expect(rows).toHaveLength(3701);
    let row = 0;
    for (const block of blocks) {
      for (let i = 0; i < block.rows; i++, row++) {
        mixedColumns.forEach((of, c) => {
          const value = block.values[c][i];
          const cell = rows[row][c];
          if (Number.isNaN(value)) expect(cell).toBe('');
          else if (of.figure.dimension === 'count') expect(cell).toBe(String(value));
          else if (of.figure.kind === 'number') {
            expect(Number(cell)).toBe(Number((value * of.factor).toPrecision(7)) + 0);
          } else expect(cell.replace(/^'/, '')).toBe(labelText(of, value));
        });
      }
    }
  });

  test('is the same whether values are remembered or not, and however many come before', () => {
    const columns = [column('a'), column('b', 'number', 'angle')];
    const random = randomNumbers(3);
    const rows = largestBlock;
    // Far more distinct values than are remembered, then few, then all different.
    const kinds = [6000, 3, Number.POSITIVE_INFINITY, 40];
    const blocks = kinds.map((distinct) => ({
      rows,
      values: columns.map(() =>
        Float64Array.from({ length: rows }, () =>
          distinct === Number.POSITIVE_INFINITY ? random() : Math.floor(random() * distinct) / 7,
        ),
      ),
    }));
    const whole = new CsvBlockWriter(columns);
    let apart = '';
    for (const block of blocks) {
      whole.append(block);
      const fresh = new CsvBlockWriter(columns);
      fresh.append(block);
      apart += decoded(fresh);
    }
    expect(decoded(whole)).toBe(apart);
    // The expected text is put together cell by cell with the language's own formatting.
    const expected = blocks.flatMap(({ values: [a, b] }) =>
      Array.from(
        a,
        (v, i) => `${Number(v.toPrecision(7))},${Number((b[i] * columns[1].factor).toPrecision(7))}\n`,
      ),
    );
    expect(decoded(whole)).toBe(expected.join(''));
  });

  test('has empty cells for NaN of any bits, for infinities and for a product that overflows', () => {
    const columns = [column('a'), column('m', 'number', 'fraction_of_mac'), column('f', 'yes_no')];
    const oddNan = new Float64Array(new Int32Array([-1, -1]).buffer)[0];
    const writer = new CsvBlockWriter(columns);
    const values = [
      Float64Array.of(Number.NaN, oddNan, Number.POSITIVE_INFINITY, 1),
      Float64Array.of(Number.NEGATIVE_INFINITY, 0.05, oddNan, 1e307),
      Float64Array.of(Number.NaN, 1, 0, oddNan),
    ];
    new Uint32Array(values[0].buffer).fill(0xffffffff, 2, 4);
    writer.append({ rows: 4, values });
    expect(decoded(writer)).toBe(',,\n,5,yes\n,,no\n1,,\n');
  });

  test('starts afresh after reset and takes blocks that are views of larger arrays', () => {
    const columns = [column('a')];
    const writer = new CsvBlockWriter(columns);
    const all = Float64Array.of(1, 2, 3, 4, 5);
    writer.append({ rows: 2, values: [all.subarray(1)] });
    expect(decoded(writer)).toBe('2\n3\n');
    writer.reset();
    expect([writer.rows, writer.bytes().length]).toEqual([0, 0]);
    writer.append({ rows: 1, values: [all.subarray(3)] });
    expect(decoded(writer)).toBe('4\n');
  });

  test('writes thousands of long flag sets, forgetting old ones, without mixing them up', async () => {
    const labels = Array.from({ length: 30 }, (_, k) => `requirement ${k} ${'long '.repeat(12)}ü`);
    const columns = [column('fails', 'flags', 'ratio', labels), column('n', 'number', 'count')];
    const writer = new CsvBlockWriter(columns);
    const random = randomNumbers(5);
    const sets = Float64Array.from({ length: 9000 }, () => Math.floor(random() * 2 ** 30));
    writer.append({ rows: 9000, values: [sets, Float64Array.from(sets, (_, i) => i)] });
    const rows = decoded(writer).split('\n');
    expect(rows.pop()).toBe('');
    expect(rows).toEqual(Array.from(sets, (set, i) => `${labelText(columns[0], set)},${i}`));
  });

  test('refuses blocks that do not fit the table', () => {
    const writer = new CsvBlockWriter([column('a'), column('b', 'choice', 'ratio', ['x'])]);
    const one = Float64Array.of(1);
    expect(() => writer.append({ rows: 1, values: [one] })).toThrow('a block of 1 columns for a table of 2');
    expect(() => writer.append({ rows: 2, values: [one, one] })).toThrow('column a holds 1 of 2 rows');
    expect(() => writer.append({ rows: largestBlock + 1, values: [one, one] })).toThrow('0 to 16384');
    expect(() => writer.append({ rows: 1, values: [one, one] })).toThrow('b has no label 1');
  });
});

describe('a text cell', () => {
  // Quoting as RFC 4180, section 2; what spreadsheets execute as OWASP, "CSV Injection" (both from memory).
  test.each([
    ['plain', 'plain'],
    ['a,b', '"a,b"'],
    ['say "so"', '"say ""so"""'],
    ['two\nlines', '"two\nlines"'],
    ['=1+2', "'=1+2"],
    ['+1', "'+1"],
    ['-1', "'-1"],
    ['@x', "'@x"],
    ['\tx', "'\tx"],
    ['\rx', '"\'\rx"'],
    ['a=b', 'a=b'],
  ])('%j is written %j', (text, written) => {
    expect(csvText(text)).toBe(written);
  });

  test('of awkward labels never begins with a sign that a spreadsheet executes', () => {
    for (const label of awkwardLabels) expect(csvText(label).replace(/^"/, '')).not.toMatch(/^[=+\-@\t\r]/);
  });
});
