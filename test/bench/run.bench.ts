/**
 * Whole runs of the built program, one process each: table as CSV and Parquet, 30 columns, on a
 * memory disk and on the real one, one worker and two; and peak memory against the size of the study.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BenchRow } from './measure.ts';

const program = '.build/cli.js';
const rounds = 3;
/** 30 columns: those always in a table and these. */
const columns = [
  'wing_aspect_ratio',
  'wing_root_chord',
  'mac',
  'mac_leading_edge',
  'wing_lift_slope',
  'wing_aerodynamic_centre',
  'downwash_gradient',
  'body_moment_slope',
  'lift_slope',
  'tail_area',
  'tail_span',
  'neutral_point_tail',
  'neutral_point',
  'outside_fitted_range',
];

/** The tourer with its tail arm cut finer to about the number of combinations wanted. */
function studyText(combinations: number): string {
  const text = readFileSync('test/plain-tourer.yaml', 'utf8');
  const others = 14 * 6 * 4 * 13 * 5;
  const arms = Math.max(2, Math.round(combinations / others));
  return text
    .replace(/tail\.arm: \{.*\}/, `tail.arm: {from: 3.6 m, to: 5.2 m, count: ${arms}}`)
    .replace(/^skip:\n(?: {2}.*\n)+/m, '')
    .concat(`\ntable: {columns: [${columns.join(', ')}]}\n`);
}

interface Finished {
  readonly combinations: number;
  /** Start of the program to its end. */
  readonly seconds: number;
  /** First combination to CSV and Parquet in their places. */
  readonly tableSeconds: number;
  /** Greatest resident memory of the process [bytes]. */
  readonly peak: number;
}

/** Runs the program; its own resource usage tells the peak. */
function runProgram(study: string, out: string, workers: number): Finished {
  const usage = join(out, 'usage.json');
  const tell = `import { writeFileSync } from 'node:fs';
    import { isMainThread } from 'node:worker_threads';
    if (isMainThread) process.on('exit', () => {
      writeFileSync(${JSON.stringify(usage)}, JSON.stringify(process.resourceUsage().maxRSS));
    });`;
  const start = performance.now();
  const { status, stderr } = spawnSync(
    process.execPath,
    [
      '--import',
      `data:text/javascript,${encodeURIComponent(tell)}`,
      program,
      'run',
      study,
      '--out',
      out,
      '--name',
      'run',
      '--workers',
      String(workers),
      '--afresh',
      '--no-charts',
      '--json-lines',
    ],
    { encoding: 'utf8' },
  );
  const seconds = (performance.now() - start) / 1000;
  if (status !== 0) throw new Error(stderr);
  const record = JSON.parse(readFileSync(join(out, 'run', 'run.json'), 'utf8'));
  const { combinations } = record;
  const peak = 1024 * JSON.parse(readFileSync(usage, 'utf8'));
  return { combinations, seconds, tableSeconds: tableSeconds(stderr), peak };
}

/** Time between the events of a run that enclose evaluating and putting the table together. */
function tableSeconds(jsonLines: string): number {
  const events = jsonLines
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line));
  const at = (event: object) => Date.parse((event as { time: string }).time);
  const planned = events.find(({ event }) => event === 'planned');
  const counting = events.find(({ event, what }) => event === 'step' && /^Counting/.test(what));
  return (at(counting) - at(planned)) / 1000;
}

/** Rates of runs in alternating rounds, each told twice: the table alone, and the whole run. */
function runRows(study: string, places: readonly { name: string; folder: string }[]): BenchRow[] {
  const jobs = places.flatMap(({ name, folder }) =>
    [1, 2].map((workers) => ({ name, folder, workers, table: [] as number[], whole: [] as number[] })),
  );
  for (let round = -1; round < rounds; round++) {
    for (const job of jobs) {
      const { combinations, seconds, tableSeconds: table } = runProgram(study, job.folder, job.workers);
      if (round < 0) continue;
      job.table.push(combinations / table);
      job.whole.push(combinations / seconds);
    }
  }
  const row = (job: string, note: string, rates: readonly number[]): BenchRow => {
    const sorted = rates.toSorted((p, q) => p - q);
    const spread = [sorted[0], sorted[rounds - 1]] as const;
    return { job, unit: 'combinations/s', median: sorted[rounds >> 1], spread, note };
  };
  return jobs.flatMap(({ name, workers, table, whole }) => {
    const where = `${name}, ${workers} worker${workers === 1 ? '' : 's'}`;
    return [
      row(`table, ${where}`, 'workers’ start to CSV and Parquet in place, 30 columns', table),
      row(`whole run, ${where}`, 'program’s start to summary and shortlist, no charts', whole),
    ];
  });
}

/** Peak memory of whole runs of growing studies. */
function memoryRows(study: string, base: string): BenchRow[] {
  return [1e5, 1e6, 1e7].map((size) => {
    writeFileSync(study, studyText(size));
    const { peak, combinations } = runProgram(study, base, 2);
    const megabytes = peak / 1e6;
    return {
      job: `peak memory, ${combinations} combinations`,
      unit: 'MB',
      median: megabytes,
      spread: [megabytes, megabytes],
      note: '2 workers, whole process, one run',
    };
  });
}

export async function benchRuns(): Promise<BenchRow[]> {
  const [disk, memory] = [tmpdir(), '/dev/shm'].map((base) => mkdtempSync(join(base, 'aftlimit-bench-')));
  try {
    const study = join(memory, 'study.yaml');
    writeFileSync(study, studyText(3e6));
    const rows = runRows(study, [
      { name: 'memory disk', folder: memory },
      { name: 'real disk', folder: disk },
    ]);
    return [...rows, ...memoryRows(study, memory)];
  } finally {
    for (const folder of [disk, memory]) rmSync(folder, { recursive: true, force: true });
  }
}
