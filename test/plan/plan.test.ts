import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { axesOfStages } from '../../src/plan/dependencies.ts';
import { odometerCost, orderAxes } from '../../src/plan/order-axes.ts';
import type { Plan } from '../../src/plan/plan.ts';
import { blockCount, blockSize, combinationAt, digitsOf, makePlan, partsOf } from '../../src/plan/plan.ts';
import type { Stage } from '../../src/stages/stage.ts';
import { testStudy } from '../studies.ts';

function stage(name: string, reads: string[], writes: (string | null)[], cost = 1): Stage {
  return { name, reads, writes, cost, kernel: () => {} };
}

/** A plan of the given axis sizes, one number an axis, with the given stages. */
function planWith(sizes: readonly number[], stages: readonly Stage[] = []): Plan {
  const axes = sizes.map((size, k) => ({
    name: `x${k}`,
    paths: [`x${k}`],
    values: [Float64Array.from({ length: size }, (_, i) => i)],
  }));
  const inputs = new Map(axes.map(({ name }) => [name, 0]));
  return makePlan({ axes, inputs: inputs.set('fixed', 7) }, stages, (path) => path);
}

describe('order of the axes', () => {
  it('lets the axis of the costly stage change slowest', () => {
    const plan = planWith([5, 5], [stage('cheap', ['x0'], ['p'], 1), stage('costly', ['x1'], ['q'], 100)]);
    expect(plan.axes.map(({ name }) => name)).toEqual(['x1', 'x0']);
    expect(plan.authorOrder).toEqual([1, 0]);
  });

  it('keeps the order of the author where nothing is won', () => {
    expect(orderAxes([4, 4, 4], [])).toEqual([0, 1, 2]);
    expect(orderAxes([4, 4, 4], [{ axes: new Set([0, 1, 2]), cost: 9 }])).toEqual([0, 1, 2]);
    expect(orderAxes([2, 2, 2, 2, 2, 2, 2, 2], [{ axes: new Set([0, 1, 2, 3]), cost: 9 }])).toEqual([
      0, 1, 2, 3, 4, 5, 6, 7,
    ]);
  });

  it('puts costly axes first among more axes than are tried out', () => {
    const sizes = new Array<number>(9).fill(2);
    const stages = [
      { axes: new Set([8]), cost: 50 },
      { axes: new Set([3]), cost: 20 },
      { axes: new Set([3, 5]), cost: 7 },
    ];
    expect(orderAxes(sizes, stages)).toEqual([8, 3, 5, 0, 1, 2, 4, 6, 7]);
  });

  it('costs no more than any other order', () => {
    const stages = fc.array(
      fc.record({
        axes: fc.uniqueArray(fc.integer({ min: 0, max: 3 })).map((list) => new Set(list)),
        cost: fc.integer({ min: 1, max: 500 }),
      }),
      { maxLength: 6 },
    );
    const sizes = fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 4, maxLength: 4 });
    const order = fc.shuffledSubarray([0, 1, 2, 3], { minLength: 4 });
    fc.assert(
      fc.property(sizes, stages, order, (lengths, costed, other) => {
        const best = odometerCost(orderAxes(lengths, costed), lengths, costed);
        expect(best).toBeLessThanOrEqual(odometerCost(other, lengths, costed) * (1 + 1e-9));
      }),
      { seed: 5 },
    );
  });

  it('leaves the columns of the table in the order of the author', () => {
    const study = testStudy({
      vary: 'tail.volume: [0.4, 0.5]\nwing.taper: [0.5, 0.6]\ncg: [{aft: 30 %, forward: 20 %}]',
    });
    const { plan, columns } = layOut(study);
    expect(plan.axes[0].name).toBe('wing.taper');
    expect(columns.slice(0, 5).map(({ figure }) => figure.name)).toEqual([
      'combination',
      'tail_volume',
      'wing_taper',
      'cg_aft',
      'cg_forward',
    ]);
  });
});

describe('numbers of combinations', () => {
  const sizes = fc.array(fc.integer({ min: 1, max: 12 }), { maxLength: 6 });

  it('decode to digits and back', () => {
    fc.assert(
      fc.property(sizes, fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true }), (lengths, share) => {
        const plan = planWith(lengths);
        const combination = Math.floor(share * plan.combinations);
        const digits = digitsOf(plan, combination);
        expect(digits.every((digit, k) => digit >= 0 && digit < plan.axes[k].size)).toBe(true);
        expect(combinationAt(plan, digits)).toBe(combination);
      }),
      { seed: 6 },
    );
  });

  it('run through the last axis first', () => {
    const plan = planWith([2, 3]);
    const all = Array.from({ length: plan.combinations }, (_, k) => digitsOf(plan, k).join(''));
    expect(all).toEqual(['00', '01', '02', '10', '11', '12']);
  });

  it('are one without axes', () => {
    expect(planWith([]).combinations).toBe(1);
    expect(digitsOf(planWith([]), 0)).toEqual([]);
  });
});

describe('parts', () => {
  it('cover every block once, in order', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 40 * blockSize }),
        fc.integer({ min: 1, max: 50 }),
        (size, most) => {
          const plan = planWith([size]);
          const parts = partsOf(plan, most);
          const blocks = parts.flatMap(({ firstBlock, blocks }) =>
            Array.from({ length: blocks }, (_, k) => firstBlock + k),
          );
          expect(blocks).toEqual([...Array(Math.ceil(size / blockSize)).keys()]);
          expect(blocks).toHaveLength(blockCount(plan));
          expect(parts.map(({ number }) => number)).toEqual([...parts.keys()]);
          expect(parts.every((part) => part.blocks >= 1 && part.blocks <= most)).toBe(true);
        },
      ),
      { seed: 7, numRuns: 50 },
    );
  });
});

describe('what depends on what', () => {
  const axis = new Map([
    ['x', 0],
    ['y', 1],
  ]);
  const inputs = new Set(['x', 'y', 'fixed']);

  it('is followed through the stages', () => {
    const stages = [
      stage('p', ['x'], ['p']),
      stage('q', ['p', 'y', 'fixed'], ['q']),
      stage('r', ['fixed'], ['r']),
    ];
    const { ofStage, ofFigure } = axesOfStages(stages, inputs, axis);
    expect(ofStage.map((axes) => [...axes].sort())).toEqual([[0], [0, 1], []]);
    expect([...(ofFigure.get('q') ?? [])].sort()).toEqual([0, 1]);
  });

  it('refuses a figure that two stages write', () => {
    const stages = [stage('p', ['x'], ['p']), stage('again', ['y'], ['p'])];
    expect(() => axesOfStages(stages, inputs, axis)).toThrow('stage again writes p a second time');
  });

  it('refuses a stage that writes an input', () => {
    expect(() => axesOfStages([stage('p', ['y'], ['x'])], inputs, axis)).toThrow('writes x a second time');
  });

  it('refuses a figure that nothing wrote, or that is written only later', () => {
    const early = [stage('early', ['p'], ['q']), stage('late', ['x'], ['p'])];
    expect(() => axesOfStages(early, inputs, axis)).toThrow('stage early reads p, which nothing wrote');
  });

  it('lets a dropped output be written twice', () => {
    const stages = [stage('p', ['x'], [null]), stage('q', ['y'], [null])];
    expect(axesOfStages(stages, inputs, axis).ofFigure.size).toBe(3);
  });
});
