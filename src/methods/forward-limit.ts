/**
 * Forward limits of the CG by control, each as a place h, a fraction of the MAC aft of its leading edge
 * [-]. The aeroplane's forward limit is the aftmost, that is the largest h, of them. Signs and symbols as
 * in trim.ts; lift coefficients on S.
 *
 * At the stall, C_L,max is either that of the wing (the wing stalls at its own lift, whatever the tail
 * does) or that of the trimmed whole aeroplane (as a stall speed gives it). The two limits differ by
 * 0.01–0.10 MAC (ours), hence two functions, named.
 */

/** Rolling friction μ of the main wheels on a hard runway [-]; 0.02–0.05. Common practice, no source. */
export const customaryRollingFriction = 0.03;

/**
 * Lift on S of the tail at a lift of the wing and an elevator angle [-]:
 * C_Lt0 + η a_t (S_t/S)(1 − ε_α) C_Lw/a_w + C_Lδ δ.
 * @param wingLift      C_Lw [-]
 * @param wingLiftSlope a_w, with the body's carry-over [1/rad]
 * @param atZeroLift    C_Lt0 of `tailLiftAtWingZeroLift` [-]
 * @param tailShare     η a_t (S_t/S)(1 − ε_α) [1/rad]
 * @param elevatorSlope C_Lδ, with its loss at large deflection [1/rad]
 * @param elevator      δ, up negative [rad]
 * Exact for linear parts.
 */
export function tailLiftAt(
  wingLift: number,
  wingLiftSlope: number,
  atZeroLift: number,
  tailShare: number,
  elevatorSlope: number,
  elevator: number,
): number {
  return atZeroLift + (tailShare * wingLift) / wingLiftSlope + elevatorSlope * elevator;
}

/** Greatest download of the tail as a lift on S, −C_Lt,max η S_t/S [-]: its greatest coefficient > 0, η, S_t/S [-]. Exact. */
export function tailDownload(
  maximumDownCoefficient: number,
  dynamicPressureRatio: number,
  areaRatio: number,
): number {
  return -maximumDownCoefficient * dynamicPressureRatio * areaRatio;
}

/**
 * Forward limit where the WING's lift is given [-]: (C_Lw h_wb + C_Lt h_t − couples)/(C_Lw + C_Lt).
 * @param wingLift     C_Lw, the wing's greatest [-]
 * @param tailLift     C_Lt, the least the tail can carry there: by elevator travel (`tailLiftAt` at full
 *                     up elevator) or by its own stall (`tailDownload`), whichever is greater [-]
 * @param couples      at nil wing lift, plus those of thrust and heights at that lift [-]
 * @param restPosition h_wb of `wingBodyPosition` [-]
 * @param tailPosition h_t [-]
 * Exact for linear parts.
 */
export function forwardLimitAtWingLift(
  wingLift: number,
  tailLift: number,
  couples: number,
  restPosition: number,
  tailPosition: number,
): number {
  return (wingLift * restPosition + tailLift * tailPosition - couples) / (wingLift + tailLift);
}

/**
 * Forward limit where the trimmed WHOLE's lift is given, by the lift the tail can carry [-]:
 * h_wb + [C_Lt (h_t − h_wb) − couples]/C_L.
 * @param wholeLift    C_L of the trimmed aeroplane, its greatest [-]
 * @param tailLift     C_Lt, the least the tail can carry (`tailDownload`) [-]
 * @param couples      as in `forwardLimitAtWingLift` [-]
 * @param restPosition h_wb [-]
 * @param tailPosition h_t [-]
 * Exact for linear parts.
 */
export function forwardLimitAtWholeLift(
  wholeLift: number,
  tailLift: number,
  couples: number,
  restPosition: number,
  tailPosition: number,
): number {
  return restPosition + (tailLift * (tailPosition - restPosition) - couples) / wholeLift;
}

/**
 * Forward limit where the trimmed WHOLE's lift is given, by elevator travel [-]:
 * h_n + [C_Lδ (h_t − h_n) δ − C_m0]/C_L.
 * @param wholeLift      C_L of the trimmed aeroplane, its greatest [-]
 * @param elevator       δ, full up, negative [rad]
 * @param zeroLiftMoment C_m0 with the couples of thrust and heights at that C_L [-]
 * @param neutralPoint   h_n, without the step by height [-]
 * @param elevatorSlope  C_Lδ, with its loss at large deflection [1/rad]
 * @param tailPosition   h_t [-]
 * Exact for linear parts: `elevatorToTrim` solved for h.
 */
export function forwardLimitByElevator(
  wholeLift: number,
  elevator: number,
  zeroLiftMoment: number,
  neutralPoint: number,
  elevatorSlope: number,
  tailPosition: number,
): number {
  const moment = elevatorSlope * (tailPosition - neutralPoint) * elevator - zeroLiftMoment;
  return neutralPoint + moment / wholeLift;
}

/**
 * Forward limit by lifting the nose wheel [-]: the CG at which the moment about the CG is nil with the
 * nose wheel just unloaded, the main wheels carrying what the lift does not.
 * (C_Lw h_wb + C_Lt h_t − couples + (C_W − C_Lw − C_Lt)(h_m + μ z/c))/C_W.
 * @param weight       C_W = m g/(q S) at the speed of rotation [-]
 * @param wingLift     C_Lw in the ground attitude, in ground effect [-]
 * @param tailLift     C_Lt, the least the tail can carry there [-]
 * @param couples      at nil wing lift, plus those of thrust (about the CG) and heights [-]
 * @param restPosition h_wb [-]
 * @param tailPosition h_t [-]
 * @param mainWheels   h_m, where the main wheels touch the ground [-]
 * @param frictionArm  μ z/c: rolling friction (0.02–0.05 on a hard runway, 0.08 and more on grass: common
 *                     practice, no source) times the CG's height over the ground, in MAC [-]
 * Exact for linear parts (ours): moments about the CG, in which the forces of acceleration vanish.
 * At C_W = C_Lw + C_Lt it is `forwardLimitAtWingLift`. A tail-wheel type has no such case.
 */
export function forwardLimitByNoseWheel(
  weight: number,
  wingLift: number,
  tailLift: number,
  couples: number,
  restPosition: number,
  tailPosition: number,
  mainWheels: number,
  frictionArm: number,
): number {
  const aerodynamic = wingLift * restPosition + tailLift * tailPosition - couples;
  const onWheels = weight - wingLift - tailLift;
  return (aerodynamic + onWheels * (mainWheels + frictionArm)) / weight;
}
