import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { baselineInputs } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';

/**
 * J. D. Anderson, Introduction to Flight, ch. 7, the chain of worked examples, as a study read from its
 * text, through every stage. From memory: wing and body 0.08 /deg with their aerodynamic centre at 0.24
 * and −0.032 about it, CG at 0.35; tail of 0.1 /deg at 2.7° nose-down with 0.02 of 0.1 m² and its lever
 * 0.17 m from the CG on a MAC of 0.1 m; dε/dα 0.35; elevator 0.04 /deg; C_hα −0.007, C_hδ −0.012 /deg.
 *
 * The book gives slopes and the downwash; a study gives shapes. So the section slopes, the taper and the
 * aspect ratios are chosen so that the stages find the book's slopes, and the first test says how nearly.
 * The body's share is inside the book's wing and body. The book's neutral points are the short form; by
 * shares they are 0.023 and 0.011 further forward (see the chain through the formulas alone).
 */
const text = `
title: A published chain of examples
aeroplane:
  mass: 2 kg
  wing:
    area: 0.1 m^2
    span: 1.0104 m
    taper: 0.7
    root_leading_edge: 0.3 m
    section: {lift_slope: 5.43 /rad, zero_lift_angle: 0 deg, moment: -0.032, aerodynamic_centre: 24 %}
  tail:
    area: 0.02 m^2
    arm: 0.18 m
    aspect_ratio: 8.77
    taper: 1
    dynamic_pressure_ratio: 1
    incidence: -2.7 deg
    section: {lift_slope: 7.5 /rad}
    elevator: {chord_fraction: 25 %, span_fraction: 100 %, effectiveness_ratio: 0.6568,
      hinge: {alpha: -0.401 /rad, delta: -0.6875 /rad}}
  body: none
  cg: {as: percent_mac, forward: 35 %, aft: 35 %}
conditions:
  - {name: only, lift_coefficient: 0.524, height: 0 m}
methods: {aerodynamic_centre: quarter_mac}
vary:
  cg: [{forward: 35 %, aft: 35 %}]
require:
  static_margin: {at_least: 5 %}
  free: {figure: static_margin_free_stick_aft, at_least: 5 %}
`;

const degree = Math.PI / 180;

describe('a published chain, from the text of a study to elevator and free stick', () => {
  const study = readStudyText(text, 'anderson.yaml');
  const figures = runOnce(layOut(study).plan.stages, baselineInputs(study));
  const value = (name: string) => figures.get(name) ?? Number.NaN;

  it('finds the book’s slopes, volume and downwash', () => {
    expect(value('mac')).toBeCloseTo(0.1, 4);
    expect(value('tail_position')).toBeCloseTo(2.05, 2);
    expect(value('wing_body_lift_slope') * degree).toBeCloseTo(0.08, 3);
    expect(value('tail_lift_slope') * degree).toBeCloseTo(0.1, 3);
    expect(Math.abs(value('downwash_gradient') - 0.35)).toBeLessThan(0.006);
    expect(value('elevator_effectiveness')).toBeCloseTo(0.4, 4);
  });

  it('free-stick factor 0.767', () =>
    expect(Math.abs(value('free_stick_factor') - 0.767)).toBeLessThan(0.001));

  it('neutral points by shares, beside the short form’s 0.516 and 0.452', () => {
    console.info(
      `Introduction to Flight, ch. 7, through the stages: fixed ${value('neutral_point').toFixed(3)} (short form 0.516), ` +
        `free ${value('neutral_point_free_stick').toFixed(3)} (0.452), elevator ${(value('elevator_to_trim_aft') / degree).toFixed(2)}° (−1.94°)`,
    );
    expect(Math.abs(value('neutral_point') - 0.493)).toBeLessThan(0.003);
    expect(Math.abs(value('neutral_point_free_stick') - 0.441)).toBeLessThan(0.003);
    const short = { fixed: 0.516, free: 0.452 };
    expect(short.fixed - value('neutral_point')).toBeGreaterThan(0.005);
    expect(short.fixed - value('neutral_point')).toBeLessThan(0.039);
    expect(short.free - value('neutral_point_free_stick')).toBeLessThan(0.039);
  });

  it('elevator to trim near the printed −1.94°, and at what the shares give by hand, −1.84°', () => {
    const elevator = value('elevator_to_trim_aft') / degree;
    expect(Math.abs(elevator + 1.84)).toBeLessThan(0.1);
    expect(Math.abs(elevator + 1.94)).toBeLessThan(0.2);
  });

  it('margins of 0.166 and 0.102 less what the short form is too far aft', () => {
    expect(value('static_margin_aft')).toBeLessThan(0.166);
    expect(value('static_margin_aft')).toBeGreaterThan(0.166 - 0.039);
    expect(value('static_margin_free_stick_aft')).toBeLessThan(0.102);
    expect(value('static_margin_free_stick_aft')).toBeGreaterThan(0.102 - 0.039);
  });
});
