import { datum, type Row } from './input-row.ts';

const massLimits = 'from a gram to a large twin';

/** Numbers of the loading. */
export const loadingRows: Row[] = [
  ['loading.empty.mass', 'm_e', 'mass', 'Mass of the empty aeroplane.', 0.001, 50_000, massLimits],
  [
    'loading.empty.station',
    'x_e',
    'length',
    'Station of the empty aeroplane’s centre of gravity.',
    -100,
    160,
    datum,
  ],
  [
    'loading.empty.height',
    'z_e',
    'length',
    'Centre of gravity of the empty aeroplane above the datum line.',
    -20,
    20,
    datum,
  ],
  [
    'loading.items[n].mass',
    'm_[n]',
    'mass',
    'Mass of item [n].',
    0,
    50_000,
    'nothing aboard to a large twin',
  ],
  [
    'loading.items[n].mass_per_area',
    'm_S[n]',
    'mass_per_area',
    'Mass of item [n] over the area of the wing or tail that carries it.',
    0,
    500,
    'nothing to far beyond a large twin’s wing',
  ],
  ['loading.items[n].station', 'x_m[n]', 'length', 'Station of item [n].', -100, 160, datum],
  [
    'loading.items[n].at',
    'p_[n]',
    'ratio',
    'Place of item [n], fraction of the chord or length that carries it, aft positive.',
    -1,
    3,
    'near what carries it',
  ],
  ['loading.items[n].height', 'z_m[n]', 'length', 'Item [n] above the datum line.', -20, 20, datum],
  [
    'loading.at_most',
    'm_max',
    'mass',
    'Greatest mass that a loading case may have.',
    0.001,
    50_000,
    massLimits,
  ],
];
