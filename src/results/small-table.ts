import { readFileSync } from 'node:fs';
import { parseString, writeToBuffer } from 'fast-csv';
import { UsageError } from '../errors.ts';
import type { TableColumn } from '../figures/figure.ts';
import { writeFileAtomically } from './atomic-file.ts';
import { labelText, neutralText, originalText } from './cells.ts';
import { longestNumber, writeCount, writeNumber } from './csv-number.ts';
import { readFault } from './machine-fault.ts';

/** A cell: text, a number in the column's unit, yes or no, or null when empty. */
export type SmallCell = string | number | boolean | null;

/**
 * Writes a table of some rows as CSV, whole or not at all, in the same form as the cases: seven
 * significant digits (safe integers with all of theirs), `yes` and `no`, LF, texts neutralised.
 */
export async function writeSmallTable(
  path: string,
  header: readonly string[],
  rows: readonly (readonly SmallCell[])[],
): Promise<void> {
  const ragged = rows.findIndex((row) => row.length !== header.length);
  if (ragged >= 0)
    throw new RangeError(`row ${ragged + 1} has ${rows[ragged].length} of ${header.length} cells`);
  const lines = [header, ...rows].map((row) => row.map(cellText));
  const table = await writeToBuffer(lines, { rowDelimiter: '\n', includeEndRowDelimiter: true });
  writeFileAtomically(path, table);
}

function cellText(cell: SmallCell): string {
  if (cell === null) return '';
  if (typeof cell === 'string') return neutralText(cell);
  if (typeof cell === 'boolean') return cell ? 'yes' : 'no';
  return Number.isFinite(cell) ? numberText(cell) : '';
}

function numberText(value: number): string {
  const bytes = new Uint8Array(longestNumber);
  const end = Number.isSafeInteger(value) ? writeCount(value, bytes, 0) : writeNumber(value, bytes, 0);
  return new TextDecoder().decode(bytes.subarray(0, end));
}

/** One row of SI values, one per column, as cells in the columns' units. */
export function smallCells(columns: readonly TableColumn[], values: ArrayLike<number>): SmallCell[] {
  return columns.map((column, c) => {
    const value = values[c];
    if (!Number.isFinite(value)) return null;
    if (column.figure.kind === 'number') return value * column.factor;
    return column.figure.kind === 'yes_no' ? value !== 0 : labelText(column, value);
  });
}

export interface SmallTable {
  readonly header: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** Reads a CSV table; texts come back as they were before they were neutralised. */
export async function readSmallTable(path: string): Promise<SmallTable> {
  const [header = [], ...rows] = await parseTable(new TextDecoder().decode(readTableBytes(path)));
  return { header, rows };
}

/** Bytes of a table's file. Throws UsageError when it is not there. */
export function readTableBytes(path: string): Uint8Array {
  try {
    return readFileSync(path);
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? error.code : undefined;
    if (code !== 'ENOENT' && code !== 'EISDIR') throw readFault(error, path);
    const why = code === 'ENOENT' ? 'is not there' : 'is a folder';
    throw new UsageError('NO_SUCH_FILE', `${path} ${why}.`, 'Check the name.');
  }
}

/**
 * Rows of a CSV text, an empty line being a row without cells. Rejects with fast-csv's own error where
 * quotes do not match.
 */
export async function parseTable(text: string): Promise<string[][]> {
  const rows: string[][] = [];
  await new Promise<void>((resolve, reject) => {
    parseString<string[], string[]>(text)
      .on('data', (row: string[]) => rows.push(row.map(originalText)))
      .on('error', reject)
      .on('end', () => resolve());
  });
  return rows;
}
