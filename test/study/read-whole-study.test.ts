/** What a study says beyond wing, tail, body and CG, read into numbers and choices. */
import { describe, expect, test } from 'vitest';
import { studyIdentity } from '../../src/study/identity.ts';
import { readReplacement } from '../../src/study/replace-number.ts';
import type { Study } from '../../src/study/study.ts';
import { baseStudy, edited, errorOf, marked, read } from './base-study.ts';
import { wholeEdited, wholeStudy } from './whole-study.ts';

const deg = Math.PI / 180;
const horsepower = 745.699872;
const numberOf = (study: Study, path: string) => study.inputs.get(path);
const assumed = (study: Study, path: string) => study.assumptions.find((one) => one.path === path);

describe('numbers', () => {
  const study = read(wholeStudy);

  test.each<[string, number]>([
    ['conditions[1].speed', (110 * 1852) / 3600],
    ['conditions[1].power', 0.65],
    ['conditions[2].times_stall', 1.3],
    ['conditions[2].power', 1],
    ['conditions[3].lift_coefficient', 0.8],
    ['conditions[3].height', 100],
    ['conditions[4].flaps', 30 * deg],
    ['conditions[4].wing_above_ground', 1.1],
    ['wing.maximum_lift', 1.41],
    ['wing.flaps.chord_fraction', 0.25],
    ['wing.flaps.span_from', 0.12],
    ['wing.flaps.span_to', 0.58],
    ['tail.maximum_lift', 1.02],
    ['tail.elevator.area', 0.61],
    ['tail.elevator.chord', 0.26],
    ['tail.elevator.hinge.alpha', -0.06],
    ['tail.elevator.hinge.delta', -0.35],
    ['propeller.diameter', 1.7],
    ['propeller.blades', 2],
    ['propeller.blade_chord', 0.13],
    ['propeller.blade_angle', 20 * deg],
    ['propeller.station', 0.1],
    ['propeller.above_datum', 0.05],
    ['propeller.efficiency', 0.78],
    ['propeller.tail_in_slipstream', 0.6],
    ['control.gearing', 1.9],
    ['control.spring', 4],
    ['control.bobweight', 3],
    ['control.load_factor', 4.4],
    ['landing_gear.main_wheels', 2.75],
    ['landing_gear.rotation_speed', (48 * 1852) / 3600],
    ['landing_gear.ground_angle', 2 * deg],
    ['landing_gear.below_datum', 0.9],
    ['loading.empty.mass', 310],
    ['loading.empty.station', 2.02],
    ['loading.empty.height', 0.11],
    ['loading.items[1].mass', 81],
    ['loading.items[3].station', 2.6],
    ['loading.items[3].height', -0.1],
    ['loading.items[4].at', 0.4],
    ['loading.at_most', 650],
  ])('%s is %d', (path, value) => {
    expect(numberOf(study, path)).toBeCloseTo(value, 12);
  });

  test('a power in horsepower is in watts', () => {
    expect(numberOf(study, 'propeller.power')).toBeCloseTo(98 * horsepower, 4);
  });

  test('what follows from others is no number of the study', () => {
    for (const path of [
      'mass',
      'cg.forward',
      'cg.aft',
      'cg.above_datum',
      'conditions[2].speed',
      'conditions[3].power',
      'loading.items[4].station',
      'tail.elevator.hinge.alpha_factor',
    ])
      expect(study.inputs.has(path), path).toBe(false);
    expect([...study.inputs.values()].every(Number.isFinite)).toBe(true);
  });
});

describe('choices', () => {
  const study = read(wholeStudy);

  test('conditions say how their speed is given, and what is on', () => {
    expect(study.conditions).toEqual([
      { name: 'cruise', speedAs: 'speed', power: 'fraction', flapsDown: false, groundEffect: false },
      { name: 'climb', speedAs: 'times_stall', power: 'fraction', flapsDown: false, groundEffect: false },
      { name: 'glide', speedAs: 'lift_coefficient', power: 'idle', flapsDown: false, groundEffect: false },
      { name: 'approach', speedAs: 'speed', power: 'idle', flapsDown: true, groundEffect: true },
    ]);
  });

  test('equipment', () => {
    const { flaps, propeller, hinge, control, landingGear } = study;
    expect({ flaps, propeller, hinge, control, landingGear }).toEqual({
      flaps: { as: 'section', kind: 'slotted' },
      propeller: { place: 'tractor' },
      hinge: 'given',
      control: { kind: 'stick' },
      landingGear: { kind: 'nose_wheel' },
    });
  });

  test('the loading: what is aboard in which case, carried structure first', () => {
    expect(study.loading).toEqual({
      empty: true,
      items: [
        { name: 'pilot', massAs: 'mass', carriedBy: 'station', burns: false, always: false },
        { name: 'passenger', massAs: 'mass', carriedBy: 'station', burns: false, always: false },
        { name: 'fuel', massAs: 'mass', carriedBy: 'station', burns: true, always: false },
        { name: 'wing_structure', massAs: 'mass', carriedBy: 'wing', burns: false, always: true },
      ],
      cases: [
        { name: 'two_up', items: [4, 1, 2, 3] },
        { name: 'solo_light', items: [4, 1] },
      ],
    });
    expect(study.cg).toEqual({ forward: 'station', aft: 'station', heightGiven: true });
  });

  test('sizing and corrections are SI', () => {
    expect(study.size).toEqual({
      path: 'tail.area',
      figure: 'static_margin_aft',
      value: 0.08,
      from: 0.6,
      to: 2.5,
    });
    expect(study.corrections).toEqual({
      neutralPoint: -0.012,
      source: 'flight test of the prototype, 2026',
    });
  });

  test('edges of the band name their conditions in the order of the study', () => {
    expect(study.band).toEqual({
      lower: 0.05,
      upper: 0.2,
      lowerIn: ['cruise', 'climb', 'glide', 'approach'],
      upperIn: ['cruise', 'climb'],
    });
    const plain = read(wholeEdited(['at_most: {value: 20 %, in: [climb, cruise]}', 'at_most: 20 %']));
    expect(plain.band.upperIn).toEqual(['cruise']);
    const all = read(wholeEdited(['in: [climb, cruise]', 'in: all']));
    expect(all.band.upperIn).toHaveLength(4);
  });

  test('names in paths stand for numbers', () => {
    expect(study.axes.map((axis) => axis.name)).toEqual([
      'wing.taper',
      'conditions[1].power',
      'loading.items[3].mass',
    ]);
    expect(study.requirements.at(-1)).toMatchObject({
      name: 'conditions.climb.power',
      figure: 'conditions_2_power',
    });
    const replaced = readReplacement(study, 'loading.items.fuel.mass = 45 kg');
    expect(replaced).toEqual({ path: 'loading.items[3].mass', value: 45 });
  });

  test('maps of a named condition step side by side', () => {
    const line = 'conditions.cruise: [{power: 55 %, speed: 95 kt}, {power: 75 %, speed: 115 kt}]';
    const { axes } = read(wholeEdited(['conditions.cruise.power: [55 %, 75 %]', line]));
    expect(axes[1]).toMatchObject({
      name: 'conditions[1]',
      paths: ['conditions[1].power', 'conditions[1].speed'],
    });
  });

  test('a skip rule may name them too', () => {
    const rule = 'skip: [{when: {loading.items.fuel.mass: {below: 50 kg}}, because: too short a flight}]\n';
    expect(read(wholeStudy + rule).skip[0]?.tests).toEqual([{ path: 'loading.items[3].mass', below: 50 }]);
  });
});

test('flaps up throughout are no flaps down', () => {
  const deflection = (text: string, by: string) =>
    read(wholeEdited(['flaps: 30 deg', `flaps: ${by}`], ['conditions.cruise.power: [55 %, 75 %]', text]));
  expect(deflection('wing.washout: [0 deg]', '0 deg').conditions[3]?.flapsDown).toBe(false);
  const varied = deflection('conditions.approach.flaps: [0 deg, 20 deg]', '0 deg');
  expect(varied.conditions[3]?.flapsDown).toBe(true);
});

test('a wing without flaps may say that they are up', () => {
  const study = read(edited(['height: 1000 m', 'height: 1000 m, flaps: 0 deg']));
  expect(study.conditions[0]?.flapsDown).toBe(false);
  expect(study.flaps).toBeUndefined();
});

test('increments of the whole wing instead of the flaps’ shape', () => {
  const increments = '{at: 30 deg, zero_lift_angle: -4 deg, maximum_lift: 0.6}';
  const study = read(
    wholeEdited(['{kind: slotted, chord_fraction: 25 %, span_from: 12 %, span_to: 58 %}', increments]),
  );
  expect(study.flaps).toEqual({ as: 'increments' });
  expect(numberOf(study, 'wing.flaps.at')).toBeCloseTo(30 * deg, 12);
  expect(numberOf(study, 'wing.flaps.zero_lift_angle')).toBeCloseTo(-4 * deg, 12);
  expect(numberOf(study, 'wing.flaps.downwash')).toBe(0);
  expect(assumed(study, 'wing.flaps.moment')?.value).toBe(0);
});

test('a study that says nothing of equipment has none, and says what is taken', () => {
  const study = read(baseStudy);
  for (const key of [
    'flaps',
    'propeller',
    'control',
    'landingGear',
    'loading',
    'size',
    'corrections',
  ] as const)
    expect(study[key], key).toBeUndefined();
  expect(study.hinge).toBe('theory');
  expect(assumed(study, 'propeller')?.value).toBe('none');
  // common practice, no source
  expect(numberOf(study, 'tail.elevator.hinge.alpha_factor')).toBe(0.6);
  expect(numberOf(study, 'tail.elevator.hinge.delta_factor')).toBe(0.7);
  expect(assumed(study, 'wing.maximum_lift')?.value).toMatch(/0\.9 × /);
  expect(study.inputs.has('wing.maximum_lift')).toBe(false);
  expect(assumed(study, 'conditions[1].power')).toBeUndefined();
});

test('none is a propeller said', () => {
  const study = read(edited(['  cg:', '  propeller: none\n  cg:']));
  expect(study.propeller).toBeUndefined();
  expect(assumed(study, 'propeller')).toBeUndefined();
});

test('what equipment leaves out is assumed', () => {
  const study = read(
    wholeEdited(
      [', efficiency: 78 %, tail_in_slipstream: 60 %', ''],
      [', spring: 4 N, bobweight: 3 N, load_factor: 4.4', ''],
      [', ground_angle: 2 deg, below_datum: 0.9 m', ''],
      ['area: 0.61 m^2, chord: 0.26 m, ', ''],
    ),
  );
  const taken = [
    'propeller.efficiency',
    'propeller.tail_in_slipstream',
    'control.spring',
    'control.bobweight',
    'control.load_factor',
    'landing_gear.ground_angle',
    'landing_gear.below_datum',
    'tail.elevator.area',
    'tail.elevator.chord',
    'conditions[4].power',
    'mass',
  ];
  for (const path of taken) expect(assumed(study, path)?.source, path).toBeTruthy();
  expect(assumed(study, 'conditions[3].power')).toBeUndefined();
  expect(study.inputs.has('tail.elevator.area')).toBe(false);
});

describe('hinges of an all-moving tail', () => {
  const elevator =
    'elevator: {chord_fraction: 35 %, area: 0.61 m^2, chord: 0.26 m, hinge: {alpha: -0.06 /rad, delta: -0.35 /rad}}';
  const allMoving = (hinge: string) =>
    read(wholeEdited([elevator, `all_moving: true\n    elevator: {up: 12 deg${hinge}}`]));

  test('without data there is no free stick', () => {
    const study = allMoving('');
    expect(study.hinge).toBe('none');
    expect([...study.inputs.keys()].filter((path) => path.includes('hinge'))).toEqual([]);
  });

  test('without a tab both slopes are one', () => {
    const study = allMoving(', hinge: {alpha: -0.1 /rad}');
    expect(study.hinge).toBe('given');
    expect(study.inputs.has('tail.elevator.hinge.delta')).toBe(false);
    expect(assumed(study, 'tail.elevator.hinge.delta')?.value).toBe('as alpha');
  });

  test('a geared tab gives its own', () => {
    const study = allMoving(', hinge: {alpha: -0.1 /rad, delta: -0.4 /rad}');
    expect(numberOf(study, 'tail.elevator.hinge.delta')).toBe(-0.4);
  });
});

test('one factor on theory leaves the other customary', () => {
  const study = read(wholeEdited(['{alpha: -0.06 /rad, delta: -0.35 /rad}', '{alpha_factor: 0.5}']));
  expect(study.hinge).toBe('theory');
  expect(numberOf(study, 'tail.elevator.hinge.alpha_factor')).toBe(0.5);
  // common practice, no source
  expect(numberOf(study, 'tail.elevator.hinge.delta_factor')).toBe(0.7);
});

test('one mass without a height leaves the vertical position out, and says so', () => {
  const study = read(wholeEdited(['station: 2.25 m, height: 0.2 m', 'station: 2.25 m']));
  expect(study.cg.heightGiven).toBe(false);
  expect(assumed(study, 'loading')?.source).toMatch(/1 of 5 masses/);
});

test('a mass beside a loading is kept', () => {
  const study = read(wholeEdited(['aeroplane:\n', 'aeroplane:\n  mass: 620 kg\n']));
  expect(numberOf(study, 'mass')).toBe(620);
  expect(assumed(study, 'mass')).toBeUndefined();
});

test('what moves with the wing is said with what is held', () => {
  const taper = read(wholeStudy).held.find((one) => one.varied === 'wing.taper');
  expect(taper?.held).toContain('the masses and stations of the loading (items carried by wing ride along)');
});

/** Code and mark of the one fault that a text has. */
function onlyFault(text: string): readonly [string, string] {
  const error = errorOf(text);
  expect(error.faults).toHaveLength(1);
  return [error.faults[0]!.code, marked(error, error.faults[0]!)];
}

const perArea = ['{mass: 70 kg, carried_by: wing', '{mass_per_area: 1.25 lb/ft^2, carried_by: wing'] as const;

describe('a mass per area of what carries the item', () => {
  // Foot and pound exact by the agreement of 1959 (from memory).
  const wing = (1.25 * 0.45359237) / 0.3048 ** 2;

  test('stands in place of the mass', () => {
    const study = read(wholeEdited(perArea));
    expect(study.loading?.items[3]).toMatchObject({
      massAs: 'mass_per_area',
      carriedBy: 'wing',
      always: true,
    });
    expect(numberOf(study, 'loading.items[4].mass_per_area')).toBeCloseTo(wing, 12);
    expect(study.inputs.has('loading.items[4].mass')).toBe(false);
  });

  test('varies by its name, and can be replaced', () => {
    const study = read(
      wholeEdited(perArea, [
        'loading.items.fuel.mass: [40 kg, 60 kg]',
        'loading.items.wing_structure.mass_per_area: [5 kg/m^2, 6 kg/m^2]',
      ]),
    );
    const axis = study.axes.find(({ paths }) => paths.includes('loading.items[4].mass_per_area'));
    expect([...(axis?.values[0] ?? [])]).toEqual([5, 6]);
    expect(readReplacement(study, 'loading.items.wing_structure.mass_per_area = 7.5 kg/m^2')).toEqual({
      path: 'loading.items[4].mass_per_area',
      value: 7.5,
    });
  });

  test('is told among what follows, and is not held', () => {
    const heldOf = (text: string, path: string) => read(text).held.find(({ varied }) => varied === path);
    const varyingArea = wholeEdited(perArea, ['wing.taper: [0.5, 0.62, 0.7]', 'wing.area: [11 m^2, 12 m^2]']);
    const area = heldOf(varyingArea, 'wing.area');
    expect(area?.follows).toContain('mass of loading.items.wing_structure');
    expect(area?.held).toContain(
      'the masses, masses per area and stations of the loading (items carried by wing ride along)',
    );
    const taper = heldOf(wholeEdited(perArea), 'wing.taper');
    expect(taper?.follows.join()).not.toContain('mass of');
    const withTail = wholeEdited(
      [perArea[0], perArea[1].replace('wing', 'tail')],
      ['area: 2.1 m^2', 'volume: 0.62'],
      ['choose: tail.area', 'choose: tail.volume'],
      ['[0.6 m^2, 2.5 m^2]', '[0.3, 0.9]'],
    );
    expect(heldOf(withTail, 'wing.taper')?.follows).toContain('mass of loading.items.wing_structure');
  });

  test('counts towards the greatest mass with the wing of the fixed values', () => {
    // 310 + 81 + 79 + 60 kg, and 11.4 m² of wing
    const whole = 530 + 11.4 * wing;
    const limited = (kilograms: number) =>
      wholeEdited(perArea, ['at_most: 650 kg', `at_most: ${kilograms} kg`]);
    expect(read(limited(whole + 1e-6)).loading?.items).toHaveLength(4);
    expect(onlyFault(limited(whole - 1e-6))).toEqual(['OUT_OF_RANGE', 'two_up']);
  });

  test('is left out along an axis of masses where the wing varies, unless the rest is too heavy', () => {
    const fuel = (kilograms: number, vary: string) =>
      wholeEdited(
        perArea,
        ['[40 kg, 60 kg]', `[40 kg, ${kilograms} kg]`],
        ['wing.taper: [0.5, 0.62, 0.7]', vary],
      );
    const constant = 'conditions.cruise.height: [1000 m, 1500 m]';
    // with the fixed wing's 69.6 kg the case weighs 539.6 kg and its fuel
    expect(onlyFault(fuel(115, constant))).toEqual(['OUT_OF_RANGE', '115 kg']);
    expect(read(fuel(115, 'wing.area: [9 m^2, 11.4 m^2]')).axes).toHaveLength(3);
    expect(onlyFault(fuel(185, 'wing.area: [9 m^2, 11.4 m^2]'))).toEqual(['OUT_OF_RANGE', '185 kg']);
  });
});

test('every choice enters the identity of a study', () => {
  const plain = studyIdentity(read(wholeStudy));
  const changes: readonly (readonly [string, string])[] = [
    ['kind: slotted', 'kind: plain'],
    ['place: tractor', 'place: pusher'],
    ['kind: stick', 'kind: wheel'],
    ['height: 100 m, power: idle', 'height: 100 m, power: 0 %'],
    ['[pilot, passenger, fuel]', '[passenger, pilot, fuel]'],
    [', burns: true', ''],
    ['is: 8 %', 'is: 9 %'],
    ['-1.2 %', '-1.3 %'],
    ['in: [climb, cruise]', 'in: [cruise]'],
    ['name: glide', 'name: descent'],
    perArea,
  ];
  const identities = changes.map((change) => studyIdentity(read(wholeEdited(change))));
  expect(new Set([plain, ...identities]).size).toBe(changes.length + 1);
  expect(studyIdentity(read(wholeEdited(['title: Whole study', 'title: Another'])))).toBe(plain);
});
