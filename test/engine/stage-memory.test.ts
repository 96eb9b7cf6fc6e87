import { describe, expect, it } from 'vitest';
import { Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { tileShape } from '../../src/engine/tile.ts';
import type { Plan } from '../../src/plan/plan.ts';
import { blockCount, blockSize, digitsOf } from '../../src/plan/plan.ts';
import { readStudyFile } from '../../src/read-study-file.ts';
import type { SkipTest, Study } from '../../src/study/study.ts';
import { testStudy } from '../studies.ts';
import { compareWithPlainLoop } from './compare-with-plain-loop.ts';

interface Counted {
  readonly plan: Plan;
  /** Stages that lead to a column of the table. */
  readonly leads: ReadonlySet<number>;
  /** Kernel calls and rows of each stage. */
  readonly calls: number[];
  readonly rows: number[];
}

/** The plan of a study with counters around its kernels. */
function counted(study: Study): Counted & { evaluate: () => number } {
  const { plan, columns } = layOut(study);
  const calls = plan.stages.map(() => 0);
  const rows = plan.stages.map(() => 0);
  const stages = plan.stages.map((stage, index) => ({
    ...stage,
    kernel: (count: number, inputs: readonly Float64Array[], outputs: readonly Float64Array[]) => {
      calls[index]++;
      rows[index] += count;
      stage.kernel(count, inputs, outputs);
    },
  }));
  const evaluator = new Evaluator(
    { ...plan, stages },
    columns.map(({ figure }) => figure.name),
  );
  const evaluate = () => {
    let kept = 0;
    for (let block = 0; block < blockCount(plan); block++)
      kept += evaluator.evaluate(block * blockSize, blockSize);
    return kept;
  };
  const leads = leadToTable(
    plan,
    columns.map(({ figure }) => figure.name),
  );
  return { plan, leads, calls, rows, evaluate };
}

/**
 * Stages that lead to a column of the table, found by walking forward: from each stage along the figures
 * that it writes.
 */
function leadToTable(plan: Plan, columns: readonly string[]): Set<number> {
  const leads = (k: number): boolean =>
    plan.stages[k].writes.some(
      (figure) =>
        figure !== null &&
        (columns.includes(figure) ||
          plan.stages.some((stage, j) => j > k && stage.reads.includes(figure) && leads(j))),
    );
  return new Set(plan.stages.flatMap((_, k) => (leads(k) ? [k] : [])));
}

function settings(plan: Plan, stage: number): number {
  return plan.axes.reduce(
    (product, { size }, axis) => (plan.axesOfStage[stage].has(axis) ? product * size : product),
    1,
  );
}

/** Whether a test of a skip rule holds; tests of the tourer are open to one side. */
function holds({ path, below, above }: SkipTest, plan: Plan, digits: readonly number[]): boolean {
  const axis = plan.axes.findIndex(({ name }) => name === path);
  const value = plan.axes[axis].values[0][digits[axis]];
  return (below === undefined || value < below) && (above === undefined || value > above);
}

const isPerRow = (plan: Plan, stage: number) => plan.axesOfStage[stage].size === plan.axes.length;

/** Settings of a stage's own axes that occur in a tile of which at least one row is kept. */
function neededSettings(plan: Plan, stage: number, keeps: (digits: readonly number[]) => boolean): number {
  const { suffixStart, suffixTotal } = tileShape(plan);
  const seen = new Set<number>();
  for (let first = 0; first < plan.combinations; first += suffixTotal) {
    const kept = Array.from({ length: suffixTotal }, (_, row) => digitsOf(plan, first + row)).some(keeps);
    if (!kept) continue;
    const digits = digitsOf(plan, first);
    seen.add(
      digits.reduce(
        (key, digit, axis) =>
          axis < suffixStart && plan.axesOfStage[stage].has(axis) ? key * plan.axes[axis].size + digit : key,
        0,
      ),
    );
  }
  const inTile = plan.axes.reduce(
    (product, { size }, axis) =>
      axis >= suffixStart && plan.axesOfStage[stage].has(axis) ? product * size : product,
    1,
  );
  return seen.size * inTile;
}

describe('each stage only as often as it must', () => {
  it('on the tourer without skips: once for each setting of its own axes', () => {
    const { plan, leads, rows, evaluate } = counted({ ...readStudyFile('test/plain-tourer.yaml'), skip: [] });
    expect(evaluate()).toBe(plan.combinations);
    plan.stages.forEach((stage, k) => {
      expect(rows[k], stage.name).toBe(leads.has(k) ? settings(plan, k) : 0);
    });
    const of = (name: string) =>
      settings(
        plan,
        plan.stages.findIndex((stage) => stage.name === name),
      );
    expect(of('condition')).toBe(1);
    expect(of('tail lift slope')).toBe(1);
    expect(of('body ahead of the wing')).toBeLessThan(plan.combinations / 1000);
    expect(of('requirements')).toBe(plan.combinations);
  });

  it('on the tourer with its skips: not at all for what is wholly left out', () => {
    const study = readStudyFile('test/plain-tourer.yaml');
    const { plan, leads, rows, evaluate } = counted(study);
    const kept = evaluate();
    const keeps = (digits: readonly number[]) =>
      !study.skip.some(({ tests }) => tests.every((test) => holds(test, plan, digits)));
    expect(kept).toBeLessThan(plan.combinations);
    plan.stages.forEach((stage, k) => {
      if (stage.name === 'skip') return;
      const expected = isPerRow(plan, k) ? kept : neededSettings(plan, k, keeps);
      expect(rows[k], stage.name).toBe(leads.has(k) ? expected : 0);
    });
    const planform = plan.stages.findIndex((stage) => stage.name === 'wing planform');
    expect(rows[planform]).toBeLessThan(settings(plan, planform));
  });

  it('nothing is evaluated when everything is skipped', () => {
    const rule = '- {when: {wing.span: {above: 1 m}}, because: all of it}';
    const { plan, calls, evaluate } = counted(
      testStudy({ vary: 'wing.span: [9 m, 10 m]\ntail.volume: [0.4, 0.5]', skip: rule }),
    );
    expect(evaluate()).toBe(0);
    plan.stages.forEach(({ name }, k) => {
      expect(calls[k] > 0, name).toBe(name === 'skip');
    });
  });
});

describe('bounded memory', () => {
  const vary = `wing.span: {from: 8.4 m, to: 11 m, count: 40, hold: area}
wing.taper: {from: 0.4, to: 1, count: 9}
tail.arm: {from: 3.6 m, to: 5.2 m, count: 20}
tail.volume: {from: 0.32, to: 0.56, count: 30}
cg: [{forward: 20 %, aft: 29 %}, {forward: 28 %, aft: 38 %}]`;
  const study = testStudy({ vary });

  it('does not hold all of a stage with very many settings', () => {
    const { plan, rows, evaluate } = counted(study);
    const stage = plan.stages.findIndex(({ name }) => name === 'steps of the neutral point');
    const bytes = 8 * 5 * settings(plan, stage);
    expect(bytes).toBeGreaterThan(2 * 4 * 1024 * 1024);
    evaluate();
    const once = rows[stage];
    evaluate();
    expect(rows[stage]).toBeGreaterThan(once);
  });

  it('holds nothing of settings that never come round again', () => {
    const { plan, rows, evaluate } = counted(study);
    const planform = plan.stages.findIndex(({ name }) => name === 'wing planform');
    expect([...plan.axesOfStage[planform]].sort()).toEqual([0, 1]);
    evaluate();
    expect(rows[planform]).toBe(settings(plan, planform));
    // Going through once more, each is worked out once more: only the last one was held.
    evaluate();
    expect(rows[planform]).toBe(2 * settings(plan, planform));
  });

  it('gives right answers after what was remembered had to go', () => {
    const blocks = [20, 3, 20, 0, 25, 3, 0, 12];
    const found = compareWithPlainLoop(study, blocks);
    expect(found.rows).toBe(blocks.length * blockSize);
    expect(found.worst, found.where).toBeLessThan(1e-12);
  });

  it('forgets the setting whose place a stage that threw has taken', () => {
    const volumes = 1500;
    const { plan } = layOut(
      testStudy({
        vary: `wing.span: {from: 8 m, to: 12 m, count: 120}
wing.taper: {from: 0.3, to: 1, count: 400}
tail.volume: {from: 0.3, to: 0.6, count: ${volumes}}`,
      }),
    );
    const planform = plan.stages.findIndex(({ name }) => name === 'wing planform');
    const slots = Math.floor((4 * 1024 * 1024) / (8 * plan.stages[planform].writes.length));
    expect(slots).toBeLessThan(settings(plan, planform));
    expect(plan.axes[2].name).toBe('tail.volume');
    let throws = false;
    const stages = plan.stages.map((stage) => ({
      ...stage,
      kernel: (count: number, inputs: readonly Float64Array[], outputs: readonly Float64Array[]) => {
        stage.kernel(count, inputs, outputs);
        if (throws && stage.name === 'wing planform') throw new Error('as asked');
      },
    }));
    const evaluator = new Evaluator({ ...plan, stages }, ['mac']);
    const macAt = (setting: number) => {
      evaluator.evaluate(setting * volumes, 1);
      return evaluator.columns[0][0];
    };
    const before = macAt(0);
    throws = true;
    expect(() => macAt(slots)).toThrow('as asked');
    throws = false;
    expect(macAt(0)).toBe(before);
    expect(macAt(slots)).not.toBe(before);
  });
});
