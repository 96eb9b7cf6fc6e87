/** Significant digits of a number in the table. */
export const significantDigits = 7;
/** Bytes that any number, its sign and a separator fit in. */
export const longestNumber = 24;

const leastMantissa = 10 ** (significantDigits - 1);
const mantissaLimit = 10 ** significantDigits;
/** Decimal exponents written without an exponent: 1e-6 ≤ |x| < 1e15. */
const leastPlainExponent = -6;
const mostPlainExponent = 14;

/**
 * Magnitudes that one correctly rounded product or quotient with a power of ten up to 1e22
 * (exact in a double) brings to seven digits.
 */
const leastQuick = 1e-16;
const quickLimit = 1e15;
/** The product is off by 1e-9 at most (half an ulp of 1e7), so this far from a half its rounding is sure. */
const doubtful = 1e-6;

const zero = 48;
const point = 46;
const minus = 45;
const plus = 43;
const letterE = 101;

const bits = new Float64Array(1);
const halves = new Int32Array(bits.buffer);
/** Which half of a double holds its exponent on this machine. */
const upperHalf = new Uint8Array(new Uint16Array([1]).buffer)[0] === 1 ? 1 : 0;

const exactPowers = Float64Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));
const powerOffset = 20;
const powers = Float64Array.from({ length: 40 }, (_, k) => Number(`1e${k - powerOffset}`));

/**
 * Writes a finite number with seven significant digits and returns the position after it.
 * The digits are those of `toPrecision(7)`; trailing zeros are dropped; −0 is written 0; plain
 * decimals from 1e-6 up to 1e15, else `1.5e-7`.
 * @param bytes must hold `longestNumber` bytes from `at` on
 */
export function writeNumber(value: number, bytes: Uint8Array, at: number): number {
  if (value === 0) {
    bytes[at] = zero;
    return at + 1;
  }
  let magnitude = value;
  if (value < 0) {
    magnitude = -value;
    bytes[at++] = minus;
  }
  if (!(magnitude >= leastQuick && magnitude < quickLimit)) return writeSlowly(magnitude, bytes, at);

  // The binary exponent times log10(2) is the decimal exponent or one less.
  bits[0] = magnitude;
  const binaryExponent = (halves[upperHalf] >>> 20) - 1023;
  let exponent = (binaryExponent * 1233) >> 12;
  if (magnitude >= powers[exponent + 1 + powerOffset]) exponent++;

  const shift = significantDigits - 1 - exponent;
  const scaled = shift >= 0 ? magnitude * exactPowers[shift] : magnitude / exactPowers[-shift];
  let mantissa = scaled | 0;
  const rest = scaled - mantissa - 0.5;
  if (rest > -doubtful) {
    if (rest < doubtful) return writeSlowly(magnitude, bytes, at);
    mantissa++;
  }
  if (mantissa === mantissaLimit) {
    mantissa = leastMantissa;
    exponent++;
  }
  return writeDigits(mantissa, exponent, bytes, at);
}

/** Ties, and magnitudes far from one: the digits that the language itself gives. */
function writeSlowly(magnitude: number, bytes: Uint8Array, at: number): number {
  const [mantissa, exponent] = magnitude.toExponential(significantDigits - 1).split('e');
  return writeDigits(Number(mantissa.replace('.', '')), Number(exponent), bytes, at);
}

/** The four digits of 0 … 9999, one number after the other. */
const fourDigits = Uint8Array.from({ length: 40_000 }, (_, k) => {
  const number = k >> 2;
  return zero + (Math.floor(number / 10 ** (3 - (k & 3))) % 10);
});

/** Writes seven digits at `at`. */
function writeSeven(mantissa: number, bytes: Uint8Array, at: number): void {
  const upper = (mantissa / 10_000) | 0;
  const first = 4 * upper;
  const second = 4 * (mantissa - 10_000 * upper);
  bytes[at] = fourDigits[first + 1];
  bytes[at + 1] = fourDigits[first + 2];
  bytes[at + 2] = fourDigits[first + 3];
  bytes[at + 3] = fourDigits[second];
  bytes[at + 4] = fourDigits[second + 1];
  bytes[at + 5] = fourDigits[second + 2];
  bytes[at + 6] = fourDigits[second + 3];
}

/** Lays out mantissa/1e6 · 10^exponent, mantissa of seven digits. */
function writeDigits(mantissa: number, exponent: number, bytes: Uint8Array, at: number): number {
  if (exponent < leastPlainExponent || exponent > mostPlainExponent) {
    return writeExponent(exponent, bytes, writeWithPoint(mantissa, 0, bytes, at));
  }
  if (exponent >= significantDigits - 1) {
    writeSeven(mantissa, bytes, at);
    const end = at + exponent + 1;
    for (let k = at + significantDigits; k < end; k++) bytes[k] = zero;
    return end;
  }
  if (exponent >= 0) return writeWithPoint(mantissa, exponent, bytes, at);
  bytes[at++] = zero;
  bytes[at++] = point;
  for (let k = -1; k > exponent; k--) bytes[at++] = zero;
  writeSeven(mantissa, bytes, at);
  return withoutZeros(bytes, at + significantDigits);
}

/** Seven digits with a point after the first `exponent + 1` of them (fewer than seven), zeros at the end dropped. */
function writeWithPoint(mantissa: number, exponent: number, bytes: Uint8Array, at: number): number {
  writeSeven(mantissa, bytes, at + 1);
  const pointAt = at + exponent + 1;
  for (let k = at; k < pointAt; k++) bytes[k] = bytes[k + 1];
  bytes[pointAt] = point;
  const end = withoutZeros(bytes, at + significantDigits + 1);
  return end === pointAt + 1 ? pointAt : end;
}

/** The end after dropping zeros before `end`; some other sign must stand before them. */
function withoutZeros(bytes: Uint8Array, end: number): number {
  while (bytes[end - 1] === zero) end--;
  return end;
}

function writeDigitRun(mantissa: number, digits: number, bytes: Uint8Array, at: number): number {
  let rest = mantissa;
  for (let k = at + digits - 1; k >= at; k--) {
    const shorter = (rest / 10) | 0;
    bytes[k] = zero + rest - shorter * 10;
    rest = shorter;
  }
  return at + digits;
}

function writeExponent(exponent: number, bytes: Uint8Array, at: number): number {
  bytes[at++] = letterE;
  bytes[at++] = exponent < 0 ? minus : plus;
  const size = Math.abs(exponent);
  return writeDigitRun(size, size < 10 ? 1 : size < 100 ? 2 : 3, bytes, at);
}

const billion = 1_000_000_000;

/** Writes a count with all its digits; what is no safe integer is written as `writeNumber` does. */
export function writeCount(value: number, bytes: Uint8Array, at: number): number {
  if (!Number.isSafeInteger(value)) return writeNumber(value, bytes, at);
  let size = value;
  if (value < 0) {
    size = -value;
    bytes[at++] = minus;
  }
  if (size < billion) return writeDigitRun(size, digitCount(size), bytes, at);
  const upper = Math.floor(size / billion);
  at = writeDigitRun(upper, digitCount(upper), bytes, at);
  return writeDigitRun(size - upper * billion, 9, bytes, at);
}

/** Decimal digits of an integer 0 … 1e9 − 1. */
function digitCount(size: number): number {
  let digits = 1;
  for (let power = 10; size >= power && digits < 9; power *= 10) digits++;
  return digits;
}
