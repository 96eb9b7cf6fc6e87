import { readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { MachineError } from '../errors.ts';
import type { TableColumn } from '../figures/figure.ts';
import { AtomicFile, syncFolder } from './atomic-file.ts';
import { CsvBlockWriter } from './csv-block.ts';
import { writeFault } from './machine-fault.ts';
import { type GroupRecord, parquetFooter, parquetMagic } from './parquet-schema.ts';
import { type BlockRecord, type PartInfo, streamPart } from './part-files.ts';

/** Most data rows of one cases file, so that a spreadsheet (1,048,576 rows, from memory) opens it. */
export const rowsPerFile = 1_000_000;
/** Names of cases files: `cases.csv`, or `cases-0001.csv` and so on. */
export const casesFileName = /^cases(?:-(\d{4,}))?\.(csv|parquet)$/;

const copiedAtOnce = 1 << 20;

export interface CasesFile {
  readonly name: string;
  /** Data rows, without the header. */
  readonly rows: number;
  readonly bytes: number;
}

export interface AssembledCases {
  readonly csv: readonly CasesFile[];
  readonly parquet: readonly CasesFile[];
}

export interface AssembleOptions {
  readonly rowsPerFile?: number;
  /** Told after each part; may wait. */
  readonly onPart?: (part: PartInfo) => void | Promise<void>;
}

/**
 * Joins parts 0, 1, 2 … into the cases files of a run folder by copying bytes, and removes older
 * cases files. CSV files are cut at exactly `rowsPerFile` rows, Parquet files at the last block
 * that ends before it, so the bytes depend on the blocks alone and not on how parts held them.
 * A part that does not match its hash is a MachineError READ_FAILED and leaves no new files.
 */
export async function assembleCases(
  folder: string,
  parts: readonly PartInfo[],
  columns: readonly TableColumn[],
  options: AssembleOptions = {},
): Promise<AssembledCases> {
  parts.forEach((part, k) => {
    if (part.part !== k) throw new Error(`part ${k} is missing`);
  });
  const limit = options.rowsPerFile ?? rowsPerFile;
  const total = parts.reduce((sum, { rows }) => sum + rows, 0);
  const csv = new CsvFiles(folder, new CsvBlockWriter(columns).header(), limit, total > limit);
  const parquet = new ParquetFiles(folder, columns, limit, total > limit);
  const buffer = new Uint8Array(copiedAtOnce);
  try {
    for (const part of parts) {
      copyPart(part, buffer, csv, parquet);
      await options.onPart?.(part);
    }
    const files = { csv: csv.finish(), parquet: parquet.finish() };
    removeOlder(folder, [...files.csv, ...files.parquet]);
    return files;
  } catch (error) {
    csv.abandon();
    parquet.abandon();
    throw error;
  }
}

/** Deals the bytes of a part out to its blocks' two targets. */
function copyPart(part: PartInfo, buffer: Uint8Array, csv: CsvFiles, parquet: ParquetFiles): void {
  const stretches = part.blocks.flatMap((block) => [
    {
      bytes: block.csvBytes,
      begin: () => csv.beginBlock(block),
      take: (bytes: Uint8Array) => csv.take(bytes),
    },
    {
      bytes: block.group.bytes,
      begin: () => parquet.beginGroup(block.group),
      take: (bytes: Uint8Array) => parquet.take(bytes),
    },
  ]);
  let next = 0;
  let left = 0;
  const whole = streamPart(part, buffer, (bytes) => {
    for (let done = 0; done < bytes.length; ) {
      if (left === 0) {
        // Behind the last block stands the part's trailer.
        if (next === stretches.length) return;
        stretches[next].begin();
        left = stretches[next].bytes;
        next++;
      }
      const taken = Math.min(left, bytes.length - done);
      stretches[next - 1].take(bytes.subarray(done, done + taken));
      done += taken;
      left -= taken;
    }
  });
  if (!whole) throw damagedPart(part);
}

function damagedPart(part: PartInfo): MachineError {
  return new MachineError(
    'READ_FAILED',
    `Part ${part.part} (${part.path}) is not as it was written.`,
    'Delete that one file and run the same command again: only that part is worked out anew.',
  );
}

/** A row of files of one kind, written under temporary names and put in place all at the end. */
class NumberedFiles {
  protected file: AtomicFile;
  protected rows = 0;
  readonly #done: { file: AtomicFile; rows: number }[] = [];

  constructor(
    readonly folder: string,
    readonly ending: 'csv' | 'parquet',
    readonly head: Uint8Array,
    readonly numbered: boolean,
  ) {
    this.file = this.#next();
  }

  /** Closes the present file and begins the next. */
  protected turn(): void {
    this.#done.push({ file: this.file, rows: this.rows });
    this.rows = 0;
    this.file = this.#next();
  }

  #next(): AtomicFile {
    const number = String(this.#done.length + 1).padStart(4, '0');
    const name = this.numbered ? `cases-${number}.${this.ending}` : `cases.${this.ending}`;
    const file = new AtomicFile(join(this.folder, name));
    file.write(this.head);
    return file;
  }

  finish(): CasesFile[] {
    const all = [...this.#done, { file: this.file, rows: this.rows }];
    for (const { file } of all) file.commit();
    return all.map(({ file, rows }) => ({
      name: file.path.slice(this.folder.length).replace(/^[\\/]/, ''),
      rows,
      bytes: file.size,
    }));
  }

  abandon(): void {
    for (const { file } of this.#done) file.abandon();
    this.file.abandon();
  }
}

const quote = 34;
const lineFeed = 10;

class CsvFiles extends NumberedFiles {
  /** Rows of the block that are not yet in a file, and whether the copy stands inside quotes. */
  #blockRows = 0;
  #quoted = false;

  constructor(
    folder: string,
    header: Uint8Array,
    readonly limit: number,
    numbered: boolean,
  ) {
    super(folder, 'csv', header, numbered);
  }

  beginBlock(block: BlockRecord): void {
    // A whole block fits: its rows need no counting.
    if (this.rows === this.limit) this.turn();
    this.#quoted = false;
    this.#blockRows = 0;
    if (this.rows + block.rows <= this.limit) this.rows += block.rows;
    else this.#blockRows = block.rows;
  }

  take(bytes: Uint8Array): void {
    if (this.#blockRows === 0) this.file.write(bytes);
    else this.#takeCounting(bytes);
  }

  /** Counts rows by their line ends (those inside quotes are text) and turns to the next file when one is full. */
  #takeCounting(bytes: Uint8Array): void {
    let start = 0;
    for (let i = 0; i < bytes.length; i++) {
      const byte = bytes[i];
      if (byte === quote) this.#quoted = !this.#quoted;
      if (byte !== lineFeed || this.#quoted) continue;
      this.rows++;
      this.#blockRows--;
      if (this.rows < this.limit || this.#blockRows === 0) continue;
      this.file.write(bytes.subarray(start, i + 1));
      start = i + 1;
      this.turn();
    }
    this.file.write(bytes.subarray(start));
  }
}

class ParquetFiles extends NumberedFiles {
  #groups: { at: number; group: GroupRecord }[] = [];

  constructor(
    folder: string,
    readonly columns: readonly TableColumn[],
    readonly limit: number,
    numbered: boolean,
  ) {
    super(folder, 'parquet', parquetMagic, numbered);
  }

  beginGroup(group: GroupRecord): void {
    if (this.rows > 0 && this.rows + group.rows > this.limit) this.turn();
    this.#groups.push({ at: this.file.size, group });
    this.rows += group.rows;
  }

  take(bytes: Uint8Array): void {
    this.file.write(bytes);
  }

  protected override turn(): void {
    this.#writeFooter();
    super.turn();
  }

  override finish(): CasesFile[] {
    this.#writeFooter();
    return super.finish();
  }

  #writeFooter(): void {
    this.file.write(parquetFooter(this.columns, this.#groups));
    this.#groups = [];
  }
}

function removeOlder(folder: string, kept: readonly CasesFile[]): void {
  const names = new Set(kept.map(({ name }) => name));
  try {
    for (const name of readdirSync(folder)) {
      if (casesFileName.test(name) && !names.has(name)) rmSync(join(folder, name));
    }
    syncFolder(folder);
  } catch (error) {
    throw writeFault(error, folder);
  }
}
