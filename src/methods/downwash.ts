/**
 * Downwash gradient ε_α = dε/dα at the tail [-], and where the tail lies over the wing's wake.
 * Neither published form knows the sign of the sweep: against a flat-wake lattice both are 17–25 % low on
 * forward-swept wings (0.035–0.052 MAC optimistic), so both predicates say no there.
 */

const degree = Math.PI / 180;

/**
 * Quarter-chord sweep below which a wing counts as swept forward [rad]. A tapered wing with a straight
 * leading edge has −2° or so and still counts as straight. A choice of ours.
 */
export const forwardSweepLimit = -3 * degree;

/** Whether the quarter-chord sweep [rad] is forward by more than `forwardSweepLimit`. */
export function isForwardSwept(sweepQuarter: number): boolean {
  return sweepQuarter < forwardSweepLimit;
}

/** Constants of the handbook form; each as the handbook prints it. */
const handbook = {
  scale: 4.44,
  exponent: 1.19,
  aspectRatioExponent: 1.7,
  taperOffset: 10,
  taperSlope: 3,
  taperScale: 7,
} as const;

/**
 * Handbook form: 4.44 [K_A K_λ K_H √cos Λ_¼]^1.19 · a(M)/a(0), with K_A = 1/A − 1/(1 + A^1.7),
 * K_λ = (10 − 3λ)/7, K_H = (1 − |h_H/b|)/(2 l_H/b)^⅓.
 * @param aspectRatio        A, > 0 [-]
 * @param taper              λ [-]
 * @param sweepQuarter       Λ_¼ [rad]
 * @param tailHeightOverSpan h_H/b, tail quarter-MAC above the plane of the wing's root chord [-]
 * @param tailArmOverSpan    l_H/b, wing quarter-MAC to tail quarter-MAC, > 0 [-]
 * @param machRatio          lift slope at M over lift slope at 0 [-]
 * Handbook form of the 1960s, from memory. On ordinary layouts 10–20 % low against a flat-wake lattice
 * (ours), which puts the neutral point 0.017–0.032 MAC too far aft. Range: `handbookInRange`. NaN for a
 * tail ahead of the wing.
 */
export function handbookDownwashGradient(
  aspectRatio: number,
  taper: number,
  sweepQuarter: number,
  tailHeightOverSpan: number,
  tailArmOverSpan: number,
  machRatio: number,
): number {
  const kA = 1 / aspectRatio - 1 / (1 + aspectRatio ** handbook.aspectRatioExponent);
  const kTaper = (handbook.taperOffset - handbook.taperSlope * taper) / handbook.taperScale;
  const kHeight = (1 - Math.abs(tailHeightOverSpan)) / (2 * tailArmOverSpan) ** (1 / 3);
  const product = kA * kTaper * kHeight * Math.sqrt(Math.cos(sweepQuarter));
  return handbook.scale * product ** handbook.exponent * machRatio;
}

/** Whether the handbook form may be used: not swept forward, tail behind the wing and within a span of its plane. */
export function handbookInRange(
  sweepQuarter: number,
  tailHeightOverSpan: number,
  tailArmOverSpan: number,
): boolean {
  return !isForwardSwept(sweepQuarter) && Math.abs(tailHeightOverSpan) < 1 && tailArmOverSpan > 0;
}

const torenbeekScale = 1.75;
const torenbeekRoot = 1 / 4;

/**
 * Torenbeek's form for straight wings: 1.75 a / (πA (λ r)^¼ (1 + |m|)).
 * @param liftSlope   a of the wing, at the Mach number of the flight [1/rad]
 * @param aspectRatio A, > 0 [-]
 * @param taper       λ, > 0 [-]
 * @param armRatio    r = 2l/b, wing quarter-MAC to tail quarter-MAC over the semi-span, > 0 [-]
 * @param heightRatio m = 2h/b, tail above the plane of the wake over the semi-span [-]
 * Torenbeek, Synthesis of Subsonic Airplane Design (1976), App. E, from memory. Within −7…+14 % of a
 * flat-wake lattice on ordinary layouts, mostly a little low (ours). Grows without limit as λ goes to 0.
 * Range: `torenbeekInRange`. NaN for a tail ahead of the wing.
 */
export function torenbeekDownwashGradient(
  liftSlope: number,
  aspectRatio: number,
  taper: number,
  armRatio: number,
  heightRatio: number,
): number {
  const spread = (taper * armRatio) ** torenbeekRoot * (1 + Math.abs(heightRatio));
  return (torenbeekScale * liftSlope) / (Math.PI * aspectRatio * spread);
}

/**
 * Least taper, below which the form diverges, and largest aft quarter-chord sweep [rad] that counts as
 * straight, for Torenbeek's form. Both a choice of ours.
 */
export const torenbeekRange = { leastTaper: 0.3, mostSweep: 10 * degree } as const;

/** Whether Torenbeek's form may be used: λ ≥ 0.3, a straight wing, a tail behind it. */
export function torenbeekInRange(taper: number, sweepQuarter: number, armRatio: number): boolean {
  const straight = !isForwardSwept(sweepQuarter) && sweepQuarter <= torenbeekRange.mostSweep;
  return straight && taper >= torenbeekRange.leastTaper && armRatio > 0;
}

/** Downwash gradient in the middle of a flat elliptic vortex sheet far behind the wing, 2a/(πA) [-]; a [1/rad]. Exact (Prandtl). */
export function flatSheetDownwash(liftSlope: number, aspectRatio: number): number {
  return (2 * liftSlope) / (Math.PI * aspectRatio);
}

/**
 * Downwash gradient midway between the rolled-up pair of an elliptic wing far behind it,
 * (16/π³) a/A [-]; a [1/rad]. Exact: two line vortices, π/4 of the span apart.
 */
export function rolledUpPairDownwash(liftSlope: number, aspectRatio: number): number {
  return (16 * liftSlope) / (Math.PI ** 3 * aspectRatio);
}

/**
 * Height of the tail's quarter-MAC above the plane of the wing's wake [m]:
 * h cos α − L (sin α − 2C_L/(πA)).
 * @param heightAboveRootChord h, tail quarter-MAC above the plane of the wing's root chord [m]
 * @param wakeLength           L, from the root's trailing edge aft to the tail's quarter-MAC [m]
 * @param angleOfAttack        α, of the root chord [rad]
 * @param liftCoefficient      C_L of the wing [-]
 * @param aspectRatio          A, > 0 [-]
 * Ours: the wake leaves the root's trailing edge along the stream and sinks by the flat elliptic sheet's
 * downwash 2C_L/(πA) per unit length; small angles in the sink. Roll-up and the nearer field are left out.
 */
export function wakePlaneHeight(
  heightAboveRootChord: number,
  wakeLength: number,
  angleOfAttack: number,
  liftCoefficient: number,
  aspectRatio: number,
): number {
  const sink = flatSheetDownwash(liftCoefficient, aspectRatio);
  return heightAboveRootChord * Math.cos(angleOfAttack) - wakeLength * (Math.sin(angleOfAttack) - sink);
}
