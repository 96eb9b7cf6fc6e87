import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawSvg } from '../../src/charts/draw-spec.ts';
import { arrowheads } from '../../src/charts/geometry/arrows.ts';
import { burnPath } from '../../src/charts/geometry/burn-path.ts';
import { clipToFrame } from '../../src/charts/geometry/clip.ts';
import { arcLengths, distanceToSegment, type Point } from '../../src/charts/geometry/polyline.ts';
import {
  type ChartSpec,
  flightTestSlopes,
  loadingDiagram,
  macRuler,
  tailSizing,
} from '../../src/charts/index.ts';
import { controlLimitText, groupByPlace } from '../../src/charts/mac-ruler-marks.ts';
import {
  cgAbsent,
  cgSide,
  type NamedLine,
  namedLineLayers,
  placeNames,
  placeTags,
} from '../../src/charts/named-lines.ts';
import { niceValues } from '../../src/charts/nice-steps.ts';
import { pixelMap } from '../../src/charts/panel.ts';
import { smallestFittingTail } from '../../src/charts/tail-sizing.ts';
import { controlCharts, trim, trimPanel, usualFlightTest, usualLoading } from './control-samples.ts';
import { heading, rulerRow } from './samples.ts';
import { textsOfSvg } from './texts-of-svg.ts';

async function textsOf(spec: ChartSpec): Promise<string[]> {
  return textsOfSvg(await drawSvg(spec)).map(({ text }) => text);
}

describe('lines cut at the frame', () => {
  const frame = { width: 100, height: 50 };
  // Hundredths of a pixel: no piece that runs along the frame nearer than a double can tell.
  const coordinate = fc.integer({ min: -20_000, max: 30_000 }).map((hundredths) => hundredths / 100);
  const line = fc.array(fc.record({ x: coordinate, y: coordinate }), { minLength: 2, maxLength: 12 });

  it('stay inside, on the line, and lose nothing of what is inside', () => {
    fc.assert(
      fc.property(line, (given) => {
        const parts = clipToFrame(given, frame);
        for (const { x, y } of parts.flat()) {
          expect(Math.min(x, y, frame.width - x, frame.height - y)).toBeGreaterThan(-1e-9);
          const away = given.slice(1).map((b, i) => distanceToSegment({ x, y }, given[i]!, b));
          expect(Math.min(...away)).toBeLessThan(1e-9);
        }
        const kept = parts.reduce((sum, part) => sum + arcLengths(part).at(-1)!, 0);
        expect(kept).toBeCloseTo(lengthInside(given, frame), 0);
      }),
    );
  });

  it('are the same line when nothing is outside, and part at what is not known', () => {
    const inside = [0, 20, 40].map((x) => ({ x, y: x }));
    expect(clipToFrame(inside, frame)).toEqual([inside]);
    expect(clipToFrame([...inside, { x: Number.NaN, y: 3 }, ...inside], frame)).toEqual([inside, inside]);
    expect(clipToFrame([inside[0]!, { x: Number.NEGATIVE_INFINITY, y: 3 }], frame)).toEqual([]);
  });
});

/** Length of a line inside a frame, counted over many short pieces: the plain way. */
function lengthInside(line: readonly Point[], frame: { width: number; height: number }): number {
  const pieces = 4000;
  let sum = 0;
  line.slice(1).forEach((b, i) => {
    const a = line[i]!;
    const piece = Math.hypot(b.x - a.x, b.y - a.y) / pieces;
    for (let k = 0; k < pieces; k++) {
      const t = (k + 0.5) / pieces;
      const [x, y] = [a.x + t * (b.x - a.x), a.y + t * (b.y - a.y)];
      if (x >= 0 && y >= 0 && x <= frame.width && y <= frame.height) sum += piece;
    }
  });
  return sum;
}

describe('the way of the CG as fuel burns', () => {
  it('is that of a mass taken off at one place, by moments (exact), and passes every state', () => {
    // 588 kg at 27.6 and 60 kg of fuel at 60: what is left at any time has its CG by moments.
    const dry = { cg: 27.6, mass: 588 };
    const fuelAt = 60;
    const full = { cg: (588 * 27.6 + 60 * fuelAt) / 648, mass: 648 };
    const path = burnPath([full, dry]);
    expect(path[0]).toEqual(full);
    expect(path.at(-1)).toEqual(dry);
    for (const { cg, mass } of path) {
      const fuel = mass - 588;
      expect(cg).toBeCloseTo((588 * 27.6 + fuel * fuelAt) / mass, 9);
    }
  });
  it('does not depend on where the CG is measured from', () => {
    const states = [
      { cg: 30, mass: 648 },
      { cg: 25, mass: 400 },
      { cg: 26, mass: 380 },
    ];
    const moved = burnPath(states.map(({ cg, mass }) => ({ cg: 3 * cg + 200, mass })));
    burnPath(states).forEach(({ cg }, k) => {
      expect(moved[k]!.cg).toBeCloseTo(3 * cg + 200, 9);
    });
  });
  it('is straight when mass is only moved', () => {
    const path = burnPath([
      { cg: 20, mass: 500 },
      { cg: 32, mass: 500 },
    ]);
    expect(path[6]).toEqual({ cg: 26, mass: 500 });
    expect(burnPath([])).toEqual([]);
  });
});

it('arrowheads lie on the line and point the way it runs', () => {
  const line = [
    { x: 10, y: 200 },
    { x: 10, y: 100 },
    { x: 130, y: 100 },
  ];
  const heads = arrowheads(line, 9);
  expect(heads).toHaveLength(2);
  for (const [tip, left, right] of heads) {
    const foot = { x: (left!.x + right!.x) / 2, y: (left!.y + right!.y) / 2 };
    const away = [0, 1].map((i) => distanceToSegment(tip!, line[i]!, line[i + 1]!));
    expect(Math.min(...away)).toBeLessThan(1e-9);
    // Up the first piece (y falls), to the right along the second.
    expect(tip!.x - foot.x + (foot.y - tip!.y)).toBeCloseTo(9, 6);
  }
  expect(arrowheads(line.slice(0, 1), 9)).toEqual([]);
  expect(arrowheads([line[0]!, { x: 10, y: 195 }], 9)).toEqual([]);
});

it.each([
  [2.1, 2.38, 8, [2.1, 2.15, 2.2, 2.25, 2.3, 2.35], 2],
  [80.2, 98.7, 8, [85, 90, 95], 0],
  [-0.4, 0.4, 4, [-0.4, -0.2, 0, 0.2, 0.4], 1],
  [3, 3, 4, [], 0],
] as const)('round values from %d to %d', (from, to, count, values, decimals) => {
  const found = niceValues(from, to, count);
  expect(found.values.map((value) => Number(value.toFixed(6)) + 0)).toEqual(values);
  expect(found.decimals).toBe(decimals);
});

describe('limits in a plot', () => {
  const frame = { width: 400, height: 300 };
  const scale = (from: number, to: number) => ({ from, to, axis: null });
  const map = pixelMap(400, 300, scale(0, 40), scale(0, 30));
  const upright = (x: number, label: string): NamedLine => ({
    label,
    lines: [
      [
        { x, y: 290 },
        { x, y: 10 },
      ],
    ],
    style: { color: 'black', width: 1 },
    side: cgSide('aft'),
  });

  it.each(['forward', 'aft'] as const)(
    'are hatched on the %s side that they forbid, whichever way they run',
    (forbidden) => {
      for (const reversed of [false, true]) {
        const { lines, ...rest } = upright(200, '');
        const line = reversed ? [...lines[0]!].reverse() : lines[0]!;
        const [, ticks] = namedLineLayers(
          { ...rest, lines: [line], side: cgSide(forbidden) },
          [],
          frame,
          map,
        );
        const rows = (ticks!.data as { values: { x: number; x2: number }[] }).values;
        expect(rows.length).toBeGreaterThan(20);
        for (const { x, x2 } of rows) expect(Math.sign(x2 - x)).toBe(forbidden === 'aft' ? 1 : -1);
      }
    },
  );

  it('get a letter where their name has no room', () => {
    const limits = [
      upright(200, 'aft limit'),
      upright(200 + 30, 'a name longer than half of the plot is high'),
    ];
    const blocked = [{ x: 230, y: 150, radius: 20 }];
    const names = placeNames(limits, blocked, frame);
    expect(names.map((name) => name?.text)).toEqual(['aft limit', undefined]);
    const tags = placeTags(limits, names, blocked, frame);
    expect(tags.map((tag) => tag?.text)).toEqual([undefined, 'A']);
  });

  it.each([
    [[-90, -80], 'forward', 'forbids nothing in this plot'],
    [[90, 80], 'forward', 'forbids all of this plot'],
    [[90, Number.POSITIVE_INFINITY], 'aft', 'forbids nothing in this plot'],
    [[-90], 'aft', 'forbids all of this plot'],
    [[Number.NaN], 'aft', 'not known'],
    [[-90, 90], 'aft', 'not in this plot'],
  ] as const)('beyond the plot are told by what they forbid: %j, %s', (cgs, forbidden, said) => {
    expect(cgAbsent(cgs, forbidden, { from: 0, to: 40 })).toBe(said);
  });
});

describe('tail sizing with control limits', () => {
  const sizes = [0.2, 0.4, 0.6];
  const loading = { forward: 24, aft: 33 };
  const aft = { label: 'aft', cg: [20, 40, 60], forbidden: 'aft' as const };
  it('a limit that never binds changes nothing; one that begins to bind leaves the safe end only', () => {
    const never = {
      label: 'never',
      cg: [0, 0, 0].fill(Number.NEGATIVE_INFINITY),
      forbidden: 'forward' as const,
    };
    expect(smallestFittingTail({ sizes, limits: [aft, never], loading })).toBeCloseTo(0.33, 12);
    const later = { ...never, cg: [50, Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY] };
    expect(smallestFittingTail({ sizes, limits: [aft, later], loading })).toBe(0.4);
  });
  it('far limits do not widen the plot beyond reading', async () => {
    const far = { label: 'far', cg: [-900, -1900, -2900], forbidden: 'forward' as const };
    const limits = [aft, { label: 'too stable', cg: [5, 25, 45], forbidden: 'forward' as const }, far];
    const texts = await textsOf(
      tailSizing({ heading, sizeTitle: 'Tail volume', sizeDecimals: 2, sizes, limits, loading }),
    );
    expect(texts).toContain('far: forbids nothing in this plot');
    expect(texts.filter((text) => /^−\d{3}/.test(text))).toEqual([]);
  });
});

describe('MAC ruler', () => {
  it('conditions whose neutral points print alike share a number’s place; unknown ones have none', () => {
    expect(groupByPlace([41.2, 39.4, 41.21, Number.NaN])).toEqual([
      { at: 41.2, text: '1, 3' },
      { at: 39.4, text: '2' },
    ]);
  });
  it('says whether control sets the front of the window', () => {
    const controlLimit = { at: 23.1, name: 'nose-wheel lift-off' };
    const said = (from: number) => controlLimitText(rulerRow(0, { controlLimit, window: { from, to: 34 } }));
    expect(said(23.1)).toBe(', front set by nose-wheel lift-off');
    expect(said(25)).toBe('; control limit 23.1 % (nose-wheel lift-off)');
    expect(controlLimitText(rulerRow(0))).toBe('');
  });
  it('without the further marks says nothing of them', async () => {
    const texts = (await textsOf(macRuler({ heading, conditions: ['cruise'], rows: [rulerRow(0)] }))).join(
      '\n',
    );
    expect(texts).not.toMatch(/manoeuvre|stick free|control|cruise/);
  });
});

describe('loading diagram', () => {
  it('names every case in place or in the key', async () => {
    const said = (await textsOf(controlCharts['loading, twelve cases']!())).join('\n');
    for (let k = 0; k < 12; k++) expect(said).toContain(`loading case ${k} of`);
  });
  it('has the station of each place along the top', () => {
    // Station 2.304 m is 30 % of a chord of 1.18 m behind 1.95 m.
    const spec = JSON.stringify(loadingDiagram(usualLoading));
    const at = /\{"x":([\d.]+),"text":"2\.30"/.exec(spec)!;
    expect(1.95 + (Number(at[1]) / 100) * 1.18).toBeCloseTo(2.3, 5);
  });
});

describe('elevator to trim', () => {
  it('flattens as the CG goes aft and is level at the neutral point', () => {
    const { curves } = trimPanel('Clean', 52, 43, -2);
    const drops = curves.map(({ elevator }) => elevator[0]! - elevator[elevator.length - 1]!);
    expect(drops[0]).toBeGreaterThan(drops[1]!);
    expect(drops[2]).toBeCloseTo(0, 12);
  });
  it('draws the curves with up-elevator upward, as far as the plot goes', () => {
    const panel = trimPanel('Clean', 52, 43, -2, [22]);
    const spec = JSON.stringify(trim([panel]));
    const first = panel.curves[0]!.elevator[0]!;
    expect(spec).toContain(`{"x":52,"y":${Number(first.toPrecision(6))},"path":0}`);
    expect(spec).toContain('"domain":[-26.3,31.3]');
  });
  it('lists what has no room on the drawing', async () => {
    const texts = (await textsOf(controlCharts['trim, empty places']!())).join('\n');
    expect(texts).toContain('CG forward 22.0 %: no trim within this plot');
    expect(texts).toContain('travel 25° up');
    expect(texts).not.toContain('stall');
  });
});

describe('flight test', () => {
  const subtitle = (neutralPoint: typeof usualFlightTest.neutralPoint) =>
    textsOf(flightTestSlopes({ ...usualFlightTest, neutralPoint })).then((texts) => texts.join('\n'));
  it.each([
    [
      { at: 41, least: 38.2, greatest: 45.9 },
      'neutral point 41.0 % MAC, 95 % limits 38.2 to 45.9 %; predicted 43.0 %',
    ],
    [{ at: 41, least: 38.2 }, '95 % limits from 38.2 %, open aft'],
    [{ at: 41, greatest: 45.9 }, '95 % limits open forward, to 45.9 %'],
    [{ at: 41 }, 'open on both sides: the data do not fix it'],
    [null, 'The data give no stick-fixed neutral point; predicted 43.0 %'],
  ])('says what the data give: %j', async (neutralPoint, said) => {
    const texts = await subtitle(neutralPoint);
    expect(texts).toContain(said);
    expect(texts).toContain('approach the aft limit in small steps, under qualified supervision');
  });
  it('points to what lies beyond the plot', async () => {
    expect(await subtitle({ at: 300 })).toContain('found 300.0 % →');
    expect(await subtitle({ at: -200 })).toContain('← found −200.0 %');
  });
});

describe('what a study can say in these charts', () => {
  const hostile = [
    '<script>alert(1)</script>',
    `"][0]+alert(1)+["`,
    'שלום',
    '{"expr": "1/0"}',
    '✈️ & </text>',
  ];
  it.each(hostile)('%s stays text', async (name) => {
    const charts: readonly [ChartSpec, number][] = [
      [trim([trimPanel(name, 52, 43, -2)]), 1],
      [
        loadingDiagram({
          ...usualLoading,
          massTitle: name,
          cases: usualLoading.cases.map((each) => ({ ...each, label: name })),
          station: { ...usualLoading.station, title: name },
        }),
        6,
      ],
      [flightTestSlopes({ ...usualFlightTest, measuredTitle: name, slopeTitle: name }), 2],
      [
        macRuler({
          heading,
          conditions: [name],
          rows: [rulerRow(0, { neutralPoints: [40], controlLimit: { at: 10, name } })],
        }),
        0,
      ],
    ];
    for (const [spec, times] of charts) {
      const svg = await drawSvg(spec);
      expect(svg).not.toMatch(/<script/i);
      const texts = textsOfSvg(svg).map(({ text }) => text);
      expect(texts.filter((text) => text === name)).toHaveLength(times);
      expect(texts.some((text) => text.includes(name))).toBe(true);
    }
  });
});
