import { describe, expect, it } from 'vitest';
import { Evaluator } from '../../src/engine/evaluator.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { digitsOf } from '../../src/plan/plan.ts';
import {
  baselineWorksheet,
  inputsOfCombination,
  makeWorksheet,
  worksheetMarkdown,
  worksheetText,
} from '../../src/reports/worksheet.ts';
import { testStudy } from '../studies.ts';

const study = testStudy({
  head: 'title: "Test | aeroplane <b>"',
  vary: 'wing.span: {from: 8 m, to: 10 m, count: 3}\ntail.arm: [4 m, 4.5 m]',
});
const laidOut = layOut(study);

describe('a worksheet', () => {
  const sheet = makeWorksheet(study, laidOut, inputsOfCombination(laidOut, 4), 'combination 4');

  it('shows the numbers of its row of the table to six digits', () => {
    const names = ['wing_area', 'mac', 'neutral_point', 'static_margin_aft', 'tail_area'];
    const evaluator = new Evaluator(laidOut.plan, names);
    evaluator.evaluate(4, 1);
    const factors = [1, 1, 100, 100, 1];
    names.forEach((name, k) => {
      const row = [...sheet.given, ...sheet.workedOut].find((candidate) => candidate.name === name);
      const value = evaluator.columns[k][0] * factors[k];
      expect(Number(row?.value), name).toBe(Number(value.toPrecision(6)));
    });
  });

  it('gives the varied numbers of that combination', () => {
    const digits = digitsOf(laidOut.plan, 4);
    laidOut.plan.axes.forEach((axis, position) => {
      const row = sheet.given.find((candidate) => candidate.name === axis.figures[0]);
      expect(Number(row?.value)).toBeCloseTo(axis.values[0][digits[position]], 5);
    });
  });

  it('names a formula and a source for everything worked out', () => {
    for (const row of sheet.workedOut) {
      expect(row.formula, row.name).not.toBe('');
      expect(row.source, row.name).not.toBe('');
      expect(row.meaning, row.name).toMatch(/\.$/);
    }
    expect(sheet.workedOut.length).toBeGreaterThan(50);
  });

  it('works figures out before they are used', () => {
    const order = sheet.workedOut.map((row) => row.name);
    for (const [first, later] of [
      ['wing_area', 'wing_lift_slope'],
      ['wing_lift_slope', 'downwash_gradient'],
      ['downwash_gradient', 'neutral_point'],
      ['neutral_point', 'static_margin_aft'],
    ]) {
      expect(order.indexOf(first) < order.indexOf(later) || !order.includes(first), `${first} ${later}`).toBe(
        true,
      );
    }
  });

  it('carries the cautions and the verdict on each requirement', () => {
    const text = worksheetText(sheet);
    expect(text).toContain('confirm by calculation');
    expect(text).toMatch(/static_margin\.at_least: static_margin_aft .* (NOT met|met)/);
  });

  it('as Markdown keeps its columns whatever the text', () => {
    const lines = worksheetMarkdown(sheet).split('\n');
    const table = lines.filter((line) => line.startsWith('| '));
    for (const line of table) expect(line.replaceAll('\\|', '').split('|').length, line).toBe(8);
    expect(lines[0]).not.toContain('<b>');
  });
});

describe('the baseline with a number replaced', () => {
  it('differs from the baseline only where it must', () => {
    const plain = baselineWorksheet(study, laidOut, new Map());
    const changed = baselineWorksheet(study, laidOut, new Map([['tail_volume', 0.6]]));
    const value = (sheet: typeof plain, name: string) =>
      [...sheet.given, ...sheet.workedOut].find((row) => row.name === name)?.value;
    expect(value(changed, 'tail_volume')).toBe('0.6');
    expect(value(changed, 'mac')).toBe(value(plain, 'mac'));
    expect(Number(value(changed, 'neutral_point'))).toBeGreaterThan(Number(value(plain, 'neutral_point')));
  });
});
