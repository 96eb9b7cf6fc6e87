import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { figureNames } from '../../src/figures/catalogue.ts';
import type { Dimension } from '../../src/figures/figure.ts';
import { figuresOfStudy } from '../../src/figures/study-figures.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import type { Aeroplane, TextChoices } from './aeroplane.ts';
import {
  aeroplanes,
  aeroplaneText,
  figure,
  figuresOf,
  figuresOfAeroplane,
  metric,
  otherUnits,
  writeIn,
} from './aeroplane.ts';

const runs = { seed: 1, numRuns: 60 };

/** How often each power of length enters a figure of that dimension. */
const powerOfLength: Partial<Record<Dimension, number>> = { length: 1, area: 2, volume: 3 };

/** Figures that follow from a loading; these aeroplanes give them as numbers. */
const given = ['mass', 'cg_above_datum'];

/** Dimensions of the figures that the program works out. */
const dimensions = new Map<string, Dimension>(
  [
    ...figuresOfStudy(
      readStudyText(aeroplaneText(fc.sample(aeroplanes, { seed: 1, numRuns: 1 })[0]), 'any.yaml'),
      {
        requirements: [],
        ranges: [],
        reasons: [],
        conditions: [],
      },
    ),
  ]
    .filter(([name]) => (figureNames as readonly string[]).includes(name) && !given.includes(name))
    .map(([name, { dimension }]) => [name, dimension]),
);

/** Stations along the datum, which move with it; every other figure does not. */
const stations = [
  'mac_leading_edge',
  'quarter_mac_station',
  'aerodynamic_centre_station',
  'tail_station',
  'neutral_point_station',
  'cg_forward_station',
  'cg_aft_station',
];

/** Compares all figures worked out; `expected` says what a figure should have become, or leaves it out. */
function compare(
  before: ReadonlyMap<string, number>,
  after: ReadonlyMap<string, number>,
  tolerance: number,
  expected: (name: string, value: number) => number | undefined = (_, value) => value,
): void {
  let compared = 0;
  for (const name of dimensions.keys()) {
    const value = before.get(name);
    if (value === undefined) continue;
    const wanted = expected(name, value);
    if (wanted === undefined) continue;
    compared++;
    const found = figure(after, name);
    if (Number.isNaN(wanted) && Number.isNaN(found)) continue;
    const off = Math.abs(found - wanted) / Math.max(1, Math.abs(wanted));
    if (!(off <= tolerance)) throw new Error(`${name} is ${found}, not ${wanted}`);
  }
  expect(compared).toBeGreaterThan(60);
}

/** The largest shortfall is a margin divided by 1 % of the MAC, so its rounding is a hundred times larger. */
const exceptShortfall = (name: string, value: number) => (name === 'largest_shortfall' ? undefined : value);

describe('laws of the whole calculation', () => {
  it('another datum moves the stations and nothing else', () => {
    fc.assert(
      fc.property(aeroplanes, fc.double({ min: -30, max: 60, noNaN: true }), (a, d) => {
        const moved: Aeroplane = {
          ...a,
          rootLeadingEdge: a.rootLeadingEdge + d,
          stations: a.stations.map(({ at, width }) => ({ at: at + d, width })),
        };
        compare(figuresOfAeroplane(a), figuresOfAeroplane(moved), 1e-9, (name, value) =>
          stations.includes(name) ? value + d : value,
        );
      }),
      runs,
    );
  });

  it('another datum moves nothing relative for a tail and a CG given by stations', () => {
    const placed = (a: Aeroplane, station: number, cg: number, d: number): TextChoices => ({
      tailSize: `area: ${a.tailArea} m^2, station: ${station + d} m`,
      cg: `{as: station, forward: ${cg + d} m, aft: ${cg + 0.2 + d} m}`,
    });
    fc.assert(
      fc.property(aeroplanes, fc.double({ min: -30, max: 60, noNaN: true }), (a, d) => {
        const first = figuresOfAeroplane(a);
        const station = figure(first, 'tail_station');
        const cg = figure(first, 'quarter_mac_station');
        const moved: Aeroplane = {
          ...a,
          rootLeadingEdge: a.rootLeadingEdge + d,
          stations: a.stations.map(({ at, width }) => ({ at: at + d, width })),
        };
        compare(
          figuresOfAeroplane(a, placed(a, station, cg, 0)),
          figuresOfAeroplane(moved, placed(a, station, cg, d)),
          1e-9,
          (name, value) => (stations.includes(name) ? value + d : value),
        );
      }),
      runs,
    );
  });

  it('a higher datum for wing and CG moves nothing', () => {
    fc.assert(
      fc.property(aeroplanes, fc.double({ min: -3, max: 3, noNaN: true }), (a, d) => {
        const raised = { ...a, wingHeight: a.wingHeight + d, cgHeight: a.cgHeight + d };
        compare(figuresOfAeroplane(a), figuresOfAeroplane(raised), 1e-12);
      }),
      runs,
    );
  });

  it('all lengths k times as long, with the wing loading kept, leave everything relative alone', () => {
    fc.assert(
      fc.property(aeroplanes, fc.double({ min: 0.4, max: 2.5, noNaN: true }), (a, k) => {
        const scaled: Aeroplane = {
          ...a,
          mass: a.mass * k ** 2,
          area: a.area * k ** 2,
          span: a.span * k,
          rootLeadingEdge: a.rootLeadingEdge * k,
          wingHeight: a.wingHeight * k,
          tailArea: a.tailArea * k ** 2,
          tailArm: a.tailArm * k,
          tailHeight: a.tailHeight * k,
          stations: a.stations.map(({ at, width }) => ({ at: at * k, width: width * k })),
          cgHeight: a.cgHeight * k,
        };
        const factor = (name: string) => k ** (powerOfLength[dimensions.get(name) ?? 'ratio'] ?? 0);
        compare(
          figuresOfAeroplane(a),
          figuresOfAeroplane(scaled),
          1e-10,
          (name, value) => value * factor(name),
        );
      }),
      runs,
    );
  });

  it('other units in the text change nothing', () => {
    fc.assert(
      fc.property(aeroplanes, fc.constantFrom(...otherUnits), (a, units) => {
        compare(figuresOfAeroplane(a), figuresOfAeroplane(a, { units }), 1e-12, exceptShortfall);
      }),
      runs,
    );
  });

  it('the margin falls one for one as the CG moves aft, and nothing else moves', () => {
    fc.assert(
      fc.property(aeroplanes, fc.double({ min: -0.1, max: 0.1, noNaN: true }), (a, d) => {
        const before = figuresOfAeroplane(a);
        const after = figuresOfAeroplane({ ...a, cgForward: a.cgForward + d, cgAft: a.cgAft + d });
        for (const end of ['forward', 'aft']) {
          const fall = figure(before, `static_margin_${end}`) - figure(after, `static_margin_${end}`);
          expect(fall).toBeCloseTo(d, 12);
        }
        expect(figure(after, 'neutral_point')).toBe(figure(before, 'neutral_point'));
      }),
      runs,
    );
  });

  it('a loading range written in another kind is the same range', () => {
    fc.assert(
      fc.property(aeroplanes, (a) => {
        const before = figuresOfAeroplane(a);
        const station = (end: string) => `${figure(before, `cg_${end}_station`)} m`;
        const behind = (end: string) => `${figure(before, `cg_${end}`) * figure(before, 'mac')} m`;
        const height = `above_datum: ${a.cgHeight} m`;
        for (const cg of [
          `{as: station, forward: ${station('forward')}, aft: ${station('aft')}, ${height}}`,
          `{as: behind_mac_leading_edge, forward: ${behind('forward')}, aft: ${behind('aft')}, ${height}}`,
          `{forward: {as: station, at: ${station('forward')}}, aft: {as: percent_mac, at: ${a.cgAft}}, ${height}}`,
        ]) {
          compare(before, figuresOfAeroplane(a, { cg }), 1e-12, exceptShortfall);
        }
      }),
      runs,
    );
  });

  it('the build-up adds up to the neutral point, and the shares to the lift slope', () => {
    fc.assert(
      fc.property(aeroplanes, (a) => {
        const all = figuresOfAeroplane(a);
        const of = (name: string) => figure(all, name);
        const sum = ['wing', 'tail', 'body', 'height'].reduce(
          (total, part) => total + of(`neutral_point_${part}`),
          0,
        );
        expect(of('neutral_point')).toBeCloseTo(sum, 14);
        expect(of('lift_slope')).toBeCloseTo(of('wing_body_lift_slope') + of('tail_lift_share'), 12);
        // moments of both shares and of the body about the neutral point cancel (exact, statics)
        const tailPlace =
          0.25 +
          a.tailArm / of('mac') +
          ((of('tail_aerodynamic_centre') - 0.25) * of('tail_mac')) / of('mac');
        const hn = of('neutral_point') - of('neutral_point_height');
        const moment =
          of('wing_body_lift_slope') * (hn - of('wing_aerodynamic_centre')) +
          of('tail_lift_share') * (hn - tailPlace) +
          of('body_moment_slope');
        expect(moment).toBeCloseTo(0, 10);
        expect(of('cg_window_aft')).toBeCloseTo(of('neutral_point') - 0.05, 14);
        expect(of('cg_window_forward')).toBeCloseTo(of('neutral_point') - 0.2, 14);
      }),
      runs,
    );
  });

  it('more tail area moves the neutral point aft', () => {
    fc.assert(
      fc.property(aeroplanes, fc.double({ min: 1.01, max: 1.5, noNaN: true }), (a, more) => {
        const before = figuresOfAeroplane(a);
        const after = figuresOfAeroplane({ ...a, tailArea: more * a.tailArea });
        expect(figure(after, 'neutral_point')).toBeGreaterThan(figure(before, 'neutral_point'));
        expect(figure(after, 'tail_volume')).toBeCloseTo(more * figure(before, 'tail_volume'), 12);
      }),
      runs,
    );
  });

  it('a narrower body moves the neutral point aft, no body still further', () => {
    fc.assert(
      fc.property(aeroplanes, (a) => {
        const slim = { ...a, stations: a.stations.map(({ at, width }) => ({ at, width: 0.7 * width })) };
        const [wide, narrow, none] = [a, slim, a].map((one, k) =>
          figuresOfAeroplane(one, k === 2 ? { body: 'none' } : {}),
        );
        expect(figure(narrow, 'neutral_point_body')).toBeGreaterThan(figure(wide, 'neutral_point_body'));
        expect(figure(narrow, 'neutral_point_body')).toBeLessThan(0);
        expect(figure(none, 'neutral_point_body')).toBe(0);
        // w² everywhere, exactly
        expect(figure(narrow, 'body_moment_slope') / figure(wide, 'body_moment_slope')).toBeCloseTo(0.49, 10);
      }),
      runs,
    );
  });
});

describe('panels', () => {
  const write = writeIn(metric);

  /** The trapezoid as panels that meet at the given shares of the half span, swept along `kind`. */
  function asPanels(
    a: Aeroplane,
    cuts: readonly number[],
    kind: 'quarter_chord' | 'leading_edge',
    fractions: boolean,
  ) {
    const edges = [0, ...cuts, 1];
    const chordAt = (share: number) => 1 - (1 - a.taper) * share;
    const aspectRatio = a.span ** 2 / a.area;
    const tangent =
      Math.tan(a.sweep) + (kind === 'leading_edge' ? (1 / aspectRatio) * ((1 - a.taper) / (1 + a.taper)) : 0);
    const panels = edges.slice(1).map((edge, k) => {
      const share = edge - edges[k];
      const width = fractions ? `span_fraction: ${share}` : `width: ${(share * a.span) / 2} m`;
      const taper = chordAt(edge) / chordAt(edges[k]);
      return `{${width}, taper: ${taper}, sweep_${kind}: ${Math.atan(tangent)} rad, dihedral: ${a.dihedral} rad}`;
    });
    const size = fractions
      ? `area: ${write('area', a.area)}, span: ${write('length', a.span)}`
      : `area: ${write('area', a.area)}`;
    return { wing: `${size}, panels: [${panels.join(', ')}]` };
  }

  const kinds = fc.constantFrom('quarter_chord' as const, 'leading_edge' as const);
  const cuts = fc
    .uniqueArray(fc.integer({ min: 1, max: 19 }), { maxLength: 4 })
    .map((list) => list.sort((p, q) => p - q).map((n) => n / 20));

  it('a trapezoid written as one or several panels is the same wing', () => {
    fc.assert(
      fc.property(aeroplanes, cuts, kinds, fc.boolean(), (a, at, kind, fractions) => {
        compare(
          figuresOfAeroplane(a),
          figuresOfAeroplane(a, asPanels(a, at, kind, fractions)),
          1e-10,
          (name, value) => (name === 'outside_fitted_range' ? undefined : value),
        );
      }),
      runs,
    );
  });

  it('a leading-edge sweep is the quarter-chord sweep that belongs to it', () => {
    fc.assert(
      fc.property(aeroplanes, (a) => {
        const aspectRatio = a.span ** 2 / a.area;
        const leading = Math.atan(Math.tan(a.sweep) + (1 / aspectRatio) * ((1 - a.taper) / (1 + a.taper)));
        const wing = `area: ${a.area} m^2, span: ${a.span} m, taper: ${a.taper}, sweep_leading_edge: ${leading} rad, dihedral: ${a.dihedral} rad`;
        compare(figuresOfAeroplane(a), figuresOfAeroplane(a, { wing }), 1e-11);
      }),
      runs,
    );
  });

  it('a rectangular wing as panels is within the rounding of its equivalent taper', () => {
    const [a] = fc.sample(aeroplanes, { seed: 4, numRuns: 1 }).map((one) => ({ ...one, taper: 1 }));
    const [whole, split] = [{}, asPanels(a, [0.3], 'quarter_chord', false)].map((choices) =>
      figuresOfAeroplane(a, choices),
    );
    expect(figure(split, 'neutral_point')).toBeCloseTo(figure(whole, 'neutral_point'), 7);
  });

  it('a cranked panel split in two is the same wing', () => {
    const wingOf = (inner: string) =>
      `root_chord: 1.4 m, panels: [${inner}, {width: 1.7 m, taper: 0.55, sweep_leading_edge: 6 deg, dihedral: 5 deg}]`;
    const split = fc.double({ min: 0.05, max: 0.95, noNaN: true });
    fc.assert(
      fc.property(aeroplanes, split, (a, share) => {
        const fly = 'sweep_leading_edge: 2 deg, dihedral: 3 deg';
        const chord = 1 - 0.2 * share;
        const one = `{width: 2.6 m, taper: 0.8, ${fly}}`;
        const two = `{width: ${2.6 * share} m, taper: ${chord}, ${fly}}, {width: ${2.6 * (1 - share)} m, taper: ${0.8 / chord}, ${fly}}`;
        const far = { ...a, tailArm: 5, stations: [...a.stations.slice(0, -1), { at: 14, width: 0.2 }] };
        compare(
          figuresOfAeroplane(far, { wing: wingOf(one) }),
          figuresOfAeroplane(far, { wing: wingOf(two) }),
          1e-10,
        );
      }),
      runs,
    );
  });
});

describe('sizes of the wing', () => {
  it('every pair of sizes gives the same wing', () => {
    fc.assert(
      fc.property(aeroplanes, (a) => {
        const before = figuresOfAeroplane(a);
        const sizes = {
          area: `area: ${a.area} m^2`,
          span: `span: ${a.span} m`,
          aspect_ratio: `aspect_ratio: ${figure(before, 'wing_aspect_ratio')}`,
          root_chord: `root_chord: ${figure(before, 'wing_root_chord')} m`,
        };
        const rest = `taper: ${a.taper}, sweep_quarter_chord: ${a.sweep} rad, dihedral: ${a.dihedral} rad`;
        const texts = Object.values(sizes);
        for (const first of texts) {
          for (const second of texts) {
            if (first >= second) continue;
            compare(before, figuresOfAeroplane(a, { wing: `${first}, ${second}, ${rest}` }), 1e-11);
          }
        }
      }),
      { seed: 2, numRuns: 25 },
    );
  });

  it('every pair of the tail’s sizes gives the same tail', () => {
    fc.assert(
      fc.property(aeroplanes, (a) => {
        const before = figuresOfAeroplane(a);
        for (const size of [`area: ${a.tailArea} m^2`, `volume: ${figure(before, 'tail_volume')}`]) {
          for (const place of [`arm: ${a.tailArm} m`, `station: ${figure(before, 'tail_station')} m`]) {
            compare(before, figuresOfAeroplane(a, { tailSize: `${size}, ${place}` }), 1e-11);
          }
        }
        const text = aeroplaneText(a);
        const bySpan = text.replace(
          `aspect_ratio: ${a.tailAspectRatio}`,
          `span: ${figure(before, 'tail_span')} m`,
        );
        expect(bySpan).not.toBe(text);
        compare(before, figuresOf(readStudyText(bySpan, 'span.yaml')), 1e-11);
      }),
      { seed: 2, numRuns: 25 },
    );
  });
});
