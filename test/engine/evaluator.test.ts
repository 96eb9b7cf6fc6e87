import { describe, expect, it } from 'vitest';
import { Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { baselineInputs, buildStages } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import { replaced, testStudy } from '../studies.ts';
import { compareWithPlainLoop } from './compare-with-plain-loop.ts';
import { columnOf, evaluateAll, firstDifference, planOf } from './evaluate-all.ts';
import { plainFigures } from './plain-loop.ts';

const mid = `wing.span: {from: 8.4 m, to: 11 m, step: 0.2 m, hold: area}
wing.taper: [0.25, 0.4, 0.6, 1.0]
wing.sweep_quarter_chord: [-5 deg, 0 deg, 12 deg]
tail.arm: [0.4 m, 0.8 m, 3.6 m, 4.4 m, 5.2 m]
tail.volume: [0.32, 0.44, 0.56]
cg: [{forward: 20 %, aft: 29 %}, {forward: 24 %, aft: 33 %}, {forward: 28 %, aft: 38 %}]`;
const required = `static_margin: {at_least: 5 %, at_most: 20 %}
hangar_door: {figure: wing_span, at_most: 10.6 m}
tail_fits: {figure: tail_span, at_least: 1.9 m, at_most: 3.2 m}
in_range: true`;

describe('the engine against the plain loop', () => {
  it('gives every figure of a mid-sized factorial alike', () => {
    const study = testStudy({ vary: mid, require: required });
    const found = compareWithPlainLoop(study);
    expect(found.rows).toBe(14 * 4 * 3 * 5 * 3 * 3);
    expect(found.worst, found.where).toBeLessThan(1e-12);
    for (const kind of [found.empty, found.flagged, found.feasible]) expect(kind).toBeGreaterThan(100);
  });

  it('writes every column of the table', () => {
    const { columns } = layOut(testStudy({ vary: mid, require: required }));
    expect(columns.map(({ figure }) => figure.name).slice(1)).toEqual([...plainFigures]);
  });
});

describe('plans that share little', () => {
  it.each([5000, 20_000])('one axis of %i values', (count) => {
    const found = compareWithPlainLoop(
      testStudy({ vary: `tail.arm: {from: 0.4 m, to: 5.4 m, count: ${count}}` }),
    );
    expect(found.rows).toBe(count);
    expect(found.worst, found.where).toBeLessThan(1e-12);
  });

  it('a long axis under a short one', () => {
    const vary = 'wing.span: [9 m, 9.4 m, 10 m]\ncg.aft: {from: 25 %, to: 40 %, count: 5001}';
    const study = testStudy({ vary });
    expect(layOut(study).plan.axes.map(({ name }) => name)).toEqual(['wing.span', 'cg.aft']);
    const found = compareWithPlainLoop(study);
    expect(found.rows).toBe(15_003);
    expect(found.worst, found.where).toBeLessThan(1e-12);
  });

  it('a long axis cut into tiles of any size gives the same', () => {
    const skip = '- {when: {cg.aft: {above: 33 %}, wing.span: {above: 9.2 m}}, because: tail heavy}';
    const vary = 'wing.span: [9 m, 9.4 m]\ncg.aft: {from: 25 %, to: 40 %, count: 777}';
    const plan = planOf(testStudy({ vary, skip }));
    const whole = evaluateAll(plan, plainFigures);
    for (const tileRows of [1, 7, 64, 776, 777, 778]) {
      expect(firstDifference(evaluateAll(plan, plainFigures, { tileRows }), whole)).toBeUndefined();
      expect(
        firstDifference(evaluateAll(plan, plainFigures, { tileRows, atOnce: 50 }), whole),
      ).toBeUndefined();
    }
  });

  it('a sampled plan: every number tied to one axis', () => {
    const count = 5000;
    const tied = `tied:
  - wing.span: {from: 8.4 m, to: 11 m, count: ${count}}
    wing.area: {from: 12.5 m^2, to: 10 m^2, count: ${count}}
    wing.taper: {from: 0.3, to: 1, count: ${count}, spacing: logarithmic}
    wing.sweep_quarter_chord: {from: 10 deg, to: -4 deg, count: ${count}}
    tail.arm: {from: 3.6 m, to: 5.2 m, count: ${count}}
    tail.volume: {from: 0.56, to: 0.32, count: ${count}, spacing: logarithmic}
    tail.aspect_ratio: {from: 3.5, to: 5.5, count: ${count}}
    mass: {from: 450 kg, to: 640 kg, count: ${count}}
    conditions[1].speed: {from: 60 kt, to: 120 kt, count: ${count}}
    cg.forward: {from: 18 %, to: 26 %, count: ${count}}
    cg.aft: {from: 28 %, to: 38 %, count: ${count}}`;
    const found = compareWithPlainLoop(testStudy({ vary: tied }));
    expect(found.rows).toBe(count);
    expect(found.worst, found.where).toBeLessThan(1e-12);
  });

  it('no axis at all: the baseline, one combination', () => {
    const study = testStudy();
    const { plan, columns } = layOut(study);
    expect(plan.combinations).toBe(1);
    const names = columns.map(({ figure }) => figure.name).slice(1);
    const evaluator = new Evaluator(plan, names);
    expect(evaluator.evaluate(0, 16_384)).toBe(1);
    const once = runOnce(buildStages(study), baselineInputs(study));
    names.forEach((name, k) => {
      expect(evaluator.columns[k][0], name).toEqual(once.get(name));
    });
  });

  it('more axes than a machine word has bits', () => {
    const body = `{stations: [${Array.from(
      { length: 40 },
      (_, k) => `{at: ${(k * 0.18).toFixed(2)} m, width: 0.8 m, depth: 0.9 m}`,
    ).join(', ')}]}`;
    const single = Array.from({ length: 38 }, (_, k) => `body.stations[${k + 1}].width: [0.8 m]`);
    const vary = [
      'wing.taper: [0.5, 0.7]',
      ...single,
      'tail.volume: [0.4, 0.5]',
      'cg.aft: [30 %, 35 %, 36 %]',
    ];
    const many = evaluateAll(planOf(testStudy({ body, vary: vary.join('\n') })), plainFigures);
    const few = vary.filter((line) => !line.includes('body'));
    expect(columnOf(many, 'neutral_point')).toHaveLength(12);
    const expected = evaluateAll(planOf(testStudy({ body, vary: few.join('\n') })), plainFigures);
    expect([...columnOf(many, 'static_margin_aft')].sort()).toEqual(
      [...columnOf(expected, 'static_margin_aft')].sort(),
    );
  });

  it('a wing of three panels gives the same in small tiles', () => {
    const wing = `{root_chord: 1.3 m, root_leading_edge: 1.75 m, section: {lift_slope: 6.1 /rad}, panels: [
      {width: 2 m, taper: 0.95, sweep_leading_edge: 1 deg, dihedral: 2 deg},
      {width: 1.6 m, taper: 0.8, sweep_quarter_chord: 3 deg, dihedral: 3 deg},
      {width: 1.2 m, taper: 0.6, sweep_leading_edge: 5 deg, dihedral: 6 deg}]}`;
    const vary = `wing.panels[3].taper: {from: 0.4, to: 0.8, step: 0.1}
wing.panels[2].width: [1.4 m, 1.6 m, 1.9 m]
wing.panels[3].dihedral: [2 deg, 6 deg]
tail.arm: {from: 4 m, to: 5 m, count: 9}`;
    const cg = replaced('cg', 'aft: 33 %', 'aft: 33 %, above_datum: 0.1 m');
    const plan = planOf(testStudy({ wing, vary, cg }));
    const figures = ['mac', 'neutral_point_height', 'neutral_point'];
    expect(
      firstDifference(evaluateAll(plan, figures, { tileRows: 5 }), evaluateAll(plan, figures)),
    ).toBeUndefined();
    expect(new Set(columnOf(evaluateAll(plan, figures), 'neutral_point')).size).toBeGreaterThan(200);
  });
});
