import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  centreOfMass,
  loadingExtremes,
  loadingFigure,
  loadingFigureCount,
} from '../../src/methods/loading.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const step = fc.record({ change: number(-30, 90), station: number(0, 6) });

function extremes(mass: number, station: number, steps: { change: number; station: number }[]) {
  const out = new Float64Array(loadingFigureCount);
  loadingExtremes(
    mass,
    station,
    steps.length,
    Float64Array.from(steps, (s) => s.change),
    Float64Array.from(steps, (s) => s.station),
    out,
  );
  return out;
}

describe('centre of gravity', () => {
  it('by hand, and moves with the datum', () => {
    const masses = new Float64Array([420, 150, 60, 999]);
    expect(centreOfMass(3, masses, new Float64Array([2.1, 2.4, 3.0, 99]))).toBeCloseTo(2.257143, 6);
    expect(centreOfMass(3, masses, new Float64Array([3.1, 3.4, 4.0, 99]))).toBeCloseTo(3.257143, 6);
  });
});

describe('extremes of a sequence', () => {
  it('are those of the path looked at finely, item by item', () => {
    fc.assert(
      fc.property(
        number(300, 900),
        number(1.5, 3),
        fc.array(step, { maxLength: 6 }),
        (mass, station, steps) => {
          let [m, x] = [mass, mass * station];
          const path = [station];
          const masses = [mass];
          for (const s of steps) {
            for (let k = 1; k <= 20; k++) {
              const part = (s.change * k) / 20;
              path.push((x + part * s.station) / (m + part));
              masses.push(m + part);
            }
            m += s.change;
            x += s.change * s.station;
          }
          const out = extremes(mass, station, steps);
          expect(out[loadingFigure.foremost]).toBeCloseTo(Math.min(...path), 9);
          expect(out[loadingFigure.aftmost]).toBeCloseTo(Math.max(...path), 9);
          expect(out[loadingFigure.leastMass]).toBeCloseTo(Math.min(...masses), 9);
          expect(out[loadingFigure.greatestMass]).toBeCloseTo(Math.max(...masses), 9);
        },
      ),
    );
  });
  it('tell where they are met', () => {
    // Pilot ahead of the empty CG, baggage behind it, then fuel burnt behind it.
    const out = extremes(400, 2.2, [
      { change: 80, station: 2.0 },
      { change: 60, station: 3.4 },
      { change: -50, station: 2.8 },
    ]);
    expect(out[loadingFigure.stepAtForemost]).toBe(1);
    expect(out[loadingFigure.massAtForemost]).toBe(480);
    expect(out[loadingFigure.stepAtAftmost]).toBe(2);
    expect(out[loadingFigure.massAtAftmost]).toBe(540);
  });
  it('an interior break counts, not only start and end', () => {
    const out = extremes(500, 2, [
      { change: 100, station: 5 },
      { change: -100, station: 5 },
    ]);
    expect(out[loadingFigure.aftmost]).toBeCloseTo(2.5, 12);
  });
  it('more taken away than is there gives no number', () => {
    const out = extremes(50, 2, [{ change: -60, station: 1 }]);
    expect(out[loadingFigure.foremost]).toBeNaN();
    expect(out[loadingFigure.aftmost]).toBeNaN();
  });
});
