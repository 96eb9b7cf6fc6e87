/**
 * Loading: centre of gravity of mass items, and its travel along a sequence. Masses in kg, stations in m
 * aft of the datum (heights likewise). Arrays hold one number an item.
 */

/**
 * Station of the common centre of gravity, Σ m x/Σ m [m].
 * @param count    items used, ≥ 1
 * @param masses   m [kg]
 * @param stations x, or heights for the height of the CG [m]
 * Exact. NaN where the masses add up to nil.
 */
export function centreOfMass(count: number, masses: Float64Array, stations: Float64Array): number {
  let mass = 0;
  let moment = 0;
  for (let i = 0; i < count; i++) {
    mass += masses[i];
    moment += masses[i] * stations[i];
  }
  return moment / mass;
}

/** Where `loadingExtremes` puts each figure in its `out` array. */
export const loadingFigure = {
  /** foremost CG met [m] */
  foremost: 0,
  /** mass there [kg] */
  massAtForemost: 1,
  /** steps done when it is met, 0 for the start [-] */
  stepAtForemost: 2,
  /** aftmost CG met [m] */
  aftmost: 3,
  massAtAftmost: 4,
  stepAtAftmost: 5,
  /** least and greatest mass met [kg] */
  leastMass: 6,
  greatestMass: 7,
} as const;

/** Length that the `out` array of `loadingExtremes` needs. */
export const loadingFigureCount = 8;

/**
 * Extremes of the CG along a sequence of steps, each of which adds or takes away one mass at its station,
 * written into `out` at the places of `loadingFigure`.
 * @param startMass    mass before the first step, > 0 [kg]
 * @param startStation its CG [m]
 * @param count        steps, ≥ 0
 * @param changes      mass of each step, added positive, taken away (fuel burnt, water dropped) negative [kg]
 * @param stations     where each step's mass sits [m]
 * @param out          at least `loadingFigureCount` long
 * Exact: while one mass comes or goes at a fixed station the CG moves one way only, so that the extremes
 * lie at the breaks. NaN from the step on at which nothing is left.
 */
export function loadingExtremes(
  startMass: number,
  startStation: number,
  count: number,
  changes: Float64Array,
  stations: Float64Array,
  out: Float64Array,
): void {
  let mass = startMass;
  let moment = startMass * startStation;
  out[loadingFigure.foremost] = startStation;
  out[loadingFigure.massAtForemost] = mass;
  out[loadingFigure.stepAtForemost] = 0;
  out[loadingFigure.aftmost] = startStation;
  out[loadingFigure.massAtAftmost] = mass;
  out[loadingFigure.stepAtAftmost] = 0;
  out[loadingFigure.leastMass] = mass;
  out[loadingFigure.greatestMass] = mass;
  // Walk from break to break and keep the extremes; a place that is not a number fails both comparisons.
  for (let i = 0; i < count; i++) {
    mass += changes[i];
    moment += changes[i] * stations[i];
    const place = mass > 0 ? moment / mass : Number.NaN;
    if (!(place >= out[loadingFigure.foremost])) {
      out[loadingFigure.foremost] = place;
      out[loadingFigure.massAtForemost] = mass;
      out[loadingFigure.stepAtForemost] = i + 1;
    }
    if (!(place <= out[loadingFigure.aftmost])) {
      out[loadingFigure.aftmost] = place;
      out[loadingFigure.massAtAftmost] = mass;
      out[loadingFigure.stepAtAftmost] = i + 1;
    }
    out[loadingFigure.leastMass] = Math.min(out[loadingFigure.leastMass], mass);
    out[loadingFigure.greatestMass] = Math.max(out[loadingFigure.greatestMass], mass);
    if (Number.isNaN(place)) return;
  }
}
