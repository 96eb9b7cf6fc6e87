/**
 * What a propeller's slipstream does to the tail. Momentum theory of the ideal disc: far behind, the
 * stream runs at V(1 + 2a). Whether the tail lies in it is geometry; the swirl is left out.
 */
import { areaFractionBetween } from './planform.ts';

/** Dynamic pressure in the slipstream over the free stream's, (1 + 2a)² = 1 + 8T_c/π [-]; T_c [-]. Exact for the ideal disc. */
export function slipstreamPressureRatio(thrustCoefficient: number): number {
  return 1 + (8 * thrustCoefficient) / Math.PI;
}

/** Diameter of the contracted slipstream D √((1+a)/(1+2a)) [m]; D [m], inflow factor a [-]. Exact: the same air passes. */
export function slipstreamDiameter(diameter: number, inflow: number): number {
  return diameter * Math.sqrt((1 + inflow) / (1 + 2 * inflow));
}

/**
 * Part of the tail's area inside one slipstream [-].
 * @param slipstreamDiameter of `slipstreamDiameter` [m]
 * @param height             tail above (or below) the slipstream's axis [m]
 * @param offset             axis off the plane of symmetry, ≥ 0 [m]; 0 for a single propeller
 * @param tailSpan           b_t [m]
 * @param tailTaper          λ_t [-]
 * Exact for a round, straight slipstream and a flat tail. With several propellers add their parts; where
 * slipstreams overlap the sum is too much.
 */
export function immersedFraction(
  slipstreamDiameter: number,
  height: number,
  offset: number,
  tailSpan: number,
  tailTaper: number,
): number {
  const squared = (slipstreamDiameter / 2) ** 2 - height ** 2;
  if (!(squared > 0)) return 0;
  const halfWidth = Math.sqrt(squared);
  const semiSpan = tailSpan / 2;
  const outer = areaFromCentre((offset + halfWidth) / semiSpan, tailTaper);
  return outer - areaFromCentre((offset - halfWidth) / semiSpan, tailTaper);
}

/** Part of the tail's area from the plane of symmetry to a station over the semi-span [-], port negative, ±½ at most. */
function areaFromCentre(station: number, taper: number): number {
  return (Math.sign(station) * areaFractionBetween(0, Math.min(Math.abs(station), 1), taper)) / 2;
}

/**
 * Tail's mean dynamic-pressure ratio with power, η (1 − f + f r) [-].
 * @param powerOff      η without power: the wake of wing and body [-]
 * @param immersed      f, part of the tail in the slipstream [-]
 * @param pressureRatio r of `slipstreamPressureRatio` [-]
 * Ours: the slipstream has passed the same wing and body, so that the same loss applies to it.
 */
export function poweredPressureRatio(powerOff: number, immersed: number, pressureRatio: number): number {
  return powerOff * (1 - immersed + immersed * pressureRatio);
}

/**
 * Angle by which the slipstream is turned toward the shaft, over the angle of attack [-]:
 * dε_p/dα = [C_Nα/2 + 2a(1 + a)]/[(1 + a)(1 + 2a)] · dα_p/dα.
 * @param normalSlope    C_Nα on the disc, of `propellerNormalSlope` [1/rad]
 * @param inflow         a [-]
 * @param streamGradient dα_p/dα, as in `propellerLiftShare` [-]
 * Exact by momentum for the stream tube by itself (ours): the force square to the stream, normal force and
 * component of thrust, is the cross-momentum of the air that passes. C_Nα/2 without thrust, 1 for a
 * hovering disc, whose stream follows the shaft.
 */
export function slipstreamDownwashGradient(
  normalSlope: number,
  inflow: number,
  streamGradient: number,
): number {
  const crossForce = normalSlope / 2 + 2 * inflow * (1 + inflow);
  return (crossForce * streamGradient) / ((1 + inflow) * (1 + 2 * inflow));
}

/**
 * Tail's mean downwash gradient with power [-]: ε_α + ε_pα f r/(1 − f + f r), so that with
 * `poweredPressureRatio` each part of the tail counts by its own dynamic pressure.
 * @param wingDownwashGradient       ε_α, power off [-]
 * @param slipstreamDownwashGradient ε_pα of `slipstreamDownwashGradient` [-]
 * @param immersed                   f [-]
 * @param pressureRatio              r [-]
 * A stated assumption of ours: the wing neither straightens the slipstream nor is carried higher by it.
 * The first puts the neutral point too far forward, the second too far aft.
 */
export function poweredDownwashGradient(
  wingDownwashGradient: number,
  slipstreamDownwashGradient: number,
  immersed: number,
  pressureRatio: number,
): number {
  const weight = (immersed * pressureRatio) / (1 - immersed + immersed * pressureRatio);
  return wingDownwashGradient + weight * slipstreamDownwashGradient;
}
