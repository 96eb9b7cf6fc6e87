import { statfsSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { CsvBlockWriter } from '../../src/results/csv-block.ts';
import { bytesNeeded, bytesPerRowEstimate, checkRoom, freeBytes, sizeText } from '../../src/results/disk.ts';
import { ParquetBlockWriter } from '../../src/results/parquet-block.ts';
import { mixedBlock, mixedColumns } from './sample-table.ts';

describe('room on the disk', () => {
  test('is estimated from a block so that a longer run needs no more than said', () => {
    const perRow = bytesPerRowEstimate(mixedColumns, mixedBlock(0, 4000));
    const csv = new CsvBlockWriter(mixedColumns);
    const parquet = new ParquetBlockWriter(mixedColumns);
    for (let b = 0; b < 5; b++) {
      csv.append(mixedBlock(4000 * (b + 1), 4000));
      parquet.append(mixedBlock(4000 * (b + 1), 4000));
    }
    const written = csv.bytes().length + parquet.bytes().length;
    expect(bytesNeeded(20_000, perRow)).toBeGreaterThan(2 * written);
    expect(20_000 * (perRow.csv + perRow.parquet)).toBeGreaterThan(0.95 * written);
    expect(20_000 * (perRow.csv + perRow.parquet)).toBeLessThan(1.05 * written);
  });

  test('free is what the file system says, also for a folder yet to be made', () => {
    const { bavail, bsize, blocks } = statfsSync(tmpdir());
    const free = freeBytes(join(tmpdir(), 'not', 'yet', 'made'));
    // Others may write meanwhile: a hundredth of the disk is allowed for.
    expect(Math.abs(free - bavail * bsize)).toBeLessThanOrEqual((blocks * bsize) / 100);
  });

  test('too small is DISK_TOO_SMALL with both numbers', () => {
    const wanted = {
      name: 'MachineError',
      code: 'DISK_TOO_SMALL',
      message: expect.stringMatching(/12\.3 GB.*750 MB/),
    };
    expect(() => checkRoom('out', 12.3e9, 750e6)).toThrow(expect.objectContaining(wanted));
    expect(() => checkRoom('out', 1e21)).toThrow(expect.objectContaining({ code: 'DISK_TOO_SMALL' }));
    checkRoom('out', 750e6, 750e6);
    checkRoom(tmpdir(), 1);
  });

  test('is told in decimal units', () => {
    expect([999e6, 1e9, 12.34e9, 1].map(sizeText)).toEqual(['999 MB', '1.0 GB', '12.3 GB', '1 MB']);
  });
});
