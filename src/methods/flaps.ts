/**
 * Wing flaps: change of the section's zero-lift angle, moment and maximum lift, and what that is worth on
 * the wing. Angles in rad, trailing edge down positive; chord fraction E is the flap's chord over the
 * section's; span stations over the semi-span.
 */
import { areaFractionBetween, momentFractionBetween } from './planform.ts';
import { flapEffectiveness } from './section.ts';

export type FlapType = 'plain' | 'split' | 'slotted' | 'fowler';

const degree = Math.PI / 180;
const tableStep = 10 * degree;

/** Part of the thin-aerofoil flap effectiveness that is reached at 0, 10, 20 … 60° of deflection [-]. */
const reached: Readonly<Record<FlapType, Float64Array>> = {
  plain: new Float64Array([0.85, 0.8, 0.7, 0.57, 0.47, 0.42, 0.38]),
  split: new Float64Array([0.8, 0.75, 0.66, 0.57, 0.5, 0.45, 0.41]),
  slotted: new Float64Array([0.9, 0.88, 0.85, 0.8, 0.7, 0.6, 0.52]),
  fowler: new Float64Array([0.9, 0.89, 0.87, 0.83, 0.76, 0.67, 0.58]),
};

/** Largest deflection of the table of `flapEffectivenessRatio` [rad]. */
export const flapDeflectionLimit = 60 * degree;

/** Whether a deflection [rad] lies in the table of `flapEffectivenessRatio`. */
export function flapDeflectionInRange(deflection: number): boolean {
  return Math.abs(deflection) <= flapDeflectionLimit;
}

/**
 * Part of the thin-aerofoil flap effectiveness that a flap reaches at a deflection [-].
 * @param type       kind of flap
 * @param deflection δ_f, either way [rad]
 * Handbook curves for 0.2–0.4 chord, from memory, read to about ±0.1; linear between every 10°. Table to
 * 60° (`flapDeflectionInRange`); beyond it held at the end. Good for elevators too, as a plain flap.
 */
export function flapEffectivenessRatio(type: FlapType, deflection: number): number {
  const table = reached[type];
  const place = Math.min(Math.abs(deflection) / tableStep, table.length - 1);
  const index = Math.min(Math.floor(place), table.length - 2);
  return table[index] + (place - index) * (table[index + 1] - table[index]);
}

/**
 * Change of the section's zero-lift angle by a flap, −τ κ δ [rad]; negative for a flap turned down.
 * @param chordFraction E, 0…1 [-]
 * @param deflection    δ_f [rad]
 * @param ratio         κ of `flapEffectivenessRatio` [-]
 * τ exact in thin-aerofoil theory. A Fowler flap's growth of chord is left out: state its own increment.
 */
export function flapZeroLiftChange(chordFraction: number, deflection: number, ratio: number): number {
  return -flapEffectiveness(chordFraction) * ratio * deflection;
}

/**
 * Change of the section's moment about its quarter chord by a flap, −½ κ δ sin θ_h (1 − cos θ_h) [-],
 * θ_h = arccos(2E − 1); nose-down for a flap turned down.
 * @param chordFraction E, 0…1 [-]
 * @param deflection    δ_f [rad]
 * @param ratio         κ of `flapEffectivenessRatio` [-]
 * Exact in thin-aerofoil theory (Glauert) times κ. That the moment falls short in the same ratio as the lift
 * is common practice, no source.
 */
export function flapMomentChange(chordFraction: number, deflection: number, ratio: number): number {
  const cosine = 2 * chordFraction - 1;
  const sine = Math.sqrt(1 - cosine * cosine);
  return -(ratio * deflection * sine * (1 - cosine)) / 2;
}

/**
 * Change of the wing's zero-lift angle by a part-span flap [rad]: the section's times the flapped part of
 * the area.
 * @param sectionChange Δα_L0 of `flapZeroLiftChange` [rad]
 * @param from          inner end of the flap over the semi-span [-]
 * @param to            outer end [-]
 * @param taper         λ of the wing [-]
 * Exact in strip theory, area-weighted. Lifting-surface theory gives inner flaps a little more.
 */
export function wingZeroLiftChange(sectionChange: number, from: number, to: number, taper: number): number {
  return sectionChange * areaFractionBetween(from, to, taper);
}

/**
 * Change of the wing's moment about its aerodynamic centre by a part-span flap [-]: the section's times the
 * flapped part of ∫c² dy.
 * @param sectionChange Δc_m of `flapMomentChange` [-]
 * @param from          inner end of the flap over the semi-span [-]
 * @param to            outer end [-]
 * @param taper         λ of the wing [-]
 * Exact in strip theory for an unswept wing; on a swept one the flap's lift also sits off the wing's centre.
 */
export function wingMomentChange(sectionChange: number, from: number, to: number, taper: number): number {
  return sectionChange * momentFractionBetween(from, to, taper);
}

/**
 * Downwash at the tail that part-span flaps add over that of the same lift on the whole wing [rad]:
 * ε_α (1/η_f − 1)|Δα_L0|, at flaps turned down positive.
 * @param downwashGradient ε_α at the tail [-]
 * @param wingChange       Δα_L0 of `wingZeroLiftChange` [rad]
 * @param outerStation     η_f, outer end of the flap over the semi-span, > 0 [-]
 * A stated assumption of ours: the flaps' lift is shed over the flapped span, and their downwash is greater
 * by span over flapped span; nil for full-span flaps. Between the bounds 1 (spread over the wing) and the
 * square of that (an elliptic wing of the flapped span).
 */
export function flapExtraDownwash(
  downwashGradient: number,
  wingChange: number,
  outerStation: number,
): number {
  return -downwashGradient * (1 / outerStation - 1) * wingChange;
}

interface MaximumLift {
  /** Increment of the section's c_l,max at the best deflection [-]. */
  readonly increment: number;
  /** Range that is met [-]. */
  readonly from: number;
  readonly to: number;
  /** Best deflection [rad]. */
  readonly bestDeflection: number;
}

/** Maximum-lift increments of sections by type of flap, at 0.25–0.30 chord. Handbook values, from memory. */
export const flapMaximumLift: Readonly<Record<FlapType, MaximumLift>> = {
  plain: { increment: 0.9, from: 0.7, to: 1.0, bestDeflection: 50 * degree },
  split: { increment: 0.9, from: 0.7, to: 1.0, bestDeflection: 60 * degree },
  slotted: { increment: 1.3, from: 1.1, to: 1.5, bestDeflection: 40 * degree },
  fowler: { increment: 1.5, from: 1.3, to: 1.9, bestDeflection: 40 * degree },
};

/** Chord fractions for which the increments of `flapMaximumLift` stand [-]. */
export const flapMaximumLiftRange = { from: 0.2, to: 0.35 } as const;

/** Whether a flap's chord fraction lies where `flapMaximumLift` stands. */
export function flapMaximumLiftInRange(chordFraction: number): boolean {
  return chordFraction >= flapMaximumLiftRange.from && chordFraction <= flapMaximumLiftRange.to;
}

/**
 * Increment of the section's maximum lift at a deflection [-]: the type's increment times 2x − x², x being
 * the deflection over the best one, and the full increment beyond it.
 * @param type       kind of flap
 * @param deflection δ_f ≥ 0 [rad]
 * Increments as in `flapMaximumLift`; the parabola is ours, with about 60–80 % at take-off settings
 * (common practice, no source). Nil for flaps turned up.
 */
export function flapMaximumLiftChange(type: FlapType, deflection: number): number {
  const { increment, bestDeflection } = flapMaximumLift[type];
  const x = Math.min(Math.max(deflection / bestDeflection, 0), 1);
  return increment * x * (2 - x);
}

/** Part of a section's increment that counts on the flapped area of a wing, 0.9: handbook rule, from memory. */
const wingPart = 0.9;

/**
 * Increment of the wing's maximum lift by part-span flaps [-]: 0.9 Δc_l,max (S_flapped/S) cos Λ_hinge.
 * @param sectionChange Δc_l,max of `flapMaximumLiftChange` [-]
 * @param from          inner end of the flap over the semi-span [-]
 * @param to            outer end [-]
 * @param taper         λ of the wing [-]
 * @param hingeSweep    sweep of the hinge line [rad]
 * Handbook rule, from memory.
 */
export function wingMaximumLiftChange(
  sectionChange: number,
  from: number,
  to: number,
  taper: number,
  hingeSweep: number,
): number {
  return wingPart * sectionChange * areaFractionBetween(from, to, taper) * Math.cos(hingeSweep);
}
