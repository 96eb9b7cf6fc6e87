import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { controlLimitKinds } from '../../src/figures/control-limit-kinds.ts';
import {
  type ControlParts,
  control,
  controlStudy,
  flaps,
  gear,
  propeller,
  reader,
  threeConditions,
} from './control-studies.ts';

const equipment = `${propeller(', above_datum: 0.2 m, tail_in_slipstream: 50 %')}\n${control()}\n${gear}`;
const whole: ControlParts = {
  conditions: threeConditions,
  wing: `${flaps}, incidence: 2 deg`,
  tail: 'incidence: -1.5 deg',
  equipment,
};
const names = ['cruise', 'climb', 'approach'] as const;

type Reader = (name: string) => number;

/** Lift and moment about h of all but the tail, written anew from the parts; x is the angle from nil wing lift. */
function allButTail(value: Reader, of: Reader, x: number, h: number) {
  const wing = x * of('wing_body_lift_slope');
  const ofPropeller = of('propeller_lift_at_zero_lift') + x * of('propeller_lift_share');
  const couples =
    of('body_moment_slope') * x +
    value('body_couple_slope') * of('zero_lift_body_angle') +
    value('wing_section_moment') +
    of('wing_lift_slope') * value('wing_twist_couple') +
    of('flap_moment');
  return {
    lift: wing + ofPropeller,
    moment:
      (h - value('wing_aerodynamic_centre')) * wing + (h - of('propeller_position')) * ofPropeller + couples,
  };
}

/** Angle from nil wing lift at which all but the tail has a lift. */
function angleAt(of: Reader, lift: number): number {
  const slope = of('wing_body_lift_slope') + of('propeller_lift_share');
  return (lift - of('propeller_lift_at_zero_lift')) / slope;
}

function tailLift(value: Reader, of: Reader, x: number, elevator: number): number {
  const onWing = of('tail_pressure_ratio') * (value('tail_area') / value('wing_area'));
  const angle =
    of('zero_lift_body_angle') +
    x * (1 - of('tail_downwash_gradient')) +
    value('tail_incidence') -
    of('zero_lift_downwash');
  return onWing * of('tail_lift_slope') * (angle + value('elevator_effectiveness') * elevator);
}

/** Thrust's moment at the speed of another lift: the same power, or a windmill. */
function thrustAt(value: Reader, of: Reader, lift: number, idle: boolean): number {
  const speedRatio = idle ? 1 : (lift / of('lift_coefficient')) ** 1.5;
  return (-of('thrust_on_wing') * speedRatio * value('propeller_above_datum')) / value('mac');
}

describe('each forward limit satisfies its own balance of moments', () => {
  const value = reader(whole);
  for (const name of names) {
    const of = (figure: string) => value(`${figure}_${name}`);
    const lift = of('maximum_lift');
    const thrust = thrustAt(value, of, lift, name === 'approach');

    it(`full up elevator at the stall, ${name}`, () => {
      const h = of('forward_limit_elevator');
      const x = angleAt(of, lift);
      const rest = allButTail(value, of, x, h);
      expect(rest.lift).toBeCloseTo(lift, 12);
      const onTail = tailLift(value, of, x, -25 * (Math.PI / 180));
      expect(rest.moment + (h - of('tail_position')) * onTail + thrust).toBeCloseTo(0, 10);
    });

    it(`the tail’s own stall, ${name}`, () => {
      const h = of('forward_limit_tail_lift');
      const rest = allButTail(value, of, angleAt(of, lift), h);
      const greatest = 0.9 * value('tail_section_maximum_lift');
      const onTail = (-greatest * of('tail_pressure_ratio') * value('tail_area')) / value('wing_area');
      expect(rest.moment + (h - of('tail_position')) * onTail + thrust).toBeCloseTo(0, 10);
    });
  }

  it('nose wheel just unloaded: with forces on wing, tail and main wheels the moments are nil', () => {
    const of = (figure: string) => value(`${figure}_approach`);
    const h = of('forward_limit_nose_wheel');
    const knot = 1852 / 3600;
    const pressure = 0.5 * 1.225 * (48 * knot) ** 2;
    const weight = (610 * 9.80665) / (pressure * value('wing_area'));
    // Datum line level on the ground: the body's angle is nil.
    const x = -of('zero_lift_body_angle');
    const rest = allButTail(value, of, x, h);
    const onTail = tailLift(value, of, x, -25 * (Math.PI / 180));
    const onWheels = weight - rest.lift - onTail;
    expect(onWheels).toBeGreaterThan(0);
    const wheels = (2.75 - value('mac_leading_edge')) / value('mac');
    const friction = (0.03 * onWheels * 0.9) / value('mac');
    const moment =
      rest.moment +
      (h - of('tail_position')) * onTail +
      thrustAt(value, of, weight, true) +
      (h - wheels) * onWheels -
      friction;
    expect(moment).toBeCloseTo(0, 5);
  });
});

describe('what moves a forward limit', () => {
  const limit = (more: ControlParts, figure = 'forward_limit_elevator') =>
    reader({ equipment: control(), ...more })(figure);

  it('more up travel moves that of the elevator forward, and not that of the tail’s lift', () => {
    const elevator = (up: number) =>
      `span_fraction: 95 %, effectiveness_ratio: 0.8, up: ${up} deg, down: 15 deg`;
    expect(limit({ elevator: elevator(28) })).toBeLessThan(limit({ elevator: elevator(22) }));
    const byTail = (up: number) => limit({ elevator: elevator(up) }, 'forward_limit_tail_lift');
    expect(byTail(28)).toBe(byTail(22));
  });

  it('a weaker elevator moves it aft', () => {
    const elevator = (ratio: number) =>
      `span_fraction: 95 %, effectiveness_ratio: ${ratio}, up: 25 deg, down: 15 deg`;
    expect(limit({ elevator: elevator(0.7) })).toBeGreaterThan(limit({ elevator: elevator(0.9) }));
  });

  it('a greater lift of the tail moves that of the tail forward', () => {
    const at = (lift: number) => limit({ tail: `maximum_lift: ${lift}` }, 'forward_limit_tail_lift');
    expect(at(1.2)).toBeLessThan(at(0.9));
  });

  it('flaps and ground move it aft: the approach limits, not the cruise', () => {
    const value = reader(whole);
    expect(value('forward_limit_elevator_approach')).toBeGreaterThan(value('forward_limit_elevator_cruise'));
    const free = reader({ ...whole, conditions: threeConditions.replace(', wing_above_ground: 1.1 m', '') });
    expect(value('forward_limit_elevator_approach')).toBeGreaterThan(free('forward_limit_elevator_approach'));
  });

  it('main wheels further aft move that of the nose wheel aft', () => {
    const at = (wheels: string) =>
      reader({ ...whole, equipment: equipment.replace('2.75 m', wheels) })(
        'forward_limit_nose_wheel_approach',
      );
    expect(at('2.85 m')).toBeGreaterThan(at('2.7 m'));
  });

  it('a tail wheel has no such limit, nor has a condition away from the ground', () => {
    const figures = (parts: ControlParts) =>
      [...layOut(controlStudy(parts)).plan.axesOfFigure.keys()].filter((name) => name.includes('nose_wheel'));
    expect(figures(whole)).toEqual(['forward_limit_nose_wheel_approach']);
    const tailWheel = equipment.replace(gear, 'landing_gear: {kind: tail_wheel, main_wheels: 1.6 m}');
    expect(figures({ ...whole, equipment: tailWheel })).toEqual([]);
  });
});

describe('the forward limit of control', () => {
  const kindOf = (value: Reader) => controlLimitKinds[value('control_limit_kind')].figure;
  const elevator = (up: number) =>
    `span_fraction: 95 %, effectiveness_ratio: 0.8, up: ${up} deg, down: 15 deg`;
  const limits = (value: Reader) => [
    ...names.flatMap((name) => [
      value(`forward_limit_elevator_${name}`),
      value(`forward_limit_tail_lift_${name}`),
    ]),
    value('forward_limit_nose_wheel_approach'),
  ];

  it('is the aftmost of two limits, in whichever order they stand', () => {
    const weak = reader({ ...whole, elevator: elevator(12) });
    const ahead = reader({
      ...whole,
      elevator: elevator(12),
      equipment: equipment.replace('2.75 m', '2.45 m'),
    });
    const strong = reader({ ...whole, elevator: elevator(30) });
    for (const value of [weak, ahead, strong]) {
      expect(value('control_limit_forward')).toBe(Math.max(...limits(value)));
    }
    expect(kindOf(ahead)).toBe('forward_limit_elevator');
    expect(ahead('forward_limit_elevator_approach')).toBeGreaterThan(
      ahead('forward_limit_nose_wheel_approach'),
    );
    expect(kindOf(strong)).toBe('forward_limit_nose_wheel');
    expect(strong('forward_limit_elevator_approach')).toBeLessThan(
      strong('forward_limit_nose_wheel_approach'),
    );
  });

  it('is the same with the conditions in another order, and names the same one', () => {
    const [cruise, climb, approach] = threeConditions.slice(1, -1).split(/,\s*(?=\{)/);
    const turned = reader({ ...whole, conditions: `[${approach}, ${cruise}, ${climb}]` });
    const value = reader(whole);
    expect(turned('control_limit_forward')).toBe(value('control_limit_forward'));
    expect(value('control_limit_condition')).toBe(2);
    expect(turned('control_limit_condition')).toBe(0);
  });

  it('is the tail’s greatest lift where that is the aftmost', () => {
    const tail = 'incidence: -1.5 deg, maximum_lift: 0.25';
    const value = reader({ ...whole, tail, equipment: `${propeller()}\n${control()}` });
    expect(kindOf(value)).toBe('forward_limit_tail_lift');
    expect(value('control_limit_forward')).toBe(value('forward_limit_tail_lift_approach'));
    expect(value('forward_limit_tail_lift_approach')).toBeGreaterThan(
      value('forward_limit_elevator_approach'),
    );
  });

  it('may be the pull to the stall, where the study says how great it may be', () => {
    const pulled = (newtons: number) =>
      reader({
        ...whole,
        equipment: equipment.replace('1.9 rad/m', `1.9 rad/m, greatest_pull: ${newtons} N`),
      });
    const [light, strong] = [pulled(2), pulled(20)];
    expect(kindOf(light)).toBe('forward_limit_stick_force');
    expect(light('control_limit_forward')).toBe(
      Math.max(...names.map((name) => light(`forward_limit_stick_force_${name}`))),
    );
    expect(strong('forward_limit_stick_force_cruise')).toBeLessThan(
      light('forward_limit_stick_force_cruise'),
    );
    // Ten times the pull is ten times as far ahead of the point of nil force.
    const nil = (value: Reader) => value('nil_force_at_stall_cruise');
    const ahead = (value: Reader) => nil(value) - value('forward_limit_stick_force_cruise');
    expect(ahead(strong) / ahead(light)).toBeCloseTo(10, 9);
    // Dynamic pressures go as one over the lift coefficients.
    const force =
      light('stick_force_by_margin_cruise') *
      (light('forward_limit_stick_force_cruise') - nil(light)) *
      (1 - light('lift_coefficient_cruise') / light('maximum_lift_cruise'));
    expect(force).toBeCloseTo(2, 10);
  });

  it('does not bind by the pull in a condition at the stall itself', () => {
    const value = reader({
      conditions: '[{name: slow, times_stall: 1, height: 0 m}]',
      equipment: control(', greatest_pull: 5 N'),
    });
    expect(value('forward_limit_stick_force')).toBeNaN();
    expect(value('control_limit_forward')).toBe(value('forward_limit_elevator'));
  });

  it('leaves the margin of control, and closes the CG window', () => {
    const value = reader(whole);
    expect(value('control_margin_forward')).toBeCloseTo(0.24 - value('control_limit_forward'), 12);
    const byBand = value('neutral_point_aftmost') - 0.2;
    expect(value('cg_window_forward')).toBe(Math.max(byBand, value('control_limit_forward')));
    expect(value('control_limit_forward')).toBeGreaterThan(byBand);
    const wide = reader({ ...whole, require: 'static_margin: {at_least: 5 %, at_most: 8 %}' });
    expect(wide('cg_window_forward')).toBe(wide('neutral_point_aftmost') - 0.08);
    const open = reader({ ...whole, require: 'static_margin: {at_least: 5 %}' });
    expect(open('cg_window_forward')).toBe(open('control_limit_forward'));
  });

  it('judges a requirement on the margin of control', () => {
    const asked = (least: string) =>
      reader({ ...whole, require: `control: {figure: control_margin_forward, at_least: ${least}}` });
    const margin = 100 * asked('0 %')('control_margin_forward');
    expect(asked(`${margin - 0.01} %`)('feasible')).toBe(1);
    expect(asked(`${margin + 0.01} %`)('feasible')).toBe(0);
  });
});
