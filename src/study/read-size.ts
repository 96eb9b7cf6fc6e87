/** `size` and `corrections`. */
import { figureNameOf } from './inputs.ts';
import type { FigureNames } from './known-figures.ts';
import type { QuantityKind } from './quantities.ts';
import type { PlacedAxis } from './read-vary.ts';
import type { Reading } from './reading.ts';
import { keySpan, type MapNode, mapIn, type SourceNode, type Span, valueIn, wordIn } from './source.ts';
import type { Corrections, Sizing } from './study.ts';
import { type Choices, plainPath, variedNumber } from './varied-paths.ts';

/** The ends between which a number is chosen, and what is still to be settled by the figures. */
export interface SizeRange {
  readonly map: MapNode;
  readonly path: string;
  readonly from: number;
  readonly to: number;
}

/** Reads which number `size` chooses, and between what. */
export function readSizeRange(
  root: SourceNode,
  axes: readonly PlacedAxis[],
  choices: Choices,
  reading: Reading,
): SizeRange | undefined {
  const map = mapIn(root, 'size');
  const word = wordIn(map, 'choose');
  if (!map || word === undefined) return undefined;
  const span = valueIn(map, 'choose')!.span;
  if (isVaried(word, span, axes, choices, reading)) return undefined;
  const definition = variedNumber(word, span, choices, reading);
  const ends = valueIn(map, 'between');
  if (!definition || ends?.kind !== 'list') return undefined;
  if (ends.items.length !== 2) {
    const found = `size.between lists ${ends.items.length} values.`;
    reading.faults.add(
      'WRONG_TYPE',
      ends.span,
      found,
      'Give the least and the greatest: [0.6 m^2, 2.5 m^2].',
    );
    return undefined;
  }
  const [from, to] = ends.items.map((end) => reading.quantity(end, definition, 'size.between')?.si);
  if (from === undefined || to === undefined) return undefined;
  if (from >= to) {
    const found = 'size.between does not run upward.';
    reading.faults.add('BAND_REVERSED', ends.span, found, 'Give the least value first.');
  } else if (definition.path === 'tail.arm' && from <= 0) {
    const found = 'size.between lets the tail lie ahead of the wing.';
    reading.faults.add('TAIL_AHEAD_OF_WING', ends.span, found, 'Choose the arm above 0.');
  }
  return { map, path: definition.path, from, to };
}

function isVaried(
  word: string,
  span: Span,
  axes: readonly PlacedAxis[],
  choices: Choices,
  reading: Reading,
): boolean {
  const path = plainPath(word, choices);
  if (!axes.some((axis) => axis.paths.includes(path))) return false;
  const found = `size chooses ${path}, which varies as well.`;
  reading.faults.add('OVERDETERMINED', span, found, 'Remove its axis, or let size choose another number.');
  return true;
}

/** Settles what the chosen number is to reach. */
export function readSizing(
  range: SizeRange | undefined,
  root: SourceNode,
  figures: FigureNames,
  reading: Reading,
): Sizing | undefined {
  const map = mapIn(root, 'size');
  const word = wordIn(map, 'so_that');
  if (!map || word === undefined) return undefined;
  const span = valueIn(map, 'so_that')!.span;
  const figure = figures.findNumber(word, span, reading);
  if (!figure) return undefined;
  const kind = {
    dimension: figure.dimension,
    least: -Number.MAX_VALUE,
    most: Number.MAX_VALUE,
    limits: 'a number',
  };
  const value = reading.quantity(valueIn(map, 'is'), kind, 'size.is')?.si;
  if (!range || value === undefined) return undefined;
  const given = [...reading.inputs.keys()].map(figureNameOf);
  if (given.includes(figure.name)) {
    const own =
      figure.name === figureNameOf(range.path)
        ? 'the number that is chosen'
        : 'a number that the study gives';
    const found = `size.so_that names ${figure.name}, which is ${own}.`;
    reading.faults.add(
      'OVERDETERMINED',
      span,
      found,
      'Name a figure that is worked out, such as static_margin_aft.',
    );
  }
  return { path: range.path, figure: figure.name, value, from: range.from, to: range.to };
}

const correctionKind: QuantityKind = {
  dimension: 'fraction_of_mac',
  least: -0.2,
  most: 0.2,
  limits: 'a larger correction says that the study is of another aeroplane',
};

/** Reads `corrections`; undefined where the study gives none. */
export function readCorrections(root: SourceNode, reading: Reading): Corrections | undefined {
  const map = mapIn(root, 'corrections');
  if (!map) return undefined;
  const neutralPoint = reading.quantity(
    valueIn(map, 'neutral_point'),
    correctionKind,
    'corrections.neutral_point',
  );
  const source = wordIn(map, 'source');
  if (source?.trim() === '') {
    const found = 'corrections.source is empty.';
    reading.faults.add('MISSING_KEY', keySpan(map, 'source'), found, 'Say where the correction comes from.');
  }
  return neutralPoint && source !== undefined ? { neutralPoint: neutralPoint.si, source } : undefined;
}
