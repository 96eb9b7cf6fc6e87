/** Names that a study's author gives to conditions, items and loading cases. */
import type { Reading } from './reading.ts';
import type { Span } from './source.ts';

const fittingName = /^[A-Za-z0-9_-]{1,30}$/;

/** A name as columns of the table carry it, which tell neither case nor `-` from `_`. */
export function columnPart(name: string): string {
  return name.toLowerCase().replace(/[^a-z0-9]+/g, '_');
}

/** Names of one kind, as they are found; a name that does not fit, or comes twice, is told. */
export class NameList {
  readonly #kind: string;
  readonly #taken = new Map<string, string>();

  /** @param kind what the names are for, in the plural: `conditions` */
  constructor(kind: string) {
    this.#kind = kind;
  }

  add(name: string, span: Span, reading: Reading): void {
    if (!fittingName.test(name)) {
      reading.faults.add(
        'BAD_NAME',
        span,
        `'${name.slice(0, 40)}' can't be a name here.`,
        'Use letters, digits, _ and -, at most 30 of them.',
      );
      return;
    }
    const column = columnPart(name);
    const other = this.#taken.get(column);
    if (other !== undefined) {
      const found =
        other === name
          ? `Two ${this.#kind} are called '${name}'.`
          : `'${name}' and '${other}' are one name in the table.`;
      reading.faults.add('DUPLICATE_NAME', span, found, 'Give each a name of its own.');
    }
    this.#taken.set(column, name);
  }
}
