import { readFileSync } from 'node:fs';
import { cpus } from 'node:os';
import { join } from 'node:path';
import { UsageError } from '../errors.ts';
import type { AssembledCases } from './assemble.ts';
import { writeFileAtomically } from './atomic-file.ts';
import { readFault } from './machine-fault.ts';
import { makeFolder } from './part-files.ts';

/** Where everything of one run lies. */
export interface RunPaths {
  readonly folder: string;
  readonly record: string;
  readonly parts: string;
  readonly charts: string;
  readonly shortlist: string;
  readonly summary: string;
  readonly dataPackage: string;
}

export function runPaths(folder: string): RunPaths {
  return {
    folder,
    record: join(folder, 'run.json'),
    parts: join(folder, 'parts'),
    charts: join(folder, 'charts'),
    shortlist: join(folder, 'shortlist.csv'),
    summary: join(folder, 'summary.md'),
    dataPackage: join(folder, 'datapackage.json'),
  };
}

/** The machine, without anything that tells whose it is. */
export interface RunMachine {
  readonly cores: number;
  readonly node: string;
  readonly platform: string;
}

export function thisMachine(): RunMachine {
  return {
    cores: cpus().length,
    node: process.versions.node,
    platform: `${process.platform} ${process.arch}`,
  };
}

export const runStatuses = ['running', 'finished', 'interrupted'] as const;
export type RunStatus = (typeof runStatuses)[number];

/** What run.json holds. Plain data: no absolute paths and no names of machines or people. */
export interface RunRecord {
  readonly program: string;
  readonly version: string;
  /** As given on the command line, without the folders before it. */
  readonly studyFile: string;
  readonly studyText: string;
  /** SHA-256 of the text, hexadecimal. */
  readonly studyHash: string;
  readonly status: RunStatus;
  readonly combinations: number;
  /** Combinations a block covers. */
  readonly blockSize: number;
  /** Blocks a part covers; fixed when the run begins. */
  readonly blocksPerPart: number;
  /** Rows of the table: combinations without the skipped ones. */
  readonly rows: number;
  /** Files of the table, once it is put together. */
  readonly cases?: AssembledCases;
  /** Column names in their order. */
  readonly columns: readonly string[];
  /** Method by topic. */
  readonly methods: Readonly<Record<string, string>>;
  readonly machine: RunMachine;
  /** ISO 8601, UTC. */
  readonly started: string;
  readonly finished?: string;
  /** Time spent working, interruptions left out. */
  readonly seconds: number;
}

/** Writes run.json whole or not at all; makes the folder when it is not there. */
export function writeRun(folder: string, record: RunRecord): void {
  makeFolder(folder);
  writeFileAtomically(runPaths(folder).record, `${JSON.stringify(record, undefined, 2)}\n`);
}

/** Reads run.json; NO_SUCH_RUN when it is missing or damaged. */
export function readRun(folder: string): RunRecord {
  const path = runPaths(folder).record;
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? error.code : undefined;
    if (code !== 'ENOENT' && code !== 'ENOTDIR') throw readFault(error, path);
    throw new UsageError(
      'NO_SUCH_RUN',
      `${folder} holds no run: there is no run.json in it.`,
      'Name a folder that a run has written, such as out/coastal-tourer.',
    );
  }
  const fault = recordFault(text);
  if (fault === undefined) return JSON.parse(text) as RunRecord;
  throw new UsageError(
    'NO_SUCH_RUN',
    `${path} is damaged: ${fault}.`,
    'Run the study afresh into another folder; the finished parts in this one may be of use to an expert only.',
  );
}

type Check = (value: unknown) => boolean;
const isText: Check = (value) => typeof value === 'string';
const isCount: Check = (value) => Number.isSafeInteger(value) && (value as number) >= 0;
const isNumber: Check = (value) => typeof value === 'number' && value >= 0;
const isObject: Check = (value) => typeof value === 'object' && value !== null && !Array.isArray(value);

const recordChecks: Record<keyof RunRecord, Check> = {
  program: isText,
  version: isText,
  studyFile: isText,
  studyText: isText,
  studyHash: isText,
  status: (value) => runStatuses.some((status) => status === value),
  combinations: isCount,
  blockSize: isCount,
  blocksPerPart: isCount,
  cases: (value) => value === undefined || isObject(value),
  rows: isCount,
  columns: (value) => Array.isArray(value) && value.every(isText),
  methods: (value) => isObject(value) && Object.values(value as object).every(isText),
  machine: (value) => isObject(value) && isCount((value as Partial<RunMachine>).cores),
  started: isText,
  finished: (value) => value === undefined || isText(value),
  seconds: isNumber,
};

/** What is wrong with the text of a run.json; undefined when nothing is. */
function recordFault(text: string): string | undefined {
  let found: unknown;
  try {
    found = JSON.parse(text);
  } catch {
    return 'it is not well-formed JSON';
  }
  if (!isObject(found)) return 'it holds no record';
  const record = found as Record<string, unknown>;
  const wrong = Object.entries(recordChecks).find(([key, check]) => !check(record[key]));
  return wrong === undefined ? undefined : `${wrong[0]} is missing or of the wrong kind`;
}
