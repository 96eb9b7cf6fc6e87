import { Piscina } from 'piscina';

/** Often enough that the program stays alive; what it does then is nothing. */
const stayAwake = 60_000;

/**
 * Worker threads that take tasks, one at a time each. A task whose worker dies is rejected; so are
 * tasks that wait when workers die as they start, for then the pool begins no more of its own accord
 * and they would wait for ever.
 */
export class ThreadPool<Task, Answer> {
  private readonly pool: Piscina<Task, Answer>;
  /** Workers that are starting do not keep the program alive: without this it could end, silently. */
  private readonly awake = setInterval(() => {}, stayAwake);
  private waiting = new AbortController();

  constructor(filename: string, workers: number, workerData?: unknown) {
    this.pool = new Piscina<Task, Answer>({
      filename,
      minThreads: workers,
      maxThreads: workers,
      workerData,
      recordTiming: false,
      concurrentTasksPerWorker: 1,
    });
    this.pool.on('workerDestroy', () => {
      // The pool takes the worker off its list, and begins the next one, after this event.
      setImmediate(() => {
        if (this.pool.threads.length > 0) return;
        this.waiting.abort();
        this.waiting = new AbortController();
      });
    });
  }

  /** Rejects with the worker's error, or that of its death; `reasonOf` gives it in words. */
  run(task: Task): Promise<Answer> {
    return this.pool.run(task, { signal: this.waiting.signal });
  }

  async close(): Promise<void> {
    clearInterval(this.awake);
    await this.pool.destroy();
  }
}

/** Why a task was rejected. */
export function reasonOf(error: unknown): string {
  if (!(error instanceof Error) || error.message === '') return 'no reason given';
  return error.name === 'AbortError' ? 'workers die as they start' : error.message;
}
