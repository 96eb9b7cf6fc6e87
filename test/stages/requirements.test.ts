import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { rangeLabels, reasonLabels } from '../../src/stages/out-of-range.ts';
import { requirementsStage, withOtherBand } from '../../src/stages/requirements.ts';
import type { Study } from '../../src/study/study.ts';
import { columnOf, evaluateAll, planOf } from '../engine/evaluate-all.ts';
import { replaced, testStudy } from '../studies.ts';

const verdicts = [
  'feasible',
  'fails_first',
  'fails_count',
  'fails',
  'not_computed',
  'largest_shortfall',
] as const;
type Verdict = Record<(typeof verdicts)[number], number>;

/** The verdict on each combination in order. */
function judge(study: Study): Verdict[] {
  const all = evaluateAll(planOf(study), verdicts);
  const rows = columnOf(all, 'combination').length;
  return Array.from({ length: rows }, (_, row) =>
    Object.fromEntries(verdicts.map((name) => [name, columnOf(all, name)[row]])),
  ) as Verdict[];
}

const spans = (...values: number[]) => `wing.span: [${values.map((value) => `${value} m`).join(', ')}]`;
const shape = 'door: {figure: wing_span, at_most: 10 m}';

describe('edges of requirements', () => {
  it('belong to the range, and count as kept within 1e-9', () => {
    const vary = spans(9.9, 10, 10 + 0.9e-9, 10 + 1.1e-9, 10.1);
    expect(judge(testStudy({ vary, require: shape })).map(({ feasible }) => feasible)).toEqual([
      1, 1, 1, 0, 0,
    ]);
    const least = 'long: {figure: wing_span, at_least: 10 m}';
    const below = spans(9.9, 10 - 1.1e-9, 10 - 0.9e-9, 10, 10.1);
    expect(judge(testStudy({ vary: below, require: least })).map(({ feasible }) => feasible)).toEqual([
      0, 0, 1, 1, 1,
    ]);
  });

  it('of the band count at the aft CG for the lower and at the forward CG for the upper', () => {
    const study = testStudy({ vary: spans(9.4), require: 'static_margin: {at_least: 5 %, at_most: 20 %}' });
    const all = evaluateAll(planOf(study), ['static_margin_aft', 'static_margin_forward', 'neutral_point']);
    const [aft, forward, point] = ['static_margin_aft', 'static_margin_forward', 'neutral_point'].map(
      (name) => columnOf(all, name)[0],
    );
    expect(aft).toBeCloseTo(point - 0.33, 14);
    expect(forward).toBeCloseTo(point - 0.24, 14);
    const feasible = (lower: number, upper: number) =>
      judge(
        testStudy({ vary: spans(9.4), require: `static_margin: {at_least: ${lower}, at_most: ${upper}}` }),
      )[0];
    expect(feasible(aft, forward).feasible).toBe(1);
    expect(feasible(aft + 1e-6, forward)).toMatchObject({ feasible: 0, fails_first: 0, fails: 1 });
    expect(feasible(aft, forward - 1e-6)).toMatchObject({ feasible: 0, fails_first: 1, fails: 2 });
  });

  it('may be absent: the window then has an empty end', () => {
    const window = (require: string) => {
      const all = evaluateAll(planOf(testStudy({ vary: spans(9.4), require })), [
        'cg_window_forward',
        'cg_window_aft',
      ]);
      return ['cg_window_forward', 'cg_window_aft'].map((name) => Number.isNaN(columnOf(all, name)[0]));
    };
    expect(window('static_margin: {at_least: 5 %}')).toEqual([true, false]);
    expect(window('static_margin: {at_most: 20 %}')).toEqual([false, true]);
    expect(window(shape)).toEqual([true, true]);
    expect(judge(testStudy({ vary: spans(9.4), require: '' }))[0]).toMatchObject({
      feasible: 1,
      fails_count: 0,
    });
  });
});

describe('which requirement fails first', () => {
  const edge = (label: string, figure: string, limit: number, scale: number) =>
    ({ label, figure, sign: -1, limit, scale }) as const;
  const run = (values: number[], edges: ReturnType<typeof edge>[]) => {
    const outputs = verdicts.map(() => new Float64Array(1).fill(99));
    requirementsStage(edges).kernel(
      1,
      values.map((value) => Float64Array.of(value)),
      outputs,
    );
    return Object.fromEntries(verdicts.map((name, k) => [name, outputs[k][0]])) as Verdict;
  };

  it('is the largest shortfall over its own scale', () => {
    const found = run([3, 3, 3], [edge('p', 'x', 2, 1), edge('q', 'y', 2.5, 0.1), edge('r', 'z', 1, 1)]);
    expect(found).toEqual({
      feasible: 0,
      fails_first: 1,
      fails_count: 3,
      fails: 7,
      not_computed: 0,
      largest_shortfall: 5,
    });
  });

  it('is the earlier in the file where two fall short alike', () => {
    expect(
      run([3, 3, 2], [edge('p', 'x', 4, 1), edge('q', 'y', 2, 1), edge('r', 'z', 1, 1)]).fails_first,
    ).toBe(1);
    expect(
      run([2, 3, 3], [edge('p', 'x', 1, 1), edge('q', 'y', 2, 1), edge('r', 'z', 2, 1)]).fails_first,
    ).toBe(0);
  });

  it('is none where all are kept', () => {
    expect(run([1], [edge('p', 'x', 1, 1)])).toEqual({
      feasible: 1,
      fails_first: Number.NaN,
      fails_count: 0,
      fails: 0,
      not_computed: 0,
      largest_shortfall: 0,
    });
  });

  it('is never one whose figure is empty', () => {
    const found = run([Number.NaN, 3], [edge('p', 'x', 1, 1), edge('q', 'y', 2, 1)]);
    expect(found).toMatchObject({ feasible: 0, fails_first: 1, fails_count: 1, fails: 2, not_computed: 1 });
  });

  it('through a study: labels in the order of the file', () => {
    const require = `span: {figure: wing_span, at_most: 9 m, scale: 0.1 m}
static_margin: {at_least: 22 %}
short: {figure: wing_span, at_most: 9 m, scale: 0.1 m}`;
    const study = testStudy({ vary: spans(9.4, 11), require });
    expect(layOut(study).edges.map(({ label }) => label)).toEqual([
      'span.at_most',
      'static_margin.at_least',
      'short.at_most',
    ]);
    const [near, far] = judge(study);
    expect(near).toMatchObject({ fails: 7, fails_count: 3, fails_first: 1 });
    expect(far).toMatchObject({ fails: 7, fails_count: 3, fails_first: 0 });
    expect(far.largest_shortfall).toBeCloseTo(20, 9);
  });
});

describe('a combination that cannot be worked out', () => {
  const vary = 'tail.arm: [0.5 m, 4.3 m]';
  const require = 'static_margin: {at_least: -30 %, at_most: 90 %}\ndoor: {figure: wing_span, at_most: 9 m}';
  const names = [
    'neutral_point',
    'downwash_torenbeek',
    'static_margin_aft',
    'cg_window_aft',
    'not_computed_because',
    'mac',
    'tail_area',
  ];
  const all = evaluateAll(planOf(testStudy({ vary, require })), names);

  it('has empty cells from the downwash on, and the reason', () => {
    const on = (name: string) => [...columnOf(all, name)].map(Number.isNaN);
    for (const name of ['neutral_point', 'downwash_torenbeek', 'static_margin_aft', 'cg_window_aft']) {
      expect(on(name), name).toEqual([true, false]);
    }
    for (const name of ['mac', 'tail_area']) expect(on(name), name).toEqual([false, false]);
    expect([...columnOf(all, 'not_computed_because')]).toEqual([0, Number.NaN]);
    expect(reasonLabels[0]).toContain('not behind the wing root’s trailing edge');
  });

  it('is not feasible; requirements on empty figures are not computed, others are judged', () => {
    const [onWing, behind] = judge(testStudy({ vary, require }));
    expect(onWing).toMatchObject({ feasible: 0, not_computed: 3, fails: 4, fails_count: 1, fails_first: 2 });
    expect(behind).toMatchObject({ feasible: 0, not_computed: 0, fails: 4 });
    const [alone] = judge(testStudy({ vary, require: 'static_margin: {at_least: -30 %}' }));
    expect(alone).toMatchObject({ feasible: 0, not_computed: 1, fails: 0, fails_first: Number.NaN });
  });

  it('counts the root’s trailing edge itself as on the wing', () => {
    // root trailing edge 1.75 m + c_r aft of the datum; the tail exactly there is not behind it
    const wing = replaced(
      'wing',
      'taper: 0.6, sweep_quarter_chord: 2 deg',
      'taper: 1, sweep_quarter_chord: 0 deg',
    ).replace('area: 11.4 m^2, span: 9.4 m', 'root_chord: 1 m, span: 9 m');
    const edge = evaluateAll(
      planOf(
        testStudy({
          wing,
          vary: 'tail.station: [2.75 m, 2.7500001 m]',
          tail: replaced('tail', 'arm: 4.3 m', 'station: 6 m'),
        }),
      ),
      ['not_computed_because'],
    );
    expect([...columnOf(edge, 'not_computed_because')]).toEqual([0, Number.NaN]);
  });
});

describe('formulas outside their fitted range', () => {
  const bit = (label: (typeof rangeLabels)[number]) => 2 ** rangeLabels.indexOf(label);
  const flags = (changes: Parameters<typeof testStudy>[0]) => [
    ...columnOf(evaluateAll(planOf(testStudy(changes)), ['outside_fitted_range']), 'outside_fitted_range'),
  ];

  it.each([
    [
      'wing.taper: [0.15, 0.25, 0.3]',
      '',
      [bit('wing table (wing)') + bit('downwash by Torenbeek'), bit('downwash by Torenbeek'), 0],
    ],
    [
      'wing.sweep_quarter_chord: [-4 deg, -3 deg, 10 deg, 10.1 deg]',
      '',
      [bit('downwash by Torenbeek'), 0, 0, bit('downwash by Torenbeek')],
    ],
    [
      'wing.sweep_quarter_chord: [-4 deg, 11 deg]',
      'methods: {downwash: handbook}',
      [bit('downwash by the handbook'), 0],
    ],
    [
      'wing.sweep_quarter_chord: [5 deg, 5.1 deg]',
      'methods: {lift_slope: jones}',
      [0, bit('lift slope by Jones (wing)')],
    ],
    ['tail.aspect_ratio: [3.9, 4]', '', [bit('wing table (tail)'), 0]],
    [
      'tail.sweep_quarter_chord: [5 deg, 6 deg]',
      'methods: {lift_slope: jones}',
      [0, bit('lift slope by Jones (tail)')],
    ],
    [
      'wing.sweep_quarter_chord: [40 deg, 41 deg]',
      'methods: {downwash: handbook}',
      [0, bit('wing table (wing)')],
    ],
    [
      'conditions[1].speed: [40 kt, 60 kt, 110 kt]',
      '',
      [bit('linear lift (C_L above the section’s greatest)'), 0, 0],
    ],
    ['conditions[1].speed: [420 kt, 430 kt]', '', [0, bit('lift slope at this Mach number')]],
    ['wing.taper: [0.15]', 'methods: {aerodynamic_centre: quarter_mac, downwash: handbook}', [0]],
  ])('%s %s', (vary, rest, expected) => {
    expect(flags({ vary, rest })).toEqual(expected);
  });

  it('the table is asked for the span efficiency where the CG has a height', () => {
    const rest = 'methods: {aerodynamic_centre: quarter_mac, downwash: handbook}';
    const cg = '{as: percent_mac, forward: 24 %, aft: 33 %, above_datum: 0.2 m}';
    expect(flags({ vary: 'wing.taper: [0.15, 0.2]', rest, cg })).toEqual([bit('wing table (wing)'), 0]);
  });

  it('body carry-over and quick estimate', () => {
    const wide = replaced('body', '{at: 2 m, width: 1.12 m', '{at: 2 m, width: 3 m');
    expect(flags({ body: wide })).toEqual([bit('body carry-over')]);
    const nose = replaced('wing', 'root_leading_edge: 1.75 m', 'root_leading_edge: 0.1 m');
    const quick = 'methods: {body_moment: quick_estimate}';
    expect(flags({ wing: nose, rest: quick })).toEqual([bit('quick body estimate')]);
    expect(flags({ rest: quick })).toEqual([0]);
  });

  it('reject nothing unless the study asks for it', () => {
    const vary = 'wing.taper: [0.25, 0.6]';
    const band = 'static_margin: {at_least: -50 %, at_most: 100 %}';
    expect(judge(testStudy({ vary, require: band })).map(({ feasible }) => feasible)).toEqual([1, 1]);
    const strict = judge(testStudy({ vary, require: `${band}\nin_range: true` }));
    expect(strict.map(({ feasible }) => feasible)).toEqual([0, 1]);
    expect(strict[0]).toMatchObject({ fails: 4, fails_first: 2, largest_shortfall: 1 });
    const lax = judge(testStudy({ vary, require: `${band}\nin_range: false` }));
    expect(lax.map(({ feasible }) => feasible)).toEqual([1, 1]);
  });
});

describe('another band', () => {
  it('replaces both edges and keeps the other requirements', () => {
    const { requirements } = testStudy({
      require: `${shape}\nstatic_margin: {at_least: 5 %, at_most: 20 %}`,
    });
    expect(withOtherBand(requirements, { lower: 0.08 })).toEqual([
      { name: 'static_margin.at_least', figure: 'static_margin_aft', atLeast: 0.08, scale: 0.01 },
      requirements[0],
    ]);
    expect(withOtherBand(requirements, {})).toEqual([requirements[0]]);
  });
});
