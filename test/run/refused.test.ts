import { mkdirSync, readFileSync, rmSync, statfsSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { exitCodes, MachineError, UsageError } from '../../src/errors.ts';
import { readRun } from '../../src/results/run-folder.ts';
import { studyText } from '../studies.ts';
import {
  filesOf,
  hashesOfTable,
  narrowTable,
  runHere,
  runInPart,
  startProgram,
  temporaryFolder,
  writeStudy,
} from './run-folder.ts';

const small = { vary: 'wing.span: [9 m, 9.4 m, 10 m]\ntail.volume: {from: 0.4, to: 0.55, count: 7}' };
const other = { vary: 'wing.span: [9 m, 9.4 m, 10.1 m]\ntail.volume: {from: 0.4, to: 0.55, count: 7}' };

describe('a folder that holds another study', () => {
  it('is refused and left as it is', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, small);
    await runHere(study, folder);
    const before = hashesOfTable(join(folder, 'study'));
    for (const changed of [
      other,
      { ...small, require: 'static_margin: {at_least: 6 %}' },
      { ...small, mass: '600 kg' },
      { ...small, rest: 'methods: {downwash: handbook}' },
      { ...small, rest: 'table: {columns: [tail_area]}' },
    ]) {
      writeStudy(folder, changed);
      await expect(runHere(study, folder)).rejects.toMatchObject({
        code: 'OTHER_STUDY_IN_FOLDER',
        remedy: expect.stringContaining('--afresh'),
      });
    }
    expect(hashesOfTable(join(folder, 'study'))).toEqual(before);
    expect(readRun(join(folder, 'study')).status).toBe('finished');
  });

  it('is refused while unfinished as well, and --afresh leaves nothing of the other', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, narrowTable);
    await runInPart(study, folder);
    writeStudy(folder, small);
    await expect(runHere(study, folder)).rejects.toBeInstanceOf(UsageError);
    const { outcome, told } = await runHere(study, folder, { afresh: true });
    expect(outcome).toBe('finished');
    expect(told.alreadyDone).toEqual([0]);
    const alone = temporaryFolder();
    await runHere(study, alone);
    expect(filesOf(join(folder, 'study'))).toEqual(filesOf(join(alone, 'study')));
    expect(hashesOfTable(join(folder, 'study'))).toEqual(hashesOfTable(join(alone, 'study')));
  });

  it('is not met under another name', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, small);
    await runHere(study, folder);
    writeStudy(folder, other);
    expect((await runHere(study, folder, { name: 'second' })).outcome).toBe('finished');
    expect(readRun(join(folder, 'second')).studyText).toBe(studyText(other));
  });
});

describe('the same study again', () => {
  it('finished: says so and does nothing', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, small);
    await runHere(study, folder);
    const record = readFileSync(join(folder, 'study', 'run.json'), 'utf8');
    const { outcome, told } = await runHere(study, folder);
    expect(outcome).toBe('finished');
    expect(told).toMatchObject({ steps: [], progress: [], finished: 0 });
    expect(told.notes.join()).toContain('holds this study, finished');
    expect(readFileSync(join(folder, 'study', 'run.json'), 'utf8')).toBe(record);
  });

  it('with another title, comment or preference: the table stays, the reports are made anew', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, small);
    await runHere(study, folder);
    const before = hashesOfTable(join(folder, 'study'));
    const changed = {
      ...small,
      head: '# a comment\ntitle: Another title',
      rest: 'prefer: {tail_area: less}',
    };
    writeStudy(folder, changed);
    const { outcome, told } = await runHere(study, folder);
    expect(outcome).toBe('finished');
    expect(told).toMatchObject({ progress: [], finished: 1 });
    expect(hashesOfTable(join(folder, 'study'))).toEqual(before);
    const { studyText: text, status } = readRun(join(folder, 'study'));
    expect(text).toBe(studyText(changed));
    expect(status).toBe('finished');
    expect(readFileSync(join(folder, 'study', 'summary.md'), 'utf8')).toContain('Another title');
  });

  it('interrupted, with another title: goes on', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, narrowTable);
    await runInPart(study, folder);
    writeStudy(folder, { ...narrowTable, head: 'title: Another title' });
    const { outcome, told } = await runHere(study, folder);
    expect(outcome).toBe('finished');
    expect(told.alreadyDone[0]).toBeGreaterThan(0);
  });

  it('afresh: evaluates again, to the same bytes', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, small);
    await runHere(study, folder);
    const before = hashesOfTable(join(folder, 'study'));
    const { told } = await runHere(study, folder, { afresh: true });
    expect(told.progress).toEqual([21]);
    expect(hashesOfTable(join(folder, 'study'))).toEqual(before);
  });
});

describe('folders and disks that will not do', () => {
  it('a folder with files that no run made is refused, also afresh', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, small);
    mkdirSync(join(folder, 'study'));
    writeFileSync(join(folder, 'study', 'notes.txt'), 'mine');
    for (const afresh of [false, true]) {
      await expect(runHere(study, folder, { afresh })).rejects.toMatchObject({
        code: 'OTHER_STUDY_IN_FOLDER',
        message: expect.stringContaining('notes.txt'),
      });
    }
    expect(filesOf(join(folder, 'study'))).toEqual(['notes.txt']);
  });

  it('parts without a record are not taken for this study’s', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, { ...narrowTable, mass: '500 kg' });
    await runInPart(study, folder);
    rmSync(join(folder, 'study', 'run.json'));
    writeStudy(folder, narrowTable);
    const { told } = await runHere(study, folder);
    expect(told.alreadyDone).toEqual([0]);
    const alone = temporaryFolder();
    await runHere(study, alone);
    expect(hashesOfTable(join(folder, 'study'))).toEqual(hashesOfTable(join(alone, 'study')));
  });

  /** A thousand million combinations need some terabytes; a disk that has them free is not tried. */
  const { bavail, bsize } = statfsSync('/tmp');
  it.skipIf(bavail * bsize > 4e11)('a disk too small is told before anything is written', async () => {
    const folder = temporaryFolder();
    const vary = `wing.span: {from: 8 m, to: 12 m, count: 1000, hold: area}
tail.arm: {from: 4 m, to: 5 m, count: 1000}
tail.volume: {from: 0.3, to: 0.6, count: 1000}`;
    const study = writeStudy(folder, { vary });
    const stop = new AbortController();
    stop.abort();
    const refused = runHere(study, folder, { stop: stop.signal });
    await expect(refused).rejects.toBeInstanceOf(MachineError);
    await expect(refused).rejects.toMatchObject({
      code: 'DISK_TOO_SMALL',
      message: expect.stringMatching(/needs about .* GB .*, and .* are free/),
    });
    expect(filesOf(folder)).toEqual(['study.yaml']);
  });
});

describe('a study with faults', () => {
  it('is told on standard error with exit code 2, and nothing is written', async () => {
    const folder = temporaryFolder();
    const study = writeStudy(folder, { ...small, mass: '610 m' });
    const ended = await startProgram(['run', study, '--out', join(folder, 'out')]);
    expect(ended).toMatchObject({ code: exitCodes.user, stdout: '' });
    expect(ended.stderr).toContain(`${study}:3:9  WRONG_DIMENSION`);
    expect(filesOf(folder)).toEqual(['study.yaml']);
  });
});
