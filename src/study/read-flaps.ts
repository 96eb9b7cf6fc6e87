import type { Reading } from './reading.ts';
import { firstOf, keySpan, mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { FlapChoices } from './study.ts';

const sectionKeys = ['chord_fraction', 'span_from', 'span_to'] as const;
const incrementKeys = ['at', 'zero_lift_angle', 'moment', 'maximum_lift', 'downwash'] as const;
const neededIncrements = ['at', 'zero_lift_angle'] as const;

/** Reads `wing.flaps` into the inputs; undefined where the study gives none. */
export function readFlaps(wing: SourceNode, reading: Reading): FlapChoices | undefined {
  const flaps = mapIn(wing, 'flaps');
  if (!flaps) return undefined;
  const asSection = ['kind', ...sectionKeys].filter((key) => valueIn(flaps, key));
  const asIncrements = incrementKeys.filter((key) => valueIn(flaps, key));
  if (asSection.length > 0 && asIncrements.length > 0) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(flaps, asIncrements[0]!),
      `wing.flaps gives ${asIncrements[0]} beside ${asSection[0]}: the one settles what the other says.`,
      'Give kind, chord_fraction, span_from and span_to, or increments with at.',
    );
  }
  if (asIncrements.length > 0 && asSection.length === 0) return readIncrements(flaps, reading);
  needKeys(flaps, ['kind', ...sectionKeys], reading);
  for (const key of sectionKeys) reading.take(flaps, key, `wing.flaps.${key}`);
  checkSpan(flaps, reading);
  return { as: 'section', kind: wordIn(flaps, 'kind') === 'slotted' ? 'slotted' : 'plain' };
}

function readIncrements(flaps: SourceNode, reading: Reading): FlapChoices {
  needKeys(flaps, neededIncrements, reading);
  for (const key of incrementKeys) reading.take(flaps, key, `wing.flaps.${key}`);
  return { as: 'increments' };
}

function needKeys(flaps: SourceNode, keys: readonly string[], reading: Reading): void {
  for (const key of keys) {
    if (valueIn(flaps, key)) continue;
    reading.faults.addBeside('MISSING_KEY', firstOf(flaps), `wing.flaps has no ${key}.`, `Add ${key}:.`);
  }
}

function checkSpan(flaps: SourceNode, { inputs, faults }: Reading): void {
  const from = inputs.get('wing.flaps.span_from') ?? Number.NaN;
  const to = inputs.get('wing.flaps.span_to') ?? Number.NaN;
  if (!(from >= to)) return;
  const found = 'wing.flaps: span_from does not lie inboard of span_to.';
  faults.add('BAND_REVERSED', keySpan(flaps, 'span_from'), found, 'Swap the two ends.');
}
