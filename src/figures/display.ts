import type { ShowSystem } from '../study/study.ts';
import type { Dimension, Figure, TableColumn } from './figure.ts';

/** How one dimension is shown: the unit's text, the factor from SI to it, and decimals that suit it. */
export interface DisplayUnit {
  readonly unit: string;
  readonly factor: number;
  readonly decimals: number;
}

const degrees = 180 / Math.PI;
const foot = 0.3048;
const inch = foot / 12;
const pound = 0.45359237;
const knot = 1852 / 3600;
const poundForce = pound * 9.80665;
/** 550 foot-pounds a second. */
const horsepower = 550 * foot * poundForce;

/** Exact by definition: foot and pound by the international agreement of 1959, knot by the nautical mile of 1852 m. */
const shown: Record<Dimension, { metric: DisplayUnit; US: DisplayUnit }> = {
  length: { metric: unit('m', 1, 3), US: unit('ft', 1 / foot, 2) },
  area: { metric: unit('m²', 1, 3), US: unit('ft²', 1 / foot ** 2, 2) },
  volume: { metric: unit('m³', 1, 4), US: unit('ft³', 1 / foot ** 3, 2) },
  mass: { metric: unit('kg', 1, 1), US: unit('lb', 1 / pound, 1) },
  mass_per_area: { metric: unit('kg/m²', 1, 2), US: unit('lb/ft²', foot ** 2 / pound, 3) },
  speed: { metric: unit('km/h', 3.6, 1), US: unit('kt', 1 / knot, 1) },
  force: { metric: unit('N', 1, 1), US: unit('lbf', 1 / poundForce, 1) },
  power: { metric: unit('kW', 1 / 1000, 1), US: unit('hp', 1 / horsepower, 1) },
  moment: { metric: unit('N·m', 1, 1), US: unit('lbf·ft', 1 / (poundForce * foot), 1) },
  per_length: { metric: unit('°/cm', degrees / 100, 2), US: unit('°/in', degrees * inch, 2) },
  force_per_speed: {
    metric: unit('N/(km/h)', 1 / 3.6, 2),
    US: unit('lbf/kt', knot / poundForce, 3),
  },
  angle: both('°', degrees, 2),
  per_angle: both('/rad', 1, 3),
  ratio: both('', 1, 4),
  fraction_of_mac: both('% MAC', 100, 2),
  count: both('', 1, 0),
};

function unit(text: string, factor: number, decimals: number): DisplayUnit {
  return { unit: text, factor, decimals };
}
function both(text: string, factor: number, decimals: number) {
  return { metric: unit(text, factor, decimals), US: unit(text, factor, decimals) };
}

export function displayUnit(dimension: Dimension, show: ShowSystem): DisplayUnit {
  return shown[dimension][show];
}

/** The SI value as text in the shown unit, with the unit; an empty cell is an en dash. */
export function showValue(value: number, dimension: Dimension, show: ShowSystem): string {
  if (Number.isNaN(value)) return '–';
  const { unit: text, factor, decimals } = displayUnit(dimension, show);
  const digits = (value * factor).toFixed(decimals);
  if (text === '' || text === '°') return digits + text;
  return `${digits} ${text}`;
}

/** Suffix and factor of a table column, SI with the unit in the name (percent and degrees are spelt out). */
const columnUnits: Record<Dimension, { suffix: string; unit: string; factor: number }> = {
  length: { suffix: '_m', unit: 'm', factor: 1 },
  area: { suffix: '_m2', unit: 'm^2', factor: 1 },
  volume: { suffix: '_m3', unit: 'm^3', factor: 1 },
  mass: { suffix: '_kg', unit: 'kg', factor: 1 },
  mass_per_area: { suffix: '_kg_per_m2', unit: 'kg/m^2', factor: 1 },
  speed: { suffix: '_m_per_s', unit: 'm/s', factor: 1 },
  force: { suffix: '_N', unit: 'N', factor: 1 },
  power: { suffix: '_W', unit: 'W', factor: 1 },
  moment: { suffix: '_N_m', unit: 'N*m', factor: 1 },
  per_length: { suffix: '_rad_per_m', unit: 'rad/m', factor: 1 },
  force_per_speed: { suffix: '_N_s_per_m', unit: 'N*s/m', factor: 1 },
  angle: { suffix: '_deg', unit: 'deg', factor: degrees },
  per_angle: { suffix: '_per_rad', unit: '1/rad', factor: 1 },
  ratio: { suffix: '', unit: '', factor: 1 },
  fraction_of_mac: { suffix: '_percent_mac', unit: '%', factor: 100 },
  count: { suffix: '', unit: '', factor: 1 },
};

export function tableColumn(figure: Figure): TableColumn {
  const { suffix, unit: text, factor } = columnUnits[figure.dimension];
  return { name: figure.name + suffix, figure, factor, unit: text };
}
