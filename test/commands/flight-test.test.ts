import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { fly } from '../flight-test/flown.ts';
import { studyText } from '../studies.ts';
import { aftlimit, temporaryFolder } from './command-line.ts';

const { path: folder, remove } = temporaryFolder();
afterAll(remove);

const study = join(folder, 'flown.yaml');
writeFileSync(study, studyText());
const data = join(folder, 'flown.csv');
const rows = fly({ force: (cg, lift) => 0.009 * (0.38 - cg) * (lift - 0.6) }).map((point) =>
  [
    point.name,
    point.calibratedSpeed.toFixed(4),
    point.mass,
    (100 * point.cg).toFixed(2),
    ((point.elevator * 180) / Math.PI).toFixed(3),
    point.stickForce!.toFixed(3),
    'Up',
    'Idle',
    point.height,
  ].join(','),
);
const table = [
  'point,calibrated_speed_m_per_s,mass_kg,cg_percent_mac,elevator_deg,stick_force_N,flaps,power,height_m',
  ...rows,
].join('\n');
writeFileSync(data, table);
const command = (...more: string[]) => ['flight-test', data, '--study', study, ...more];

describe('aftlimit flight-test', () => {
  test('prints the report, and nothing else, on standard output', async () => {
    const { code, stdout, stderr } = await aftlimit(command());
    expect(stderr).toBe('');
    expect(code).toBe(0);
    expect(stdout).toMatch(/^# Test aeroplane: flight test$/m);
    expect(stdout).toMatch(/^\| stick-fixed neutral point \| 42\.0 \|/m);
    expect(stdout).toMatch(/^\| stick-free neutral point \| 38\.0 \|/m);
    expect(stdout).toMatch(
      /^corrections:\n {2}neutral_point: \+4\.\d %\n {2}source: 'flight test \(flown\.csv\)/m,
    );
  });
  test('writes it into a file, with charts beside it', async () => {
    mkdirSync(join(folder, 'reports'));
    const report = join(folder, 'reports', 'flown.md');
    const charts = join(folder, 'reports', 'charts');
    const { code, stdout, stderr } = await aftlimit(command('--to', report, '--chart', charts));
    expect(stdout).toBe('');
    expect(stderr).toBe(`2 charts in ${charts}\n${report} is written.\n`);
    expect(code).toBe(0);
    const text = readFileSync(report, 'utf8');
    const pictures = [...text.matchAll(/!\[[^\]]*\]\(<([^>]*)>\)/g)].map(([, path]) => path!);
    expect(pictures).toEqual([
      'charts/flight-test-1-flaps-up-power-idle-stick-fixed.png',
      'charts/flight-test-1-flaps-up-power-idle-stick-free.png',
    ]);
    for (const picture of pictures) {
      expect(existsSync(join(folder, 'reports', picture))).toBe(true);
      const spec = readFileSync(join(folder, 'reports', picture.replace('.png', '.vl.json')), 'utf8');
      expect(spec).toContain('approach the aft limit in small steps, under qualified supervision');
    }
  });

  test('faults of the table end with 2, each with its line', async () => {
    const bad = join(folder, 'bad.csv');
    writeFileSync(bad, table.replace('590,27.00', '"590,5",27.00').replace('Idle,900', ',900'));
    const { code, stdout, stderr } = await aftlimit(['flight-test', bad, '--study', study]);
    expect(stdout).toBe('');
    expect(stderr.match(/^\S+\.csv:\d+:\d+ {2}[A-Z_]+$/gm)).toEqual([
      `${bad}:2:${table.split('\n')[1]!.indexOf('Idle') + 1}  MISSING_CELL`,
      `${bad}:7:${table.split('\n')[6]!.indexOf('590') + 1}  DECIMAL_COMMA`,
    ]);
    expect(code).toBe(2);
  });
  test.each([
    [
      'a condition that is not there',
      ['--condition', 'cruse'],
      /^BAD_ARGUMENT .*no condition cruse\. Did you mean 'cruise'\?/,
    ],
    ['a report that is there', ['--to', study], /^FILE_EXISTS .*already there/],
    ['a folder that is not there', ['--to', join(folder, 'no', 'r.md')], /^NO_SUCH_FILE .*no folder/],
  ])('%s is refused', async (_, more, message) => {
    const { code, stdout, stderr } = await aftlimit(command(...more));
    expect(stderr).toMatch(message);
    expect(stdout).toBe('');
    expect(code).toBe(2);
  });
  test('a study is needed, and so are data that are there', async () => {
    const without = await aftlimit(['flight-test', data]);
    expect(without.stderr).toMatch(/^BAD_ARGUMENT .*study/);
    expect(without.code).toBe(2);
    const missing = await aftlimit(['flight-test', join(folder, 'none.csv'), '--study', study]);
    expect(missing.stderr).toMatch(/^NO_SUCH_FILE .*none\.csv is not there/);
    expect(missing.code).toBe(2);
  });
});
