import { describe, expect, it } from 'vitest';
import { combinationFigure, Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { blockCount, blockSize, digitsOf } from '../../src/plan/plan.ts';
import type { Study } from '../../src/study/study.ts';
import { testStudy } from '../studies.ts';
import { evaluatePlain, isPlainPath, plainFigures, plainInputs } from './plain-loop.ts';

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

/** Below this, where margins cancel, differences count as absolute. */
const smallest = 0.01;

/** Difference of a value from the plain loop's, relative; infinite where one of the two is empty. */
function difference(value: number, plain: number): number {
  if (Number.isNaN(value) || Number.isNaN(plain)) {
    return Number.isNaN(value) && Number.isNaN(plain) ? 0 : Number.POSITIVE_INFINITY;
  }
  return Math.abs(value - plain) / Math.max(smallest, Math.abs(plain));
}

function compareWithPlainLoop(study: Study): {
  worst: number;
  where: string;
  rows: number;
  empty: number;
  flagged: number;
  feasible: number;
} {
  const { plan } = layOut(study);
  const evaluator = new Evaluator(plan, [combinationFigure, ...plainFigures]);
  const inputs = plainInputs(study);
  const out = new Float64Array(plainFigures.length);
  const found = { worst: 0, where: '', rows: 0, empty: 0, flagged: 0, feasible: 0 };
  const place = (name: (typeof plainFigures)[number]) => plainFigures.indexOf(name);
  for (let block = 0; block < blockCount(plan); block++) {
    const count = evaluator.evaluate(block * blockSize, blockSize);
    for (let row = 0; row < count; row++) {
      const combination = evaluator.columns[0][row];
      const digits = digitsOf(plan, combination);
      for (const { name, paths, values } of study.axes) {
        const digit = digits[plan.axes.findIndex((axis) => axis.name === name)];
        paths.forEach((path, k) => {
          if (!isPlainPath(path)) throw new Error(`the plain loop does not know ${path}`);
          inputs.numbers[path] = values[k][digit];
        });
      }
      evaluatePlain(inputs, out);
      if (Number.isNaN(out[place('neutral_point')])) found.empty++;
      if (out[place('outside_fitted_range')] !== 0) found.flagged++;
      if (out[place('feasible')] === 1) found.feasible++;
      for (let k = 0; k < plainFigures.length; k++) {
        const off = difference(evaluator.columns[k + 1][row], out[k]);
        if (off > found.worst) {
          found.worst = off;
          found.where = `${plainFigures[k]} of ${combination}: ${evaluator.columns[k + 1][row]} for ${out[k]}`;
        }
      }
    }
    found.rows += count;
  }
  return found;
}

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
