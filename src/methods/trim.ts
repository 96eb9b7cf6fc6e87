/**
 * Trim: lift and pitching moment as two linear equations in angle of attack and elevator. h is a place as
 * a fraction of the MAC aft of its leading edge [-], slopes are per rad and refer to the wing's area S,
 * moments to S and c; nose-up moments, trailing-edge-down elevator and upward tail lift are positive.
 *
 * C_L = C_L0 + C_Lα α + C_Lδ δ and C_m = 0 about the CG h. A tail's lift acts at its own place h_t, a body's
 * moment is in the neutral point h_n, and what is left is one couple C_m0 that does not depend on the CG,
 * the moment at C_L 0 with the elevator straight. Hence in closed form, exactly,
 * δ = [C_m0 + (h − h_n) C_L]/[C_Lδ (h_t − h_n)].
 * Couples that change with C_L (thrust line, heights) are added to C_m0 at the C_L in question.
 */

/** Lift slope by elevator C_Lδ = η a_t (S_t/S) τ [1/rad]: a_t [1/rad], η, S_t/S and effectiveness τ [-]. Exact. */
export function elevatorLiftSlope(
  tailLiftSlope: number,
  dynamicPressureRatio: number,
  areaRatio: number,
  effectiveness: number,
): number {
  return dynamicPressureRatio * tailLiftSlope * areaRatio * effectiveness;
}

/**
 * Tail's lift on S when the wing carries none and the elevator is straight [-]:
 * η a_t (S_t/S)(α_0 + i_t − Δε), α_0 = α_L0 − i_w being the body's angle there.
 * @param tailLiftSlope        a_t [1/rad]
 * @param dynamicPressureRatio η [-]
 * @param areaRatio            S_t/S [-]
 * @param wingZeroLiftAngle    angle of the wing's root chord at nil wing lift, with flaps and twist [rad]
 * @param wingIncidence        i_w, root chord to body axis [rad]
 * @param tailIncidence        i_t, tail chord to body axis [rad]
 * @param extraDownwash        Δε that does not vanish with the wing's lift, of part-span flaps [rad]
 * Exact: with ε = ε_α (α + i_w − α_L0), that is ε_0 = −ε_α α_L0, the downwash is nil at nil wing lift.
 */
export function tailLiftAtWingZeroLift(
  tailLiftSlope: number,
  dynamicPressureRatio: number,
  areaRatio: number,
  wingZeroLiftAngle: number,
  wingIncidence: number,
  tailIncidence: number,
  extraDownwash: number,
): number {
  const angle = wingZeroLiftAngle - wingIncidence + tailIncidence - extraDownwash;
  return dynamicPressureRatio * tailLiftSlope * areaRatio * angle;
}

/**
 * Moment C_m0 of the whole aeroplane at C_L 0 with the elevator straight [-]: couples − C_Lt0 (h_t − h_n).
 * @param couples      at nil wing lift: wing (section, twist and sweep, flaps) and body, and thrust [-]
 * @param tailLift     C_Lt0 of `tailLiftAtWingZeroLift` [-]
 * @param tailPosition h_t [-]
 * @param neutralPoint h_n, stick fixed, by shares [-]
 * Exact for linear parts; a propeller's lift at nil wing lift is handled by a second call, as one more
 * 'tail' at h_p without couples, and added.
 */
export function zeroLiftMoment(
  couples: number,
  tailLift: number,
  tailPosition: number,
  neutralPoint: number,
): number {
  return couples - tailLift * (tailPosition - neutralPoint);
}

/**
 * Couple of the wing's height over the CG at C_L [-], the integral of `verticalPositionShift`, which is
 * linear in C_L: −shift C_L/2.
 * @param shift           neutral-point shift by height at that C_L [-]
 * @param liftCoefficient C_L [-]
 * Exact for what that function takes in. A neutral point used together with it must leave the shift out.
 */
export function verticalPositionMoment(shift: number, liftCoefficient: number): number {
  return (-shift * liftCoefficient) / 2;
}

/**
 * Elevator angle to trim δ = [C_m0 + (h − h_n) C_L]/[C_Lδ (h_t − h_n)] [rad].
 * @param liftCoefficient C_L of the whole aeroplane [-]
 * @param centreOfGravity h [-]
 * @param zeroLiftMoment  C_m0 of `zeroLiftMoment`, plus couples of thrust and heights at that C_L [-]
 * @param neutralPoint    h_n, without the step by height [-]
 * @param elevatorSlope   C_Lδ [1/rad]
 * @param tailPosition    h_t [-]
 * Exact for linear parts. At C_L 0 it does not depend on the CG.
 */
export function elevatorToTrim(
  liftCoefficient: number,
  centreOfGravity: number,
  zeroLiftMoment: number,
  neutralPoint: number,
  elevatorSlope: number,
  tailPosition: number,
): number {
  const moment = zeroLiftMoment + (centreOfGravity - neutralPoint) * liftCoefficient;
  return moment / (elevatorSlope * (tailPosition - neutralPoint));
}

/**
 * Slope dδ/dC_L = (h − h_n)/(C_Lδ (h_t − h_n)) of elevator against lift coefficient [rad].
 * @param centreOfGravity h [-]
 * @param neutralPoint    h_n [-]
 * @param elevatorSlope   C_Lδ [1/rad]
 * @param tailPosition    h_t [-]
 * @param coupleSlope     dC_m/dC_L of couples that change with C_L along level flight: thrust line
 *                        (`thrustMomentSlopeAtPower`) and height (−`verticalPositionShift`); 0 for none [-]
 * Exact. Negative: more up elevator to fly slower.
 */
export function elevatorSlopeToTrim(
  centreOfGravity: number,
  neutralPoint: number,
  elevatorSlope: number,
  tailPosition: number,
  coupleSlope: number,
): number {
  return (centreOfGravity - neutralPoint + coupleSlope) / (elevatorSlope * (tailPosition - neutralPoint));
}

/**
 * Slope dδ/dV of elevator against speed in level flight [rad s/m]: −(2 C_L/V) dδ/dC_L.
 * @param slopeToTrim     dδ/dC_L of `elevatorSlopeToTrim` [rad]
 * @param liftCoefficient C_L [-]
 * @param speed           V, > 0; the slope is per unit of that speed [m/s]
 * Exact: C_L V² is constant. Positive where a slower flight needs more up elevator.
 */
export function elevatorSlopeBySpeed(slopeToTrim: number, liftCoefficient: number, speed: number): number {
  return (-2 * liftCoefficient * slopeToTrim) / speed;
}

/**
 * Trim slope limit: the CG at which elevator against speed goes flat, h = h_n − dC_m/dC_L of the couples [-].
 * @param neutralPoint h_n, without the step by height [-]
 * @param coupleSlope  as in `elevatorSlopeToTrim` [-]
 * Exact for a dynamic pressure and downwash at the tail that stay as they are along the speed. A figure by
 * itself: it is the neutral point only where there is no thrust term.
 */
export function trimSlopeLimit(neutralPoint: number, coupleSlope: number): number {
  return neutralPoint - coupleSlope;
}

/**
 * Angle of attack of the wing's root chord from the wing's lift [rad]: α_L0 + C_Lw/a_w.
 * @param wingLift          C_Lw on S, what the tail and the propeller do not carry [-]
 * @param wingLiftSlope     a_w [1/rad]
 * @param wingZeroLiftAngle α_L0 of the root chord, with flaps and twist [rad]
 * Exact for linear parts.
 */
export function wingAngleOfAttack(
  wingLift: number,
  wingLiftSlope: number,
  wingZeroLiftAngle: number,
): number {
  return wingZeroLiftAngle + wingLift / wingLiftSlope;
}

/** Where `trimState` puts its answers. */
export const trimFigure = {
  /** α [rad] */
  angleOfAttack: 0,
  /** δ_e, trailing edge down positive [rad] */
  elevator: 1,
} as const;

/** Length that the `out` array of `trimState` needs. */
export const trimFigureCount = 2;

/**
 * Angle of attack and elevator for a lift coefficient and nil moment: the two linear equations
 * C_Lα α + C_Lδ δ = C_L − C_L0 and h_n C_Lα α + h_t C_Lδ δ = h C_L + M_0, written into `out`.
 * @param liftCoefficient C_L wanted [-]
 * @param centreOfGravity h [-]
 * @param liftAtZero      C_L0, lift at α 0 and δ 0 [-]
 * @param momentAtZero    M_0, moment about the MAC's leading edge at α 0 and δ 0, with all couples [-]
 * @param liftSlope       C_Lα of the whole aeroplane [1/rad]
 * @param neutralPoint    h_n, so that −h_n C_Lα is the moment slope about the MAC's leading edge [-]
 * @param elevatorSlope   C_Lδ [1/rad]
 * @param tailPosition    h_t [-]
 * @param out             at least `trimFigureCount` long
 * Exact (Cramer). Infinite where the neutral point is at the tail.
 */
export function trimState(
  liftCoefficient: number,
  centreOfGravity: number,
  liftAtZero: number,
  momentAtZero: number,
  liftSlope: number,
  neutralPoint: number,
  elevatorSlope: number,
  tailPosition: number,
  out: Float64Array,
): void {
  const lift = liftCoefficient - liftAtZero;
  const moment = centreOfGravity * liftCoefficient + momentAtZero;
  const determinant = liftSlope * elevatorSlope * (tailPosition - neutralPoint);
  out[trimFigure.angleOfAttack] = (elevatorSlope * (tailPosition * lift - moment)) / determinant;
  out[trimFigure.elevator] = (liftSlope * (moment - neutralPoint * lift)) / determinant;
}

/**
 * Place h_wb of the lift of wing, body and propeller without the tail [-]: h_w − C_mα,body/a_w for wing and
 * body; the CG at which they alone would be neutral.
 * @param wingPosition  h_w, the wing's aerodynamic centre [-]
 * @param bodySlope     C_mα,body [1/rad]
 * @param wingLiftSlope a_w with the body's carry-over [1/rad]
 * Exact for linear parts. A propeller joins by `shareStep`, and its lift C_Lp0 at nil wing lift joins the
 * couples by `zeroLiftMoment` about the place so found; 'wing lift' is then that of wing and propeller.
 */
export function wingBodyPosition(wingPosition: number, bodySlope: number, wingLiftSlope: number): number {
  return wingPosition - bodySlope / wingLiftSlope;
}

/**
 * Place h_wb of the lift of all but the tail, from the neutral point [-]: (h_n C_Lα − h_t a_ts)/(C_Lα − a_ts).
 * @param neutralPoint h_n, without the step by height [-]
 * @param wholeSlope   C_Lα [1/rad]
 * @param tailPosition h_t [-]
 * @param tailShare    a_ts, not C_Lα [1/rad]
 * Exact: the shares solved for the rest. A propeller's share and a measured correction of h_n are in it.
 */
export function restPosition(
  neutralPoint: number,
  wholeSlope: number,
  tailPosition: number,
  tailShare: number,
): number {
  return (neutralPoint * wholeSlope - tailPosition * tailShare) / (wholeSlope - tailShare);
}

/**
 * Lift on S that the tail carries at trim [-]: [couples + (h − h_wb) C_L]/(h_t − h_wb).
 * @param liftCoefficient C_L of the whole aeroplane [-]
 * @param centreOfGravity h [-]
 * @param couples         at nil wing lift, plus those of thrust and heights at that C_L [-]
 * @param restPosition    h_wb of `wingBodyPosition` [-]
 * @param tailPosition    h_t [-]
 * Exact: the balance of moments. However the tail makes it, by angle or elevator.
 */
export function tailLiftToTrim(
  liftCoefficient: number,
  centreOfGravity: number,
  couples: number,
  restPosition: number,
  tailPosition: number,
): number {
  const moment = couples + (centreOfGravity - restPosition) * liftCoefficient;
  return moment / (tailPosition - restPosition);
}

/** Tail's lift coefficient on its own area and dynamic pressure, C_Lt S/(η S_t) [-]: lift on S, η, S_t/S [-]. Exact. */
export function tailLiftCoefficient(
  tailLift: number,
  dynamicPressureRatio: number,
  areaRatio: number,
): number {
  return tailLift / (dynamicPressureRatio * areaRatio);
}
