/**
 * The one file that touches mathjs: what a unit's text means. Only mathjs' unit parts are taken,
 * because its whole index takes over a second to load; the build bundles this file by itself.
 */
import { create, createUnitDependencies, type Unit, unitDependencies } from 'mathjs';

export type UnitKind =
  | 'length'
  | 'area'
  | 'volume'
  | 'mass'
  | 'mass_per_area'
  | 'speed'
  | 'angle'
  | 'per_angle'
  | 'force'
  | 'power'
  | 'moment'
  | 'per_length'
  | 'force_per_speed'
  | 'other';

export interface UnitMeaning {
  readonly kind: UnitKind;
  /** SI value of one such unit; 0 for kinds that studies do not use. */
  readonly factor: number;
}

const math = create({ unitDependencies, createUnitDependencies });

/** mathjs reads kt as kilotonnes; in this trade it is the knot, 1852 m an hour by definition. */
const knot = math.unit(1852 / 3600, 'm/s');
math.createUnit({ kt: { definition: knot, aliases: ['kts', 'kn', 'knot', 'knots'] } }, { override: true });
math.createUnit({ mph: { definition: math.unit(1609.344 / 3600, 'm/s') } }, { override: true });
/** The mechanical horsepower, 550 foot-pounds a second: 745.699872 W. */
const horsepower = math.unit(550 * 0.3048 * 0.45359237 * 9.80665, 'W');
math.createUnit({ hp: { definition: horsepower } }, { override: true });

const si: readonly (readonly [Exclude<UnitKind, 'other'>, string])[] = [
  ['length', 'm'],
  ['area', 'm^2'],
  ['volume', 'm^3'],
  ['mass', 'kg'],
  ['mass_per_area', 'kg/m^2'],
  ['speed', 'm/s'],
  ['angle', 'rad'],
  ['per_angle', 'rad^-1'],
  ['force', 'N'],
  ['power', 'W'],
  ['moment', 'N*m'],
  ['per_length', 'rad/m'],
  ['force_per_speed', 'N*s/m'],
];
const references = si.map(([kind, text]) => [kind, text, math.unit(1, text)] as const);

/** `m²`, `m2` and `m^2` are one; so are `/rad`, `1/rad` and `per rad`. */
function spelling(text: string): string {
  return text
    .replace(/°|º/g, 'deg')
    .replace(/²/g, '^2')
    .replace(/³/g, '^3')
    .replace(/·/g, '*')
    .replace(/^(?:per\s+|1\s*\/\s*|\/\s*)([a-zA-Z]+)$/, '$1^-1')
    .replace(/\b([a-zA-Z]+)([23])\b/g, '$1^$2');
}

/** Letters, powers, products and quotients: all that a unit needs, so nothing else reaches mathjs. */
const unitText = /^[a-zA-Z][a-zA-Z0-9^*/ -]{0,39}$/;

/** What a unit's text means; undefined for a text that is no unit. */
export function unitMeaning(text: string): UnitMeaning | undefined {
  const spelt = spelling(text.trim());
  if (!unitText.test(spelt)) return undefined;
  let unit: Unit;
  try {
    unit = math.unit(1, spelt);
  } catch {
    return undefined;
  }
  for (const [kind, siText, reference] of references) {
    if (unit.equalBase(reference)) return { kind, factor: unit.toNumber(siText) };
  }
  return { kind: 'other', factor: 0 };
}
