import { describe, expect, it } from 'vitest';
import { buildStages } from '../../src/stages/build-stages.ts';
import { replaced, testStudy } from '../studies.ts';
import {
  type ControlParts,
  control,
  controlStudy,
  flaps,
  propeller,
  reader,
  threeConditions,
} from './control-studies.ts';

type Reader = (name: string) => number;

const gravity = 9.80665;
/** Exact: pound-force and pound of 1959. */
const lbf = 4.4482216152605;
const lb = 0.45359237;

const presets = {
  limit: 'limit_force: {preset: 14-cfr-23.155-2016}',
  pull: 'pull: {preset: 14-cfr-23.143-c-2016}',
};
const climb = '[{name: climb, times_stall: 1.6, height: 300 m, power: 90 %}]';
const glide = '[{name: glide, times_stall: 1.9, height: 300 m}]';
const powered: ControlParts = {
  conditions: climb,
  wing: 'incidence: 2 deg',
  tail: 'incidence: -1.5 deg',
  equipment: `${propeller(', above_datum: 0.3 m, tail_in_slipstream: 50 %')}\n${control(', spring: 6 N')}`,
};

/**
 * Angle from nil wing lift and elevator that balance a lift about h: lift and moment of wing, body, propeller
 * and tail as two linear equations, written anew from the parts.
 */
function balance(value: Reader, lift: number, h: number, thrust: number) {
  const onWing = value('tail_pressure_ratio') * (value('tail_area') / value('wing_area'));
  const tailSlope = onWing * value('tail_lift_slope');
  const rest = value('zero_lift_body_angle') + value('tail_incidence') - value('zero_lift_downwash');
  const byAngle = 1 - value('tail_downwash_gradient');
  const wing = value('wing_body_lift_slope');
  const ofPropeller = value('propeller_lift_share');
  const atZero = value('propeller_lift_at_zero_lift');
  const [armWing, armPropeller, armTail] = [
    'wing_aerodynamic_centre',
    'propeller_position',
    'tail_position',
  ].map((name) => h - value(name));
  const couples =
    value('body_couple_slope') * value('zero_lift_body_angle') +
    value('wing_section_moment') +
    value('wing_lift_slope') * value('wing_twist_couple') +
    thrust;
  // [a b; c d] [x, δ] = [e, f]
  const a = wing + ofPropeller + tailSlope * byAngle;
  const b = tailSlope * value('elevator_effectiveness');
  const e = lift - atZero - tailSlope * rest;
  const c =
    armWing * wing + armPropeller * ofPropeller + value('body_moment_slope') + armTail * tailSlope * byAngle;
  const d = armTail * b;
  const f = -couples - armPropeller * atZero - armTail * tailSlope * rest;
  const determinant = a * d - b * c;
  const x = (e * d - b * f) / determinant;
  return { tailAngle: rest + byAngle * x, elevator: (a * f - e * c) / determinant };
}

/** Pull at the stall by the hinge moment itself: the tab holds the stick at the condition's speed. */
function pullByHingeMoment(value: Reader, h: number, idle: boolean, spring: number): number {
  const [trimmed, stalled] = [value('lift_coefficient'), value('maximum_lift')];
  const hinge = (lift: number) => {
    // At the same power the thrust goes as one over the speed, its coefficient as the lift to the power 3/2.
    const byLift = idle ? 1 : (lift / trimmed) ** 1.5;
    const thrust = (-value('thrust_on_wing') * byLift * value('propeller_above_datum')) / value('mac');
    const { tailAngle, elevator } = balance(value, lift, h, thrust);
    return value('hinge_slope_alpha') * tailAngle + value('hinge_slope_delta') * elevator;
  };
  const pressure = (lift: number) => (value('mass') * gravity) / (value('wing_area') * lift);
  const perMoment =
    value('control_gearing') *
    value('tail_pressure_ratio') *
    value('tail_elevator_area') *
    value('tail_elevator_chord');
  const tab = -hinge(trimmed) - spring / (perMoment * pressure(trimmed));
  return perMoment * pressure(stalled) * (hinge(stalled) + tab) + spring;
}

describe('the pull to the stall', () => {
  it.each([
    ['at power', climb, false],
    ['idle', glide, true],
  ] as const)(
    'is the hinge moment at the stall with the tab set at the condition’s speed, %s',
    (_, conditions, idle) => {
      const value = reader({ ...powered, conditions });
      const pull = value('stick_force_at_stall_forward');
      expect(pull).toBeGreaterThan(2);
      expect(pull).toBeCloseTo(pullByHingeMoment(value, 0.24, idle, 6), 9);
    },
  );

  it('has the couple by height in it, by its mean slope on the way', () => {
    const value = reader({ ...powered, cgHeight: '0.2 m' });
    const byHeight = value('neutral_point_height_lift');
    expect(Math.abs(byHeight)).toBeGreaterThan(1e-3);
    const [cl, maximum] = [value('lift_coefficient'), value('maximum_lift')];
    const atCondition = value('rest_couples') + value('thrust_moment') - (byHeight * cl) / 2;
    const slope = (value('stall_couples') - atCondition) / (maximum - cl);
    expect(value('nil_force_at_stall')).toBeCloseTo(
      value('neutral_point_level') - slope + value('free_stick_step') + value('spring_step'),
      11,
    );
  });

  it('is nil from the stall itself and below it, and at the CG of nil force', () => {
    const at = (condition: string, cg: readonly [number, number] = [24, 33]) =>
      reader({ ...powered, conditions: `[${condition}]`, cg });
    expect(at('{name: stall, times_stall: 1, height: 0 m}')('stick_force_at_stall_forward')).toBe(0);
    expect(at('{name: under, lift_coefficient: 1.6, height: 0 m}')('stick_force_at_stall_forward')).toBe(0);
    const nil = reader(powered)('nil_force_at_stall');
    const there = reader({ ...powered, cg: [100 * nil, 100 * nil + 1] });
    expect(there('stick_force_at_stall_forward')).toBeCloseTo(0, 9);
  });

  it('of several conditions the greatest stands under the plain name, whichever governs', () => {
    const value = reader({ ...powered, conditions: threeConditions, wing: flaps });
    const all = ['cruise', 'climb', 'approach'].map((name) => value(`stick_force_at_stall_forward_${name}`));
    expect(new Set(all).size).toBe(3);
    expect(value('stick_force_at_stall_forward')).toBe(Math.max(...all));
    expect(value('temporary_force_margin')).toBeCloseTo(60 * lbf - Math.max(...all), 10);
  });
});

describe('the force at the limit load factor', () => {
  const at = (equipment: string, more: ControlParts = {}) => reader({ ...powered, equipment, ...more });

  it('is the least force per g of all conditions times the load factor less one', () => {
    const value = at(control(', load_factor: 4.4'), {
      conditions: threeConditions.replaceAll(/, power: \d+ %/g, ''),
      wing: flaps,
    });
    const perG = ['cruise', 'climb', 'approach'].map((name) => value(`stick_force_per_g_aft_${name}`));
    expect(value('stick_force_at_limit_load')).toBeCloseTo(3.4 * Math.min(...perG), 12);
  });

  it('is at 3.8 where the study does not say (common practice, no source)', () => {
    const value = at(control(), { conditions: glide });
    expect(value('stick_force_at_limit_load')).toBeCloseTo(2.8 * value('stick_force_per_g_aft'), 12);
  });

  it.each([
    ['stick', 610 * lb, 15],
    ['stick', 2800 * lb, 20],
    ['stick', 6000 * lb, 35],
    ['wheel', 610 * lb, 20],
    ['wheel', 2800 * lb, 28],
    ['wheel', 6000 * lb, 50],
  ] as const)('on a %s stands above what 23.155 asks for at %d kg, %d lbf', (kind, mass, least) => {
    const value = at(control().replace('stick', kind), { conditions: glide, mass: `${mass} kg` });
    expect(value('limit_load_force_margin')).toBeCloseTo(value('stick_force_at_limit_load') - least * lbf, 9);
    const allowed = kind === 'stick' ? 60 : 75;
    expect(value('temporary_force_margin')).toBeCloseTo(
      allowed * lbf - value('stick_force_at_stall_forward'),
      9,
    );
  });

  it('has no figures without a control, nor without hinge moments', () => {
    const names = ['stick_force_at_stall_forward', 'stick_force_at_limit_load', 'temporary_force_margin'];
    const allMoving = replaced('tail', 'arm: 4.3 m', 'arm: 4.3 m, all_moving: true').replace(
      /elevator: \{.*\}(?=\})/,
      'elevator: {up: 12 deg, down: 8 deg}',
    );
    const without = [
      testStudy({ cg: '{as: percent_mac, forward: 24 %, aft: 33 %}\n  propeller: none' }),
      testStudy({ tail: allMoving, cg: `{as: percent_mac, forward: 24 %, aft: 33 %}\n  ${control()}` }),
    ];
    for (const study of without) {
      const written = buildStages(study, true).flatMap((stage) => stage.writes);
      expect(written).toContain('forward_limit_elevator');
      for (const name of names) expect(written).not.toContain(name);
    }
  });
});

describe('a study with presets', () => {
  const withPresets = (more: ControlParts = {}) => ({
    ...powered,
    require: `static_margin: {at_least: 0 %}\n${presets.limit}\n${presets.pull}`,
    ...more,
  });
  const heavy = control(', bobweight: 90 N');
  /** So short a stick that the CG limits by the pull stand among the others. */
  const short = control(', spring: 290 N').replace('1.9 rad/m', '20 rad/m');

  it('requires their figures, with 5 lbf as one unit of shortfall or its own', () => {
    const own = `${presets.limit}\npull: {preset: 14-cfr-23.143-c-2016, scale: 12 N}`;
    const { requirements } = controlStudy(withPresets({ require: own }));
    expect(requirements).toEqual([
      {
        name: 'limit_force',
        figure: 'limit_load_force_margin',
        atLeast: 0,
        scale: expect.closeTo(5 * lbf, 10),
        preset: '14-cfr-23.155-2016',
      },
      {
        name: 'pull',
        figure: 'temporary_force_margin',
        atLeast: 0,
        scale: 12,
        preset: '14-cfr-23.143-c-2016',
      },
    ]);
  });

  it('is judged by them: too light at the limit load, then heavy enough, then too heavy to the stall', () => {
    const light = reader(withPresets());
    expect(light('limit_load_force_margin')).toBeLessThan(0);
    expect([light('feasible'), light('fails')]).toEqual([0, 0b010]);
    expect(light('largest_shortfall')).toBeCloseTo(-light('limit_load_force_margin') / (5 * lbf), 9);
    const enough = reader(withPresets({ equipment: heavy, cg: [20, 24], conditions: glide }));
    expect(enough('limit_load_force_margin')).toBeGreaterThan(0);
    expect([enough('feasible'), enough('fails')]).toEqual([1, 0]);
    const strong = reader(withPresets({ equipment: short, cg: [15, 24], conditions: glide }));
    expect(strong('temporary_force_margin')).toBeLessThan(0);
    expect([strong('feasible'), strong('fails')]).toEqual([0, 0b100]);
  });

  it('limits the CG forward by the pull that 23.143(c) allows, which the margin agrees with', () => {
    const parts = withPresets({ equipment: short, conditions: glide });
    const at = (forward: number) => reader({ ...parts, cg: [forward, 40] });
    const limit = at(24)('forward_limit_stick_force');
    expect(limit).toBeGreaterThan(at(24)('forward_limit_elevator'));
    expect(at(24)('control_limit_forward')).toBe(limit);
    expect(at(100 * limit)('temporary_force_margin')).toBeCloseTo(0, 9);
    expect(at(100 * limit + 1)('temporary_force_margin')).toBeGreaterThan(0);
    expect(at(100 * limit - 1)('temporary_force_margin')).toBeLessThan(0);
  });

  it('allows more on a wheel, which moves that limit forward', () => {
    const limit = (kind: string) =>
      reader(withPresets({ equipment: short.replace('stick', kind), conditions: glide }))(
        'forward_limit_stick_force',
      );
    expect(limit('wheel')).toBeLessThan(limit('stick'));
  });

  it('tells the pull as an assumption with its paragraph, unless the study gives one', () => {
    const assumed = (equipment: string, require = presets.pull) =>
      controlStudy({ ...powered, conditions: glide, equipment, require }).assumptions.find(
        ({ path }) => path === 'control.greatest_pull',
      );
    expect(assumed(control())?.value).toBeCloseTo(60 * lbf, 10);
    expect(assumed(control())?.source).toBe(
      '14 CFR 23.143(c), as in force until 2017, to be confirmed against your own rules',
    );
    expect(assumed(control(), presets.limit)).toBeUndefined();
    expect(assumed(control(', greatest_pull: 100 N'))).toBeUndefined();
    const own = reader({
      ...powered,
      conditions: glide,
      equipment: control(', greatest_pull: 100 N'),
      require: presets.pull,
    });
    expect(own('control_greatest_pull')).toBe(100);
  });
});
