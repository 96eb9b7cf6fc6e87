/**
 * Hinge moments of an elevator by thin-aerofoil theory. C_h = H/(½ρV² S_e c_e), trailing-edge-down
 * positive, on the elevator's area and chord aft of the hinge; slopes per rad. E is the elevator's chord
 * over the section's, hinge at the elevator's nose, gap sealed; θ_h = arccos(2E − 1).
 *
 * Real elevators have less, and C_hα loses more than C_hδ (common practice, no source: 0.5–0.8 and 0.7–0.9
 * of theory for a round nose without balance). Hence two separate factors; one common factor would cancel
 * in the free-stick factor.
 */

/**
 * ∫ of the flat plate's load at unit incidence, moment about the hinge: over the chord squared
 * (π − θ_h)(cos θ_h − ½) + sin θ_h (1 − ½ cos θ_h). Exact.
 */
function plateIntegral(theta: number): number {
  const cosine = Math.cos(theta);
  return (Math.PI - theta) * (cosine - 1 / 2) + Math.sin(theta) * (1 - cosine / 2);
}

/**
 * Hinge-moment slope by angle of attack of the section, C_hα [1/rad], negative.
 * @param chordFraction E, above 0, to 1 [-]
 * @param factor        part of the theory's value that is reached [-]
 * Exact for the thin flat plate (times the factor); −π/2 at E 1, −(16/15)√E for small E. NaN outside 0…1.
 */
export function sectionHingeSlopeByAngle(chordFraction: number, factor: number): number {
  const theta = Math.acos(2 * chordFraction - 1);
  return (-factor * plateIntegral(theta)) / chordFraction ** 2;
}

/**
 * Hinge-moment slope by elevator angle of the section, C_hδ [1/rad], negative.
 * @param chordFraction E, above 0, to 1 [-]
 * @param factor        part of the theory's value that is reached [-]
 * Exact for the thin flat plate with flap (Glauert; closed form ours), times the factor; −π/2 at E 1,
 * −8/(3π) for small E. NaN outside 0…1.
 */
export function sectionHingeSlopeByElevator(chordFraction: number, factor: number): number {
  return sectionHingeSlopeByTab(chordFraction, chordFraction, factor);
}

/**
 * Hinge-moment slope of the elevator by a tab's angle, of the section, C_ht [1/rad], negative.
 * @param chordFraction E of the elevator, above 0, to 1 [-]
 * @param tabFraction   E_t of the tab, its chord over the SECTION's chord, above 0, to E [-]
 * @param factor        part of the theory's value that is reached [-]
 * Exact for the thin plate (closed form ours), times the factor. A tab along part of the elevator counts by
 * its part of ∫ c_e² dy. With E_t = E it is C_hδ. NaN outside 0…1.
 */
export function sectionHingeSlopeByTab(chordFraction: number, tabFraction: number, factor: number): number {
  const theta = Math.acos(2 * chordFraction - 1);
  const thetaTab = Math.acos(2 * tabFraction - 1);
  const cosine = Math.cos(theta);
  const cosineTab = Math.cos(thetaTab);
  const sineTab = Math.sin(thetaTab);
  const incidence = ((Math.PI - thetaTab) / Math.PI) * plateIntegral(theta);
  // The tab's own load has a logarithm at its hinge; where the hinges meet it counts for nothing.
  const gap = cosine - cosineTab;
  const log =
    gap === 0 ? 0 : Math.log(Math.abs(Math.sin((theta + thetaTab) / 2) / Math.sin((thetaTab - theta) / 2)));
  const bend = sineTab * ((2 * cosine - cosineTab) * (Math.PI - theta) + Math.sin(theta)) + gap * gap * log;
  return (-factor * (incidence + bend / (2 * Math.PI))) / chordFraction ** 2;
}

/** C_hα of the tail from the section's, C_hα a_t/a0 [1/rad]: slopes of tail and section [1/rad]. Exact for the elliptic tail. */
export function tailHingeSlopeByAngle(
  sectionSlopeByAngle: number,
  tailLiftSlope: number,
  sectionLiftSlope: number,
): number {
  return (sectionSlopeByAngle * tailLiftSlope) / sectionLiftSlope;
}

/**
 * C_hδ of the tail from the section's [1/rad]: C_hδ − C_hα τ (1 − a_t/a0). The elevator's lift makes an
 * induced angle of its own, which takes some of the hinge moment away.
 * @param sectionSlopeByElevator C_hδ of the section [1/rad]; with C_ht and the tab's τ the same holds
 * @param sectionSlopeByAngle    C_hα of the section [1/rad]
 * @param effectiveness          τ of the elevator [-]
 * @param tailLiftSlope          a_t [1/rad]
 * @param sectionLiftSlope       a0 of the tail's section [1/rad]
 * Exact for the elliptic tail in lifting-line theory; ours.
 */
export function tailHingeSlopeByElevator(
  sectionSlopeByElevator: number,
  sectionSlopeByAngle: number,
  effectiveness: number,
  tailLiftSlope: number,
  sectionLiftSlope: number,
): number {
  const induced = 1 - tailLiftSlope / sectionLiftSlope;
  return sectionSlopeByElevator - sectionSlopeByAngle * effectiveness * induced;
}

/**
 * C_hδ with a geared tab, C_hδ + k C_ht [1/rad]: a balance tab (k < 0) lightens, an anti-balance tab
 * (k > 0) makes heavier.
 * @param slopeByElevator C_hδ [1/rad]
 * @param slopeByTab      C_ht [1/rad]
 * @param gearing         k, tab angle to elevator over elevator angle [-]
 * Exact. The tab's lift is left out.
 */
export function gearedTabHingeSlope(slopeByElevator: number, slopeByTab: number, gearing: number): number {
  return slopeByElevator + gearing * slopeByTab;
}
