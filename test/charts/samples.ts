/** Invented data for the charts: usual, small and awkward. */
import {
  type AxisMargins,
  type BuildUp,
  type CgLimit,
  type ChartHeading,
  type ChartSpec,
  carpetPlot,
  type MacRulerRow,
  macRuler,
  marginAlongAxis,
  neutralPointBuildUp,
  type PlanOutline,
  planView,
  regionMap,
  type SlicePick,
  sliceChart,
  tailSizing,
} from '../../src/charts/index.ts';

export const heading: ChartHeading = {
  title: 'Span and tail arm',
  study: 'Two-seat coastal tourer, wing and tail',
  question: 'Which span and tail arm keep the band over the whole loading range?',
  date: '2026-12-01',
  program: 'aftlimit 0.1.0',
};
/** A title of 168 letters, and names as they stand in a study file. */
export const longHeading: ChartHeading = {
  ...heading,
  title:
    'Over wing.panels[2].sweep_leading_edge and tail.above_wing_root_chord, said at such a length that no picture is wide enough to hold it in two lines of the size that titles have',
  study:
    'A study whose author wanted its title to say everything that could be said about it, and then some more, and more',
};
export const longName = 'wing.panels[2].sweep_leading_edge [°]';

export function steps(count: number, from: number, to: number): number[] {
  return Array.from({ length: count }, (_, i) => from + ((to - from) * i) / Math.max(1, count - 1));
}
function grid(
  xs: readonly number[],
  ys: readonly number[],
  value: (x: number, y: number) => number,
): number[] {
  return ys.flatMap((y) => xs.map((x) => value(x, y)));
}

export function region(
  nx: number,
  ny: number,
  share: (i: number, j: number) => number,
  margin: (i: number, j: number) => number,
  labels: (i: number) => string = (i) => (8 + 0.25 * i).toFixed(2),
  over: ChartHeading = heading,
): ChartSpec {
  const [is, js] = [steps(nx, 0, nx - 1), steps(ny, 0, ny - 1)];
  return regionMap({
    heading: over,
    x: { title: over === heading ? 'Span [m]' : longName, labels: is.map(labels) },
    y: { title: 'Tail arm [m]', labels: js.map((j) => (3.6 + 0.1 * j).toFixed(1)) },
    combinations: 326400,
    feasibleShare: grid(is, js, share),
    bestAftMargin: grid(is, js, margin),
  });
}

type Field = (x: number, y: number) => number;
/** Aft margin [% MAC] over span [m] and tail arm [m]; made up, bent like a real one. */
export const aftMargin: Field = (x, y) => -6 + 9 * (y - 3.6) + 2.2 * (x - 8) - 0.25 * (x - 10) ** 2;

export function slice(
  count: number,
  margin: Field,
  requirements: readonly (readonly [string, Field])[],
  picks: readonly SlicePick[] = [],
  over: ChartHeading = heading,
): ChartSpec {
  const [xs, ys] = [steps(count, 8, 12), steps(count, 3.6, 5.2)];
  return sliceChart({
    heading: over,
    x: { title: over === heading ? 'Span [m]' : longName, values: xs },
    y: { title: 'Tail arm [m]', values: ys },
    aftMargin: grid(xs, ys, margin),
    requirements: requirements.map(([name, slack]) => ({ name, slack: grid(xs, ys, slack) })),
    baseline: { x: 9.4, y: 4.3 },
    picks,
  });
}

export function axis(
  title: string,
  values: readonly number[] | readonly string[],
  rise: number,
): AxisMargins {
  const at = (start: number) => values.map((_, i) => start + rise * i);
  return {
    title,
    values,
    aft: at(4),
    forward: at(13),
    aftRange: { least: at(-6), greatest: at(15) },
    forwardRange: { least: at(2), greatest: at(25) },
  };
}

const sizes = steps(5, 0.25, 0.65);
const usualLimits: readonly CgLimit[] = [
  { label: 'aft: neutral point − 5 %', cg: sizes.map((v) => 8 + 70 * v), forbidden: 'aft' },
  { label: 'too stable: neutral point − 20 %', cg: sizes.map((v) => -7 + 70 * v), forbidden: 'forward' },
];
export function tail(
  loading: { forward: number; aft: number },
  limits: readonly CgLimit[] = usualLimits,
  over: ChartHeading = heading,
  sizeTitle = 'Tail volume',
): ChartSpec {
  return tailSizing({ heading: over, sizeTitle, sizeDecimals: 3, sizes, limits, loading, baseline: 0.42 });
}
const controlLimits: readonly CgLimit[] = [
  ...usualLimits,
  {
    label: 'stall, flaps down, in ground effect: elevator travel',
    cg: sizes.map((v) => 38 - 60 * v),
    forbidden: 'forward',
  },
  { label: 'nose-wheel lift-off', cg: sizes.map((v) => 30 - 30 * v), forbidden: 'forward' },
];

const detail = 'span 9.50 m, taper 0.60, sweep 0.0°, tail arm 4.30 m, tail volume 0.42';
export function rulerRow(index: number, other: Partial<MacRulerRow> = {}): MacRulerRow {
  return {
    label: `#${123456 + 77 * index}`,
    detail,
    cg: { forward: 24, aft: 33 },
    window: { from: 22.4 + index / 3, to: 36.2 - index / 4 },
    neutralPoint: 41.2 - index,
    aerodynamicCentre: 25.4,
    ...other,
  };
}

export function buildUp(
  index: number,
  [wing, tailShare, body, vertical]: readonly [number, number, number, number],
): BuildUp {
  return {
    label: `#${123456 + index}`,
    detail,
    steps: [
      { name: 'wing', change: wing },
      { name: 'tail', change: tailShare },
      { name: 'body', change: body },
      { name: 'vertical position', change: vertical },
    ],
    neutralPoint: wing + tailShare + body + vertical,
  };
}

export function carpet(na: number, nb: number, figure: Field, over: ChartHeading = heading): ChartSpec {
  const [as, bs] = [steps(na, 8, 12), steps(nb, 3.6, 5.2)];
  return carpetPlot({
    heading: over,
    a: { title: over === heading ? 'Span [m]' : longName, labels: as.map((a) => a.toFixed(2)) },
    b: { title: 'Tail arm [m]', labels: bs.map((b) => b.toFixed(2)) },
    figureTitle: 'Static margin, CG aft [% MAC]',
    values: as.flatMap((a) => bs.map((b) => figure(a, b))),
  });
}

export function outline(index: number, span: number, withBody: boolean): PlanOutline {
  return {
    label: `#${123456 + 77 * index}`,
    detail,
    wing: [
      { station: 2.1, aside: 0 },
      { station: 2.3, aside: span / 2 },
      { station: 3.1, aside: span / 2 },
      { station: 3.5, aside: 0 },
    ],
    tail: [
      { station: 6.6, aside: 0 },
      { station: 6.75, aside: 1.5 },
      { station: 7.2, aside: 1.5 },
      { station: 7.4, aside: 0 },
    ],
    ...(withBody
      ? {
          body: [
            { station: 0.2, aside: 0.1 },
            { station: 1.5, aside: 0.5 },
            { station: 7.4, aside: 0.05 },
          ],
        }
      : {}),
    mac: { aside: 2.1, leadingEdge: 2.19, length: 1.11 },
    aerodynamicCentre: 2.5,
    neutralPoint: 2.75,
    cg: { forward: 2.48, aft: 2.6 },
  };
}

const bandRequirements: readonly (readonly [string, Field])[] = [
  ['Static margin at least 5 % MAC', (x, y) => aftMargin(x, y) - 5],
  ['Static margin at most 20 % MAC', (x, y) => 13 - aftMargin(x, y)],
  ['Tail span at most 3.4 m', (x, y) => 11.2 - x + 0.2 * (y - 4)],
];

/** Every chart at usual and at awkward data, by name. */
export const everyChart: Readonly<Record<string, () => ChartSpec>> = {
  'region, 17 by 17': () =>
    region(
      17,
      17,
      (i, j) => Math.max(0, Math.min(1, (i + j - 8) / 24)),
      (i, j) => 0.6 * i + 0.9 * j - 2,
    ),
  'region, 2 by 2, long names': () =>
    region(
      2,
      2,
      (i, j) => 0.005 * i * j,
      (i, j) => i + j,
      (i) => `2${i}–3${i} %`,
      longHeading,
    ),
  'region, 40 by 40': () =>
    region(
      40,
      40,
      (i, j) => Math.max(0, (i * j) / 1600 - 0.1),
      (i, j) => (j === 3 ? Number.NaN : i - 22),
    ),
  'region, none feasible': () =>
    region(
      6,
      9,
      () => 0,
      (i, j) => -i - j,
    ),
  'region, all feasible': () =>
    region(
      6,
      9,
      () => 1,
      () => 7,
    ),
  'region, long cell names': () =>
    region(
      5,
      12,
      (i) => i / 5,
      (i, j) => i - j,
      (i) => `forward 2${i} %, aft 3${i} %, ballast in the nose`,
    ),
  'slice, usual': () =>
    slice(61, aftMargin, bandRequirements, [
      { x: 10, y: 4.8, label: '#123456' },
      { x: 10, y: 4.8, label: '#123457' },
      { x: 10, y: 4.8, label: '#3' },
      { x: 10.5, y: 4.5, label: '#88199' },
    ]),
  'slice, steep, twelve picks': () =>
    slice(
      61,
      (x, y) => -60 + 90 * (y - 3.6) + 30 * Math.sin(2 * x),
      [
        [
          `A requirement with ${'a very long '.repeat(12)}name`,
          (x, y) => Math.hypot(x - 10, 3 * (y - 4.4)) - 1,
        ],
      ],
      steps(12, 9, 10.1).map((x, k) => ({ x, y: 4.4, label: `#${1000 + k}` })),
      longHeading,
    ),
  'slice, flat, failed everywhere': () =>
    slice(11, () => -4, [
      ['Static margin', () => -9],
      ['Tail span', () => 1],
    ]),
  'slice, holes and empty places': () =>
    slice(41, (x, y) => (x > 11 && y > 4.8 ? Number.NaN : aftMargin(x, y)), [
      ['outside an island', (x, y) => Math.hypot(x - 10, 3 * (y - 4.4)) - 1],
      ['inside a ring', (x, y) => 2 - Math.hypot(x - 10, 3 * (y - 4.4))],
      ['empty in a corner', (x, y) => (x > 11 && y > 4.8 ? Number.NaN : x + y - 11.9)],
    ]),
  'along, six axes': () =>
    marginAlongAxis({
      heading,
      band: { lower: 5, upper: 20 },
      axes: [
        axis('Span [m]', steps(17, 8, 12), 0.4),
        axis('Taper', [0.4, 0.5, 0.6, 0.8, 1], -1),
        axis('Sweep, quarter chord [°]', steps(5, -4, 8), 1),
        axis('Tail arm [m]', steps(17, 3.6, 5.2), 0.4),
        axis('Tail volume', steps(9, 0.3, 0.6), 0.5),
        axis('CG range [% MAC]', ['22–31', '24–33', '26–36'], -3),
      ],
    }),
  'along, one axis of texts, thin band': () =>
    marginAlongAxis({
      heading: longHeading,
      band: { lower: 5, upper: 6 },
      axes: [
        {
          ...axis(
            `${longName} + ${longName}`,
            steps(12, 0, 11).map((i) => `${i}°, ${i + 2}°, a text of some length`),
            -2,
          ),
          aft: steps(12, 1, 2).map((value, i) => (i === 4 ? Number.NaN : value)),
        },
      ],
    }),
  'along, single value': () =>
    marginAlongAxis({
      heading,
      band: {},
      axes: [axis('Span [m]', [9], 0), axis('Tail arm [m]', steps(40, 3, 5), -0.6)],
    }),
  'tail, usual': () => tail({ forward: 24, aft: 33 }),
  'tail, control limits': () => tail({ forward: 20, aft: 29 }, controlLimits),
  'tail, none fits': () =>
    tail({ forward: 10, aft: 39 }, usualLimits, longHeading, 'tail.area of a very long name indeed [m²]'),
  'ruler, twelve': () => macRuler({ heading, rows: steps(12, 0, 11).map((i) => rulerRow(i)) }),
  'ruler, awkward': () =>
    macRuler({
      heading: longHeading,
      rows: [
        rulerRow(0, { window: { from: 40, to: 31 } }),
        rulerRow(1, { neutralPoint: 112, window: { from: 80, to: 99 } }),
        rulerRow(2, {
          cg: { forward: -8, aft: 2 },
          aerodynamicCentre: 1,
          neutralPoint: 3,
          window: { to: 1 },
        }),
        rulerRow(3, { window: { from: 22 }, detail: 'x'.repeat(200) }),
        rulerRow(5, { cg: { forward: Number.NaN, aft: Number.NaN } }),
        rulerRow(4, {
          neutralPoint: Number.NaN,
          window: { from: Number.NaN, to: 3 },
          cg: { forward: 25, aft: 25 },
        }),
      ],
    }),
  'build-up, twelve': () =>
    neutralPointBuildUp({
      heading,
      combinations: steps(12, 0, 11).map((i) => buildUp(i, [25.4, 24 - i / 2, -7.9, -1.2])),
    }),
  'build-up, one, negative': () =>
    neutralPointBuildUp({ heading: longHeading, combinations: [buildUp(0, [-12, 3, -22, 0.01])] }),
  'carpet, usual': () => carpet(9, 9, aftMargin),
  'carpet, 40 by 40': () =>
    carpet(40, 40, (a, b) => -9 * (b - 3.6) + 2.2 * (a - 8) + (a - 8) * (b - 3.6), longHeading),
  'carpet, 2 by 2': () => carpet(2, 2, (a) => a),
  'carpet, flat': () => carpet(5, 5, () => 0),
  'carpet, with an empty place': () => carpet(4, 4, (a, b) => (a === 8 && b === 3.6 ? Number.NaN : a * b)),
  'plan, one': () => planView({ heading, unit: 'm', outlines: [outline(0, 9.4, true)] }),
  'plan, twelve': () =>
    planView({
      heading: longHeading,
      unit: 'ft',
      outlines: steps(12, 0, 11).map((i) => outline(i, 9 + 0.8 * i, i % 2 === 0)),
    }),
};
