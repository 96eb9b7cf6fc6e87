import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { controlLimitKinds } from '../../src/figures/control-limit-kinds.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { elevatorToTrimData } from '../../src/reports/charts/elevator-to-trim-data.ts';
import { buildUpData, macRulerData, type Pick } from '../../src/reports/charts/pick-data.ts';
import { tailSizingData } from '../../src/reports/charts/tail-sizing-data.ts';
import type { RunView } from '../../src/reports/run-view.ts';
import { RunQueries } from '../../src/results/run-queries.ts';
import { runStudy } from '../../src/run-study.ts';
import { baselineInputs } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import {
  type ControlParts,
  control,
  controlText,
  flaps,
  gear,
  propeller,
  reader,
  threeConditions,
} from '../stages/control-studies.ts';

const parts: ControlParts = {
  conditions: threeConditions,
  wing: `${flaps}, incidence: 2 deg`,
  tail: 'incidence: -1.5 deg',
  cg: [20, 24],
  equipment: `${propeller(', above_datum: 0.1 m')}\n${control()}\n${gear}`,
  require: 'static_margin: {at_least: 1 %}\ncontrol: {figure: control_margin_forward, at_least: 0 %}',
};
const text = controlText({ ...parts, rest: 'vary: {tail.volume: {from: 0.4, to: 0.6, count: 9}}' });
const study = readStudyText(text, 'study.yaml');
const laidOut = layOut(study);
const degree = Math.PI / 180;

const folder = mkdtempSync(join(tmpdir(), 'aftlimit-control-'));
const run = join(folder, 'study');
let view: RunView;

beforeAll(async () => {
  const studyFile = join(folder, 'study.yaml');
  writeFileSync(studyFile, text);
  const stop = new AbortController().signal;
  await runStudy(
    { studyFile, out: folder, workers: 1, afresh: false, charts: true, stop },
    { planned() {}, progress() {}, step() {}, note() {}, finished() {} },
  );
  const queries = await RunQueries.open(run, laidOut.columns);
  const rows = 9;
  view = {
    study,
    laidOut,
    queries,
    shortlist: [],
    band: study.band,
    rows,
    date: '2026-12-01',
    program: 'aftlimit',
  };
}, 120_000);
afterAll(() => {
  view.queries.close();
  rmSync(folder, { recursive: true, force: true });
});

const baseline = (): Pick => ({
  label: 'baseline',
  detail: '',
  values: runOnce(laidOut.plan.stages, baselineInputs(study)),
});
const value = reader(parts);

describe('elevator to trim', () => {
  it('has a panel for flaps up and down, at idle and the greatest power', () => {
    const data = elevatorToTrimData(view, baseline());
    expect(data?.panels.map(({ title }) => title)).toEqual([
      'Flaps up, idle',
      'Flaps up, 100 % power',
      'Flaps 30°, idle',
      'Flaps 30°, 100 % power',
    ]);
    expect(data?.travel).toEqual({ up: 25, down: -15 });
  });

  it('passes through the elevator that a study of that condition by itself works out, up positive', () => {
    const panel = elevatorToTrimData(view, baseline())!.panels[1];
    const at = 20;
    const speed = panel.speeds[at] / 3.6;
    const alone = reader({
      ...parts,
      conditions: `[{name: only, speed: ${speed} m/s, height: 1500 m, power: 100 %}]`,
      equipment: `${propeller(', above_datum: 0.1 m')}\n${control()}`,
    });
    const [forward, aft] = panel.curves;
    expect(forward.cg).toBeCloseTo(20, 12);
    expect(aft.cg).toBeCloseTo(24, 12);
    expect(forward.elevator[at]).toBeCloseTo(-alone('elevator_to_trim_forward') / degree, 9);
    expect(aft.elevator[at]).toBeCloseTo(-alone('elevator_to_trim_aft') / degree, 9);
  });

  it('starts at the stall, and is flatter with the CG aft and flattest at the neutral point', () => {
    const panel = elevatorToTrimData(view, baseline())!.panels[0];
    expect(panel.speeds[0]).toBeCloseTo(panel.stallSpeed!, 0);
    const travel = panel.curves.map(({ elevator }) => elevator[0] - elevator[elevator.length - 1]);
    expect(travel[0]).toBeGreaterThan(travel[1]);
    expect(travel[1]).toBeGreaterThan(Math.abs(travel[2]));
  });
});

describe('tail sizing', () => {
  it('has a line for each kind of forward limit, the aftmost over the conditions', () => {
    const data = tailSizingData(view);
    const labels = data.limits.map(({ label }) => label);
    expect(labels.slice(1)).toEqual(controlLimitKinds.slice(0, 3).map(({ label }) => label));
    const size = data.sizes.findIndex((each) => each >= 0.48);
    const near = data.limits[1].cg[size];
    const limits = ['cruise', 'climb', 'approach'].map(
      (name) => 100 * value(`forward_limit_elevator_${name}`),
    );
    expect(Math.abs(near - Math.max(...limits))).toBeLessThan(0.5);
    expect(data.limits.slice(1).every(({ forbidden }) => forbidden === 'forward')).toBe(true);
  });
});

describe('ruler and build-up', () => {
  it('the ruler has every condition, the points of free stick and manoeuvre, and the control limit', () => {
    const data = macRulerData(view, [baseline()]);
    const [row] = data.rows;
    expect(data.conditions).toEqual(['cruise', 'climb', 'approach']);
    expect(row.neutralPoints).toEqual(
      ['cruise', 'climb', 'approach'].map((name) => 100 * value(`neutral_point_${name}`)),
    );
    expect(row.freeStickNeutralPoint).toBe(100 * value('neutral_point_free_stick'));
    expect(row.manoeuvrePoint).toBe(100 * value('manoeuvre_point'));
    expect(row.controlLimit?.at).toBe(100 * value('control_limit_forward'));
    expect(row.controlLimit?.name).toBe(controlLimitKinds[value('control_limit_kind')].label);
    expect(row.window.from).toBe(100 * value('cg_window_forward'));
    expect(row.window.to).toBeCloseTo(100 * value('cg_window_aft'), 10);
  });

  it('the build-up has the propeller, and adds up to the neutral point', () => {
    const [{ steps, neutralPoint }] = buildUpData(view, [baseline()]).combinations;
    expect(steps.map(({ name }) => name)).toEqual(['wing', 'tail', 'body', 'propeller']);
    expect(steps.reduce((sum, { change }) => sum + change, 0)).toBeCloseTo(neutralPoint, 10);
  });
});

describe('a finished run', () => {
  it('draws elevator to trim beside the others', () => {
    expect(readdirSync(join(run, 'charts'))).toContain('elevator-to-trim.svg');
  });

  it('has a summary that names conditions, counts what governs and shortens what is not assessed', () => {
    const summary = readFileSync(join(run, 'summary.md'), 'utf8');
    expect(summary).toContain('power as each condition says');
    expect(summary).toMatch(/condition `climb`: 1\.3 times the stall speed, height 0\.000 m, 100 % power/);
    expect(summary).toMatch(/condition `approach`:.*flaps 30\.00°, wing 1\.100 m above the ground/);
    const counted = /the least neutral point: (.*)/.exec(summary)?.[1] ?? '';
    const rows = [...counted.matchAll(/ in (\d+)/g)].reduce((sum, [, count]) => sum + Number(count), 0);
    expect(rows).toBe(9);
    expect(summary).toMatch(/the forward limit of control, by what sets it: /);
    expect(summary).toContain(
      'Not assessed: spin, the stall of a T-tail in the wing’s wake, tip-back on the main wheels, aeroelastics.',
    );
    expect(summary).not.toContain('Power off');
  });
});
