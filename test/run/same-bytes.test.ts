import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import {
  combinations,
  hashesOfTable,
  manyCombinations,
  runHere,
  temporaryFolder,
  writeStudy,
} from './run-folder.ts';

it('the table has the same bytes for any number of workers and any part size', async () => {
  const folder = temporaryFolder();
  const study = writeStudy(folder, manyCombinations);
  const hashes: Record<string, string>[] = [];
  for (const [workers, partSize] of [
    [1, 16_384],
    [2, 32_768],
    [3, 50_000],
  ]) {
    const out = join(folder, `${workers}-${partSize}`);
    const { outcome, told } = await runHere(study, out, { workers, partSize });
    expect(outcome).toBe('finished');
    const blocksPerPart = Math.ceil(partSize / 16_384);
    expect(told.progress).toHaveLength(Math.ceil(Math.ceil(combinations / 16_384) / blocksPerPart));
    expect(told.progress.at(-1)).toBe(combinations);
    hashes.push(hashesOfTable(join(out, 'study')));
  }
  expect(Object.keys(hashes[0])).toEqual(['cases.csv', 'cases.parquet']);
  for (const other of hashes.slice(1)) expect(other).toEqual(hashes[0]);

  const lines = readFileSync(join(folder, '1-16384', 'study', 'cases.csv'), 'utf8')
    .trimEnd()
    .split(/\r?\n/);
  const skipped = 15 * 19 * 2 * 7;
  expect(lines).toHaveLength(1 + combinations - skipped);
  const numbers = lines.slice(1).map((line) => Number(line.slice(0, line.indexOf(','))));
  expect(numbers.every((number, k) => k === 0 || number > numbers[k - 1])).toBe(true);
  expect(numbers.at(-1)).toBeLessThan(combinations);
});
