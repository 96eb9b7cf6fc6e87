/** Rounds of timing that alternate between jobs, so that a busy moment hits all alike. */

export interface BenchRow {
  readonly job: string;
  readonly unit: string;
  readonly median: number;
  /** Least and greatest of the rounds. */
  readonly spread: readonly [number, number];
  readonly note: string;
}

export interface Job {
  readonly job: string;
  readonly unit: string;
  readonly note: string;
  /** Does the work once and returns how much of `unit` it did. */
  readonly once: () => number | Promise<number>;
}

export const rounds = 7;

/** Runs all jobs in alternating rounds after a warm-up round. */
export async function measure(jobs: readonly Job[], count: number = rounds): Promise<BenchRow[]> {
  const rates = jobs.map((): number[] => []);
  for (let round = -1; round < count; round++) {
    for (const [j, job] of jobs.entries()) {
      const start = performance.now();
      const done = await job.once();
      const seconds = (performance.now() - start) / 1000;
      if (round >= 0) rates[j].push(done / seconds);
    }
  }
  return jobs.map(({ job, unit, note }, j) => {
    const sorted = rates[j].toSorted((a, b) => a - b);
    return { job, unit, median: sorted[count >> 1], spread: [sorted[0], sorted[count - 1]], note };
  });
}
