import { existsSync, readdirSync, readFileSync, truncateSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
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

/** Hashes of the table when nothing comes in between. */
async function undisturbed(folder: string, study: string): Promise<Record<string, string>> {
  const { outcome } = await runHere(study, join(folder, 'undisturbed'));
  expect(outcome).toBe('finished');
  return hashesOfTable(join(folder, 'undisturbed', 'study'));
}

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
    const study = writeStudy(folder, narrowTable);
    const expected = await undisturbed(folder, study);
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
      else expect(ended).toMatchObject({ code: exitCodes.done });
    }
    expect(killed).toBeGreaterThan(0);
    const last = await startProgram(args);
    expect(last).toMatchObject({ code: exitCodes.done });
    const run = join(folder, 'killed', 'study');
    expect(hashesOfTable(run)).toEqual(expected);
    expect(filesOf(run).filter((name) => name.includes('.tmp') || name.startsWith('parts'))).toEqual([]);
  });

  it('between table and reports goes on with the reports and clears the parts', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, narrowTable);
    const expected = await undisturbed(folder, study);
    const run = join(folder, 'undisturbed', 'study');
    const record = JSON.parse(readFileSync(join(run, 'run.json'), 'utf8'));
    delete record.finished;
    writeFileSync(join(run, 'run.json'), JSON.stringify({ ...record, status: 'running' }));
    await runInPart(study, join(folder, 'parts-only'));
    const { cpSync } = await import('node:fs');
    cpSync(join(folder, 'parts-only', 'study', 'parts'), join(run, 'parts'), { recursive: true });
    const { outcome, told } = await runHere(study, join(folder, 'undisturbed'));
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
    const study = writeStudy(folder, narrowTable);
    const expected = await undisturbed(folder, study);
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

describe('a damaged part', () => {
  it.each([
    ['cut short', (path: string) => truncateSync(path, 5000)],
    ['emptied', (path: string) => truncateSync(path, 0)],
    [
      'with one bit turned',
      (path: string) => {
        const bytes = readFileSync(path);
        bytes[Math.floor(bytes.length / 2)] ^= 1;
        writeFileSync(path, bytes);
      },
    ],
  ])('%s is found, told and evaluated again', async (_, damage) => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, narrowTable);
    const expected = await undisturbed(folder, study);
    await runInPart(study, folder, 2);
    const parts = join(folder, 'study', 'parts');
    const before = readdirSync(parts).filter((name) => name.endsWith('.part'));
    expect(before.length).toBeGreaterThanOrEqual(2);
    damage(join(parts, before[1]));
    const { told } = await runHere(study, folder);
    expect(told.notes).toEqual([`${join(parts, before[1])} is damaged and is evaluated again.`]);
    expect(told.alreadyDone).toEqual([(before.length - 1) * 16_384]);
    expect(hashesOfTable(join(folder, 'study'))).toEqual(expected);
  });
});
