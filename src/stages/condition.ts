import { liftCoefficient, machFromCalibratedSpeed } from '../methods/atmosphere.ts';
import type { Stage } from './stage.ts';

/** Mach number and lift coefficient of the study's condition. */
export const machStage: Stage = {
  name: 'condition',
  reads: ['conditions_1_speed', 'conditions_1_height'],
  writes: ['mach'],
  cost: 100,
  kernel: (count, [speed, height], [mach]) => {
    for (let row = 0; row < count; row++) mach[row] = machFromCalibratedSpeed(speed[row], height[row]);
  },
};

export const liftCoefficientStage: Stage = {
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
