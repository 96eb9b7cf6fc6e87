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

/** Lays out mantissa/1e6 · 10^exponent, mantissa of seven digits. */
function writeDigits(sevenDigits: number, exponent: number, bytes: Uint8Array, at: number): number {
  let mantissa = sevenDigits;
  let digits = significantDigits;
  while (digits > 1) {
    const shorter = (mantissa / 10) | 0;
    if (shorter * 10 !== mantissa) break;
    mantissa = shorter;
    digits--;
  }
  if (exponent < leastPlainExponent || exponent > mostPlainExponent) {
    const end = writeWithPoint(mantissa, digits, 0, bytes, at);
    return writeExponent(exponent, bytes, end);
  }
  if (exponent < 0) {
    bytes[at++] = zero;
    bytes[at++] = point;
    for (let k = -1; k > exponent; k--) bytes[at++] = zero;
    return writeDigitRun(mantissa, digits, bytes, at);
  }
  if (exponent < digits - 1) return writeWithPoint(mantissa, digits, exponent, bytes, at);
  at = writeDigitRun(mantissa, digits, bytes, at);
  for (let k = digits - 1; k < exponent; k++) bytes[at++] = zero;
  return at;
}

/** The digits with a point after the first `exponent + 1` of them; no point when none is left. */
function writeWithPoint(
  mantissa: number,
  digits: number,
  exponent: number,
  bytes: Uint8Array,
  at: number,
): number {
  if (digits === exponent + 1) return writeDigitRun(mantissa, digits, bytes, at);
  const end = at + digits + 1;
  const pointAt = at + exponent + 1;
  let rest = mantissa;
  for (let k = end - 1; k > pointAt; k--) {
    const shorter = (rest / 10) | 0;
    bytes[k] = zero + rest - shorter * 10;
    rest = shorter;
  }
  bytes[pointAt] = point;
  for (let k = pointAt - 1; k >= at; k--) {
    const shorter = (rest / 10) | 0;
    bytes[k] = zero + rest - shorter * 10;
    rest = shorter;
  }
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
