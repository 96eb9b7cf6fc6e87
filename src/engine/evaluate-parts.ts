import { MachineError } from '../errors.ts';
import type { Part } from '../plan/plan.ts';
import { builtFile } from './built-file.ts';
import type { EvaluatePart, PartAnswer, WorkerSetup } from './messages.ts';
import { reasonOf, ThreadPool } from './thread-pool.ts';

/** Tasks waiting per worker: one in hand and one in reach keeps a worker busy. */
const tasksPerWorker = 2;
const attemptsPerPart = 2;

export interface PartsToEvaluate {
  readonly setup: WorkerSetup;
  readonly parts: readonly Part[];
  readonly workers: number;
  /** Set when the user wants to stop: parts in hand are finished, no more are begun. */
  readonly stop: AbortSignal;
  readonly onPart: (part: Part) => void;
  readonly onNote: (text: string) => void;
  /** For tests: another worker file. */
  readonly workerFile?: string;
}

export interface EvaluatedParts {
  readonly stopped: boolean;
  /** Numbers of parts whose worker died each time. */
  readonly lost: readonly number[];
}

type Pool = ThreadPool<EvaluatePart, PartAnswer>;

/**
 * Has the parts evaluated by worker threads. A worker that dies costs its part only, which is
 * tried once more. Throws a MachineError when the disk refuses; parts written stay.
 */
export async function evaluateParts(job: PartsToEvaluate): Promise<EvaluatedParts> {
  const pool: Pool = new ThreadPool(job.workerFile ?? builtFile('worker'), job.workers, job.setup);
  const queue = [...job.parts];
  const lost: number[] = [];
  let fault: MachineError | undefined;

  async function takeParts(): Promise<void> {
    for (;;) {
      const part = job.stop.aborted || fault !== undefined ? undefined : queue.shift();
      if (part === undefined) return;
      const answer = await evaluateWithRetry(pool, part, job.onNote);
      if (answer === undefined) lost.push(part.number);
      else if (answer.kind === 'part_done') job.onPart(part);
      else fault ??= new MachineError(answer.code, answer.message, answer.remedy);
    }
  }

  try {
    await Promise.all(Array.from({ length: job.workers * tasksPerWorker }, takeParts));
  } finally {
    await pool.close();
  }
  if (fault !== undefined) throw fault;
  return { stopped: job.stop.aborted && queue.length > 0, lost: lost.sort((a, b) => a - b) };
}

async function evaluateWithRetry(
  pool: Pool,
  part: Part,
  note: (text: string) => void,
): Promise<PartAnswer | undefined> {
  for (let attempt = 1; attempt <= attemptsPerPart; attempt++) {
    try {
      return await pool.run({ kind: 'evaluate_part', part });
    } catch (error) {
      const next = attempt < attemptsPerPart ? 'it is tried once more' : 'it is left out';
      note(`The worker on part ${part.number} failed (${reasonOf(error)}); ${next}.`);
    }
  }
  return undefined;
}
