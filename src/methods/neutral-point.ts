/**
 * Neutral point by shares. h is a place as a fraction of the MAC aft of its leading edge [-], slopes are
 * per rad and refer to the wing's area S; nose-up moments are positive.
 *
 * h_n = (a_w h_w + a_ts h_t)/C_Lα − C_mα,body/C_Lα, exact for linear parts, is built up as
 * h_w + tail step + body step + vertical step, which add up to it exactly.
 */
import { quarterChord } from './planform.ts';

/**
 * The tail's share of the lift slope, η a_t (S_t/S)(1 − ε_α) [1/rad].
 * @param tailLiftSlope        a_t, referred to the tail's area (for a V-tail times cos²Γ) [1/rad]
 * @param dynamicPressureRatio η [-]
 * @param areaRatio            S_t/S [-]; with V = S_t l/(S c) in its place the result times −1 is C_mα,tail
 * @param downwashGradient     ε_α = dε/dα at the tail [-]
 * Exact for linear parts.
 */
export function tailLiftShare(
  tailLiftSlope: number,
  dynamicPressureRatio: number,
  areaRatio: number,
  downwashGradient: number,
): number {
  return dynamicPressureRatio * tailLiftSlope * areaRatio * (1 - downwashGradient);
}

/** Lift slope of the whole aeroplane C_Lα = a_w + tail share [1/rad]; a_w with the body's carry-over. Exact. */
export function wholeLiftSlope(wingLiftSlope: number, tailShare: number): number {
  return wingLiftSlope + tailShare;
}

/**
 * Where the tail's lift acts, h_t = ¼ + l/c + (h_ac,t − ¼) c_t/c [-].
 * @param arm                   l, wing quarter-MAC to tail quarter-MAC [m]
 * @param meanAerodynamicChord  c, of the wing, > 0 [m]
 * @param tailMac               c_t, MAC of the tail [m]
 * @param tailAerodynamicCentre h_ac,t, fraction of the tail's own MAC [-]
 * Exact.
 */
export function tailPosition(
  arm: number,
  meanAerodynamicChord: number,
  tailMac: number,
  tailAerodynamicCentre: number,
): number {
  return quarterChord + (arm + (tailAerodynamicCentre - quarterChord) * tailMac) / meanAerodynamicChord;
}

/**
 * How far the tail moves the neutral point aft of the wing's aerodynamic centre [-]:
 * a_ts (h_t − h_w)/C_Lα.
 * @param wingPosition h_w, the wing's aerodynamic centre [-]
 * @param tailPosition h_t [-]
 * @param tailShare    a_ts [1/rad]
 * @param wholeSlope   C_Lα of the whole aeroplane, > 0 [1/rad]
 * Exact for linear parts.
 */
export function tailStep(
  wingPosition: number,
  tailPosition: number,
  tailShare: number,
  wholeSlope: number,
): number {
  return (tailShare * (tailPosition - wingPosition)) / wholeSlope;
}

/**
 * How far a pure moment moves the neutral point, −C_mα/C_Lα [-]: a nose-up (positive) slope moves it forward.
 * @param momentSlope C_mα of the body, or of anything that makes a moment and no lift [1/rad]
 * @param wholeSlope  C_Lα of the whole aeroplane, > 0 [1/rad]
 * Exact for linear parts.
 */
export function bodyStep(momentSlope: number, wholeSlope: number): number {
  return -momentSlope / wholeSlope;
}

/**
 * How far the wing's height over the CG moves the neutral point [-]:
 * (z_w/c) C_L (2/a − 2/(π A e)). A low wing (z_w < 0) moves it forward; it is nil at C_L 0.
 * @param wingHeightOverChord z_w/c, the wing's aerodynamic centre above the CG, in MAC [-]
 * @param liftCoefficient     C_L [-]
 * @param wingLiftSlope       a, of the wing [1/rad]
 * @param aspectRatio         A [-]
 * @param spanEfficiency      e [-]
 * Exact for small angles from zero lift, wing alone, induced drag C_L²/(πAe) (our derivation: the
 * chordwise force C_D − C_L α acts at the height z_w). The tail's height and the change of share
 * between wing and whole are left out.
 */
export function verticalPositionShift(
  wingHeightOverChord: number,
  liftCoefficient: number,
  wingLiftSlope: number,
  aspectRatio: number,
  spanEfficiency: number,
): number {
  const tilt = 2 / wingLiftSlope - 2 / (Math.PI * aspectRatio * spanEfficiency);
  return wingHeightOverChord * liftCoefficient * tilt;
}

/**
 * What `verticalPositionShift` lacks when heights are measured square to a datum line rather than to the
 * line of nil lift [-]: (z_w/c) (α_0 − i_w). It does not change with C_L.
 * @param wingHeightOverChord z_w/c, the wing's aerodynamic centre above the CG square to the datum line, in MAC [-]
 * @param zeroLiftAngle       α_0 of the root chord, twist and flaps included, to the stream [rad]
 * @param incidence           i_w, root chord to the datum line [rad]
 * Exact for small angles, our derivation: the force along the datum line, C_D − C_L α_d with
 * α_d = C_L/a + α_0 − i_w, acts at the height z_w. On a high wing with camber and incidence it moves the
 * neutral point forward; leaving it out is on the unsafe side.
 */
export function datumLineShift(
  wingHeightOverChord: number,
  zeroLiftAngle: number,
  incidence: number,
): number {
  return wingHeightOverChord * (zeroLiftAngle - incidence);
}

/** Neutral point h_n [-], the sum of its build-up: wing aerodynamic centre and the steps by tail, body, height. Exact. */
export function neutralPoint(
  wingPosition: number,
  stepByTail: number,
  stepByBody: number,
  stepByHeight: number,
): number {
  return wingPosition + stepByTail + stepByBody + stepByHeight;
}

/** Static margin h_n − h [-] for a CG at h. Exact, a definition. */
export function staticMargin(neutralPoint: number, centreOfGravity: number): number {
  return neutralPoint - centreOfGravity;
}

/** Place as a fraction of the MAC [-] from a station, the station of the MAC's leading edge and the MAC, all [m]. Exact. */
export function fractionOfMac(station: number, macLeadingEdge: number, meanAerodynamicChord: number): number {
  return (station - macLeadingEdge) / meanAerodynamicChord;
}

/** Station [m] of a place given as a fraction of the MAC [-]; MAC's leading edge and MAC [m]. Exact. */
export function stationOfFraction(
  fraction: number,
  macLeadingEdge: number,
  meanAerodynamicChord: number,
): number {
  return macLeadingEdge + fraction * meanAerodynamicChord;
}

/**
 * Angle of attack of the wing's root chord at a lift coefficient [rad]: α_L0 + C_L/a + washout · 2y/b.
 * @param liftCoefficient      C_L carried by the wing [-]
 * @param wingLiftSlope        a [1/rad]
 * @param zeroLiftAngle        α_L0 of the section [rad]
 * @param washout              tip nose-down against the root, linear between, positive [rad]
 * @param macStationOverSemispan 2 y_MAC/b: the chord-weighted mean of a linear twist [-]
 * Ours: strip mean of the twist; one section along the whole span.
 */
export function rootAngleOfAttack(
  liftCoefficient: number,
  wingLiftSlope: number,
  zeroLiftAngle: number,
  washout: number,
  macStationOverSemispan: number,
): number {
  return zeroLiftAngle + liftCoefficient / wingLiftSlope + washout * macStationOverSemispan;
}
