/**
 * The whole flow from a study file to a folder of results. Start reading here.
 *
 *   1  read and check the study                     study/
 *   2  lay out its combinations and stages          plan/, stages/
 *   3  look into the run folder: go on, or refuse   engine/run-sitting.ts
 *   4  estimate time and disk; refuse a full disk   engine/estimate.ts
 *   5  evaluate the missing parts on workers        engine/
 *   6  put the table together                       results/
 *   7  count, choose the shortlist, draw, sum up    selection/, charts/, reports/
 */
import { join, parse } from 'node:path';
import { assembleTable } from './engine/assemble-table.ts';
import { estimateRun } from './engine/estimate.ts';
import { evaluateParts } from './engine/evaluate-parts.ts';
import type { LaidOut } from './engine/lay-out.ts';
import { layOut } from './engine/lay-out.ts';
import type { Reporter } from './engine/reporter.ts';
import type { Sitting } from './engine/run-sitting.ts';
import { openSitting } from './engine/run-sitting.ts';
import { MachineError } from './errors.ts';
import { blockCount, blockSize, partsOf } from './plan/plan.ts';
import { readStudyFile } from './read-study-file.ts';
import { writeReports } from './reports/write-reports.ts';
import { checkRoom, freeBytes } from './results/disk.ts';
import { findParts, removeParts } from './results/part-files.ts';
import { runPaths } from './results/run-folder.ts';
import type { Study } from './study/study.ts';

export interface RunOptions {
  readonly studyFile: string;
  /** Folder that holds the runs. */
  readonly out: string;
  /** Name of the run's folder; the study file's by default. */
  readonly name?: string;
  readonly workers: number;
  /** Combinations a part, rounded up to whole blocks; chosen from the size of the study by default. */
  readonly partSize?: number;
  /** Discard what the folder holds. */
  readonly afresh: boolean;
  readonly charts: boolean;
  /** Aborted when the user wants to stop. */
  readonly stop: AbortSignal;
}

export type RunOutcome = 'finished' | 'stopped';

export async function runStudy(options: RunOptions, reporter: Reporter): Promise<RunOutcome> {
  const study = readStudyFile(options.studyFile);
  const laidOut = layOut(study);
  const { plan, columns } = laidOut;
  const folder = join(options.out, options.name ?? parse(options.studyFile).name);
  const paths = runPaths(folder);

  const sitting = openSitting({
    folder,
    study,
    laidOut,
    afresh: options.afresh,
    blocksPerPart: blocksPerPart(blockCount(plan), options),
    note: reporter.note,
  });
  if (sitting.state === 'finished') return 'finished';

  if (sitting.state === 'evaluating') {
    const run: OpenRun = { study, laidOut, folder, sitting, options, reporter };
    if ((await evaluateMissing(run)) === 'stopped') return 'stopped';
    reporter.step('Putting the table together');
    const parts = findParts(paths.parts, columns).finished;
    sitting.assembled(await assembleTable(folder, parts, columns, options.workers));
  }
  removeParts(paths.parts);

  reporter.step(
    options.charts
      ? 'Counting, choosing the shortlist, drawing the charts'
      : 'Counting, choosing the shortlist',
  );
  const { feasible } = await writeReports({
    folder,
    study,
    laidOut,
    record: sitting.record(),
    charts: options.charts,
  });
  const { rows, seconds } = sitting.finish();
  reporter.finished({ folder, combinations: plan.combinations, rows, feasible, seconds });
  return 'finished';
}

/** A run whose folder is open for evaluation. */
interface OpenRun {
  readonly study: Study;
  readonly laidOut: LaidOut;
  readonly folder: string;
  readonly sitting: Sitting;
  readonly options: RunOptions;
  readonly reporter: Reporter;
}

/** Estimates what is missing, refuses a full disk, and has the missing parts evaluated. */
async function evaluateMissing(run: OpenRun): Promise<'evaluated' | 'stopped'> {
  const { study, laidOut, folder, sitting, options, reporter } = run;
  const { plan, columns } = laidOut;
  const partsFolder = runPaths(folder).parts;
  const parts = partsOf(plan, sitting.blocksPerPart);
  const there = findParts(partsFolder, columns).finished;
  const present = new Set(there.map(({ part }) => part));
  const missing = parts.filter(({ number }) => !present.has(number));
  const blocksThere = parts.reduce((sum, part) => (present.has(part.number) ? sum + part.blocks : sum), 0);
  let done = Math.min(blocksThere * blockSize, plan.combinations);

  const estimate = estimateRun(laidOut, (plan.combinations - done) / plan.combinations, options.workers);
  const bytesThere = there.reduce((sum, { bytes }) => sum + bytes, 0);
  const bytesNeeded = Math.max(0, estimate.bytesNeeded - bytesThere);
  reporter.planned({
    title: study.title,
    folder,
    combinations: plan.combinations,
    alreadyDone: done,
    workers: options.workers,
    bytesNeeded,
    bytesFree: freeBytes(folder),
    secondsExpected: estimate.seconds,
  });
  checkRoom(folder, bytesNeeded);
  sitting.begin();

  const { stopped, lost } = await evaluateParts({
    setup: { study, partsFolder },
    parts: missing,
    workers: Math.max(1, Math.min(options.workers, missing.length)),
    stop: options.stop,
    onNote: reporter.note,
    onPart: (part) => {
      done = Math.min(done + part.blocks * blockSize, plan.combinations);
      reporter.progress(done, plan.combinations);
    },
  }).finally(() => sitting.pause());
  if (lost.length > 0) throw lostParts(lost, options);
  if (!stopped) return 'evaluated';
  reporter.note(
    `Stopped. ${done} of ${plan.combinations} combinations are saved in ${folder}; the same command goes on from there.`,
  );
  return 'stopped';
}

/** A part is worth some seconds of work: small studies have a few, large ones at most some thousand. */
const partsAimedAt = 64;
const mostBlocksPerPart = 16;

function blocksPerPart(blocks: number, { partSize, workers }: RunOptions): number {
  if (partSize !== undefined) return Math.max(1, Math.ceil(partSize / blockSize));
  const aimed = Math.floor(blocks / Math.max(partsAimedAt, workers));
  return Math.min(mostBlocksPerPart, Math.max(1, aimed));
}

function lostParts(lost: readonly number[], { studyFile }: RunOptions): MachineError {
  return new MachineError(
    'PART_LOST',
    `The workers on part${lost.length === 1 ? '' : 's'} ${lost.join(', ')} died twice; every other part is saved.`,
    `Run ${studyFile} again to try just ${lost.length === 1 ? 'that part' : 'those parts'}; fewer --workers need less memory.`,
  );
}
