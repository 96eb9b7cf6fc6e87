import type { MachineFaultCode } from '../errors.ts';
import type { Part } from '../plan/plan.ts';
import type { PartCopy } from '../results/assemble.ts';
import type { Study } from '../study/study.ts';

/** What every worker is given when it starts. */
export interface WorkerSetup {
  readonly study: Study;
  readonly partsFolder: string;
}

/** Main thread → worker: evaluate one part and write it into the parts folder. */
export interface EvaluatePart {
  readonly kind: 'evaluate_part';
  readonly part: Part;
}

/** Worker → main thread: the part is on disk under its final name. */
export interface PartDone {
  readonly kind: 'part_done';
  readonly number: number;
  /** Rows written, after skips. */
  readonly rows: number;
}

/** Worker → main thread: the machine refused to write; nothing finished is lost. */
export interface PartNotWritten {
  readonly kind: 'part_not_written';
  readonly number: number;
  readonly code: MachineFaultCode;
  readonly message: string;
  readonly remedy: string;
}

export type PartAnswer = PartDone | PartNotWritten;

/** Main thread → worker: copy one part into the cases files. */
export interface CopyPart {
  readonly kind: 'copy_part';
  readonly copy: PartCopy;
}

/** Worker → main thread: the part's bytes are in their places, if it was as it had been written. */
export interface PartCopied {
  readonly kind: 'part_copied';
  readonly whole: boolean;
}

/** Worker → main thread: the machine refused to read or write. */
export interface PartNotCopied {
  readonly kind: 'part_not_copied';
  readonly code: MachineFaultCode;
  readonly message: string;
  readonly remedy: string;
}

export type CopyAnswer = PartCopied | PartNotCopied;
