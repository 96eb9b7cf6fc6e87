import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layOut } from '../../src/engine/lay-out.ts';
import { evaluateSlice } from '../../src/engine/slice.ts';
import { readStudyText } from '../../src/read-study-file.ts';
import { baselinePlaces, buildStages } from '../../src/stages/build-stages.ts';
import { loadingPaths } from '../../src/stages/loading-paths.ts';
import type { Study } from '../../src/study/study.ts';
import type { StudyParts } from '../studies.ts';
import { replaced, studyText } from '../studies.ts';
import { figure, figuresOf } from './aeroplane.ts';

const loading = `empty: {mass: 372 kg, station: 2.06 m, height: 0.1 m}
items:
  pilot: {mass: 82 kg, station: 2.21 m, height: 0.05 m}
  passenger: {mass: 77 kg, station: 2.24 m, height: 0.06 m}
  rear_tank: {mass: 31 kg, station: 3.05 m, height: -0.1 m, burns: true}
  nose_tank: {mass: 43 kg, station: 1.15 m, height: 0.2 m, burns: true}
  baggage: {mass: 18 kg, station: 3.2 m, height: 0.15 m}
cases:
  solo: [pilot]
  two_up: [pilot, passenger, rear_tank, nose_tank]
  touring: [pilot, passenger, nose_tank, rear_tank, baggage]`;

/** The test aeroplane with a loading in place of its CG range. */
function loadedStudy(text: string = loading, changed: StudyParts = {}, mass = false): Study {
  const study = studyText({ cg: '', ...changed })
    .replace(/^ {2}cg: $/m, `  loading:\n${text.replaceAll(/^/gm, '    ')}`)
    .replace(/^ {2}mass: .*\n/m, mass ? '  mass: 655 kg\n' : '');
  return readStudyText(study, 'loaded.yaml');
}

interface PlainItem {
  readonly mass: number;
  readonly station: number;
  readonly height: number;
  readonly burns?: boolean;
}

const empty = { mass: 372, station: 2.06, height: 0.1 };
const items: Record<string, PlainItem> = {
  pilot: { mass: 82, station: 2.21, height: 0.05 },
  passenger: { mass: 77, station: 2.24, height: 0.06 },
  rear_tank: { mass: 31, station: 3.05, height: -0.1, burns: true },
  nose_tank: { mass: 43, station: 1.15, height: 0.2, burns: true },
  baggage: { mass: 18, station: 3.2, height: 0.15 },
};
const cases: Record<string, string[]> = {
  solo: ['pilot'],
  two_up: ['pilot', 'passenger', 'rear_tank', 'nose_tank'],
  touring: ['pilot', 'passenger', 'nose_tank', 'rear_tank', 'baggage'],
};

/** CG of the empty aeroplane with a list of items. */
function plainCg(aboard: readonly PlainItem[], key: 'station' | 'height' = 'station'): number {
  const all = [empty, ...aboard];
  const mass = all.reduce((sum, item) => sum + item.mass, 0);
  return all.reduce((sum, item) => sum + item.mass * item[key], 0) / mass;
}

/** CG of every case at every break, one after the other. */
function plainTravel(): { readonly name: string; readonly cg: number }[] {
  return Object.entries(cases).flatMap(([name, names]) => {
    const left = names.map((item) => items[item]);
    const places = [{ name, cg: plainCg(left) }];
    for (const item of names.map((one) => items[one]).filter((one) => one.burns)) {
      left.splice(left.indexOf(item), 1);
      places.push({ name, cg: plainCg(left) });
    }
    return places;
  });
}

const close = 12;

describe('travel of the CG over loading cases', () => {
  const figures = figuresOf(loadedStudy());

  it('is that of a plain loop over every break', () => {
    const travel = plainTravel();
    const foremost = travel.reduce((least, one) => (one.cg < least.cg ? one : least));
    const aftmost = travel.reduce((most, one) => (one.cg > most.cg ? one : most));
    expect(travel).toHaveLength(1 + 3 + 3);
    expect(figure(figures, 'cg_forward_station')).toBeCloseTo(foremost.cg, close);
    expect(figure(figures, 'cg_aft_station')).toBeCloseTo(aftmost.cg, close);
    const names = Object.keys(cases);
    expect(names[figure(figures, 'cg_forward_case')]).toBe(foremost.name);
    expect(names[figure(figures, 'cg_aft_case')]).toBe(aftmost.name);
    expect(foremost.name).not.toBe(aftmost.name);
  });

  it('gives % MAC and margins like a stated range', () => {
    const stated = figuresOf(
      readStudyText(
        studyText({
          mass: `${figure(figures, 'mass')} kg`,
          cg: `{as: station, forward: ${figure(figures, 'cg_forward_station')} m, aft: ${figure(figures, 'cg_aft_station')} m, above_datum: ${figure(figures, 'cg_above_datum')} m}`,
        }),
        'stated.yaml',
      ),
    );
    for (const name of [
      'cg_forward',
      'cg_aft',
      'static_margin_forward',
      'static_margin_aft',
      'neutral_point',
    ])
      expect(figure(figures, name)).toBeCloseTo(figure(stated, name), close);
  });

  it('names the cases in the figures’ labels', () => {
    const { figures: known, columns } = layOut(loadedStudy());
    expect(known.get('cg_aft_case')?.labels).toEqual(['solo', 'two_up', 'touring']);
    const names = columns.map((column) => column.name);
    expect(names).toEqual(expect.arrayContaining(['mass_kg', 'cg_above_datum_m', 'cg_forward_case']));
  });

  it('takes mass and height of the heaviest case, unless the mass is given', () => {
    const aboard = cases.touring.map((name) => items[name]);
    expect(figure(figures, 'mass')).toBeCloseTo(372 + 82 + 77 + 31 + 43 + 18, close);
    expect(figure(figures, 'cg_above_datum')).toBeCloseTo(plainCg(aboard, 'height'), close);
    const given = figuresOf(loadedStudy(loading, {}, true));
    expect(figure(given, 'mass')).toBe(655);
    expect(figure(given, 'lift_coefficient')).toBeGreaterThan(figure(figures, 'lift_coefficient'));
  });

  it('leaves the height out where one mass has none', () => {
    const study = loadedStudy(loading.replace(', height: 0.15 m', ''));
    expect(figuresOf(study).has('cg_above_datum')).toBe(false);
    expect(figure(figuresOf(study), 'neutral_point_height')).toBe(0);
  });

  it('depends on the order of burning only through the breaks', () => {
    const order = (first: string, second: string) =>
      figuresOf(
        loadedStudy(
          loading
            .replace(/ {2}baggage.*\n/, '')
            .replace(/cases:.*$/s, `cases:\n  trip: [pilot, passenger, ${first}, ${second}]`),
        ),
      );
    const rearFirst = order('rear_tank', 'nose_tank');
    const noseFirst = order('nose_tank', 'rear_tank');
    const { pilot, passenger, rear_tank: rear, nose_tank: nose } = items;
    // Rear tank first: foremost with the nose tank alone; nose tank first: aftmost with the rear tank alone.
    expect(figure(rearFirst, 'cg_forward_station')).toBeCloseTo(plainCg([pilot, passenger, nose]), close);
    expect(figure(rearFirst, 'cg_aft_station')).toBeCloseTo(plainCg([pilot, passenger]), close);
    expect(figure(noseFirst, 'cg_aft_station')).toBeCloseTo(plainCg([pilot, passenger, rear]), close);
    expect(figure(noseFirst, 'cg_forward_station')).toBeCloseTo(
      plainCg([pilot, passenger, rear, nose]),
      close,
    );
  });

  it('is one point for a case that burns nothing', () => {
    const study = loadedStudy(
      loading
        .replaceAll(', burns: true', '')
        .replace(/cases:.*$/s, `cases:\n  trip: [${Object.keys(items)}]`),
    );
    const point = figuresOf(study);
    expect(figure(point, 'cg_forward_station')).toBe(figure(point, 'cg_aft_station'));
    expect(figure(point, 'cg_aft_station')).toBeCloseTo(plainCg(Object.values(items)), close);
    expect(figure(point, 'static_margin_forward')).toBe(figure(point, 'static_margin_aft'));
  });

  it('lies between the stations of the masses, whatever they are', () => {
    const kilograms = fc.double({ min: 1, max: 200, noNaN: true });
    const metres = fc.double({ min: -1, max: 6, noNaN: true });
    const masses = fc.array(fc.record({ mass: kilograms, at: metres, burns: fc.boolean() }), {
      minLength: 2,
      maxLength: 8,
    });
    fc.assert(
      fc.property(masses, ([first, ...rest]) => {
        const lines = rest.map(
          ({ mass, at, burns }, k) => `  item_${k}: {mass: ${mass} kg, station: ${at} m, burns: ${burns}}`,
        );
        const figures = figuresOf(
          loadedStudy(
            `empty: {mass: ${first.mass} kg, station: ${first.at} m}\nitems:\n${lines.join('\n')}\ncases:\n  all: [${rest.map((_, k) => `item_${k}`)}]`,
          ),
        );
        const places = [first, ...rest].map(({ at }) => at);
        const [forward, aft] = [figure(figures, 'cg_forward_station'), figure(figures, 'cg_aft_station')];
        expect(forward).toBeGreaterThanOrEqual(Math.min(...places) - 1e-9);
        expect(aft).toBeLessThanOrEqual(Math.max(...places) + 1e-9);
        expect(forward).toBeLessThanOrEqual(aft);
        // Order of burning settles the breaks between; the fullest and the emptiest stay.
        const left = rest.filter(({ burns }) => !burns);
        const emptiest = [first, ...left].reduce(
          (sum, { mass, at }) => ({ mass: sum.mass + mass, moment: sum.moment + mass * at }),
          { mass: 0, moment: 0 },
        );
        const cg = emptiest.moment / emptiest.mass;
        expect(forward).toBeLessThanOrEqual(cg + 1e-9);
        expect(aft).toBeGreaterThanOrEqual(cg - 1e-9);
      }),
      { seed: 3, numRuns: 40 },
    );
  });
});

const carried = `empty: {mass: 260 kg, station: 1.9 m}
items:
  spar: {mass: 70 kg, carried_by: wing, at: 40 %}
  stabiliser: {mass: 14 kg, carried_by: tail, at: 55 %}
  shell: {mass: 61 kg, carried_by: body, at: 37 %}
  pilot: {mass: 90 kg, station: 2.3 m}
cases:
  solo: [pilot]`;

/** Figures of a study with one number moved. */
function moved(study: Study, path: string, value: number, wanted: readonly string[]): Map<string, number> {
  const axis = { name: path, paths: [path], values: [Float64Array.of(value)] };
  const columns = evaluateSlice(study, buildStages(study), [axis], wanted);
  return new Map([...columns].map(([name, [only]]) => [name, only]));
}

describe('masses that something carries', () => {
  const study = loadedStudy(carried);
  const figures = figuresOf(study);
  const total = 260 + 70 + 14 + 61 + 90;

  it('stand at their fraction of wing MAC, tail MAC and body length', () => {
    const at = (name: string) => figure(figures, name);
    const spar = at('mac_leading_edge') + 0.4 * at('mac');
    const tailEdge = at('quarter_mac_station') + at('tail_arm') - at('tail_mac') / 4;
    const stabiliser = tailEdge + 0.55 * at('tail_mac');
    const bodyLength = 6.95;
    const moment = 260 * 1.9 + 70 * spar + 14 * stabiliser + 61 * 0.37 * bodyLength + 90 * 2.3;
    expect(at('cg_aft_station')).toBeCloseTo(moment / total, close);
  });

  it('move with the wing while all else stays: the CG in % MAC moves as in reality', () => {
    const step = 0.13;
    const leadingEdge = study.inputs.get('wing.root_leading_edge') ?? Number.NaN;
    const wanted = ['cg_aft_station', 'cg_aft', 'mac', 'mac_leading_edge'];
    const after = moved(study, 'wing.root_leading_edge', leadingEdge + step, wanted);
    // The arm is given, so the tail rides with the wing and the body's last end with the tail.
    const shift = ((70 + 14 + 61 * 0.37) * step) / total;
    const change = (name: string) => figure(after, name) - figure(figures, name);
    expect(change('mac_leading_edge')).toBeCloseTo(step, close);
    expect(change('cg_aft_station')).toBeCloseTo(shift, close);
    expect(change('cg_aft')).toBeCloseTo((shift - step) / figure(figures, 'mac'), close);
  });

  it('leave the CG’s station alone where nothing is carried', () => {
    const fixed = loadedStudy();
    const before = figuresOf(fixed);
    const after = moved(fixed, 'wing.root_leading_edge', 1.9, ['cg_aft_station', 'cg_aft', 'mac']);
    expect(figure(after, 'cg_aft_station')).toBe(figure(before, 'cg_aft_station'));
    const change = figure(after, 'cg_aft') - figure(before, 'cg_aft');
    expect(change).toBeCloseTo(-(1.9 - 1.75) / figure(before, 'mac'), close);
  });

  it('follow a longer tail arm: the tail by all of it, the body’s far part by its share', () => {
    const arm = study.inputs.get('tail.arm') ?? Number.NaN;
    const step = 0.5;
    const after = moved(study, 'tail.arm', arm + step, ['cg_aft_station', 'tail_mac']);
    // A held tail volume makes the tail smaller; its place on its own MAC moves with that.
    const smaller = figure(after, 'tail_mac') - figure(figures, 'tail_mac');
    const moment = 14 * (step + (0.55 - 0.25) * smaller) + 61 * 0.37 * step;
    const change = figure(after, 'cg_aft_station') - figure(figures, 'cg_aft_station');
    expect(change).toBeCloseTo(moment / total, close);
  });

  it('may grow with the geometry when their mass varies', () => {
    const heavier = moved(study, 'loading.items[2].mass', 24, ['cg_aft_station', 'mass']);
    expect(figure(heavier, 'mass')).toBeCloseTo(total + 10, close);
    expect(figure(heavier, 'cg_aft_station')).toBeGreaterThan(figure(figures, 'cg_aft_station'));
  });
});

const growing = `empty: {mass: 260 kg, station: 1.9 m, height: 0.1 m}
items:
  pilot: {mass: 90 kg, station: 2.3 m, height: 0.2 m}
  wing_shell: {mass_per_area: 5.5 kg/m^2, carried_by: wing, at: 40 %, height: -0.3 m}
  tail_shell: {mass_per_area: 7.25 kg/m^2, carried_by: tail, at: 55 %, height: 0.6 m}
  tank: {mass: 48 kg, station: 2.6 m, height: -0.1 m, burns: true}
  flaps: {mass_per_area: 0.8 kg/m^2, carried_by: wing, at: 90 %, height: -0.35 m}
cases:
  solo: [pilot]
  trip: [pilot, tank, flaps]`;

const growingFigures = [
  'mass',
  'cg_above_datum',
  'cg_forward_station',
  'cg_aft_station',
  'wing_area',
  'tail_area',
  'mac',
  'mac_leading_edge',
  'quarter_mac_station',
  'tail_arm',
  'tail_mac',
] as const;

/** Mass, height and CG range of the loading above, one case and break after the other. */
function plainGrowing(at: (name: (typeof growingFigures)[number]) => number) {
  const [S, tail, mac, edge] = [at('wing_area'), at('tail_area'), at('mac'), at('mac_leading_edge')];
  const tailEdge = at('quarter_mac_station') + at('tail_arm') - at('tail_mac') / 4;
  const bare = [
    { mass: 260, station: 1.9, height: 0.1 },
    { mass: 5.5 * S, station: edge + 0.4 * mac, height: -0.3 },
    { mass: 7.25 * tail, station: tailEdge + 0.55 * at('tail_mac'), height: 0.6 },
  ];
  const pilot = { mass: 90, station: 2.3, height: 0.2 };
  const tank = { mass: 48, station: 2.6, height: -0.1 };
  const flaps = { mass: 0.8 * S, station: edge + 0.9 * mac, height: -0.35 };
  const mean = (all: readonly PlainItem[], key: 'station' | 'height') =>
    all.reduce((sum, one) => sum + one.mass * one[key], 0) / all.reduce((sum, one) => sum + one.mass, 0);
  const full = [...bare, pilot, tank, flaps];
  const states = [[...bare, pilot], full, [...bare, pilot, flaps]].map((all) => mean(all, 'station'));
  return {
    mass: full.reduce((sum, one) => sum + one.mass, 0),
    cg_above_datum: mean(full, 'height'),
    cg_forward_station: Math.min(...states),
    cg_aft_station: Math.max(...states),
  };
}

describe('masses that follow the area of what carries them', () => {
  const study = loadedStudy(growing);
  const figures = figuresOf(study);

  it('are those of a plain loop in every row, whatever the row before', () => {
    const axes = [
      { name: 'area', paths: ['wing.area'], values: [Float64Array.of(11.4, 22.8, 9.1)] },
      { name: 'volume', paths: ['tail.volume'], values: [Float64Array.of(0.9, 0.3)] },
      { name: 'arm', paths: ['tail.arm'], values: [Float64Array.of(3.9, 4.6)] },
    ];
    const columns = evaluateSlice(study, buildStages(study), axes, growingFigures);
    const column = (name: string) => columns.get(name) ?? new Float64Array();
    expect(column('mass')).toHaveLength(12);
    expect(new Set(column('mass')).size).toBe(12);
    for (let row = 0; row < 12; row++) {
      for (const [name, value] of Object.entries(plainGrowing((one) => column(one)[row])))
        expect(column(name)[row], `${name} in row ${row}`).toBeCloseTo(value, close);
    }
  });

  it('double with the wing’s area, and draw the CG towards the wing', () => {
    // The tail keeps its area, its volume against the larger wing follows.
    const tail = replaced('tail', 'volume: 0.48', 'area: 2 m^2');
    const text = growing.replace(/ {2}flaps.*\n/, '').replace(', flaps', '');
    const fixedTail = loadedStudy(text, { tail });
    const before = figuresOf(fixedTail);
    const after = moved(fixedTail, 'wing.area', 22.8, growingFigures);
    expect(figure(before, 'mass')).toBeCloseTo(260 + 5.5 * 11.4 + 7.25 * 2 + 90 + 48, close);
    expect(figure(after, 'mass') - figure(before, 'mass')).toBeCloseTo(5.5 * 11.4, close);
    // By hand, moments about the datum with the tank full, in which case the CG is aftmost.
    const moment = (at: ReadonlyMap<string, number>, area: number) => {
      const wing = figure(at, 'mac_leading_edge') + 0.4 * figure(at, 'mac');
      const shell =
        figure(at, 'quarter_mac_station') + figure(at, 'tail_arm') + (0.55 - 0.25) * figure(at, 'tail_mac');
      return 260 * 1.9 + 5.5 * area * wing + 7.25 * 2 * shell + 90 * 2.3 + 48 * 2.6;
    };
    for (const [at, area] of [
      [before, 11.4],
      [after, 22.8],
    ] as const)
      expect(figure(at, 'cg_aft_station')).toBeCloseTo(moment(at, area) / figure(at, 'mass'), close);
  });

  it('are as fixed masses of the same size where nothing varies', () => {
    const S = figure(figures, 'wing_area');
    const fixed = growing
      .replace('mass_per_area: 5.5 kg/m^2', `mass: ${5.5 * S} kg`)
      .replace('mass_per_area: 0.8 kg/m^2', `mass: ${0.8 * S} kg`)
      .replace('mass_per_area: 7.25 kg/m^2', `mass: ${7.25 * figure(figures, 'tail_area')} kg`);
    const same = figuresOf(loadedStudy(fixed));
    for (const name of ['mass', 'cg_forward', 'cg_aft', 'cg_above_datum', 'neutral_point'])
      expect(figure(figures, name)).toBeCloseTo(figure(same, name), close);
  });

  it('vary by themselves', () => {
    const heavier = moved(study, 'loading.items[2].mass_per_area', 6.5, ['mass']);
    expect(figure(heavier, 'mass') - figure(figures, 'mass')).toBeCloseTo(
      figure(figures, 'wing_area'),
      close,
    );
  });

  it('follow a tail that is chosen in each combination', () => {
    const sized = figuresOf(
      loadedStudy(growing, {
        tail: replaced('tail', 'volume: 0.48', 'area: 2 m^2'),
        rest: 'size: {choose: tail.area, so_that: static_margin_aft, is: 15 %, between: [0.6 m^2, 5 m^2]}\n',
      }),
    );
    expect(figure(sized, 'static_margin_aft')).toBeCloseTo(0.15, 9);
    expect(figure(sized, 'tail_area')).not.toBeCloseTo(2, 2);
    const plain = plainGrowing((name) => figure(sized, name));
    expect(figure(sized, 'mass')).toBeCloseTo(plain.mass, close);
    expect(figure(sized, 'cg_aft_station')).toBeCloseTo(plain.cg_aft_station, close);
  });

  it('are told with the formulas that use them, under the symbols of the areas', () => {
    const { figures: known, columns } = layOut(study);
    const symbol = (name: string) => known.get(name)?.symbol;
    const products = [
      `${symbol('loading_items_2_mass_per_area')?.replace('_S', '_')} = ${symbol('loading_items_2_mass_per_area')} ${symbol('wing_area')}`,
      `m_3 = m_S3 ${symbol('tail_area')}`,
      'm_5 = m_S5 S',
    ].join('; ');
    for (const name of ['mass', 'cg_above_datum', 'cg_forward_station', 'cg_aft_station'])
      expect(known.get(name)?.formula, name).toContain(`; ${products}`);
    expect(columns.find(({ figure: { name } }) => name === 'mass')?.name).toBe('mass_kg');
    expect(known.get('loading_items_2_mass_per_area')).toMatchObject({
      dimension: 'mass_per_area',
      formula: 'given',
    });
    expect(known.has('loading_items_2_mass')).toBe(false);
    expect(layOut(loadedStudy()).figures.get('mass')?.formula).not.toContain('m_S');
  });
});

describe('paths of loading cases', () => {
  it('carry masses that follow the area', () => {
    const study = loadedStudy(growing);
    const figures = figuresOf(study);
    const paths = loadingPaths(study.loading!, study.body, baselinePlaces(study), figures);
    const plain = plainGrowing((name) => figure(figures, name));
    expect(paths.cases[1][0].mass).toBeCloseTo(plain.mass, close);
    const stations = paths.cases.flat().map(({ station }) => station);
    expect(Math.min(...stations)).toBeCloseTo(plain.cg_forward_station, close);
    expect(Math.max(...stations)).toBeCloseTo(plain.cg_aft_station, close);
    const shells = 5.5 * figure(figures, 'wing_area') + 7.25 * figure(figures, 'tail_area');
    expect(paths.empty.mass).toBeCloseTo(260 + shells, close);
  });

  it('go through the breaks of the burn in order, between the extremes', () => {
    const study = loadedStudy();
    const figures = figuresOf(study);
    const paths = loadingPaths(study.loading!, study.body, baselinePlaces(study), figures);
    expect(paths.empty).toEqual({ mass: 372, station: 2.06 });
    expect(paths.cases.map((states) => states.length)).toEqual([1, 3, 3]);
    const travel = plainTravel();
    paths.cases.flat().forEach(({ station }, k) => {
      expect(station).toBeCloseTo(travel[k].cg, close);
    });
    expect(paths.cases[2].map(({ mass }) => mass)).toEqual([623, 580, 549]);
    const stations = paths.cases.flat().map(({ station }) => station);
    expect(figure(figures, 'cg_forward_station')).toBeCloseTo(Math.min(...stations), close);
    expect(figure(figures, 'cg_aft_station')).toBeCloseTo(Math.max(...stations), close);
  });

  it('count what is aboard in every case into the empty aeroplane', () => {
    const study = loadedStudy(carried);
    const { empty: bare, cases: paths } = loadingPaths(
      study.loading!,
      study.body,
      baselinePlaces(study),
      figuresOf(study),
    );
    expect(bare.mass).toBeCloseTo(260 + 70 + 14 + 61, close);
    expect(paths[0][0].mass).toBeCloseTo(bare.mass + 90, close);
  });
});
