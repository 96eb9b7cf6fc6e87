import { existsSync, readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { UsageError } from '../errors.ts';
import { blockSize } from '../plan/plan.ts';
import type { AssembledCases } from '../results/assemble.ts';
import { sweepTemporaryFiles } from '../results/atomic-file.ts';
import { findParts, makeFolder, removeParts } from '../results/part-files.ts';
import type { RunRecord } from '../results/run-folder.ts';
import { readRun, runPaths, thisMachine, writeRun } from '../results/run-folder.ts';
import { studyIdentity } from '../study/identity.ts';
import type { Study } from '../study/study.ts';
import { program } from '../version.ts';
import type { LaidOut } from './lay-out.ts';

export interface SittingRequest {
  readonly folder: string;
  readonly study: Study;
  readonly laidOut: LaidOut;
  readonly afresh: boolean;
  readonly blocksPerPart: number;
  readonly note: (text: string) => void;
}

/**
 * One sitting at a run folder: from when a command opens it until it is finished or put off.
 * The record run.json says how far the run is; parts on disk say what is evaluated.
 */
export interface Sitting {
  /** What is left: everything from evaluating on, only the reports, or nothing. */
  readonly state: 'evaluating' | 'reporting' | 'finished';
  readonly blocksPerPart: number;
  record(): RunRecord;
  /** Evaluation begins: from here on the folder is this study's. */
  begin(): void;
  /** The sitting ends before the table is there, or evaluation is over: time so far is kept. */
  pause(): void;
  assembled(cases: AssembledCases): void;
  finish(): RunRecord;
}

export function openSitting(request: SittingRequest): Sitting {
  const { folder, study, afresh, note } = request;
  if (afresh) discardRun(folder);
  const earlier = existsSync(runPaths(folder).record) ? readRun(folder) : undefined;
  if (earlier === undefined) claimFolder(folder);
  else refuseOtherStudy(folder, earlier, request);
  if (existsSync(folder)) sweepTemporaryFiles(folder);

  let record = earlier === undefined ? newRecord(request) : { ...earlier, studyText: study.text };
  const startedAt = performance.now();
  const secondsBefore = record.seconds;
  const write = (changes: Partial<RunRecord>) => {
    const seconds = secondsBefore + (performance.now() - startedAt) / 1000;
    record = { ...record, seconds: Math.round(seconds * 1000) / 1000, ...changes };
    writeRun(folder, record);
  };

  const state = stateOf(earlier, study);
  if (state === 'finished') {
    note(
      `${folder} holds this study, finished. --afresh evaluates it again; aftlimit charts draws its charts again.`,
    );
  } else if (state === 'reporting') {
    if (earlier?.status === 'finished') note(`${folder} holds the table already; its reports are made anew.`);
    write({ status: 'running' });
  } else if (existsSync(runPaths(folder).parts)) {
    sweepTemporaryFiles(runPaths(folder).parts);
    removeDamagedParts(request);
  }
  return {
    state,
    blocksPerPart: record.blocksPerPart,
    record: () => record,
    begin: () => {
      makeFolder(runPaths(folder).parts);
      write({ status: 'running' });
    },
    pause: () => write({ status: 'interrupted' }),
    assembled: (cases) =>
      write({
        status: 'running',
        rows: cases.csv.reduce((sum, file) => sum + file.rows, 0),
        cases,
      }),
    finish: () => {
      write({ status: 'finished', finished: new Date().toISOString() });
      return record;
    },
  };
}

/** A finished run whose study has other words or preferences since gets new reports; its table stays. */
function stateOf(earlier: RunRecord | undefined, study: Study): Sitting['state'] {
  if (earlier?.cases === undefined) return 'evaluating';
  return earlier.status === 'finished' && earlier.studyText === study.text ? 'finished' : 'reporting';
}

function newRecord({ study, laidOut, blocksPerPart }: SittingRequest): RunRecord {
  return {
    program: program.name,
    version: program.version,
    studyFile: study.file.split(/[\\/]/).at(-1) ?? study.file,
    studyText: study.text,
    studyHash: studyIdentity(study),
    status: 'running',
    combinations: laidOut.plan.combinations,
    blockSize,
    blocksPerPart,
    rows: 0,
    columns: laidOut.columns.map((column) => column.name),
    methods: { ...study.methods },
    machine: thisMachine(),
    started: new Date().toISOString(),
    seconds: 0,
  };
}

function refuseOtherStudy(folder: string, record: RunRecord, { study, laidOut }: SittingRequest): void {
  const sameColumns = record.columns.join() === laidOut.columns.map(({ name }) => name).join();
  const sameStudy = record.studyHash === studyIdentity(study) && sameColumns;
  if (sameStudy && record.version === program.version && record.blockSize === blockSize) return;
  const what = sameStudy
    ? `was begun by version ${record.version} of the program`
    : 'holds another study, or this one before it was changed';
  throw new UsageError(
    'OTHER_STUDY_IN_FOLDER',
    `${folder} ${what}.`,
    'Give --name for a new folder, or --afresh to discard what is there.',
  );
}

/**
 * A folder with files that no run made is not written into. Parts without a record may be any
 * study's: they are removed.
 */
function claimFolder(folder: string): void {
  if (!existsSync(folder)) return;
  const names = readdirSync(folder).filter((name) => name !== 'parts' && !name.endsWith('.tmp'));
  if (names.length === 0) {
    removeParts(runPaths(folder).parts);
    return;
  }
  throw new UsageError(
    'OTHER_STUDY_IN_FOLDER',
    `${folder} holds files, ${names[0]} among them, but no run.`,
    'Give --name for a new folder.',
  );
}

/** Removes what a run leaves, and nothing else. */
function discardRun(folder: string): void {
  const { record, parts, charts, shortlist, summary, dataPackage } = runPaths(folder);
  if (!existsSync(record)) return;
  for (const name of readdirSync(folder)) {
    if (/^cases(-\d+)?\.(csv|parquet)$/.test(name)) rmSync(join(folder, name));
  }
  for (const path of [parts, charts, shortlist, summary, dataPackage, record]) {
    rmSync(path, { recursive: true, force: true });
  }
}

function removeDamagedParts({ folder, laidOut, note }: SittingRequest): void {
  const { damaged } = findParts(runPaths(folder).parts, laidOut.columns, { everyByte: true });
  for (const path of damaged) {
    note(`${path} is damaged and is evaluated again.`);
    rmSync(path, { force: true });
  }
}
