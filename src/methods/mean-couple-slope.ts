/** Mean slopes of couples between two lift coefficients in level flight, where they don't grow in a straight line. */

/**
 * Mean slope of the thrust's moment from one lift coefficient to another at constant power [-]:
 * (C_m,T/C_L)(r + √r + 1)/(√r + 1), r = C_L2/C_L.
 * @param thrustMoment    C_m,T at C_L [-]
 * @param liftCoefficient C_L > 0 [-]
 * @param other           C_L2 ≥ 0 [-]
 * Exact for a constant propeller efficiency: (r^(3/2) − 1)/(r − 1) without its gap at r = 1, where it is 3/2.
 */
export function meanThrustSlopeAtPower(thrustMoment: number, liftCoefficient: number, other: number): number {
  const r = other / liftCoefficient;
  const root = Math.sqrt(r);
  return ((thrustMoment / liftCoefficient) * (r + root + 1)) / (root + 1);
}

/**
 * Mean slope of the couple by height, −Δh C_L/2 with Δh in proportion to C_L, from one lift coefficient to
 * another [-]: −Δh (1 + C_L2/C_L)/2.
 * @param shift           Δh, step of the neutral point by height at C_L [-]
 * @param liftCoefficient C_L > 0 [-]
 * @param other           C_L2 [-]
 * Exact for linear parts; as `verticalPositionMoment`.
 */
export function meanHeightSlope(shift: number, liftCoefficient: number, other: number): number {
  return (-shift * (1 + other / liftCoefficient)) / 2;
}
