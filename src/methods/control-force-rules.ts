/**
 * Control forces that an airworthiness regulation asks for or allows. The text is in pounds and
 * pounds-force; both are exact by definition (international pound of 1959, standard gravity).
 */

const pound = 0.45359237;
const standardGravity = 9.80665;
/** One pound-force [N]. */
export const poundForce = pound * standardGravity;

export type PitchControl = 'stick' | 'wheel';

/** 14 CFR 23.155(a) as in force until 2017, pounds-force; the weight in pounds is divided by `share`. */
const limitLoadForces = {
  stick: { share: 140, least: 15, most: 35 },
  wheel: { share: 100, least: 20, most: 50 },
} as const;

/**
 * Least elevator control force to reach the positive limit manoeuvring load factor [N]: for a stick W/140 or
 * 15 lbf, for a wheel W/100 or 20 lbf, whichever is greater, but it need not be more than 35 and 50 lbf.
 * @param mass greatest mass of the aeroplane [kg]
 * 14 CFR 23.155(a) as in force until 2017.
 */
export function leastLimitLoadForce(mass: number, control: PitchControl): number {
  const { share, least, most } = limitLoadForces[control];
  return Math.min(most, Math.max(least, mass / pound / share)) * poundForce;
}

/** 14 CFR 23.143(c) as in force until 2017, pounds-force; a wheel with both hands on its rim. */
const temporaryForces = { stick: 60, wheel: 75 } as const;

/**
 * Greatest pitch control force for a short time [N]: 60 lbf on a stick, 75 lbf on a wheel with two hands.
 * 14 CFR 23.143(c) as in force until 2017, which allows 50 lbf where one hand only is on the wheel.
 */
export function greatestTemporaryForce(control: PitchControl): number {
  return temporaryForces[control] * poundForce;
}
