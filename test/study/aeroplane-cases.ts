/** Faults of what a study says beyond wing, tail, body and CG. */
import { edited, type FaultCase, varying } from './base-study.ts';
import { wholeEdited } from './whole-study.ts';

const inFlaps = (text: string) =>
  wholeEdited(['{kind: slotted, chord_fraction: 25 %, span_from: 12 %, span_to: 58 %}', text]);
const inHinge = (text: string) => wholeEdited(['{alpha: -0.06 /rad, delta: -0.35 /rad}', text]);
const inFuel = (text: string) =>
  wholeEdited(['{mass: 60 kg, station: 2.6 m, height: -0.1 m, burns: true}', text]);
const inStructure = (text: string) =>
  wholeEdited(['{mass: 70 kg, carried_by: wing, at: 40 %, height: -0.2 m}', text]);
const climb = (text: string) =>
  wholeEdited(['{name: climb, times_stall: 1.3, height: 0 m, power: 100 %}', text]);
const sizing = 'size: {choose: tail.area, so_that: static_margin_aft, is: 8 %, between: [0.6 m^2, 2.5 m^2]}';
const size = (text: string) => wholeEdited([sizing, `size: {${text}}`]);
const axis = (line: string) => wholeEdited(['  wing.taper: [0.5, 0.62, 0.7]', `  ${line}`]);
const allMoving = (hinge: string) =>
  wholeEdited([
    'elevator: {chord_fraction: 35 %, area: 0.61 m^2, chord: 0.26 m, hinge: {alpha: -0.06 /rad, delta: -0.35 /rad}}',
    `all_moving: true\n    elevator: {hinge: ${hinge}}`,
  ]);

const conditionCases: readonly FaultCase[] = [
  {
    what: 'too many conditions',
    text: edited([
      'vary:',
      `${Array.from({ length: 12 }, (_, i) => `  - {name: c${i}, speed: 70 kt, height: 0 m}\n`).join('')}vary:`,
    ]),
    code: 'OUT_OF_RANGE',
    mark: 'name',
    line: 'c11',
    says: /1 to 12/,
  },
  {
    what: 'no condition',
    text: edited(
      ['conditions:\n  - {name: cruise, speed: 105 kt, height: 1000 m}', 'conditions: []'],
      [', in: all}, at_most: {value: 20 %, in: [cruise]}}', '}}'],
    ),
    code: 'OUT_OF_RANGE',
    mark: '[]',
  },
  {
    what: 'a name with a space',
    text: climb('{name: full climb, speed: 70 kt, height: 0 m}')
      .replace('[climb, cruise]', '[cruise]')
      .replace('  conditions.climb.power: {at_most: 1}\n', ''),
    code: 'BAD_NAME',
    mark: 'full climb',
  },
  {
    what: 'names that differ by case only',
    text: edited(['vary:', '  - {name: Cruise, speed: 70 kt, height: 0 m}\nvary:']),
    code: 'DUPLICATE_NAME',
    mark: 'Cruise',
    says: /one name in the table/,
  },
  {
    what: 'a name that makes one figure of two',
    text: edited(['vary:', '  - {name: Tip, speed: 70 kt, height: 0 m}\nvary:']),
    code: 'DUPLICATE_NAME',
    mark: 'Tip',
    says: /wing_span_tip/,
  },
  {
    what: 'two names that make one figure of two',
    text: edited(['vary:', '  - {name: tip-cruise, speed: 70 kt, height: 0 m}\nvary:']),
    code: 'DUPLICATE_NAME',
    mark: 'tip-cruise',
    says: /wing_span_tip_cruise/,
  },
  {
    what: 'two speeds',
    text: climb('{name: climb, times_stall: 1.3, speed: 70 kt, height: 0 m, power: 100 %}'),
    code: 'OVERDETERMINED',
    mark: 'times_stall',
    says: /speed and times_stall/,
  },
  {
    what: 'no speed',
    text: climb('{name: climb, height: 0 m, power: 100 %}'),
    code: 'UNDERDETERMINED',
    mark: 'name',
    line: 'climb',
  },
  {
    what: 'slower than the stall',
    text: climb('{name: climb, times_stall: 0.9, height: 0 m, power: 100 %}'),
    code: 'OUT_OF_RANGE',
    mark: '0.9',
  },
  {
    what: 'a multiple of a stall speed that nothing settles',
    text: wholeEdited(
      ['    maximum_lift: 1.41\n', ''],
      ['section: naca-2412', 'section: {lift_slope: 6.1 /rad}'],
    ),
    code: 'MISSING_KEY',
    mark: 'times_stall',
  },
  {
    what: 'power without a propeller',
    text: edited(['height: 1000 m', 'height: 1000 m, power: 65 %']),
    code: 'MISSING_KEY',
    mark: 'power',
    says: /propeller/,
  },
  {
    what: 'a power above the rated one',
    text: climb('{name: climb, times_stall: 1.3, height: 0 m, power: 110 %}'),
    code: 'OUT_OF_RANGE',
    mark: '110 %',
  },
  {
    what: 'a word for the power',
    text: climb('{name: climb, times_stall: 1.3, height: 0 m, power: idel}').replace(
      '  conditions.climb.power: {at_most: 1}\n',
      '',
    ),
    code: 'UNKNOWN_WORD',
    mark: 'idel',
    says: /Did you mean 'idle'/,
  },
  {
    what: 'flaps down on a wing without',
    text: edited(['height: 1000 m', 'height: 1000 m, flaps: 20 deg']),
    code: 'MISSING_KEY',
    mark: 'flaps',
  },
  {
    what: 'a condition under a name that is not listed',
    text: axis('conditions.kruise.power: [55 %, 75 %]').replace(
      '  conditions.cruise.power: [55 %, 75 %]\n',
      '',
    ),
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'conditions.kruise.power',
  },
  {
    what: 'one number varied by number and by name',
    text: axis('conditions[1].power: [50 %, 60 %]'),
    code: 'DUPLICATE_AXIS',
    mark: 'conditions.cruise.power',
  },
  {
    what: 'the speed of a condition that gives a lift coefficient',
    text: axis('conditions.glide.speed: [50 kt, 60 kt]'),
    code: 'DERIVED_VARIED',
    mark: 'conditions.glide.speed',
    says: /conditions\[3\]\.lift_coefficient/,
  },
  {
    what: 'an edge in a condition that is not listed',
    text: wholeEdited(['in: [climb, cruise]', 'in: [climb, cruse]']),
    code: 'UNKNOWN_CONDITION',
    mark: 'cruse',
  },
];

const equipmentCases: readonly FaultCase[] = [
  {
    what: 'flaps by section and by increments',
    text: inFlaps('{kind: plain, chord_fraction: 25 %, span_from: 12 %, span_to: 58 %, moment: -0.06}'),
    code: 'OVERDETERMINED',
    mark: 'moment',
  },
  {
    what: 'flaps without a kind',
    text: inFlaps('{chord_fraction: 25 %, span_from: 12 %, span_to: 58 %}'),
    code: 'MISSING_KEY',
    mark: 'flaps',
    says: /kind/,
  },
  {
    what: 'increments without their deflection',
    text: inFlaps('{zero_lift_angle: -4 deg, moment: -0.06}'),
    code: 'MISSING_KEY',
    mark: 'flaps',
    says: /Add at:/,
  },
  {
    what: 'flaps from outboard to inboard',
    text: inFlaps('{kind: plain, chord_fraction: 25 %, span_from: 58 %, span_to: 12 %}'),
    code: 'BAND_REVERSED',
    mark: 'span_from',
  },
  {
    what: 'a varied end of the flaps beyond the other',
    text: axis('wing.flaps.span_from: [10 %, 60 %]'),
    code: 'BAND_REVERSED',
    mark: '60 %',
  },
  {
    what: 'a propeller without its diameter',
    text: wholeEdited(['diameter: 1.7 m, ', '']),
    code: 'MISSING_KEY',
    mark: 'propeller',
    says: /diameter/,
  },
  {
    what: 'half a blade',
    text: wholeEdited(['blades: 2', 'blades: 2.5']),
    code: 'OUT_OF_RANGE',
    mark: '2.5',
    says: /whole/,
  },
  {
    what: 'half a blade on an axis',
    text: axis('propeller.blades: {from: 2, to: 3, count: 3}'),
    code: 'OUT_OF_RANGE',
    mark: '{from: 2, to: 3, count: 3}',
    says: /whole/,
  },
  {
    what: 'a place that propellers do not have',
    text: wholeEdited(['place: tractor', 'place: puller']),
    code: 'UNKNOWN_WORD',
    mark: 'puller',
  },
  {
    what: 'a power in newtons',
    text: wholeEdited(['98 hp', '98 N']),
    code: 'WRONG_DIMENSION',
    mark: '98 N',
    says: /unit of a force, and a power/,
  },
  {
    what: 'an energy for a power',
    text: wholeEdited(['98 hp', '98 kWh']),
    code: 'WRONG_DIMENSION',
    mark: '98 kWh',
    says: /an energy/,
  },
  {
    what: 'a gearing without unit',
    text: wholeEdited(['1.9 rad/m', '1.9']),
    code: 'MISSING_UNIT',
    mark: '1.9',
  },
  {
    what: 'hinge slopes and factors',
    text: inHinge('{alpha: -0.06 /rad, delta: -0.35 /rad, delta_factor: 0.7}'),
    code: 'OVERDETERMINED',
    mark: 'delta_factor',
  },
  {
    what: 'one hinge slope',
    text: inHinge('{delta: -0.35 /rad}'),
    code: 'MISSING_KEY',
    mark: 'delta',
    says: /Add alpha/,
  },
  {
    what: 'an elevator that drives itself',
    text: inHinge('{alpha: -0.06 /rad, delta: 0.35 /rad}'),
    code: 'OUT_OF_RANGE',
    mark: '0.35 /rad',
  },
  {
    what: 'a factor on theory in an all-moving tail',
    text: allMoving('{alpha: -0.1 /rad, alpha_factor: 0.6}'),
    code: 'OVERDETERMINED',
    mark: 'alpha_factor',
  },
  {
    what: 'a tab without the tail’s own slope',
    text: allMoving('{delta: -0.3 /rad}'),
    code: 'MISSING_KEY',
    mark: 'delta',
  },
  {
    what: 'a nose wheel without the speed at which it lifts',
    text: wholeEdited(['rotation_speed: 48 kt, ', '']),
    code: 'MISSING_KEY',
    mark: 'landing_gear',
    says: /rotation_speed/,
  },
  {
    what: 'a rotation speed with a tail wheel',
    text: wholeEdited(
      ['kind: nose_wheel', 'kind: tail_wheel'],
      [', ground_angle: 2 deg, below_datum: 0.9 m', ''],
    ),
    code: 'OVERDETERMINED',
    mark: 'rotation_speed',
  },
];

const loadingCases: readonly FaultCase[] = [
  {
    what: 'a stated CG beside a loading',
    text: wholeEdited(['  control:', '  cg: {as: percent_mac, forward: 24 %, aft: 33 %}\n  control:']),
    code: 'CG_TWICE',
    mark: 'cg',
  },
  {
    what: 'neither CG nor loading',
    text: edited(['  cg: {as: percent_mac, forward: 24 %, aft: 33 %, above_datum: 0.1 m}\n', '']),
    code: 'MISSING_KEY',
    mark: 'aeroplane',
    says: /cg/,
  },
  {
    what: 'a varied CG that follows from the loading',
    text: axis('cg.aft: [30 %, 32 %]').replace('30 %, 32 %', '2.4 m, 2.5 m'),
    code: 'DERIVED_VARIED',
    mark: 'cg.aft',
  },
  {
    what: 'a varied mass that follows from the loading',
    text: axis('mass: [500 kg, 600 kg]'),
    code: 'DERIVED_VARIED',
    mark: 'mass',
  },
  {
    what: 'a case with an item that is not listed',
    text: wholeEdited(['[pilot, passenger, fuel]', '[pilot, passanger, passenger, fuel]']),
    code: 'UNKNOWN_ITEM',
    mark: 'passanger',
    says: /Did you mean 'passenger'/,
  },
  {
    what: 'an item twice in a case',
    text: wholeEdited(['[pilot, passenger, fuel]', '[pilot, passenger, fuel, fuel]']),
    code: 'DUPLICATE_NAME',
    mark: 'fuel',
    line: 'two_up',
  },
  {
    what: 'a case that carries nothing',
    text: wholeEdited(['solo_light: [pilot]', 'solo_light: []']),
    code: 'MISSING_KEY',
    mark: 'solo_light',
  },
  {
    what: 'no case',
    text: wholeEdited(
      ['      two_up: [pilot, passenger, fuel]\n      solo_light: [pilot]\n', ''],
      ['    cases:\n', '    cases: {}\n'],
      ['      pilot: {mass: 81 kg, station: 2.25 m, height: 0.2 m}\n', ''],
      ['      passenger: {mass: 79 kg, station: 2.26 m, height: 0.21 m}\n', ''],
      ['      fuel: {mass: 60 kg, station: 2.6 m, height: -0.1 m, burns: true}\n', ''],
      ['  loading.items.fuel.mass: [40 kg, 60 kg]\n', ''],
    ),
    code: 'MISSING_KEY',
    mark: 'cases',
  },
  {
    what: 'fuel in no case',
    text: wholeEdited(['[pilot, passenger, fuel]', '[pilot, passenger]']),
    code: 'ITEM_IN_NO_CASE',
    mark: 'fuel',
    line: 'fuel: {',
  },
  {
    what: 'a passenger in no case',
    text: wholeEdited(['[pilot, passenger, fuel]', '[pilot, fuel]']),
    code: 'ITEM_IN_NO_CASE',
    mark: 'passenger',
    says: /count it into empty/,
  },
  {
    what: 'a name with a dot',
    text: wholeEdited(['      solo_light: [pilot]', '      solo.light: [pilot]']),
    code: 'BAD_NAME',
    mark: 'solo.light',
  },
  {
    what: 'an item without a place',
    text: inFuel('{mass: 60 kg, height: -0.1 m, burns: true}'),
    code: 'MISSING_KEY',
    mark: 'fuel',
    line: 'fuel: {',
    says: /station/,
  },
  {
    what: 'a carried item without its place on the chord',
    text: inStructure('{mass: 70 kg, carried_by: wing, height: -0.2 m}'),
    code: 'MISSING_KEY',
    mark: 'wing_structure',
  },
  {
    what: 'a carried item with a station',
    text: inStructure('{mass: 70 kg, carried_by: wing, at: 40 %, station: 2.3 m, height: -0.2 m}'),
    code: 'OVERDETERMINED',
    mark: 'station',
    line: 'wing_structure',
  },
  {
    what: 'a place on a chord without a carrier',
    text: inFuel('{mass: 60 kg, station: 2.6 m, at: 30 %, height: -0.1 m, burns: true}'),
    code: 'OVERDETERMINED',
    mark: 'at',
    line: 'fuel: {',
  },
  {
    what: 'an item carried by a body that is not there',
    text: inStructure('{mass: 70 kg, carried_by: body, at: 40 %, height: -0.2 m}').replace(
      /body:\n(?: {4,}.*\n)+/,
      'body: none\n',
    ),
    code: 'MISSING_KEY',
    mark: 'carried_by',
  },
  {
    what: 'an item without a mass',
    text: inStructure('{carried_by: wing, at: 40 %, height: -0.2 m}'),
    code: 'MISSING_KEY',
    mark: 'wing_structure',
    says: /wing_structure has no mass\. .*mass_per_area/,
  },
  {
    what: 'a mass and a mass per area',
    text: inStructure('{mass: 70 kg, mass_per_area: 6 kg/m^2, carried_by: wing, at: 40 %, height: -0.2 m}'),
    code: 'OVERDETERMINED',
    mark: 'mass_per_area',
  },
  {
    what: 'a mass per area that nothing carries',
    text: inStructure('{mass_per_area: 6 kg/m^2, station: 2.4 m, height: -0.2 m}').replace(
      'two_up: [pilot',
      'two_up: [wing_structure, pilot',
    ),
    code: 'MISSING_KEY',
    mark: 'mass_per_area',
    says: /no wing or tail/,
  },
  {
    what: 'a mass per area that the body carries',
    text: inStructure('{mass_per_area: 6 kg/m^2, carried_by: body, at: 40 %, height: -0.2 m}'),
    code: 'UNKNOWN_WORD',
    mark: 'body',
    line: 'wing_structure',
  },
  {
    what: 'a mass per area that burns',
    text: inStructure(
      '{mass_per_area: 6 kg/m^2, carried_by: wing, at: 40 %, height: -0.2 m, burns: true}',
    ).replace('two_up: [pilot', 'two_up: [wing_structure, pilot'),
    code: 'OVERDETERMINED',
    mark: 'burns',
    line: 'wing_structure',
  },
  {
    what: 'a mass per area in kilograms',
    text: inStructure('{mass_per_area: 6 kg, carried_by: wing, at: 40 %, height: -0.2 m}'),
    code: 'WRONG_DIMENSION',
    mark: '6 kg',
    says: /kg\/m\^2/,
  },
  {
    what: 'a varied mass that follows from the area',
    text: axis('loading.items.wing_structure.mass: [60 kg, 70 kg]').replace(
      '{mass: 70 kg, carried_by: wing',
      '{mass_per_area: 6 kg/m^2, carried_by: wing',
    ),
    code: 'DERIVED_VARIED',
    mark: 'loading.items.wing_structure.mass',
    says: /mass_per_area/,
  },
  {
    what: 'a varied mass per area beside a mass',
    text: axis('loading.items.wing_structure.mass_per_area: [5 kg/m^2, 6 kg/m^2]'),
    code: 'DERIVED_VARIED',
    mark: 'loading.items.wing_structure.mass_per_area',
  },
  {
    what: 'a mass per area that an axis makes too heavy',
    text: axis('loading.items.wing_structure.mass_per_area: [5 kg/m^2, 12 kg/m^2]').replace(
      '{mass: 70 kg, carried_by: wing',
      '{mass_per_area: 6 kg/m^2, carried_by: wing',
    ),
    code: 'OUT_OF_RANGE',
    mark: '12 kg/m^2',
    says: /two_up has a mass of 666\.8 kg/,
  },
  {
    what: 'a case heavier than the greatest mass',
    text: wholeEdited(['at_most: 650 kg', 'at_most: 590 kg']).replace(
      '  loading.items.fuel.mass: [40 kg, 60 kg]\n',
      '',
    ),
    code: 'OUT_OF_RANGE',
    mark: 'two_up',
    says: /600 kg.*590 kg/,
  },
  {
    what: 'a case that an axis makes too heavy',
    text: wholeEdited(['[40 kg, 60 kg]', '[40 kg, 120 kg]']),
    code: 'OUT_OF_RANGE',
    mark: '120 kg',
    says: /two_up has a mass of 660 kg/,
  },
  {
    what: 'an item varied under a name that is not listed',
    text: wholeEdited(['loading.items.fuel.mass:', 'loading.items.fuell.mass:']),
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'loading.items.fuell.mass',
  },
];

const sizingCases: readonly FaultCase[] = [
  {
    what: 'a chosen number that varies',
    text: size('choose: wing.taper, so_that: static_margin_aft, is: 8 %, between: [0.4, 0.9]'),
    code: 'OVERDETERMINED',
    mark: 'wing.taper',
    line: 'size:',
  },
  {
    what: 'a chosen number that follows from others',
    text: size('choose: tail.volume, so_that: static_margin_aft, is: 8 %, between: [0.4, 0.9]'),
    code: 'DERIVED_VARIED',
    mark: 'tail.volume',
  },
  {
    what: 'a chosen number that studies do not have',
    text: size('choose: tail.aera, so_that: static_margin_aft, is: 8 %, between: [0.6 m^2, 2 m^2]'),
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'tail.aera',
    says: /tail\.area/,
  },
  {
    what: 'a range of choice upside down',
    text: size('choose: tail.area, so_that: static_margin_aft, is: 8 %, between: [2.5 m^2, 0.6 m^2]'),
    code: 'BAND_REVERSED',
    mark: '[2.5 m^2, 0.6 m^2]',
  },
  {
    what: 'a range of choice with three ends',
    text: size('choose: tail.area, so_that: static_margin_aft, is: 8 %, between: [0.6 m^2, 1 m^2, 2 m^2]'),
    code: 'WRONG_TYPE',
    mark: '[0.6 m^2, 1 m^2, 2 m^2]',
  },
  {
    what: 'a range of choice in the wrong unit',
    text: size('choose: tail.area, so_that: static_margin_aft, is: 8 %, between: [0.6 m, 2.5 m^2]'),
    code: 'WRONG_DIMENSION',
    mark: '0.6 m',
  },
  {
    what: 'a tail arm chosen down to nothing',
    text: size('choose: tail.arm, so_that: static_margin_aft, is: 8 %, between: [0 m, 5 m]'),
    code: 'TAIL_AHEAD_OF_WING',
    mark: '[0 m, 5 m]',
  },
  {
    what: 'a figure to reach that is not there',
    text: size('choose: tail.area, so_that: static_margin_aff, is: 8 %, between: [0.6 m^2, 2.5 m^2]'),
    code: 'UNKNOWN_FIGURE',
    mark: 'static_margin_aff',
  },
  {
    what: 'a figure to reach that is no number',
    text: size('choose: tail.area, so_that: feasible, is: 1, between: [0.6 m^2, 2.5 m^2]'),
    code: 'UNKNOWN_FIGURE',
    mark: 'feasible',
  },
  {
    what: 'a figure to reach that the study gives',
    text: size('choose: tail.area, so_that: tail.area, is: 2 m^2, between: [0.6 m^2, 2.5 m^2]'),
    code: 'OVERDETERMINED',
    mark: 'tail.area',
    says: /number that is chosen/,
  },
  {
    what: 'a value to reach in the wrong unit',
    text: size('choose: tail.area, so_that: static_margin_aft, is: 8 deg, between: [0.6 m^2, 2.5 m^2]'),
    code: 'WRONG_DIMENSION',
    mark: '8 deg',
  },
  {
    what: 'a correction without a source',
    text: wholeEdited([", source: 'flight test of the prototype, 2026'", '']),
    code: 'MISSING_KEY',
    mark: 'corrections',
  },
  {
    what: 'a correction with an empty source',
    text: wholeEdited(["'flight test of the prototype, 2026'", "' '"]),
    code: 'MISSING_KEY',
    mark: 'source',
  },
  {
    what: 'a correction that is no correction',
    text: wholeEdited(['-1.2 %', '-1.2']),
    code: 'OUT_OF_RANGE',
    mark: '-1.2',
    says: /write -1\.2 %/,
  },
];

const holdCases: readonly FaultCase[] = [
  {
    what: 'a chosen number that a hold lets go',
    text: varying('wing.span: {from: 9 m, to: 10 m, count: 2, hold: root_chord}').concat(
      'size: {choose: wing.area, so_that: static_margin_aft, is: 8 %, between: [10 m^2, 13 m^2]}\n',
    ),
    code: 'DERIVED_VARIED',
    mark: 'wing.area',
  },
];

export const aeroplaneCases: readonly FaultCase[] = [
  ...conditionCases,
  ...equipmentCases,
  ...loadingCases,
  ...sizingCases,
  ...holdCases,
];
