import { describe, expect, it } from 'vitest';
import { washoutMoment } from '../../src/methods/zero-lift-moment.ts';
import { testStudy } from '../studies.ts';
import { figuresOf } from './aeroplane.ts';
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

const degree = Math.PI / 180;
/** No slipstream, no height, and a downwash that does not follow the wake: nothing but C_L changes with C_L. */
const handbook = 'methods: {downwash: handbook}';

/** Same speed and so the same Mach number at each lift coefficient: the mass goes with it. */
const atLift = (cl: number, more: ControlParts = {}): ControlParts => ({
  conditions: `[{name: only, lift_coefficient: ${cl}, height: 0 m}]`,
  mass: `${1000 * cl} kg`,
  equipment: control(),
  rest: handbook,
  ...more,
});

describe('elevator to trim, through whole studies', () => {
  it('at no lift does not depend on the CG', () => {
    const value = reader(atLift(0.5));
    const atNone = (end: string) => value(`elevator_to_trim_${end}`) - 0.5 * value(`elevator_slope_${end}`);
    expect(atNone('forward')).toBeCloseTo(atNone('aft'), 12);
    expect(value('elevator_to_trim_forward')).not.toBeCloseTo(value('elevator_to_trim_aft'), 3);
    const almost = reader(atLift(0.01));
    expect(almost('elevator_to_trim_forward')).toBeCloseTo(atNone('aft'), 2);
  });

  it('is straight against lift, with the slope (h − h_n)/(C_Lδ (h_t − h_n))', () => {
    const [low, middle, high] = [0.2, 0.6, 1].map((cl) => reader(atLift(cl)));
    const angle = (value: typeof low) => value('elevator_to_trim_forward');
    const slope = (angle(high) - angle(low)) / 0.8;
    expect((angle(low) + angle(high)) / 2).toBeCloseTo(angle(middle), 12);
    expect(slope).toBeCloseTo(middle('elevator_slope_forward'), 12);
    const hn = middle('neutral_point');
    const lever = middle('elevator_lift_slope') * (middle('tail_position') - hn);
    expect(slope).toBeCloseTo((0.24 - hn) / lever, 12);
  });

  it('is flat with the CG at the neutral point, at idle', () => {
    const neutral = 100 * reader(atLift(0.5))('neutral_point');
    const angles = [0.2, 0.6, 1].map((cl) =>
      reader(atLift(cl, { cg: [neutral, neutral] }))('elevator_to_trim_aft'),
    );
    expect(angles[1]).toBeCloseTo(angles[0], 12);
    expect(angles[2]).toBeCloseTo(angles[0], 12);
    const value = reader(atLift(0.5, { cg: [neutral, neutral] }));
    expect(value('elevator_slope_aft')).toBeCloseTo(0, 12);
    expect(value('trim_slope_limit')).toBe(value('neutral_point'));
  });

  it('needs more up elevator to fly slower, the more so with the CG forward (common practice, no source)', () => {
    const value = reader({
      conditions: threeConditions,
      wing: flaps,
      equipment: `${propeller()}\n${control()}`,
    });
    for (const condition of ['cruise', 'climb', 'approach']) {
      const [forward, aft] = ['forward', 'aft'].map((end) => value(`elevator_slope_${end}_${condition}`));
      expect(forward).toBeLessThan(aft);
    }
    expect(value('elevator_slope_forward_cruise')).toBeLessThan(0);
  });

  it('takes wing and tail incidence as tail angle: a degree of either is the same elevator', () => {
    const elevator = (more: ControlParts) => reader(atLift(0.5, more))('elevator_to_trim_forward');
    const level = elevator({ body: 'none' });
    const tailUp = elevator({ body: 'none', tail: 'incidence: 1 deg' });
    const wingDown = elevator({ body: 'none', wing: 'incidence: -1 deg' });
    const tau = reader(atLift(0.5))('elevator_effectiveness');
    expect(tailUp - level).toBeCloseTo(-degree / tau, 12);
    expect(wingDown).toBeCloseTo(tailUp, 12);
  });

  it('balances the moments about either CG, part by part', () => {
    const parts: ControlParts = {
      conditions: threeConditions,
      wing: `${flaps}, incidence: 2 deg`,
      tail: 'incidence: -1.5 deg',
      cgHeight: '0.1 m',
      equipment: `${propeller(', above_datum: 0.2 m, tail_in_slipstream: 50 %')}\n${control()}`,
    };
    const value = reader(parts);
    for (const condition of ['cruise', 'climb', 'approach']) {
      for (const end of ['forward', 'aft']) {
        const of = (name: string) => value(`${name}_${condition}`);
        const delta = of(`elevator_to_trim_${end}`);
        const cl = of('lift_coefficient');
        const { lift, moment } = balance(value, of, cl, delta, value(`cg_${end}`));
        expect(lift).toBeCloseTo(cl, 10);
        expect(moment).toBeCloseTo(0, 10);
      }
    }
  });
});

/**
 * Lift and moment of a study's parts, each at its own place, for the angle of attack at which the lift is
 * `cl`: written anew from the parts, without the program's closed forms.
 */
function balance(
  value: (name: string) => number,
  of: (name: string) => number,
  cl: number,
  delta: number,
  h: number,
): { lift: number; moment: number } {
  const eta = of('tail_pressure_ratio') * of('tail_lift_slope') * (value('tail_area') / value('wing_area'));
  const alpha0 = of('zero_lift_body_angle');
  const tailAt = (x: number) =>
    eta *
    (alpha0 +
      x * (1 - of('tail_downwash_gradient')) +
      value('tail_incidence') -
      of('zero_lift_downwash') +
      value('elevator_effectiveness') * delta);
  const propellerAt = (x: number) => of('propeller_lift_at_zero_lift') + x * of('propeller_lift_share');
  const wingAt = (x: number) => x * of('wing_body_lift_slope');
  const liftAt = (x: number) => wingAt(x) + propellerAt(x) + tailAt(x);
  const x = (cl - liftAt(0)) / (liftAt(1) - liftAt(0));
  const c = value('mac');
  const wingHeight = (value('wing_height') + value('mac_height') - value('cg_above_datum')) / c;
  const tilt =
    wingHeight *
    (2 / of('wing_lift_slope') - 2 / (Math.PI * value('wing_aspect_ratio') * value('span_efficiency'))) *
    (-(cl ** 2) / 2);
  const moment =
    (h - value('wing_aerodynamic_centre')) * wingAt(x) +
    (h - of('propeller_position')) * propellerAt(x) +
    (h - of('tail_position')) * tailAt(x) +
    of('body_moment_slope') * x +
    value('body_couple_slope') * alpha0 +
    value('wing_section_moment') +
    of('wing_lift_slope') * value('wing_twist_couple') +
    of('flap_moment') -
    (of('thrust_on_wing') * (value('propeller_above_datum') - value('cg_above_datum'))) / c +
    tilt -
    of('neutral_point_height_datum') * of('lift_slope') * x;
  return { lift: liftAt(x), moment };
}

describe('sizing by trim', () => {
  it('finds the tail incidence at which the elevator is straight in cruise', () => {
    const value = reader({
      wing: 'incidence: 2 deg',
      rest: 'size: {choose: tail.incidence, so_that: elevator_to_trim_aft, is: 0 deg, between: [-8 deg, 6 deg]}',
      tail: 'incidence: 0 deg',
    });
    expect(value('elevator_to_trim_aft')).toBeCloseTo(0, 8);
    const level = reader({ wing: 'incidence: 2 deg', equipment: control() });
    // A degree of incidence is τ degrees of elevator less.
    const wanted = level('elevator_effectiveness') * level('elevator_to_trim_aft');
    expect(value('tail_incidence')).toBeCloseTo(wanted, 8);
    expect(value('tail_incidence')).not.toBeCloseTo(0, 3);
  });
});

describe('trim slope limit and neutral point', () => {
  const at = (height: number) =>
    reader({
      conditions: '[{name: climb, speed: 70 kt, height: 0 m, power: 100 %}]',
      equipment: propeller(`, above_datum: ${height} m`),
      cgHeight: '0 m',
    });

  it('part with thrust lines 0.2 c above and below the CG: the first moves, the second does not', () => {
    const c = at(0)('mac');
    const [low, high] = [at(-0.2 * c), at(0.2 * c)];
    expect(high('neutral_point')).toBe(low('neutral_point'));
    const moved = high('trim_slope_limit') - low('trim_slope_limit');
    // dC_m/dC_L = (3/2) C_m,T/C_L at constant power: a high line is stabilising, the flat point goes aft.
    expect(moved).toBeCloseTo((1.5 * high('thrust_on_wing') * 0.4) / high('lift_coefficient'), 12);
    expect(moved).toBeGreaterThan(0.05);
  });

  it('are the same at idle, whatever the thrust line', () => {
    const idle = reader({
      conditions: '[{name: glide, speed: 70 kt, height: 0 m}]',
      equipment: propeller(', above_datum: 0.4 m'),
      cgHeight: '-0.25 m',
    });
    expect(idle('trim_slope_limit')).toBeCloseTo(idle('neutral_point'), 12);
    expect(idle('thrust_moment')).toBeGreaterThan(0);
  });

  it('with the CG at the limit, elevator against speed is flat at that speed under power', () => {
    // Slopes between neighbouring speeds of whole studies; what else changes with speed is small.
    const study = (speed: number, cg: number) =>
      reader({
        conditions: `[{name: climb, speed: ${speed} m/s, height: 0 m, power: 100 %}]`,
        equipment: propeller(', above_datum: 0.5 m'),
        cg: [cg, cg],
        rest: handbook,
      });
    const slopeAt = (cg: number) =>
      study(36.5, cg)('elevator_to_trim_aft') - study(35.5, cg)('elevator_to_trim_aft');
    const limit = 100 * study(36, 25)('trim_slope_limit');
    expect(slopeAt(limit - 10)).toBeGreaterThan(0);
    expect(Math.abs(slopeAt(limit))).toBeLessThan(0.05 * slopeAt(limit - 10));
    expect(Math.abs(slopeAt(100 * study(36, 25)('neutral_point')))).toBeGreaterThan(
      3 * Math.abs(slopeAt(limit)),
    );
  });
});

describe('couples at nil wing lift', () => {
  it('of washout with sweep as in closed form, and the same for a wing cut into panels', () => {
    const whole = reader({ equipment: control() });
    const closed = washoutMoment(
      whole('wing_lift_slope'),
      2 * degree,
      Math.tan(2 * degree),
      whole('wing_aspect_ratio'),
      0.6,
    );
    expect(whole('wing_lift_slope') * whole('wing_twist_couple')).toBeCloseTo(closed, 12);
    const figures = figuresOf(
      testStudy({
        wing: `{area: 11.4 m^2, span: 9.4 m, washout: 2 deg, root_leading_edge: 1.75 m, height: -0.25 m,
    panels: [{span_fraction: 40 %, taper: 0.84, sweep_quarter_chord: 2 deg}, {span_fraction: 60 %, taper: ${0.6 / 0.84}, sweep_quarter_chord: 2 deg}],
    section: {lift_slope: 6.1 /rad, zero_lift_angle: -1.2 deg, moment: -0.01, aerodynamic_centre: 0.243}}`,
        require: 'control: {figure: control_margin_forward, at_least: 0 %}',
      }),
    );
    expect(figures.get('wing_twist_couple')).toBeCloseTo(whole('wing_twist_couple'), 12);
  });

  it('flaps down need less up elevator by their downwash, more by their couple', () => {
    const at = (more: string) =>
      reader({
        conditions: '[{name: approach, speed: 62 kt, height: 0 m, flaps: 30 deg}]',
        wing: `flaps: {at: 30 deg, zero_lift_angle: -4 deg, ${more}}`,
      })('elevator_to_trim_forward');
    const plain = at('maximum_lift: 0.5');
    expect(at('maximum_lift: 0.5, moment: -0.05')).toBeLessThan(plain);
    expect(at('maximum_lift: 0.5, downwash: 2 deg')).toBeGreaterThan(plain);
  });
});

describe('which studies have control figures', () => {
  const has = (parts: Parameters<typeof testStudy>[0]) =>
    figuresOf(testStudy(parts)).has('control_limit_forward');

  it('not a plain one of one condition', () => {
    expect(has({})).toBe(false);
    expect(has({ require: 'static_margin: {at_least: 5 %}\nhandy: {figure: tail_span, at_most: 4 m}' })).toBe(
      false,
    );
  });

  it('one that requires, prefers or tables such a figure', () => {
    expect(has({ require: 'control: {figure: control_margin_forward, at_least: 0 %}' })).toBe(true);
    expect(has({ rest: 'prefer: {manoeuvre_margin_aft: more}' })).toBe(true);
    expect(has({ rest: 'table: {columns: [elevator_to_trim_forward]}' })).toBe(true);
  });

  it('one with more than one condition, flaps, propeller, control or gear', () => {
    expect(
      has({ conditions: '[{name: a, speed: 60 kt, height: 0 m}, {name: b, speed: 90 kt, height: 0 m}]' }),
    ).toBe(true);
    for (const parts of [
      { wing: flaps },
      { equipment: propeller() },
      { equipment: control() },
      { equipment: gear },
    ]) {
      expect(figuresOf(controlStudy(parts)).has('control_limit_forward')).toBe(true);
    }
  });
});
