import { greatestTemporaryForce, leastLimitLoadForce } from '../methods/control-force-rules.ts';
import { stickForce } from '../methods/free-stick.ts';
import { meanHeightSlope, meanThrustSlopeAtPower } from '../methods/mean-couple-slope.ts';
import type { Condition, Study } from '../study/study.ts';
import { hasStickForces } from './free-stick.ts';
import type { Stage } from './stage.ts';

/**
 * CG at which slowing from a condition's speed to its stall takes no force. The couples that change with lift
 * are taken by their mean slope on that way; an idling propeller's thrust coefficient does not change.
 */
function nilForceStage(study: Study, { power }: Condition): Stage {
  const running = study.propeller !== undefined && power === 'fraction';
  return {
    name: 'CG of nil force at the stall',
    reads: [
      'neutral_point_level',
      'neutral_point_height_lift',
      'lift_coefficient',
      'maximum_lift',
      'free_stick_step',
      'spring_step',
      ...(running ? ['thrust_moment'] : []),
    ],
    writes: ['nil_force_at_stall'],
    cost: 8,
    kernel: (count, [hn, byHeight, cl, maximum, free, spring, thrust], [nil]) => {
      for (let row = 0; row < count; row++) {
        const [lift, atStall] = [cl[row], maximum[row]];
        const ofThrust = running ? meanThrustSlopeAtPower(thrust[row], lift, atStall) : 0;
        const slope = ofThrust + meanHeightSlope(byHeight[row], lift, atStall);
        nil[row] = hn[row] - slope + free[row] + spring[row];
      }
    },
  };
}

/** Pull at the foremost CG to slow from the condition's speed, trimmed there, to its stall. */
const stallForceStage: Stage = {
  name: 'stick force at the stall',
  reads: ['stick_force_by_margin', 'cg_forward', 'nil_force_at_stall', 'lift_coefficient', 'maximum_lift'],
  writes: ['stick_force_at_stall_forward'],
  cost: 8,
  kernel: (count, [byMargin, h, nil, cl, maximum], [force]) => {
    for (let row = 0; row < count; row++) {
      // No slower than the stall: there is nothing left to slow down by, and no force.
      const speedRatio = Math.min(1, Math.sqrt(cl[row] / maximum[row]));
      // The steps of spring and bobweight are in the point of nil force; + 0: no −0.
      force[row] = stickForce(byMargin[row], 1, h[row], nil[row], 0, speedRatio) + 0;
    }
  },
};

/** Stick forces at the stall in one condition, after its manoeuvre. */
export function stallForceStages(study: Study, condition: Condition): Stage[] {
  return hasStickForces(study) ? [nilForceStage(study, condition), stallForceStage] : [];
}

const limitLoadStage: Stage = {
  name: 'stick force at the limit load factor',
  reads: ['stick_force_per_g_aft', 'control_load_factor'],
  writes: ['stick_force_at_limit_load'],
  cost: 2,
  kernel: (count, [perG, loadFactor], [force]) => {
    for (let row = 0; row < count; row++) force[row] = perG[row] * (loadFactor[row] - 1);
  },
};

/** Stick forces of all conditions against what a regulation asks for and allows; after `governingStages`. */
export function forceMarginStages(study: Study): Stage[] {
  const { control } = study;
  if (control === undefined || !hasStickForces(study)) return [];
  const greatest = greatestTemporaryForce(control.kind);
  return [
    limitLoadStage,
    {
      name: 'margin of force at the limit load factor',
      reads: ['stick_force_at_limit_load', 'mass'],
      writes: ['limit_load_force_margin'],
      cost: 4,
      kernel: (count, [force, mass], [margin]) => {
        for (let row = 0; row < count; row++) {
          margin[row] = force[row] - leastLimitLoadForce(mass[row], control.kind);
        }
      },
    },
    {
      name: 'margin of temporary force',
      reads: ['stick_force_at_stall_forward'],
      writes: ['temporary_force_margin'],
      cost: 2,
      kernel: (count, [force], [margin]) => {
        for (let row = 0; row < count; row++) margin[row] = greatest - force[row];
      },
    },
  ];
}
