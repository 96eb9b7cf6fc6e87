/** Aerofoil section by thin-aerofoil theory. Angles in rad, lengths as fractions of the chord. */

/**
 * Flap effectiveness τ = dα_L0/dδ of a plain flap or elevator [-]: τ = 1 − (θ − sin θ)/π with
 * θ = arccos(2E − 1).
 * @param chordFraction E, flap chord over section chord, 0…1 [-]; 0 gives 0, 1 (all moving) gives 1
 * Exact in thin-aerofoil theory (Glauert): small angles, sealed gap, no viscosity. Real flaps reach
 * about 0.6–0.9 of it and less beyond 10–15° (common practice, no source): the caller multiplies by a
 * stated ratio. Outside 0…1 the result is NaN.
 */
export function flapEffectiveness(chordFraction: number): number {
  const theta = Math.acos(2 * chordFraction - 1);
  return 1 - (theta - Math.sin(theta)) / Math.PI;
}
