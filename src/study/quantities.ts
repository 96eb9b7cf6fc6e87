/** Numbers with units: text in, SI out, or what is wrong with the text. */
import type { StudyFaultCode } from '../errors.ts';
import type { Dimension } from '../figures/figure.ts';
import { nearestKnown } from './nearest-known.ts';
import { type UnitKind, type UnitMeaning, unitMeaning } from './units-engine.ts';

export interface Quantity {
  /** In the author's unit. */
  readonly value: number;
  /** SI value of one such unit. */
  readonly factor: number;
  /** As written; empty for a bare number. */
  readonly unit: string;
  readonly si: number;
}

/** What a quantity may be. Limits are SI, ends included. */
export interface QuantityKind {
  readonly dimension: Dimension;
  readonly least: number;
  readonly most: number;
  /** Why the limits stand where they do. */
  readonly limits: string;
}

export interface QuantityFault {
  readonly code: StudyFaultCode;
  readonly found: string;
  readonly remedy: string;
}

/** Units to offer, commonest first. Anything that mathjs knows of the same kind works as well. */
export const unitExamples: Record<Dimension, readonly string[]> = {
  length: ['m', 'cm', 'mm', 'ft', 'in'],
  area: ['m^2', 'cm^2', 'ft^2', 'in^2'],
  volume: ['m^3', 'ft^3'],
  mass: ['kg', 'g', 'lb'],
  mass_per_area: ['kg/m^2', 'lb/ft^2'],
  speed: ['m/s', 'km/h', 'kt', 'mph', 'ft/s'],
  angle: ['deg', 'rad'],
  per_angle: ['/rad', '/deg'],
  force: ['N', 'lbf'],
  power: ['kW', 'W', 'hp'],
  moment: ['N*m', 'lbf*ft'],
  per_length: ['rad/m', 'deg/cm', 'deg/in'],
  force_per_speed: ['N/kt', 'lbf/kt'],
  ratio: ['%'],
  fraction_of_mac: ['%'],
  count: [],
};

const kindWords: Record<UnitKind, string> = {
  length: 'a length',
  area: 'an area',
  volume: 'a volume',
  mass: 'a mass',
  mass_per_area: 'a mass per area',
  speed: 'a speed',
  angle: 'an angle',
  per_angle: 'a value per angle',
  force: 'a force',
  power: 'a power',
  moment: 'a moment',
  per_length: 'an angle per length',
  force_per_speed: 'a force per speed',
  other: 'something else',
};

export function dimensionWords(dimension: Dimension): string {
  if (dimension === 'fraction_of_mac') return 'a fraction of the mean aerodynamic chord';
  if (dimension === 'ratio') return 'a ratio';
  if (dimension === 'count') return 'a count';
  return kindWords[dimension];
}

const quantityText = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*(.*)$/s;
const percent: UnitMeaning = { kind: 'other', factor: 0.01 };

/**
 * A value in SI. Where the unit is a whole part of the SI unit (mm, g, %) it divides, so that 95 % is
 * 0.95 to the last bit and not 0.9500000000000001.
 */
export function inSi(value: number, factor: number): number {
  const parts = Math.round(1 / factor);
  return parts > 1 && 1 / parts === factor ? value / parts : value * factor;
}

/** At most seven digits, without trailing zeros; for messages. */
export function shortNumber(value: number): string {
  return String(Number(value.toPrecision(7)));
}

/** Digits that survive from decimals through a unit's factor and back; the rest is rounding noise. */
const cleanDigits = 14;

/** Rounds away what binary fractions add to decimals: 0.6000000000000001 → 0.6. */
export function clean(value: number): number {
  return Number(value.toPrecision(cleanDigits));
}

/**
 * Reads `9.4 m`, `24 %`, `0.105 /deg` or a bare ratio.
 * @param label what the number is called in messages: `wing.span`
 */
export function parseQuantity(text: string, kind: QuantityKind, label: string): Quantity | QuantityFault {
  const parts = quantityText.exec(text.trim().replace(/^−/, '-'));
  if (!parts) return notANumber(text, kind, label);
  const value = Number(parts[1]);
  const unit = parts[2]!.trim();
  const factor = factorOf(unit, kind.dimension, label, text);
  if (typeof factor !== 'number') return factor;
  const quantity = { value, factor, unit, si: inSi(value, factor) };
  return rangeFault(quantity, kind, label) ?? wholeFault(quantity, kind, label) ?? quantity;
}

export function isFault(read: Quantity | QuantityFault): read is QuantityFault {
  return 'code' in read;
}

function notANumber(text: string, kind: QuantityKind, label: string): QuantityFault {
  const example = ['3.5', unitExamples[kind.dimension][0]].join(' ').trim();
  return {
    code: 'WRONG_TYPE',
    found: `${label} is '${shorten(text)}', where a number is wanted.`,
    remedy: `Write ${dimensionWords(kind.dimension)}, such as ${example}.`,
  };
}

function factorOf(unit: string, dimension: Dimension, label: string, text: string): number | QuantityFault {
  const bare = dimension === 'ratio' || dimension === 'fraction_of_mac' || dimension === 'count';
  if (unit === '') return bare ? 1 : missingUnit(label, text, dimension);
  const meaning = unit === '%' ? percent : unitMeaning(unit);
  if (!meaning) return unknownUnit(unit, label, text, dimension);
  if (unit === '%' ? bare && dimension !== 'count' : meaning.kind === dimension) return meaning.factor;
  return wrongDimension(unit, meaning, label, text, dimension);
}

function missingUnit(label: string, text: string, dimension: Dimension): QuantityFault {
  const offers = unitExamples[dimension].slice(0, 4).map((unit) => `${shorten(text)} ${unit}`);
  return {
    code: 'MISSING_UNIT',
    found: `${label} is ${shorten(text)}, without a unit; it is ${dimensionWords(dimension)}.`,
    remedy: `Write the unit: ${offers.join(' or ')}.`,
  };
}

function unknownUnit(unit: string, label: string, text: string, dimension: Dimension): QuantityFault {
  if (/^[,\d]/.test(unit)) {
    return {
      code: 'WRONG_TYPE',
      found: `${label} is '${shorten(text)}', which is not a number.`,
      remedy: 'Write decimals with a point and thousands without a mark: 1250.5.',
    };
  }
  const known = unitExamples[dimension];
  const near = nearestKnown(unit, known);
  const all = known.length
    ? `Units for ${dimensionWords(dimension)}: ${known.join(', ')}.`
    : 'Write no unit.';
  return {
    code: 'UNKNOWN_UNIT',
    found: `${label} is '${shorten(text)}'; '${shorten(unit)}' is no known unit.`,
    remedy: near ? `Did you mean '${near}'? ${all}` : all,
  };
}

function wrongDimension(
  unit: string,
  meaning: UnitMeaning,
  label: string,
  text: string,
  dimension: Dimension,
): QuantityFault {
  // newton metres and joules have one dimension
  const ofUnit = meaning.kind === 'moment' ? 'a moment or an energy' : kindWords[meaning.kind];
  const what = unit === '%' ? 'a share' : ofUnit;
  const known = unitExamples[dimension];
  return {
    code: 'WRONG_DIMENSION',
    found: `${label} is '${shorten(text)}': '${unit}' is the unit of ${what}, and ${dimensionWords(dimension)} is wanted.`,
    remedy: known.length ? `Use one of ${known.join(', ')}.` : 'Write the number without a unit.',
  };
}

/** The fault of a number outside its limits; undefined inside them. */
export function rangeFault(quantity: Quantity, kind: QuantityKind, label: string): QuantityFault | undefined {
  const { si, value, factor, unit } = quantity;
  if (si >= kind.least && si <= kind.most) return undefined;
  const show = (limit: number) => [shortNumber(limit / factor), unit].join(' ').trim();
  const asPercent = value / 100;
  const isShare = kind.dimension === 'fraction_of_mac' || (kind.dimension === 'ratio' && kind.most <= 1);
  const hint =
    isShare && unit === '' && Math.abs(value) > 1 && asPercent >= kind.least && asPercent <= kind.most;
  return {
    code: 'OUT_OF_RANGE',
    found: `${label} is ${show(si)}, outside ${show(kind.least)} to ${show(kind.most)} (${kind.limits}).`,
    remedy: hint
      ? `A bare number is a fraction: write ${shortNumber(value)} % for ${shortNumber(asPercent)}.`
      : 'Give a value inside these limits.',
  };
}

function wholeFault({ si }: Quantity, { dimension }: QuantityKind, label: string): QuantityFault | undefined {
  if (dimension !== 'count' || Number.isInteger(si)) return undefined;
  return {
    code: 'OUT_OF_RANGE',
    found: `${label} is ${shortNumber(si)}, which is no whole number.`,
    remedy: 'Count in whole numbers.',
  };
}

/** A piece of the author's text, short enough for a message. */
export function shorten(text: string): string {
  const most = 40;
  const line = text.replace(/\s+/g, ' ');
  return line.length > most ? `${line.slice(0, most)}…` : line;
}
