import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { combinationFigure, Evaluator } from '../../src/engine/evaluator.ts';
import { figureOfInput } from '../../src/figures/study-figures.ts';
import { makePlan } from '../../src/plan/plan.ts';
import { buildStages } from '../../src/stages/build-stages.ts';
import { testStudy } from '../studies.ts';
import { columnOf, evaluateAll, firstDifference, planOf, rowsByValues } from './evaluate-all.ts';
import { plainFigures } from './plain-loop.ts';

const vary = `wing.span: {from: 8.4 m, to: 11 m, count: 7, hold: area}
wing.taper: [0.4, 0.6, 1.0]
wing.sweep_quarter_chord: [-5 deg, 8 deg]
tail.arm: [0.4 m, 3.6 m, 4.4 m, 5.2 m, 5.6 m]
tail.volume: {from: 0.3, to: 0.6, count: 11}
cg: [{forward: 20 %, aft: 29 %}, {forward: 28 %, aft: 38 %}]`;
const skip = `- when: {wing.taper: {above: 0.9}, wing.sweep_quarter_chord: {above: 7 deg}}
  because: tips
- when: {tail.volume: {below: 0.4}, tail.arm: {below: 4 m}}
  because: too little tail
- when: {tail.volume: 0.45, cg.forward: {equal: 28 %}}
  because: one value`;

describe('tiles do not show in the results', () => {
  for (const [what, skips] of [
    ['a plan without skips', ''],
    ['a plan with skips', skip],
  ]) {
    const plan = planOf(testStudy({ vary, skip: skips }));
    const whole = evaluateAll(plan, plainFigures);

    it.each([1, 7, 64, 2048, 4096])(`${what}: the same in tiles of %i rows`, (tileRows) => {
      expect(firstDifference(evaluateAll(plan, plainFigures, { tileRows }), whole)).toBeUndefined();
    });

    it(`${what}: the same whatever range is asked for`, () => {
      const numbers = columnOf(whole, combinationFigure);
      const evaluators = [7, 64, 2048].map(
        (tileRows) => new Evaluator(plan, [combinationFigure, ...plainFigures], tileRows),
      );
      const range = fc.tuple(
        fc.integer({ min: 0, max: plan.combinations - 1 }),
        fc.integer({ min: 1, max: 700 }),
        fc.constantFrom(...evaluators),
      );
      fc.assert(
        fc.property(range, ([first, count, evaluator]) => {
          const kept = evaluator.evaluate(first, count);
          const end = Math.min(first + count, plan.combinations);
          const from = numbers.findIndex((number) => number >= first);
          const expected = numbers.filter((number) => number >= first && number < end);
          expect([...evaluator.columns[0].subarray(0, kept)]).toEqual([...expected]);
          plainFigures.forEach((name, k) => {
            const wanted = columnOf(whole, name).subarray(from, from + kept);
            const row = wanted.findIndex((value, n) => !Object.is(value, evaluator.columns[k + 1][n]));
            expect(row, name).toBe(-1);
          });
        }),
        { seed: 20, numRuns: 120 },
      );
    });
  }

  it('a plan evaluated backwards gives the same', () => {
    const plan = planOf(testStudy({ vary, skip }));
    const whole = columnOf(evaluateAll(plan, ['static_margin_aft']), 'static_margin_aft');
    const evaluator = new Evaluator(plan, ['static_margin_aft']);
    const pieces: number[][] = [];
    const atOnce = 97;
    for (let first = atOnce * Math.floor((plan.combinations - 1) / atOnce); first >= 0; first -= atOnce) {
      const kept = evaluator.evaluate(first, atOnce);
      pieces.unshift([...evaluator.columns[0].subarray(0, kept)]);
    }
    expect(pieces.flat()).toEqual([...whole]);
  });
});

describe('the order of axes does not show in the results', () => {
  const study = testStudy({ vary, skip });
  const plan = planOf(study);
  const expected = rowsByValues(study, plan, evaluateAll(plan, plainFigures));

  it('for any order of the plan', () => {
    const orders = new Set<string>();
    const shuffled = fc.shuffledSubarray([...study.axes], { minLength: study.axes.length });
    // where no stage costs anything the plan keeps the order of the file
    const costless = buildStages(study).map((stage) => ({ ...stage, cost: 0 }));
    fc.assert(
      fc.property(shuffled, (axes) => {
        const other = makePlan({ ...study, axes }, costless, figureOfInput(study));
        orders.add(other.axes.map(({ name }) => name).join());
        const rows = rowsByValues(study, other, evaluateAll(other, plainFigures));
        expect(rows.size).toBe(expected.size);
        for (const [key, values] of rows) {
          const same = expected.get(key)?.every((value, k) => Object.is(value, values[k]));
          if (same !== true) throw new Error(`${key} differs`);
        }
      }),
      { seed: 3, numRuns: 12 },
    );
    expect(orders.size).toBe(12);
  });
});

describe('skips', () => {
  const study = testStudy({ vary, skip });
  const plan = planOf(study);
  const kept = evaluateAll(plan, plainFigures);
  const all = evaluateAll(planOf(testStudy({ vary })), plainFigures);
  const skipped = (row: number) => {
    const value = (name: string) => columnOf(all, name)[row];
    const degree = Math.PI / 180;
    return (
      (value('wing_taper') > 0.9 && value('wing_sweep_quarter_chord') > 7 * degree) ||
      (value('tail_volume') < 0.4 && value('tail_arm') < 4) ||
      (Math.abs(value('tail_volume') - 0.45) < 1e-9 && Math.abs(value('cg_forward') - 0.28) < 1e-9)
    );
  };

  it('drop what a rule names, keep numbers and values of the rest', () => {
    const rows = [...columnOf(all, combinationFigure).keys()].filter((row) => !skipped(row));
    expect(rows.length).toBeLessThan(0.8 * plan.combinations);
    expect(rows.length).toBeGreaterThan(0.3 * plan.combinations);
    for (const [name, column] of kept) {
      expect(
        [...column].every((value, k) => Object.is(value, columnOf(all, name)[rows[k]])),
        name,
      ).toBe(true);
      expect(column.length).toBe(rows.length);
    }
  });

  it('may drop everything', () => {
    const rule = '- {when: {wing.span: {above: 1 m}}, because: all of it}';
    const nothing = planOf(testStudy({ vary, skip: rule }));
    expect(columnOf(evaluateAll(nothing, ['neutral_point']), 'neutral_point')).toHaveLength(0);
  });

  it('may drop everything of a study of one combination', () => {
    const one = planOf(
      testStudy({ vary: 'wing.taper: [0.6]', skip: '- {when: {wing.taper: 0.6}, because: no}' }),
    );
    expect(new Evaluator(one, ['neutral_point']).evaluate(0, 1)).toBe(0);
  });
});
