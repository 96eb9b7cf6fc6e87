/** `vary` → axes. Counts first, values only once the number of combinations is known to be bearable. */
import { type ColumnSpec, listColumn, mostValues, readColumn } from './axis-values.ts';
import type { Reading } from './reading.ts';
import {
  firstOf,
  type ListNode,
  type MapNode,
  mapIn,
  type SourceNode,
  type Span,
  valueIn,
  wordIn,
} from './source.ts';
import type { Axis } from './study.ts';
import { type Choices, plainPath, variedNumber } from './varied-paths.ts';

/** Another number than its partner that a varied one is to hold. */
export interface HoldRequest {
  readonly varied: string;
  readonly held: string;
  readonly span: Span;
}

/** An axis whose values still know where they were written. */
export interface PlacedAxis extends Axis {
  readonly span: Span;
  placeOf(path: number, index: number): Span;
}

export interface Varied {
  readonly axes: readonly PlacedAxis[];
  readonly holds: readonly HoldRequest[];
}

interface AxisSpec {
  readonly name: string;
  readonly span: Span;
  readonly columns: readonly ColumnSpec[];
}

/** A combination's number must stay exact and a run must come to an end. */
const mostCombinations = 1_000_000_000n;
/** All values of all axes together, so that no study fills the memory. */
const mostValuesTogether = 5_000_000;
const tiedKey = 'tied';

/** Reads `vary`. Faults are told; axes with a fault are left out. */
export function readVary(root: SourceNode, choices: Choices, reading: Reading): Varied {
  const vary = mapIn(root, 'vary');
  if (!vary) return { axes: [], holds: [] };
  const holds: HoldRequest[] = [];
  const specs: AxisSpec[] = [];
  const taken = new Map<string, string>();
  for (const [key, entry] of vary.entries) {
    if (key === tiedKey) specs.push(...readTied(entry.value, choices, taken, holds, reading));
    else {
      const spec = readAxis(key, entry.key, entry.value, choices, taken, holds, reading);
      if (spec) specs.push(spec);
    }
  }
  return {
    axes: countIsBearable(specs, vary, reading) ? specs.map((spec) => expand(spec, reading)) : [],
    holds,
  };
}

function readAxis(
  key: string,
  span: Span,
  node: SourceNode,
  choices: Choices,
  taken: Map<string, string>,
  holds: HoldRequest[],
  reading: Reading,
): AxisSpec | undefined {
  const maps = node.kind === 'list' ? node.items.filter((item) => item.kind === 'map') : [];
  if (node.kind === 'list' && maps.length > 0) {
    return readAxisOfMaps(key, span, node, choices, taken, reading);
  }
  const column = readNumber(key, span, node, choices, taken, holds, reading);
  return column ? { name: column.path, span, columns: [column] } : undefined;
}

function readNumber(
  key: string,
  span: Span,
  node: SourceNode,
  choices: Choices,
  taken: Map<string, string>,
  holds: HoldRequest[],
  reading: Reading,
): ColumnSpec | undefined {
  const definition = variedNumber(key, span, choices, reading);
  if (!definition || isTaken(definition.path, key, span, taken, reading)) return undefined;
  const held = wordIn(node, 'hold');
  if (held !== undefined) holds.push({ varied: definition.path, held, span: valueIn(node, 'hold')!.span });
  return readColumn(node, definition, reading);
}

function isTaken(
  path: string,
  by: string,
  span: Span,
  taken: Map<string, string>,
  reading: Reading,
): boolean {
  const other = taken.get(path);
  if (other === undefined) {
    taken.set(path, by);
    return false;
  }
  const found =
    other === by ? `${path} varies twice.` : `${path} varies under '${by}' and already under '${other}'.`;
  reading.faults.add('DUPLICATE_AXIS', span, found, 'Keep one of the two.');
  return true;
}

/** `cg: [{forward: 22 %, aft: 31 %}, …]`: the numbers of the maps step side by side. */
function readAxisOfMaps(
  key: string,
  span: Span,
  list: ListNode,
  choices: Choices,
  taken: Map<string, string>,
  reading: Reading,
): AxisSpec | undefined {
  const first = list.items.find((item): item is MapNode => item.kind === 'map')!;
  const prefix = plainPath(key, choices);
  const columns = [...first.entries].map(([name, entry]) => {
    const path = prefix === '' ? name : `${prefix}.${name}`;
    const definition = variedNumber(path, entry.key, choices, reading);
    if (!definition || isTaken(definition.path, key, entry.key, taken, reading)) return undefined;
    const nodes = list.items.map((item) => valueIn(item, name));
    const quantities = nodes.map((node) => reading.quantity(node, definition, `vary.${path}`));
    if (!quantities.every((quantity) => quantity !== undefined)) return undefined;
    return listColumn(
      definition.path,
      quantities,
      nodes.map((node) => node!.span),
      list.span,
      reading,
    );
  });
  const alike = list.items.map((item) => hasKeysOf(first, item, key, reading)).every(Boolean);
  if (!alike || columns.length === 0 || !columns.every((column) => column !== undefined)) return undefined;
  return { name: prefix === '' ? columns.map((column) => column.path).join(' + ') : prefix, span, columns };
}

function hasKeysOf(first: MapNode, item: SourceNode, axis: string, reading: Reading): boolean {
  if (item.kind !== 'map') return false;
  const missing = [...first.entries.keys()].find((name) => !item.entries.has(name));
  const extra = [...item.entries].find(([name]) => !first.entries.has(name));
  if (missing !== undefined) {
    const found = `A map of vary.${axis} has no ${missing}, which the first has.`;
    reading.faults.add('MISSING_KEY', firstOf(item), found, `Add ${missing}: to this map.`);
  } else if (extra) {
    const found = `A map of vary.${axis} has ${extra[0]}, which the first has not.`;
    reading.faults.add('UNKNOWN_KEY', extra[1].key, found, 'Give all maps the same keys.');
  }
  return missing === undefined && !extra;
}

function readTied(
  node: SourceNode,
  choices: Choices,
  taken: Map<string, string>,
  holds: HoldRequest[],
  reading: Reading,
): AxisSpec[] {
  if (node.kind !== 'list') return [];
  return node.items.flatMap((group) => {
    if (group.kind !== 'map') return [];
    if (group.entries.size === 0) {
      reading.faults.add(
        'EMPTY_AXIS',
        group.span,
        'A group of tied numbers is empty.',
        'Name the numbers, or remove the group.',
      );
      return [];
    }
    const columns = [...group.entries].map(([key, entry]) =>
      readNumber(key, entry.key, entry.value, choices, taken, holds, reading),
    );
    if (!columns.every((column) => column !== undefined) || !lengthsAgree(columns, group, choices, reading))
      return [];
    return [{ name: columns.map((column) => column.path).join(' + '), span: firstOf(group), columns }];
  });
}

function lengthsAgree(
  columns: readonly ColumnSpec[],
  group: MapNode,
  choices: Choices,
  reading: Reading,
): boolean {
  const wanted = columns[0]!.count;
  const other = columns.find((column) => column.count !== wanted);
  if (!other) return true;
  const entry = [...group.entries].find(([key]) => plainPath(key, choices) === other.path);
  reading.faults.add(
    'TIED_LENGTHS_DIFFER',
    entry?.[1].key ?? other.span,
    `${other.path} has ${other.count} values, and ${columns[0]!.path}, which it is tied to, has ${wanted}.`,
    'Give all numbers of a group the same count of values.',
  );
  return false;
}

const grouped = (count: bigint | number) => String(count).replace(/\B(?=(\d{3})+$)/g, ',');

function countIsBearable(specs: readonly AxisSpec[], vary: MapNode, reading: Reading): boolean {
  let bearable = true;
  let together = 0;
  for (const { name, span, columns } of specs) {
    const count = columns[0]!.count;
    together += count * columns.length;
    if (count <= mostValues) continue;
    bearable = false;
    const found = `vary.${name} has ${grouped(count)} values; an axis may have ${grouped(mostValues)}.`;
    reading.faults.add('TOO_MANY_COMBINATIONS', span, found, 'Take a larger step or a smaller count.');
  }
  if (!bearable) return false;
  const total = specs.reduce((product, spec) => product * BigInt(spec.columns[0]!.count), 1n);
  if (total <= mostCombinations && together <= mostValuesTogether) return true;
  const longest = [...specs].sort((a, b) => b.columns[0]!.count - a.columns[0]!.count).slice(0, 3);
  const names = longest.map((spec) => `${spec.name} (${grouped(spec.columns[0]!.count)})`).join(', ');
  const found =
    total > mostCombinations
      ? `The axes make ${countWords(total)} combinations; a run numbers at most ${grouped(mostCombinations)}.`
      : `The axes hold ${grouped(together)} values; ${grouped(mostValuesTogether)} are possible.`;
  reading.faults.add('TOO_MANY_COMBINATIONS', firstOf(vary), found, `Thin out the longest axes: ${names}.`);
  return false;
}

/** Long counts as a power of ten. */
function countWords(total: bigint): string {
  const digits = String(total);
  const longestWrittenOut = 21;
  return digits.length <= longestWrittenOut ? grouped(total) : `about 10^${digits.length - 1}`;
}

function expand({ name, span, columns }: AxisSpec, reading: Reading): PlacedAxis {
  if (columns.every((column) => column.isList)) tellDuplicates(name, columns, reading);
  return {
    name,
    span,
    paths: columns.map((column) => column.path),
    values: columns.map((column) => column.expand()),
    placeOf: (path, index) => columns[path]!.placeOf(index),
  };
}

/** Values that differ by rounding only are the same value. */
const samePrecision = 12;

function tellDuplicates(name: string, columns: readonly ColumnSpec[], reading: Reading): void {
  const seen = new Set<string>();
  const values = columns.map((column) => column.expand());
  for (let i = 0; i < columns[0]!.count; i++) {
    const key = values.map((column) => Number(column[i]!.toPrecision(samePrecision))).join(' ');
    if (seen.has(key)) {
      const found = `vary.${name} has the same ${columns.length > 1 ? 'values' : 'value'} twice.`;
      reading.faults.add('DUPLICATE_VALUE', columns[0]!.placeOf(i), found, 'Remove one of them.');
    }
    seen.add(key);
  }
}
