/**
 * Propeller: thrust, normal force and thrust-line moment. Angles in rad, forces in N, slopes per rad
 * referred to the wing's area S; nose-up moments positive. What the slipstream does to the tail:
 * slipstream.ts.
 *
 * Thrust coefficient T_c = T/(ρ V² D²); inflow factor a, the disc's axial velocity being V(1 + a) and
 * the slipstream's V(1 + 2a) by momentum theory.
 */
import { polhamusLiftSlope } from './lift-slope.ts';

/** Place along the blade to which chord and pitch refer, over the radius [-]. */
const bladeStation = 0.75;

/** Where the working part of a blade begins, over the radius [-]. Common practice, no source: spinner and shank. */
const bladeRootStation = 0.2;

/** Aspect ratio of the fin that stands for the blades: Ribner's rule, NACA TR 820, from memory. */
const finAspectRatio = 8;

/** Spinner factor k_s on the normal force: Ribner, NACA TR 820, from memory; 1.10–1.16 for usual spinners. */
export const customarySpinnerFactor = 1.14;

/**
 * T_c at idle, the propeller windmilling [-]. A choice of ours: a drag of 0.05 on the disc's area; −0.05…0
 * is met. Below nil because an idling propeller brakes; a study without it may state 0.
 */
export const idleThrustCoefficient = -0.02;

/** Blade chord at 0.75 R [m] from the solidity there σ = B c_b/(2π·0.75 R) [-], blade count and diameter [m]. Exact. */
export function bladeChordFromSolidity(solidity: number, blades: number, diameter: number): number {
  return (solidity * Math.PI * bladeStation * diameter) / blades;
}

/**
 * Side area of the blades that counts as a fin [m²]: (B/2) ∫ c_b sin β dr from 0.2 R to the tip.
 * @param blades     B, ≥ 2 [-]
 * @param bladeChord c_b at 0.75 R, taken along the whole blade [m]
 * @param diameter   D [m]
 * @param bladeAngle β at 0.75 R [rad]
 * Ours, after Ribner's rule (NACA TR 820, from memory): the helix r tan β is constant, and the half is the
 * mean of cos² over a turn, once for the stream along the blade's flat side, once for the part of its
 * force in one direction. Exact for three blades and more; for two it is the mean of a turn.
 */
export function bladeSideArea(
  blades: number,
  bladeChord: number,
  diameter: number,
  bladeAngle: number,
): number {
  const k = bladeStation * Math.tan(bladeAngle);
  // ∫ sin β d(r/R) with sin β = k/√(k² + (r/R)²).
  const mean = k * (Math.asinh(1 / k) - Math.asinh(bladeRootStation / k));
  return (blades / 2) * bladeChord * (diameter / 2) * mean;
}

/** Area of the disc πD²/4 [m²]; diameter [m]. Exact. */
export function discArea(diameter: number): number {
  return (Math.PI / 4) * diameter ** 2;
}

/** T_c = T/(ρ V² D²) [-] from thrust [N], density [kg/m³], true speed > 0 [m/s], diameter [m]. A definition. */
export function thrustCoefficient(thrust: number, density: number, speed: number, diameter: number): number {
  return thrust / (density * speed ** 2 * diameter ** 2);
}

/** Thrust coefficient on the wing, C_T = T/(½ρV² S) = 2 T_c D²/S [-]; T_c [-], diameter [m], S [m²]. Exact. */
export function thrustOnWing(thrustCoefficient: number, diameter: number, area: number): number {
  return (2 * thrustCoefficient * diameter ** 2) / area;
}

/**
 * Thrust T = η_p P/V [N].
 * @param power      P at the shaft [W]
 * @param efficiency η_p [-]
 * @param speed      V, true, > 0 [m/s]
 * Exact, a definition. Without limit as V goes to 0: near rest use `thrustAtLowSpeed`.
 */
export function thrustFromPower(power: number, efficiency: number, speed: number): number {
  return (efficiency * power) / speed;
}

const lowSpeedIterations = 60;
const lowSpeedTolerance = 1e-12;

/**
 * Thrust of a disc to which a part of the power goes as useful and induced power, T (V + v) = κ P [N];
 * finite at rest.
 * @param power    P at the shaft, ≥ 0 [W]
 * @param fraction κ, what is left after the blades' own drag, about 0.85 (common practice, no source) [-]
 * @param speed    V, true, ≥ 0 [m/s]
 * @param density  ρ [kg/m³]
 * @param diameter D [m]
 * Momentum theory (exact for the ideal disc): T = 2ρ S_p v (V + v), the cubic 2ρ S_p v (V + v)² = κ P
 * by Newton's rule from above. Power is taken as constant; a fixed-pitch propeller gives less near rest.
 */
export function thrustAtLowSpeed(
  power: number,
  fraction: number,
  speed: number,
  density: number,
  diameter: number,
): number {
  const given = (fraction * power) / (2 * density * discArea(diameter));
  if (!(given > 0)) return 0;
  let v = Math.cbrt(given);
  // The cubic is convex and rising, so that each step from above stays above and comes nearer.
  for (let i = 0; i < lowSpeedIterations; i++) {
    const sum = speed + v;
    const step = (v * sum * sum - given) / (sum * (sum + 2 * v));
    v -= step;
    if (step <= lowSpeedTolerance * v) break;
  }
  return 2 * density * discArea(diameter) * v * (speed + v);
}

/**
 * Inflow factor a = ½(√(1 + 8T_c/π) − 1) [-].
 * @param thrustCoefficient T_c [-]; windmilling is negative
 * Momentum theory, exact for the ideal disc. Range `inflowInRange`; below T_c −π/8 NaN.
 */
export function inflowFactor(thrustCoefficient: number): number {
  return (Math.sqrt(1 + (8 * thrustCoefficient) / Math.PI) - 1) / 2;
}

/** Least inflow factor at which a windmill's momentum theory holds: −1/3, Betz's optimum; from memory. */
const leastInflow = -1 / 3;

/** Whether T_c is where momentum theory holds: T_c ≥ −π/9, at which a = −1/3. */
export function inflowInRange(thrustCoefficient: number): boolean {
  return thrustCoefficient >= (Math.PI / 2) * leastInflow * (1 + leastInflow);
}

/**
 * Factor of thrust on the normal force, f(a) = (1+a)[(1+a) + (1+2a)²]/[1 + (1+2a)²] [-]; 1 at a 0.
 * @param inflow a of `inflowFactor` [-]
 * Ribner, NACA TR 819, from memory.
 */
export function normalForceFactor(inflow: number): number {
  const slipstream = (1 + 2 * inflow) ** 2;
  return ((1 + inflow) * (1 + inflow + slipstream)) / (1 + slipstream);
}

/**
 * Normal-force slope of one propeller on its disc's area, dC_N/dα_p = f k_s a_8 S_side/S_p [1/rad].
 * @param sideArea      S_side of `bladeSideArea` [m²]
 * @param diameter      D [m]
 * @param spinnerFactor k_s, `customarySpinnerFactor` [-]
 * @param inflow        a of `inflowFactor` [-]
 * Ribner's fin rule, NACA TR 820, from memory; a_8 the slope of a fin of aspect ratio 8 by
 * `polhamusLiftSlope`. What the normal force itself does to the inflow is left out: 3 % high at three blades
 * of solidity 0.09 and 9 % at four of 0.12 against typical published values (from memory).
 */
export function propellerNormalSlope(
  sideArea: number,
  diameter: number,
  spinnerFactor: number,
  inflow: number,
): number {
  const finSlope = polhamusLiftSlope(finAspectRatio, 0, 1, 0);
  return (normalForceFactor(inflow) * spinnerFactor * finSlope * sideArea) / discArea(diameter);
}

/**
 * Propellers' share of the lift slope a_p = N C_Nα (S_p/S) dα_p/dα [1/rad]; it acts at the propeller's
 * place h_p and enters the shares of the neutral point: ahead of it it moves it forward.
 * @param count          N, propellers [-]
 * @param normalSlope    C_Nα of `propellerNormalSlope` [1/rad]
 * @param diameter       D [m]
 * @param area           S [m²]
 * @param streamGradient dα_p/dα: 1 + u in the wing's upwash for a tractor (`upwashAhead` in body.ts),
 *                       1 − ε_α in its downwash for a pusher [-]
 * Exact for linear parts.
 */
export function propellerLiftShare(
  count: number,
  normalSlope: number,
  diameter: number,
  area: number,
  streamGradient: number,
): number {
  return (count * normalSlope * discArea(diameter) * streamGradient) / area;
}

/**
 * How far a share of lift moves the neutral point of the rest [-]: a_p (h_p − h_n)/(C_Lα + a_p).
 * @param neutralPoint h_n without the share [-]
 * @param place        h_p, where the share acts [-]
 * @param share        a_p [1/rad]
 * @param restSlope    C_Lα without the share [1/rad]
 * Exact for linear parts.
 */
export function shareStep(neutralPoint: number, place: number, share: number, restSlope: number): number {
  return (share * (place - neutralPoint)) / (restSlope + share);
}

/**
 * Moment of the thrust about the CG, C_m,T = −C_T z_T/c [-]: a thrust line above the CG pitches down.
 * @param thrustOnWing   C_T of `thrustOnWing` [-]
 * @param heightOverChord z_T/c, thrust line above the CG, square to it, in MAC [-]
 * Exact.
 */
export function thrustMoment(thrustOnWing: number, heightOverChord: number): number {
  return -thrustOnWing * heightOverChord;
}

/** Power of C_L by which C_T grows in level flight: T = ηP/V makes C_T ∝ V⁻³, constant thrust C_T ∝ V⁻². */
const thrustExponent = { constantPower: 3 / 2, constantThrust: 1 } as const;

/**
 * Slope dC_m,T/dC_L of the thrust's moment along level flight at constant power, (3/2) C_m,T/C_L [-].
 * @param thrustMoment    C_m,T at that C_L [-]
 * @param liftCoefficient C_L, not 0 [-]
 * Exact for a constant propeller efficiency.
 */
export function thrustMomentSlopeAtPower(thrustMoment: number, liftCoefficient: number): number {
  return (thrustExponent.constantPower * thrustMoment) / liftCoefficient;
}

/**
 * Thrust's moment at another lift coefficient in level flight at the same power, C_m,T (C_L2/C_L)^(3/2) [-].
 * @param thrustMoment    C_m,T at C_L [-]
 * @param liftCoefficient C_L > 0 [-]
 * @param other           C_L2 ≥ 0 [-]
 * Exact for a constant propeller efficiency.
 */
export function thrustMomentAtPower(thrustMoment: number, liftCoefficient: number, other: number): number {
  // The power 3/2, quicker than the general one.
  const ratio = other / liftCoefficient;
  return thrustMoment * ratio * Math.sqrt(ratio);
}

/** Slope dC_m,T/dC_L at constant thrust, C_m,T/C_L [-]; both [-], C_L not 0. Exact. */
export function thrustMomentSlopeAtThrust(thrustMoment: number, liftCoefficient: number): number {
  return (thrustExponent.constantThrust * thrustMoment) / liftCoefficient;
}
