/** Short estimates of a body's moment, beside Multhopp's strips in body.ts. */

/** K_f [1/rad] for the wing root's quarter chord at 10, 20 … 70 % of the body's length. */
const quickFactors = new Float64Array([0.115, 0.172, 0.344, 0.487, 0.688, 0.888, 1.146]);
const quickFrom = 0.1;
const quickTo = 0.7;
const quickStep = 0.1;

/**
 * Body moment slope by one factor, C_mα,body = K_f w² L/(S c) [1/rad], nose-up positive.
 * @param width                greatest body width w [m]
 * @param length               body length L [m]
 * @param area                 S [m²]
 * @param meanAerodynamicChord c [m]
 * @param rootQuarterChord     wing root's quarter chord aft of the nose, over the length [-]
 * Gilruth & White, NACA TR 711, from memory, unconfirmed; K_f linear between the table's points.
 * Table from 0.1 to 0.7 (`quickBodyMomentInRange`); outside K_f is held at the end.
 */
export function quickBodyMoment(
  width: number,
  length: number,
  area: number,
  meanAerodynamicChord: number,
  rootQuarterChord: number,
): number {
  const place = (Math.min(Math.max(rootQuarterChord, quickFrom), quickTo) - quickFrom) / quickStep;
  const index = Math.min(Math.floor(place), quickFactors.length - 2);
  const factor = quickFactors[index] + (place - index) * (quickFactors[index + 1] - quickFactors[index]);
  return (factor * width ** 2 * length) / (area * meanAerodynamicChord);
}

/** Whether the wing root's quarter chord over the body length lies in the table of `quickBodyMoment`. */
export function quickBodyMomentInRange(rootQuarterChord: number): boolean {
  return rootQuarterChord >= quickFrom && rootQuarterChord <= quickTo;
}

/** Below this eccentricity the exact form loses digits and its series 0.45 e² is as good. */
const roundEccentricity = 0.01;
const roundFactor = 0.45;

/**
 * Munk's apparent-mass factor k2 − k1 of a prolate spheroid [-], which multiplies the slender body's moment.
 * @param fineness length / diameter, ≥ 1 [-]; a sphere (and anything blunter) gives 0
 * Exact (Lamb's potential flow about the spheroid, as tabulated in Munk, NACA TR 184).
 */
export function munkApparentMass(fineness: number): number {
  const eccentricitySquared = Math.max(0, 1 - 1 / fineness ** 2);
  const e = Math.sqrt(eccentricitySquared);
  if (e < roundEccentricity) return roundFactor * eccentricitySquared;
  const log = Math.log((1 + e) / (1 - e));
  const alpha = ((2 * (1 - eccentricitySquared)) / e ** 3) * (log / 2 - e);
  const beta = 1 / eccentricitySquared - ((1 - eccentricitySquared) / (2 * e ** 3)) * log;
  return beta / (2 - beta) - alpha / (2 - alpha);
}
