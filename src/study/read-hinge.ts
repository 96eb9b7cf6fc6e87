import type { Reading } from './reading.ts';
import { keySpan, mapIn, type SourceNode, valueIn } from './source.ts';
import type { HingeKind } from './study.ts';

const slopes = ['alpha', 'delta'] as const;
const factors = ['alpha_factor', 'delta_factor'] as const;
const pathOf = (key: string) => `tail.elevator.hinge.${key}`;

/**
 * Reads `tail.elevator.hinge` into the inputs.
 * @param elevator the elevator's map, empty where the study gives none
 */
export function readHinge(elevator: SourceNode, allMoving: boolean, reading: Reading): HingeKind {
  const nothing = { kind: 'map' as const, entries: new Map(), span: elevator.span };
  const hinge = mapIn(elevator, 'hinge') ?? { ...nothing, ...ownerOf(elevator) };
  return allMoving ? readAllMoving(hinge, reading) : readElevator(hinge, reading);
}

function ownerOf(node: SourceNode) {
  return node.kind === 'map' && node.owner ? { owner: node.owner } : {};
}

function readElevator(hinge: SourceNode, reading: Reading): HingeKind {
  const given = slopes.filter((key) => valueIn(hinge, key));
  const factor = factors.find((key) => valueIn(hinge, key));
  if (given.length > 0 && factor) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(hinge, factor),
      `tail.elevator.hinge gives ${factor} beside ${given.join(' and ')}.`,
      'Give alpha and delta, or factors on theory.',
    );
  }
  if (given.length === 0) {
    for (const key of factors) reading.take(hinge, key, pathOf(key));
    return 'theory';
  }
  for (const key of slopes) reading.take(hinge, key, pathOf(key));
  const missing = slopes.find((key) => !given.includes(key));
  if (missing) {
    reading.faults.addBeside(
      'MISSING_KEY',
      keySpan(hinge, given[0]!),
      `tail.elevator.hinge gives ${given[0]} without ${missing}; a free stick depends on both.`,
      `Add ${missing}:, or give factors on theory instead.`,
    );
  }
  return 'given';
}

/** A tail that turns as a whole has no theory to scale; without a tab its two slopes are one. */
function readAllMoving(hinge: SourceNode, reading: Reading): HingeKind {
  for (const key of factors) {
    if (!valueIn(hinge, key)) continue;
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(hinge, key),
      `tail.elevator.hinge.${key} stands in an all-moving tail, whose hinge moments no theory gives.`,
      'Give alpha, and delta for a tail with a geared tab.',
    );
  }
  const given = slopes.filter((key) => reading.take(hinge, key, pathOf(key)));
  if (given.includes('alpha') && !given.includes('delta')) {
    const source = 'an all-moving tail without a geared tab: both slopes are one';
    reading.assumptions.push({ path: pathOf('delta'), value: 'as alpha', source });
  } else if (given.includes('delta') && !given.includes('alpha')) {
    const found = 'tail.elevator.hinge gives delta without alpha.';
    reading.faults.addBeside('MISSING_KEY', keySpan(hinge, 'delta'), found, 'Add alpha:.');
  }
  return given.includes('alpha') ? 'given' : 'none';
}
