/** Flight-test data: a table of flown points, checked. Every fault is told at once, with its place. */
import { DataError } from '../errors.ts';
import { dynamicPressure, liftCoefficient } from '../methods/atmosphere.ts';
import { fractionOfMac } from '../methods/neutral-point.ts';
import { inSi, shorten, shortNumber } from '../study/quantities.ts';
import { type ColumnKey, cgLimits, type DataColumn, type Limits, liftLimits, limitsOf } from './columns.ts';
import { type Cell, type CsvText, readCsv } from './csv-text.ts';
import { type Columns, DataFaults, readHeader } from './read-header.ts';

/** Sizes of the flown aeroplane [m², m]. */
export interface FlownWing {
  readonly area: number;
  readonly mac: number;
  readonly macLeadingEdge: number;
}

/** One steady point, SI. */
export interface FlownPoint {
  readonly name: string;
  readonly line: number;
  readonly calibratedSpeed: number;
  readonly mass: number;
  /** Fraction of the MAC. */
  readonly cg: number;
  /** Trailing edge down positive [rad]. */
  readonly elevator: number;
  /** Pull positive [N]; absent where the cell is empty or the column is not there. */
  readonly stickForce?: number;
  /** As written, in small letters; `30°` from a column in degrees. Absent without such a column. */
  readonly flaps?: string;
  /** As written, in small letters. */
  readonly power: string;
  /** Pressure height [m]. */
  readonly height: number;
  /** Level flight at that speed, mass and height [-]. */
  readonly liftCoefficient: number;
  /** [Pa] */
  readonly dynamicPressure: number;
}

/**
 * Reads flown points. CG stations become fractions of the MAC of the wing given.
 * @throws DataError with every fault of the table, UsageError when it is not there
 */
export async function readFlownPoints(file: string, wing: FlownWing): Promise<FlownPoint[]> {
  const csv = await readCsv(file);
  const faults = new DataFaults();
  const points = pointsOf(csv, wing, faults);
  if (faults.list.length === 0) return points;
  throw new DataError(
    file,
    csv.text,
    faults.list.toSorted((a, b) => a.line - b.line || a.column - b.column),
  );
}

function pointsOf({ rows: [header, ...rows] }: CsvText, wing: FlownWing, faults: DataFaults): FlownPoint[] {
  if (header === undefined) {
    faults.add('NO_POINTS', { line: 1, column: 1, length: 1 }, 'The table is empty.', pointsWanted);
    return [];
  }
  if (header.length === 1 && /[;\t]/.test(header[0]!.text)) {
    const found = `The header is one cell, '${shorten(header[0]!.text)}'.`;
    faults.add(
      'WRONG_SEPARATOR',
      header[0]!,
      found,
      'Separate cells by commas, and write decimals with a point.',
    );
    return [];
  }
  const columns = readHeader(header, faults);
  if (rows.length === 0) {
    faults.add('NO_POINTS', header[0]!, 'The table has a header and no points.', pointsWanted);
  }
  const named = new Map<string, number>();
  return rows.flatMap((row) => readPoint(row, header.length, columns, wing, named, faults) ?? []);
}

const pointsWanted = 'Give one row for each steady point flown.';

function readPoint(
  row: readonly Cell[],
  width: number,
  columns: Columns,
  wing: FlownWing,
  named: Map<string, number>,
  faults: DataFaults,
): FlownPoint | undefined {
  if (row.length !== width) {
    tellCellCount(row, width, faults);
    return undefined;
  }
  const before = faults.list.length;
  const cellOf = (key: ColumnKey) => row[columns.get(key)?.index ?? -1];
  const text = (key: ColumnKey) => readText(cellOf(key), columns.get(key), faults);
  const number = (key: ColumnKey) => readNumber(cellOf(key), columns.get(key), faults);
  const name = text('point');
  if (name !== undefined) checkName(name, cellOf('point')!, named, faults);
  const calibratedSpeed = number('calibrated_speed');
  const mass = number('mass');
  const cg = readCg(number, cellOf, wing, faults);
  const elevator = number('elevator');
  const stickForce = cellOf('stick_force')?.text === '' ? undefined : number('stick_force');
  const flaps = columns.has('flaps_angle') ? angleText(number('flaps_angle')) : text('flaps')?.toLowerCase();
  const power = text('power')?.toLowerCase();
  const height = number('height');
  if (calibratedSpeed === undefined || mass === undefined || height === undefined) return undefined;
  const lift = liftCoefficient(mass, calibratedSpeed, height, wing.area);
  checkLimits(
    lift,
    liftLimits,
    cellOf('calibrated_speed')!,
    'The lift coefficient of this point',
    1,
    '',
    faults,
  );
  if (faults.list.length > before) return undefined;
  if (name === undefined || cg === undefined || elevator === undefined || power === undefined)
    return undefined;
  return {
    name,
    line: row[0]!.line,
    calibratedSpeed,
    mass,
    cg,
    elevator,
    ...(stickForce === undefined ? {} : { stickForce }),
    ...(flaps === undefined ? {} : { flaps }),
    power,
    height,
    liftCoefficient: lift,
    dynamicPressure: dynamicPressure(calibratedSpeed, height),
  };
}

function tellCellCount(row: readonly Cell[], width: number, faults: DataFaults): void {
  const [first, last] = [row[0]!, row.at(-1)!];
  const place = {
    line: first.line,
    column: 1,
    length: last.line === first.line ? last.column + last.length - 1 : 1,
  };
  const remedy =
    row.length > width
      ? 'Write decimals with a point, and put a text with a comma in quotes.'
      : 'Give every column its cell; an empty one keeps its comma.';
  faults.add('WRONG_CELL_COUNT', place, `The row has ${row.length} cells, and the header ${width}.`, remedy);
}

function checkName(name: string, cell: Cell, named: Map<string, number>, faults: DataFaults): void {
  const earlier = named.get(name);
  if (earlier === undefined) named.set(name, cell.line);
  else {
    const found = `The point '${shorten(name)}' stands in line ${earlier} already.`;
    faults.add('DUPLICATE_POINT', cell, found, 'Give each point a name of its own.');
  }
}

function readText(
  cell: Cell | undefined,
  column: DataColumn | undefined,
  faults: DataFaults,
): string | undefined {
  if (cell === undefined || column === undefined) return undefined;
  if (cell.text !== '') return cell.text.replaceAll(/\s+/g, ' ');
  faults.add('MISSING_CELL', cell, `${column.name} is empty.`, 'Every point needs it.');
  return undefined;
}

const numberPattern = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const decimalComma = /^[+-]?\d*,\d+$/;

/** A number in SI; undefined where its column is not there, or with a fault. */
function readNumber(
  cell: Cell | undefined,
  column: DataColumn | undefined,
  faults: DataFaults,
): number | undefined {
  if (cell === undefined || column === undefined) return undefined;
  const { name, unit, factor, key } = column;
  const text = cell.text.replace(/^−/, '-');
  if (text === '') {
    faults.add(
      'MISSING_CELL',
      cell,
      `${name} is empty.`,
      'Every point needs it; leave out a point without it.',
    );
    return undefined;
  }
  if (decimalComma.test(text)) {
    const found = `${name} is '${shorten(text)}', with a decimal comma.`;
    faults.add('DECIMAL_COMMA', cell, found, `Write ${text.replace(',', '.')}; thousands have no mark.`);
    return undefined;
  }
  if (!numberPattern.test(text)) {
    const found = `${name} is '${shorten(text)}', where a number is wanted.`;
    const remedy = `Write the number alone; its unit, ${unit}, stands in the column's name.`;
    faults.add('NOT_A_NUMBER', cell, found, remedy);
    return undefined;
  }
  const value = inSi(Number(text), factor);
  const limits = limitsOf[key];
  if (limits !== undefined && !checkLimits(value, limits, cell, name, factor, unit, faults)) return undefined;
  return value;
}

function checkLimits(
  value: number,
  { least, most, reason }: Limits,
  cell: Cell,
  label: string,
  factor: number,
  unit: string,
  faults: DataFaults,
): boolean {
  if (value >= least && value <= most) return true;
  const shown = (si: number) => `${shortNumber(si / factor)} ${unit}`.trim();
  const found = `${label} is ${shown(value)}, outside ${shown(least)} to ${shown(most)} (${reason}).`;
  faults.add('OUT_OF_RANGE', cell, found, 'Correct it, or leave the point out.');
  return false;
}

function readCg(
  number: (key: ColumnKey) => number | undefined,
  cellOf: (key: ColumnKey) => Cell | undefined,
  { mac, macLeadingEdge }: FlownWing,
  faults: DataFaults,
): number | undefined {
  const station = number('cg_station');
  const cg = station === undefined ? number('cg_percent_mac') : fractionOfMac(station, macLeadingEdge, mac);
  if (cg === undefined) return undefined;
  const cell = (cellOf('cg_percent_mac') ?? cellOf('cg_station'))!;
  return checkLimits(cg, cgLimits, cell, 'The CG', 1 / 100, '% MAC', faults) ? cg : undefined;
}

/** `30°`, so that 30 and 30.0 are one state. */
function angleText(angle: number | undefined): string | undefined {
  return angle === undefined ? undefined : `${shortNumber((angle * 180) / Math.PI)}°`;
}
