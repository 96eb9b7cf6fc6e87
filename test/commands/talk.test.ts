import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import type { FinishedRun } from '../../src/engine/reporter.ts';
import { starterStudy } from '../../src/study/starters.ts';
import { aftlimit, answerOf, programFile, shortRun, starterFile, temporaryFolder } from './command-line.ts';

const { path: folder, remove } = temporaryFolder();
const study = starterFile(folder);
const faulty = join(folder, 'faulty.yaml');
writeFileSync(faulty, starterStudy('uncrewed').replace('mass: 6.5 kg', 'mass: 6.5 m'));
afterAll(remove);

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
const escapeCharacter = String.fromCharCode(27);
const linesOf = (text: string) => text.trimEnd().split('\n');

describe.concurrent('results go to standard output, talk to standard error', () => {
  test('a run talks on standard error only, in plain lines where no terminal is', async () => {
    const { code, stdout, stderr } = await aftlimit(run('plain'));
    expect({ code, stdout }).toEqual({ code: 0, stdout: '' });
    expect(stderr).toContain('189 combinations on');
    expect(stderr).toMatch(/^100 % {2}189 of 189/m);
    expect(stderr).toMatch(/^Done in .* of 189 combinations are feasible .*plain\/summary\.md$/m);
    expect(stderr).not.toContain(escapeCharacter);
    expect(stderr).not.toContain('\r');
  });

  test.each(['-q', '--quiet'])('%s is silent', async (flag) => {
    expect(await aftlimit(run(`silent${flag}`, flag))).toEqual({ code: 0, stdout: '', stderr: '' });
  });

  test('-q still tells what went wrong', async () => {
    const { code, stdout, stderr } = await aftlimit(['run', faulty, '-q', '--out', folder]);
    expect({ code, stdout }).toEqual({ code: 2, stdout: '' });
    expect(stderr).toContain('WRONG_DIMENSION');
  });

  test('--json-lines says each thing as one JSON object on a line', async () => {
    const { code, stdout, stderr } = await aftlimit(run('json', '--json-lines'));
    expect({ code, stdout }).toEqual({ code: 0, stdout: '' });
    const events = linesOf(stderr).map((line) => JSON.parse(line) as { event: string; time: string });
    for (const { time } of events) expect(new Date(time).toISOString()).toBe(time);
    expect(events[0]).toMatchObject({ event: 'planned', combinations: 189, alreadyDone: 0 });
    expect(events).toContainEqual(expect.objectContaining({ event: 'progress', done: 189, total: 189 }));
    const finished = events.at(-1) as unknown as FinishedRun & { event: string };
    expect(finished).toMatchObject({ event: 'finished', combinations: 189, rows: 189 });
    const rows = linesOf(readFileSync(join(folder, 'json', 'cases.csv'), 'utf8')).slice(1);
    expect(rows).toHaveLength(189);
    expect(rows.filter((row) => row.split(',').includes('yes'))).toHaveLength(finished.feasible);
  });

  test('--json-lines tells a failure the same way', async () => {
    const { code, stderr } = await aftlimit(['run', faulty, '--json-lines', '--out', folder]);
    expect(code).toBe(2);
    const [event, ...more] = linesOf(stderr).map((line) => JSON.parse(line));
    expect(more).toEqual([]);
    expect(event).toMatchObject({ event: 'failed', exitCode: 2, file: faulty });
    expect(event.faults).toEqual([
      expect.objectContaining({ code: 'WRONG_DIMENSION', line: expect.any(Number) }),
    ]);
    const machine = await aftlimit(run('json-disk', '--json-lines'), { breakage: 'small-disk' });
    expect(machine.code).toBe(1);
    expect(JSON.parse(linesOf(machine.stderr).at(-1)!)).toMatchObject({
      event: 'failed',
      exitCode: 1,
      code: 'DISK_TOO_SMALL',
      remedy: expect.stringContaining('Make room'),
    });
  });

  test('check writes its report to standard output, and nothing on the disk', async () => {
    const { path, remove: removeIt } = temporaryFolder();
    const { code, stdout, stderr } = await aftlimit(['check', study], { folder: path });
    expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    expect(stdout).toContain('189 from 3 axes');
    const listing = await answerOf('ls', ['-A', path]);
    expect(listing.stdout).toBe('');
    removeIt();
  });

  test('a closed output ends the program quietly, a full one with its code', async () => {
    const shell = (line: string) => answerOf('bash', ['-c', line, 'bash', process.execPath, programFile]);
    const head = await shell('set -o pipefail; "$1" "$2" schema | head -1');
    expect(head).toEqual({ code: 0, stdout: '{\n', stderr: '' });
    const full = await shell('"$1" "$2" schema > /dev/full');
    expect(full.code).toBe(1);
    expect(full.stderr).toMatch(/^DISK_FULL {2}Could not write to standard output/);
  });

  test('a run goes on when its standard error is closed', async () => {
    const line = `"$1" "$2" ${run('unheard').join(' ')} 2>&1 >/dev/null | true; test \${PIPESTATUS[0]} = 0`;
    expect((await answerOf('bash', ['-c', line, 'bash', process.execPath, programFile])).code).toBe(0);
    expect(JSON.parse(readFileSync(join(folder, 'unheard', 'run.json'), 'utf8')).status).toBe('finished');
  });
});

/** `script` gives the program a terminal; it is part of util-linux. */
const hasTerminal = (await answerOf('script', ['--version']).catch(() => ({ code: 1 }))).code === 0;

describe.skipIf(!hasTerminal)('on a terminal', () => {
  const onTerminal = (args: readonly string[], environment: Record<string, string> = {}) =>
    answerOf('script', ['-qec', [process.execPath, programFile, ...args].join(' '), '/dev/null'], {
      environment: { TERM: 'xterm', ...environment },
    });
  const colour = `${escapeCharacter}[`;

  test('faults are coloured, unless NO_COLOR is set', async () => {
    const args = ['check', faulty];
    const coloured = await onTerminal(args);
    expect(coloured.code).toBe(2);
    expect(coloured.stdout).toContain(colour);
    const plain = await onTerminal(args, { NO_COLOR: '1' });
    expect(plain.stdout).toContain('WRONG_DIMENSION');
    expect(plain.stdout).not.toContain(colour);
    // https://no-color.org: an empty value does not count (from memory).
    expect((await onTerminal(args, { NO_COLOR: '' })).stdout).toContain(colour);
  });

  test('a run shows a bar', async () => {
    const { stdout } = await onTerminal(run('bar'));
    expect(stdout).toMatch(/█{30} 100 % {2}189 of 189/);
  });
});

test('a band of the charts judges the finished run anew', async () => {
  const finished = await shortRun(folder, study, 'judged');
  const { code, stdout } = await aftlimit(['charts', finished, '--band', '-100%:100%']);
  expect(code).toBe(0);
  const [, feasible] = /^(\d+) of 189 combinations are feasible with the band/.exec(stdout) ?? [];
  const rows = linesOf(readFileSync(join(finished, 'cases.csv'), 'utf8')).map((row) => row.split(','));
  const labels = rows[0]!.indexOf('fails');
  // With a band that nothing misses, only the study's other requirement, short_tail, is left.
  const others = rows.slice(1).filter((row) => !row[labels]!.includes('short_tail'));
  expect(Number(feasible)).toBe(others.length);
  expect(others.length).toBeLessThan(189);
});
