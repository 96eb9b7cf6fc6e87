import type { Reading } from './reading.ts';
import { mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { PropellerChoices } from './study.ts';

const keys = [
  'diameter',
  'blades',
  'blade_chord',
  'blade_angle',
  'station',
  'above_datum',
  'power',
  'efficiency',
  'tail_in_slipstream',
] as const;

/** Reads `aeroplane.propeller` into the inputs; undefined for `none`. */
export function readPropeller(aeroplane: SourceNode, reading: Reading): PropellerChoices | undefined {
  if (!valueIn(aeroplane, 'propeller')) {
    const source = 'not given; margins are then those without power';
    reading.assumptions.push({ path: 'propeller', value: 'none', source });
  }
  const propeller = mapIn(aeroplane, 'propeller');
  if (!propeller) return undefined;
  for (const key of keys) reading.take(propeller, key, `propeller.${key}`);
  return { place: wordIn(propeller, 'place') === 'pusher' ? 'pusher' : 'tractor' };
}
