import { offer } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import { NameList } from './read-names.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type MapEntry, mapIn, type SourceNode, valueIn, wordIn } from './source.ts';
import type { LoadingCase, LoadingChoices, LoadingItem } from './study.ts';

const mostEntries = 200;
const carriers = ['wing', 'tail', 'body'] as const;
type LoadingCarrier = (typeof carriers)[number];

/** Reads `aeroplane.loading` into the inputs; undefined where the study gives none. */
export function readLoading(aeroplane: SourceNode, reading: Reading): LoadingChoices | undefined {
  const loading = mapIn(aeroplane, 'loading');
  if (!loading) return undefined;
  const empty = readEmpty(mapIn(loading, 'empty'), reading);
  const entries = entriesOf(loading, 'items', reading);
  const read = entries.map(([name, entry], index) =>
    readItem(name, entry, index + 1, mapIn(aeroplane, 'body') !== undefined, reading),
  );
  const own = entriesOf(loading, 'cases', reading).map(([name, entry]) => ({
    name,
    items: readCase(
      name,
      entry,
      entries.map(([item]) => item),
      reading,
    ),
  }));
  reading.take(loading, 'at_most', 'loading.at_most');
  const named = new Set(own.flatMap((one) => one.items));
  const items = read.map((item, index) =>
    settleAlways(item, !named.has(index + 1), entries[index]![1], reading),
  );
  const aboard = items.flatMap((item, index) => (item.always ? [index + 1] : []));
  const cases = own.map(({ name, items: numbers }) => ({ name, items: [...aboard, ...numbers] }));
  tellHeightsLeftOut(entries.length, empty, reading);
  return { empty, items, cases };
}

function readEmpty(empty: SourceNode | undefined, reading: Reading): boolean {
  if (!empty) return false;
  for (const key of ['mass', 'station', 'height']) reading.take(empty, key, `loading.empty.${key}`);
  return true;
}

/** The named entries of `items` or `cases`, their names checked. */
function entriesOf(loading: SourceNode, key: 'items' | 'cases', reading: Reading): [string, MapEntry][] {
  const map = mapIn(loading, key);
  if (!map) return [];
  const entries = [...map.entries];
  const names = new NameList(key === 'items' ? 'items' : 'loading cases');
  for (const [name, entry] of entries) names.add(name, entry.key, reading);
  if (entries.length === 0) {
    const found = `loading.${key} is empty.`;
    reading.faults.add('MISSING_KEY', firstOf(map), found, 'Add at least one.');
  } else if (entries.length > mostEntries) {
    const found = `loading.${key} lists ${entries.length}; 1 to ${mostEntries} are possible.`;
    reading.faults.add('OUT_OF_RANGE', firstOf(map), found, 'Merge some.');
  }
  return entries;
}

function readItem(
  name: string,
  { key, value: map }: MapEntry,
  number: number,
  hasBody: boolean,
  reading: Reading,
): Omit<LoadingItem, 'always'> {
  const prefix = `loading.items[${number}]`;
  const word = wordIn(map, 'carried_by');
  const carrier = carriers.find((one) => one === word);
  const massAs = readItemMass(name, map, prefix, carrier, reading);
  for (const one of ['height', carrier ? 'at' : 'station']) reading.take(map, one, `${prefix}.${one}`);
  const [wanted, other] = carrier ? ['at', 'station'] : ['station', 'at'];
  if (map.kind === 'map' && !valueIn(map, wanted)) {
    const found = `loading.items.${name} has no ${wanted}${carrier ? `, a fraction of what carries it` : ''}.`;
    const remedy = carrier ? 'Add at: such as 40 %.' : 'Add station:, or carried_by: with at:.';
    reading.faults.addBeside('MISSING_KEY', key, found, remedy);
  }
  if (valueIn(map, other)) {
    const found = `loading.items.${name} gives ${other}, and ${carrier ? `is carried by the ${carrier}` : 'nothing carries it'}.`;
    const remedy = carrier ? 'Remove station or carried_by.' : 'Add carried_by:, or give a station.';
    reading.faults.add('OVERDETERMINED', keySpan(map, other), found, remedy);
  }
  if (carrier === 'body' && !hasBody) {
    const found = `loading.items.${name} is carried by the body, and the study says body: none.`;
    reading.faults.add('MISSING_KEY', keySpan(map, 'carried_by'), found, 'Give its station, or a body.');
  }
  const burns = valueIn(map, 'burns');
  return {
    name,
    massAs,
    carriedBy: carrier ?? 'station',
    burns: burns?.kind === 'scalar' && burns.value === true,
  };
}

/** The item's mass, or its mass per area of the wing or tail that carries it. */
function readItemMass(
  name: string,
  map: SourceNode,
  prefix: string,
  carrier: LoadingCarrier | undefined,
  reading: Reading,
): LoadingItem['massAs'] {
  if (!valueIn(map, 'mass_per_area')) {
    reading.take(map, 'mass', `${prefix}.mass`);
    if (map.kind === 'map' && !valueIn(map, 'mass')) {
      const where = `aeroplane.loading.items.${name}`;
      const keys = carrier === 'wing' || carrier === 'tail' ? 'mass: or mass_per_area:' : 'mass:';
      const remedy = `Add ${keys} to ${where}.`;
      reading.faults.addBeside('MISSING_KEY', firstOf(map), `${where} has no mass.`, remedy);
    }
    return 'mass';
  }
  checkMassPerArea(name, map, carrier, reading);
  if (valueIn(map, 'mass')) {
    const found = `loading.items.${name} gives mass and mass_per_area.`;
    reading.faults.add('OVERDETERMINED', keySpan(map, 'mass_per_area'), found, 'Keep one of them.');
    reading.take(map, 'mass', `${prefix}.mass`);
    return 'mass';
  }
  reading.take(map, 'mass_per_area', `${prefix}.mass_per_area`);
  return 'mass_per_area';
}

/** Whether there is an area that the mass per area can be multiplied with, and nothing burns. */
function checkMassPerArea(
  name: string,
  map: SourceNode,
  carrier: LoadingCarrier | undefined,
  reading: Reading,
): void {
  const item = `loading.items.${name}`;
  if (!valueIn(map, 'carried_by')) {
    const found = `${item} gives mass_per_area, and no wing or tail carries it.`;
    const remedy = 'Add carried_by: wing or tail with at:, or give its mass.';
    reading.faults.add('MISSING_KEY', keySpan(map, 'mass_per_area'), found, remedy);
  } else if (carrier === 'body') {
    const found = `${item} gives mass_per_area, and the body that carries it has no area to count.`;
    const remedy = 'Give its mass, or let wing or tail carry it.';
    reading.faults.add('UNKNOWN_WORD', valueIn(map, 'carried_by')!.span, found, remedy);
  }
  const burns = valueIn(map, 'burns');
  if (burns?.kind !== 'scalar' || burns.value !== true) return;
  const found = `${item} burns, and gives mass_per_area: what burns does not grow with the area.`;
  reading.faults.add('OVERDETERMINED', keySpan(map, 'burns'), found, 'Give its mass.');
}

/** Structure that moves with the geometry is part of the empty aeroplane; anything else must be loaded. */
function settleAlways(
  item: Omit<LoadingItem, 'always'>,
  inNoCase: boolean,
  { key }: MapEntry,
  reading: Reading,
): LoadingItem {
  if (inNoCase && (item.burns || item.carriedBy === 'station')) {
    const found = `No loading case carries '${item.name}'.`;
    const remedy = item.burns
      ? 'Name it in a case, or remove it.'
      : 'Name it in a case, or count it into empty.';
    reading.faults.add('ITEM_IN_NO_CASE', key, found, remedy);
  }
  return { ...item, always: inNoCase };
}

/** Numbers of the items that a case names, from 1. */
function readCase(
  name: string,
  { key, value: list }: MapEntry,
  known: readonly string[],
  reading: Reading,
): number[] {
  if (list.kind !== 'list') return [];
  if (list.items.length === 0) {
    const found = `The loading case ${name} carries nothing.`;
    reading.faults.add('MISSING_KEY', key, found, 'Name its items, or remove the case.');
  }
  const numbers: number[] = [];
  for (const item of list.items) {
    if (item.kind !== 'scalar' || typeof item.value !== 'string') continue;
    const number = known.indexOf(item.value) + 1;
    if (number === 0) {
      const found = `The loading case ${name} names '${shorten(item.value)}', which is not among the items.`;
      reading.faults.add('UNKNOWN_ITEM', item.span, found, offer(item.value, known));
    } else if (numbers.includes(number)) {
      const found = `The loading case ${name} names '${item.value}' twice.`;
      reading.faults.add('DUPLICATE_NAME', item.span, found, 'Keep one, and give its whole mass.');
    } else numbers.push(number);
  }
  return numbers;
}

/** Whether every mass has a height, so that the vertical position of the CG is known. */
export function heightsGiven(
  { items, empty }: Pick<LoadingChoices, 'items' | 'empty'>,
  reading: Reading,
): boolean {
  const { missing } = countHeights(items.length, empty, reading);
  return missing === 0;
}

function countHeights(items: number, empty: boolean, { inputs }: Reading) {
  const paths = Array.from({ length: items }, (_, index) => `loading.items[${index + 1}].height`);
  if (empty) paths.push('loading.empty.height');
  const given = paths.filter((path) => inputs.has(path)).length;
  return { given, missing: paths.length - given };
}

function tellHeightsLeftOut(items: number, empty: boolean, reading: Reading): void {
  const { given, missing } = countHeights(items, empty, reading);
  if (missing === 0) return;
  const source =
    given > 0
      ? `${missing} of ${given + missing} masses have no height: the vertical position is left out of the neutral point`
      : 'not given: the vertical position is left out of the neutral point';
  reading.assumptions.push({ path: 'loading', value: 'no height', source });
}

type NumberOf = (path: string) => number | undefined;

/** Areas that a mass per area is multiplied with [m²]; NaN where it is not known when the study is read. */
export interface CarrierAreas {
  readonly wing: number;
  readonly tail: number;
}

/** Mass of one item [kg]: NaN where its number has a fault, undefined where its area is not known. */
function itemMass(
  { massAs, carriedBy }: LoadingItem,
  number: number,
  areas: CarrierAreas,
  numberOf: NumberOf,
): number | undefined {
  const given = numberOf(`loading.items[${number}].${massAs}`) ?? Number.NaN;
  if (massAs === 'mass') return given;
  const area = areas[carriedBy === 'wing' ? 'wing' : 'tail'];
  return area > 0 ? given * area : undefined;
}

/** What is known of the mass of one case with all aboard [kg], and whether that is all of it. */
function caseMass(
  one: LoadingCase,
  { empty, items }: LoadingChoices,
  areas: CarrierAreas,
  numberOf: NumberOf,
): { readonly mass: number; readonly whole: boolean } {
  const start = empty ? (numberOf('loading.empty.mass') ?? Number.NaN) : 0;
  const masses = one.items.map((number) => itemMass(items[number - 1]!, number, areas, numberOf));
  return {
    mass: masses.reduce<number>((sum, mass) => sum + (mass ?? 0), start),
    whole: !masses.includes(undefined),
  };
}

/** A sum of masses misses its limit by rounding alone [kg]. */
const massTolerance = 1e-9;

/** What is wrong with the mass of one case, in words; undefined where nothing is. */
function massFault(
  one: LoadingCase,
  loading: LoadingChoices,
  areas: CarrierAreas,
  numberOf: NumberOf,
): string | undefined {
  const { mass, whole } = caseMass(one, loading, areas, numberOf);
  const most = numberOf('loading.at_most') ?? Number.POSITIVE_INFINITY;
  const kilograms = (value: number) => `${Number(value.toFixed(3))} kg`;
  if (mass <= 0 && whole) return `the loading case ${one.name} has no mass.`;
  if (!(mass > most + massTolerance)) return undefined;
  const least = whole ? '' : 'at least ';
  return `the loading case ${one.name} has a mass of ${least}${kilograms(mass)}, and at_most is ${kilograms(most)}.`;
}

/** The first case whose mass is impossible, in words. */
export function impossibleCase(
  loading: LoadingChoices,
  areas: CarrierAreas,
  numberOf: NumberOf,
): string | undefined {
  for (const one of loading.cases) {
    const fault = massFault(one, loading, areas, numberOf);
    if (fault) return fault;
  }
  return undefined;
}

/**
 * Cases heavier than the stated greatest mass, or without any mass, at the fixed values.
 * @param areas those of the fixed values
 */
export function checkCaseMasses(
  aeroplane: SourceNode,
  loading: LoadingChoices,
  areas: CarrierAreas,
  reading: Reading,
): void {
  const map = mapIn(mapIn(aeroplane, 'loading'), 'cases');
  for (const one of loading.cases) {
    const fault = massFault(one, loading, areas, (path) => reading.inputs.get(path));
    const entry = map?.entries.get(one.name);
    if (!fault || !entry) continue;
    const found = fault[0]!.toUpperCase() + fault.slice(1);
    reading.faults.add('OUT_OF_RANGE', entry.key, found, 'Change what it carries, or at_most.');
  }
}
