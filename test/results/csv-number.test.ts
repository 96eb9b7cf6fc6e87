import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { writeCount, writeNumber } from '../../src/results/csv-number.ts';

const bytes = new Uint8Array(64);
function text(value: number): string {
  return new TextDecoder().decode(bytes.subarray(0, writeNumber(value, bytes, 0)));
}
function countText(value: number): string {
  return new TextDecoder().decode(bytes.subarray(0, writeCount(value, bytes, 0)));
}

// The reference is ECMAScript's own Number.prototype.toPrecision, which the language defines exactly.
function expectSevenDigits(value: number): void {
  const written = text(value);
  expect(Number(written)).toBe(Number(value.toPrecision(7)) + 0);
  const size = Math.abs(Number(written));
  expect(written.includes('e')).toBe(size !== 0 && (size < 1e-6 || size >= 1e15));
  expect(written).not.toMatch(/\.\d*0(e|$)|\.(e|$)|^\.|^-0$/);
  expect(written.length).toBeLessThan(24);
}

describe('a number with seven significant digits', () => {
  test('equals toPrecision(7) for doubles of every magnitude', () => {
    const any = fc.double({ noNaN: true, noDefaultInfinity: true });
    fc.assert(fc.property(any, expectSevenDigits), { numRuns: 5000 });
  });

  test('equals toPrecision(7) over the magnitudes of the trade', () => {
    const decimal = fc.tuple(
      fc.double({ min: -10, max: 10, noNaN: true }),
      fc.integer({ min: -20, max: 20 }),
    );
    fc.assert(
      fc.property(decimal, ([m, e]) => expectSevenDigits(m * 10 ** e)),
      { numRuns: 5000 },
    );
  });

  test('equals toPrecision(7) at ties and a few ulps beside them', () => {
    const tie = fc.tuple(
      fc.integer({ min: 1_000_000, max: 9_999_999 }),
      fc.integer({ min: -22, max: 22 }),
      fc.integer({ min: -3, max: 3 }),
      fc.boolean(),
    );
    const bits = new DataView(new ArrayBuffer(8));
    const beside = ([m, e, ulps, negative]: [number, number, number, boolean]) => {
      bits.setFloat64(0, Number(`${m}.5e${e}`));
      bits.setBigInt64(0, bits.getBigInt64(0) + BigInt(ulps));
      expectSevenDigits(negative ? -bits.getFloat64(0) : bits.getFloat64(0));
    };
    fc.assert(fc.property(tie, beside), { numRuns: 5000 });
  });

  test('equals toPrecision(7) at every power of ten and of two, and one ulp beside it', () => {
    for (let e = -323; e <= 308; e++) expectSevenDigits(Number(`1e${e}`));
    for (let e = -320; e <= 308; e++) expectSevenDigits(Number(`9.9999995e${e - 1}`));
    for (let e = -1074; e < 1024; e++) {
      expectSevenDigits(2 ** e);
      expectSevenDigits(2 ** e * (1 - Number.EPSILON));
      expectSevenDigits(2 ** e * (1 + Number.EPSILON));
    }
  });

  test.each([
    [0, '0'],
    [-0, '0'],
    [-1.5, '-1.5'],
    [11.4, '11.4'],
    [100, '100'],
    [1234567.4, '1234567'],
    [12345678, '12345680'],
    [0.1 + 0.2, '0.3'],
    [1e-6, '0.000001'],
    [9.9999999e-7, '0.000001'],
    [1e-7, '1e-7'],
    [-1.25e-9, '-1.25e-9'],
    [999999949999999, '999999900000000'],
    [1e15, '1e+15'],
    [1.234567891e-300, '1.234568e-300'],
    [5e-324, '4.940656e-324'],
    [Number.MAX_VALUE, '1.797693e+308'],
  ])('%d is written %s', (value, written) => {
    expect(text(value)).toBe(written);
  });
});

describe('a count', () => {
  test('keeps all its digits', () => {
    const integer = fc.integer({ min: Number.MIN_SAFE_INTEGER, max: Number.MAX_SAFE_INTEGER });
    fc.assert(
      fc.property(integer, (value) => {
        expect(countText(value)).toBe(String(value + 0));
      }),
      { numRuns: 5000 },
    );
    for (const value of [0, 9, 10, 999_999_999, 1_000_000_000, 12_345_678_901]) {
      expect(countText(value)).toBe(String(value));
    }
    expect(countText(-0)).toBe('0');
  });

  test('that is no integer is written with seven digits', () => {
    expect(countText(2.5)).toBe('2.5');
  });
});
