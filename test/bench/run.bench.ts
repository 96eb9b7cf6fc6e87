/**
 * Whole runs of the built program, one process each: table as CSV and Parquet, 30 columns, on a
 * memory disk and on the real one, one worker and two; and peak memory against the size of the study.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BenchRow, Job } from './measure.ts';
import { measure } from './measure.ts';

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
  readonly seconds: number;
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
  return { combinations: record.combinations, seconds, peak: 1024 * JSON.parse(readFileSync(usage, 'utf8')) };
}

function runJob(place: string, base: string, workers: number, study: string): Job {
  return {
    job: `whole run, ${place}, ${workers} worker${workers === 1 ? '' : 's'}`,
    unit: 'combinations/s',
    note: 'start of the program to finished table, CSV and Parquet, 30 columns, no charts',
    once: () => runProgram(study, base, workers).combinations,
  };
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
    const rows = await measure(
      [
        runJob('memory disk', memory, 1, study),
        runJob('memory disk', memory, 2, study),
        runJob('real disk', disk, 1, study),
        runJob('real disk', disk, 2, study),
      ],
      rounds,
    );
    return [...rows, ...memoryRows(study, memory)];
  } finally {
    for (const folder of [disk, memory]) rmSync(folder, { recursive: true, force: true });
  }
}
