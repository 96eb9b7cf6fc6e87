import { inputDefinition } from './inputs.ts';
import { heightsGiven } from './read-loading.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type MapNode, mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { CgChoices, CgKind, Study } from './study.ts';

const cgKinds: readonly CgKind[] = ['percent_mac', 'station', 'behind_mac_leading_edge'];

function kindIn(map: SourceNode | undefined): CgKind | undefined {
  const word = wordIn(map, 'as');
  return cgKinds.find((kind) => kind === word);
}

/**
 * Reads `aeroplane.cg` into the inputs; each end may have its own kind. With a loading the range
 * follows, as stations.
 */
export function readCg(aeroplane: SourceNode, loading: Study['loading'], reading: Reading): CgChoices {
  const map = mapIn(aeroplane, 'cg');
  if (!loading) return readStated(map ?? tellMissing(aeroplane, reading), reading);
  if (valueIn(aeroplane, 'cg')) {
    reading.faults.add(
      'CG_TWICE',
      keySpan(aeroplane, 'cg'),
      'aeroplane gives cg and loading; the loading settles the range of the centre of gravity.',
      'Keep one of the two.',
    );
  }
  return { forward: 'station', aft: 'station', heightGiven: heightsGiven(loading, reading) };
}

function tellMissing(aeroplane: SourceNode, reading: Reading): MapNode {
  if (!valueIn(aeroplane, 'cg')) {
    reading.faults.addBeside(
      'MISSING_KEY',
      firstOf(aeroplane),
      'aeroplane has no cg.',
      'Add cg: with the forward and aft end, or loading: with masses.',
    );
  }
  return { kind: 'map', entries: new Map(), span: firstOf(aeroplane) };
}

function readStated(map: SourceNode, reading: Reading): CgChoices {
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
