/** Horizontal tail: volume, V-tail, customary dynamic pressure. Lengths in m, areas in m², angles in rad. */

/**
 * Tail volume V = S_t l / (S c) [-].
 * @param tailArea             S_t, > 0 [m²]
 * @param arm                  l, wing quarter-MAC to tail quarter-MAC [m]
 * @param wingArea             S, > 0 [m²]
 * @param meanAerodynamicChord c, of the wing, > 0 [m]
 * Exact, a definition.
 */
export function tailVolume(
  tailArea: number,
  arm: number,
  wingArea: number,
  meanAerodynamicChord: number,
): number {
  return (tailArea * arm) / (wingArea * meanAerodynamicChord);
}

/**
 * Tail area S_t = V S c / l [m²].
 * @param volume               V, > 0 [-]
 * @param arm                  l, wing quarter-MAC to tail quarter-MAC, not 0 [m]
 * @param wingArea             S, > 0 [m²]
 * @param meanAerodynamicChord c, of the wing, > 0 [m]
 * Exact, a definition.
 */
export function areaFromVolume(
  volume: number,
  arm: number,
  wingArea: number,
  meanAerodynamicChord: number,
): number {
  return (volume * wingArea * meanAerodynamicChord) / arm;
}

/**
 * Factor cos²Γ on the lift slope of a V-tail in pitch [-], the slope and the area being those of the
 * panels laid flat: one cosine for the angle of attack each panel sees, one for the part of its force
 * that points up.
 * @param dihedral Γ, panel angle above the horizontal, 0…π/2 [rad]
 * Exact for small angles with the panels' influence on each other left out (NACA TR 823, from memory).
 */
export function vTailFactor(dihedral: number): number {
  return Math.cos(dihedral) ** 2;
}

export type TailLayout = 'conventional' | 'mid' | 'T' | 'V';

const dynamicPressureRatios: Readonly<Record<TailLayout, number>> = {
  conventional: 0.9,
  mid: 0.95,
  T: 1,
  V: 0.95,
};

/**
 * Customary ratio η of the tail's dynamic pressure to the free stream's [-]. Common practice, no
 * source: 0.85–0.90 in the wake of wing and body, 0.95 half way up, 1.0 for a T-tail; power off.
 */
export function customaryDynamicPressureRatio(layout: TailLayout): number {
  return dynamicPressureRatios[layout];
}
