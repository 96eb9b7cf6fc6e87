import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { displayUnit } from '../../src/figures/display.ts';
import { readStudyFile } from '../../src/read-study-file.ts';
import { starterStudy } from '../../src/study/starters.ts';
import type { ShowSystem } from '../../src/study/study.ts';
import { aftlimit, shortRun, starterFile, temporaryFolder } from './command-line.ts';

const { path: folder, remove } = temporaryFolder();
const study = starterFile(folder);
const inUS = join(folder, 'in-us.yaml');
writeFileSync(inUS, starterStudy('uncrewed').replace('show: metric', 'show: US'));
let finishedRun: string;
let runInUS: string;

beforeAll(async () => {
  finishedRun = await shortRun(folder, study, 'finished');
  runInUS = await shortRun(folder, inUS, 'in-us');
});
afterAll(remove);

/** Symbol, value, unit and name of each figure of a worksheet in Markdown. */
function figuresIn(markdown: string): Map<string, { value: string; unit: string }> {
  const rows = markdown.matchAll(/^\| [^|]* \| (?<value>[^|]*) \| (?<unit>[^|]*) \| `(?<name>[^`]+)`/gm);
  return new Map(
    [...rows].map(({ groups = {} }) => [groups.name!, { value: groups.value!, unit: groups.unit!.trim() }]),
  );
}

async function worksheetOf(...args: string[]) {
  const { code, stdout, stderr } = await aftlimit(['worksheet', ...args, '--markdown']);
  expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
  return figuresIn(stdout);
}

/** Cells of one row of the table by column. */
function rowOf(run: string, combination: number): Map<string, string> {
  const [header = '', ...rows] = readFileSync(join(run, 'cases.csv'), 'utf8').trimEnd().split('\n');
  const row = rows.find((line) => line.startsWith(`${combination},`))!;
  const cells = row.split(',');
  return new Map(header.split(',').map((name, i) => [name, cells[i]!]));
}

describe.concurrent('worksheet', () => {
  test.each([
    ['metric', 0],
    ['metric', 101],
    ['US', 188],
  ] as const)('its numbers are the table’s to 6 digits (%s, combination %i)', async (show, combination) => {
    const run = show === 'US' ? runInUS : finishedRun;
    const sheet = await worksheetOf(run, '--combination', String(combination));
    const row = rowOf(run, combination);
    const { columns } = layOut(readStudyFile(show === 'US' ? inUS : study));
    const numbers = columns.filter(({ figure }) => figure.kind === 'number' && sheet.has(figure.name));
    expect(numbers.length).toBeGreaterThan(45);
    for (const { name, factor, figure } of numbers) {
      const { unit, factor: shown } = displayUnit(figure.dimension, show as ShowSystem);
      const { value, unit: told } = sheet.get(figure.name)!;
      const fromTable = (Number(row.get(name)) / factor) * shown;
      if (row.get(name) === '') expect(value, name).toBe('empty');
      // The table has 7 digits and the worksheet 6: half a unit of the sixth, and a little for the table's own rounding.
      else
        expect(Math.abs(Number(value) - fromTable), name).toBeLessThanOrEqual(
          5.6e-6 * Math.abs(fromTable) + 1e-9,
        );
      if (value !== 'empty') expect(told, name).toBe(unit);
    }
    expect(sheet.get('feasible')!.value).toBe(row.get('feasible'));
  });

  test('of a study and of its run it is the same', async () => {
    const args = ['--combination', '77', '--markdown'];
    const ofStudy = await aftlimit(['worksheet', study, ...args]);
    expect(await aftlimit(['worksheet', finishedRun, ...args])).toEqual(ofStudy);
  });

  test('of the baseline shows the numbers of the study, in text and in Markdown', async () => {
    const sheet = await worksheetOf(study);
    expect(sheet.get('tail_arm')).toEqual({ value: '0.8', unit: 'm' });
    expect(sheet.get('wing_aspect_ratio')).toEqual({ value: '9.5', unit: '' });
    const { stdout } = await aftlimit(['worksheet', study]);
    for (const [name, { value }] of sheet) {
      expect(stdout).toContain(` ${name}: `);
      expect(stdout).toContain(value);
    }
  });

  test('--set gives the baseline other numbers, several at once and before the study', async () => {
    const sheet = await worksheetOf('--set', 'tail.arm=31.5 in', '--set', 'wing.taper = 0.7', study);
    expect(sheet.get('tail_arm')).toEqual({ value: '0.8001', unit: 'm' });
    expect(sheet.get('wing_taper')!.value).toBe('0.7');
    expect(sheet.get('tail_volume')).toEqual((await worksheetOf(study)).get('tail_volume'));
  });
});
