/** The header of a table of flown points: which column tells what. */
import type { DataFault, DataFaultCode } from '../errors.ts';
import { nearestKnown } from '../study/nearest-known.ts';
import { shorten } from '../study/quantities.ts';
import { type ColumnKey, type DataColumn, dataColumns, quantities, uncalibrated } from './columns.ts';
import type { Cell, Place } from './csv-text.ts';

/** A column of the table, and where its cells stand in a row. */
interface PlacedColumn extends DataColumn {
  readonly index: number;
}
export type Columns = ReadonlyMap<ColumnKey, PlacedColumn>;

/** Faults as they are found. */
export class DataFaults {
  readonly list: DataFault[] = [];
  add(code: DataFaultCode, { line, column, length }: Place, found: string, remedy: string): void {
    this.list.push({ code, line, column, length: Math.max(1, length), found, remedy });
  }
}

/** Columns by what they tell; faults for those that are not known, twice there, or missing. */
export function readHeader(header: readonly Cell[], faults: DataFaults): Columns {
  const columns = new Map<ColumnKey, PlacedColumn>();
  header.forEach((cell, index) => {
    const known = dataColumns.find(({ name }) => name === cell.text);
    if (known === undefined) {
      faults.add(
        'UNKNOWN_COLUMN',
        cell,
        `There is no column '${shorten(cell.text)}'.`,
        offerColumn(cell.text),
      );
      return;
    }
    const keys = quantities.find((quantity) => quantity.keys.includes(known.key))?.keys ?? [];
    const earlier = keys.map((key) => columns.get(key)).find((column) => column !== undefined);
    if (earlier === undefined) columns.set(known.key, { ...known, index });
    else {
      const found = `${cell.text} says again what ${earlier.name} says.`;
      faults.add('DUPLICATE_COLUMN', cell, found, 'Keep one of the two.');
    }
  });
  tellMissing(header, columns, faults);
  return columns;
}

function offerColumn(text: string): string {
  if (uncalibrated.test(text)) {
    return 'Speeds are calibrated airspeed: correct them for instrument and position error, and name the column calibrated_speed_kt.';
  }
  const near = nearestKnown(
    text,
    dataColumns.map(({ name }) => name),
  );
  const family = dataColumns.filter(({ name }) => text !== '' && name.startsWith(`${text}_`));
  if (family.length > 0) return `The unit stands in the name: ${family.map(({ name }) => name).join(', ')}.`;
  if (near !== undefined) return `Did you mean ${near}?`;
  return `Known columns: ${dataColumns.map(({ name }) => name).join(', ')}.`;
}

function tellMissing(header: readonly Cell[], columns: Columns, faults: DataFaults): void {
  const last = header.at(-1)!;
  const whole = { line: last.line, column: 1, length: last.column + last.length - 1 };
  for (const { keys, needed } of quantities) {
    if (!needed || keys.some((key) => columns.has(key))) continue;
    const names = dataColumns.filter(({ key }) => keys.includes(key)).map(({ name }) => name);
    const wanted = names.length === 1 ? names[0]! : `one of ${names.join(', ')}`;
    faults.add('MISSING_COLUMN', whole, `There is no column of the ${wordOf[keys[0]!]}.`, `Add ${wanted}.`);
  }
}

const wordOf: Readonly<Record<ColumnKey, string>> = {
  point: 'points’ names',
  calibrated_speed: 'calibrated airspeed',
  mass: 'mass',
  cg_percent_mac: 'CG',
  cg_station: 'CG',
  elevator: 'elevator angle',
  stick_force: 'stick force',
  flaps: 'flaps',
  flaps_angle: 'flaps',
  power: 'power',
  height: 'height',
};
