import { describe, expect, it } from 'vitest';
import { rangeLabels, reasonLabels } from '../../src/stages/out-of-range.ts';
import { columnOf, evaluateAll, planOf } from '../engine/evaluate-all.ts';
import { testStudy } from '../studies.ts';

/** Half-span panels that fall away at once: MAC·b/S beyond the triangle's 4/3. */
const wing = `{area: 11.4 m^2, span: 9.4 m, root_leading_edge: 1.75 m, section: naca-2412, panels: [
    {span_fraction: 0.5, taper: 0.3}, {span_fraction: 0.5, taper: 0.3}]}`;
const figures = [
  'mac',
  'wing_formula_taper',
  'downwash_torenbeek',
  'downwash_handbook',
  'neutral_point',
  'not_computed_because',
  'outside_fitted_range',
];
const rowOf = (rest: string, vary = '') => {
  const columns = evaluateAll(planOf(testStudy({ wing, rest, vary })), figures);
  return Object.fromEntries(figures.map((name) => [name, columnOf(columns, name)[0]]));
};

describe('a wing hollower than a triangle', () => {
  it('has no Torenbeek downwash, and its row says why', () => {
    const row = rowOf('');
    expect((row.mac * 9.4) / 11.4).toBeGreaterThan(4 / 3);
    expect(row.wing_formula_taper).toBe(0);
    expect(row.downwash_torenbeek).toBeNaN();
    expect(row.neutral_point).toBeNaN();
    expect(reasonLabels[row.not_computed_because]).toContain('hollower than a triangle');
  });

  it('is told before a CG range that is reversed as well', () => {
    const row = rowOf('', 'cg.forward: [0.35]\ncg.aft: [0.3]');
    expect(reasonLabels[row.not_computed_because]).toContain('hollower than a triangle');
  });

  it('is worked out by the handbook form, and flagged', () => {
    const row = rowOf('methods: {downwash: handbook}');
    expect(row.not_computed_because).toBeNaN();
    expect(row.neutral_point).toBeGreaterThan(0);
    const bit = rangeLabels.indexOf('equivalent taper of a wing hollower than a triangle');
    expect(Math.floor(row.outside_fitted_range / 2 ** bit) % 2).toBe(1);
    expect(row.downwash_torenbeek).toBeNaN();
  });
});
