import { bandRequirements, edgeTolerance } from '../figures/band.ts';
import type { TableColumn } from '../figures/figure.ts';
import { bitSetSuffix } from './parquet-schema.ts';

/** Another static-margin band, fractions of the MAC; an edge that is absent is not required. */
export interface BandOverride {
  readonly lower?: number;
  readonly upper?: number;
}

/** How the band's edges are named among the requirements. */
export const bandLabels = { lower: bandRequirements.lower.name, upper: bandRequirements.upper.name } as const;
type Edge = keyof typeof bandLabels;

/** An edge of another band: kept, missed, or without a margin to judge by. */
const edgeStates = { kept: 0, missed: 1, empty: 2 } as const;

/** How a group of rows stands to the requirements. */
export interface Judged {
  readonly fails: number;
  readonly empty: number;
  readonly lower: number;
  readonly upper: number;
}

/**
 * Pieces of SQL over the columns of a run. Every name is quoted, every value a number of ours;
 * nothing a user wrote becomes SQL but file and column names, as quoted names.
 */
export class CaseSql {
  /** The table expression. */
  readonly cases: string;
  /** Names of the requirements, by the bit that stands for each. */
  readonly requirements: readonly string[];
  readonly #columns: ReadonlyMap<string, TableColumn>;

  constructor(files: readonly string[], columns: readonly TableColumn[]) {
    this.cases = `read_parquet([${files.map(quotedText).join(', ')}])`;
    this.#columns = new Map(columns.map((column) => [column.figure.name, column]));
    this.requirements = this.#columns.get('fails')?.figure.labels ?? [];
  }

  /** All columns that the files must have. */
  everyColumn(): string {
    return [...this.#columns.keys()].map((figure) => this.si(figure)).join(', ');
  }

  /** A figure as the double that a block held: SI, an index, a bit set. */
  si(figure: string): string {
    const column = this.#column(figure);
    const name = quotedName(column.name);
    const { kind, labels = [] } = column.figure;
    if (kind === 'number') return column.factor === 1 ? name : `(${name} / ${literal(column.factor)})`;
    if (kind === 'yes_no') return `CAST(${name} AS INTEGER)`;
    if (kind === 'flags') return quotedName(column.name + bitSetSuffix);
    // list_position counts from 1, and gives null or 0 for what is not there.
    return `(nullif(list_position([${labels.map(quotedText).join(', ')}], ${name}), 0) - 1)`;
  }

  feasible(band?: BandOverride): string {
    if (band === undefined) return `coalesce(${quotedName(this.#column('feasible').name)}, false)`;
    const kept = (['lower', 'upper'] as const).map(
      (edge) => `${this.edgeState(edge, band)} = ${edgeStates.kept}`,
    );
    return `(${this.failsBits(band)} = 0 AND ${this.notComputedBits(band)} = 0 AND ${kept.join(' AND ')})`;
  }

  /** Bits of the requirements failed; with another band, without the bits of the study's own. */
  failsBits(band?: BandOverride): string {
    return this.#bits('fails', band);
  }

  notComputedBits(band?: BandOverride): string {
    return this.#columns.has('not_computed') ? this.#bits('not_computed', band) : '0';
  }

  #bits(figure: string, band: BandOverride | undefined): string {
    const column = this.#column(figure);
    const bits = `coalesce(${quotedName(column.name + bitSetSuffix)}, 0)`;
    if (band === undefined) return bits;
    const { labels = [] } = column.figure;
    const others = labels.map((label, bit) => (isBandLabel(label) ? 0 : 2 ** bit));
    return `(${bits} & ${others.reduce((sum, bit) => sum + bit, 0)})`;
  }

  edgeState(edge: Edge, band?: BandOverride): string {
    const limit = band?.[edge];
    if (limit === undefined) return `${edgeStates.kept}`;
    const margin = this.#margin(edge);
    const kept =
      edge === 'lower'
        ? `${margin} >= ${literal(limit - edgeTolerance)}`
        : `${margin} <= ${literal(limit + edgeTolerance)}`;
    return `CASE WHEN ${margin} IS NULL THEN ${edgeStates.empty} WHEN ${kept} THEN ${edgeStates.kept} ELSE ${edgeStates.missed} END`;
  }

  /** The lower edge binds with the CG aft, the upper with it forward. */
  #margin(edge: Edge): string {
    return this.si(edge === 'lower' ? 'static_margin_aft' : 'static_margin_forward');
  }

  /** What a row misses by: the study's own scaled shortfall, or the larger distance from another band. */
  shortfall(band?: BandOverride): string {
    if (band === undefined) return this.si('largest_shortfall');
    const lower = band.lower === undefined ? '0' : `${literal(band.lower)} - ${this.#margin('lower')}`;
    const upper = band.upper === undefined ? '0' : `${this.#margin('upper')} - ${literal(band.upper)}`;
    return `greatest(${lower}, ${upper})`;
  }

  fails(requirement: string, judged: Judged): boolean {
    return (
      this.#edge(requirement, judged) === edgeStates.missed ||
      this.#hasBit(requirement, judged.fails, 'fails')
    );
  }

  isEmpty(requirement: string, judged: Judged): boolean {
    const bit = this.#hasBit(requirement, judged.empty, 'not_computed');
    return bit || this.#edge(requirement, judged) === edgeStates.empty;
  }

  #edge(requirement: string, judged: Judged): number {
    if (requirement === bandLabels.lower) return judged.lower;
    return requirement === bandLabels.upper ? judged.upper : edgeStates.kept;
  }

  #hasBit(requirement: string, bits: number, figure: string): boolean {
    const bit = this.#columns.get(figure)?.figure.labels?.indexOf(requirement) ?? -1;
    return bit >= 0 && (bits & (1 << bit)) !== 0;
  }

  #column(figure: string): TableColumn {
    const column = this.#columns.get(figure);
    if (column === undefined) throw new Error(`the table has no figure ${figure}`);
    return column;
  }
}

function isBandLabel(label: string): boolean {
  return label === bandLabels.lower || label === bandLabels.upper;
}

export function quotedName(name: string): string {
  return `"${name.replaceAll('"', '""')}"`;
}

export function quotedText(text: string): string {
  return `'${text.replaceAll("'", "''")}'`;
}

/** A finite number as SQL, exactly, as a double. */
export function literal(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`${value} is no number for a query`);
  return `CAST('${value}' AS DOUBLE)`;
}
