import { closeSync, openSync, readdirSync, rmSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { MachineError } from '../errors.ts';
import type { TableColumn } from '../figures/figure.ts';
import { AtomicFile, syncFolder } from './atomic-file.ts';
import type { CasesFilePlan, Piece } from './cases-layout.ts';
import { layOutCases } from './cases-layout.ts';
import { writeFault } from './machine-fault.ts';
import { type PartInfo, streamPart } from './part-files.ts';

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

/** One part to be copied into the cases files; plain data, so that a worker thread can be asked. */
export interface PartCopy {
  readonly part: PartInfo;
  readonly pieces: readonly Piece[];
  /** Temporary paths of the files that pieces name by index. */
  readonly files: readonly string[];
}

export interface AssembleOptions {
  readonly rowsPerFile?: number;
  /** Copies one part, false when it is not as it was written; on this thread when left out. */
  readonly copy?: (copy: PartCopy) => boolean | Promise<boolean>;
  /** Parts being copied at a time. */
  readonly atOnce?: number;
  /** Told after each part; may wait. */
  readonly onPart?: (part: PartInfo) => void | Promise<void>;
}

/**
 * Joins parts 0, 1, 2 … into the cases files of a run folder by copying bytes, and removes older
 * cases files. Every byte's place is known beforehand (`layOutCases`), so parts are copied in any
 * order, several at a time. A part that does not match its hash is a MachineError READ_FAILED and
 * leaves no new files.
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
  const layout = layOutCases(parts, columns, options.rowsPerFile ?? rowsPerFile);
  const plans = [...layout.csv, ...layout.parquet];
  const files: AtomicFile[] = [];
  try {
    for (const plan of plans) files.push(openFile(folder, plan));
    const paths = files.map((file) => file.temporary);
    await copyAll(
      parts.map((part, k) => ({ part, pieces: layout.pieces[k], files: paths })),
      options,
    );
    for (const file of files) file.commit();
  } catch (error) {
    for (const file of files) file.abandon();
    throw error;
  }
  const told = ({ name, rows, bytes }: CasesFilePlan): CasesFile => ({ name, rows, bytes });
  const cases = { csv: layout.csv.map(told), parquet: layout.parquet.map(told) };
  removeOlder(folder, plans);
  return cases;
}

/** Opens one cases file under its temporary name, with what stands before and behind the parts' bytes. */
function openFile(folder: string, { name, bytes, head, foot }: CasesFilePlan): AtomicFile {
  const file = new AtomicFile(join(folder, name));
  file.write(head);
  file.writeAt(foot, bytes - foot.length);
  return file;
}

async function copyAll(copies: readonly PartCopy[], options: AssembleOptions): Promise<void> {
  const { copy = copyPart, atOnce = 1, onPart } = options;
  const queue = [...copies];
  let failed = false;
  const takeCopies = async () => {
    for (let next = queue.shift(); next !== undefined && !failed; next = queue.shift()) {
      try {
        if (!(await copy(next))) throw damagedPart(next.part);
        await onPart?.(next.part);
      } catch (error) {
        failed = true;
        throw error;
      }
    }
  };
  const outcomes = await Promise.allSettled(Array.from({ length: atOnce }, takeCopies));
  const fault = outcomes.find((outcome) => outcome.status === 'rejected');
  if (fault !== undefined) throw fault.reason;
}

/** Copies the pieces of one part to their places, checking its hash on the way. @returns whether it was whole */
export function copyPart({ part, pieces, files }: PartCopy): boolean {
  const handles = new Map<number, number>();
  let target = '';
  try {
    for (const { file } of pieces) {
      target = files[file];
      if (!handles.has(file)) handles.set(file, openSync(target, 'r+'));
    }
    let read = 0;
    let next = 0;
    return streamPart(part, new Uint8Array(copiedAtOnce), (bytes) => {
      for (let done = 0; done < bytes.length && next < pieces.length; ) {
        const { from, bytes: length, file, at } = pieces[next];
        const inPiece = read + done - from;
        const taken = Math.min(length - inPiece, bytes.length - done);
        target = files[file];
        writeWhole(handles.get(file) as number, bytes.subarray(done, done + taken), at + inPiece);
        done += taken;
        if (inPiece + taken === length) next++;
      }
      read += bytes.length;
    });
  } catch (error) {
    throw writeFault(error, target);
  } finally {
    for (const handle of handles.values()) closeSync(handle);
  }
}

/** One call may write less than asked for. */
function writeWhole(handle: number, bytes: Uint8Array, at: number): void {
  for (let done = 0; done < bytes.length; ) {
    done += writeSync(handle, bytes, done, bytes.length - done, at + done);
  }
}

function damagedPart(part: PartInfo): MachineError {
  return new MachineError(
    'READ_FAILED',
    `Part ${part.part} (${part.path}) is not as it was written.`,
    'Delete that one file and run the same command again: only that part is worked out anew.',
  );
}

function removeOlder(folder: string, kept: readonly { readonly name: string }[]): void {
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
