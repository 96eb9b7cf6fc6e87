import { bodyMomentSlope, multhoppAft, multhoppForward } from '../methods/body.ts';
import { munkApparentMass, quickBodyMoment } from '../methods/body-estimates.ts';
import { bodyStationPlace, bodyWidthAt } from '../methods/body-stations.ts';
import { bodyZeroLiftMoment } from '../methods/zero-lift-moment.ts';
import type { Study } from '../study/study.ts';
import { nilStage } from './nil.ts';
import type { Stage } from './stage.ts';

/** Where wing and tail stand in the baseline; body stations move with respect to these [m]. */
export interface BaselinePlaces {
  readonly rootLeadingEdge: number;
  readonly rootChord: number;
  /** Tail's quarter-MAC. */
  readonly tail: number;
}

/** Distance from the wing root's trailing edge to the tail's quarter-MAC; empty where it is not positive. */
export const wakeLengthStage: Stage = {
  name: 'wake length',
  reads: ['wing_root_leading_edge', 'wing_root_chord', 'quarter_mac_station', 'tail_arm'],
  writes: ['wake_length'],
  cost: 3,
  kernel: (count, [leadingEdge, chord, quarter, arm], [length]) => {
    for (let row = 0; row < count; row++) {
      const behind = quarter[row] + arm[row] - leadingEdge[row] - chord[row];
      length[row] = behind > 0 ? behind : Number.NaN;
    }
  },
};

type BodyStudy = Pick<Study, 'body' | 'methods'>;

/** What of the body does not depend on the condition: its width at the wing, and the part in the downwash. */
export function bodyShapeStages({ body }: BodyStudy, places: BaselinePlaces): Stage[] {
  if (body === undefined) return [nilStage('no body', ['body_width_at_wing', 'body_moment_aft'])];
  const stations = new BodyReader(body);
  return [widthStage(stations, places), aftStage(stations, places)];
}

/** The body's moment slope in one condition. */
export function bodyMomentStages({ body, methods }: BodyStudy, places: BaselinePlaces): Stage[] {
  if (body === undefined) return [nilStage('no body moment', ['body_moment_forward', 'body_moment_slope'])];
  const stations = new BodyReader(body);
  const moment = methods.body_moment === 'multhopp' ? multhoppStage : quickStage(stations, places);
  return [forwardStage(stations, places), moment];
}

const readsPerStation = 2;

/** Reads the stations of the body out of a kernel's first inputs. */
class BodyReader {
  readonly reads: string[] = [];
  readonly at: Float64Array;
  readonly widths: Float64Array;
  readonly count: number;
  boomWidth = 0;
  private readonly boom: boolean;

  constructor(body: NonNullable<Study['body']>) {
    this.count = body.stations;
    this.at = new Float64Array(this.count);
    this.widths = new Float64Array(this.count);
    this.boom = body.boom;
    for (let i = 1; i <= this.count; i++)
      this.reads.push(`body_stations_${i}_at`, `body_stations_${i}_width`);
    if (this.boom) this.reads.push('body_boom_width');
  }

  /** Inputs that `read` takes from the front of the list. */
  get size(): number {
    return this.reads.length;
  }

  get hasBoom(): boolean {
    return this.boom;
  }

  /** @returns false when varied stations no longer run aft: such a body cannot be worked out */
  read(inputs: readonly Float64Array[], row: number): boolean {
    let ascending = true;
    for (let i = 0; i < this.count; i++) {
      this.at[i] = inputs[readsPerStation * i][row];
      this.widths[i] = inputs[readsPerStation * i + 1][row];
      if (i > 0 && !(this.at[i] > this.at[i - 1])) ascending = false;
    }
    if (this.boom) this.boomWidth = inputs[readsPerStation * this.count][row];
    return ascending;
  }
}

function widthStage(body: BodyReader, places: BaselinePlaces): Stage {
  const quarterChord = places.rootLeadingEdge + places.rootChord / 4;
  return {
    name: 'body width at the wing',
    reads: body.reads,
    writes: ['body_width_at_wing'],
    cost: 30,
    kernel: (count, inputs, [width]) => {
      for (let row = 0; row < count; row++) {
        if (!body.read(inputs, row)) {
          width[row] = Number.NaN;
          continue;
        }
        width[row] = bodyWidthAt(body.count, body.at, body.widths, quarterChord);
      }
    },
  };
}

function forwardStage(body: BodyReader, places: BaselinePlaces): Stage {
  const own = body.size;
  return {
    name: 'body ahead of the wing',
    reads: [...body.reads, 'wing_root_chord', 'wing_span', 'wing_area', 'wing_lift_slope'],
    writes: ['body_moment_forward'],
    cost: 600,
    kernel: (count, inputs, [forward]) => {
      const chord = inputs[own];
      const span = inputs[own + 1];
      const area = inputs[own + 2];
      const slope = inputs[own + 3];
      for (let row = 0; row < count; row++) {
        if (!body.read(inputs, row)) {
          forward[row] = Number.NaN;
          continue;
        }
        forward[row] = multhoppForward(
          body.count,
          body.at,
          body.widths,
          places.rootLeadingEdge,
          chord[row],
          span[row],
          area[row],
          slope[row],
        );
      }
    },
  };
}

function aftStage(body: BodyReader, places: BaselinePlaces): Stage {
  const own = body.size;
  const trailingEdge = places.rootLeadingEdge + places.rootChord;
  return {
    name: 'body aft of the wing',
    reads: [...body.reads, 'wake_length'],
    writes: ['body_moment_aft'],
    cost: 120,
    kernel: (count, inputs, [aft]) => {
      const wake = inputs[own];
      for (let row = 0; row < count; row++) {
        if (!body.read(inputs, row)) {
          aft[row] = Number.NaN;
          continue;
        }
        aft[row] = multhoppAft(
          body.count,
          body.at,
          body.widths,
          trailingEdge,
          places.tail,
          wake[row],
          body.boomWidth,
        );
      }
    },
  };
}

const multhoppStage: Stage = {
  name: 'body moment',
  reads: ['body_moment_forward', 'body_moment_aft', 'downwash_gradient', 'wing_area', 'mac'],
  writes: ['body_moment_slope'],
  cost: 5,
  kernel: (count, [forward, aft, downwash, area, mac], [slope]) => {
    for (let row = 0; row < count; row++) {
      slope[row] = bodyMomentSlope(forward[row], aft[row], downwash[row], area[row], mac[row]);
    }
  },
};

/** The one-factor estimate, with the body's length and the wing's place along it as they follow the tail. */
function quickStage(body: BodyReader, places: BaselinePlaces): Stage {
  const own = body.size;
  return {
    name: 'body moment, quick estimate',
    reads: [...body.reads, 'wing_root_chord', 'wake_length', 'wing_area', 'mac'],
    writes: ['body_moment_slope', 'body_wing_place'],
    cost: 60,
    kernel: (count, inputs, [slope, place]) => {
      const chord = inputs[own];
      const wake = inputs[own + 1];
      const area = inputs[own + 2];
      const mac = inputs[own + 3];
      for (let row = 0; row < count; row++) {
        if (!body.read(inputs, row)) {
          slope[row] = Number.NaN;
          place[row] = Number.NaN;
          continue;
        }
        const ahead = places.rootLeadingEdge - body.at[0];
        const last = body.at[body.count - 1] - places.rootLeadingEdge;
        const end = bodyStationPlace(
          last,
          places.rootChord,
          places.tail - places.rootLeadingEdge,
          last,
          chord[row],
          chord[row] + wake[row],
          body.hasBoom,
        );
        const length = ahead + end;
        place[row] = (ahead + chord[row] / 4) / length;
        slope[row] = quickBodyMoment(greatest(body.widths), length, area[row], mac[row], place[row]);
      }
    },
  };
}

/**
 * Couple of the body at nil wing lift over its angle there [1/rad]: no camber of its centre line, apparent
 * mass by length over greatest width. A boom counts with its own width.
 */
export function bodyCoupleStage({ body }: BodyStudy, places: BaselinePlaces): Stage {
  if (body === undefined) return nilStage('no couple of the body', ['body_couple_slope']);
  const reader = new BodyReader(body);
  const own = reader.size;
  const [stations, widths, cambers] = [0, 1, 2].map(() => new Float64Array(reader.count + 2));
  const unitAngle = 1;
  return {
    name: 'couple of the body',
    reads: [...reader.reads, 'wing_root_chord', 'wake_length', 'wing_area', 'mac'],
    writes: ['body_couple_slope'],
    cost: 100 + 20 * reader.count,
    kernel: (count, inputs, [couple]) => {
      const [chord, wake, area, mac] = inputs.slice(own);
      for (let row = 0; row < count; row++) {
        if (!reader.read(inputs, row)) {
          couple[row] = Number.NaN;
          continue;
        }
        const tail = chord[row] + wake[row];
        const used = placeStations(reader, places, chord[row], tail, stations, widths);
        const length = stations[used - 1] - stations[0];
        const apparentMass = munkApparentMass(length / greatest(reader.widths));
        couple[row] = bodyZeroLiftMoment(
          used,
          stations,
          widths,
          cambers,
          unitAngle,
          apparentMass,
          area[row],
          mac[row],
        );
      }
    },
  };
}

/** Puts the stations where they go in a combination, a boom's two ends behind them; returns how many. */
function placeStations(
  body: BodyReader,
  { rootLeadingEdge, rootChord, tail: baselineTail }: BaselinePlaces,
  chord: number,
  tail: number,
  stations: Float64Array,
  widths: Float64Array,
): number {
  const last = body.at[body.count - 1] - rootLeadingEdge;
  for (let i = 0; i < body.count; i++) {
    const x = body.at[i] - rootLeadingEdge;
    stations[i] = bodyStationPlace(
      x,
      rootChord,
      baselineTail - rootLeadingEdge,
      last,
      chord,
      tail,
      body.hasBoom,
    );
    widths[i] = body.widths[i];
  }
  if (!body.hasBoom) return body.count;
  stations[body.count] = stations[body.count - 1];
  widths[body.count] = body.boomWidth;
  stations[body.count + 1] = tail;
  widths[body.count + 1] = body.boomWidth;
  return body.count + 2;
}

function greatest(values: Float64Array): number {
  let most = 0;
  for (let i = 0; i < values.length; i++) if (values[i] > most) most = values[i];
  return most;
}
