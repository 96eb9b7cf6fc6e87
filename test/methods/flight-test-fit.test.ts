import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type FlightTestFit,
  type FlightTestSeries,
  fitFlightTest,
} from '../../src/methods/flight-test-fit.ts';
import { elevatorToTrim } from '../../src/methods/trim.ts';

/** Repeatable numbers 0…1 (mulberry32, a public-domain generator), and normal ones by Box and Muller. */
function normalNumbers(seed: number): () => number {
  let state = seed;
  const even = () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  return () => Math.sqrt(-2 * Math.log(1 - even())) * Math.cos(2 * Math.PI * even());
}

const neutral = 0.43;
const elevator = (lift: number, h: number) => elevatorToTrim(lift, h, 0.1, neutral, 0.33, 3.7);

function flown(places: readonly number[], points: number, noise: () => number, bend = 0): FlightTestSeries[] {
  return places.map((h) => {
    const lifts = Array.from({ length: points }, (_, i) => 0.25 + (1.05 * i) / (points - 1));
    return {
      centreOfGravity: h,
      liftCoefficients: lifts,
      controls: lifts.map((cl) => elevator(cl, h) + bend * cl * cl + noise()),
    };
  });
}

function fitted(series: FlightTestSeries[]): FlightTestFit {
  const fit = fitFlightTest(series, 0.95);
  if (fit.kind !== 'fitted') throw new Error(fit.reason);
  return fit;
}

describe('without noise', () => {
  it('the neutral point of the model comes back, with slopes and intercepts', () => {
    const fit = fitted(flown([0.2, 0.26, 0.33], 6, () => 0));
    expect(fit.neutralPoint).toBeCloseTo(neutral, 10);
    expect(fit.limits!.lower).toBeCloseTo(neutral, 6);
    expect(fit.limits!.upper).toBeCloseTo(neutral, 6);
    for (const { slope, intercept, centreOfGravity } of fit.slopes) {
      expect(slope).toBeCloseTo(elevator(1, centreOfGravity) - elevator(0, centreOfGravity), 10);
      expect(intercept).toBeCloseTo(elevator(0, centreOfGravity), 10);
    }
    expect(fit.degreesOfFreedom).toBe(18 - 3 - 2);
  });
});

describe('with noise', () => {
  // A quarter of a degree of elevator.
  const scatter = (0.25 * Math.PI) / 180;
  const draw = (seed: number, bend = 0) => {
    const next = normalNumbers(seed);
    return fitted(flown([0.22, 0.28, 0.34], 7, () => scatter * next(), bend));
  };

  it('the limits hold the model’s neutral point in at least 90 of 100 draws, and not in all of 300', () => {
    const draws = Array.from({ length: 300 }, (_, seed) => draw(seed + 1));
    const held = draws.map(
      ({ limits }) => limits !== undefined && limits.lower <= neutral && neutral <= limits.upper,
    );
    const hundred = held.slice(0, 100).filter(Boolean).length;
    const all = held.filter(Boolean).length;
    console.info(
      `Flight test, 95 % limits: ${hundred} of the first 100 draws, ${all} of 300 hold the neutral point`,
    );
    expect(hundred).toBeGreaterThanOrEqual(90);
    // 95 % of 300 is 285 ± 3.8.
    expect(all).toBeGreaterThan(285 - 13);
    expect(all).toBeLessThan(285 + 13);
  });
  it('straight curves count as straight in most draws, bent ones as bent', () => {
    const straight = (bend: number) =>
      Array.from({ length: 100 }, (_, seed) => draw(seed + 1, bend)).filter((f) => f.curvature!.straight)
        .length;
    expect(straight(0)).toBeGreaterThanOrEqual(88);
    expect(straight(0)).toBeLessThan(100);
    expect(straight(0.05)).toBeLessThan(5);
  });
  it('the scatter and the slopes’ standard errors are about those put in', () => {
    const draws = Array.from({ length: 1000 }, (_, seed) => draw(seed + 1));
    const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;
    // The variance is unbiased; its mean over 1000 draws of 16 degrees of freedom is known to 1.1 %.
    expect(Math.abs(mean(draws.map((d) => d.scatter ** 2)) / scatter ** 2 - 1)).toBeLessThan(0.035);
    const slopes = draws.map((d) => d.slopes[1]!.slope);
    const spread = Math.sqrt(mean(slopes.map((s) => (s - mean(slopes)) ** 2)));
    expect(mean(draws.map((d) => d.slopes[1]!.standardError)) / spread).toBeGreaterThan(0.8);
    expect(mean(draws.map((d) => d.slopes[1]!.standardError)) / spread).toBeLessThan(1.25);
  });
  it('CG positions too close have no limits', () => {
    const next = normalNumbers(5);
    const fit = fitted(flown([0.3, 0.302], 5, () => scatter * next()));
    expect(fit.limits).toBeUndefined();
    expect(Math.abs(fit.slopeByCentreOfGravityT)).toBeLessThan(2.5);
  });
});

describe('laws', () => {
  it('the unit of the control does not matter; moving the CG datum moves the neutral point with it', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 9999 }),
        fc.double({ min: 0.1, max: 60, noNaN: true }),
        fc.double({ min: -2, max: 2, noNaN: true }),
        (seed, unit, datum) => {
          const next = normalNumbers(seed);
          const series = flown([0.2, 0.27, 0.34], 6, () => 0.003 * next());
          const one = fitted(series);
          const other = fitted(
            series.map((s) => ({
              ...s,
              centreOfGravity: s.centreOfGravity + datum,
              controls: s.controls.map((c) => c * unit),
            })),
          );
          expect(other.neutralPoint - datum).toBeCloseTo(one.neutralPoint, 8);
          expect(other.limits!.lower - datum).toBeCloseTo(one.limits!.lower, 7);
          expect(other.limits!.upper - datum).toBeCloseTo(one.limits!.upper, 7);
          expect(other.curvature!.t).toBeCloseTo(one.curvature!.t, 6);
        },
      ),
    );
  });
  it('is the least-squares fit: no small change of its numbers lessens the squares', () => {
    const next = normalNumbers(77);
    const series = flown([0.2, 0.26, 0.33], 5, () => 0.004 * next());
    const fit = fitted(series);
    const squares = (point: number, trend: number) =>
      series.reduce((sum, s) => {
        // The best intercept of each series follows from its means.
        const mean = (v: readonly number[]) => v.reduce((a, b) => a + b, 0) / v.length;
        const [x, y] = [mean(s.liftCoefficients), mean(s.controls)];
        const slope = trend * (s.centreOfGravity - point);
        return s.controls.reduce((t, c, i) => t + (c - y - slope * (s.liftCoefficients[i]! - x)) ** 2, sum);
      }, 0);
    const best = squares(fit.neutralPoint, fit.slopeByCentreOfGravity);
    expect(best / fit.degreesOfFreedom).toBeCloseTo(fit.scatter ** 2, 12);
    for (const [dp, dt] of [
      [1e-3, 0],
      [-1e-3, 0],
      [0, 1e-3],
      [0, -1e-3],
      [1e-3, 1e-3],
      [-1e-3, 1e-3],
    ] as const) {
      expect(squares(fit.neutralPoint + dp, fit.slopeByCentreOfGravity + dt)).toBeGreaterThan(best);
    }
  });
});

describe('what can’t be fitted is said', () => {
  const good = flown([0.2, 0.3], 4, () => 0);
  it('one CG position', () => {
    const same = [good[0]!, { ...good[1]!, centreOfGravity: 0.2 }];
    expect(fitFlightTest(same, 0.95)).toEqual({ kind: 'not-computed', reason: 'one CG position' });
    expect(fitFlightTest([good[0]!], 0.95)).toMatchObject({ reason: 'one CG position' });
  });
  it('two points', () => {
    const short = { centreOfGravity: 0.3, liftCoefficients: [0.3, 0.9], controls: [0, -0.1] };
    expect(fitFlightTest([good[0]!, short], 0.95)).toEqual({
      kind: 'not-computed',
      reason: 'fewer than three points in a series',
      series: 1,
    });
  });
  it('one lift coefficient', () => {
    const even = { centreOfGravity: 0.3, liftCoefficients: [0.5, 0.5, 0.5], controls: [0, -0.1, 0.1] };
    expect(fitFlightTest([good[0]!, even], 0.95)).toMatchObject({
      reason: 'one lift coefficient in a series',
      series: 1,
    });
  });
});
