import { nearestKnown } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import { columnPart, NameList } from './read-names.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type SourceNode, type Span, valueIn, wordIn } from './source.ts';
import type { Axis, Condition, Study } from './study.ts';

/** Stands for all conditions where a requirement names them. */
export const allConditions = 'all';
/** How a condition gives its speed; exactly one. */
export const speedKeys = ['speed', 'lift_coefficient', 'times_stall'] as const;
/** The word for no power, where a fraction may stand. */
const idle = 'idle';
const mostConditions = 12;

/** Reads `conditions` into the inputs; flaps count as down until the axes are known. */
export function readConditions(root: SourceNode, reading: Reading): Condition[] {
  const list = valueIn(root, 'conditions');
  if (list?.kind !== 'list') return [];
  if (list.items.length < 1 || list.items.length > mostConditions) tellCount(list.items, list.span, reading);
  const names = new NameList('conditions');
  return list.items.map((item, index) => {
    const prefix = `conditions[${index + 1}]`;
    reading.take(item, 'height', `${prefix}.height`);
    const speedAs = readSpeed(item, prefix, reading);
    const power = readPower(item, `${prefix}.power`, reading);
    const flapsDown = reading.take(item, 'flaps', `${prefix}.flaps`);
    const groundEffect = reading.take(item, 'wing_above_ground', `${prefix}.wing_above_ground`);
    const name = wordIn(item, 'name') ?? '';
    if (name !== '') tellName(name, valueIn(item, 'name')!.span, names, reading);
    return { name, speedAs, power, flapsDown, groundEffect };
  });
}

function readSpeed(item: SourceNode, prefix: string, reading: Reading): Condition['speedAs'] {
  const given = speedKeys.filter((key) => valueIn(item, key));
  const [first, second] = given;
  if (second) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(item, second),
      `${prefix} gives ${given.join(' and ')}; each settles the speed.`,
      `Keep ${given.join(' or ')}.`,
    );
  } else if (!first && item.kind === 'map') {
    reading.faults.addBeside(
      'UNDERDETERMINED',
      firstOf(item),
      `${prefix} has no speed.`,
      'Add speed:, or lift_coefficient:, or times_stall: (1.3 is 1.3 times the stall speed).',
    );
  }
  const key = first ?? 'speed';
  if (!reading.take(item, key, `${prefix}.${key}`)) reading.inputs.set(`${prefix}.${key}`, Number.NaN);
  return key;
}

function readPower(item: SourceNode, path: string, reading: Reading): Condition['power'] {
  const node = valueIn(item, 'power');
  if (!node) return idle;
  const word = node.kind === 'scalar' ? node.text.trim() : '';
  if (word === idle) return idle;
  if (/^[a-z]/i.test(word)) {
    const found = `${path} is '${shorten(word)}', where a share of the rated power or '${idle}' is wanted.`;
    const near = nearestKnown(word, [idle]);
    reading.faults.add(
      'UNKNOWN_WORD',
      node.span,
      found,
      near ? `Did you mean '${near}'?` : 'Write a share such as 65 %, or idle.',
    );
    return idle;
  }
  reading.take(item, 'power', path);
  return 'fraction';
}

function tellCount(items: readonly SourceNode[], span: Span, reading: Reading): void {
  const surplus = items[mostConditions];
  reading.faults.add(
    'OUT_OF_RANGE',
    surplus ? firstOf(surplus) : span,
    `conditions lists ${items.length}; 1 to ${mostConditions} are possible.`,
    surplus ? 'Leave some out.' : 'Add one: - {name: cruise, speed: 105 kt, height: 0 m}.',
  );
}

function tellName(name: string, span: Span, names: NameList, reading: Reading): void {
  if (name !== allConditions) names.add(name, span, reading);
  else {
    const found = `'${name}' stands for every condition.`;
    reading.faults.add('DUPLICATE_NAME', span, found, 'Give each condition a name of its own.');
  }
}

/**
 * Figures of a condition carry its name behind their own; no two may come out alike.
 * @param plain names of the figures that the study has without regard to conditions
 */
export function checkFigureNames(
  root: SourceNode,
  conditions: readonly Condition[],
  plain: readonly string[],
  reading: Reading,
): void {
  const list = valueIn(root, 'conditions');
  if (list?.kind !== 'list') return;
  const taken = new Set(plain);
  conditions.forEach(({ name }, index) => {
    const own = plain.map((figure) => `${figure}_${columnPart(name)}`);
    const clash = own.find((figure) => taken.has(figure));
    for (const figure of own) taken.add(figure);
    const node = valueIn(list.items[index], 'name');
    if (clash === undefined || !node) return;
    const found = `A condition '${name}' has a figure ${clash}, and that is another figure's name.`;
    reading.faults.add('DUPLICATE_NAME', node.span, found, 'Give the condition another name.');
  });
}

/** What conditions need of the aeroplane. */
type Needed = Pick<Study, 'propeller' | 'flaps'>;

/** Power needs a propeller, deflected flaps need flaps, a multiple of the stall speed a stated stall. */
export function checkConditionNeeds(
  root: SourceNode,
  conditions: readonly Condition[],
  { propeller, flaps }: Needed,
  reading: Reading,
): void {
  const list = valueIn(root, 'conditions');
  if (list?.kind !== 'list') return;
  list.items.forEach((item, index) => {
    const prefix = `conditions[${index + 1}]`;
    const tell = (key: string, found: string, remedy: string) =>
      reading.faults.add('MISSING_KEY', keySpan(item, key), found, remedy);
    const condition = conditions[index];
    const hasPower = condition?.power === 'fraction';
    if (hasPower && !propeller) {
      const found = `${prefix} has power, and the aeroplane has no propeller.`;
      tell('power', found, 'Add propeller: to aeroplane, or say power: idle.');
    }
    if (condition?.flapsDown && !flaps) {
      const found = `${prefix} deflects flaps, and the wing has none.`;
      tell('flaps', found, 'Add flaps: to wing, or remove flaps here.');
    }
    if (condition?.speedAs === 'times_stall' && !stallIsStated(reading)) {
      const found = `${prefix} gives times_stall, and neither the wing nor its section states a greatest lift.`;
      tell('times_stall', found, 'Add maximum_lift: to wing, or to its section.');
    }
    if (propeller && !valueIn(item, 'power')) {
      const source = 'not given; without power unless it is said';
      reading.assumptions.push({ path: `${prefix}.power`, value: idle, source });
    }
  });
}

function stallIsStated({ inputs, assumptions }: Reading): boolean {
  const assumed = assumptions.some(({ path }) => path === 'wing.section.maximum_lift');
  return inputs.has('wing.maximum_lift') || !assumed;
}

/** Tells flaps up where their deflection is 0 throughout. */
export function withFlapsSettled(
  conditions: readonly Condition[],
  axes: readonly Axis[],
  { inputs }: Reading,
): Condition[] {
  return conditions.map((condition, index) => {
    const path = `conditions[${index + 1}].flaps`;
    const axis = axes.find((one) => one.paths.includes(path));
    const varied = axis?.values[axis.paths.indexOf(path)]?.some((value) => value !== 0) ?? false;
    const deflected = inputs.has(path) && inputs.get(path) !== 0;
    return { ...condition, flapsDown: deflected || varied };
  });
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
