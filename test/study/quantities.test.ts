import { describe, expect, test } from 'vitest';
import type { Dimension } from '../../src/figures/figure.ts';
import { nearestKnown } from '../../src/study/nearest-known.ts';
import { isFault, parseQuantity } from '../../src/study/quantities.ts';
import { unitMeaning } from '../../src/study/units-engine.ts';

const unlimited = (dimension: Dimension) => ({ dimension, least: -1e9, most: 1e9, limits: '' });

function si(text: string, dimension: Dimension): number | string {
  const read = parseQuantity(text, unlimited(dimension), 'x');
  return isFault(read) ? read.code : read.si;
}

describe('units', () => {
  // Exact by definition: foot and pound (1959 agreement), knot (1852 m an hour), statute mile 1609.344 m,
  // standard gravity 9.80665 m/s²; all from memory of ISO 80000 and NIST SP 811.
  test.each<[string, Dimension, number]>([
    ['3 m', 'length', 3],
    ['250 cm', 'length', 2.5],
    ['820 mm', 'length', 0.82],
    ['10 ft', 'length', 3.048],
    ['10 in', 'length', 0.254],
    ['184 ft^2', 'area', 184 * 0.3048 ** 2],
    ['11.4 m²', 'area', 11.4],
    ['11.4 m2', 'area', 11.4],
    ['6 ft2', 'area', 6 * 0.3048 ** 2],
    ['100 lb', 'mass', 45.359237],
    ['900 g', 'mass', 0.9],
    ['5.5 kg/m^2', 'mass_per_area', 5.5],
    ['5.5 kg/m²', 'mass_per_area', 5.5],
    ['2 lb/ft^2', 'mass_per_area', (2 * 0.45359237) / 0.3048 ** 2],
    ['10 kt', 'speed', 18_520 / 3600],
    ['10 kn', 'speed', 18_520 / 3600],
    ['10 knots', 'speed', 18_520 / 3600],
    ['10 knot', 'speed', 18_520 / 3600],
    ['36 km/h', 'speed', 10],
    ['100 mph', 'speed', 160_934.4 / 3600],
    ['100 ft/s', 'speed', 30.48],
    ['180 deg', 'angle', Math.PI],
    ['180°', 'angle', Math.PI],
    ['1.5 rad', 'angle', 1.5],
    ['6.1 /rad', 'per_angle', 6.1],
    ['6.1 1/rad', 'per_angle', 6.1],
    ['6.1 per rad', 'per_angle', 6.1],
    ['0.1 /deg', 'per_angle', 18 / Math.PI],
    ['0.1 per deg', 'per_angle', 18 / Math.PI],
    ['10 lbf', 'force', 10 * 0.45359237 * 9.80665],
    // the mechanical horsepower, 550 foot-pounds a second, is 745.699872 W to nine digits (NIST SP 811, from memory)
    ['73 kW', 'power', 73_000],
    ['100 hp', 'power', 55_000 * 0.3048 * 0.45359237 * 9.80665],
    ['120 N*m', 'moment', 120],
    ['10 lbf*ft', 'moment', 3.048 * 0.45359237 * 9.80665],
    ['1.9 rad/m', 'per_length', 1.9],
    ['9 deg/cm', 'per_length', 5 * Math.PI],
    ['2.54 deg/in', 'per_length', (100 * Math.PI) / 180],
    ['1.852 N/kt', 'force_per_speed', 3.6],
    ['24 %', 'fraction_of_mac', 0.24],
    ['0.24', 'fraction_of_mac', 0.24],
    ['95%', 'ratio', 0.95],
    ['−2 deg', 'angle', (-2 * Math.PI) / 180],
    ['1e-2 m', 'length', 0.01],
    ['.5', 'ratio', 0.5],
  ])('%s is %s %d', (text, dimension, value) => {
    expect(si(text, dimension)).toBeCloseTo(value, 12);
  });

  test('a horsepower has its published number of watts', () => {
    expect(si('1 hp', 'power')).toBeCloseTo(745.699872, 6);
  });

  test('a unit that divides the SI unit gives the nearest double', () => {
    expect(si('95 %', 'ratio')).toBe(0.95);
    expect(si('820 mm', 'length')).toBe(0.82);
    expect(si('7 g', 'mass')).toBe(0.007);
  });

  test('knots are never kilotonnes', () => {
    expect(unitMeaning('kt')?.kind).toBe('speed');
    expect(si('10 kt', 'mass')).toBe('WRONG_DIMENSION');
  });

  test.each<[string, Dimension, string]>([
    ['9.4', 'length', 'MISSING_UNIT'],
    ['0', 'length', 'MISSING_UNIT'],
    ['9.4 m', 'ratio', 'WRONG_DIMENSION'],
    ['9.4 %', 'length', 'WRONG_DIMENSION'],
    ['9.4 %', 'count', 'WRONG_DIMENSION'],
    ['9.4 m', 'area', 'WRONG_DIMENSION'],
    ['9.4 s', 'length', 'WRONG_DIMENSION'],
    ['9.4 K', 'length', 'WRONG_DIMENSION'],
    ['9.4 Meters', 'length', 'UNKNOWN_UNIT'],
    ['9.4 m(', 'length', 'UNKNOWN_UNIT'],
    ['9.4 constructor', 'length', 'UNKNOWN_UNIT'],
    ['9.4 m; import("fs")', 'length', 'UNKNOWN_UNIT'],
    ['9,4 m', 'length', 'WRONG_TYPE'],
    ['1 250 kg', 'mass', 'WRONG_TYPE'],
    ['m', 'length', 'WRONG_TYPE'],
    ['', 'length', 'WRONG_TYPE'],
  ])('%s as a %s is %s', (text, dimension, code) => {
    expect(si(text, dimension)).toBe(code);
  });
});

test('limits are told in the author’s unit, with the reason', () => {
  const read = parseQuantity(
    '70 ft',
    { dimension: 'length', least: 0, most: 3.048, limits: 'why' },
    'wing.span',
  );
  expect(read).toMatchObject({
    code: 'OUT_OF_RANGE',
    found: 'wing.span is 70 ft, outside 0 ft to 10 ft (why).',
  });
});

test('the nearest known word, and none when nothing is near', () => {
  const known = ['wing_span', 'wing_area', 'tail_span'];
  expect(nearestKnown('wing_spam', known)).toBe('wing_span');
  expect(nearestKnown('WING_AREA', known)).toBe('wing_area');
  expect(nearestKnown('quite different', known)).toBeUndefined();
  expect(nearestKnown('to', ['no', 'up'])).toBe('no');
  expect(nearestKnown('ab', ['cd'])).toBeUndefined();
  expect(nearestKnown('x'.repeat(100_000), known)).toBeUndefined();
});
