/** Manoeuvre: pitch damping, manoeuvre points, elevator and stick force per g. Symbols as in trim.ts. */

/** K in the pitch damping, for the parts other than the tail, with a lifting-surface slope of the tail: 1.02–1.16 (ours); the middle. */
export const customaryDampingFactor = 1.1;

/**
 * Pitch damping C_mq = −2 K η a_t (S_t/S)(l/c)² [-], per unit of q c/(2V).
 * @param tailLiftSlope        a_t [1/rad]
 * @param dynamicPressureRatio η [-]
 * @param areaRatio            S_t/S [-]
 * @param armOverChord         l/c, from the CG to the tail; the tail arm serves [-]. (l/c)² is exactly
 *                             (h_t − h)(h_t − h_n), with the tail's lift by pitching in the balance
 * @param dampingFactor        K, `customaryDampingFactor`; about 1 with a formula's high tail slope [-]
 * The tail's part is exact for K 1.
 */
export function pitchDamping(
  tailLiftSlope: number,
  dynamicPressureRatio: number,
  areaRatio: number,
  armOverChord: number,
  dampingFactor: number,
): number {
  return -2 * dampingFactor * dynamicPressureRatio * tailLiftSlope * areaRatio * armOverChord ** 2;
}

/**
 * How far the manoeuvre point lies behind the neutral point [-]: −C_mq ρ S c/(4m).
 * @param pitchDamping         C_mq, negative [-]; for the stick-free point F times it
 * @param density              ρ [kg/m³]
 * @param area                 S [m²]
 * @param meanAerodynamicChord c [m]
 * @param mass                 m [kg]
 * Exact for the pull-up, with the lift by pitching left out. Least at the greatest height and mass.
 */
export function manoeuvreStep(
  pitchDamping: number,
  density: number,
  area: number,
  meanAerodynamicChord: number,
  mass: number,
): number {
  return (-pitchDamping * density * area * meanAerodynamicChord) / (4 * mass);
}

/**
 * Elevator angle per g, dδ/dn = C_L (h − h_m)/(C_Lδ (h_t − h_n)) [rad], negative where stable.
 * @param liftCoefficient C_L at 1 g at the speed and height [-]
 * @param centreOfGravity h [-]
 * @param manoeuvrePoint  h_m, stick fixed [-]
 * @param neutralPoint    h_n, stick fixed [-]
 * @param elevatorSlope   C_Lδ [1/rad]
 * @param tailPosition    h_t [-]
 * Exact for linear parts.
 */
export function elevatorPerG(
  liftCoefficient: number,
  centreOfGravity: number,
  manoeuvrePoint: number,
  neutralPoint: number,
  elevatorSlope: number,
  tailPosition: number,
): number {
  const moment = liftCoefficient * (centreOfGravity - manoeuvrePoint);
  return moment / (elevatorSlope * (tailPosition - neutralPoint));
}

/**
 * Stick force per g, dP/dn = K (W/S)(h − h_m') + G H_b [N], a pull positive; the same at every speed.
 * @param scale           K of `stickForceScale` in free-stick.ts [m²]
 * @param wingLoading     W/S [N/m²]
 * @param centreOfGravity h [-]
 * @param manoeuvrePoint  h_m', stick free [-]
 * @param bobweightForce  G H_b, a bobweight's hinge moment at 1 g times the gearing, forward positive; a
 *                        spring adds nothing [N]
 * Exact for linear parts.
 */
export function stickForcePerG(
  scale: number,
  wingLoading: number,
  centreOfGravity: number,
  manoeuvrePoint: number,
  bobweightForce: number,
): number {
  return scale * wingLoading * (centreOfGravity - manoeuvrePoint) + bobweightForce;
}

/**
 * CG at which the stick force per g has a given value [-]: h_m' + (dP/dn − G H_b)/(K W/S). With the greatest
 * force allowed it is a forward limit, with the least an aft limit.
 * @param forcePerG      dP/dn, pull positive [N]
 * @param scale          K [m²]
 * @param wingLoading    W/S [N/m²]
 * @param manoeuvrePoint h_m', stick free [-]
 * @param bobweightForce as in `stickForcePerG` [N]
 * Exact for linear parts: `stickForcePerG` solved for h.
 */
export function limitByForcePerG(
  forcePerG: number,
  scale: number,
  wingLoading: number,
  manoeuvrePoint: number,
  bobweightForce: number,
): number {
  return manoeuvrePoint + (forcePerG - bobweightForce) / (scale * wingLoading);
}
