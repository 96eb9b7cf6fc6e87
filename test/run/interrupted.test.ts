import {
  cpSync,
  existsSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  truncateSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { exitCodes } from '../../src/errors.ts';
import { readRun } from '../../src/results/run-folder.ts';
import {
  combinations,
  filesOf,
  hashesOfTable,
  narrowTable,
  runHere,
  runInPart,
  startProgram,
  temporaryFolder,
  writeStudy,
} from './run-folder.ts';

/** The study, and its run with nothing coming in between. */
const undisturbed = mkdtempSync(join(tmpdir(), 'aftlimit-undisturbed-'));
const study = writeStudy(undisturbed, narrowTable);
let expected: Record<string, string> = {};

beforeAll(async () => {
  expect((await runHere(study, undisturbed)).outcome).toBe('finished');
  expected = hashesOfTable(join(undisturbed, 'study'));
  expect(Object.keys(expected)).toEqual(['cases.csv', 'cases.parquet']);
});

afterAll(() => rmSync(undisturbed, { recursive: true, force: true }));

/** Pseudo-random numbers 0…1 (Park and Miller's minimal standard, from memory); moments of a kill, no more. */
function* randomNumbers(seed: number): Generator<number, never> {
  let state = seed;
  for (;;) {
    state = (state * 48_271) % 2_147_483_647;
    yield state / 2_147_483_647;
  }
}

describe('a run that is killed', () => {
  it('at any moment and started again gives the same bytes', async () => {
    const folder = temporaryFolder();
    const random = randomNumbers(11);
    const args = [
      'run',
      study,
      '--out',
      join(folder, 'killed'),
      '--workers',
      '2',
      '--part-size',
      '1',
      '--no-charts',
      '--json-lines',
    ];
    // the event after which it is killed, and the longest wait from there on [ms]
    const moments = [
      ['planned', 150],
      ['progress', 30],
      ['progress', 0],
      ['step', 120],
    ] as const;
    let killed = 0;
    for (const [event, wait] of moments) {
      const delay = random.next().value * wait;
      const ended = await startProgram(args, (line, child) => {
        if (line.includes(`"event":"${event}"`)) setTimeout(() => child.kill('SIGKILL'), delay);
      });
      if (ended.signal === 'SIGKILL') killed++;
      else expect(ended.code, ended.stderr).toBe(exitCodes.done);
    }
    expect(killed).toBeGreaterThan(0);
    const last = await startProgram(args);
    expect(last.code, last.stderr).toBe(exitCodes.done);
    const run = join(folder, 'killed', 'study');
    expect(hashesOfTable(run)).toEqual(expected);
    expect(filesOf(run).filter((name) => name.includes('.tmp') || name.startsWith('parts'))).toEqual([]);
  });

  it('between table and reports goes on with the reports and clears the parts', async () => {
    const folder = temporaryFolder();
    const run = join(folder, 'study');
    cpSync(join(undisturbed, 'study'), run, { recursive: true });
    const record = JSON.parse(readFileSync(join(run, 'run.json'), 'utf8'));
    delete record.finished;
    writeFileSync(join(run, 'run.json'), JSON.stringify({ ...record, status: 'running' }));
    await runInPart(study, join(folder, 'parts-only'));
    cpSync(join(folder, 'parts-only', 'study', 'parts'), join(run, 'parts'), { recursive: true });
    const { outcome, told } = await runHere(study, folder);
    expect(outcome).toBe('finished');
    expect(told.progress).toEqual([]);
    expect(hashesOfTable(run)).toEqual(expected);
    expect(existsSync(join(run, 'parts'))).toBe(false);
    expect(readRun(run).status).toBe('finished');
  });
});

describe('a run that is stopped', () => {
  it('by Ctrl-C ends with 130, says what is saved, and goes on to the same bytes', async () => {
    const folder = temporaryFolder();
    const args = [
      'run',
      study,
      '--out',
      folder,
      '--workers',
      '1',
      '--part-size',
      '1',
      '--no-charts',
      '--json-lines',
    ];
    const stopped = await startProgram(args, (line, child) => {
      if (line.includes('"event":"planned"')) child.kill('SIGINT');
    });
    expect(stopped).toMatchObject({ code: exitCodes.interrupted, signal: null });
    const notes = stopped.stderr
      .split('\n')
      .filter((line) => line.includes('"event":"note"'))
      .join('\n');
    expect(notes).toContain('SIGINT');
    const saved = /Stopped\. (\d+) of (\d+) combinations are saved in (\S+);/.exec(notes);
    expect(saved?.[2]).toBe(String(combinations));
    const run = join(folder, 'study');
    expect(saved?.[3]).toBe(run);
    const parts = readdirSync(join(run, 'parts')).filter((name) => name.endsWith('.part'));
    expect(Number(saved?.[1])).toBe(parts.length * 16_384);
    expect(readRun(run)).toMatchObject({ status: 'interrupted', combinations });
    expect(hashesOfTable(run)).toEqual({});

    const { outcome, told } = await runHere(study, folder);
    expect(outcome).toBe('finished');
    expect(told.alreadyDone).toEqual([parts.length * 16_384]);
    expect(told.progress).toHaveLength(5 - parts.length);
    expect(hashesOfTable(run)).toEqual(expected);
  });
});

describe('damaged parts', () => {
  const damages: readonly ((path: string) => void)[] = [
    (path) => truncateSync(path, 5000),
    (path) => truncateSync(path, 0),
    (path) => {
      const bytes = readFileSync(path);
      bytes[Math.floor(bytes.length / 2)] ^= 1;
      writeFileSync(path, bytes);
    },
  ];

  it('cut short, emptied or with one bit turned are found, told and evaluated again', async () => {
    const folder = temporaryFolder();
    await runInPart(study, folder, damages.length);
    const parts = join(folder, 'study', 'parts');
    const paths = readdirSync(parts)
      .filter((name) => name.endsWith('.part'))
      .map((name) => join(parts, name));
    expect(paths.length).toBeGreaterThanOrEqual(damages.length);
    damages.forEach((damage, k) => {
      damage(paths[k]);
    });
    const { told } = await runHere(study, folder);
    expect(told.notes).toEqual(
      paths.slice(0, damages.length).map((path) => `${path} is damaged and is evaluated again.`),
    );
    expect(told.alreadyDone).toEqual([(paths.length - damages.length) * 16_384]);
    expect(hashesOfTable(join(folder, 'study'))).toEqual(expected);
  });
});
