import { ByteWriter } from 'hyparquet-writer';
import { writeMetadata } from 'hyparquet-writer/src/metadata.js';
import type { TableColumn } from '../figures/figure.ts';

/** Appended to the name of a flags column for the column that holds its bit set. */
export const bitSetSuffix = '_bits';

/** How a table column's doubles stand in the Parquet file. */
export type ParquetForm = 'double' | 'boolean' | 'text' | 'bit_set';

type FileMetaData = Parameters<typeof writeMetadata>[1];
type SchemaElement = FileMetaData['schema'][number];

export interface ParquetColumn {
  readonly name: string;
  readonly form: ParquetForm;
  /** Index of the table column. */
  readonly of: number;
}

/**
 * Columns of the Parquet file: those of the table, and after each flags column its bit set
 * (bit i = label i), because labels may hold any text and joined ones can't be told apart safely.
 */
export function parquetColumns(columns: readonly TableColumn[]): ParquetColumn[] {
  return columns.flatMap(({ name, figure }, of): ParquetColumn[] => {
    if (figure.kind === 'number') return [{ name, form: 'double', of }];
    if (figure.kind === 'yes_no') return [{ name, form: 'boolean', of }];
    if (figure.kind === 'choice') return [{ name, form: 'text', of }];
    return [
      { name, form: 'text', of },
      { name: name + bitSetSuffix, form: 'bit_set', of },
    ];
  });
}

/** One column of one row group; offsets count from the group's first byte. */
export interface ChunkRecord {
  readonly dictionary: boolean;
  /** Of the column's first byte. */
  readonly start: number;
  /** Of the data page: beyond the dictionary page, if there is one. */
  readonly data: number;
  readonly bytes: number;
  readonly empty: number;
  /** Least and greatest value of a double column that has any. */
  readonly range?: readonly [number, number];
}

/** One row group: what the footer says of it. Plain data, so that it can be kept as JSON. */
export interface GroupRecord {
  readonly rows: number;
  readonly bytes: number;
  readonly chunks: readonly ChunkRecord[];
}

export const parquetMagic = new TextEncoder().encode('PAR1');

const physical: Record<ParquetForm, NonNullable<SchemaElement['type']>> = {
  double: 'DOUBLE',
  boolean: 'BOOLEAN',
  text: 'BYTE_ARRAY',
  bit_set: 'INT32',
};

/** The end of a Parquet file, from the footer to the last magic, for groups at the given offsets. */
export function parquetFooter(
  columns: readonly TableColumn[],
  groups: readonly { readonly at: number; readonly group: GroupRecord }[],
): Uint8Array {
  const fields = parquetColumns(columns);
  const metadata: FileMetaData = {
    version: 1,
    schema: [
      { name: 'cases', num_children: fields.length },
      ...fields.map(
        ({ name, form }): SchemaElement => ({
          name,
          type: physical[form],
          repetition_type: 'OPTIONAL',
          ...(form === 'text' ? { converted_type: 'UTF8', logical_type: { type: 'STRING' } } : {}),
        }),
      ),
    ],
    num_rows: BigInt(groups.reduce((sum, { group }) => sum + group.rows, 0)),
    row_groups: groups.map(({ at, group }) => ({
      columns: group.chunks.map((chunk, c) => chunkMetadata(fields[c], chunk, at, group.rows)),
      total_byte_size: BigInt(group.bytes),
      num_rows: BigInt(group.rows),
      file_offset: BigInt(at),
      total_compressed_size: BigInt(group.bytes),
    })),
    created_by: 'aftlimit',
    metadata_length: 0,
  };
  const writer = new ByteWriter();
  writeMetadata(writer, metadata);
  writer.appendBytes(parquetMagic);
  return writer.getBytes();
}

function chunkMetadata(field: ParquetColumn, chunk: ChunkRecord, at: number, rows: number) {
  return {
    file_offset: BigInt(at + chunk.start),
    meta_data: {
      type: physical[field.form],
      encodings: chunk.dictionary
        ? (['PLAIN', 'RLE', 'RLE_DICTIONARY'] as const).slice()
        : (['PLAIN', 'RLE'] as const).slice(),
      path_in_schema: [field.name],
      codec: 'UNCOMPRESSED' as const,
      num_values: BigInt(rows),
      total_uncompressed_size: BigInt(chunk.bytes),
      total_compressed_size: BigInt(chunk.bytes),
      data_page_offset: BigInt(at + chunk.data),
      ...(chunk.dictionary ? { dictionary_page_offset: BigInt(at + chunk.start) } : {}),
      statistics: statistics(chunk),
    },
  };
}

/** A zero bound is written with the sign that leaves both zeros inside, as the format asks (from memory). */
function statistics({ empty, range }: ChunkRecord) {
  if (range === undefined) return { null_count: BigInt(empty) };
  const [least, greatest] = range;
  return {
    null_count: BigInt(empty),
    min_value: least === 0 ? -0 : least,
    max_value: greatest === 0 ? 0 : greatest,
  };
}
