import { describe, expect, it } from 'vitest';
import { columnOf, evaluateAll, planOf } from '../engine/evaluate-all.ts';
import { replaced, testStudy } from '../studies.ts';
import { figure, figuresOf } from './aeroplane.ts';

type Changes = Parameters<typeof testStudy>[0];
const of = (changes: Changes, name: string) => figure(figuresOf(testStudy(changes)), name);

describe('layouts of the tail', () => {
  const plain = (layout: string) =>
    replaced('tail', 'layout: conventional', `layout: ${layout}`).replace(
      ' dynamic_pressure_ratio: 0.9,',
      '',
    );

  /** Dynamic pressure 0.85–0.95 in the wake, 1.0 for a T-tail: common practice, no source. */
  it('take the customary dynamic pressure where the study gives none', () => {
    const ratio = (layout: string) =>
      testStudy({ tail: plain(layout) }).inputs.get('tail.dynamic_pressure_ratio');
    expect(ratio('T')).toBe(1);
    for (const layout of ['conventional', 'mid']) {
      expect(ratio(layout)).toBeGreaterThanOrEqual(0.85);
      expect(ratio(layout)).toBeLessThanOrEqual(0.95);
    }
    expect(ratio('mid')).toBeGreaterThan(ratio('conventional') ?? 1);
    const point = (layout: string) => of({ tail: plain(layout) }, 'neutral_point');
    expect(point('mid')).toBeGreaterThan(point('conventional'));
    expect(point('T')).toBeGreaterThan(point('mid'));
  });

  it('do not change a tail whose dynamic pressure is given', () => {
    const given = (layout: string) =>
      of({ tail: replaced('tail', 'layout: conventional', `layout: ${layout}`) }, 'neutral_point');
    expect(given('T')).toBe(given('conventional'));
    expect(given('mid')).toBe(given('conventional'));
  });

  /** Lift of a V-tail in the vertical: cos² of the panels' angle (NACA TR 823, from memory). */
  it('V: the lift slope and the share shrink by cos²', () => {
    const v = { tail: replaced('tail', 'layout: conventional', 'layout: V, v_angle: 35 deg') };
    const factor = Math.cos((35 * Math.PI) / 180) ** 2;
    expect(of(v, 'tail_lift_slope') / of({}, 'tail_lift_slope')).toBeCloseTo(factor, 13);
    expect(of(v, 'tail_lift_share') / of({}, 'tail_lift_share')).toBeCloseTo(factor, 12);
    expect(of(v, 'tail_aerodynamic_centre')).toBe(of({}, 'tail_aerodynamic_centre'));
    expect(of(v, 'neutral_point')).toBeLessThan(of({}, 'neutral_point'));
  });

  it('all-moving: effectiveness 1 and the same neutral point', () => {
    const moving = {
      tail: replaced('tail', 'layout: conventional', 'all_moving: true').replace(
        /elevator: \{.*?\}/,
        'elevator: {up: 12 deg, down: 8 deg}',
      ),
    };
    expect(testStudy(moving).tail.allMoving).toBe(true);
    expect(of(moving, 'elevator_effectiveness')).toBe(1);
    expect(of(moving, 'neutral_point')).toBe(of({}, 'neutral_point'));
  });

  /** Glauert's thin-aerofoil effectiveness at E 0.25 is 0.6090 (exact), times ratio and span fraction. */
  it('hinged: thin-aerofoil effectiveness times ratio and span fraction', () => {
    const tail = replaced('tail', 'chord_fraction: 38 %', 'chord_fraction: 25 %');
    expect(of({ tail }, 'elevator_effectiveness')).toBeCloseTo(0.609 * 0.8 * 0.95, 4);
  });

  it('a higher tail sees less downwash, so its neutral point lies further aft', () => {
    const tail = replaced('tail', 'above_wing_root_chord: 0.45 m', 'above_wing_root_chord: 1.6 m');
    for (const name of ['downwash_torenbeek', 'downwash_handbook'])
      expect(of({ tail }, name)).toBeLessThan(of({}, name));
    expect(of({ tail }, 'neutral_point')).toBeGreaterThan(of({}, 'neutral_point'));
  });
});

describe('bodies', () => {
  it('none: no moment, no carry-over', () => {
    const none = { body: 'none' };
    for (const name of ['body_moment_slope', 'neutral_point_body', 'body_width_at_wing']) {
      expect(of(none, name), name).toBe(0);
    }
    expect(of(none, 'wing_body_lift_slope')).toBe(of(none, 'wing_lift_slope'));
    expect(of(none, 'neutral_point')).toBeGreaterThan(of({}, 'neutral_point'));
  });

  it('the carry-over takes the width at the root’s quarter chord', () => {
    // root chord 2·11.4/(9.4·1.6), its quarter at 1.75 + 0.379 m, between 1.12 m and 1.02 m of width
    const quarter = 1.75 + (2 * 11.4) / (9.4 * 1.6) / 4;
    const width = 1.12 + ((quarter - 2) / 0.9) * (1.02 - 1.12);
    expect(of({}, 'body_width_at_wing')).toBeCloseTo(width, 13);
    const share = width / 9.4;
    const factor = 1 + 0.025 * share - 0.25 * share ** 2;
    expect(of({}, 'wing_body_lift_slope') / of({}, 'wing_lift_slope')).toBeCloseTo(factor, 13);
  });

  describe('with a boom', () => {
    const pod = (boom: string) => `{stations: [
      {at: 0 m, width: 0.36 m, depth: 0.42 m}, {at: 1.2 m, width: 1.08 m, depth: 1.02 m},
      {at: 2.9 m, width: 1.02 m, depth: 1.16 m}, {at: 4.6 m, width: 0.2 m, depth: 0.3 m}]${boom}}`;
    const boom = (width: string) => pod(`, boom: {width: ${width}, depth: ${width}}`);

    it('a wider boom adds width² times the rest of the way to the tail', () => {
      const aft = (width: string) => of({ body: boom(width) }, 'body_moment_aft');
      // from the pod's end at 4.6 m to the tail, ξ rises linearly from the trailing edge on
      const trailing = 1.75 + of({}, 'wing_root_chord');
      const tail = of({}, 'tail_station');
      const rising = ((tail - trailing) ** 2 - (4.6 - trailing) ** 2) / (2 * (tail - trailing));
      expect(aft('0.2 m') - aft('0.1 m')).toBeCloseTo((0.2 ** 2 - 0.1 ** 2) * rising, 10);
    });

    it('the pod keeps its length while the tail moves', () => {
      const study = testStudy({ body: boom('0.1 m'), vary: 'tail.arm: [3.4 m, 4.3 m, 5.4 m]' });
      const all = evaluateAll(planOf(study), ['body_moment_aft', 'wake_length']);
      const podEnd = 4.6 - 1.75 - of({}, 'wing_root_chord');
      // ξ = x/L, so the pod's share is its own ∫w² x dx over L, and the boom's w² (L² − p²)/(2L)
      const ofPod = [...columnOf(all, 'wake_length')].map(
        (L, k) => L * columnOf(all, 'body_moment_aft')[k] - (0.1 ** 2 * (L ** 2 - podEnd ** 2)) / 2,
      );
      expect(ofPod[0]).toBeGreaterThan(0.1);
      for (const one of ofPod) expect(one).toBeCloseTo(ofPod[0], 11);
    });

    it('without a boom the body is stretched with the tail', () => {
      const end = `at: ${of({}, 'tail_station')} m`;
      const body = replaced('body', 'at: 6.95 m', end);
      const all = evaluateAll(planOf(testStudy({ body, vary: 'tail.arm: [3.4 m, 4.3 m, 5.4 m]' })), [
        'body_moment_aft',
        'wake_length',
      ]);
      const perLength = [...columnOf(all, 'wake_length')].map(
        (L, k) => columnOf(all, 'body_moment_aft')[k] / L,
      );
      for (const one of perLength) expect(one).toBeCloseTo(perLength[0], 12);
    });
  });

  /** K_f of NACA TR 711 (from memory, unconfirmed): 0.115 … 1.146 /rad at 10 … 70 % of the length. */
  it('the quick estimate is K_f w² L/(S c) at the place of the wing', () => {
    const quick = { rest: 'methods: {body_moment: quick_estimate}' };
    const length = 6.95;
    const quarter = 1.75 + of({}, 'wing_root_chord') / 4;
    const place = quarter / length;
    expect(of(quick, 'body_wing_place')).toBeCloseTo(place, 12);
    expect(place).toBeGreaterThan(0.3);
    expect(place).toBeLessThan(0.4);
    const factor = 0.344 + ((place - 0.3) / 0.1) * (0.487 - 0.344);
    const expected = (factor * 1.12 ** 2 * length) / (11.4 * of({}, 'mac'));
    expect(of(quick, 'body_moment_slope')).toBeCloseTo(expected, 12);
  });

  it('both estimates of one body agree in sign and size', () => {
    const quick = of({ rest: 'methods: {body_moment: quick_estimate}' }, 'body_moment_slope');
    const strips = of({}, 'body_moment_slope');
    expect(quick / strips).toBeGreaterThan(0.5);
    expect(quick / strips).toBeLessThan(2);
  });
});
