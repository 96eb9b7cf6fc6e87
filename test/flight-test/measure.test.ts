import { afterAll, describe, expect, test } from 'vitest';
import { compareState } from '../../src/flight-test/compare.ts';
import { type MeasuredNeutralPoint, measureState } from '../../src/flight-test/measure.ts';
import { type Prediction, predict } from '../../src/flight-test/predict.ts';
import type { FlownPoint } from '../../src/flight-test/read-data.ts';
import { flownStates } from '../../src/flight-test/states.ts';
import { type WarningCode, warningCodes } from '../../src/flight-test/warnings.ts';
import { testStudy } from '../studies.ts';
import {
  degree,
  type Flight,
  fixedAt,
  fly,
  freeAt,
  normalNumbers,
  straightElevator,
  straightForce,
} from './flown.ts';

function measured(points: readonly FlownPoint[]): MeasuredNeutralPoint[] {
  const states = flownStates(points);
  expect(states.length).toBe(1);
  return measureState(states[0]!);
}

describe('a straight aeroplane without scatter', () => {
  test('gives its neutral points back, stick fixed and stick free', () => {
    const [fixed, free] = measured(fly({ force: straightForce }));
    expect(fixed!.fit!.neutralPoint).toBeCloseTo(fixedAt, 10);
    expect(free!.fit!.neutralPoint).toBeCloseTo(freeAt, 10);
    expect(fixed!.series.map(({ cg }) => cg)).toEqual([0.22, 0.27, 0.33].map((cg) => expect.closeTo(cg, 12)));
    expect(fixed!.series[0]!.slope!.slope).toBeCloseTo(24 * (0.22 - fixedAt) * degree, 10);
    expect(fixed!.series[2]!.slope!.intercept).toBeCloseTo(1.5 * degree, 10);
    expect(free!.series[1]!.slope!.slope).toBeCloseTo(0.009 * (freeAt - 0.27), 12);
    expect([...fixed!.warnings, ...free!.warnings]).toEqual([]);
  });
  test('without forces there is no stick-free point', () => {
    expect(measured(fly()).map(({ kind }) => kind)).toEqual(['stick-fixed']);
  });
});

/**
 * Worked by hand. Three points at each of two CGs, C_L 0.2, 0.6, 1.0, so Σ(C_L − 0.6)² = 0.32 each.
 * CG 20 %: δ 1.1, −3.2, −6.9° → slope 0.4(−6.9 − 1.1)/0.32 = −10 °; CG 30 %: 0.9, −0.8, −3.1° → −5 °.
 * Both lines leave residuals ±(0.1, −0.2, 0.1), Σ = 0.06 each: s² = 0.12/(6 − 4) = 0.06.
 * Slopes rise 50 ° per MAC and reach zero at h = 0.40.
 * Fieller with ν = 2: t² = 2 · 0.95²/(1 − 0.95²) = 18.5128 (closed form of ν = 2); mean slope −7.5 at h̄ 0.25,
 * W = 0.64, D = 2 · 0.32 · 0.05² = 0.0016:
 * a = 50² − t² 0.06/0.0016 = 1805.769, b = −375, c = 7.5² − t² 0.06/0.64 = 54.51442,
 * d = (375 ∓ √(375² − a c))/a = 0.093927 and 0.321409 → 34.39 and 57.14 % MAC.
 */
test('an example worked by hand', () => {
  const angles = { 0.2: [1.1, -3.2, -6.9], 0.3: [0.9, -0.8, -3.1] };
  const points = Object.entries(angles).flatMap(([cg, elevators]) =>
    fly({ cgs: [Number(cg)], speeds: [110, 70, 55] }).map((point, k) => ({
      ...point,
      elevator: elevators[k]! * degree,
      liftCoefficient: [0.2, 0.6, 1.0][k]!,
    })),
  );
  const [{ fit, series } = {} as MeasuredNeutralPoint] = measured(points);
  expect(series.map(({ slope }) => slope!.slope / degree)).toEqual([
    expect.closeTo(-10, 9),
    expect.closeTo(-5, 9),
  ]);
  // √(0.06/1/0.32), and t 12.7062 of one degree of freedom (any table of Student's t).
  expect(series[0]!.slope!.standardError / degree).toBeCloseTo(0.43301, 5);
  expect(series[0]!.slopeUncertainty! / degree).toBeCloseTo(12.7062 * 0.43301, 3);
  expect(fit!.neutralPoint).toBeCloseTo(0.4, 9);
  expect(fit!.limits!.lower).toBeCloseTo(0.343927, 5);
  expect(fit!.limits!.upper).toBeCloseTo(0.571409, 5);
});

describe('with scatter', () => {
  const prediction = predict(testStudy(), testStudy().conditions[0]!);
  /** The study's own aeroplane, flown with a scatter of 0.25° in the elevator and of 0.06 N/kPa in the force. */
  const draw = (seed: number) => {
    const next = normalNumbers(seed);
    return measured(
      fly({
        cgs: [0.22, 0.27, 0.32],
        speeds: [54, 58, 63, 69, 77, 88, 104],
        elevator: (cg, lift) =>
          1.2 * degree + prediction.of['stick-fixed'].lineAt(cg).slope * lift + 0.25 * degree * next(),
        force: (cg, lift) => straightForce(cg, lift) + 0.00006 * next(),
      }),
    );
  };
  const draws = Array.from({ length: 400 }, (_, seed) => draw(seed + 1));
  const inside = (k: 0 | 1, truth: number) =>
    draws.map((point) => {
      const { limits } = point[k]!.fit!;
      return limits !== undefined && limits.lower <= truth && truth <= limits.upper;
    });
  const count = (held: readonly boolean[]) => held.filter(Boolean).length;

  test.each([
    ['the study’s neutral point from elevator angles', 0, prediction.of['stick-fixed'].at],
    ['the stick-free one from forces', 1, freeAt],
  ] as const)(
    '%s lies inside its limits in at least 90 of 100 draws, and not in all of 400',
    (what, k, truth) => {
      const held = inside(k, truth);
      console.info(
        `${what}: ${count(held.slice(0, 100))} of the first 100 draws, ${count(held)} of 400 inside`,
      );
      expect(count(held.slice(0, 100))).toBeGreaterThanOrEqual(90);
      expect(count(held)).toBeLessThan(400);
      // 95 % of 400 is 380 with a standard deviation of 4.4; four of them.
      expect(Math.abs(count(held) - 380)).toBeLessThan(18);
    },
  );
});

describe('warnings', () => {
  const tested = new Set<WarningCode>();
  afterAll(() => expect([...tested].sort()).toEqual(Object.keys(warningCodes).sort()));
  const study = testStudy();
  const prediction = predict(study, study.conditions[0]!);

  /** Warnings of one state, measured and compared. */
  function warned(points: readonly FlownPoint[], against: Prediction = prediction) {
    const [state] = flownStates(points);
    return compareState(state!, measureState(state!), against);
  }
  function all({ warnings, measured: points }: ReturnType<typeof warned>) {
    return [...warnings, ...points.flatMap((point) => point.warnings)];
  }
  const noisy = (degrees: number, seed = 3) => {
    const next = normalNumbers(seed);
    return (cg: number, lift: number) => straightElevator(cg, lift) + degrees * degree * next();
  };

  interface Case {
    readonly code: WarningCode;
    readonly when: string;
    readonly flight?: Flight;
    readonly points?: () => FlownPoint[];
    readonly against?: Prediction;
    readonly text: RegExp;
    /** Whether a correction is offered all the same. */
    readonly corrected: boolean;
  }
  const predicting = (at: number): Prediction => ({
    ...prediction,
    of: { ...prediction.of, 'stick-fixed': { ...prediction.of['stick-fixed'], at } },
  });
  const cases: readonly Case[] = [
    {
      code: 'FEWER_THAN_TWO_CGS',
      when: 'one CG is flown',
      flight: { cgs: [0.25] },
      text: /only CG 25\.0 % MAC gives a slope/,
      corrected: false,
    },
    {
      code: 'TOO_FEW_POINTS',
      when: 'two points are flown at one of three CGs',
      points: () => fly().filter(({ cg }, k) => cg !== 0.27 || k < 7),
      text: /At CG 27\.0 % MAC there are 2 points/,
      corrected: true,
    },
    {
      code: 'NARROW_SPEEDS',
      when: 'one CG is flown at one speed only',
      points: () => fly().map((point) => (point.cg === 0.33 ? { ...point, liftCoefficient: 0.5 } : point)),
      text: /At CG 33\.0 % MAC all points have nearly the same lift/,
      corrected: true,
    },
    {
      code: 'FORCES_MISSING',
      when: 'two forces were not written down',
      points: () =>
        fly({ force: straightForce }).map(({ stickForce, ...point }, k) =>
          k === 3 || k === 8 ? point : { ...point, stickForce: stickForce! },
        ),
      text: /2 of 15 points have no stick force/,
      corrected: true,
    },
    {
      code: 'CGS_CLOSE',
      when: 'the CGs lie 2.9 % MAC apart',
      flight: { cgs: [0.251, 0.28] },
      text: /lie 2\.9 % MAC apart; 3\.0 %/,
      corrected: true,
    },
    {
      code: 'CG_SPREAD',
      when: 'the CG moved by 0.8 % MAC while it was flown',
      points: () => fly().map((point, k) => (k === 2 ? { ...point, cg: point.cg + 0.008 } : point)),
      text: /Points from 22\.0 to 22\.8 % MAC count as CG 22\.2 %/,
      corrected: true,
    },
    {
      code: 'NOT_STRAIGHT',
      when: 'the curves bend',
      flight: { elevator: (cg, lift) => noisy(0.02)(cg, lift) - 2 * degree * lift ** 2 },
      text: /not straight .*the slope depends on the speed/,
      corrected: true,
    },
    {
      code: 'SLOPES_ALIKE',
      when: 'scatter hides the difference of the slopes',
      flight: { cgs: [0.25, 0.29], elevator: noisy(2) },
      text: /do not differ significantly .*needed ±2\.\d/,
      corrected: false,
    },
    {
      code: 'LIMITS_OPEN',
      when: 'scatter hides the difference of the slopes',
      flight: { cgs: [0.25, 0.29], elevator: noisy(2) },
      text: /limits have no end/,
      corrected: false,
    },
    {
      code: 'WRONG_WAY',
      when: 'the elevator’s sign is mistaken',
      flight: { elevator: (cg, lift) => -straightElevator(cg, lift) },
      text: /steeper as the CG goes aft/,
      corrected: false,
    },
    {
      code: 'NEAR_NEUTRAL',
      when: 'the aftmost CG lies 4 % MAC before the neutral point',
      flight: { cgs: [0.25, 0.31, 0.38] },
      text: /aftmost CG flown, 38\.0 % MAC, may lie within 5\.0 %.*Do not go farther aft/,
      corrected: true,
    },
    {
      code: 'FAR_EXTRAPOLATION',
      when: 'CGs far forward are flown',
      flight: { cgs: [0.2, 0.24] },
      text: /lies 18\.0 % MAC behind the aftmost CG flown, and only 4\.0 %/,
      corrected: true,
    },
    {
      code: 'POWER_ON',
      when: 'the state has power',
      flight: { power: 'full' },
      against: { ...prediction, condition: { ...prediction.condition, power: 'fraction' } },
      text: /not the neutral point at constant speed/,
      corrected: true,
    },
    {
      code: 'CONDITION_DIFFERS',
      when: 'flaps and power differ from the condition’s',
      flight: { power: 'full', flaps: 'landing' },
      text: /condition cruise: it was flown with power, and the condition is at idle; it was flown with flaps down/,
      corrected: false,
    },
    {
      code: 'NO_PREDICTION',
      when: 'the study gives none',
      against: predicting(Number.NaN),
      text: /no neutral point at its own fixed values/,
      corrected: false,
    },
    {
      code: 'CORRECTION_TOO_LARGE',
      when: 'another aeroplane was flown',
      against: predicting(fixedAt - 0.21),
      text: /would be 21\.0 % MAC, and studies take 20 %/,
      corrected: false,
    },
  ];
  test.each(cases)('$code: $when', ({ code, flight, points, against, text, corrected }) => {
    const compared = warned(points?.() ?? fly(flight), against);
    const own = all(compared).filter((warning) => warning.code === code);
    expect(own.length).toBe(1);
    expect(own[0]!.text).toMatch(text);
    expect(compared.correction !== undefined).toBe(corrected);
    tested.add(code);
  });
  test('none for good data', () => {
    const compared = warned(fly({ elevator: noisy(0.02) }));
    expect(all(compared)).toEqual([]);
    expect(compared.correction!.value).toBeCloseTo(fixedAt - prediction.of['stick-fixed'].at, 2);
    expect(compared.correction!.cautious).toBeLessThan(compared.correction!.value);
  });
  test('CGs at the edges of what is close, near and far are not told of', () => {
    const codes = (flight: Flight) => all(warned(fly(flight))).map(({ code }) => code);
    expect(codes({ cgs: [0.25, 0.281] })).not.toContain('CGS_CLOSE');
    expect(codes({ cgs: [0.25, 0.369] })).not.toContain('NEAR_NEUTRAL');
    expect(codes({ cgs: [0.25, 0.31] })).not.toContain('FAR_EXTRAPOLATION');
  });
});

describe('states', () => {
  test('are told apart by flaps and power, in the order flown', () => {
    const points = [fly(), fly({ flaps: '30°' }), fly({ power: 'full' }), fly()].flat();
    const states = flownStates(points);
    expect(
      states.map(({ name, idle, flapsDown, points: own }) => [name, idle, flapsDown, own.length]),
    ).toEqual([
      ['flaps up, power idle', true, false, 30],
      ['flaps 30°, power idle', true, true, 15],
      ['flaps up, power full', false, false, 15],
    ]);
  });
  test('without flaps in the data nothing is said of them', () => {
    const points = fly({ power: 'off' }).map(({ flaps: _, ...point }) => point);
    expect(flownStates(points)).toMatchObject([{ name: 'power off', idle: true }]);
    expect(flownStates(points)[0]).not.toHaveProperty('flapsDown');
  });
  test('a CG that moves by less than 1 % MAC is one position', () => {
    const points = fly({ cgs: [0.25, 0.259, 0.2601, 0.3] });
    expect(measured(points)[0]!.series.map(({ points: own }) => own.length)).toEqual([10, 5, 5]);
  });
});
