import type { LoadingChoices, Study } from '../study/study.ts';
import type { BaselinePlaces } from './body.ts';
import { Aboard } from './loading-items.ts';

/** The aeroplane at one moment of a loading case: mass [kg] and station of its CG [m]. */
export interface LoadingState {
  readonly mass: number;
  readonly station: number;
}

export interface LoadingPaths {
  /** With what is aboard in every case; NaN where that is nothing. */
  readonly empty: LoadingState;
  /** For each case its states from full to burnt down, at every break. */
  readonly cases: readonly (readonly LoadingState[])[];
}

/**
 * Loading cases of one combination, break by break.
 * @param figures every figure of the combination, SI
 */
export function loadingPaths(
  loading: LoadingChoices,
  body: Study['body'],
  places: BaselinePlaces,
  figures: ReadonlyMap<string, number>,
): LoadingPaths {
  const aboard = new Aboard(loading, body, places);
  aboard.read(
    aboard.reads.map((name) => Float64Array.of(figures.get(name) ?? Number.NaN)),
    0,
  );
  const stateWith = (items: readonly number[]): LoadingState => {
    const mass = items.reduce((sum, item) => sum + aboard.mass(item), aboard.emptyMass);
    const moment = items.reduce(
      (sum, item) => sum + aboard.mass(item) * aboard.station(item),
      aboard.emptyMoment,
    );
    return { mass, station: moment / mass };
  };
  const always = loading.items.flatMap((item, position) => (item.always ? [position] : []));
  return {
    empty: stateWith(always),
    cases: aboard.cases.map(({ aboard: items, burning }) =>
      Array.from({ length: burning.length + 1 }, (_, burnt) => {
        const gone = burning.subarray(0, burnt);
        return stateWith([...items].filter((item) => !gone.includes(item)));
      }),
    ),
  };
}
