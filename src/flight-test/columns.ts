/** Columns that flight-test data may have: what stands in them, and the SI value of their unit. */

/** What a column tells of a point. */
export type ColumnKey =
  | 'point'
  | 'calibrated_speed'
  | 'mass'
  | 'cg_percent_mac'
  | 'cg_station'
  | 'elevator'
  | 'stick_force'
  | 'flaps'
  | 'flaps_angle'
  | 'power'
  | 'height';

export interface DataColumn {
  readonly name: string;
  readonly key: ColumnKey;
  /** As said in messages; empty for texts. */
  readonly unit: string;
  /** SI value of one such unit; NaN for texts. */
  readonly factor: number;
}

const foot = 0.3048;
const pound = 0.45359237;
const gravity = 9.80665;
const hour = 3600;
const degree = Math.PI / 180;
const text = { unit: '', factor: Number.NaN } as const;

/** Exact by definition: foot, inch, mile and pound by the international agreement of 1959, knot by the nautical mile of 1852 m. */
export const dataColumns: readonly DataColumn[] = [
  { name: 'point', key: 'point', ...text },
  { name: 'calibrated_speed_kt', key: 'calibrated_speed', unit: 'kt', factor: 1852 / hour },
  { name: 'calibrated_speed_m_per_s', key: 'calibrated_speed', unit: 'm/s', factor: 1 },
  { name: 'calibrated_speed_km_per_h', key: 'calibrated_speed', unit: 'km/h', factor: 1000 / hour },
  { name: 'calibrated_speed_mph', key: 'calibrated_speed', unit: 'mph', factor: 1609.344 / hour },
  { name: 'mass_kg', key: 'mass', unit: 'kg', factor: 1 },
  { name: 'mass_lb', key: 'mass', unit: 'lb', factor: pound },
  { name: 'cg_percent_mac', key: 'cg_percent_mac', unit: '% MAC', factor: 1 / 100 },
  { name: 'cg_station_m', key: 'cg_station', unit: 'm', factor: 1 },
  { name: 'cg_station_ft', key: 'cg_station', unit: 'ft', factor: foot },
  { name: 'cg_station_in', key: 'cg_station', unit: 'in', factor: foot / 12 },
  { name: 'elevator_deg', key: 'elevator', unit: 'deg', factor: degree },
  { name: 'stick_force_N', key: 'stick_force', unit: 'N', factor: 1 },
  { name: 'stick_force_lbf', key: 'stick_force', unit: 'lbf', factor: pound * gravity },
  { name: 'flaps', key: 'flaps', ...text },
  { name: 'flaps_deg', key: 'flaps_angle', unit: 'deg', factor: degree },
  { name: 'power', key: 'power', ...text },
  { name: 'height_m', key: 'height', unit: 'm', factor: 1 },
  { name: 'height_ft', key: 'height', unit: 'ft', factor: foot },
];

/** Columns of which exactly one must be there; the optional ones may be there once. */
export const quantities: readonly { readonly keys: readonly ColumnKey[]; readonly needed: boolean }[] = [
  { keys: ['point'], needed: true },
  { keys: ['calibrated_speed'], needed: true },
  { keys: ['mass'], needed: true },
  { keys: ['cg_percent_mac', 'cg_station'], needed: true },
  { keys: ['elevator'], needed: true },
  { keys: ['power'], needed: true },
  { keys: ['height'], needed: true },
  { keys: ['stick_force'], needed: false },
  { keys: ['flaps', 'flaps_angle'], needed: false },
];

export interface Limits {
  readonly least: number;
  readonly most: number;
  /** Why they stand where they do. */
  readonly reason: string;
}

/** What a number may be, SI. CG stations are judged as fractions of the MAC. */
export const limitsOf: Readonly<Partial<Record<ColumnKey, Limits>>> = {
  calibrated_speed: {
    least: 1,
    most: 250,
    reason: 'from a hand-launched model to where low subsonic speed ends',
  },
  mass: { least: 0.05, most: 20_000, reason: 'from a small model to beyond a light twin' },
  elevator: { least: -60 * degree, most: 60 * degree, reason: 'no elevator travels farther' },
  stick_force: { least: -2000, most: 2000, reason: 'no pilot holds more' },
  flaps_angle: {
    least: -20 * degree,
    most: 60 * degree,
    reason: 'from a sailplane’s highest speed setting to where more deflection adds drag only',
  },
  height: { least: -500, most: 20_000, reason: 'the standard atmosphere is used up to 20 km' },
};

/** CG [-]. Outside this the unit or the datum is another. */
export const cgLimits: Limits = {
  least: -0.5,
  most: 1.5,
  reason: 'so far from the wing nothing can be trimmed: is the datum that of the study?',
};

/** C_L [-]. Outside this speed, mass or area are wrong. */
export const liftLimits: Limits = {
  least: 0.01,
  most: 4,
  reason: 'beyond slotted flaps on a whole wing: check speed, mass and the study’s wing area',
};

/** Headings that ask for a speed which is not calibrated. */
export const uncalibrated =
  /^(?:indicated|true|equivalent)_?(?:air)?speed|^(?:air)?speed|^[ite]as\b|^[ite]as_/i;
