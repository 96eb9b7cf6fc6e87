import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { machineFaultCodes, usageFaultCodes } from '../../src/errors.ts';
import { starterStudy } from '../../src/study/starters.ts';
import type { Answer, Surroundings } from './command-line.ts';
import { aftlimit, shortRun, starterFile, temporaryFolder } from './command-line.ts';

const { path: folder, remove } = temporaryFolder();
const study = starterFile(folder);
let finishedRun: string;

beforeAll(async () => {
  finishedRun = await shortRun(folder, study, 'finished');
});
afterAll(remove);

/** The answer is code, message and remedy on standard error, and nothing on standard output. */
function expectFailure(answer: Answer, exitCode: number, code: string, message: RegExp) {
  expect(answer.stderr).toMatch(new RegExp(`^${code}  \\S`, 'm'));
  expect(answer.stderr).toMatch(message);
  expect(answer.stderr.split('\n').at(-2), 'a remedy').toMatch(/^ {2}\S/);
  expect(answer.stdout).toBe('');
  expect(answer.code).toBe(exitCode);
}

interface Case {
  readonly code: string;
  readonly when: string;
  readonly args: () => readonly string[];
  readonly message: RegExp;
  readonly surroundings?: Surroundings;
}

const run = (name: string, ...more: string[]) => [
  'run',
  study,
  '--out',
  folder,
  '--name',
  name,
  '--no-charts',
  ...more,
];

const usageCases: readonly Case[] = [
  {
    code: 'BAD_ARGUMENT',
    when: 'a number of the study is misspelt in --set',
    args: () => ['worksheet', study, '--set', 'wing.taqer=0.5'],
    message: /'wing\.taqer=0\.5' names no number[\s\S]*Did you mean wing\.taper\?/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: '--set gives a number in a wrong unit',
    args: () => ['worksheet', study, '--set', 'tail.arm=3 kg'],
    message: /'kg'.*length/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: '--set gives one number twice',
    args: () => ['worksheet', study, '--set', 'wing.taper=0.5', '--set', 'wing.taper=0.6'],
    message: /wing\.taper twice/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: '--set and --combination are given together',
    args: () => ['worksheet', study, '--combination', '0', '--set', 'wing.taper=0.5'],
    message: /--set goes with the baseline/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: 'the carpet’s figure is misspelt',
    args: () => ['charts', finishedRun, '--carpet', 'neutral_pont tail.arm tail.volume'],
    message: /no figure neutral_pont; did you mean neutral_point/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: 'the carpet’s axis is not varied',
    args: () => ['charts', finishedRun, '--carpet', 'tail_area tail.arm wing.span'],
    message: /wing\.span is not varied; .*tail\.arm/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: 'the carpet has one axis only',
    args: () => ['charts', finishedRun, '--carpet', 'tail_area tail.arm'],
    message: /two varied numbers/,
  },
  {
    code: 'BAD_ARGUMENT',
    when: 'the carpet names one axis twice',
    args: () => ['charts', finishedRun, '--carpet', 'tail_area tail.arm tail.arm'],
    message: /two different/,
  },
  ...['a/b', '..', '.hidden', 'a\\b'].map((name) => ({
    code: 'BAD_ARGUMENT',
    when: `a run is named ${name}`,
    args: () => ['run', study, '--name', name],
    message: /--name is one folder name/,
  })),
  {
    code: 'NO_SUCH_FILE',
    when: 'the study is not there',
    args: () => ['check', join(folder, 'nothing.yaml')],
    message: /nothing\.yaml is not there/,
  },
  {
    code: 'NO_SUCH_FILE',
    when: 'the study is a folder',
    args: () => ['run', folder],
    message: /is a folder/,
  },
  {
    code: 'NO_SUCH_FILE',
    when: 'the folder of a new study is not there',
    args: () => ['new', 'tourer', '--to', join(folder, 'nowhere', 'mine.yaml')],
    message: /There is no folder .*nowhere/,
  },
  {
    code: 'NO_SUCH_RUN',
    when: 'the folder of the charts is not there',
    args: () => ['charts', join(folder, 'nothing')],
    message: /holds no run/,
  },
  {
    code: 'NO_SUCH_RUN',
    when: 'the record of the run is damaged',
    args: () => {
      mkdirSync(join(folder, 'torn'));
      writeFileSync(join(folder, 'torn', 'run.json'), '{"program": "aftlim');
      return ['charts', join(folder, 'torn')];
    },
    message: /damaged: it is not well-formed JSON/,
  },
  ...['189', '-1', '0.5', '1e300'].map((number) => ({
    code: 'NO_SUCH_COMBINATION',
    when: `of 189 combinations number ${number} is wanted`,
    args: () => ['worksheet', study, '--combination', number],
    message: /from 0 to 188/,
  })),
  {
    code: 'NO_SUCH_COMBINATION',
    when: 'a skip rule drops the combination',
    args: () => {
      const skipping = `${starterStudy('uncrewed')}\nskip:\n  - {when: {tail.arm: {below: 660 mm}}, because: too short}\n`;
      writeFileSync(join(folder, 'skipping.yaml'), skipping);
      return ['worksheet', join(folder, 'skipping.yaml'), '--combination', '0'];
    },
    message: /Combination 0 is dropped by a skip rule/,
  },
  {
    code: 'RUN_NOT_FINISHED',
    when: 'charts of a run that was interrupted are wanted',
    args: () => {
      const record = JSON.parse(readFileSync(join(finishedRun, 'run.json'), 'utf8'));
      const { cases: _, finished: __, ...unfinished } = { ...record, status: 'interrupted' };
      mkdirSync(join(folder, 'unfinished'));
      writeFileSync(join(folder, 'unfinished', 'run.json'), JSON.stringify(unfinished));
      return ['charts', join(folder, 'unfinished')];
    },
    message: /is not finished/,
  },
  {
    code: 'OTHER_STUDY_IN_FOLDER',
    when: 'the study was changed since the run',
    args: () => {
      const changed = starterStudy('uncrewed').replace('mass: 6.5 kg', 'mass: 6.6 kg');
      writeFileSync(join(folder, 'changed.yaml'), changed);
      return ['run', join(folder, 'changed.yaml'), '--out', folder, '--name', 'finished', '--no-charts'];
    },
    message: /another study[\s\S]*--afresh/,
  },
  {
    code: 'FILE_EXISTS',
    when: 'a new study would overwrite a file',
    args: () => ['new', 'tourer', '--to', study],
    message: /already there[\s\S]*nothing is overwritten/,
  },
];

describe.concurrent('mistakes of the user end with code 2', () => {
  test.each(usageCases)('$code: $when', async ({ args, code, message }) => {
    expectFailure(await aftlimit(args()), 2, code, message);
  });
});

/** As the superuser nothing is forbidden; then another user tries. */
const nobody = process.getuid?.() === 0 ? { user: 65534 } : {};

const machineCases: readonly Case[] = [
  {
    code: 'DISK_TOO_SMALL',
    when: 'less room is free than the run needs',
    args: () => run('small-disk'),
    surroundings: { breakage: 'small-disk' },
    message: /needs about \d+ MB in .*, and 5 MB are free/,
  },
  {
    code: 'DISK_FULL',
    when: 'the disk fills up while parts are written',
    args: () => run('full-disk'),
    surroundings: { breakage: 'full-disk' },
    message: /the disk is full[\s\S]*Nothing finished is lost/,
  },
  {
    code: 'NO_PERMISSION',
    when: 'the folder may not be written',
    args: () => {
      mkdirSync(join(folder, 'locked'), { mode: 0o555 });
      return ['new', 'tourer', '--to', join(folder, 'locked', 'mine.yaml')];
    },
    surroundings: nobody,
    message: /mine\.yaml: it may not be written/,
  },
  {
    code: 'WRITE_FAILED',
    when: 'a file stands where a folder is meant',
    args: () => ['new', 'tourer', '--to', join(study, 'mine.yaml')],
    message: /Could not write .*ENOTDIR/,
  },
  {
    code: 'READ_FAILED',
    when: 'a folder stands where the record of the run should be',
    args: () => {
      mkdirSync(join(folder, 'odd', 'run.json'), { recursive: true });
      return ['charts', join(folder, 'odd')];
    },
    message: /Could not read .*run\.json: .*EISDIR/,
  },
  {
    code: 'PART_LOST',
    when: 'a worker dies twice on a part',
    args: () => run('dying'),
    surroundings: { breakage: 'dying-worker' },
    message: /part 0 died twice; every other part is saved/,
  },
  {
    code: 'PART_LOST',
    when: 'workers die as they start',
    args: () => run('stillborn'),
    surroundings: { breakage: 'stillborn-worker' },
    message: /workers die as they start[\s\S]*part 0 died twice/,
  },
];

describe.concurrent('faults of the machine end with code 1', () => {
  test.each(machineCases)('$code: $when', async ({ args, code, message, surroundings }) => {
    expectFailure(await aftlimit(args(), surroundings), 1, code, message);
  });
});

test('a full disk leaves no torn file, and the same command goes on', async () => {
  await aftlimit(run('goes-on'), { breakage: 'full-disk' });
  expect(readdirSync(join(folder, 'goes-on', 'parts'))).toEqual([]);
  const { code } = await aftlimit(run('goes-on', '--quiet'));
  expect(code).toBe(0);
  const cases = (name: string) => readFileSync(join(folder, name, 'cases.csv'));
  expect(cases('goes-on').equals(cases('finished'))).toBe(true);
});

test('a bug of the program ends with code 70 and says where it is', async () => {
  const answer = await aftlimit(['new', 'tourer', '--to', join(folder, 'never.yaml')], { breakage: 'bug' });
  expect(answer.code).toBe(70);
  expect(answer.stdout).toBe('');
  expect(answer.stderr).toMatch(
    /^This is a bug in aftlimit; finished parts are safe\.\nTypeError: .*\n +at /,
  );
});

test('each code has its case', () => {
  const codes = (cases: readonly Case[]) => [...new Set(cases.map(({ code }) => code))].sort();
  expect(codes(usageCases)).toEqual(Object.keys(usageFaultCodes).sort());
  expect(codes(machineCases)).toEqual(Object.keys(machineFaultCodes).sort());
});
