/** Ground effect by the wing's image below the ground. Heights and lengths in m, slopes per rad. */

/** Wieselsberger's factor, NACA TM 77, from memory: σ = (1 − 1.32 h/b)/(1.05 + 7.4 h/b). */
const wieselsberger = { top: 1.32, base: 1.05, slope: 7.4 } as const;

/** Heights over the span for which σ was fitted [-]. From memory. */
export const groundEffectRange = { from: 0.033, to: 0.25 } as const;

/** Whether the wing's height over its span lies in the fitted range of `groundInductionFactor`. */
export function groundEffectInRange(heightOverSpan: number): boolean {
  return heightOverSpan >= groundEffectRange.from && heightOverSpan <= groundEffectRange.to;
}

/**
 * Part σ by which the ground reduces the wing's own induced angle and drag [-].
 * @param heightOverSpan h/b, the wing's quarter-MAC over the ground, ≥ 0 [-]
 * Wieselsberger, NACA TM 77, from memory. Fitted for h/b 0.033–0.25 (`groundEffectInRange`); the same form
 * goes on outside, and from h/b 0.76, where it has fallen to nil, it stays nil.
 */
export function groundInductionFactor(heightOverSpan: number): number {
  const { top, base, slope } = wieselsberger;
  return Math.max(0, (1 - top * heightOverSpan) / (base + slope * heightOverSpan));
}

/**
 * Lift slope near the ground, 1/a_g = 1/a − σ/(πA) [1/rad].
 * @param liftSlope       a away from the ground [1/rad]
 * @param aspectRatio     A [-]
 * @param inductionFactor σ of `groundInductionFactor` [-]
 * Exact for the elliptic wing with the given σ: the image takes σ C_L/(πA) off the induced angle. Thickness
 * and the image's bound vortex, which work the other way very near the ground, are left out.
 */
export function liftSlopeNearGround(liftSlope: number, aspectRatio: number, inductionFactor: number): number {
  return 1 / (1 / liftSlope - inductionFactor / (Math.PI * aspectRatio));
}

/** Span of the rolled-up pair of vortices over the wing's span: elliptic loading. Exact: π/4. */
const pairSpanRatio = Math.PI / 4;

/**
 * Factor on the downwash at the tail near the ground [-]: 1 − [b'² + 4(h_t − h_w)²]/[b'² + 4(h_t + h_w)²].
 * @param wingHeight wing's quarter-MAC over the ground, h_w [m]
 * @param tailHeight tail's quarter-MAC over the ground, h_t [m]
 * @param span       b [m]
 * Handbook form, from memory; exact for the pair of line vortices at the distance b' = πb/4 and its image.
 * 1 far from the ground, 0 on it.
 */
export function groundDownwashFactor(wingHeight: number, tailHeight: number, span: number): number {
  const pair = (pairSpanRatio * span) ** 2;
  return 1 - (pair + 4 * (tailHeight - wingHeight) ** 2) / (pair + 4 * (tailHeight + wingHeight) ** 2);
}
