import {
  calibratedSpeedFromMach,
  dynamicPressureAtLift,
  liftCoefficient,
  machFromCalibratedSpeed,
  machFromDynamicPressure,
  standardDensity,
} from '../methods/atmosphere.ts';
import { shareOfSectionMaximumLift } from '../methods/maximum-lift.ts';
import type { Condition, Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

const seaLevelDensity = standardDensity(0);

/** Density of the standard atmosphere over that at sea level: once a condition, not once a combination. */
export const airStage: Stage = {
  name: 'air',
  reads: ['conditions_1_height'],
  writes: ['density_ratio'],
  cost: 100,
  kernel: (count, [height], [ratio]) => {
    for (let row = 0; row < count; row++) ratio[row] = standardDensity(height[row]) / seaLevelDensity;
  },
};

/** Mach number of a condition whose calibrated speed is given. */
const machStage: Stage = {
  name: 'condition',
  reads: ['conditions_1_speed', 'conditions_1_height'],
  writes: ['mach'],
  cost: 100,
  kernel: (count, [speed, height], [mach]) => {
    for (let row = 0; row < count; row++) mach[row] = machFromCalibratedSpeed(speed[row], height[row]);
  },
};

const liftCoefficientStage: Stage = {
  name: 'lift coefficient',
  reads: ['mass', 'conditions_1_speed', 'conditions_1_height', 'wing_area'],
  writes: ['lift_coefficient'],
  cost: 100,
  kernel: (count, [mass, speed, height, area], [cl]) => {
    for (let row = 0; row < count; row++) {
      cl[row] = liftCoefficient(mass[row], speed[row], height[row], area[row]);
    }
  },
};

/** Lift coefficient and Mach number of a condition given by its lift, or by a multiple of the stall speed. */
function speedByLiftStage(speedAs: 'lift_coefficient' | 'times_stall'): Stage {
  const byLift = speedAs === 'lift_coefficient';
  return {
    name: 'speed from lift',
    reads: ['mass', 'wing_area', 'conditions_1_height', `conditions_1_${speedAs}`, 'maximum_lift'],
    writes: ['lift_coefficient', 'mach'],
    cost: 60,
    kernel: (count, [mass, area, height, given, maximum], [cl, mach]) => {
      for (let row = 0; row < count; row++) {
        const lift = byLift ? given[row] : maximum[row] / given[row] ** 2;
        cl[row] = lift;
        mach[row] = machFromDynamicPressure(dynamicPressureAtLift(mass[row], lift, area[row]), height[row]);
      }
    },
  };
}

/** Speed, Mach number and lift coefficient of a condition, from whichever it gives. */
export function speedStages({ speedAs }: Condition): Stage[] {
  return speedAs === 'speed' ? [machStage, liftCoefficientStage] : [speedByLiftStage(speedAs)];
}

/** Greatest lift coefficient of the wing in a condition, its flaps included, and the stall speed there. */
export function maximumLiftStage(study: Pick<Study, 'flaps' | 'inputs'>): Stage {
  const ownMaximum = study.inputs.has('wing.maximum_lift');
  const share = ownMaximum ? 1 : shareOfSectionMaximumLift;
  const wing = ownMaximum ? 'wing_maximum_lift' : 'wing_section_maximum_lift';
  return {
    name: 'maximum lift',
    reads: ['mass', 'wing_area', 'conditions_1_height', wing, ...(study.flaps ? ['flap_maximum_lift'] : [])],
    writes: ['maximum_lift', 'stall_speed'],
    cost: 60,
    kernel: (count, [mass, area, height, given, byFlaps], [maximum, stall]) => {
      for (let row = 0; row < count; row++) {
        const greatest = share * given[row] + (byFlaps === undefined ? 0 : byFlaps[row]);
        const pressure = dynamicPressureAtLift(mass[row], greatest, area[row]);
        maximum[row] = greatest;
        stall[row] = calibratedSpeedFromMach(machFromDynamicPressure(pressure, height[row]), height[row]);
      }
    },
  };
}
