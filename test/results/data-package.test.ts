import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { assembleCases } from '../../src/results/assemble.ts';
import { type DataPackage, writeDataPackage } from '../../src/results/data-package.ts';
import { findParts, PartWriter } from '../../src/results/part-files.ts';
import { writeSmallTable } from '../../src/results/small-table.ts';
import { parsed, readByHyparquet } from './reading.ts';
import { awkwardLabels, column, mixedBlock, mixedColumns } from './sample-table.ts';

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-package-'));
afterAll(() => rmSync(folder, { recursive: true }));

async function written(rowsPerFile: number): Promise<DataPackage> {
  const writer = new PartWriter(join(folder, 'parts'), mixedColumns);
  writer.begin(0, 0);
  for (const first of [0, 300, 600]) writer.append(mixedBlock(first, 300));
  writer.finish();
  const { finished } = findParts(join(folder, 'parts'), mixedColumns);
  const cases = await assembleCases(folder, finished, mixedColumns, { rowsPerFile });
  const shortlist = [column('rank', 'number', 'count'), ...mixedColumns];
  await writeSmallTable(
    join(folder, 'shortlist.csv'),
    shortlist.map(({ name }) => name),
    [],
  );
  writeDataPackage(folder, {
    title: 'Übung: tourer, wing & tail',
    version: '0.1.0',
    created: '2026-01-01T10:00:00.000Z',
    columns: mixedColumns,
    cases,
    shortlist,
  });
  return JSON.parse(readFileSync(join(folder, 'datapackage.json'), 'utf8')) as DataPackage;
}

describe('datapackage.json', () => {
  test('lists every table with the very columns that stand in the files', async () => {
    const { resources, name } = await written(450);
    expect(name).toBe('u-bung-tourer-wing-tail');
    expect(resources.map(({ path }) => path)).toEqual([
      'cases-0001.csv',
      'cases-0002.csv',
      'cases-0001.parquet',
      'cases-0002.parquet',
      'cases-0003.parquet',
      'shortlist.csv',
    ]);
    expect(new Set(resources.map((resource) => resource.name)).size).toBe(resources.length);
    for (const resource of resources) {
      // Names as the standard wants them: lower case, digits, . _ - (from memory).
      expect(resource.name).toMatch(/^[a-z0-9._-]+$/);
      const bytes = readFileSync(join(folder, resource.path));
      if (resource.path.startsWith('cases')) expect(resource.bytes).toBe(bytes.length);
      const header =
        resource.format === 'csv'
          ? (await parsed(bytes.toString()))[0]
          : Object.keys((await readByHyparquet(bytes))[0]);
      expect(resource.schema.fields.map((field) => field.name)).toEqual(header);
    }
  });

  test('gives type, unit, meaning, formula and source, and texts as they are in the cells', async () => {
    const { resources } = await written(10_000);
    const [csv, parquet] = resources;
    const field = (name: string, of = csv) => of.schema.fields.find((each) => each.name === name);
    expect(csv.schema.missingValues).toEqual(['']);
    expect(csv.schema.primaryKey).toBe('combination');
    expect(field('combination')).toMatchObject({ type: 'integer', title: 'Combination' });
    expect(field('wing_span_m')).toEqual({
      name: 'wing_span_m',
      title: 'Wing span',
      type: 'number',
      description: 'What wing_span means.',
      unit: 'm',
      symbol: 'wing_span',
      formula: 'given',
      source: 'invented',
    });
    expect(field('feasible')).toMatchObject({ type: 'boolean', trueValues: ['yes'], falseValues: ['no'] });
    const [, ...body] = await parsed(readFileSync(join(folder, 'cases.csv'), 'utf8'));
    const allowed = field('fails_first')?.constraints?.enum ?? [];
    const at = csv.schema.fields.findIndex(({ name }) => name === 'fails_first');
    const seen = new Set(body.map((row) => row[at]).filter((text) => text !== ''));
    expect([...seen].sort()).toEqual([...allowed].sort());
    expect(field('fails_first', parquet)?.constraints?.enum).toEqual(awkwardLabels);
    expect(field('fails_bits', parquet)).toMatchObject({
      type: 'integer',
      description: expect.stringContaining('16: plain'),
    });
  });
});
