import { describe, expect, test } from 'vitest';
import { flightTestChartData } from '../../src/flight-test/chart-data.ts';
import { compareState, conditionOf } from '../../src/flight-test/compare.ts';
import { measureState } from '../../src/flight-test/measure.ts';
import { predict } from '../../src/flight-test/predict.ts';
import type { FlownPoint } from '../../src/flight-test/read-data.ts';
import { flightTestCaution, flightTestMarkdown } from '../../src/flight-test/report.ts';
import { flownStates } from '../../src/flight-test/states.ts';
import { baselineInputs, buildStages } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import type { Condition, Study } from '../../src/study/study.ts';
import { type StudyParts, testStudy } from '../studies.ts';
import { degree, fixedAt, fly, freeAt, straightElevator, straightForce } from './flown.ts';

function reportOf(points: readonly FlownPoint[], study: Study = testStudy(), data = 'flown.csv'): string {
  const prediction = predict(study, study.conditions[0]!);
  const states = flownStates(points).map((state) => compareState(state, measureState(state), prediction));
  return flightTestMarkdown({ study, data, points, wing: prediction.wing, states, picturesOf: () => [] });
}

function block(markdown: string): string {
  const [, yaml] = /```yaml\n([\s\S]*?)```/.exec(markdown) ?? [];
  if (yaml === undefined) throw new Error('there is no block of YAML');
  return yaml;
}

function neutralPointOf(study: Study): number {
  return runOnce(buildStages(study), baselineInputs(study)).get('neutral_point')!;
}

describe('the report', () => {
  const both = [fly({ force: straightForce }), fly({ flaps: 'full', cgs: [0.25] })].flat();
  const markdown = reportOf(both);

  test('says the caution first, and the flown aeroplane', () => {
    expect(markdown).toContain(`**${flightTestCaution}**`);
    expect(flightTestCaution).toContain(
      'Approach the aft limit in small steps, never by flying near neutral, under qualified supervision.',
    );
    expect(markdown).toContain('20 points of flown.csv, in 2 states.');
    expect(markdown).toContain('wing area 11.400 m², MAC 1.238 m');
  });
  test('has a section for each state, with slopes by hand', () => {
    expect(markdown.match(/^## .*$/gm)).toEqual([
      '## Flaps up, power idle',
      '## Flaps full, power idle',
      '## How it is worked out',
    ]);
    // 24(0.22 − 0.42) = −4.80 ° per C_L; 9(0.38 − 0.22) = 1.440 N/kPa per C_L, −0.6 of that at C_L 0.
    expect(markdown).toMatch(
      /^\| 22\.0 \| 5 \| 102 to 185 \| 0\.31 to 1\.0\d \| \+1\.50 \| -4\.80 \| 0\.00 \| ± 0\.00 \|/m,
    );
    expect(markdown).toMatch(/^\| 22\.0 \| 5 \| .* \| -0\.864 \| \+1\.440 \| 0\.000 \| ± 0\.000 \|/m);
    expect(markdown).toMatch(
      /^\| stick-fixed neutral point \| 42\.0 \| 42\.0 to 42\.0 \| 37\.\d \| \+4\.\d \|$/m,
    );
    expect(markdown).toMatch(/^\| stick-free neutral point \| 38\.0 \| 38\.0 to 38\.0 \|/m);
    expect(markdown).toMatch(/^- \*\*FEWER_THAN_TWO_CGS\*\* A neutral point needs/m);
    expect(markdown).toContain('No correction is offered for this state.');
  });
  test('names the trim slope limit where there was power', () => {
    expect(reportOf(fly({ power: 'full' }))).toMatch(/^\| trim slope limit \| 42\.0 \|/m);
  });
  test('lets no text of the data be markup', () => {
    const odd = reportOf(fly({ flaps: '<b>|`*', power: 'idle' }), testStudy(), 'a|b<c>.csv');
    expect(odd).toContain('## Flaps &lt;b>\\|\\`\\*, power idle');
    expect(odd).toContain('points of a\\|b&lt;c>.csv');
  });
});

describe('the correction', () => {
  test('is what the study takes: its neutral point then is the measured one', () => {
    const yaml = block(reportOf(fly(), testStudy(), "it's: #1.csv"));
    const corrected = testStudy({ rest: yaml });
    expect(corrected.corrections!.source).toMatch(
      /^flight test \(it's: #1\.csv\), flaps up, power idle: 42\.0 % MAC, 95 % limits 42\.0 to 42\.0; predicted 37\.\d in cruise$/,
    );
    // The block has tenths of a per cent.
    expect(Math.abs(neutralPointOf(corrected) - fixedAt)).toBeLessThanOrEqual(0.0005 + 1e-12);
    expect(neutralPointOf(testStudy())).toBeLessThan(0.39);
  });
  test('is found against the bare estimate, whatever correction the study has already', () => {
    const again = testStudy({ rest: "corrections: {neutral_point: -3 %, source: 'an earlier flight'}\n" });
    const markdown = reportOf(fly(), again);
    expect(block(markdown)).toBe(block(reportOf(fly())));
    expect(markdown).toContain("The study's own correction is left out");
  });
  test('is told by the forward limit, too', () => {
    const points = fly({
      elevator: (cg, lift) => straightElevator(cg, lift) + 0.1 * degree * Math.sin(97 * cg * lift),
    });
    const [state] = flownStates(points);
    const study = testStudy();
    const prediction = predict(study, study.conditions[0]!);
    const { correction } = compareState(state!, measureState(state!), prediction);
    expect(correction!.cautious).toBeCloseTo(
      correction!.fit.limits.lower - prediction.of['stick-fixed'].at,
      12,
    );
    expect(reportOf(points)).toMatch(
      /By the forward 95 % limit, the cautious choice, it would be [+-]?\d+\.\d %/,
    );
  });
});

describe('the prediction', () => {
  test('has the study’s neutral point, at which its elevator is flat', () => {
    const study = testStudy();
    const { 'stick-fixed': fixed } = predict(study, study.conditions[0]!).of;
    expect(fixed.at).toBeCloseTo(neutralPointOf(study), 12);
    expect(fixed.lineAt(fixed.at).slope).toBeCloseTo(0, 12);
    expect(fixed.lineAt(0.25).slope).toBeLessThan(0);
  });
  /**
   * By hand from the worksheet's figures of the test aeroplane, in another arrangement of the law: the
   * elevator's moment per degree, −η a_t τ (S_t/S)(h_t − h_n), must undo (h − h_n) per C_L.
   */
  test('has slopes that balance the moment', () => {
    const study = testStudy();
    const { of } = predict(study, study.conditions[0]!);
    const values = runOnce(buildStages(study), baselineInputs(study));
    const value = (name: string) => values.get(name)!;
    const cg = 0.27;
    const elevatorMoment =
      -value('tail_dynamic_pressure_ratio') *
      value('tail_lift_slope') *
      value('elevator_effectiveness') *
      (value('tail_area') / value('wing_area')) *
      (value('tail_position') - value('neutral_point'));
    const { slope } = of['stick-fixed'].lineAt(cg);
    expect(cg - value('neutral_point') + slope * elevatorMoment).toBeCloseTo(0, 12);
  });
  test('is that of the condition asked for', () => {
    const parts: StudyParts = {
      conditions:
        '[{name: cruise, speed: 110 kt, height: 1500 m}, {name: fast, speed: 240 kt, height: 6000 m}]',
    };
    const study = testStudy(parts);
    const [cruise, fast] = study.conditions.map(
      (condition) => predict(study, condition).of['stick-fixed'].at,
    );
    const values = runOnce(buildStages(study), baselineInputs(study));
    expect(cruise).toBeCloseTo(values.get('neutral_point_cruise')!, 12);
    expect(fast).toBeCloseTo(values.get('neutral_point_fast')!, 12);
    expect(fast).not.toBeCloseTo(cruise!, 3);
  });
});

test('each state is compared with the first condition that has its power and flaps, else with the first', () => {
  const condition = (name: string, power: 'idle' | 'fraction', flapsDown: boolean): Condition => {
    return { name, speedAs: 'speed', power, flapsDown, groundEffect: false };
  };
  const conditions = [
    condition('cruise', 'fraction', false),
    condition('climb', 'fraction', false),
    condition('glide', 'idle', false),
    condition('approach', 'idle', true),
  ];
  const states = flownStates(
    [fly(), fly({ power: '65 %' }), fly({ flaps: '30°' }), fly({ flaps: '30°', power: 'full' })].flat(),
  );
  expect(states.map((state) => conditionOf(state, conditions).name)).toEqual([
    'glide',
    'cruise',
    'approach',
    'cruise',
  ]);
  const silent = flownStates(fly().map(({ flaps: _, ...point }) => point));
  expect(conditionOf(silent[0]!, conditions.toReversed()).name).toBe('approach');
});

describe('the chart’s data', () => {
  const study = testStudy();
  const prediction = predict(study, study.conditions[0]!);
  const heading = { title: 'Flight test', study: study.title, date: '2026-12-01', program: 'aftlimit' };
  const chartsOf = (points: readonly FlownPoint[]) => {
    const [state] = flownStates(points);
    const compared = compareState(state!, measureState(state!), prediction);
    return compared.measured.map((one) => flightTestChartData(one, compared, heading));
  };
  const [fixed, free] = chartsOf(fly({ force: straightForce }));

  test('have trailing edge up and pull upward, in degrees, N/kPa and % MAC', () => {
    expect(fixed!.flown[0]).toMatchObject({
      cg: expect.closeTo(22, 9),
      fitted: { slope: expect.closeTo(4.8, 9), atNoLift: expect.closeTo(-1.5, 9) },
    });
    expect(fixed!.slopeLine!.slope).toBeCloseTo(-0.24, 9);
    expect(fixed!.slopeLine!.atLeadingEdge).toBeCloseTo(0.24 * 42, 7);
    expect(fixed!.neutralPoint!.at).toBeCloseTo(100 * fixedAt, 7);
    expect(fixed!.predictedNeutralPoint).toBeCloseTo(100 * neutralPointOf(study), 9);
    expect(free!.flown[2]!.fitted.slope).toBeCloseTo(9 * (freeAt - 0.33), 9);
    expect(free!.neutralPoint!.at).toBeCloseTo(100 * freeAt, 7);
    expect(free!.measuredTitle).toMatch(/pull \[N\/kPa\]/);
  });
  test('leave out the limits where they are open, and are none without a slope', () => {
    expect(chartsOf(fly({ cgs: [0.25], speeds: [60, 70] }))).toEqual([undefined]);
    const [data] = chartsOf(fly({ cgs: [0.25] }));
    expect(data).toMatchObject({ slopeLine: null, neutralPoint: null });
    expect(data!.flown.length).toBe(1);
  });
});
