import { handbookDownwashGradient, torenbeekDownwashGradient, wakePlaneHeight } from '../methods/downwash.ts';
import { rootAngleOfAttack } from '../methods/neutral-point.ts';
import type { Study } from '../study/study.ts';
import { liftSlopeBy } from './lift-slope.ts';
import type { Stage } from './stage.ts';

/** Angle of attack of the root chord at the condition's lift, flaps included, from which the wake's height follows. */
export function angleOfAttackStage({ flaps }: Pick<Study, 'flaps'>): Stage {
  return {
    name: 'angle of attack',
    reads: [
      'lift_coefficient',
      'wing_lift_slope',
      'wing_section_zero_lift_angle',
      'wing_washout',
      'mac_spanwise_station',
      'wing_span',
      ...(flaps === undefined ? [] : ['flap_zero_lift_change']),
    ],
    writes: ['root_angle_of_attack'],
    cost: 10,
    kernel: (count, [cl, a, zeroLift, washout, macStation, span, byFlaps], [alpha]) => {
      for (let row = 0; row < count; row++) {
        const macFraction = (2 * macStation[row]) / span[row];
        const angle = zeroLift[row] + (byFlaps === undefined ? 0 : byFlaps[row]);
        alpha[row] = rootAngleOfAttack(cl[row], a[row], angle, washout[row], macFraction);
      }
    },
  };
}

/** a(M)/a(0) of the wing, which the handbook's low-speed form is scaled with. */
export function machRatioStage({ methods }: Pick<Study, 'methods'>): Stage {
  const slope = liftSlopeBy[methods.lift_slope];
  return {
    name: 'compressibility',
    reads: [
      'wing_lift_slope',
      'wing_aspect_ratio',
      'wing_formula_taper',
      'wing_formula_sweep',
      'wing_formula_sweep_half_chord',
      'wing_section_lift_slope',
    ],
    writes: ['wing_lift_slope_ratio'],
    cost: 80,
    kernel: (count, [a, A, taper, sweep, sweepHalf, a0], [ratio]) => {
      const mach = 0;
      for (let row = 0; row < count; row++) {
        ratio[row] = a[row] / slope(A[row], taper[row], sweep[row], sweepHalf[row], a0[row], mach);
      }
    },
  };
}

/**
 * Downwash gradient by both published forms, and the one used. Empty where the tail is not behind the wing;
 * Torenbeek's form also where the wing is hollower than a triangle, so that its equivalent taper is 0.
 */
export function downwashStage({ methods }: Pick<Study, 'methods'>): Stage {
  const useTorenbeek = methods.downwash === 'torenbeek';
  return {
    name: 'downwash',
    reads: [
      'wing_lift_slope',
      'wing_lift_slope_ratio',
      'wing_aspect_ratio',
      'wing_formula_taper',
      'wing_formula_sweep',
      'wing_span',
      'tail_arm',
      'wake_length',
      'tail_above_wing_root_chord',
      'root_angle_of_attack',
      'lift_coefficient',
    ],
    writes: ['wake_height', 'downwash_torenbeek', 'downwash_handbook', 'downwash_gradient'],
    cost: 120,
    kernel: (
      count,
      [a, ratio, A, taper, sweep, span, arm, wakeLength, height, alpha, cl],
      [wake, byT, byH, used],
    ) => {
      for (let row = 0; row < count; row++) {
        const l = wakeLength[row] > 0 ? arm[row] : Number.NaN;
        const b = span[row];
        wake[row] = wakePlaneHeight(height[row], wakeLength[row], alpha[row], cl[row], A[row]);
        byT[row] =
          taper[row] > 0
            ? torenbeekDownwashGradient(a[row], A[row], taper[row], (2 * l) / b, (2 * wake[row]) / b)
            : Number.NaN;
        byH[row] = handbookDownwashGradient(
          A[row],
          taper[row],
          sweep[row],
          height[row] / b,
          l / b,
          ratio[row],
        );
        used[row] = useTorenbeek ? byT[row] : byH[row];
      }
    },
  };
}
