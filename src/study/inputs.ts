/**
 * Every number that a study can give: its path, symbol, kind of quantity, meaning, the hard limits
 * outside which it is refused before a run, and the value taken when a study leaves it out.
 * Values are SI and radians. `[n]` in a path stands for a list entry, counted from 1.
 */
import { conditionRows } from './condition-inputs.ts';
import { controlRows, landingGearRows } from './control-inputs.ts';
import { datum, type InputDefinition, type Row, zero } from './input-row.ts';
import { loadingRows } from './loading-inputs.ts';
import { propellerRows } from './power-inputs.ts';
import type { CgKind } from './study.ts';
import { tailRows } from './tail-inputs.ts';
import { wingRows } from './wing-inputs.ts';

export { shareOfSectionMaximumLift } from '../methods/maximum-lift.ts';
export type { InputDefault, InputDefinition } from './input-row.ts';

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
  ...propellerRows,
  ...controlRows,
  ...landingGearRows,
  ...loadingRows,
  ...conditionRows,
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
