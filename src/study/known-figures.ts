import type { Dimension } from '../figures/figure.ts';
import { figureNameOf } from './inputs.ts';
import { nearestKnown } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import type { Reading } from './reading.ts';
import type { Span } from './source.ts';
import { type Named, plainPath } from './varied-paths.ts';

/** A figure that a requirement, a preference or the table can name. */
export interface KnownFigure {
  readonly name: string;
  readonly dimension: Dimension;
  /** A verdict, a choice or flags: a column of the table, but nothing to require or prefer. */
  readonly onlyInTable?: boolean;
}

/** The figures of one study by name; a dotted path is taken for the name it stands for. */
export class FigureNames {
  readonly #byName: ReadonlyMap<string, KnownFigure> | undefined;

  readonly #named: Named;

  /**
   * @param figures undefined where they can't be listed; then no name is found, and no fault told
   * @param named   conditions and items that a dotted path may name
   */
  constructor(figures: readonly KnownFigure[] | undefined, named: Named) {
    this.#named = named;
    this.#byName = figures && new Map(figures.map((figure) => [figure.name, figure]));
  }

  /** The number of that name, to be required or preferred; where there is none a fault is told. */
  findNumber(word: string, span: Span, reading: Reading): KnownFigure | undefined {
    return this.#find(word, span, reading, (figure) => figure.onlyInTable !== true);
  }

  /** The figure of that name, to be a column of the table; where there is none a fault is told. */
  find(word: string, span: Span, reading: Reading): KnownFigure | undefined {
    return this.#find(word, span, reading, () => true);
  }

  #find(
    word: string,
    span: Span,
    reading: Reading,
    fits: (figure: KnownFigure) => boolean,
  ): KnownFigure | undefined {
    if (!this.#byName) return undefined;
    const name = figureNameOf(plainPath(word, this.#named));
    const found = this.#byName.get(name);
    if (found && fits(found)) return found;
    if (found) {
      reading.faults.add(
        'UNKNOWN_FIGURE',
        span,
        `'${shorten(word)}' is no number, so it can be a column of the table but not required or preferred.`,
        'Name a figure with a value, such as tail_area.',
      );
      return undefined;
    }
    const near = nearestKnown(
      name,
      [...this.#byName.values()].filter(fits).map((figure) => figure.name),
    );
    reading.faults.add(
      'UNKNOWN_FIGURE',
      span,
      `This study has no figure '${shorten(word)}'.`,
      near ? `Did you mean '${near}'?` : 'List the figures of the study with: aftlimit figures.',
    );
    return undefined;
  }
}
