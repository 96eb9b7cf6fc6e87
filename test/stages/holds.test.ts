import { describe, expect, it } from 'vitest';
import type { Study } from '../../src/study/study.ts';
import { columnOf, evaluateAll, planOf } from '../engine/evaluate-all.ts';
import { replaced, testStudy } from '../studies.ts';

function columns(study: Study, ...names: string[]): number[][] {
  const all = evaluateAll(planOf(study), names);
  return names.map((name) => [...columnOf(all, name)]);
}

const travel = (values: readonly number[]) => values[values.length - 1] - values[0];
const spread = (values: readonly number[]) => Math.max(...values) - Math.min(...values);

describe('what is held while the span varies', () => {
  const vary = (hold: string) => `wing.span: {from: 8 m, to: 12 m, step: 0.5 m${hold}}`;

  it('the other given number by default', () => {
    const [area, span, ratio] = columns(
      testStudy({ vary: vary('') }),
      'wing_area',
      'wing_span',
      'wing_aspect_ratio',
    );
    expect(spread(area)).toBe(0);
    expect(area[0]).toBe(11.4);
    expect(travel(span)).toBeCloseTo(4, 12);
    expect(ratio[0]).toBeCloseTo(8 ** 2 / 11.4, 12);
  });

  it('the aspect ratio, at its baseline value, when hold names it', () => {
    const held = testStudy({ vary: vary(', hold: aspect_ratio') });
    const [area, ratio] = columns(held, 'wing_area', 'wing_aspect_ratio');
    expect(spread(ratio)).toBeLessThan(1e-12);
    expect(ratio[0]).toBeCloseTo(9.4 ** 2 / 11.4, 12);
    expect(area[8]).toBeCloseTo(12 ** 2 / ratio[0], 10);
  });

  it('the root chord, at its baseline value, when hold names it', () => {
    const held = testStudy({ vary: vary(', hold: root_chord') });
    const [area, chord] = columns(held, 'wing_area', 'wing_root_chord');
    expect(spread(chord)).toBe(0);
    expect(chord[0]).toBeCloseTo((2 * 11.4) / (9.4 * 1.6), 12);
    expect(area[0]).toBeCloseTo((8 * chord[0] * 1.6) / 2, 12);
  });

  it('the tail’s volume and arm, so that its area follows the wing', () => {
    const study = testStudy({ vary: vary('') });
    const [volume, arm, area, mac] = columns(study, 'tail_volume', 'tail_arm', 'tail_area', 'mac');
    expect(spread(volume)).toBe(0);
    expect(spread(arm)).toBe(0);
    area.forEach((value, k) => {
      expect(value).toBeCloseTo((0.48 * 11.4 * mac[k]) / 4.3, 12);
    });
  });
});

/** The trap of definitions of a tail: which of its numbers is held decides what its arm does. */
describe('what is held while the tail’s arm varies', () => {
  const arms = (hold: string) => `tail.arm: {from: 3.4 m, to: 5.2 m, count: 10${hold}}`;

  it('with its volume held the tail shrinks and the neutral point hardly moves', () => {
    const [volume, area, point] = columns(
      testStudy({ vary: arms('') }),
      'tail_volume',
      'tail_area',
      'neutral_point',
    );
    expect(spread(volume)).toBe(0);
    expect(travel(area)).toBeLessThan(-0.3 * area[0]);
    expect(travel(point)).toBeGreaterThan(0);
    expect(travel(point)).toBeLessThan(0.03);
  });

  it('with its area held the neutral point moves much', () => {
    const [volume, area, point] = columns(
      testStudy({ vary: arms(', hold: area') }),
      'tail_volume',
      'tail_area',
      'neutral_point',
    );
    expect(spread(area)).toBe(0);
    expect(travel(volume) / volume[0]).toBeCloseTo(5.2 / 3.4 - 1, 12);
    expect(travel(point)).toBeGreaterThan(0.08);
  });

  it('both agree at the baseline’s own arm', () => {
    const [byVolume] = columns(testStudy({ vary: 'tail.arm: [4.3 m, 5 m]' }), 'neutral_point');
    const [byArea] = columns(
      testStudy({ vary: 'tail.arm: {from: 4.3 m, to: 5 m, count: 2, hold: area}' }),
      'neutral_point',
    );
    expect(byArea[0]).toBeCloseTo(byVolume[0], 13);
    expect(byArea[1]).toBeGreaterThan(byVolume[1] + 0.02);
  });
});

describe('arm given and station given', () => {
  const vary = 'wing.sweep_quarter_chord: [-3 deg, 0 deg, 5 deg, 10 deg]';

  it('arm given: the tail rides with the quarter-MAC of the wing', () => {
    const [arm, station, quarter] = columns(
      testStudy({ vary }),
      'tail_arm',
      'tail_station',
      'quarter_mac_station',
    );
    expect(spread(arm)).toBe(0);
    expect(travel(station)).toBeCloseTo(travel(quarter), 12);
    expect(travel(quarter)).toBeGreaterThan(0.3);
  });

  it('station given: the tail stays and the arm follows', () => {
    const tail = replaced('tail', 'arm: 4.3 m', 'station: 6.4 m');
    const [arm, station, quarter] = columns(
      testStudy({ vary, tail }),
      'tail_arm',
      'tail_station',
      'quarter_mac_station',
    );
    expect(spread(station)).toBe(0);
    arm.forEach((value, k) => {
      expect(value).toBeCloseTo(6.4 - quarter[k], 12);
    });
  });

  it('a wing that moves along the body carries tail, body and CG with it', () => {
    const [point, margin, arm, station] = columns(
      testStudy({ vary: 'wing.root_leading_edge: [1.5 m, 1.75 m, 2 m]' }),
      'neutral_point',
      'static_margin_aft',
      'tail_arm',
      'neutral_point_station',
    );
    expect(spread(point)).toBeLessThan(1e-12);
    expect(spread(margin)).toBeLessThan(1e-12);
    expect(spread(arm)).toBe(0);
    expect(travel(station)).toBeCloseTo(0.5, 12);
  });

  it('a CG given by station stays where it is while the wing moves', () => {
    const [forward, station, margin, mac] = columns(
      testStudy({
        vary: 'wing.root_leading_edge: [1.7 m, 1.75 m, 1.8 m]',
        cg: '{as: station, forward: 2.15 m, aft: 2.25 m}',
      }),
      'cg_forward',
      'cg_forward_station',
      'static_margin_forward',
      'mac',
    );
    expect(station).toEqual([2.15, 2.15, 2.15]);
    expect(travel(forward)).toBeCloseTo(-0.1 / mac[0], 12);
    expect(travel(margin)).toBeCloseTo(0.1 / mac[0], 12);
  });
});
