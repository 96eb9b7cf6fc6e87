import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { evaluateSlice } from '../../src/engine/slice.ts';
import { sizeOutcomes } from '../../src/figures/size-outcomes.ts';
import { digitsOf } from '../../src/plan/plan.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { baselineWorksheet } from '../../src/reports/worksheet.ts';
import { baselineInputs, buildStages } from '../../src/stages/build-stages.ts';
import { reasonLabels } from '../../src/stages/out-of-range.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import type { Study } from '../../src/study/study.ts';
import { columnOf, evaluateAll, firstDifference, planOf } from '../engine/evaluate-all.ts';
import type { StudyParts } from '../studies.ts';
import { replaced, studyText, testStudy } from '../studies.ts';
import { figure, figuresOf } from './aeroplane.ts';

const areaGiven = replaced('tail', 'volume: 0.48', 'area: 1.9 m^2');
const varied = `wing.span: {from: 8 m, to: 11 m, count: 7}
tail.arm: {from: 3.6 m, to: 5.2 m, count: 5}
cg: [{forward: 20 %, aft: 29 %}, {forward: 24 %, aft: 33 %}, {forward: 26 %, aft: 38 %}]`;

function sized(size: string, changed: StudyParts = {}): Study {
  return testStudy({ tail: areaGiven, vary: varied, rest: `size: ${size}\n`, ...changed });
}

const onMargin = '{choose: tail.area, so_that: static_margin_aft, is: 8 %, between: [0.6 m^2, 4 m^2]}';
const wanted = 0.08;

/** Every combination of a study, and its input figures. */
function combinations(study: Study, figures: readonly string[]) {
  const plan = planOf(study);
  const all = evaluateAll(plan, figures);
  return { plan, columns: (name: string) => columnOf(all, name), all };
}

describe('a number chosen in each combination', () => {
  it('brings the figure to its value in every solved one', () => {
    const { columns, plan } = combinations(sized(onMargin), [
      'static_margin_aft',
      'tail_area',
      'size_outcome',
    ]);
    expect(plan.combinations).toBe(7 * 5 * 3);
    expect(new Set(columns('size_outcome'))).toEqual(new Set([0]));
    for (const margin of columns('static_margin_aft')) {
      expect(Math.abs(margin - wanted)).toBeLessThanOrEqual(1e-9);
    }
    expect(new Set(columns('tail_area')).size).toBe(plan.combinations);
  });

  it('gives that value in the same study without sizing', () => {
    const study = sized(onMargin);
    const { size: _, ...plain } = study;
    const stages = buildStages(plain);
    const { plan, columns } = combinations(study, ['tail_area', 'static_margin_aft', 'neutral_point']);
    for (const row of [0, 17, 50, 104]) {
      const inputs = new Map(plan.fixed).set('tail_area', columns('tail_area')[row]);
      digitsOf(plan, columns('combination')[row]).forEach((digit, position) => {
        const { figures, values } = plan.axes[position];
        figures.forEach((name, k) => {
          inputs.set(name, values[k][digit]);
        });
      });
      const alone = runOnce(stages, inputs);
      expect(figure(alone, 'static_margin_aft')).toBe(columns('static_margin_aft')[row]);
      expect(figure(alone, 'neutral_point')).toBe(columns('neutral_point')[row]);
    }
  });

  it('lies where a fine scan sees the figure pass its value', () => {
    const study = sized(onMargin, { vary: '' });
    const chosen = figure(figuresOf(study), 'tail_area');
    const points = 4001;
    const areas = Float64Array.from({ length: points }, (_, i) => 0.6 + (3.4 * i) / (points - 1));
    const axis = { name: 'tail.area', paths: ['tail.area'], values: [areas] };
    const margins = evaluateSlice(study, buildStages(study), [axis], ['static_margin_aft']).get(
      'static_margin_aft',
    );
    const passes = [...areas.keys()].filter(
      (i) => i > 0 && (margins![i] - wanted) * (margins![i - 1] - wanted) <= 0,
    );
    expect(passes).toHaveLength(1);
    expect(chosen).toBeGreaterThanOrEqual(areas[passes[0] - 1]);
    expect(chosen).toBeLessThanOrEqual(areas[passes[0]]);
  });

  it('is empty with the reason in the row where nothing reaches the value', () => {
    const short = onMargin.replace('0.6 m^2, 4 m^2', '0.6 m^2, 1.7 m^2');
    const { columns } = combinations(sized(short), [
      'tail_area',
      'size_outcome',
      'static_margin_aft',
      'not_computed_because',
      'feasible',
      'fails',
    ]);
    const outcome = columns('size_outcome');
    expect(new Set(outcome)).toEqual(new Set([0, 1]));
    outcome.forEach((index, row) => {
      const reason = reasonLabels[columns('not_computed_because')[row]];
      if (index === 0) {
        expect(columns('tail_area')[row]).toBeLessThanOrEqual(1.7);
        expect(reason).toBeUndefined();
        return;
      }
      expect(columns('tail_area')[row]).toBeNaN();
      expect(columns('static_margin_aft')[row]).toBeNaN();
      expect(reason).toBe('sizing: no solution between the ends');
      expect(columns('feasible')[row]).toBe(0);
      expect(columns('fails')[row] % 2).toBe(1);
    });
  });

  it('is not guessed where several reach the value', () => {
    const efficiency = sized('{choose: wing.taper, so_that: span_efficiency, is: 0.985, between: [0.1, 1]}', {
      vary: '',
      wing: replaced('wing', 'sweep_quarter_chord: 2 deg', 'sweep_quarter_chord: 0 deg'),
    });
    const all = figuresOf(efficiency);
    expect(sizeOutcomes[figure(all, 'size_outcome')]).toBe('several solutions; none taken');
    expect(figure(all, 'wing_taper')).toBeNaN();
    expect(reasonLabels[figure(all, 'not_computed_because')]).toBe('sizing: several solutions; none taken');
  });

  it('says so where the number has no effect', () => {
    const study = sized('{choose: tail.area, so_that: wing_aspect_ratio, is: 8, between: [1 m^2, 2 m^2]}');
    const all = figuresOf(study);
    expect(sizeOutcomes[figure(all, 'size_outcome')]).toBe('the chosen number has no effect on the figure');
  });

  it('is never feasible unsolved, whatever is required', () => {
    const study = sized('{choose: tail.area, so_that: tail_volume, is: 3, between: [1 m^2, 2 m^2]}', {
      require: 'span: {figure: wing_span, at_most: 20 m}',
    });
    const { edges, figures } = layOut(study);
    expect(edges.map(({ label }) => label)).toEqual(['size', 'span.at_most']);
    const all = figuresOf(study);
    expect(figure(all, 'feasible')).toBe(0);
    expect(figures.get('fails_first')?.labels?.[figure(all, 'fails_first')]).toBe('size');
    expect(figure(all, 'largest_shortfall')).toBe(1);
  });
});

describe('the stages of a sized study', () => {
  const figures = ['tail_area', 'size_outcome', 'neutral_point', 'static_margin_forward', 'feasible'];

  it('share the chosen number where the figure does not depend on the CG', () => {
    const study = sized('{choose: tail.area, so_that: neutral_point, is: 45 %, between: [0.6 m^2, 4 m^2]}');
    const plan = planOf(study);
    const cg = plan.axes.findIndex(({ name }) => name === 'cg');
    expect(plan.axesOfFigure.get('tail_area')?.has(cg)).toBe(false);
    expect(planOf(sized(onMargin)).axesOfFigure.get('tail_area')?.has(cg)).toBe(true);
    for (const point of columnOf(evaluateAll(plan, ['neutral_point']), 'neutral_point')) {
      expect(Math.abs(point - 0.45)).toBeLessThanOrEqual(1e-9);
    }
  });

  it('give the same doubles in any tiles and calls', () => {
    const study = sized(onMargin, { skip: '- when: {wing.span: {above: 10.4 m}}\n  because: too wide' });
    const plan = planOf(study);
    const whole = evaluateAll(plan, figures);
    for (const how of [{ tileRows: 1 }, { tileRows: 9 }, { atOnce: 7 }, { tileRows: 40, atOnce: 13 }]) {
      expect(firstDifference(whole, evaluateAll(plan, figures, how))).toBeUndefined();
    }
  });

  it('give the doubles of one combination worked alone', () => {
    const study = sized(onMargin);
    const plan = planOf(study);
    const whole = evaluateAll(plan, ['tail_area']);
    const inputs = new Map(plan.fixed);
    for (const axis of plan.axes) {
      axis.figures.forEach((name, k) => {
        inputs.set(name, axis.values[k][0]);
      });
    }
    expect(figure(runOnce(plan.stages, inputs), 'tail_area')).toBe(columnOf(whole, 'tail_area')[0]);
  });

  it('hold in several conditions: the one that governs is at the value', () => {
    const study = sized(onMargin.replace('4 m^2', '9 m^2'), {
      conditions: '[{name: cruise, speed: 110 kt, height: 1500 m}, {name: slow, speed: 62 kt, height: 0 m}]',
      cg: '{as: percent_mac, forward: 24 %, aft: 33 %, above_datum: 0.1 m}',
    });
    const { columns } = combinations(study, [
      'static_margin_aft',
      'static_margin_aft_cruise',
      'static_margin_aft_slow',
    ]);
    columns('static_margin_aft').forEach((margin, row) => {
      expect(Math.abs(margin - wanted)).toBeLessThanOrEqual(1e-9);
      const each = [columns('static_margin_aft_cruise')[row], columns('static_margin_aft_slow')[row]];
      expect(Math.min(...each)).toBe(margin);
      expect(each[0]).not.toBe(each[1]);
    });
  });

  it('choose the wing’s place with the tail and the masses where they are', () => {
    const text = `empty: {mass: 420 kg, station: 2.06 m}
items: {spar: {mass: 70 kg, carried_by: wing, at: 40 %}, pilot: {mass: 82 kg, station: 2.2 m}}
cases: {solo: [pilot]}`.replaceAll(/^/gm, '    ');
    const parts = {
      tail: replaced('tail', 'volume: 0.48, arm: 4.3 m', 'area: 1.9 m^2, station: 6.5 m'),
      rest: 'size: {choose: wing.root_leading_edge, so_that: static_margin_aft, is: 11 %, between: [1.3 m, 2.2 m]}\n',
      cg: '',
    };
    const study = readStudyText(
      studyText(parts).replace(/^ {2}cg: $/m, `  loading:\n${text}`),
      'loaded.yaml',
    );
    const all = figuresOf(study);
    expect(figure(all, 'static_margin_aft')).toBeCloseTo(0.11, 9);
    expect(figure(all, 'tail_station')).toBe(6.5);
    expect(figure(all, 'mac_leading_edge')).toBeGreaterThan(figure(all, 'wing_root_leading_edge'));
  });

  it('take the number from the file no longer', () => {
    const study = sized(onMargin);
    expect(baselineInputs(study).has('tail_area')).toBe(false);
    expect(planOf(study).fixed.has('tail_area')).toBe(false);
    const { figures: known, columns } = layOut(study);
    expect(known.get('tail_area')?.formula).toBe('S_t so that K_aft = 8.00 % MAC');
    expect(columns.map(({ name }) => name)).toEqual(
      expect.arrayContaining(['tail_area_m2', 'size_outcome', 'tail_volume']),
    );
  });

  it('take it from a worksheet that replaces it', () => {
    const study = sized(onMargin);
    const laidOut = layOut(study);
    const sheet = (set: [string, number][]) => baselineWorksheet(study, laidOut, new Map(set));
    const area = (set: [string, number][]) => {
      const { given, workedOut } = sheet(set);
      return [given, workedOut].map((rows) => rows.find(({ name }) => name === 'tail_area')?.value);
    };
    expect(area([['tail_area', 2.25]])).toEqual(['2.25', undefined]);
    const [given, workedOut] = area([]);
    expect(given).toBeUndefined();
    expect(Number(workedOut)).toBeCloseTo(figure(figuresOf(study), 'tail_area'), 5);
  });
});

it('a number chosen in each combination is not told as held', () => {
  const { held } = sized(onMargin);
  const span = held.find((one) => one.varied === 'wing.span');
  expect(span?.held).toContain('tail.area (chosen in each combination)');
});
