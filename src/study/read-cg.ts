import { inputDefinition } from './inputs.ts';
import type { Reading } from './reading.ts';
import { keySpan, mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { CgChoices, CgKind } from './study.ts';

const cgKinds: readonly CgKind[] = ['percent_mac', 'station', 'behind_mac_leading_edge'];

function kindIn(map: SourceNode | undefined): CgKind | undefined {
  const word = wordIn(map, 'as');
  return cgKinds.find((kind) => kind === word);
}

/** Reads `aeroplane.cg` into the inputs; each end may have its own kind. */
export function readCg(map: SourceNode, reading: Reading): CgChoices {
  const common = kindIn(map);
  const forward = readEnd(map, 'forward', common, reading);
  const aft = readEnd(map, 'aft', common, reading);
  const heightGiven = reading.take(map, 'above_datum', 'cg.above_datum');
  return { forward, aft, heightGiven };
}

function readEnd(
  map: SourceNode,
  end: 'forward' | 'aft',
  common: CgKind | undefined,
  reading: Reading,
): CgKind {
  const own = mapIn(map, end);
  const kind = (own ? kindIn(own) : undefined) ?? common;
  const node = own ? valueIn(own, 'at') : valueIn(map, end);
  const path = `cg.${end}`;
  if (kind && node) reading.enter(path, node, inputDefinition(path, kind));
  else reading.inputs.set(path, Number.NaN);
  if (!own && node && !common && !valueIn(map, 'as')) {
    reading.faults.add(
      'MISSING_KEY',
      keySpan(map, end),
      'aeroplane.cg does not say how the centre of gravity is given.',
      'Add as: percent_mac, station or behind_mac_leading_edge.',
    );
  }
  return kind ?? 'percent_mac';
}
