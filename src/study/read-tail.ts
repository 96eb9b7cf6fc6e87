import { customaryDynamicPressureRatio } from '../methods/tail.ts';
import { readHinge } from './read-hinge.ts';
import { readMaximumLift, readSection } from './read-section.ts';
import { readSweep } from './read-wing.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type SourceNode, valueIn, wordIn } from './source.ts';
import type { HingeKind, TailChoices } from './study.ts';

/** The tail's three pairs; of each the study gives one. */
export const tailPairs = {
  size: ['area', 'volume'],
  place: ['arm', 'station'],
  planform: ['aspect_ratio', 'span'],
} as const;

const layouts: readonly TailChoices['layout'][] = ['conventional', 'mid', 'T', 'V'];
const customaryLayout = 'conventional';

export interface ReadTail {
  readonly tail: TailChoices;
  readonly hinge: HingeKind;
}

/** Reads `aeroplane.tail` into the inputs. */
export function readTail(map: SourceNode, reading: Reading): ReadTail {
  const layout = readLayout(map, reading);
  const allMoving = isTrue(valueIn(map, 'all_moving'));
  const size = readOneOf(map, tailPairs.size, reading);
  const place = readOneOf(map, tailPairs.place, reading);
  const planform = readOneOf(map, tailPairs.planform, reading);
  for (const key of ['taper', 'above_wing_root_chord', 'incidence']) reading.take(map, key, `tail.${key}`);
  const sweep = readSweep(map, 'tail', reading);
  readVAngle(map, layout, reading);
  readDynamicPressure(map, layout, reading);
  const hinge = readElevator(map, allMoving, reading);
  const section = readSection('tail', map, reading);
  readMaximumLift('tail', map, reading);
  const tail = { layout, allMoving, size, place, planform, sweep };
  return { hinge, tail: section === undefined ? tail : { ...tail, section } };
}

function isTrue(node: SourceNode | undefined): boolean {
  return node?.kind === 'scalar' && node.value === true;
}

function readLayout(map: SourceNode, reading: Reading): TailChoices['layout'] {
  const word = wordIn(map, 'layout');
  if (!valueIn(map, 'layout')) {
    reading.assumptions.push({
      path: 'tail.layout',
      value: customaryLayout,
      source: 'common practice, no source',
    });
  }
  return layouts.find((layout) => layout === word) ?? customaryLayout;
}

function readOneOf<Key extends string>(map: SourceNode, pair: readonly [Key, Key], reading: Reading): Key {
  const [first, second] = pair;
  const given = pair.filter((key) => valueIn(map, key));
  if (given.length === 2) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, second),
      `aeroplane.tail gives both ${first} and ${second}; one follows from the other.`,
      `Keep ${first} or ${second}.`,
    );
  } else if (given.length === 0) {
    reading.faults.addBeside(
      'UNDERDETERMINED',
      firstOf(map),
      `aeroplane.tail gives neither ${first} nor ${second}.`,
      `Add ${first}: or ${second}:.`,
    );
  }
  const key = given[0] ?? first;
  if (!reading.take(map, key, `tail.${key}`)) reading.inputs.set(`tail.${key}`, Number.NaN);
  return key;
}

function readVAngle(map: SourceNode, layout: TailChoices['layout'], reading: Reading): void {
  const given = valueIn(map, 'v_angle') !== undefined;
  if (layout === 'V') {
    if (reading.take(map, 'v_angle', 'tail.v_angle')) return;
    reading.inputs.set('tail.v_angle', Number.NaN);
    reading.faults.addBeside(
      'MISSING_KEY',
      keySpan(map, 'layout'),
      'A V-tail needs the angle of its panels.',
      'Add v_angle: the angle of each panel above the horizontal, such as 35 deg.',
    );
  } else if (given) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, 'v_angle'),
      `tail.v_angle belongs to a V-tail, and the layout is ${layout}.`,
      'Remove v_angle, or say layout: V.',
    );
  }
}

function readDynamicPressure(map: SourceNode, layout: TailChoices['layout'], reading: Reading): void {
  const path = 'tail.dynamic_pressure_ratio';
  if (reading.take(map, 'dynamic_pressure_ratio', path)) return;
  const source = `customary for ${layout === 'conventional' || layout === 'mid' ? `a ${layout} tail` : `a ${layout}-tail`}; common practice, no source`;
  reading.assume(path, customaryDynamicPressureRatio(layout), source, firstOf(map));
}

const travelKeys = ['up', 'down'] as const;
const hingedKeys = ['chord_fraction', 'span_fraction', 'effectiveness_ratio', 'area', 'chord'] as const;

function readElevator(map: SourceNode, allMoving: boolean, reading: Reading): HingeKind {
  const elevator = valueIn(map, 'elevator') ?? {
    kind: 'map' as const,
    entries: new Map(),
    span: firstOf(map),
  };
  for (const key of travelKeys) reading.take(elevator, key, `tail.elevator.${key}`);
  for (const key of hingedKeys) {
    if (!allMoving) reading.take(elevator, key, `tail.elevator.${key}`);
    else if (valueIn(elevator, key)) {
      reading.faults.add(
        'OVERDETERMINED',
        keySpan(elevator, key),
        `tail.elevator.${key} stands in an all-moving tail, which turns as a whole.`,
        `Remove ${key}, or say all_moving: false.`,
      );
    }
  }
  return readHinge(elevator, allMoving, reading);
}
