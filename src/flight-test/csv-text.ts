/** A CSV text as rows of cells that know where they stand. */
import { DataError, type DataFaultCode } from '../errors.ts';
import { parseTable, readTableBytes } from '../results/small-table.ts';

/** Where a cell begins, counting from 1, and how much of that line it takes. */
export interface Place {
  readonly line: number;
  readonly column: number;
  readonly length: number;
}

export interface Cell extends Place {
  /** Without the blanks round it. */
  readonly text: string;
}

export interface CsvText {
  readonly file: string;
  /** Lines end in LF, whatever they ended in. */
  readonly text: string;
  /** Rows that hold something; the first is the header. */
  readonly rows: readonly (readonly Cell[])[];
}

/** Reads a table of data. Throws UsageError when it is not there, DataError when it is no CSV. */
export async function readCsv(file: string): Promise<CsvText> {
  const text = decode(readTableBytes(file), file).replaceAll(/\r\n?/g, '\n');
  const places = placesOf(text);
  const rows = await parse(text, file, places);
  const cells = rows.map((row, r) =>
    row.map(
      (cell, c): Cell => ({ text: cell.trim(), ...(places[r]?.[c] ?? { line: 1, column: 1, length: 1 }) }),
    ),
  );
  return { file, text, rows: cells.filter((row) => row.some((cell) => cell.text !== '')) };
}

function decode(bytes: Uint8Array, file: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw fileFault(file, 'NOT_UTF8', 'The table is not UTF-8 text.', 'Save it as CSV in UTF-8.');
  }
}

function fileFault(file: string, code: DataFaultCode, found: string, remedy: string): DataError {
  return new DataError(file, '', [{ code, line: 1, column: 1, length: 1, found, remedy }]);
}

async function parse(text: string, file: string, places: readonly (readonly Place[])[]): Promise<string[][]> {
  let rows: string[][];
  try {
    rows = await parseTable(text);
  } catch {
    // The parser tells the rest of the text, not the place: the row from which on quotes do not match.
    const place = places.find((row) => row.some((cell) => cell.length < 0))?.[0] ?? places.at(-1)?.[0];
    const { line = 1, column = 1 } = place ?? {};
    const found = 'The quotes of this row do not match.';
    const remedy = 'Put quotes round a whole cell, and write a quote inside as two.';
    throw new DataError(file, text, [{ code: 'UNREADABLE_CSV', line, column, length: 1, found, remedy }]);
  }
  return rows;
}

/** A cell: in quotes that may hold commas and line ends, or plain. */
const cellPattern = /[^\S\n]*"(?:[^"]|"")*"[^\S\n]*(?=[,\n]|$)|[^,\n]*/y;

/** Places of the cells of each row. A cell whose quotes do not match has the length −1. */
function placesOf(text: string): Place[][] {
  const rows: Place[][] = [];
  let row: Place[] = [];
  let line = 1;
  let lineStart = 0;
  let at = 0;
  while (at < text.length) {
    cellPattern.lastIndex = at;
    const cell = cellPattern.exec(text)?.[0] ?? '';
    const unmatched = /^\s*"/.test(cell) && !/^\s*"(?:[^"]|"")*"\s*$/.test(cell);
    const shown = cell.split('\n', 1)[0]!;
    row.push({ line, column: at - lineStart + 1, length: unmatched ? -1 : Math.max(1, shown.length) });
    at += cell.length;
    const breaks = cell.split('\n').length - 1;
    if (breaks > 0) {
      line += breaks;
      lineStart = at - cell.length + cell.lastIndexOf('\n') + 1;
    }
    if (text[at] === ',') {
      at++;
      if (at < text.length && text[at] !== '\n') continue;
      row.push({ line, column: at - lineStart + 1, length: 1 });
    }
    at++;
    line++;
    lineStart = at;
    rows.push(row);
    row = [];
  }
  return rows;
}
