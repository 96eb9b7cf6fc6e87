import type { Reading } from './reading.ts';
import { keySpan, type ListNode, mapIn, type SourceNode, valueIn } from './source.ts';
import type { BodyChoices } from './study.ts';

/** The nose and the end. */
export const fewestStations = 2;
const mostStations = 200;

/** Reads `aeroplane.body` into the inputs; undefined for `none`. */
export function readBody(aeroplane: SourceNode, reading: Reading): BodyChoices | undefined {
  const body = mapIn(aeroplane, 'body');
  if (!body) return undefined;
  const list = valueIn(body, 'stations');
  const stations = list?.kind === 'list' ? list : undefined;
  if (stations) readStations(stations, reading);
  const boom = mapIn(body, 'boom');
  if (boom) for (const key of ['width', 'depth']) reading.take(boom, key, `body.boom.${key}`);
  return { stations: stations?.items.length ?? 0, boom: boom !== undefined };
}

function readStations(stations: ListNode, reading: Reading): void {
  const count = stations.items.length;
  if (count < fewestStations || count > mostStations) {
    reading.faults.add(
      'OUT_OF_RANGE',
      stations.span,
      `body.stations lists ${count}; ${fewestStations} to ${mostStations} are possible.`,
      count < fewestStations ? 'Give at least the nose and the end of the body.' : 'Leave some out.',
    );
  }
  let last = Number.NEGATIVE_INFINITY;
  stations.items.forEach((station, index) => {
    const prefix = `body.stations[${index + 1}]`;
    for (const key of ['at', 'width', 'depth']) reading.take(station, key, `${prefix}.${key}`);
    const at = reading.inputs.get(`${prefix}.at`) ?? Number.NaN;
    if (at <= last) tellNotAscending(station, index + 1, reading);
    if (!Number.isNaN(at)) last = Math.max(last, at);
  });
}

function tellNotAscending(station: SourceNode, number: number, reading: Reading): void {
  reading.faults.add(
    'STATIONS_NOT_ASCENDING',
    valueIn(station, 'at')?.span ?? keySpan(station, 'at'),
    `body.stations[${number}] does not lie aft of the station before it.`,
    'List the stations from the nose aft.',
  );
}
