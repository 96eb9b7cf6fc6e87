import { bodyStationPlace } from '../methods/body-stations.ts';
import { loadingExtremes, loadingFigure, loadingFigureCount } from '../methods/loading.ts';
import type { LoadingChoices, LoadingItem, Study } from '../study/study.ts';
import type { BaselinePlaces } from './body.ts';
import type { Stage } from './stage.ts';

type LoadedStudy = Pick<Study, 'loading' | 'inputs' | 'body' | 'cg'>;

/**
 * Stages of a study that gives masses instead of a CG range: the CG's travel, the mass of the heaviest
 * case where the study gives none, and the height of its CG where every mass has a height. Structure
 * that grows with the geometry is an item `carried_by: wing` or `tail` whose mass is varied (or tied)
 * beside it; it moves with what carries it in any case.
 */
export function loadingStages(study: LoadedStudy, places: BaselinePlaces): Stage[] {
  const { loading } = study;
  if (loading === undefined) return [];
  return [
    travelStage(loading, study.body, places),
    ...(study.inputs.has('mass') ? [] : [massStage(loading)]),
    ...(study.cg.heightGiven ? [heightStage(loading)] : []),
  ];
}

/** Reads mass and one more number (a place or a height) of the empty aeroplane and of every item, one after the other. */
class ItemReader {
  readonly reads: readonly string[];
  /** Of the items in the file's order [kg]. */
  readonly masses: Float64Array;
  /** The other number of each item. */
  readonly others: Float64Array;
  emptyMass = 0;
  emptyOther = 0;
  private readonly first: number;

  constructor(
    private readonly loading: LoadingChoices,
    emptyOther: string,
    itemOther: (item: LoadingItem) => string,
  ) {
    const empty = loading.empty ? ['loading_empty_mass', `loading_empty_${emptyOther}`] : [];
    this.first = empty.length;
    this.reads = [
      ...empty,
      ...loading.items.flatMap((item, index) => {
        const figure = `loading_items_${index + 1}`;
        return [`${figure}_mass`, `${figure}_${itemOther(item)}`];
      }),
    ];
    this.masses = new Float64Array(loading.items.length);
    this.others = new Float64Array(loading.items.length);
  }

  read(inputs: readonly Float64Array[], row: number): void {
    const { masses, others, first } = this;
    if (this.loading.empty) {
      this.emptyMass = inputs[0][row];
      this.emptyOther = inputs[1][row];
    }
    for (let i = 0; i < masses.length; i++) {
      masses[i] = inputs[first + 2 * i][row];
      others[i] = inputs[first + 2 * i + 1][row];
    }
  }
}

/** Items aboard of one case, and those of them that burn in their order; positions from 0. */
interface CaseItems {
  readonly aboard: Int32Array;
  readonly burning: Int32Array;
}

function casesOf({ cases, items }: LoadingChoices): CaseItems[] {
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

/** Foremost and aftmost CG over all cases, at every break of what burns in them. */
function travelStage(loading: LoadingChoices, body: Study['body'], places: BaselinePlaces): Stage {
  const reader = new ItemReader(loading, 'station', (item) =>
    item.carriedBy === 'station' ? 'station' : 'at',
  );
  const cases = casesOf(loading);
  const carried = carrierIndices(loading.items);
  const used = carriers.filter((carrier) => loading.items.some((item) => item.carriedBy === carrier));
  const reads = [...reader.reads];
  const firstRead = carriers.map((carrier) => {
    if (!used.includes(carrier)) return -1;
    const first = reads.length;
    reads.push(...carrierReads(carrier, body));
    return first;
  });
  const [wing, tail, hull] = firstRead;
  const bodyEnd = bodyEndRule(body, places);
  const starts = new Float64Array(carriers.length);
  const lengths = new Float64Array(carriers.length);
  const changes = new Float64Array(loading.items.length);
  const stations = new Float64Array(loading.items.length);
  const extremes = new Float64Array(loadingFigureCount);

  /** Station and length of whatever carries items, in one row. */
  const readCarriers = (inputs: readonly Float64Array[], row: number) => {
    if (wing >= 0) {
      starts[0] = inputs[wing][row];
      lengths[0] = inputs[wing + 1][row];
    }
    if (tail >= 0) {
      lengths[1] = inputs[tail + 1][row];
      starts[1] = inputs[tail][row] - lengths[1] / 4;
    }
    if (hull >= 0) {
      starts[2] = inputs[hull][row];
      const end = bodyEnd(
        inputs[hull + 1][row],
        inputs[hull + 2][row],
        inputs[hull + 3][row],
        inputs[hull + 4][row],
      );
      lengths[2] = end - starts[2];
    }
  };
  const stationOf = (item: number) => {
    const carrier = carried[item];
    const place = reader.others[item];
    return carrier < 0 ? place : starts[carrier] + place * lengths[carrier];
  };
  const walk = ({ aboard, burning }: CaseItems) => {
    let mass = reader.emptyMass;
    let moment = reader.emptyMass * reader.emptyOther;
    for (let k = 0; k < aboard.length; k++) {
      mass += reader.masses[aboard[k]];
      moment += reader.masses[aboard[k]] * stationOf(aboard[k]);
    }
    for (let k = 0; k < burning.length; k++) {
      changes[k] = -reader.masses[burning[k]];
      stations[k] = stationOf(burning[k]);
    }
    loadingExtremes(mass, moment / mass, burning.length, changes, stations, extremes);
  };

  return {
    name: 'loading',
    reads,
    writes: ['cg_forward_station', 'cg_aft_station', 'cg_forward_case', 'cg_aft_case'],
    cost: 20 * cases.length + 5 * loading.items.length,
    kernel: (count, inputs, [forward, aft, forwardCase, aftCase]) => {
      for (let row = 0; row < count; row++) {
        reader.read(inputs, row);
        readCarriers(inputs, row);
        let foremost = Number.POSITIVE_INFINITY;
        let aftmost = Number.NEGATIVE_INFINITY;
        let foremostCase = 0;
        let aftmostCase = 0;
        // A case without a CG leaves the range unknown: NaN is never overtaken.
        for (let k = 0; k < cases.length && !Number.isNaN(foremost); k++) {
          walk(cases[k]);
          if (!(extremes[loadingFigure.foremost] >= foremost)) {
            foremost = extremes[loadingFigure.foremost];
            foremostCase = k;
          }
          if (!(extremes[loadingFigure.aftmost] <= aftmost)) {
            aftmost = extremes[loadingFigure.aftmost];
            aftmostCase = k;
          }
        }
        const unknown = Number.isNaN(foremost);
        forward[row] = unknown ? Number.NaN : foremost;
        aft[row] = unknown ? Number.NaN : aftmost;
        forwardCase[row] = unknown ? Number.NaN : foremostCase;
        aftCase[row] = unknown ? Number.NaN : aftmostCase;
      }
    },
  };
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

function fullMass({ emptyMass, masses }: ItemReader, { aboard }: CaseItems): number {
  let mass = emptyMass;
  for (let k = 0; k < aboard.length; k++) mass += masses[aboard[k]];
  return mass;
}

/** The case that is heaviest with all aboard; the first of equals. */
function heaviest(reader: ItemReader, cases: readonly CaseItems[]): number {
  let found = 0;
  let most = fullMass(reader, cases[0]);
  for (let k = 1; k < cases.length; k++) {
    const mass = fullMass(reader, cases[k]);
    if (mass > most) {
      most = mass;
      found = k;
    }
  }
  return found;
}

/** Mass of the heaviest case, for lift and for whatever else asks for the aeroplane's mass. */
function massStage(loading: LoadingChoices): Stage {
  // The other number is not needed; the mass read twice keeps the reader plain.
  const reader = new ItemReader(loading, 'mass', () => 'mass');
  const cases = casesOf(loading);
  return {
    name: 'mass of the heaviest case',
    reads: reader.reads,
    writes: ['mass'],
    cost: 10 * cases.length,
    kernel: (count, inputs, [mass]) => {
      for (let row = 0; row < count; row++) {
        reader.read(inputs, row);
        mass[row] = fullMass(reader, cases[heaviest(reader, cases)]);
      }
    },
  };
}

/** Height of the heaviest case's CG. */
function heightStage(loading: LoadingChoices): Stage {
  const reader = new ItemReader(loading, 'height', () => 'height');
  const cases = casesOf(loading);
  return {
    name: 'height of the CG',
    reads: reader.reads,
    writes: ['cg_above_datum'],
    cost: 15 * cases.length,
    kernel: (count, inputs, [height]) => {
      for (let row = 0; row < count; row++) {
        reader.read(inputs, row);
        const one = cases[heaviest(reader, cases)];
        let moment = reader.emptyMass * reader.emptyOther;
        for (let k = 0; k < one.aboard.length; k++) {
          moment += reader.masses[one.aboard[k]] * reader.others[one.aboard[k]];
        }
        height[row] = moment / fullMass(reader, one);
      }
    },
  };
}
