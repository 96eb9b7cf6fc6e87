import { createHash, type Hash } from 'node:crypto';
import { closeSync, mkdirSync, openSync, readdirSync, readSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import type { TableColumn } from '../figures/figure.ts';
import { AtomicFile } from './atomic-file.ts';
import type { Block } from './block.ts';
import { CsvBlockWriter } from './csv-block.ts';
import { readFault, writeFault } from './machine-fault.ts';
import { ParquetBlockWriter } from './parquet-block.ts';
import type { GroupRecord } from './parquet-schema.ts';

/*
 * A part is one file, so that it is there or it is not, with one sync:
 *   for each block: its rows as CSV, then its Parquet row group
 *   JSON of `PartTrailer`, UTF-8
 *   SHA-256 of all bytes so far (32 bytes)
 *   length of the JSON (4 bytes, little-endian), and the mark `aftpart1` (8 bytes)
 */
const mark = new TextEncoder().encode('aftpart1');
const hashBytes = 32;
const endBytes = hashBytes + 4 + mark.length;
const suffix = '.part';

export interface BlockRecord {
  readonly rows: number;
  readonly csvBytes: number;
  readonly group: GroupRecord;
}

interface PartTrailer {
  readonly part: number;
  readonly firstCombination: number;
  readonly rows: number;
  /** Hash of the table's columns: parts of another table are not taken for finished ones. */
  readonly table: string;
  readonly blocks: readonly BlockRecord[];
}

/** A finished part on disk. */
export interface PartInfo extends PartTrailer {
  readonly path: string;
  /** Bytes of the whole file. */
  readonly bytes: number;
}

export function partPath(folder: string, part: number): string {
  return join(folder, `${String(part).padStart(6, '0')}${suffix}`);
}

/** Says which table parts belong to: names, kinds, factors and labels of its columns. */
export function tableHash(columns: readonly TableColumn[]): string {
  const said = columns.map(({ name, factor, figure }) => [name, factor, figure.kind, figure.labels ?? []]);
  return createHash('sha256').update(JSON.stringify(said)).digest('hex').slice(0, 16);
}

/** Writes parts, one after the other, into a folder; one per worker thread. */
export class PartWriter {
  readonly #folder: string;
  readonly #csv: CsvBlockWriter;
  readonly #parquet: ParquetBlockWriter;
  readonly #table: string;
  #file: AtomicFile | undefined;
  #hash: Hash = createHash('sha256');
  #part = 0;
  #firstCombination = 0;
  #blocks: BlockRecord[] = [];

  /** Makes the folder when it is not there. */
  constructor(folder: string, columns: readonly TableColumn[]) {
    this.#folder = folder;
    this.#csv = new CsvBlockWriter(columns);
    this.#parquet = new ParquetBlockWriter(columns);
    this.#table = tableHash(columns);
    makeFolder(folder);
  }

  begin(part: number, firstCombination: number): void {
    this.abandon();
    this.#file = new AtomicFile(partPath(this.#folder, part));
    this.#hash = createHash('sha256');
    this.#part = part;
    this.#firstCombination = firstCombination;
    this.#blocks = [];
  }

  /** A block without rows leaves nothing behind. */
  append(block: Block): void {
    if (block.rows === 0) return;
    this.#csv.reset();
    this.#parquet.reset();
    this.#csv.append(block);
    const group = this.#parquet.append(block);
    const csv = this.#csv.bytes();
    this.#write(csv);
    this.#write(this.#parquet.bytes());
    this.#blocks.push({ rows: block.rows, csvBytes: csv.length, group });
  }

  /** Puts the part in its place, synced. */
  finish(): PartInfo {
    const file = this.#begun();
    const trailer: PartTrailer = {
      part: this.#part,
      firstCombination: this.#firstCombination,
      rows: this.#blocks.reduce((sum, { rows }) => sum + rows, 0),
      table: this.#table,
      blocks: this.#blocks,
    };
    const text = new TextEncoder().encode(JSON.stringify(trailer));
    this.#write(text);
    const end = new Uint8Array(endBytes);
    end.set(this.#hash.digest());
    new DataView(end.buffer).setUint32(hashBytes, text.length, true);
    end.set(mark, hashBytes + 4);
    file.write(end);
    file.commit();
    this.#file = undefined;
    return { ...trailer, path: file.path, bytes: file.size };
  }

  /** Drops a part begun and not finished. */
  abandon(): void {
    this.#file?.abandon();
    this.#file = undefined;
  }

  #write(bytes: Uint8Array): void {
    this.#begun().write(bytes);
    this.#hash.update(bytes);
  }

  #begun(): AtomicFile {
    if (this.#file === undefined) throw new Error('no part was begun');
    return this.#file;
  }
}

export function makeFolder(folder: string): void {
  try {
    mkdirSync(folder, { recursive: true });
  } catch (error) {
    throw writeFault(error, folder);
  }
}

export interface FoundParts {
  /** In order of their numbers. */
  readonly finished: readonly PartInfo[];
  /** Paths of parts that are torn, altered, or of another table; to be removed and done again. */
  readonly damaged: readonly string[];
}

/**
 * Lists the parts of a folder; none when it is not there. Reads each part's end and size, and with
 * `everyByte` all of it against its hash (as assembling does in any case).
 */
export function findParts(
  folder: string,
  columns: readonly TableColumn[],
  options: { readonly everyByte?: boolean } = {},
): FoundParts {
  const table = tableHash(columns);
  const finished: PartInfo[] = [];
  const damaged: string[] = [];
  for (const name of partNames(folder)) {
    const path = join(folder, name);
    const info = readPart(path);
    const right = info !== undefined && info.table === table && partPath(folder, info.part) === path;
    if (right && (options.everyByte !== true || partIsWhole(info))) finished.push(info);
    else damaged.push(path);
  }
  return { finished: finished.sort((a, b) => a.part - b.part), damaged };
}

function partNames(folder: string): string[] {
  try {
    return readdirSync(folder).filter((name) => /^\d{6,}\.part$/.test(name));
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return [];
    throw readFault(error, folder);
  }
}

/** Removes the parts of a folder and the folder itself when nothing else is in it. */
export function removeParts(folder: string): void {
  try {
    for (const name of partNames(folder)) rmSync(join(folder, name), { force: true });
    if (readdirSync(folder).length === 0) rmSync(folder, { recursive: true });
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return;
    throw writeFault(error, folder);
  }
}

/** What a part says of itself at its end; undefined when that is torn. */
export function readPart(path: string): PartInfo | undefined {
  return reading(path, (handle) => {
    const bytes = statSync(path).size;
    const end = readAt(handle, bytes - endBytes, endBytes);
    if (end === undefined || mark.some((byte, k) => end[hashBytes + 4 + k] !== byte)) return undefined;
    const length = new DataView(end.buffer).getUint32(hashBytes, true);
    const text = readAt(handle, bytes - endBytes - length, length);
    if (text === undefined) return undefined;
    const trailer = parseTrailer(new TextDecoder().decode(text));
    if (trailer === undefined || dataBytes(trailer) + length + endBytes !== bytes) return undefined;
    return { ...trailer, path, bytes };
  });
}

function dataBytes(trailer: PartTrailer): number {
  return trailer.blocks.reduce((sum, { csvBytes, group }) => sum + csvBytes + group.bytes, 0);
}

function parseTrailer(text: string): PartTrailer | undefined {
  try {
    const found = JSON.parse(text) as Partial<PartTrailer>;
    const isWhole =
      Number.isInteger(found.part) &&
      Number.isInteger(found.firstCombination) &&
      Number.isInteger(found.rows) &&
      typeof found.table === 'string' &&
      Array.isArray(found.blocks) &&
      found.blocks.every((block: Partial<BlockRecord>) => block.group !== undefined);
    return isWhole ? (found as PartTrailer) : undefined;
  } catch {
    return undefined;
  }
}

/** Reads a part from start to end through `buffer`, handing on each stretch, and says whether its hash is right. */
export function streamPart(part: PartInfo, buffer: Uint8Array, take: (bytes: Uint8Array) => void): boolean {
  return reading(part.path, (handle) => {
    const hash = createHash('sha256');
    const hashed = part.bytes - endBytes;
    for (let done = 0; done < hashed; ) {
      const got = readSync(handle, buffer, 0, Math.min(buffer.length, hashed - done), done);
      if (got === 0) return false;
      const bytes = buffer.subarray(0, got);
      hash.update(bytes);
      take(bytes);
      done += got;
    }
    const end = readAt(handle, hashed, hashBytes);
    return end !== undefined && hash.digest().equals(end);
  });
}

export function partIsWhole(part: PartInfo): boolean {
  return streamPart(part, new Uint8Array(1 << 20), () => {});
}

function reading<Result>(path: string, read: (handle: number) => Result): Result {
  let handle: number | undefined;
  try {
    handle = openSync(path, 'r');
    return read(handle);
  } catch (error) {
    throw readFault(error, path);
  } finally {
    if (handle !== undefined) closeSync(handle);
  }
}

function readAt(handle: number, at: number, length: number): Uint8Array | undefined {
  if (at < 0) return undefined;
  const bytes = new Uint8Array(length);
  return readSync(handle, bytes, 0, length, at) === length ? bytes : undefined;
}
