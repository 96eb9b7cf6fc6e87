import type { TableColumn } from '../figures/figure.ts';
import { type Block, checkBlock } from './block.ts';
import { csvText, labelText } from './cells.ts';
import { ColumnTexts, entryOf, judge, remembered, slotBytes, type TextPlace } from './csv-column.ts';
import { writeCount, writeNumber } from './csv-number.ts';

const comma = 44;
const lineFeed = 10;
const doubleBytes = 8;

/** Rows worked through at a time: their cells' texts fit the second-level cache. */
const tileRows = 128;
/** Words of one entry that waits to be remembered. */
const pendingWords = 6;
/** Texts of flag sets are forgotten, between tiles, when they outgrow this. */
const flagTextLimit = 4 << 20;

const utf8 = new TextEncoder();

/**
 * Writes blocks as CSV (RFC 4180 quoting, LF line ends, UTF-8) into one growing buffer.
 *
 * A tile of rows is done in two steps: column by column each cell gets the place of its text, in
 * scratch memory, among the column's remembered texts, or among its labels; then the rows are put
 * together by copying. Nothing is allocated per cell. Numbers have seven significant digits;
 * counts have all of theirs; NaN and infinity are empty cells.
 */
export class CsvBlockWriter {
  rows = 0;
  readonly #columns: readonly TableColumn[];
  readonly #texts: ColumnTexts[] = [];
  /** Scratch texts of the tile, then remembered texts, then texts of labels and flag sets. */
  #arena: Uint8Array;
  #arenaView: DataView;
  readonly #labelStart: number;
  #arenaEnd: number;
  /** Place and length of each cell's text, row by row. */
  readonly #places: Int32Array;
  readonly #lengths: Int32Array;
  /** Entries to be remembered once the tile is copied: column, entry, place, length, and the key. */
  readonly #pending: Int32Array;
  #pendingEnd = 0;
  #out = new Uint8Array(1 << 20);
  #outView = new DataView(this.#out.buffer);
  #end = 0;

  constructor(columns: readonly TableColumn[]) {
    if (columns.length === 0) throw new RangeError('a table without columns');
    this.#columns = columns;
    const cells = columns.length * tileRows;
    let end = cells * slotBytes;
    columns.forEach((column, c) => {
      const separator = c === columns.length - 1 ? lineFeed : comma;
      this.#texts.push(new ColumnTexts(column, separator, c * tileRows * slotBytes, end));
      if (column.figure.kind === 'number') end += remembered * slotBytes;
    });
    this.#labelStart = end;
    this.#arenaEnd = end;
    this.#arena = new Uint8Array(end + (1 << 16));
    this.#arenaView = new DataView(this.#arena.buffer);
    for (const { keys, memory, separator } of this.#texts) {
      for (let entry = 0; 2 * entry < keys.length; entry++)
        this.#arena[memory + entry * slotBytes] = separator;
    }
    this.#places = new Int32Array(cells);
    this.#lengths = new Int32Array(cells);
    this.#pending = new Int32Array(cells * pendingWords);
  }

  /** The line of column names. */
  header(): Uint8Array {
    return utf8.encode(`${this.#columns.map((column) => csvText(column.name)).join(',')}\n`);
  }

  append(block: Block): void {
    checkBlock(block, this.#columns);
    const words = block.values.map(
      (values) => new Int32Array(values.buffer, values.byteOffset, 2 * values.length),
    );
    for (let start = 0; start < block.rows; start += tileRows) {
      const rows = Math.min(tileRows, block.rows - start);
      if (this.#arenaEnd - this.#labelStart > flagTextLimit) this.#forgetLabels();
      for (let c = 0; c < this.#texts.length; c++) this.#place(c, block.values[c], words[c], start, rows);
      this.#copyRows(rows * this.#texts.length);
      this.#remember();
    }
    this.rows += block.rows;
  }

  /** The rows since `reset`, without header; valid until the next call. */
  bytes(): Uint8Array {
    return this.#out.subarray(0, this.#end);
  }

  reset(): void {
    this.#end = 0;
    this.rows = 0;
  }

  #place(c: number, values: Float64Array, words: Int32Array, start: number, rows: number): void {
    const texts = this.#texts[c];
    if (!texts.isNumber) this.#placeLabels(c, texts, values, start, rows);
    else if (texts.straight > 0) {
      texts.straight -= rows;
      this.#placeStraight(c, texts, values, start, rows);
    } else this.#placeRemembered(c, texts, values, words, start, rows);
  }

  /** Numbers of a column whose values hardly repeat. */
  #placeStraight(c: number, texts: ColumnTexts, values: Float64Array, start: number, rows: number): void {
    const width = this.#texts.length;
    const [places, lengths] = [this.#places, this.#lengths];
    for (let i = 0, cell = c, at = texts.scratch; i < rows; i++, cell += width, at += slotBytes) {
      places[cell] = at;
      lengths[cell] = this.#format(texts, values[start + i], at);
    }
  }

  /** Numbers of a column whose values repeat: found by the bits of the double. */
  #placeRemembered(
    c: number,
    texts: ColumnTexts,
    values: Float64Array,
    words: Int32Array,
    start: number,
    rows: number,
  ): void {
    const width = this.#texts.length;
    const [places, lengths, pending] = [this.#places, this.#lengths, this.#pending];
    const { keys, lengths: knownLengths, memory, scratch } = texts;
    let misses = 0;
    for (let i = 0, cell = c; i < rows; i++, cell += width) {
      const first = words[2 * (start + i)];
      const second = words[2 * (start + i) + 1];
      const entry = entryOf(first, second);
      if (keys[2 * entry] === first && keys[2 * entry + 1] === second) {
        places[cell] = memory + entry * slotBytes;
        lengths[cell] = knownLengths[entry];
        continue;
      }
      misses++;
      const at = scratch + i * slotBytes;
      const length = this.#format(texts, values[start + i], at);
      places[cell] = at;
      lengths[cell] = length;
      // An entry in use by this tile must keep its text until the rows are copied, so it waits.
      const p = this.#pendingEnd;
      pending[p] = c;
      pending[p + 1] = entry;
      pending[p + 2] = at;
      pending[p + 3] = length;
      pending[p + 4] = first;
      pending[p + 5] = second;
      this.#pendingEnd = p + pendingWords;
    }
    judge(texts, rows, misses);
  }

  /** The text of one number with its separator, at `at`; returns its length. */
  #format(texts: ColumnTexts, value: number, at: number): number {
    const scaled = value * texts.factor;
    let end = at;
    // Neither NaN nor infinity minus itself is zero.
    if (scaled - scaled === 0) {
      if (texts.isCount) end = writeCount(scaled, this.#arena, at);
      else end = writeNumber(scaled, this.#arena, at);
    }
    this.#arena[end++] = texts.separator;
    return end - at;
  }

  #placeLabels(c: number, texts: ColumnTexts, values: Float64Array, start: number, rows: number): void {
    const width = this.#texts.length;
    let last = values[start];
    let place = this.#labelPlace(texts, last);
    for (let i = 0, cell = c; i < rows; i++, cell += width) {
      const value = values[start + i];
      if (value !== last) {
        last = value;
        place = this.#labelPlace(texts, value);
      }
      this.#places[cell] = place.at;
      this.#lengths[cell] = place.length;
    }
  }

  #labelPlace(texts: ColumnTexts, value: number): TextPlace {
    const known = texts.places.get(value);
    if (known !== undefined) return known;
    const text = Number.isFinite(value) ? csvText(labelText(texts.column, value)) : '';
    const place = this.#store(utf8.encode(text + String.fromCharCode(texts.separator)));
    texts.places.set(value, place);
    return place;
  }

  #store(text: Uint8Array): TextPlace {
    const at = this.#arenaEnd;
    const end = at + Math.ceil(text.length / doubleBytes) * doubleBytes;
    if (end + slotBytes > this.#arena.length) {
      const larger = new Uint8Array(2 * (end + slotBytes));
      larger.set(this.#arena);
      this.#arena = larger;
      this.#arenaView = new DataView(larger.buffer);
    }
    this.#arena.set(text, at);
    this.#arenaEnd = end;
    return { at, length: text.length };
  }

  #forgetLabels(): void {
    for (const texts of this.#texts) texts.places.clear();
    // Old text must not follow a shorter new one: `#copyRows` moves eight bytes at a time.
    this.#arena.fill(0, this.#labelStart);
    this.#arenaEnd = this.#labelStart;
  }

  /**
   * Puts the texts of the tile one behind the other, eight bytes at a time as doubles: what is
   * copied too much is overwritten by the next cell. UTF-8 never forms the bits of a NaN (byte
   * 7f or ff after a byte f0 … ff), which an engine might rewrite.
   */
  #copyRows(cells: number): void {
    const [places, lengths] = [this.#places, this.#lengths];
    let total = slotBytes;
    for (let k = 0; k < cells; k++) total += lengths[k];
    this.#ensure(total);
    const [from, to] = [this.#arenaView, this.#outView];
    let end = this.#end;
    for (let k = 0; k < cells; k++) {
      const place = places[k];
      const length = lengths[k];
      to.setFloat64(end, from.getFloat64(place, true), true);
      if (length > 8) {
        to.setFloat64(end + 8, from.getFloat64(place + 8, true), true);
        for (let done = 16; done < length; done += 8) {
          to.setFloat64(end + done, from.getFloat64(place + done, true), true);
        }
      }
      end += length;
    }
    this.#end = end;
  }

  #ensure(more: number): void {
    if (this.#end + more <= this.#out.length) return;
    const larger = new Uint8Array(2 * (this.#end + more));
    larger.set(this.bytes());
    this.#out = larger;
    this.#outView = new DataView(larger.buffer);
  }

  /** Moves the tile's new texts to their entries, in order, the last one winning. */
  #remember(): void {
    const pending = this.#pending;
    for (let p = 0; p < this.#pendingEnd; p += pendingWords) {
      const texts = this.#texts[pending[p]];
      const entry = pending[p + 1];
      const place = pending[p + 2];
      const target = texts.memory + entry * slotBytes;
      this.#arena.copyWithin(target, place, place + slotBytes);
      texts.lengths[entry] = pending[p + 3];
      texts.keys[2 * entry] = pending[p + 4];
      texts.keys[2 * entry + 1] = pending[p + 5];
    }
    this.#pendingEnd = 0;
  }
}
