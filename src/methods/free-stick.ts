/**
 * Stick free: the elevator floats where its hinge moment is nil. Symbols and signs as in trim.ts and
 * hinge-moment.ts; a pull on the stick is positive, as is a spring that pushes the trailing edge down.
 */

/**
 * Free-stick factor F = 1 − τ C_hα/C_hδ [-] on the tail's lift slope.
 * @param effectiveness   τ [-]
 * @param slopeByAngle    C_hα of the tail [1/rad]
 * @param slopeByElevator C_hδ of the tail, not 0 [1/rad]
 * Exact for linear parts. 1 for an elevator that does not float; below 0 an overbalanced tail.
 */
export function freeStickFactor(
  effectiveness: number,
  slopeByAngle: number,
  slopeByElevator: number,
): number {
  return 1 - (effectiveness * slopeByAngle) / slopeByElevator;
}

/**
 * Lift slope of the whole aeroplane with the stick free, C_Lα − (1 − F) a_ts [1/rad].
 * @param wholeSlope C_Lα, stick fixed [1/rad]
 * @param tailShare  a_ts = η a_t (S_t/S)(1 − ε_α), stick fixed [1/rad]
 * @param factor     F [-]
 * Exact for linear parts.
 */
export function stickFreeLiftSlope(wholeSlope: number, tailShare: number, factor: number): number {
  return wholeSlope - (1 - factor) * tailShare;
}

/**
 * How far freeing the stick moves the neutral point [-]: −(1 − F) a_ts (h_t − h_n)/C_Lα,free; forward
 * for F < 1.
 * @param neutralPoint h_n, stick fixed [-]
 * @param tailPosition h_t [-]
 * @param tailShare    a_ts, stick fixed [1/rad]
 * @param wholeSlope   C_Lα, stick fixed [1/rad]
 * @param factor       F [-]
 * Exact by shares for linear parts: h_n + this step is the neutral point with F a_ts in place of a_ts.
 */
export function stickFreeStep(
  neutralPoint: number,
  tailPosition: number,
  tailShare: number,
  wholeSlope: number,
  factor: number,
): number {
  const lost = (1 - factor) * tailShare;
  return (-lost * (tailPosition - neutralPoint)) / (wholeSlope - lost);
}

/**
 * Angle to which the free elevator floats, −(C_h0 + C_hα α_t + C_ht δ_t)/C_hδ [rad].
 * @param moment          C_h0, with the tab's C_ht δ_t and a spring's H/(η q S_e c_e) [-]
 * @param slopeByAngle    C_hα [1/rad]
 * @param tailAngle       α_t, of the tail to its own stream [rad]
 * @param slopeByElevator C_hδ [1/rad]
 * Exact for linear parts.
 */
export function floatAngle(
  moment: number,
  slopeByAngle: number,
  tailAngle: number,
  slopeByElevator: number,
): number {
  return -(moment + slopeByAngle * tailAngle) / slopeByElevator;
}

/**
 * Scale K of stick forces [m²], negative: G η S_e c_e C_hδ/(C_Lδ (h_t − h_n')). A margin (h − h_n') at the
 * wing loading W/S makes the stick force K (W/S)(h − h_n').
 * @param gearing         G, elevator angle over stick travel, > 0 [rad/m]
 * @param pressureRatio   η at the tail [-]
 * @param elevatorSize    S_e c_e, elevator's area times its chord, aft of the hinge [m³]
 * @param slopeByElevator C_hδ [1/rad]
 * @param elevatorSlope   C_Lδ [1/rad]
 * @param tailPosition    h_t [-]
 * @param stickFree       h_n', the neutral point with the stick free and no spring [-]
 * Exact for linear parts (ours): C_h/C_hδ is how far the elevator is held off its float angle, and that
 * obeys the law of the elevator to trim with h_n' for h_n.
 */
export function stickForceScale(
  gearing: number,
  pressureRatio: number,
  elevatorSize: number,
  slopeByElevator: number,
  elevatorSlope: number,
  tailPosition: number,
  stickFree: number,
): number {
  const held = slopeByElevator / (elevatorSlope * (tailPosition - stickFree));
  return gearing * pressureRatio * elevatorSize * held;
}

/**
 * Stick force at a speed, trimmed by a tab to nil at another [N]:
 * [K (W/S)(h − h_n') + G H](1 − V²/V_tr²); a pull below the trimmed speed.
 * @param scale           K of `stickForceScale` [m²]
 * @param wingLoading     W/S [N/m²]
 * @param centreOfGravity h [-]
 * @param stickFree       h_n' without spring [-]
 * @param springForce     G H: a spring's constant hinge moment, and a bobweight's at 1 g, times the gearing,
 *                        a force on the stick, forward positive; 0 for none [N]
 * @param speedRatio      V/V_tr [-]
 * Exact for linear parts, level flight, no friction, and couples that do not change with C_L.
 */
export function stickForce(
  scale: number,
  wingLoading: number,
  centreOfGravity: number,
  stickFree: number,
  springForce: number,
  speedRatio: number,
): number {
  const atRest = scale * wingLoading * (centreOfGravity - stickFree) + springForce;
  return atRest * (1 - speedRatio ** 2);
}

/**
 * Slope dP/dV of the stick force at the trimmed speed [N s/m], negative where stable:
 * −(2/V_tr)[K (W/S)(h − h_n') + G H]. Times 0.5144 it is per knot.
 * @param scale           K [m²]
 * @param wingLoading     W/S [N/m²]
 * @param centreOfGravity h [-]
 * @param stickFree       h_n' without spring [-]
 * @param springForce     as in `stickForce` [N]
 * @param trimmedSpeed    V_tr, > 0 [m/s]
 * Exact for linear parts.
 */
export function stickForceBySpeed(
  scale: number,
  wingLoading: number,
  centreOfGravity: number,
  stickFree: number,
  springForce: number,
  trimmedSpeed: number,
): number {
  const atRest = scale * wingLoading * (centreOfGravity - stickFree) + springForce;
  return (-2 * atRest) / trimmedSpeed;
}

/**
 * How far a spring, or a bobweight at 1 g, moves the stick-free neutral point aft [-]: −G H/(K W/S).
 * @param springForce as in `stickForce` [N]
 * @param scale       K [m²]
 * @param wingLoading W/S [N/m²]
 * Exact for linear parts: its hinge moment is constant, that of the air grows with V². It moves the point
 * of nil force by speed, not the manoeuvre point.
 */
export function springStep(springForce: number, scale: number, wingLoading: number): number {
  return -springForce / (scale * wingLoading);
}

/**
 * Forward limit by the stick force of flying away from the trimmed speed [-]: h_n' + (P/(1 − V²/V_tr²) − G H)/(K W/S).
 * @param forceLimit  P, pull positive, of the sign that V asks for [N]
 * @param speedRatio  V/V_tr, not 1 [-]
 * @param scale       K [m²]
 * @param wingLoading W/S [N/m²]
 * @param stickFree   h_n' without spring [-]
 * @param springForce as in `stickForce` [N]
 * Exact for linear parts: `stickForce` solved for h, K taken as it is at that CG.
 */
export function forwardLimitByStickForce(
  forceLimit: number,
  speedRatio: number,
  scale: number,
  wingLoading: number,
  stickFree: number,
  springForce: number,
): number {
  return stickFree + (forceLimit / (1 - speedRatio ** 2) - springForce) / (scale * wingLoading);
}
