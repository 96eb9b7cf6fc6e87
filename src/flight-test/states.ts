/** Points by flap and power state, and within a state by CG position. */
import type { FlownPoint } from './read-data.ts';

export interface FlownState {
  /** `flaps up, power idle` */
  readonly name: string;
  readonly idle: boolean;
  /** Undefined where the data say nothing of flaps. */
  readonly flapsDown?: boolean;
  readonly points: readonly FlownPoint[];
}

/** Words for a propeller that does not pull. */
const idleWords = ['idle', 'off', 'none', 'windmilling', 'glide', '0', '0 %'];
/** Words for flaps that are not deflected. */
const upWords = ['up', '0', '0°', '0 deg', 'retracted', 'none', 'clean'];

/** States in the order in which they are first flown. */
export function flownStates(points: readonly FlownPoint[]): FlownState[] {
  const states = new Map<string, FlownPoint[]>();
  for (const point of points) {
    const own = states.get(stateName(point));
    if (own === undefined) states.set(stateName(point), [point]);
    else own.push(point);
  }
  return [...states].map(([name, own]) => {
    const { flaps, power } = own[0]!;
    return {
      name,
      idle: idleWords.includes(power),
      ...(flaps === undefined ? {} : { flapsDown: !upWords.includes(flaps) }),
      points: own,
    };
  });
}

function stateName({ flaps, power }: FlownPoint): string {
  return flaps === undefined ? `power ${power}` : `flaps ${flaps}, power ${power}`;
}

/** CGs within this of the foremost of them count as one position: fuel burns while it is flown [-]. A choice of ours. */
export const sameCg = 0.01;

/** Points by CG position, from forward to aft. */
export function cgPositions(points: readonly FlownPoint[]): FlownPoint[][] {
  const positions: FlownPoint[][] = [];
  for (const point of points.toSorted((a, b) => a.cg - b.cg)) {
    const last = positions.at(-1);
    if (last !== undefined && point.cg - last[0]!.cg <= sameCg) last.push(point);
    else positions.push([point]);
  }
  return positions;
}
