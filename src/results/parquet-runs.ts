/**
 * Parquet's hybrid of run lengths and bit packing, for definition levels and dictionary indices.
 * Source: Apache Parquet format, "Encodings", RLE / bit-packing hybrid, from memory; the tests
 * read the result with two independent readers.
 */

/** Equal values in a row from which a run is stored as value and length. */
const worthRun = 24;
/** Bit-packed values come in groups of eight. */
const group = 8;

/** Upper bound of the bytes that `writeRuns` needs. */
export function runsBound(count: number, bitWidth: number): number {
  return Math.ceil(count / group) * (bitWidth + 1) + 64;
}

/** Bits that hold 0 … largest; at least one, as some readers refuse none. */
export function bitsFor(largest: number): number {
  return Math.max(1, 32 - Math.clz32(largest));
}

/** Writes the first `count` of `values` (each below 2^bitWidth, bitWidth ≤ 16) and returns the position after. */
export function writeRuns(
  values: Int32Array,
  count: number,
  bitWidth: number,
  bytes: Uint8Array,
  at: number,
): number {
  let literalStart = 0;
  let i = 0;
  while (i < count) {
    const value = values[i];
    let end = i + 1;
    while (end < count && values[end] === value) end++;
    if (end - i >= worthRun) {
      at = writeLiteral(values, literalStart, i, bitWidth, bytes, at);
      at = writeRun(value, end - i, bitWidth, bytes, at);
      literalStart = end;
      i = end;
    } else {
      // Runs may start only where a literal's groups are full.
      i = literalStart + Math.ceil((end - literalStart) / group) * group;
    }
  }
  return writeLiteral(values, literalStart, count, bitWidth, bytes, at);
}

function writeRun(value: number, length: number, bitWidth: number, bytes: Uint8Array, at: number): number {
  at = writeVarint(length * 2, bytes, at);
  bytes[at++] = value & 0xff;
  if (bitWidth > 8) bytes[at++] = value >>> 8;
  return at;
}

/** Values from start to end bit-packed, lowest bit first; the last group is filled with zeros. */
function writeLiteral(
  values: Int32Array,
  start: number,
  end: number,
  bitWidth: number,
  bytes: Uint8Array,
  at: number,
): number {
  if (end <= start) return at;
  const groups = Math.ceil((end - start) / group);
  at = writeVarint(groups * 2 + 1, bytes, at);
  const padded = start + groups * group;
  let held = 0;
  let heldBits = 0;
  for (let i = start; i < padded; i++) {
    if (i < end) held |= values[i] << heldBits;
    heldBits += bitWidth;
    while (heldBits >= 8) {
      bytes[at++] = held & 0xff;
      held >>>= 8;
      heldBits -= 8;
    }
  }
  return at;
}

export function writeVarint(value: number, bytes: Uint8Array, at: number): number {
  let rest = value;
  while (rest > 0x7f) {
    bytes[at++] = (rest & 0x7f) | 0x80;
    rest >>>= 7;
  }
  bytes[at++] = rest;
  return at;
}
