import { bodyStationPlace } from '../methods/body-stations.ts';
import { loadingExtremes } from '../methods/loading.ts';
import type { LoadingChoices, LoadingItem, Study } from '../study/study.ts';
import type { BaselinePlaces } from './body.ts';

/** What a mass per area is multiplied with; an item with a mass of its own is given the area 1. */
const areaFigures = [undefined, 'wing_area', 'tail_area'] as const;

/** Index into `areaFigures` of each item. */
function areaIndices(items: readonly LoadingItem[]): Int8Array {
  return Int8Array.from(items, ({ massAs, carriedBy }) =>
    massAs === 'mass' ? 0 : areaFigures.indexOf(carriedBy === 'wing' ? 'wing_area' : 'tail_area'),
  );
}

/** Reads mass and one more number (a place or a height) of the empty aeroplane and of every item, one after the other. */
export class ItemReader {
  readonly reads: readonly string[];
  /** Of the items in the file's order [kg]. */
  readonly masses: Float64Array;
  /** The other number of each item. */
  readonly others: Float64Array;
  emptyMass = 0;
  emptyOther = 0;
  private readonly first: number;
  private readonly areaOf: Int8Array;
  /** Places of the areas among the inputs; −1 for one that is not read. */
  private readonly areaInputs: readonly number[];
  private readonly areas = new Float64Array(areaFigures.length).fill(1);

  constructor(
    private readonly loading: LoadingChoices,
    emptyOther: string,
    itemOther: (item: LoadingItem) => string,
  ) {
    const empty = loading.empty ? ['loading_empty_mass', `loading_empty_${emptyOther}`] : [];
    this.first = empty.length;
    const reads = [
      ...empty,
      ...loading.items.flatMap((item, index) => {
        const figure = `loading_items_${index + 1}`;
        return [`${figure}_${item.massAs}`, `${figure}_${itemOther(item)}`];
      }),
    ];
    this.areaOf = areaIndices(loading.items);
    this.areaInputs = areaFigures.map((figure, index) =>
      figure === undefined || !this.areaOf.includes(index) ? -1 : reads.push(figure) - 1,
    );
    this.reads = reads;
    this.masses = new Float64Array(loading.items.length);
    this.others = new Float64Array(loading.items.length);
  }

  read(inputs: readonly Float64Array[], row: number): void {
    const { masses, others, first, areaOf, areaInputs, areas } = this;
    if (this.loading.empty) {
      this.emptyMass = inputs[0][row];
      this.emptyOther = inputs[1][row];
    }
    for (let k = 0; k < areas.length; k++) {
      if (areaInputs[k] >= 0) areas[k] = inputs[areaInputs[k]][row];
    }
    for (let i = 0; i < masses.length; i++) {
      masses[i] = inputs[first + 2 * i][row] * areas[areaOf[i]];
      others[i] = inputs[first + 2 * i + 1][row];
    }
  }
}

/** Items aboard of one case, and those of them that burn in their order; positions from 0. */
export interface CaseItems {
  readonly aboard: Int32Array;
  readonly burning: Int32Array;
}

export function casesOf({ cases, items }: LoadingChoices): CaseItems[] {
  return cases.map((one) => {
    const aboard = one.items.map((number) => number - 1);
    return {
      aboard: Int32Array.from(aboard),
      burning: Int32Array.from(aboard.filter((position) => items[position].burns)),
    };
  });
}

/** What an item's `at` is a fraction of: a station to start from and a length. */
const carriers = ['wing', 'tail', 'body'] as const;
type Carrier = (typeof carriers)[number];

function carrierReads(carrier: Carrier, body: Study['body']): string[] {
  switch (carrier) {
    case 'wing':
      return ['mac_leading_edge', 'mac'];
    case 'tail':
      return ['tail_station', 'tail_mac'];
    case 'body':
      return [
        'body_stations_1_at',
        `body_stations_${body?.stations}_at`,
        'wing_root_leading_edge',
        'wing_root_chord',
        'tail_station',
      ];
  }
}

/** Kind of each item's place: an index into `carriers`, or −1 for a station. */
function carrierIndices(items: readonly LoadingItem[]): Int8Array {
  return Int8Array.from(items, ({ carriedBy }) =>
    carriedBy === 'station' ? -1 : carriers.indexOf(carriedBy),
  );
}

/** Masses and stations of everything aboard, in one row after the other. */
export class Aboard {
  readonly reads: readonly string[];
  readonly cases: readonly CaseItems[];
  private readonly items: ItemReader;
  private readonly carried: Int8Array;
  /** Places of the carriers' figures among the inputs; −1 for one that carries nothing. */
  private readonly first: readonly number[];
  private readonly bodyEnd: ReturnType<typeof bodyEndRule>;
  private readonly starts = new Float64Array(carriers.length);
  private readonly lengths = new Float64Array(carriers.length);
  private readonly changes: Float64Array;
  private readonly stations: Float64Array;

  constructor(loading: LoadingChoices, body: Study['body'], places: BaselinePlaces) {
    this.items = new ItemReader(loading, 'station', (item) =>
      item.carriedBy === 'station' ? 'station' : 'at',
    );
    this.cases = casesOf(loading);
    this.carried = carrierIndices(loading.items);
    const reads = [...this.items.reads];
    this.first = carriers.map((carrier) => {
      if (!loading.items.some((item) => item.carriedBy === carrier)) return -1;
      const first = reads.length;
      reads.push(...carrierReads(carrier, body));
      return first;
    });
    this.reads = reads;
    this.bodyEnd = bodyEndRule(body, places);
    this.changes = new Float64Array(loading.items.length);
    this.stations = new Float64Array(loading.items.length);
  }

  read(inputs: readonly Float64Array[], row: number): void {
    this.items.read(inputs, row);
    const { starts, lengths } = this;
    const [wing, tail, body] = this.first;
    if (wing >= 0) {
      starts[0] = inputs[wing][row];
      lengths[0] = inputs[wing + 1][row];
    }
    if (tail >= 0) {
      lengths[1] = inputs[tail + 1][row];
      starts[1] = inputs[tail][row] - lengths[1] / 4;
    }
    if (body >= 0) {
      starts[2] = inputs[body][row];
      const end = this.bodyEnd(
        inputs[body + 1][row],
        inputs[body + 2][row],
        inputs[body + 3][row],
        inputs[body + 4][row],
      );
      lengths[2] = end - starts[2];
    }
  }

  get emptyMass(): number {
    return this.items.emptyMass;
  }

  get emptyMoment(): number {
    return this.items.emptyMass * this.items.emptyOther;
  }

  mass(item: number): number {
    return this.items.masses[item];
  }

  station(item: number): number {
    const carrier = this.carried[item];
    const place = this.items.others[item];
    return carrier < 0 ? place : this.starts[carrier] + place * this.lengths[carrier];
  }

  /** Extremes of the CG while a case burns what it burns, as `loadingExtremes` writes them. */
  extremes({ aboard, burning }: CaseItems, out: Float64Array): void {
    let mass = this.emptyMass;
    let moment = this.emptyMoment;
    for (let k = 0; k < aboard.length; k++) {
      mass += this.mass(aboard[k]);
      moment += this.mass(aboard[k]) * this.station(aboard[k]);
    }
    for (let k = 0; k < burning.length; k++) {
      this.changes[k] = -this.mass(burning[k]);
      this.stations[k] = this.station(burning[k]);
    }
    loadingExtremes(mass, moment / mass, burning.length, this.changes, this.stations, out);
  }
}

/**
 * Station of the body's last end in a combination, by the rule that stretches the body. The nose keeps
 * its own station, so that a wing that is moved along the body leaves it where it is.
 */
function bodyEndRule(body: Study['body'], places: BaselinePlaces) {
  const boom = body?.boom ?? false;
  return (last: number, rootLeadingEdge: number, rootChord: number, tail: number): number => {
    const behind = last - places.rootLeadingEdge;
    const place = bodyStationPlace(
      behind,
      places.rootChord,
      places.tail - places.rootLeadingEdge,
      behind,
      rootChord,
      tail - rootLeadingEdge,
      boom,
    );
    return rootLeadingEdge + place;
  };
}
