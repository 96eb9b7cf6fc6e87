import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { areaAtLeast, fieldAt, isolines } from '../../src/charts/geometry/contours.ts';
import { placeAtEnds } from '../../src/charts/geometry/end-labels.ts';
import { hatchTicks } from '../../src/charts/geometry/hatch.ts';
import { placeOnLines } from '../../src/charts/geometry/line-labels.ts';
import {
  cutOut,
  distanceToSegment,
  type Point,
  simplify,
  spotsAlong,
} from '../../src/charts/geometry/polyline.ts';
import { spread } from '../../src/charts/geometry/spread.ts';
import { pixelMap } from '../../src/charts/panel.ts';
import { contourStep } from '../../src/charts/slice-contours.ts';
import { failingSide } from '../../src/charts/slice-edges.ts';
import { steps } from './samples.ts';

/** A field over an uneven grid, so that index and value cannot be mixed up. */
function field(value: (x: number, y: number) => number) {
  const xs = [8, 8.5, 9.5, 10, 12];
  const ys = [3, 3.2, 4, 5];
  return { xs, ys, values: ys.flatMap((y) => xs.map((x) => value(x, y))) };
}

describe('contours', () => {
  it('of a plane are straight and where the plane has the level (exact)', () => {
    const plane = (x: number, y: number) => 2 * x + 3 * y;
    const lines = isolines(field(plane), 30);
    expect(lines).toHaveLength(1);
    for (const { x, y } of lines[0]!) expect(plane(x, y)).toBeCloseTo(30, 9);
    // From the left edge (x = 8, y = 14/3) to the lower edge (x = 10.5, y = 3).
    const ends = [lines[0]![0]!, lines[0]!.at(-1)!].sort((a, b) => a.x - b.x);
    expect(ends[0]!.x).toBeCloseTo(8, 9);
    expect(ends[0]!.y).toBeCloseTo(14 / 3, 9);
    expect(ends[1]!.x).toBeCloseTo(10.5, 9);
    expect(ends[1]!.y).toBeCloseTo(3, 9);
  });

  it('stop beside empty places and run along none', () => {
    const holed = field((x, y) => (x > 9 && y > 3.5 ? Number.NaN : 2 * x + 3 * y));
    const all = isolines(holed, 26).flat();
    expect(all.length).toBeGreaterThan(1);
    for (const { x, y } of all) expect(2 * x + 3 * y).toBeCloseTo(26, 9);
  });

  it('of a cone close on themselves and enclose its foot', () => {
    const cone = { xs: steps(41, -2, 2), ys: steps(41, -2, 2), values: [] as number[] };
    cone.values = cone.ys.flatMap((y) => cone.xs.map((x) => Math.hypot(x, y)));
    const [ring] = isolines(cone, 1);
    for (const { x, y } of ring!) expect(Math.abs(Math.hypot(x, y) - 1)).toBeLessThan(0.01);
    expect(ring![0]).toEqual(ring!.at(-1));
  });

  it('the area at or above a level has the area of its figure, holes taken off', () => {
    const xs = steps(81, -2, 2);
    const values = xs.flatMap((y) => xs.map((x) => Math.hypot(x, y)));
    const [outlineWithHole] = areaAtLeast({ xs, ys: xs, values }, 1);
    expect(Math.abs(shoelace(outlineWithHole!))).toBeCloseTo(16 - Math.PI, 1);
  });

  it('a field between its points is bilinear, and unknown beyond them', () => {
    expect(
      fieldAt(
        field((x, y) => x * y),
        9,
        4.5,
      ),
    ).toBeCloseTo(40.5, 9);
    expect(
      fieldAt(
        field((x, y) => x * y),
        12.1,
        4,
      ),
    ).toBeNaN();
  });
});

/** Signed area of a closed outline (shoelace rule, exact). */
function shoelace(ring: readonly Point[]): number {
  return ring.reduce((sum, a, i) => {
    const b = ring[(i + 1) % ring.length]!;
    return sum + (a.x * b.y - b.x * a.y) / 2;
  }, 0);
}

describe('hatch ticks', () => {
  const scale = (from: number, to: number) => ({ from, to, axis: null });
  const map = pixelMap(400, 300, scale(0, 4), scale(0, 3));
  it('stand on the failing side of an edge, whichever way it slopes', () => {
    const slope = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(slope, fc.boolean(), (m, above) => {
        const slack = (x: number, y: number) => (above ? 1 : -1) * (y - 1.5 - m * (x - 2) * 0.5);
        const [xs, ys] = [steps(21, 0, 4), steps(21, 0, 3)];
        const slackField = { xs, ys, values: ys.flatMap((y) => xs.map((x) => slack(x, y))) };
        const lines = isolines(slackField, 0).map((line) => line.map(map.toPixels));
        const ticks = lines.flatMap((line) => hatchTicks(line, 9, 7, failingSide(slackField, map)));
        expect(ticks.length).toBeGreaterThan(20);
        for (const { from, to } of ticks) {
          const end = map.fromPixels(to);
          expect(slack(end.x, end.y)).toBeLessThan(0);
          expect(Math.hypot(to.x - from.x, to.y - from.y)).toBeCloseTo(7, 6);
        }
      }),
      { numRuns: 40 },
    );
  });
});

describe('contour step', () => {
  const scale = (from: number, to: number) => ({ from, to, axis: null });
  const map = pixelMap(600, 450, scale(0, 1), scale(0, 1));
  const rising = (by: number) => {
    const xs = steps(11, 0, 1);
    return { xs, ys: xs, values: xs.flatMap(() => xs.map((x) => by * x)) };
  };
  it.each([
    [20, 1],
    [80, 2],
    [200, 5],
    [400, 10],
  ])('%d %% MAC across the plot: every %d %%', (by, step) => {
    expect(contourStep(rising(by), map)).toBe(step);
  });
});

describe('texts on lines', () => {
  const frame = { width: 300, height: 200 };
  const level = (y: number): Point[] => [
    { x: 10, y },
    { x: 290, y },
  ];
  it('stand on their own line, upright, clear of one another and of spots', () => {
    const requests = [60, 64, 120].map((y) => ({
      text: String(y),
      width: 30,
      height: 11,
      lines: [level(y)],
    }));
    const blocked = [{ x: 150, y: 120, radius: 40 }];
    const placed = placeOnLines(requests, blocked, frame);
    expect(placed.map((label) => label?.y)).toEqual([60, 64, 120]);
    expect(Math.abs(placed[0]!.x - placed[1]!.x)).toBeGreaterThan(30);
    expect(Math.abs(placed[2]!.x - 150)).toBeGreaterThan(55);
    expect(placed.map((label) => label?.angle)).toEqual([0, 0, 0]);
  });

  it('are left out where a line is too short or bends too much', () => {
    const bent = [
      { x: 100, y: 100 },
      { x: 120, y: 100 },
      { x: 120, y: 120 },
      { x: 100, y: 120 },
    ];
    const request = { text: '5 %', width: 40, height: 11 };
    expect(
      placeOnLines(
        [{ ...request, lines: [level(50).map(({ y }, i) => ({ x: 100 + 30 * i, y }))] }],
        [],
        frame,
      ),
    ).toEqual([null]);
    expect(placeOnLines([{ ...request, lines: [bent] }], [], frame)).toEqual([null]);
  });

  it('read from the left whichever way the line runs', () => {
    const request = {
      text: '5 %',
      width: 20,
      height: 11,
      lines: [
        [
          { x: 200, y: 50 },
          { x: 50, y: 110 },
        ],
      ],
    };
    const [label] = placeOnLines([request], [], frame);
    expect(label!.angle).toBeCloseTo((-Math.atan2(60, 150) * 180) / Math.PI, 6);
  });
});

describe('lines', () => {
  it('are cut at a spot to about a pixel', () => {
    const line = [
      { x: 0, y: 0 },
      { x: 100, y: 0 },
    ];
    const [left, right] = cutOut(line, [{ x: 40, y: 3, radius: 5 }]);
    expect(left!.at(-1)!.x).toBeGreaterThan(34.9);
    expect(left!.at(-1)!.x).toBeLessThanOrEqual(36);
    expect(right![0]!.x).toBeGreaterThanOrEqual(44);
    expect(right![0]!.x).toBeLessThan(45.1);
  });

  it('lose points only within the tolerance', () => {
    const points = fc.array(
      fc.record({ x: fc.integer({ min: 0, max: 99 }), y: fc.integer({ min: 0, max: 99 }) }),
      { minLength: 3, maxLength: 30 },
    );
    fc.assert(
      fc.property(points, (line) => {
        const kept = simplify(line, 2);
        expect([kept[0], kept.at(-1)]).toEqual([line[0], line.at(-1)]);
        for (const point of line) {
          const nearest = Math.min(...kept.slice(1).map((b, i) => distanceToSegment(point, kept[i]!, b)));
          expect(nearest).toBeLessThanOrEqual(2 + 1e-9);
        }
      }),
      { numRuns: 100 },
    );
  });
});

describe('labels along an axis', () => {
  it('never overlap, keep their order, and stay where they can', () => {
    const items = fc.array(
      fc.record({
        at: fc.double({ min: 0, max: 100, noNaN: true }),
        size: fc.double({ min: 1, max: 9, noNaN: true }),
      }),
      { minLength: 1, maxLength: 8 },
    );
    fc.assert(
      fc.property(items, (list) => {
        const middles = spread(list, 0, 100);
        const order = list.map((_, i) => i).sort((i, j) => middles[i]! - middles[j]!);
        for (let k = 1; k < order.length; k++) {
          const [a, b] = [order[k - 1]!, order[k]!];
          expect(middles[b]! - middles[a]!).toBeGreaterThanOrEqual(
            (list[a]!.size + list[b]!.size) / 2 - 1e-9,
          );
          expect(list[b]!.at).toBeGreaterThanOrEqual(list[a]!.at);
        }
        list.forEach(({ size }, i) => {
          expect(middles[i]!).toBeGreaterThanOrEqual(size / 2 - 1e-9);
          expect(middles[i]!).toBeLessThanOrEqual(100 - size / 2 + 1e-9);
        });
      }),
    );
  });

  it('that do not touch stay exactly where they want', () => {
    expect(
      spread(
        [
          { at: 70, size: 10 },
          { at: 20, size: 10 },
        ],
        0,
        100,
      ),
    ).toEqual([70, 20]);
  });
});

it('numbers of a family stand at one end, outside the lines, one of them with the name', () => {
  const family = [0, 1, 2].map((k) => ({
    line: [
      { x: 100, y: 60 + 40 * k },
      { x: 200, y: 50 + 40 * k },
    ],
    text: `9.${k}`,
  }));
  const clear = family.flatMap(({ line }) => spotsAlong(line, 4, 2));
  const { labels } = placeAtEnds(family, 'Span [m]', clear, { width: 400, height: 200 });
  expect(labels.map(({ text }) => text).sort()).toEqual(['9.0', '9.2', 'Span [m] 9.1']);
  for (const { x } of labels) expect(x).toBeGreaterThan(200);
});
