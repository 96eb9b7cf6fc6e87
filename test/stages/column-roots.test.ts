import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sizeOutcomes } from '../../src/figures/size-outcomes.ts';
import { findRoot } from '../../src/methods/find-root.ts';
import { ColumnRoots } from '../../src/stages/column-roots.ts';
import type { Stage } from '../../src/stages/stage.ts';
import { chainRows, StageChain, stagesDependingOn, stagesLeadingTo } from '../../src/stages/stage-chain.ts';

type Curve = (x: number, row: number) => number;

/** Roots of a function of the number tried and of one figure from outside, in rows 0 … count−1. */
function solve(curve: Curve, from: number, to: number, count = 1, value = 0) {
  const stage: Stage = {
    name: 'curve',
    reads: ['row', 'x'],
    writes: ['y'],
    cost: 1,
    kernel: (rows, [row, x], [y]) => {
      for (let k = 0; k < rows; k++) y[k] = curve(x[k], row[k]);
    },
  };
  const chain = new StageChain([stage], 'x', 'y');
  const rows = Float64Array.from({ length: count }, (_, row) => row);
  const [chosen, outcome] = [new Float64Array(count), new Float64Array(count)];
  new ColumnRoots(chain, value, from, to).solve(count, [rows], chosen, outcome);
  return {
    chosen: [...chosen],
    outcomes: [...outcome].map((index) => sizeOutcomes[index]),
  };
}

const [solved, none, several, noEffect, partly] = sizeOutcomes;

describe('roots of whole columns', () => {
  it('are found in every row, more rows than are taken at a time', () => {
    const count = 3 * chainRows + 17;
    const { chosen, outcomes } = solve((x, row) => Math.exp(x) - 1 - row / 100, -1, 3, count, 0.5);
    expect(new Set(outcomes)).toEqual(new Set([solved]));
    chosen.forEach((x, row) => {
      expect(x).toBeCloseTo(Math.log(1.5 + row / 100), 8);
    });
  });

  it('may lie at an end or at a place of the grid', () => {
    for (const root of [2, 6, 3, 4.5]) {
      const { chosen, outcomes } = solve((x) => x - root, 2, 6);
      expect(outcomes).toEqual([solved]);
      expect(chosen[0]).toBeCloseTo(root, 9);
    }
  });

  it('are none where the value is not reached', () => {
    expect(solve((x) => x * x + 1, -3, 2)).toEqual({ chosen: [Number.NaN], outcomes: [none] });
    expect(solve((x) => x - 6.001, 2, 6).outcomes).toEqual([none]);
  });

  it('are several where the value is reached more than once', () => {
    expect(solve((x) => (x + 2) * x * (x - 2.2), -3, 3)).toEqual({
      chosen: [Number.NaN],
      outcomes: [several],
    });
    expect(solve(Math.sin, 1, 20).outcomes).toEqual([several]);
  });

  it('are several where both lie between two places of the grid', () => {
    const { outcomes } = solve((x) => (x - 0.44) * (x - 0.47), 0, 1);
    expect(outcomes).toEqual([several]);
  });

  it('are three where two hide beside one', () => {
    const { outcomes } = solve((x) => (x - 0.44) * (x - 0.47) * (x + 0.9), -1, 1);
    expect(outcomes).toEqual([several]);
  });

  it('are not taken where the value is jumped over', () => {
    expect(solve((x) => (x < 0.4 ? -1 : 1), 0, 1).outcomes).toEqual([none]);
    expect(solve((x) => 1 / (x - 0.37), 0, 1).outcomes).toEqual([none]);
  });

  it('count beside a pole, which is none itself', () => {
    const { chosen, outcomes } = solve((x) => 1 / (x - 0.37) - 2, 0, 1);
    expect(outcomes).toEqual([solved]);
    expect(chosen[0]).toBeCloseTo(0.87, 9);
  });

  it('tell a figure that the number does not change, even at its value', () => {
    expect(solve(() => 3, 0, 1).outcomes).toEqual([noEffect]);
    expect(solve(() => 0, 0, 1)).toEqual({ chosen: [Number.NaN], outcomes: [noEffect] });
  });

  it('tell a range over which the figure is empty', () => {
    const half: Curve = (x) => (x < 0.5 ? Number.NaN : x - 0.2);
    expect(solve(half, 0, 1).outcomes).toEqual([partly]);
    expect(solve(() => Number.NaN, 0, 1).outcomes).toEqual([partly]);
    const beyond: Curve = (x) => (x < 0.5 ? Number.NaN : x - 0.8);
    expect(solve(beyond, 0, 1).chosen[0]).toBeCloseTo(0.8, 9);
  });

  it('are those of one row alone, whichever rows stand beside it', () => {
    const curve: Curve = (x, row) => Math.atan(x - row / 50) + 0.1 * Math.sin(3 * x);
    const { chosen } = solve(curve, -2, 9, 300);
    for (const row of [0, 7, 128, 255, 299]) {
      expect(solve((x) => curve(x, row), -2, 9).chosen[0]).toBe(chosen[row]);
    }
  });

  it('agree with roots found one at a time by another rule', () => {
    const coefficient = fc.double({ min: -4, max: 4, noNaN: true });
    fc.assert(
      fc.property(coefficient, coefficient, coefficient, (a, b, c) => {
        const curve = (x: number) => a + b * x + c * Math.sin(x) + x ** 3 / 3;
        const { chosen, outcomes } = solve(curve, -3, 3.1);
        const alone = findRoot(curve, -3, 3.1, 1e-13, 4000);
        if (alone.kind === 'none') expect(outcomes[0]).toBe(none);
        if (alone.kind === 'several') expect([several, solved, none]).toContain(outcomes[0]);
        if (alone.kind !== 'found') return;
        expect(outcomes[0]).toBe(solved);
        expect(Math.abs(curve(chosen[0]))).toBeLessThanOrEqual(1e-9);
        const slope = b + c * Math.cos(alone.root) + alone.root ** 2;
        if (Math.abs(slope) > 0.01) expect(chosen[0]).toBeCloseTo(alone.root, 6);
      }),
      { seed: 11, numRuns: 300 },
    );
  });
});

describe('chains of stages', () => {
  const stage = (reads: string[], writes: string[]): Stage => ({
    name: writes.join(),
    reads,
    writes,
    cost: 7,
    kernel: (count, inputs, outputs) => {
      for (const output of outputs) {
        for (let row = 0; row < count; row++)
          output[row] = inputs.reduce((sum, column) => sum + column[row], 1);
      }
    },
  });
  const stages = [
    stage(['a'], ['p']),
    stage(['x', 'a'], ['q']),
    stage(['p', 'b'], ['r']),
    stage(['q', 'r'], ['s', 't']),
    stage(['q'], ['u']),
  ];

  it('are the stages that depend on one figure and lead to another', () => {
    const dependent = stagesDependingOn(stages, ['x']);
    expect([...dependent].map(({ name }) => name)).toEqual(['q', 's,t', 'u']);
    expect(stagesLeadingTo([...dependent], 't').map(({ name }) => name)).toEqual(['q', 's,t']);
  });

  it('read from outside what they do not write', () => {
    const chain = new StageChain([stages[1], stages[3]], 'x', 't');
    expect(chain.reads).toEqual(['a', 'r']);
    expect(chain.cost).toBe(14);
    chain.load([Float64Array.of(0, 10), Float64Array.of(0, 300)], 1, 0);
    chain.trial[0] = 4000;
    chain.evaluate(1);
    expect(chain.result[0]).toBe(1 + (1 + 4000 + 10) + 300);
  });
});
