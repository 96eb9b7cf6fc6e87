import type { TableColumn } from '../figures/figure.ts';
import { longestNumber } from './csv-number.ts';

/** Bytes kept for a number's text and its separator; a multiple of eight, so that texts start aligned. */
export const slotBytes = longestNumber;
/** Texts remembered per column: enough for axes and for figures of a few thousand distinct values. */
const rememberedBits = 12;
export const remembered = 1 << rememberedBits;
/** A column of whose cells fewer than this share repeat is formatted straight for a while. */
const worthRemembering = 1 / 8;
const judgedOver = 1024;
const straightFor = 16_384;

export interface TextPlace {
  readonly at: number;
  readonly length: number;
}

/** What one column needs to turn its doubles into texts. */
export class ColumnTexts {
  /** Two words of a remembered double's bits per entry. A free one holds the bits of a NaN and its empty text. */
  readonly keys: Int32Array;
  readonly lengths: Uint8Array;
  /** Rows left to format straight, without looking up. */
  straight = 0;
  judgedRows = 0;
  misses = 0;
  /** Texts of labels and of flag sets met so far. */
  readonly places = new Map<number, TextPlace>();
  readonly isNumber: boolean;
  readonly isCount: boolean;
  readonly factor: number;

  constructor(
    readonly column: TableColumn,
    readonly separator: number,
    readonly scratch: number,
    readonly memory: number,
  ) {
    const isNumber = column.figure.kind === 'number';
    this.isNumber = isNumber;
    this.isCount = column.figure.dimension === 'count';
    this.factor = column.factor;
    this.keys = new Int32Array(isNumber ? 2 * remembered : 0).fill(-1);
    this.lengths = new Uint8Array(isNumber ? remembered : 0).fill(1);
  }
}

/** Where a double of these bits is remembered (multiplicative hashing; the odd factors are arbitrary). */
export function entryOf(first: number, second: number): number {
  return Math.imul(first ^ Math.imul(second, 0x9e3779b1), 0x85ebca6b) >>> (32 - rememberedBits);
}

/** Turns remembering off for a while when it does not pay; the bytes are the same either way. */
export function judge(texts: ColumnTexts, rows: number, misses: number): void {
  texts.judgedRows += rows;
  texts.misses += misses;
  if (texts.judgedRows < judgedOver) return;
  if (texts.misses > (1 - worthRemembering) * texts.judgedRows) texts.straight = straightFor;
  texts.judgedRows = 0;
  texts.misses = 0;
}
