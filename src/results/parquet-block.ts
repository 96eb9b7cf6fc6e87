import { ByteWriter } from 'hyparquet-writer';
import { writePageHeader } from 'hyparquet-writer/src/datapage.js';
import type { TableColumn } from '../figures/figure.ts';
import { type Block, checkBlock, largestBlock } from './block.ts';
import { labelText } from './cells.ts';
import { DoubleDictionary } from './parquet-dictionary.ts';
import { bitsFor, runsBound, writeRuns } from './parquet-runs.ts';
import { type ChunkRecord, type GroupRecord, type ParquetColumn, parquetColumns } from './parquet-schema.ts';

/** More distinct numbers than this are stored plainly. */
const dictionaryLimit = 4096;
const levelBits = 1;
const utf8 = new TextEncoder();

/**
 * Writes blocks as Parquet row groups, one page a column, uncompressed.
 *
 * A number is stored as the double value × factor, exactly; columns of few distinct values
 * through a dictionary, others plainly. Empty cells (NaN, infinity) are nulls. Yes/no is BOOLEAN;
 * choices and flags are UTF-8 strings; each flags column is followed by its bit set as INT32.
 * Doubles are stored in the machine's own order of bytes, which is the format's on all that run Node
 * in common use (little-endian).
 */
export class ParquetBlockWriter {
  rows = 0;
  readonly #columns: readonly TableColumn[];
  readonly #fields: readonly ParquetColumn[];
  readonly #out = new ByteWriter(1 << 20);
  /** A page's body, and a dictionary's. */
  readonly #body = new ByteWriter(largestBlock * 8 + 4096);
  readonly #dictionary = new DoubleDictionary();
  /** The filled cells of a column, and for each row whether it is filled. */
  readonly #filled = new Float64Array(largestBlock);
  readonly #levels = new Int32Array(largestBlock);
  #filledRows = 0;
  #range: readonly [number, number] | undefined;

  constructor(columns: readonly TableColumn[]) {
    this.#columns = columns;
    this.#fields = parquetColumns(columns);
  }

  /** Appends one row group and says what the footer must know of it. */
  append(block: Block): GroupRecord {
    checkBlock(block, this.#columns);
    const start = this.#out.offset;
    const chunks = this.#fields.map((field) => this.#chunk(field, block, start));
    this.rows += block.rows;
    return { rows: block.rows, bytes: this.#out.offset - start, chunks };
  }

  /** The groups since `reset`; valid until the next call. */
  bytes(): Uint8Array {
    return new Uint8Array(this.#out.buffer, 0, this.#out.offset);
  }

  reset(): void {
    this.#out.index = 0;
    this.#out.offset = 0;
    this.rows = 0;
  }

  #chunk(field: ParquetColumn, block: Block, groupStart: number): ChunkRecord {
    const column = this.#columns[field.of];
    const factor = field.form === 'double' ? column.factor : 1;
    this.#gather(block.values[field.of], block.rows, factor, field.form === 'double');
    const start = this.#out.offset;
    const dictionary = this.#dictionaryPage(field, column);
    const data = this.#out.offset;
    this.#dataPage(field, block.rows, dictionary);
    return {
      dictionary,
      start: start - groupStart,
      data: data - groupStart,
      bytes: this.#out.offset - start,
      empty: block.rows - this.#filledRows,
      ...(this.#range === undefined ? {} : { range: this.#range }),
    };
  }

  /** Scales the filled cells into `#filled`; tells each row's level. */
  #gather(values: Float64Array, rows: number, factor: number, withRange: boolean): void {
    const [filled, levels] = [this.#filled, this.#levels];
    let count = 0;
    let least = Number.POSITIVE_INFINITY;
    let greatest = Number.NEGATIVE_INFINITY;
    for (let i = 0; i < rows; i++) {
      const value = values[i] * factor;
      // Neither NaN nor infinity minus itself is zero.
      if (value - value !== 0) {
        levels[i] = 0;
        continue;
      }
      levels[i] = 1;
      filled[count++] = value;
      if (value < least) least = value;
      if (value > greatest) greatest = value;
    }
    this.#filledRows = count;
    this.#range = withRange && count > 0 ? [least, greatest] : undefined;
  }

  /** Writes the dictionary page when the column has one, and says so. */
  #dictionaryPage({ form }: ParquetColumn, column: TableColumn): boolean {
    const dictionary = this.#dictionary;
    const count = this.#filledRows;
    if (form === 'boolean' || count === 0) return false;
    const limit = form === 'double' ? Math.min(dictionaryLimit, (count >> 1) + 1) : undefined;
    if (!dictionary.index(this.#filled, count, limit)) return false;
    const body = this.#body;
    clear(body);
    if (form === 'double') body.appendBytes(new Uint8Array(dictionary.values.buffer, 0, 8 * dictionary.size));
    else {
      for (const value of dictionary.values.subarray(0, dictionary.size)) {
        if (form === 'bit_set') body.appendInt32(value);
        else {
          const text = utf8.encode(labelText(column, value));
          body.appendUint32(text.length);
          body.appendBytes(text);
        }
      }
    }
    writePageHeader(this.#out, {
      type: 'DICTIONARY_PAGE',
      uncompressed_page_size: body.offset,
      compressed_page_size: body.offset,
      dictionary_page_header: { num_values: dictionary.size, encoding: 'PLAIN' },
    });
    this.#out.appendBytes(written(body));
    return true;
  }

  #dataPage({ form }: ParquetColumn, rows: number, dictionary: boolean): void {
    const body = this.#body;
    clear(body);
    this.#appendLevels(rows);
    if (dictionary) this.#appendIndices();
    else if (form === 'boolean') this.#appendBooleans();
    else body.appendBytes(new Uint8Array(this.#filled.buffer, 0, 8 * this.#filledRows));
    writePageHeader(this.#out, {
      type: 'DATA_PAGE',
      uncompressed_page_size: body.offset,
      compressed_page_size: body.offset,
      data_page_header: {
        num_values: rows,
        encoding: dictionary ? 'RLE_DICTIONARY' : 'PLAIN',
        definition_level_encoding: 'RLE',
        repetition_level_encoding: 'RLE',
      },
    });
    this.#out.appendBytes(written(body));
  }

  /** Definition levels, behind their length in four bytes. */
  #appendLevels(rows: number): void {
    const body = this.#body;
    body.ensure(4 + runsBound(rows, levelBits));
    const bytes = new Uint8Array(body.buffer);
    const end = writeRuns(this.#levels, rows, levelBits, bytes, body.index + 4);
    body.appendUint32(end - body.index - 4);
    moveTo(body, end);
  }

  /** Dictionary indices, behind their width in one byte. */
  #appendIndices(): void {
    const body = this.#body;
    const width = bitsFor(this.#dictionary.size - 1);
    body.appendUint8(width);
    body.ensure(runsBound(this.#filledRows, width));
    const bytes = new Uint8Array(body.buffer);
    moveTo(body, writeRuns(this.#dictionary.indices, this.#filledRows, width, bytes, body.index));
  }

  /** One bit a filled row, lowest first. */
  #appendBooleans(): void {
    const filled = this.#filled;
    for (let i = 0; i < this.#filledRows; i += 8) {
      let byte = 0;
      for (let k = 0; k < 8 && i + k < this.#filledRows; k++) if (filled[i + k] !== 0) byte |= 1 << k;
      this.#body.appendUint8(byte);
    }
  }
}

function clear(writer: ByteWriter): void {
  writer.index = 0;
  writer.offset = 0;
}

function moveTo(writer: ByteWriter, index: number): void {
  writer.offset += index - writer.index;
  writer.index = index;
}

function written(writer: ByteWriter): Uint8Array {
  return new Uint8Array(writer.buffer, 0, writer.offset);
}
