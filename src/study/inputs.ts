/**
 * Every number that a study can give: its path, symbol, kind of quantity, meaning, the hard limits
 * outside which it is refused before a run, and the value taken when a study leaves it out.
 * Values are SI and radians. `[n]` in a path stands for a list entry, counted from 1.
 */
import type { Dimension } from '../figures/figure.ts';
import type { CgKind } from './study.ts';

/** What is taken for a number that is left out, and why. */
export interface InputDefault {
  readonly value: number;
  readonly source: string;
}

export interface InputDefinition {
  /** `wing.panels[n].taper` in the table, `wing.panels[2].taper` when asked for one path. */
  readonly path: string;
  /** The literature's symbol, plain text. */
  readonly symbol: string;
  readonly dimension: Dimension;
  /** One sentence for a designer. */
  readonly meaning: string;
  /** Hard limits, ends included [SI]. */
  readonly least: number;
  readonly most: number;
  /** Why the limits stand where they do. */
  readonly limits: string;
  readonly whenLeftOut?: InputDefault;
}

const deg = Math.PI / 180;
const hundred = 100;

type Row = readonly [
  path: string,
  symbol: string,
  dimension: Dimension,
  meaning: string,
  least: number,
  most: number,
  limits: string,
  whenLeftOut?: InputDefault,
];

const zero = (source: string): InputDefault => ({ value: 0, source });
const level = zero('taken as level; common practice, no source');
const symmetric = zero('taken as symmetric; common practice, no source');
const datum = 'any datum near the aeroplane';

/** Rows of a section, the same for wing and tail; `surface` is the path before `.section`. */
function sectionRows(surface: 'wing' | 'tail', mark: string): Row[] {
  const path = (key: string) => `${surface}.section.${key}`;
  const of = `of the ${surface}'s section`;
  return [
    [
      path('lift_slope'),
      `a_0${mark}`,
      'per_angle',
      `Lift-curve slope ${of}, incompressible.`,
      4.5,
      7.5,
      'thin-aerofoil theory gives 2π = 6.28 /rad; a slope per degree read as per radian falls outside',
    ],
    [
      path('zero_lift_angle'),
      `α_L0${mark}`,
      'angle',
      `Angle of attack without lift ${of}.`,
      -15 * deg,
      15 * deg,
      'more camber than any plain section has',
      symmetric,
    ],
    [
      path('moment'),
      `c_m${mark}`,
      'ratio',
      `Moment coefficient ${of} about its aerodynamic centre, nose-up positive.`,
      -0.5,
      0.5,
      'more camber than any plain section has',
      symmetric,
    ],
    [
      path('aerodynamic_centre'),
      `x_ac${mark}/c`,
      'ratio',
      `Aerodynamic centre ${of}, fraction of the chord behind the leading edge.`,
      15 / hundred,
      35 / hundred,
      'sections at subsonic speed lie near 25 %',
      { value: 25 / hundred, source: 'quarter chord; common practice, no source' },
    ],
    [
      path('maximum_lift'),
      `c_l,max${mark}`,
      'ratio',
      `Greatest lift coefficient ${of}.`,
      0.3,
      4,
      'a flat plate reaches more than 0.3; 4 is beyond slotted flaps on a whole wing',
      { value: 1.4, source: 'common practice, no source' },
    ],
    [
      path('thickness'),
      `t/c${mark}`,
      'ratio',
      `Thickness ${of}, fraction of the chord.`,
      1 / hundred,
      40 / hundred,
      'from a flat plate to a faired strut',
      { value: 12 / hundred, source: 'common practice, no source' },
    ],
  ];
}

const wingRows: Row[] = [
  [
    'wing.area',
    'S',
    'area',
    'Wing reference area, projected planform out to the centreline.',
    0.001,
    500,
    'from a hand-sized model to far above any light aeroplane',
  ],
  ['wing.span', 'b', 'length', 'Wing span, projected on the ground plan.', 0.05, 100, 'as for the area'],
  [
    'wing.aspect_ratio',
    'A',
    'ratio',
    'Wing aspect ratio, span squared over area.',
    1,
    60,
    'the lift-slope formulas fail below 1; beyond 60 there is no wing to compare with',
  ],
  ['wing.root_chord', 'c_r', 'length', 'Wing chord on the centreline.', 0.01, 30, 'as for the area'],
  [
    'wing.taper',
    'λ',
    'ratio',
    'Tip chord over root chord of the wing.',
    0.05,
    1.5,
    'a pointed tip has no section; more than 1.5 is no longer a tapered wing',
  ],
  [
    'wing.sweep_quarter_chord',
    'Λ¼',
    'angle',
    'Sweep of the wing’s quarter-chord line, aft positive.',
    -60 * deg,
    60 * deg,
    'the methods are for subsonic wings of moderate sweep',
    zero('unswept; common practice, no source'),
  ],
  [
    'wing.sweep_leading_edge',
    'Λ_LE',
    'angle',
    'Sweep of the wing’s leading edge, aft positive.',
    -60 * deg,
    60 * deg,
    'as for the quarter chord',
  ],
  [
    'wing.dihedral',
    'Γ',
    'angle',
    'Dihedral of the wing, tips up positive.',
    -30 * deg,
    60 * deg,
    'steeper panels are fins, not wings',
    level,
  ],
  [
    'wing.incidence',
    'i_w',
    'angle',
    'Angle of the wing’s root chord to the datum line, nose-up positive.',
    -20 * deg,
    20 * deg,
    'beyond the stall of a section',
    level,
  ],
  [
    'wing.washout',
    'ε_t',
    'angle',
    'Twist from root to tip, linear along the span, positive when the tip’s nose is down.',
    -20 * deg,
    20 * deg,
    'beyond the stall of a section',
    zero('no twist; common practice, no source'),
  ],
  [
    'wing.root_leading_edge',
    'x_r',
    'length',
    'Station of the wing’s leading edge on the centreline.',
    -100,
    100,
    datum,
  ],
  [
    'wing.height',
    'z_w',
    'length',
    'Plane of the wing’s root chord above the datum line.',
    -20,
    20,
    datum,
    zero('the root chord lies on the datum line; common practice, no source'),
  ],
  ...sectionRows('wing', ''),
  [
    'wing.panels[n].width',
    'w_[n]',
    'length',
    'Width of wing panel [n] on one side, projected on the ground plan.',
    0.005,
    50,
    'as for the span',
  ],
  [
    'wing.panels[n].span_fraction',
    'f_[n]',
    'ratio',
    'Width of wing panel [n] over the semi-span.',
    0.5 / hundred,
    100 / hundred,
    'all panels together make up the semi-span',
  ],
  [
    'wing.panels[n].taper',
    'λ_[n]',
    'ratio',
    'Outboard chord over inboard chord of wing panel [n].',
    0.05,
    1.5,
    'as for the whole wing',
  ],
  [
    'wing.panels[n].sweep_quarter_chord',
    'Λ¼_[n]',
    'angle',
    'Sweep of the quarter-chord line of wing panel [n], aft positive.',
    -60 * deg,
    60 * deg,
    'as for the whole wing',
    zero('unswept; common practice, no source'),
  ],
  [
    'wing.panels[n].sweep_leading_edge',
    'Λ_LE_[n]',
    'angle',
    'Sweep of the leading edge of wing panel [n], aft positive.',
    -60 * deg,
    60 * deg,
    'as for the whole wing',
  ],
  [
    'wing.panels[n].dihedral',
    'Γ_[n]',
    'angle',
    'Dihedral of wing panel [n], outboard end up positive.',
    -30 * deg,
    60 * deg,
    'steeper panels are fins, not wings',
    level,
  ],
];

const tailRows: Row[] = [
  [
    'tail.area',
    'S_t',
    'area',
    'Tail area; of a V-tail the area of both panels.',
    0.0001,
    200,
    'as for the wing',
  ],
  [
    'tail.volume',
    'V_H',
    'ratio',
    'Tail volume: tail area times tail arm over wing area and mean aerodynamic chord.',
    0.02,
    3,
    'aeroplanes lie between 0.2 and 1.2',
  ],
  [
    'tail.arm',
    'l_t',
    'length',
    'Quarter-MAC of the wing to quarter-MAC of the tail, along the datum line.',
    -60,
    60,
    'as for the span; screening needs it above 0',
  ],
  ['tail.station', 'x_t', 'length', 'Station of the tail’s quarter-MAC.', -100, 160, datum],
  [
    'tail.aspect_ratio',
    'A_t',
    'ratio',
    'Tail aspect ratio, span squared over area.',
    0.5,
    30,
    'the lift-slope formulas fail below',
  ],
  ['tail.span', 'b_t', 'length', 'Tail span; of a V-tail along its panels.', 0.02, 60, 'as for the wing'],
  [
    'tail.taper',
    'λ_t',
    'ratio',
    'Tip chord over root chord of the tail.',
    0.05,
    1.5,
    'as for the wing',
    { value: 0.7, source: 'common practice, no source' },
  ],
  [
    'tail.sweep_quarter_chord',
    'Λ¼_t',
    'angle',
    'Sweep of the tail’s quarter-chord line, aft positive.',
    -60 * deg,
    60 * deg,
    'as for the wing',
    zero('unswept; common practice, no source'),
  ],
  [
    'tail.sweep_leading_edge',
    'Λ_LE_t',
    'angle',
    'Sweep of the tail’s leading edge, aft positive.',
    -60 * deg,
    60 * deg,
    'as for the wing',
  ],
  [
    'tail.v_angle',
    'Γ_t',
    'angle',
    'Angle of a V-tail’s panels above the horizontal.',
    5 * deg,
    75 * deg,
    'flatter is a plain tail, steeper is two fins',
  ],
  [
    'tail.above_wing_root_chord',
    'h_t',
    'length',
    'Height of the tail’s quarter-MAC above the plane of the wing’s root chord.',
    -20,
    20,
    'as for the span',
    zero('in the plane of the root chord, where the downwash is strongest; common practice, no source'),
  ],
  [
    'tail.incidence',
    'i_t',
    'angle',
    'Angle of the tail to the datum line, nose-up positive.',
    -20 * deg,
    20 * deg,
    'beyond the stall of a section',
    level,
  ],
  [
    'tail.dynamic_pressure_ratio',
    'η_t',
    'ratio',
    'Dynamic pressure at the tail over that of the free stream.',
    0.4,
    1.5,
    'less is a stalled wing’s wake, more a powerful slipstream',
  ],
  ...sectionRows('tail', '_t'),
  [
    'tail.elevator.chord_fraction',
    'E',
    'ratio',
    'Elevator chord over tail chord.',
    5 / hundred,
    90 / hundred,
    'less does nothing, more is an all-moving tail',
    { value: 40 / hundred, source: 'common practice, no source' },
  ],
  [
    'tail.elevator.span_fraction',
    'b_e/b_t',
    'ratio',
    'Part of the tail’s span that carries the elevator.',
    5 / hundred,
    100 / hundred,
    'at most the whole span',
    { value: 95 / hundred, source: 'common practice, no source' },
  ],
  [
    'tail.elevator.effectiveness_ratio',
    'k_e',
    'ratio',
    'Measured elevator effectiveness over that of thin-aerofoil theory.',
    0.2,
    1,
    'real hinges leak and real sections have a boundary layer',
    { value: 0.8, source: 'common practice, no source' },
  ],
  [
    'tail.elevator.up',
    'δ_up',
    'angle',
    'Elevator travel, trailing edge up, as a positive angle.',
    0,
    60 * deg,
    'beyond any useful travel',
    { value: 25 * deg, source: 'common practice, no source' },
  ],
  [
    'tail.elevator.down',
    'δ_down',
    'angle',
    'Elevator travel, trailing edge down, as a positive angle.',
    0,
    60 * deg,
    'beyond any useful travel',
    { value: 15 * deg, source: 'common practice, no source' },
  ],
];

const bodyRows: Row[] = [
  ['body.stations[n].at', 'x_[n]', 'length', 'Where body station [n] lies, aft positive.', -100, 160, datum],
  [
    'body.stations[n].width',
    'w_b_[n]',
    'length',
    'Body width at station [n].',
    0,
    20,
    'a nose may end in a point',
  ],
  [
    'body.stations[n].depth',
    'd_b_[n]',
    'length',
    'Body depth at station [n].',
    0,
    20,
    'a nose may end in a point',
  ],
  ['body.boom.width', 'w_boom', 'length', 'Width of the tail boom.', 0.001, 10, 'a boom that carries a tail'],
  ['body.boom.depth', 'd_boom', 'length', 'Depth of the tail boom.', 0.001, 10, 'a boom that carries a tail'],
];

const otherRows: Row[] = [
  [
    'mass',
    'm',
    'mass',
    'Mass of the whole aeroplane.',
    0.005,
    50_000,
    'from a hand-sized model to a large twin',
  ],
  [
    'cg.above_datum',
    'z_cg',
    'length',
    'Centre of gravity above the datum line.',
    -20,
    20,
    datum,
    zero('not given: the vertical position is left out of the neutral point'),
  ],
  [
    'conditions[n].speed',
    'V_c',
    'speed',
    'Calibrated airspeed of condition [n].',
    1,
    250,
    'from a hand-launched model to where formulas for low subsonic speed end',
  ],
  [
    'conditions[n].height',
    'H',
    'length',
    'Pressure height of condition [n] above sea level.',
    -500,
    20_000,
    'the standard atmosphere is used up to 20 km',
  ],
];

const cgMeaning = (end: string, kind: CgKind): string => {
  const where = {
    percent_mac: 'fraction of the mean aerodynamic chord behind its leading edge',
    station: 'station',
    behind_mac_leading_edge: 'distance behind the leading edge of the mean aerodynamic chord',
  };
  return `${end === 'forward' ? 'Foremost' : 'Aftmost'} centre of gravity, ${where[kind]}.`;
};

/** The two ends of the CG range; what kind of quantity they are depends on how the study gives them. */
function cgRow(end: 'forward' | 'aft', kind: CgKind): Row {
  const mark = end === 'forward' ? 'fwd' : 'aft';
  const path = `cg.${end}`;
  const meaning = cgMeaning(end, kind);
  switch (kind) {
    case 'percent_mac':
      return [
        path,
        `h_${mark}`,
        'fraction_of_mac',
        meaning,
        -0.5,
        1.5,
        'an aeroplane with a tail behind its wing',
      ];
    case 'station':
      return [path, `x_${mark}`, 'length', meaning, -100, 160, datum];
    case 'behind_mac_leading_edge':
      return [path, `d_${mark}`, 'length', meaning, -20, 40, 'within reach of the wing'];
  }
}

function definition(row: Row): InputDefinition {
  const [path, symbol, dimension, meaning, least, most, limits, whenLeftOut] = row;
  const fixed = { path, symbol, dimension, meaning, least, most, limits };
  return whenLeftOut ? { ...fixed, whenLeftOut } : fixed;
}

const cgKinds: readonly CgKind[] = ['percent_mac', 'station', 'behind_mac_leading_edge'];

/** The whole table; the CG's two ends stand in it once, as fractions of the MAC. */
export const inputDefinitions: readonly InputDefinition[] = [
  ...otherRows.slice(0, 1),
  ...wingRows,
  ...tailRows,
  ...bodyRows,
  cgRow('forward', 'percent_mac'),
  cgRow('aft', 'percent_mac'),
  ...otherRows.slice(1),
].map(definition);

const byPattern = new Map(inputDefinitions.map((entry) => [entry.path, entry]));
const cgByKind: ReadonlyMap<string, InputDefinition> = new Map(
  (['forward', 'aft'] as const).flatMap((end) =>
    cgKinds.map((kind) => [`cg.${end} ${kind}`, definition(cgRow(end, kind))] as const),
  ),
);

/** `wing.panels[2].taper` → `wing.panels[n].taper`. */
export function patternOf(path: string): string {
  return path.replace(/\[\d+\]/g, '[n]');
}

/** `wing.panels[2].taper` → `wing_panels_2_taper`, the name of the input's figure. */
export function figureNameOf(path: string): string {
  return path.replace(/\[(\d+)\]/g, '_$1').replace(/\./g, '_');
}

/**
 * The definition of one number by its path, list entries filled in; undefined for a path that no
 * study has.
 * @param cgKind how this end of the CG range is given; only `cg.forward` and `cg.aft` depend on it
 */
export function findInputDefinition(
  path: string,
  cgKind: CgKind = 'percent_mac',
): InputDefinition | undefined {
  const found = cgByKind.get(`${path} ${cgKind}`) ?? byPattern.get(patternOf(path));
  const entry = /\[(\d+)\]/.exec(path)?.[1];
  if (!found || entry === undefined) return found;
  const fill = (text: string) => text.replaceAll('[n]', entry);
  return { ...found, path, symbol: fill(found.symbol), meaning: fill(found.meaning) };
}

/** As `findInputDefinition`, for a path that is known to be one of a checked study. */
export function inputDefinition(path: string, cgKind: CgKind = 'percent_mac'): InputDefinition {
  const found = findInputDefinition(path, cgKind);
  if (!found) throw new RangeError(`no input is called ${path}`);
  return found;
}
