import { nearestKnown } from './nearest-known.ts';
import type { Reading } from './reading.ts';
import { firstOf, type SourceNode, type Span, valueIn, wordIn } from './source.ts';
import type { Condition } from './study.ts';

/** Stands for all conditions where a requirement names them. */
export const allConditions = 'all';

/** Reads `conditions` into the inputs. This version evaluates exactly one. */
export function readConditions(root: SourceNode, reading: Reading): Condition[] {
  const list = valueIn(root, 'conditions');
  if (list?.kind !== 'list') return [];
  if (list.items.length !== 1) tellCount(list.items, list.span, reading);
  const names: string[] = [];
  list.items.forEach((item, index) => {
    for (const key of ['speed', 'height']) reading.take(item, key, `conditions[${index + 1}].${key}`);
    const name = wordIn(item, 'name');
    if (name === undefined) return;
    if (names.includes(name) || name === allConditions) tellName(name, valueIn(item, 'name')!.span, reading);
    names.push(name);
  });
  return names.map((name) => ({
    name,
    speedAs: 'speed',
    power: 'idle',
    flapsDown: false,
    groundEffect: false,
  }));
}

function tellCount(items: readonly SourceNode[], span: Span, reading: Reading): void {
  const second = items[1];
  reading.faults.add(
    'OUT_OF_RANGE',
    second ? firstOf(second) : span,
    `conditions lists ${items.length}; this version evaluates exactly one.`,
    second
      ? 'Keep the condition that the band is for.'
      : 'Add one: - {name: cruise, speed: 105 kt, height: 0 m}.',
  );
}

function tellName(name: string, span: Span, reading: Reading): void {
  reading.faults.add(
    'DUPLICATE_NAME',
    span,
    name === allConditions ? `'${name}' stands for every condition.` : `Two conditions are called '${name}'.`,
    'Give each condition a name of its own.',
  );
}

/** Adds a fault where a requirement names a condition that is not listed. */
export function checkConditionName(
  name: string,
  span: Span,
  conditions: readonly Condition[],
  reading: Reading,
): void {
  const names = conditions.map((condition) => condition.name);
  if (name === allConditions || names.includes(name)) return;
  const near = nearestKnown(name, names);
  reading.faults.add(
    'UNKNOWN_CONDITION',
    span,
    `There is no condition '${name.slice(0, 40)}'.`,
    near ? `Did you mean '${near}'?` : `Listed: ${names.join(', ')}. Or write ${allConditions}.`,
  );
}
