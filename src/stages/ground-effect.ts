import { groundInductionFactor, liftSlopeNearGround } from '../methods/ground-effect.ts';
import type { Stage } from './stage.ts';

/** Lift-curve slope of the wing near the ground, from that away from it. */
export const groundLiftStage: Stage = {
  name: 'wing in ground effect',
  reads: ['wing_lift_slope_away', 'wing_aspect_ratio', 'conditions_1_wing_above_ground', 'wing_span'],
  writes: ['wing_lift_slope', 'ground_induction'],
  cost: 10,
  kernel: (count, [away, A, height, span], [slope, induction]) => {
    for (let row = 0; row < count; row++) {
      const sigma = groundInductionFactor(height[row] / span[row]);
      induction[row] = sigma;
      slope[row] = liftSlopeNearGround(away[row], A[row], sigma);
    }
  },
};
