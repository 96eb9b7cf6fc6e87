import { createHash } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync, truncateSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { assembleTable } from '../../src/engine/assemble-table.ts';
import { assembleCases } from '../../src/results/assemble.ts';
import { findParts, PartWriter } from '../../src/results/part-files.ts';
import { column, randomNumbers } from '../results/sample-table.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-table-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

// Wide enough for threads to be worth starting: over 100 MB of parts.
const columns = Array.from({ length: 60 }, (_, c) => column(`figure_${c}`));
const random = randomNumbers(5);
const values = columns.map(() => Float64Array.from({ length: 16_000 }, () => random()));
const writer = new PartWriter(join(folder, 'parts'), columns);
for (let part = 0; part < 8; part++) {
  writer.begin(part, part * 16_000);
  writer.append({ rows: 16_000 - part, values });
  writer.finish();
}
const parts = () => findParts(join(folder, 'parts'), columns).finished;
const hash = (name: string) =>
  createHash('sha256')
    .update(readFileSync(join(folder, name)))
    .digest('hex');

describe('the table put together', () => {
  it('has the same bytes from threads as from this one', async () => {
    expect(parts().reduce((sum, { bytes }) => sum + bytes, 0)).toBeGreaterThan(100e6);
    const here = await assembleCases(folder, parts(), columns);
    const before = [hash('cases.csv'), hash('cases.parquet')];
    const threads = await assembleTable(folder, parts(), columns, 3);
    expect(threads).toEqual(here);
    expect([hash('cases.csv'), hash('cases.parquet')]).toEqual(before);
  });

  it('is put together all the same when workers die', async () => {
    const before = [hash('cases.csv'), hash('cases.parquet')];
    const dying = new URL('./dying-copy-worker.mjs', import.meta.url).href;
    await assembleTable(folder, parts(), columns, 2, dying);
    expect([hash('cases.csv'), hash('cases.parquet')]).toEqual(before);
  });

  it('a part altered meanwhile is told by number and nothing new is left', async () => {
    const found = parts();
    const before = hash('cases.csv');
    truncateSync(found[5].path, found[5].bytes - 1000);
    await expect(assembleTable(folder, found, columns, 2)).rejects.toMatchObject({
      code: 'READ_FAILED',
      message: expect.stringContaining('Part 5'),
    });
    expect(hash('cases.csv')).toBe(before);
  });
});
