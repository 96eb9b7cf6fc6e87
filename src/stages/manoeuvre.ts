import { calibratedSpeedFromMach, standardDensity } from '../methods/atmosphere.ts';
import { stickForceBySpeed } from '../methods/free-stick.ts';
import {
  customaryDampingFactor,
  elevatorPerG,
  manoeuvreStep,
  pitchDamping,
  stickForcePerG,
} from '../methods/manoeuvre.ts';
import { staticMargin } from '../methods/neutral-point.ts';
import type { Study } from '../study/study.ts';
import { hasStickForces } from './free-stick.ts';
import { pressureRatioFigure } from './propeller.ts';
import type { Stage } from './stage.ts';

/** Lowry and Polhamus' slope of the tail is high by about as much as the other parts would add to the damping. */
const dampingFactorWithHighSlope = 1;

/** Pitch damping, and the manoeuvre point with fixed stick. */
function pointStage(study: Study): Stage {
  const factor =
    study.methods.lift_slope === 'polhamus' ? dampingFactorWithHighSlope : customaryDampingFactor;
  return {
    name: 'manoeuvre point',
    reads: [
      'tail_lift_slope',
      pressureRatioFigure(study),
      'tail_area',
      'wing_area',
      'tail_arm',
      'mac',
      'density_ratio',
      'mass',
      'neutral_point',
      'cg_aft',
    ],
    writes: ['pitch_damping', 'manoeuvre_step', 'manoeuvre_point', 'manoeuvre_margin_aft'],
    cost: 40,
    kernel: (count, [at, eta, St, S, arm, c, sigma, mass, hn, aft], [damping, step, point, margin]) => {
      const seaLevelDensity = standardDensity(0);
      for (let row = 0; row < count; row++) {
        const cmq = pitchDamping(at[row], eta[row], St[row] / S[row], arm[row] / c[row], factor);
        const behind = manoeuvreStep(cmq, sigma[row] * seaLevelDensity, S[row], c[row], mass[row]);
        damping[row] = cmq;
        step[row] = behind;
        point[row] = hn[row] + behind;
        margin[row] = staticMargin(point[row], aft[row]);
      }
    },
  };
}

/** Manoeuvre point with free stick: the tail damps with what is left of its lift, a bobweight adds its step. */
function freePointStage({ control }: Study): Stage {
  const weighted = control !== undefined;
  return {
    name: 'manoeuvre point with free stick',
    reads: [
      'neutral_point',
      'free_stick_step',
      'free_stick_factor',
      'manoeuvre_step',
      'cg_aft',
      ...(weighted ? ['bobweight_step'] : []),
    ],
    writes: ['manoeuvre_point_free_stick', 'manoeuvre_margin_free_stick_aft'],
    cost: 4,
    kernel: (count, [hn, free, factor, step, aft, byWeight], [point, margin]) => {
      for (let row = 0; row < count; row++) {
        const byDamping = factor[row] * step[row];
        point[row] = hn[row] + free[row] + byDamping + (weighted ? byWeight[row] : 0);
        margin[row] = staticMargin(point[row], aft[row]);
      }
    },
  };
}

const ends = ['forward', 'aft'] as const;
type End = (typeof ends)[number];

function elevatorStage(end: End): Stage {
  return {
    name: `elevator per g, ${end} CG`,
    reads: [
      'lift_coefficient',
      `cg_${end}`,
      'manoeuvre_point',
      'neutral_point_level',
      'elevator_lift_slope',
      'tail_position',
    ],
    writes: [`elevator_per_g_${end}`],
    cost: 5,
    kernel: (count, [cl, h, hm, hn, slope, ht], [perG]) => {
      for (let row = 0; row < count; row++) {
        perG[row] = elevatorPerG(cl[row], h[row], hm[row], hn[row], slope[row], ht[row]);
      }
    },
  };
}

/**
 * Stick force per g, and by speed. Both points of nil force have the steps of spring and bobweight in them,
 * so that no force is added beside them; that by speed has the couples that change along level flight too.
 */
function forceStage(end: End): Stage {
  return {
    name: `stick forces, ${end} CG`,
    reads: [
      'stick_force_by_margin',
      `cg_${end}`,
      'manoeuvre_point_free_stick',
      'trim_slope_limit',
      'free_stick_step',
      'spring_step',
      'calibrated_speed',
    ],
    writes: [`stick_force_per_g_${end}`, `stick_force_per_speed_${end}`],
    cost: 5,
    kernel: (count, [byMargin, h, hm, flat, free, spring, speed], [perG, bySpeed]) => {
      for (let row = 0; row < count; row++) {
        perG[row] = stickForcePerG(byMargin[row], 1, h[row], hm[row], 0);
        const hn = flat[row] + free[row] + spring[row];
        bySpeed[row] = stickForceBySpeed(byMargin[row], 1, h[row], hn, 0, speed[row]);
      }
    },
  };
}

const speedStage: Stage = {
  name: 'calibrated speed',
  reads: ['mach', 'conditions_1_height'],
  writes: ['calibrated_speed'],
  cost: 60,
  kernel: (count, [mach, height], [speed]) => {
    for (let row = 0; row < count; row++) speed[row] = calibratedSpeedFromMach(mach[row], height[row]);
  },
};

/** Manoeuvre and stick forces in one condition, after its trim and free stick. */
export function manoeuvreStages(study: Study): Stage[] {
  return [
    pointStage(study),
    ...ends.map(elevatorStage),
    ...(study.hinge === 'none' ? [] : [freePointStage(study)]),
    ...(hasStickForces(study) ? [speedStage, ...ends.map(forceStage)] : []),
  ];
}
