/** Whole runs in temporary folders, in this process or as the built program. */
import type { ChildProcess } from 'node:child_process';
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onTestFinished } from 'vitest';
import type { Reporter } from '../../src/engine/reporter.ts';
import { casesFileName } from '../../src/results/assemble.ts';
import type { RunOptions, RunOutcome } from '../../src/run-study.ts';
import { runStudy } from '../../src/run-study.ts';
import { studyText } from '../studies.ts';

/** Five blocks and a little: 65,835 combinations, of which a rule leaves out some. */
export const manyCombinations = {
  vary: `wing.span: {from: 8.4 m, to: 11 m, count: 15, hold: area}
wing.taper: [0.4, 0.6, 0.8]
tail.arm: {from: 3.4 m, to: 5.2 m, count: 19}
tail.volume: {from: 0.3, to: 0.6, count: 11}
cg: [{forward: 20 %, aft: 29 %}, {forward: 21 %, aft: 30 %}, {forward: 22 %, aft: 31 %}, {forward: 24 %, aft: 33 %},
  {forward: 26 %, aft: 36 %}, {forward: 27 %, aft: 37 %}, {forward: 28 %, aft: 38 %}]`,
  skip: '- {when: {wing.taper: {above: 0.7}, tail.volume: {below: 0.35}}, because: too little tail}',
  require: 'static_margin: {at_least: 5 %, at_most: 20 %}\ndoor: {figure: wing_span, at_most: 10.6 m}',
};

export const combinations = 15 * 3 * 19 * 11 * 7;

/** The same with a narrow table, for tests that run it many times. */
export const narrowTable = {
  ...manyCombinations,
  rest: 'table: {columns: [neutral_point, tail_area]}',
};

/** A folder that goes when the test ends. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'aftlimit-run-'));
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

export function writeStudy(
  folder: string,
  changed: Parameters<typeof studyText>[0],
  name = 'study.yaml',
): string {
  const path = join(folder, name);
  writeFileSync(path, studyText(changed));
  return path;
}

export interface Told {
  readonly notes: string[];
  readonly steps: string[];
  readonly progress: number[];
  readonly alreadyDone: number[];
  finished: number;
}

export interface RunHere extends Partial<Omit<RunOptions, 'studyFile' | 'out'>> {
  /** Called after each part with the number of parts told so far. */
  readonly onProgress?: (parts: number) => void;
}

/** Runs a study in this process, its workers from the build, without charts. */
export async function runHere(
  studyFile: string,
  out: string,
  { onProgress, ...options }: RunHere = {},
): Promise<{ readonly outcome: RunOutcome; readonly told: Told }> {
  const told: Told = { notes: [], steps: [], progress: [], alreadyDone: [], finished: 0 };
  const reporter: Reporter = {
    planned: (plan) => told.alreadyDone.push(plan.alreadyDone),
    progress: (done) => {
      told.progress.push(done);
      onProgress?.(told.progress.length);
    },
    step: (what) => told.steps.push(what),
    note: (text) => told.notes.push(text),
    finished: () => told.finished++,
  };
  const defaults = { workers: 2, afresh: false, charts: false, stop: new AbortController().signal };
  const outcome = await runStudy({ studyFile, out, ...defaults, ...options }, reporter);
  return { outcome, told };
}

/** Runs until so many parts are told, then stops: parts in hand are finished, the others are missing. */
export async function runInPart(studyFile: string, out: string, parts = 1): Promise<Told> {
  const stop = new AbortController();
  const { outcome, told } = await runHere(studyFile, out, {
    workers: 1,
    stop: stop.signal,
    onProgress: (count) => {
      if (count >= parts) stop.abort();
    },
  });
  if (outcome !== 'stopped') throw new Error('the run came to its end before it was stopped');
  return told;
}

/** SHA-256 of every cases file of a run, by name. */
export function hashesOfTable(folder: string): Record<string, string> {
  const names = readdirSync(folder).filter((name) => casesFileName.test(name));
  const hash = (name: string) =>
    createHash('sha256')
      .update(readFileSync(join(folder, name)))
      .digest('hex');
  return Object.fromEntries(names.sort().map((name) => [name, hash(name)]));
}

export function filesOf(folder: string): string[] {
  return readdirSync(folder, { recursive: true }).map(String).sort();
}

export interface Ended {
  readonly code: number | null;
  readonly signal: NodeJS.Signals | null;
  readonly stderr: string;
  readonly stdout: string;
}

/** Starts the built program; `onLine` sees each line of standard error as it comes. */
export function startProgram(
  args: readonly string[],
  onLine: (line: string, child: ChildProcess) => void = () => {},
): Promise<Ended> {
  const program = new URL('../../.build/cli.js', import.meta.url).pathname;
  const child = spawn(process.execPath, [program, ...args], { stdio: ['ignore', 'pipe', 'pipe'] });
  let [stdout, stderr, pending] = ['', '', ''];
  child.stdout.setEncoding('utf8').on('data', (text: string) => {
    stdout += text;
  });
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    stderr += text;
    const lines = (pending + text).split('\n');
    pending = lines.pop() ?? '';
    for (const line of lines) onLine(line, child);
  });
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('close', (code, signal) => resolve({ code, signal, stderr, stdout }));
  });
}
