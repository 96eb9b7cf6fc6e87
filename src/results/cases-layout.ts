import { closeSync, openSync, readSync } from 'node:fs';
import type { TableColumn } from '../figures/figure.ts';
import { CsvBlockWriter } from './csv-block.ts';
import { readFault } from './machine-fault.ts';
import { type GroupRecord, parquetFooter, parquetMagic } from './parquet-schema.ts';
import type { BlockRecord, PartInfo } from './part-files.ts';

/** A stretch of a part's bytes and the place in a cases file where it belongs. */
export interface Piece {
  /** First byte in the part. */
  readonly from: number;
  readonly bytes: number;
  /** Index into the layout's files. */
  readonly file: number;
  /** First byte in that file. */
  readonly at: number;
}

/** One cases file to be: its bytes are the head, the pieces of parts, and the foot. */
export interface CasesFilePlan {
  readonly name: string;
  /** Data rows, without the header. */
  readonly rows: number;
  readonly bytes: number;
  readonly head: Uint8Array;
  readonly foot: Uint8Array;
}

/** Where every byte of every part goes; known before any is copied, so parts can be copied in any order. */
export interface CasesLayout {
  readonly csv: readonly CasesFilePlan[];
  readonly parquet: readonly CasesFilePlan[];
  /** Pieces of each part in the order of its bytes. Files are numbered through `csv`, then `parquet`. */
  readonly pieces: readonly (readonly Piece[])[];
}

interface OpenFile {
  rows: number;
  size: number;
  readonly groups: { at: number; group: GroupRecord }[];
}

interface LoosePiece {
  readonly kind: 'csv' | 'parquet';
  readonly from: number;
  readonly bytes: number;
  readonly file: number;
  readonly at: number;
}

/** Files of one kind, filled from the front. */
class FileRow {
  readonly files: OpenFile[] = [];
  constructor(private readonly head: Uint8Array) {
    this.turn();
  }

  get last(): OpenFile {
    return this.files[this.files.length - 1];
  }

  turn(): void {
    this.files.push({ rows: 0, size: this.head.length, groups: [] });
  }

  place(bytes: number, rows: number): { file: number; at: number } {
    const place = { file: this.files.length - 1, at: this.last.size };
    this.last.size += bytes;
    this.last.rows += rows;
    return place;
  }
}

/**
 * Lays parts 0, 1, 2 … out into cases files: CSV files are cut at exactly `limit` rows, Parquet files
 * at the last block that ends before it, so the layout depends on the blocks alone and not on how
 * parts held them.
 */
export function layOutCases(
  parts: readonly PartInfo[],
  columns: readonly TableColumn[],
  limit: number,
): CasesLayout {
  const csvHead = new CsvBlockWriter(columns).header();
  const csv = new FileRow(csvHead);
  const parquet = new FileRow(parquetMagic);
  const loose = parts.map((part) => piecesOf(part, csv, parquet, limit));
  const numbered = parts.reduce((sum, { rows }) => sum + rows, 0) > limit;
  return {
    csv: csv.files.map(({ rows, size }, k) => ({
      name: fileName(k, 'csv', numbered),
      rows,
      bytes: size,
      head: csvHead,
      foot: new Uint8Array(0),
    })),
    parquet: parquet.files.map(({ rows, size, groups }, k) => {
      const foot = parquetFooter(columns, groups);
      const name = fileName(k, 'parquet', numbered);
      return { name, rows, bytes: size + foot.length, head: parquetMagic, foot };
    }),
    pieces: loose.map((pieces) =>
      pieces.map(({ kind, file, ...rest }) => ({
        ...rest,
        file: kind === 'csv' ? file : csv.files.length + file,
      })),
    ),
  };
}

function fileName(index: number, ending: string, numbered: boolean): string {
  return numbered ? `cases-${String(index + 1).padStart(4, '0')}.${ending}` : `cases.${ending}`;
}

function piecesOf(part: PartInfo, csv: FileRow, parquet: FileRow, limit: number): LoosePiece[] {
  const pieces: LoosePiece[] = [];
  let from = 0;
  for (const block of part.blocks) {
    for (const { bytes, rows } of csvStretches(part, from, block, csv.last.rows, limit)) {
      if (csv.last.rows === limit) csv.turn();
      pieces.push({ kind: 'csv', from, bytes, ...csv.place(bytes, rows) });
      from += bytes;
    }
    const { group } = block;
    if (parquet.last.rows > 0 && parquet.last.rows + group.rows > limit) parquet.turn();
    parquet.last.groups.push({ at: parquet.last.size, group });
    pieces.push({ kind: 'parquet', from, bytes: group.bytes, ...parquet.place(group.bytes, group.rows) });
    from += group.bytes;
  }
  return pieces;
}

interface Stretch {
  readonly bytes: number;
  readonly rows: number;
}

/** The CSV of a block as stretches that end where a file is full; one stretch when it fits. */
function csvStretches(
  part: PartInfo,
  from: number,
  { rows, csvBytes }: BlockRecord,
  rowsBefore: number,
  limit: number,
): Stretch[] {
  const room = limit - (rowsBefore % limit);
  if (rows <= room) return [{ bytes: csvBytes, rows }];
  const text = readStretch(part.path, from, csvBytes);
  const stretches: Stretch[] = [];
  let [start, counted, wanted] = [0, 0, room];
  let quoted = false;
  // Walk over the line ends; those inside quotes are text.
  for (let i = 0; i < text.length; i++) {
    if (text[i] === quote) quoted = !quoted;
    if (text[i] !== lineFeed || quoted) continue;
    counted++;
    if (counted < wanted) continue;
    stretches.push({ bytes: i + 1 - start, rows: counted });
    [start, counted, wanted] = [i + 1, 0, limit];
  }
  if (start < text.length) stretches.push({ bytes: text.length - start, rows: counted });
  return stretches;
}

const quote = 34;
const lineFeed = 10;

function readStretch(path: string, from: number, bytes: number): Uint8Array {
  let handle: number | undefined;
  try {
    handle = openSync(path, 'r');
    const stretch = new Uint8Array(bytes);
    const got = readSync(handle, stretch, 0, bytes, from);
    return stretch.subarray(0, got);
  } catch (error) {
    throw readFault(error, path);
  } finally {
    if (handle !== undefined) closeSync(handle);
  }
}
