import { existsSync, statfsSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { MachineError } from '../errors.ts';
import type { TableColumn } from '../figures/figure.ts';
import type { Block } from './block.ts';
import { CsvBlockWriter } from './csv-block.ts';
import { readFault } from './machine-fault.ts';
import { ParquetBlockWriter } from './parquet-block.ts';

/** Room kept free for records, charts and the file system's own needs. */
const reserve = 32e6;
/** A sample may have shorter numbers than the rest. */
const allowance = 1.1;

export interface BytesPerRow {
  readonly csv: number;
  readonly parquet: number;
}

/** Bytes of a row in either file, measured on a block of real rows. */
export function bytesPerRowEstimate(columns: readonly TableColumn[], sample: Block): BytesPerRow {
  if (sample.rows === 0) throw new RangeError('a sample without rows');
  const csv = new CsvBlockWriter(columns);
  csv.append(sample);
  const parquet = new ParquetBlockWriter(columns).append(sample);
  return { csv: csv.bytes().length / sample.rows, parquet: parquet.bytes / sample.rows };
}

/** Room that a run of so many rows needs at its fullest: parts and cases files side by side. */
export function bytesNeeded(rows: number, { csv, parquet }: BytesPerRow): number {
  return Math.ceil(2 * allowance * rows * (csv + parquet) + reserve);
}

/** Bytes free to this user on the disk that holds a folder, or will hold it. */
export function freeBytes(folder: string): number {
  let existing = resolve(folder);
  while (!existsSync(existing) && dirname(existing) !== existing) existing = dirname(existing);
  try {
    const { bavail, bsize } = statfsSync(existing);
    return bavail * bsize;
  } catch (error) {
    throw readFault(error, existing);
  }
}

/** DISK_TOO_SMALL, with both numbers, when less is free than needed. */
export function checkRoom(folder: string, needed: number, free: number = freeBytes(folder)): void {
  if (needed <= free) return;
  throw new MachineError(
    'DISK_TOO_SMALL',
    `The run needs about ${sizeText(needed)} in ${folder}, and ${sizeText(free)} are free.`,
    'Make room, choose a folder on another disk, or vary fewer numbers.',
  );
}

/** Decimal megabytes or gigabytes, as disks are sold. */
export function sizeText(bytes: number): string {
  if (bytes >= 1e9) return `${(bytes / 1e9).toFixed(1)} GB`;
  return `${Math.ceil(bytes / 1e6)} MB`;
}
