import { describe, expect, it } from 'vitest';
import { readStudyText } from '../../src/read-study-file.ts';
import { figure, figuresOf } from './aeroplane.ts';
import {
  control,
  controlStudy,
  controlText,
  flaps,
  propeller,
  reader,
  threeConditions,
} from './control-studies.ts';

/** Neutral point of wing and body alone. */
function wingBodyPoint(figures: ReadonlyMap<string, number>): number {
  const [centre, body, slope] = ['wing_aerodynamic_centre', 'body_moment_slope', 'wing_body_lift_slope'].map(
    (name) => figure(figures, name),
  );
  return centre - body / slope;
}

const sprung = (more: string) => reader({ equipment: control(more) });

describe('free stick, through whole studies', () => {
  it('costs margin with usual hinge data (common practice, no source: 2 to 10 % MAC)', () => {
    const value = reader({ equipment: control() });
    const cost = value('static_margin_aft') - value('static_margin_free_stick_aft');
    expect(cost).toBeGreaterThan(0.02);
    expect(cost).toBeLessThan(0.1);
    expect(value('free_stick_factor')).toBeLessThan(1);
  });

  it('costs nothing where the elevator does not float, and a floating all-moving tail is no tail', () => {
    const elevator = (hinge: string) =>
      `span_fraction: 95 %, effectiveness_ratio: 0.8, up: 25 deg, down: 15 deg, hinge: ${hinge}`;
    const still = reader({ equipment: control(), elevator: elevator('{alpha: 0 /rad, delta: -0.4 /rad}') });
    expect(still('neutral_point_free_stick')).toBeCloseTo(still('neutral_point'), 12);
    const text = controlText({ equipment: control() }).replace(
      /elevator: \{.*\}(?=\})/,
      'all_moving: true, elevator: {up: 12 deg, down: 8 deg, hinge: {alpha: -0.3 /rad}}',
    );
    const figures = figuresOf(readStudyText(text, 'all-moving.yaml'));
    expect(figures.get('free_stick_factor')).toBe(0);
    expect(figures.get('neutral_point_free_stick')).toBeCloseTo(wingBodyPoint(figures), 12);
    expect(figures.get('tail_elevator_area')).toBe(figures.get('tail_area'));
  });

  it('is the neutral point of a tail with F times its lift slope', () => {
    const value = reader({ equipment: control() });
    const share = value('free_stick_factor') * value('tail_lift_share');
    const whole = value('wing_body_lift_slope') + share;
    const point =
      (value('wing_body_lift_slope') * value('wing_aerodynamic_centre') +
        share * value('tail_position') -
        value('body_moment_slope')) /
      whole;
    expect(value('neutral_point_free_stick')).toBeCloseTo(point, 12);
  });

  it('takes theory times each factor: equal factors leave F near that of theory, unequal do not', () => {
    const factor = (alpha: number, delta: number) =>
      reader({
        equipment: control(),
        elevator: `span_fraction: 95 %, effectiveness_ratio: 0.8, up: 25 deg, down: 15 deg, hinge: {alpha_factor: ${alpha}, delta_factor: ${delta}}`,
      })('free_stick_factor');
    expect(factor(0.7, 0.7)).toBeCloseTo(factor(1, 1), 12);
    expect(factor(0.5, 0.8)).toBeGreaterThan(factor(0.8, 0.8));
  });

  it('a spring that must be pulled against moves the point of nil force aft, and adds no force per g', () => {
    const [none, spring] = [sprung(''), sprung(', spring: 5 N')];
    const moved = spring('neutral_point_free_stick') - none('neutral_point_free_stick');
    expect(moved).toBeGreaterThan(0);
    expect(moved).toBeCloseTo(-5 / none('stick_force_by_margin'), 12);
    expect(spring('stick_force_per_g_aft')).toBeCloseTo(none('stick_force_per_g_aft'), 12);
    // −2 F/V on the slope at the trimmed speed.
    const bySpeed = spring('stick_force_per_speed_aft') - none('stick_force_per_speed_aft');
    expect(bySpeed).toBeCloseTo((-2 * 5) / none('calibrated_speed'), 10);
  });

  it('a bobweight adds its force per g', () => {
    const [none, weighted] = [sprung(''), sprung(', bobweight: 8 N')];
    expect(weighted('stick_force_per_g_aft') - none('stick_force_per_g_aft')).toBeCloseTo(8, 10);
    expect(weighted('manoeuvre_margin_free_stick_aft')).toBeGreaterThan(
      none('manoeuvre_margin_free_stick_aft'),
    );
  });

  it('forces go with the margin: none at the point of nil force, pull per g ahead of it', () => {
    const value = reader({ equipment: control() });
    const at = 100 * value('neutral_point_free_stick');
    const there = reader({ equipment: control(), cg: [at - 10, at] });
    expect(there('stick_force_per_speed_aft')).toBeCloseTo(0, 10);
    expect(there('stick_force_per_speed_forward')).toBeLessThan(0);
    expect(there('stick_force_per_g_forward')).toBeGreaterThan(there('stick_force_per_g_aft'));
    expect(there('stick_force_per_g_aft')).toBeGreaterThan(0);
  });

  it('elevator area and chord follow from the tail unless they are given', () => {
    const value = reader({ equipment: control() });
    expect(value('tail_elevator_area')).toBeCloseTo(0.38 * 0.95 * value('tail_area'), 12);
    expect(value('tail_elevator_chord')).toBeCloseTo((0.38 * value('tail_area')) / value('tail_span'), 12);
    const given = reader({
      equipment: control(),
      elevator:
        'span_fraction: 95 %, effectiveness_ratio: 0.8, up: 25 deg, down: 15 deg, area: 0.6 m^2, chord: 0.25 m',
    });
    const scale = (read: typeof value) => read('tail_elevator_area') * read('tail_elevator_chord');
    expect(scale(given)).toBeCloseTo(0.15, 12);
    expect(given('stick_force_scale') / value('stick_force_scale')).toBeCloseTo(
      scale(given) / scale(value),
      12,
    );
  });

  it('without hinge moments, as of an all-moving tail, has no such figures', () => {
    const study = controlStudy({ equipment: control() });
    const bare = { ...study, hinge: 'none' as const };
    const figures = figuresOf(bare);
    expect(figures.has('neutral_point')).toBe(true);
    expect(figures.has('manoeuvre_margin_aft')).toBe(true);
    expect([...figures.keys()].filter((name) => /free_stick|stick_force/.test(name))).toEqual([]);
  });
});

describe('manoeuvre, through whole studies', () => {
  it('the manoeuvre point lies aft of the neutral point, less so high up and heavy', () => {
    const margin = (height: number, mass: number) => {
      const value = reader({
        conditions: `[{name: only, lift_coefficient: 0.4, height: ${height} m}]`,
        equipment: control(),
        mass: `${mass} kg`,
      });
      expect(value('manoeuvre_point')).toBeGreaterThan(value('neutral_point'));
      expect(value('manoeuvre_point_free_stick')).toBeGreaterThan(value('neutral_point_free_stick'));
      return value('manoeuvre_step');
    };
    expect(margin(4000, 610)).toBeLessThan(margin(0, 610));
    expect(margin(0, 610)).toBeLessThan(margin(0, 450));
  });

  it('of several conditions the least margin stands under the plain name, whichever governs the static margin', () => {
    const conditions = `[{name: low, lift_coefficient: 0.8, height: 0 m}, {name: high, lift_coefficient: 0.4, height: 5000 m}]`;
    const value = reader({ conditions, equipment: control(), cgHeight: '0.2 m' });
    // The low wing costs most at the greater lift, and the damping is least in the thinner air.
    expect(value('governing_condition_aft')).toBe(0);
    expect(value('manoeuvre_step_high')).toBeLessThan(value('manoeuvre_step_low'));
    const least = Math.min(value('manoeuvre_margin_aft_low'), value('manoeuvre_margin_aft_high'));
    expect(value('manoeuvre_margin_aft')).toBe(least);
    expect(value('stick_force_per_g_forward')).toBe(
      Math.max(value('stick_force_per_g_forward_low'), value('stick_force_per_g_forward_high')),
    );
  });

  it('elevator per g is nil at the manoeuvre point and grows ahead of it', () => {
    const at = 100 * reader({ equipment: control() })('manoeuvre_point');
    const value = reader({ equipment: control(), cg: [at - 15, at] });
    expect(value('elevator_per_g_aft')).toBeCloseTo(0, 12);
    expect(value('elevator_per_g_forward')).toBeLessThan(0);
  });

  it('every figure of a full study is a number', () => {
    const figures = figuresOf(
      controlStudy({
        conditions: threeConditions,
        wing: flaps,
        cgHeight: '0.1 m',
        equipment: `${propeller(', above_datum: 0.1 m, tail_in_slipstream: 60 %')}\n${control(', spring: 3 N, bobweight: 2 N')}`,
      }),
    );
    const empty = [...figures].filter(([, value]) => !Number.isFinite(value)).map(([name]) => name);
    expect(empty).toEqual(['not_computed_because']);
  });
});
