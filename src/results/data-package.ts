import type { FigureKind, TableColumn } from '../figures/figure.ts';
import type { AssembledCases, CasesFile } from './assemble.ts';
import { writeFileAtomically } from './atomic-file.ts';
import { flagSeparator, neutralText } from './cells.ts';
import { parquetColumns } from './parquet-schema.ts';
import { runPaths } from './run-folder.ts';

/*
 * datapackage.json after the Data Package standard 2.0 (datapackage.org; profile addresses and
 * property names from memory). `unit`, `symbol`, `formula`, `source` and `separator` are properties
 * of our own, which the standard allows.
 */
const profiles = 'https://datapackage.org/profiles/2.0';

export interface DataField {
  readonly name: string;
  readonly title: string;
  readonly type: 'number' | 'integer' | 'boolean' | 'string';
  readonly description: string;
  readonly unit?: string;
  readonly symbol: string;
  readonly formula: string;
  readonly source: string;
  readonly constraints?: { readonly enum: readonly string[] };
  readonly trueValues?: readonly string[];
  readonly falseValues?: readonly string[];
  /** Flags: the texts that may stand in a cell, and what stands between them. */
  readonly labels?: readonly string[];
  readonly separator?: string;
}

export interface DataResource {
  readonly $schema: string;
  readonly name: string;
  readonly path: string;
  readonly type: 'table';
  readonly title: string;
  readonly format: 'csv' | 'parquet';
  readonly mediatype: string;
  readonly encoding?: string;
  readonly bytes?: number;
  readonly dialect?: { readonly lineTerminator: string };
  readonly schema: {
    readonly $schema: string;
    readonly fields: readonly DataField[];
    readonly missingValues: readonly string[];
    readonly primaryKey?: string;
  };
}

export interface DataPackage {
  readonly $schema: string;
  readonly name: string;
  readonly title: string;
  readonly description: string;
  readonly version: string;
  readonly created: string;
  readonly resources: readonly DataResource[];
}

export interface DataPackageContents {
  readonly title: string;
  /** Version of the program that wrote the data. */
  readonly version: string;
  /** ISO 8601, UTC. */
  readonly created: string;
  readonly columns: readonly TableColumn[];
  readonly cases: AssembledCases;
  /** Columns of shortlist.csv, when there is one. */
  readonly shortlist?: readonly TableColumn[];
}

/** Describes every table of a run: each column's name, type, unit, meaning, formula and source. */
export function dataPackage(contents: DataPackageContents): DataPackage {
  const { title, version, created, columns, cases, shortlist } = contents;
  const csvFields = columns.map(csvField);
  const parquet = parquetFields(columns);
  const many = cases.csv.length > 1;
  const key = columns.some(({ name }) => name === 'combination') ? 'combination' : undefined;
  return {
    $schema: `${profiles}/datapackage.json`,
    name: packageName(title),
    title,
    description:
      'Every combination of a trade study of wing and tail. Numbers in CSV have seven significant digits; Parquet holds the exact doubles.',
    version,
    created,
    resources: [
      ...cases.csv.map((file, k) => csvResource(file, casesTitle(many, k), csvFields, key)),
      ...cases.parquet.map((file, k) => parquetResource(file, casesTitle(many, k), parquet, key)),
      ...(shortlist === undefined
        ? []
        : [csvResource({ name: 'shortlist.csv' }, 'The shortlist', shortlist.map(csvField), undefined)]),
    ],
  };
}

export function writeDataPackage(folder: string, contents: DataPackageContents): void {
  const text = `${JSON.stringify(dataPackage(contents), undefined, 2)}\n`;
  writeFileAtomically(runPaths(folder).dataPackage, text);
}

function casesTitle(many: boolean, index: number): string {
  return many ? `All combinations, file ${index + 1}` : 'All combinations';
}

/** Lower-case letters, digits and hyphens, as names in the standard are. */
function packageName(title: string): string {
  const plain = title
    .normalize('NFKD')
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-');
  return plain.replace(/^-|-$/g, '') || 'study';
}

function csvResource(
  file: Pick<CasesFile, 'name'> & Partial<CasesFile>,
  title: string,
  fields: readonly DataField[],
  primaryKey: string | undefined,
): DataResource {
  return {
    ...resourceHead(file, title),
    format: 'csv',
    mediatype: 'text/csv',
    encoding: 'utf-8',
    dialect: { lineTerminator: '\n' },
    schema: tableSchema(fields, primaryKey),
  };
}

function parquetResource(
  file: CasesFile,
  title: string,
  fields: readonly DataField[],
  primaryKey: string | undefined,
): DataResource {
  return {
    ...resourceHead(file, title),
    format: 'parquet',
    mediatype: 'application/vnd.apache.parquet',
    schema: tableSchema(fields, primaryKey),
  };
}

function resourceHead(file: Pick<CasesFile, 'name'> & Partial<CasesFile>, title: string) {
  return {
    $schema: `${profiles}/dataresource.json`,
    name: file.name.replace('.csv', '').replace('.', '-'),
    path: file.name,
    type: 'table' as const,
    title,
    ...(file.bytes === undefined ? {} : { bytes: file.bytes }),
  };
}

function tableSchema(fields: readonly DataField[], primaryKey: string | undefined): DataResource['schema'] {
  return {
    $schema: `${profiles}/tableschema.json`,
    fields,
    missingValues: [''],
    ...(primaryKey === undefined ? {} : { primaryKey }),
  };
}

const fieldTypes: Record<FigureKind, DataField['type']> = {
  number: 'number',
  yes_no: 'boolean',
  choice: 'string',
  flags: 'string',
};

/** A column as it stands in CSV: labels are given as they are written there. */
function csvField(column: TableColumn): DataField {
  return describeField(column, neutralText);
}

/** The columns of the Parquet files: labels as they are, and the bit sets of flags besides. */
function parquetFields(columns: readonly TableColumn[]): DataField[] {
  return parquetColumns(columns).map(({ name, form, of }) => {
    const field = describeField(columns[of], (label) => label);
    if (form !== 'bit_set') return field;
    const { labels = [], separator: _, ...rest } = field;
    const bits = labels.map((label, bit) => `${2 ** bit}: ${label}`).join(', ');
    return { ...rest, name, type: 'integer', description: `${field.description} The sum of ${bits}.` };
  });
}

function describeField(column: TableColumn, written: (label: string) => string): DataField {
  const { name, unit, figure } = column;
  const labels = (figure.labels ?? []).map(written);
  const isCount = figure.kind === 'number' && figure.dimension === 'count';
  return {
    name,
    title: titleOf(figure.name),
    type: isCount ? 'integer' : fieldTypes[figure.kind],
    description: figure.meaning,
    ...(unit === '' ? {} : { unit }),
    symbol: figure.symbol,
    formula: figure.formula,
    source: figure.source,
    ...(figure.kind === 'choice' ? { constraints: { enum: labels } } : {}),
    ...(figure.kind === 'yes_no' ? { trueValues: ['yes'], falseValues: ['no'] } : {}),
    ...(figure.kind === 'flags' ? { labels, separator: flagSeparator } : {}),
  };
}

/** `wing_span` → `Wing span`. */
function titleOf(name: string): string {
  const words = name.replaceAll('_', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}
