import { largestBlock } from './block.ts';

const tableBits = 15;
const tableSize = 1 << tableBits;
/** After so many values a column that has nearly as many distinct ones is given up. */
const judgedAfter = 4096;
const tooDistinct = 0.75;

/**
 * Distinct doubles of a block, told apart by their bits, in order of first appearance.
 * What it decides depends on the block alone, so the file does not depend on the work before it.
 */
export class DoubleDictionary {
  /** Distinct values of the last `index` call. */
  readonly values = new Float64Array(largestBlock);
  /** Which of them each row holds. */
  readonly indices = new Int32Array(largestBlock);
  size = 0;
  readonly #words = new Int32Array(this.values.buffer);
  /** Index of the value in each place of the table, and the call that wrote it. */
  readonly #table = new Int32Array(tableSize);
  readonly #writtenBy = new Int32Array(tableSize);
  #call = 0;

  /**
   * Indexes the first `count` of `doubles`. With a limit: false when more are distinct or nearly
   * all are, which leaves `values` and `indices` without meaning.
   */
  index(doubles: Float64Array, count: number, limit?: number): boolean {
    const words = new Int32Array(doubles.buffer, doubles.byteOffset, 2 * count);
    const [known, table, writtenBy, indices] = [this.#words, this.#table, this.#writtenBy, this.indices];
    const call = ++this.#call;
    let size = 0;
    let lastFirst = 0;
    let lastSecond = 0;
    let lastIndex = -1;
    for (let i = 0; i < count; i++) {
      const first = words[2 * i];
      const second = words[2 * i + 1];
      if (first === lastFirst && second === lastSecond && lastIndex >= 0) {
        indices[i] = lastIndex;
        continue;
      }
      let place = Math.imul(first ^ Math.imul(second, 0x9e3779b1), 0x85ebca6b) >>> (32 - tableBits);
      let index = -1;
      while (writtenBy[place] === call) {
        const candidate = table[place];
        if (known[2 * candidate] === first && known[2 * candidate + 1] === second) {
          index = candidate;
          break;
        }
        place = (place + 1) & (tableSize - 1);
      }
      if (index < 0) {
        if (size === limit) return false;
        if (i === judgedAfter && limit !== undefined && size > tooDistinct * judgedAfter) return false;
        index = size++;
        known[2 * index] = first;
        known[2 * index + 1] = second;
        table[place] = index;
        writtenBy[place] = call;
      }
      indices[i] = index;
      lastFirst = first;
      lastSecond = second;
      lastIndex = index;
    }
    this.size = size;
    return true;
  }
}
