import { describe, expect, it } from 'vitest';
import { figuresOfStudy } from '../../src/figures/study-figures.ts';
import { replaced, testStudy } from '../studies.ts';

const none = { requirements: [], ranges: [], reasons: [], conditions: [] };
const figuresOf = (changes: Parameters<typeof testStudy>[0]) => figuresOfStudy(testStudy(changes), none);

/** Figures of the tail as the study gives them, and the formulas that use their symbols. */
const uses: [given: string, user: string][] = [
  ['tail_volume', 'tail_area'],
  ['tail_arm', 'tail_area'],
  ['tail_above_wing_root_chord', 'wake_height'],
  ['tail_dynamic_pressure_ratio', 'tail_lift_share'],
  ['tail_elevator_effectiveness_ratio', 'elevator_effectiveness'],
  ['tail_elevator_span_fraction', 'elevator_effectiveness'],
  ['wing_washout', 'root_angle_of_attack'],
  ['wing_height', 'neutral_point_height'],
  ['cg_above_datum', 'neutral_point_height'],
];

describe('symbols on a worksheet', () => {
  it.each(uses)('%s stands by its own symbol in the formula of %s', (given, user) => {
    const figures = figuresOf({});
    const { symbol } = figures.get(given)!;
    const words = figures.get(user)!.formula.split(/[\s()=·|,−+]+|(?<=[a-zα-ω])\/(?=[a-z]\b)/u);
    expect(words, figures.get(user)!.formula).toContain(symbol);
  });

  it('the tail’s formulas are those of its own methods', () => {
    const vTail = figuresOf({
      tail: replaced('tail', 'layout: conventional', 'layout: V, v_angle: 35 deg'),
      rest: 'methods: {lift_slope: table, aerodynamic_centre: quarter_mac}',
    });
    expect(vTail.get('tail_lift_slope')?.formula).toMatch(/table at A_t.*cos²Γ_t$/);
    expect(vTail.get('tail_aerodynamic_centre')?.formula).toBe('h_ac,t = x_ac_t/c');
    expect(figuresOf({}).get('tail_lift_slope')?.formula).not.toContain('Γ');
  });
});
