import { Piscina } from 'piscina';
import { MachineError } from '../errors.ts';
import type { Part } from '../plan/plan.ts';
import { builtFile } from './built-file.ts';
import type { EvaluatePart, PartAnswer, WorkerSetup } from './messages.ts';

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

/**
 * Has the parts evaluated by worker threads. A worker that dies costs its part only, which is
 * tried once more. Throws a MachineError when the disk refuses; parts written stay.
 */
export async function evaluateParts(job: PartsToEvaluate): Promise<EvaluatedParts> {
  const pool = new Piscina<EvaluatePart, PartAnswer>({
    filename: job.workerFile ?? builtFile('worker'),
    minThreads: job.workers,
    maxThreads: job.workers,
    workerData: job.setup,
    recordTiming: false,
    concurrentTasksPerWorker: 1,
  });
  const none = noWorkersLeft(pool);
  const queue = [...job.parts];
  const lost: number[] = [];
  let fault: MachineError | undefined;

  async function takeParts(): Promise<void> {
    for (;;) {
      const part = job.stop.aborted || fault !== undefined ? undefined : queue.shift();
      if (part === undefined) return;
      const answer = await evaluateWithRetry(pool, none, part, job.onNote);
      if (answer === undefined) lost.push(part.number);
      else if (answer.kind === 'part_done') job.onPart(part);
      else fault ??= new MachineError(answer.code, answer.message, answer.remedy);
    }
  }

  // Workers that are starting do not keep the program alive: without this it would end, silently,
  // while the successor of a dead worker is not there yet.
  const awake = setInterval(() => {}, 60_000);
  try {
    await Promise.all(Array.from({ length: job.workers * tasksPerWorker }, takeParts));
  } finally {
    clearInterval(awake);
    await pool.destroy();
  }
  if (fault !== undefined) throw fault;
  return { stopped: job.stop.aborted && queue.length > 0, lost: lost.sort((a, b) => a - b) };
}

/**
 * A signal for parts that wait in a pool without workers: where workers die as they start, the pool
 * begins no more of its own accord, and the parts would wait for ever. A new task makes it try again.
 */
function noWorkersLeft(pool: Piscina<EvaluatePart, PartAnswer>): () => AbortSignal {
  let waiting = new AbortController();
  pool.on('workerDestroy', () => {
    // The pool takes the worker off its list, and begins the next one, after this event.
    setImmediate(() => {
      if (pool.threads.length > 0) return;
      waiting.abort();
      waiting = new AbortController();
    });
  });
  return () => waiting.signal;
}

async function evaluateWithRetry(
  pool: Piscina<EvaluatePart, PartAnswer>,
  noWorkers: () => AbortSignal,
  part: Part,
  note: (text: string) => void,
): Promise<PartAnswer | undefined> {
  for (let attempt = 1; attempt <= attemptsPerPart; attempt++) {
    try {
      return await pool.run({ kind: 'evaluate_part', part }, { signal: noWorkers() });
    } catch (error) {
      const reason = reasonOf(error);
      const next = attempt < attemptsPerPart ? 'it is tried once more' : 'it is left out';
      note(`The worker on part ${part.number} failed (${reason}); ${next}.`);
    }
  }
  return undefined;
}

function reasonOf(error: unknown): string {
  if (!(error instanceof Error) || error.message === '') return 'no reason given';
  return error.name === 'AbortError' ? 'workers die as they start' : error.message;
}
