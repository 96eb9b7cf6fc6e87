import type { Dimension } from '../figures/figure.ts';
import { figureNameOf } from './inputs.ts';
import { nearestKnown } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import type { Reading } from './reading.ts';
import type { Span } from './source.ts';

/** A figure that a requirement, a preference or the table can name. */
export interface KnownFigure {
  readonly name: string;
  readonly dimension: Dimension;
}

/** The figures of one study by name; a dotted path is taken for the name it stands for. */
export class FigureNames {
  readonly #byName: ReadonlyMap<string, KnownFigure> | undefined;

  /** @param figures undefined where they can't be listed; then no name is found, and no fault told */
  constructor(figures: readonly KnownFigure[] | undefined) {
    this.#byName = figures && new Map(figures.map((figure) => [figure.name, figure]));
  }

  /** The figure of that name; where there is none a fault is told. */
  find(word: string, span: Span, reading: Reading): KnownFigure | undefined {
    const name = figureNameOf(word.trim());
    const found = this.#byName?.get(name);
    if (found || !this.#byName) return found;
    const near = nearestKnown(name, this.#byName.keys());
    reading.faults.add(
      'UNKNOWN_FIGURE',
      span,
      `This study has no figure '${shorten(word)}'.`,
      near ? `Did you mean '${near}'?` : 'List the figures of the study with: aftlimit figures.',
    );
    return undefined;
  }
}
