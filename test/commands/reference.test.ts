/** Commands that print what the program knows: new, figures, schema, help, completion. */
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { parse } from 'yaml';
import { complete } from '../../src/commands/complete.ts';
import { starterKinds, starterStudy } from '../../src/study/starters.ts';
import { aftlimit, answerOf, programFile, shortRun, starterFile, temporaryFolder } from './command-line.ts';
import { schemaFaults } from './schema-faults.ts';

const { path: folder, remove } = temporaryFolder();
const study = starterFile(folder);
let finishedRun: string;

beforeAll(async () => {
  finishedRun = await shortRun(folder, study, 'finished');
});
afterAll(remove);

interface ListedFigure {
  readonly name: string;
  readonly column: string;
  readonly unit: string;
  readonly meaning: string;
  readonly formula: string;
  readonly source: string;
}

const demos = ['coastal-tourer', 'club-sailplane', 'survey-uncrewed'];
const demoText = (name: string) =>
  readFileSync(fileURLToPath(new URL(`../../studies/${name}.yaml`, import.meta.url)), 'utf8');

describe.concurrent('new', () => {
  test.each(starterKinds)('%s is printed, and check finds no fault in it', async (kind) => {
    const printed = await aftlimit(['new', kind]);
    expect(printed).toEqual({ code: 0, stdout: starterStudy(kind), stderr: '' });
    const path = join(folder, `new-${kind}.yaml`);
    const written = await aftlimit(['new', kind, '--to', path]);
    expect({ code: written.code, stdout: written.stdout }).toEqual({ code: 0, stdout: '' });
    expect(readFileSync(path, 'utf8')).toBe(printed.stdout);
    const checked = await aftlimit(['check', path]);
    expect(checked.code).toBe(0);
    expect(checked.stdout).toContain(`${parse(printed.stdout).title}: no fault found.`);
  });
});

describe.concurrent('figures', () => {
  const listed = async (...args: string[]) => {
    const { code, stdout, stderr } = await aftlimit(['figures', ...args, '--json']);
    expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    return JSON.parse(stdout) as ListedFigure[];
  };

  test('--json of a study, and of its run, has every column of the table', async () => {
    const [header = ''] = readFileSync(join(finishedRun, 'cases.csv'), 'utf8').split('\n');
    for (const place of [study, finishedRun]) {
      const columns = new Set((await listed(place)).map(({ column }) => column));
      expect(header.split(',').filter((column) => !columns.has(column))).toEqual([]);
    }
  });

  test('each is told once, with meaning, formula and source', async () => {
    const figures = await listed();
    expect(figures.length).toBeGreaterThan(60);
    expect(new Set(figures.map(({ name }) => name)).size).toBe(figures.length);
    for (const { name, meaning, formula, source } of figures) {
      expect(meaning, name).toMatch(/\.$/);
      expect(formula, name).not.toBe('');
      expect(source, name).not.toBe('');
    }
  });

  test('as text there is a line for each', async () => {
    const [{ stdout }, figures] = [await aftlimit(['figures']), await listed()];
    const first = new Set(stdout.split('\n').map((line) => line.split(' ')[0]));
    expect(figures.filter(({ name }) => !first.has(name)).map(({ name }) => name)).toEqual([]);
  });
});

describe('schema', () => {
  test('accepts the demo studies and the starters, and refuses what they are not', async () => {
    const { code, stdout } = await aftlimit(['schema']);
    expect(code).toBe(0);
    const schema = JSON.parse(stdout);
    expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
    for (const text of [...demos.map(demoText), ...starterKinds.map(starterStudy)]) {
      expect(schemaFaults(schema, parse(text))).toEqual([]);
    }
    const tourer = parse(demoText('coastal-tourer'));
    const { conditions: _, ...incomplete } = tourer;
    expect(schemaFaults(schema, incomplete)).toEqual(['$: conditions is missing']);
    expect(schemaFaults(schema, { ...tourer, condition: [] })).toEqual(['$: condition is not known']);
    expect(schemaFaults(schema, { ...tourer, show: 'imperial' })).toEqual([
      '$.show: not one of those offered',
    ]);
    expect(schemaFaults(schema, { ...tourer, title: 7 })).toEqual(['$.title: not a string']);
    expect(schemaFaults(schema, { ...tourer, aeroplane: { ...tourer.aeroplane, mass: true } })).toEqual([
      '$.aeroplane.mass: not a number or string',
    ]);
  });
});

const commands = ['run', 'check', 'worksheet', 'charts', 'figures', 'schema', 'new', 'flight-test'];

describe.concurrent('help', () => {
  test('lists the commands', async () => {
    const { code, stdout, stderr } = await aftlimit(['--help']);
    expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    for (const command of commands) expect(stdout).toMatch(new RegExp(`^ {2}aftlimit ${command}\\b`, 'm'));
  });

  test.each(commands)('of %s begins with its form', async (command) => {
    const { code, stdout, stderr } = await aftlimit([command, '--help']);
    expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    expect(stdout).toMatch(new RegExp(`^aftlimit ${command}\\b`));
  });

  test('is in English whatever the machine speaks', async () => {
    const german = { environment: { LC_ALL: 'de_DE.UTF-8', LANG: 'de_DE.UTF-8', LANGUAGE: 'de' } };
    expect(await aftlimit(['--help'], german)).toEqual(await aftlimit(['--help']));
  });

  test('--version is that of the package', async () => {
    const { version } = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8'));
    expect(await aftlimit(['--version'])).toEqual({ code: 0, stdout: `${version}\n`, stderr: '' });
  });
});

describe('completion', () => {
  test('in bash offers commands, options, choices, studies and runs', async () => {
    const place = join(folder, 'place');
    mkdirSync(join(place, 'out', 'done'), { recursive: true });
    mkdirSync(join(place, 'my studies'));
    writeFileSync(join(place, 'out', 'done', 'run.json'), '{}');
    for (const name of ['glider.yml', 'notes.txt', 'my studies/a.yaml']) writeFileSync(join(place, name), '');
    const script = await aftlimit(['completion'], { environment: { SHELL: '/bin/bash' } });
    expect(script).toMatchObject({ code: 0, stderr: '' });
    writeFileSync(join(folder, 'completion.sh'), script.stdout);
    const lines = [
      ['r'],
      ['run', ''],
      ['run', '--qui'],
      ['run', '--no-c'],
      ['charts', ''],
      ['new', 't'],
      ['run', '--out', ''],
    ];
    const ask = lines.map(
      (words) =>
        `COMP_WORDS=(aftlimit ${words.map((word) => `'${word}'`).join(' ')}); COMP_CWORD=${words.length}; _aftlimit_yargs_completions; (IFS='|'; echo "\${COMPREPLY[*]}")`,
    );
    const setUp = `aftlimit() { '${process.execPath}' '${programFile}' "$@"; }; source '${folder}/completion.sh'`;
    const bash = await answerOf('bash', ['-c', [setUp, ...ask].join('\n')], { folder: place });
    expect(bash.stderr).toBe('');
    expect(bash.stdout.split('\n')).toEqual([
      'run',
      'glider.yml|"my studies/a.yaml"',
      '--quiet',
      '--no-charts',
      'out/done',
      'tourer',
      '',
      '',
    ]);
  });

  test('offers options once the study is there, and no short forms beside the long', () => {
    const offered = ['--out', '--quiet', '--q', '-q'];
    expect(complete(['aftlimit', 'run', 'study.yaml', ''], offered)).toEqual(['--out', '--quiet']);
    expect(complete(['aftlimit', 'run', '-'], offered)).toEqual(['--out', '--quiet']);
    expect(complete(['aftlimit', 'run', '--out', 'runs', join(folder, 'uncr')], offered)).toEqual([study]);
    expect(complete(['aftlimit', 'run', join(folder, 'nowhere', '')], offered)).toEqual([]);
  });

  test('every command is offered', async () => {
    const { stdout } = await aftlimit(['--get-yargs-completions', 'aftlimit', ''], {
      environment: { SHELL: '/bin/bash' },
    });
    expect(stdout.trim().split('\n').sort()).toEqual([...commands, 'completion'].sort());
  });
});
