/** The values of one varied number: a list, or from, to and step or count. Nothing is expanded here. */
import type { InputDefinition } from './inputs.ts';
import { clean, inSi, type Quantity, type QuantityKind, shortNumber } from './quantities.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type MapNode, type SourceNode, type Span, valueIn, wordIn } from './source.ts';

export interface ColumnSpec {
  readonly path: string;
  readonly count: number;
  /** All values, SI; called once the number of combinations is known to be bearable. */
  expand(): Float64Array;
  /** Where the value of that index is written. */
  placeOf(index: number): Span;
  /** The whole list or range. */
  readonly span: Span;
  /** A range never has a value twice; a list may. */
  readonly isList: boolean;
}

/** A range may miss its end by this share of itself. */
const endTolerance = 1e-9;
/** More values than this on one axis are refused before they are written out. */
export const mostValues = 1_000_000;

/** Reads the values of one number; undefined where they have a fault, which is told. */
export function readColumn(
  node: SourceNode,
  definition: InputDefinition,
  reading: Reading,
): ColumnSpec | undefined {
  const label = `vary.${definition.path}`;
  if (node.kind === 'list') {
    const quantities = node.items.map((item) => reading.quantity(item, definition, label));
    if (!quantities.every((quantity) => quantity !== undefined)) return undefined;
    return listColumn(definition.path, quantities, node.items.map(firstOf), node.span, reading);
  }
  return node.kind === 'map' ? readRange(node, definition, label, reading) : undefined;
}

/** Values that are written out one by one. */
export function listColumn(
  path: string,
  quantities: readonly Quantity[],
  places: readonly Span[],
  span: Span,
  reading: Reading,
): ColumnSpec | undefined {
  if (quantities.length === 0) {
    reading.faults.add(
      'EMPTY_AXIS',
      span,
      `vary.${path} lists no value.`,
      'List at least one value, or remove the axis.',
    );
    return undefined;
  }
  const values = Float64Array.from(quantities, (quantity) => quantity.si);
  return {
    path,
    count: values.length,
    expand: () => values,
    placeOf: (index) => places[index] ?? span,
    span,
    isList: true,
  };
}

interface Ends {
  readonly from: Quantity;
  readonly to: Quantity;
  readonly definition: InputDefinition;
  readonly label: string;
  readonly map: MapNode;
}

function readRange(
  map: MapNode,
  definition: InputDefinition,
  label: string,
  reading: Reading,
): ColumnSpec | undefined {
  const from = reading.quantity(valueIn(map, 'from'), definition, `${label}.from`);
  const to = reading.quantity(valueIn(map, 'to'), definition, `${label}.to`);
  const hasStep = valueIn(map, 'step') !== undefined;
  const hasCount = valueIn(map, 'count') !== undefined;
  const logarithmic = wordIn(map, 'spacing') === 'logarithmic';
  if (hasStep === hasCount || (hasStep && logarithmic)) {
    tellStepAndCount(map, hasStep, hasCount, label, reading);
    return undefined;
  }
  if (!from || !to) return undefined;
  const ends: Ends = { from, to, definition, label, map };
  const count = hasStep ? countFromStep(ends, reading) : readCount(ends, reading);
  if (count === undefined) return undefined;
  if (logarithmic && !(from.si > 0 && to.si > 0)) {
    const found = `${label} is spaced logarithmically from ${show(from)} to ${show(to)}.`;
    reading.faults.add(
      'OUT_OF_RANGE',
      keySpan(map, 'spacing'),
      found,
      'Both ends must be greater than zero; or use linear.',
    );
    return undefined;
  }
  return rangeColumn(ends, count, logarithmic);
}

function tellStepAndCount(
  map: MapNode,
  hasStep: boolean,
  hasCount: boolean,
  label: string,
  reading: Reading,
): void {
  if (!hasStep && !hasCount) {
    reading.faults.add(
      'UNDERDETERMINED',
      firstOf(map),
      `${label} has neither step nor count.`,
      'Add step: or count:.',
    );
  } else if (hasStep && hasCount) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, 'count'),
      `${label} has both step and count.`,
      'Keep one of them.',
    );
  } else {
    const remedy = 'Give count instead of step: logarithmic values have equal ratios, not equal steps.';
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, 'step'),
      `${label} is logarithmic and has a step.`,
      remedy,
    );
  }
}

const show = ({ value, unit }: Quantity) => `${shortNumber(value)} ${unit}`.trim();

/** A step has the kind of its axis but may have any size and sign. */
function stepKind(definition: InputDefinition): QuantityKind {
  return {
    dimension: definition.dimension,
    least: -Number.MAX_VALUE,
    most: Number.MAX_VALUE,
    limits: 'a number',
  };
}

function countFromStep(ends: Ends, reading: Reading): number | undefined {
  const { from, to, definition, label, map } = ends;
  const step = reading.quantity(valueIn(map, 'step'), stepKind(definition), `${label}.step`);
  if (!step) return undefined;
  const range = to.si - from.si;
  if (range === 0 && step.si !== 0) return 1;
  const steps = range / step.si;
  if (step.si === 0 || !(steps > 0)) {
    const direction = range > 0 ? 'up' : 'down';
    const found =
      step.si === 0
        ? `${label} has a step of 0, so it has no values.`
        : `${label} runs from ${show(from)} ${direction} to ${show(to)} by steps of ${show(step)}, so it has no values.`;
    const remedy =
      step.si === 0 ? 'Give a step that is not 0.' : 'Swap from and to, or change the sign of step.';
    reading.faults.add('EMPTY_AXIS', map.span, found, remedy);
    return undefined;
  }
  const whole = Math.round(steps);
  if (Math.abs(steps - whole) * Math.abs(step.si) > endTolerance * Math.abs(range)) {
    tellMissedEnd(ends, step, steps, reading);
    return undefined;
  }
  return whole + 1;
}

function tellMissedEnd(ends: Ends, step: Quantity, steps: number, reading: Reading): void {
  const { from, to, label, map } = ends;
  const near = Math.max(1, Math.round(steps));
  const fitting = (to.si - from.si) / near / step.factor;
  const lastBefore = (from.si + Math.floor(steps) * step.si) / to.factor;
  const stepText = `${shortNumber(fitting)} ${step.unit}`.trim();
  const endText = `${shortNumber(lastBefore)} ${to.unit}`.trim();
  // seven digits may be too few for the rule on ends; then count says it exactly
  const exact = Math.abs(Number(shortNumber(fitting)) * near * step.factor - (to.si - from.si));
  const fits = exact <= endTolerance * Math.abs(to.si - from.si);
  const offer = fits
    ? `step: ${stepText} fits (${near + 1} values)`
    : `count: ${near + 1} fits (steps of about ${stepText})`;
  const shorter = Math.floor(steps) >= 1 ? `; so does to: ${endText}` : '';
  reading.faults.add(
    'STEP_MISSES_END',
    keySpan(map, 'step'),
    `${label} runs from ${show(from)} to ${show(to)}, and steps of ${show(step)} do not land on the end.`,
    `${offer}${shorter}.`,
  );
}

function readCount({ from, to, label, map }: Ends, reading: Reading): number | undefined {
  const node = valueIn(map, 'count');
  if (node?.kind !== 'scalar' || typeof node.value !== 'number') return undefined;
  const count = node.value;
  if (!Number.isInteger(count) || count < 1) {
    const code = count === 0 ? 'EMPTY_AXIS' : 'OUT_OF_RANGE';
    reading.faults.add(code, node.span, `${label}.count is ${node.text}.`, 'Give a whole number, 2 or more.');
    return undefined;
  }
  if (count === 1 && from.si !== to.si) {
    const remedy = 'Give 2 or more: both ends belong to the axis.';
    reading.faults.add('EMPTY_AXIS', node.span, `${label} has one value for two ends.`, remedy);
    return undefined;
  }
  if (count > 1 && from.si === to.si) {
    const found = `${label} has ${count} values, all of them ${show(from)}.`;
    reading.faults.add('DUPLICATE_VALUE', node.span, found, 'Give two different ends, or a count of 1.');
    return undefined;
  }
  return count;
}

function rangeColumn({ from, to, definition, map }: Ends, count: number, logarithmic: boolean): ColumnSpec {
  const last = count - 1;
  const placeOf = (index: number) => {
    const key = index === 0 ? 'from' : index === last ? 'to' : undefined;
    return (key ? valueIn(map, key)?.span : undefined) ?? map.span;
  };
  const expand = () =>
    logarithmic ? logarithmicValues(from.si, to.si, count) : linearValues(from, to, count);
  return { path: definition.path, count, expand, placeOf, span: map.span, isList: false };
}

/** Values in the author's unit first, so that 0.1 m steps are the decimals the author means. */
function linearValues(from: Quantity, to: Quantity, count: number): Float64Array {
  const last = count - 1;
  const sameUnit = from.factor === to.factor;
  const [first, end, factor] = sameUnit ? [from.value, to.value, from.factor] : [from.si, to.si, 1];
  const values = new Float64Array(count);
  // zero inside a range must be zero, not rounding noise
  const noise = Math.max(Math.abs(first), Math.abs(end)) * Number.EPSILON;
  for (let i = 0; i < count; i++) {
    const value = last === 0 ? first : (first * (last - i) + end * i) / last;
    values[i] = inSi(Math.abs(value) <= noise ? 0 : clean(value), factor);
  }
  values[0] = from.si;
  values[last] = to.si;
  return values;
}

function logarithmicValues(from: number, to: number, count: number): Float64Array {
  const last = count - 1;
  const values = Float64Array.from(
    { length: count },
    (_, i) => from * (to / from) ** (last === 0 ? 0 : i / last),
  );
  values[last] = to;
  return values;
}
