/** The study's own model flown: elevator angles and forces from its stages, speed by speed and CG by CG. */
import { describe, expect, test } from 'vitest';
import { measureState } from '../../src/flight-test/measure.ts';
import { predict } from '../../src/flight-test/predict.ts';
import type { FlownPoint } from '../../src/flight-test/read-data.ts';
import { flownStates } from '../../src/flight-test/states.ts';
import { liftCoefficient } from '../../src/methods/atmosphere.ts';
import { baselineInputs, buildStages } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import type { Study } from '../../src/study/study.ts';
import { control, controlStudy, propeller } from '../stages/control-studies.ts';
import { degree, fly, normalNumbers } from './flown.ts';

const cgs = [0.22, 0.27, 0.31];
const speeds = [56, 62, 69, 78, 90, 105];
const knot = 1852 / 3600;

/** A figure of the study's only condition at another speed and CG. */
function figureAt(study: Study, name: string, speed: number, cg: number): number {
  const inputs = baselineInputs(study);
  for (const [input, value] of [
    ['conditions_1_speed', speed],
    ['cg_forward', cg],
    ['cg_aft', cg],
  ] as const) {
    if (!inputs.has(input)) throw new Error(`the study has no ${input}`);
    inputs.set(input, value);
  }
  const value = runOnce(buildStages(study), inputs).get(name);
  if (value === undefined) throw new Error(`the study has no ${name}`);
  return value;
}

/** Points of the study's aeroplane, with a scatter of the elevator [rad]. */
function flown(study: Study, power: string, scatter = () => 0): FlownPoint[] {
  const mass = study.inputs.get('mass') ?? study.inputs.get('aeroplane.mass')!;
  const height = study.inputs.get('conditions[1].height')!;
  const area = predict(study, study.conditions[0]!).wing.area;
  return fly({ cgs, speeds, mass, height, power }).map((point) => ({
    ...point,
    liftCoefficient: liftCoefficient(mass, point.calibratedSpeed, height, area),
    elevator: figureAt(study, 'elevator_to_trim_forward', point.calibratedSpeed, point.cg) + scatter(),
  }));
}

function fixedPoint(points: readonly FlownPoint[]) {
  return measureState(flownStates(points)[0]!)[0]!;
}

const idle = controlStudy({
  conditions: '[{name: cruise, speed: 75 kt, height: 1500 m}]',
  equipment: control(),
});
const powered = controlStudy({
  conditions: '[{name: cruise, speed: 75 kt, height: 1500 m, power: 65 %}]',
  equipment: `${propeller(', above_datum: 0.3 m')}\n${control()}`,
  cgHeight: '0 m',
});

describe('at idle', () => {
  const prediction = predict(idle, idle.conditions[0]!);
  const { 'stick-fixed': fixed, 'stick-free': free } = prediction.of;
  test('the predicted lines are those of the figures', () => {
    const figure = (name: string) => figureAt(idle, name, 75 * knot, 0.24);
    const line = fixed.lineAt(0.24);
    expect(line.slope).toBeCloseTo(figure('elevator_slope_forward'), 12);
    expect(line.atNoLift + line.slope * figure('lift_coefficient')).toBeCloseTo(
      figure('elevator_to_trim_forward'),
      12,
    );
    expect(fixed.at).toBeCloseTo(figure('neutral_point'), 12);
    expect(free.at).toBeCloseTo(figure('neutral_point_free_stick'), 12);
    // P trimmed at V: dP/dV = −(2/V) q C_L d(P/q)/dC_L, from P/q = slope (C_L − C_L,trim) and C_L V² constant.
    const { slope } = free.lineAt(0.24);
    const [mass, area] = [idle.inputs.get('mass')!, prediction.wing.area];
    expect((-2 / (75 * knot)) * slope * ((mass * 9.80665) / area)).toBeCloseTo(
      figure('stick_force_per_speed_forward'),
      9,
    );
  });
  test('the study’s neutral point comes back from points without scatter, but for the wake’s sinking', () => {
    const { fit } = fixedPoint(flown(idle, 'idle'));
    console.info(`whole model at idle: ${fit!.neutralPoint} for ${fixed.at}`);
    // The wake goes down as the lift coefficient grows, so the downwash is not quite linear along a curve.
    expect(fixed.at - fit!.neutralPoint).toBeGreaterThan(0);
    expect(fixed.at - fit!.neutralPoint).toBeLessThan(0.01);
  });
  test('and lies inside the limits in at least 90 of 100 draws with scatter, and not in all of 400', () => {
    const exact = flown(idle, 'idle');
    const held = Array.from({ length: 400 }, (_, seed) => {
      const next = normalNumbers(seed + 1);
      const points = exact.map((point) => ({ ...point, elevator: point.elevator + 0.25 * degree * next() }));
      const { limits } = fixedPoint(points).fit!;
      return limits !== undefined && limits.lower <= fixed.at && fixed.at <= limits.upper;
    });
    const count = (some: readonly boolean[]) => some.filter(Boolean).length;
    console.info(
      `whole model: ${count(held.slice(0, 100))} of the first 100 draws, ${count(held)} of 400 inside`,
    );
    expect(count(held.slice(0, 100))).toBeGreaterThanOrEqual(90);
    expect(count(held)).toBeLessThan(400);
  });
});

describe('with power', () => {
  const { 'stick-fixed': fixed } = predict(powered, powered.conditions[0]!).of;
  test('what is compared is the trim slope limit, which is not the neutral point', () => {
    const figure = (name: string) => figureAt(powered, name, 75 * knot, 0.24);
    expect(fixed.at).toBeCloseTo(figure('trim_slope_limit'), 12);
    expect(Math.abs(fixed.at - figure('neutral_point'))).toBeGreaterThan(0.01);
    const { fit, warnings } = fixedPoint(flown(powered, '65 %'));
    console.info(
      `powered: ${fit!.neutralPoint}, flat ${fixed.at}, neutral ${figure('neutral_point')}, ${warnings.map(({ code }) => code)}`,
    );
    expect(Math.abs(fit!.neutralPoint - fixed.at)).toBeLessThan(
      Math.abs(fit!.neutralPoint - figure('neutral_point')),
    );
    expect(warnings.map(({ code }) => code)).toContain('POWER_ON');
  });
});
