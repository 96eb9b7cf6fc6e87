import { DuckDBInstance } from '@duckdb/node-api';
import { parseString } from 'fast-csv';
import { parquetReadObjects } from 'hyparquet';
import type { TableColumn } from '../../src/figures/figure.ts';
import { labelText } from '../../src/results/cells.ts';

/** Reads CSV with fast-csv, an implementation that is not ours. */
export function parsed(text: string): Promise<string[][]> {
  return new Promise((resolve, reject) => {
    const rows: string[][] = [];
    parseString<string[], string[]>(text)
      .on('data', (row: string[]) => rows.push(row))
      .on('error', reject)
      .on('end', () => resolve(rows));
  });
}

/** Reads a whole Parquet file with hyparquet. */
export function readByHyparquet(bytes: Uint8Array): Promise<Record<string, unknown>[]> {
  const file = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength) as ArrayBuffer;
  return parquetReadObjects({ file });
}

/** Reads Parquet files with DuckDB, in the order of their rows. */
export async function readByDuckDB(paths: readonly string[]): Promise<Record<string, unknown>[]> {
  const database = await DuckDBInstance.create(':memory:', {
    threads: '1',
    autoinstall_known_extensions: 'false',
    autoload_known_extensions: 'false',
  });
  const connection = await database.connect();
  try {
    const list = paths.map((path) => `'${path.replaceAll("'", "''")}'`).join(', ');
    const reader = await connection.runAndReadAll(`SELECT * FROM read_parquet([${list}])`);
    return reader.getRowObjectsJS();
  } finally {
    connection.closeSync();
    database.closeSync();
  }
}

/** What a Parquet reader must give for an SI value of a column; the bit set of flags apart. */
export function storedCell(column: TableColumn, value: number): unknown {
  if (Number.isNaN(value)) return null;
  if (column.figure.kind === 'number') return value * column.factor;
  if (column.figure.kind === 'yes_no') return value !== 0;
  return labelText(column, value);
}
