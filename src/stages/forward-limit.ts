import { liftCoefficient } from '../methods/atmosphere.ts';
import {
  customaryRollingFriction,
  forwardLimitAtWingLift,
  forwardLimitByNoseWheel,
  tailDownload,
  tailLiftAt,
} from '../methods/forward-limit.ts';
import { forwardLimitByStickForce } from '../methods/free-stick.ts';
import { shareOfSectionMaximumLift } from '../methods/maximum-lift.ts';
import { thrustMomentAtPower } from '../methods/propeller.ts';
import { verticalPositionMoment } from '../methods/trim.ts';
import type { Condition, Study } from '../study/study.ts';
import { hasStickForces } from './free-stick.ts';
import { pressureRatioFigure } from './propeller.ts';
import type { Stage } from './stage.ts';

/** A condition flown this near its stall speed leaves nothing to slow down by. */
const slowestRatio = 1 - 1e-6;

/** Figures that the couples at another lift than the condition's are made of. */
const coupleReads = ['rest_couples', 'neutral_point_height_lift', 'lift_coefficient'] as const;

/**
 * Couples beside the lift of all but the tail at another lift: height by the wing's lift, thrust by the
 * lift that settles the speed.
 */
function couplesAt(
  rest: number,
  byHeight: number,
  cl: number,
  thrust: number,
  running: boolean,
  wingLift: number,
  speedLift: number,
): number {
  const ofHeight = verticalPositionMoment((byHeight * wingLift) / cl, wingLift);
  const ofThrust = running ? thrustMomentAtPower(thrust, cl, speedLift) : thrust;
  return rest + ofHeight + ofThrust;
}

/** The couples at the stall of the wing in one condition. */
function stallStage(study: Study, { power }: Condition): Stage {
  const running = power === 'fraction';
  return {
    name: 'couples at the stall',
    reads: [...coupleReads, 'maximum_lift', ...(study.propeller === undefined ? [] : ['thrust_moment'])],
    writes: ['stall_couples'],
    cost: 20,
    kernel: (count, [rest, byHeight, cl, maximum, thrust], [couples]) => {
      for (let row = 0; row < count; row++) {
        const ofThrust = thrust === undefined ? 0 : thrust[row];
        const lift = maximum[row];
        couples[row] = couplesAt(rest[row], byHeight[row], cl[row], ofThrust, running, lift, lift);
      }
    },
  };
}

/** Greatest lift of the tail either way as a lift on the wing's area; of a V-tail the part in the vertical. */
function downloadStage(study: Study): Stage {
  const own = study.inputs.has('tail.maximum_lift');
  const share = own ? 1 : shareOfSectionMaximumLift;
  const vTail = study.tail.layout === 'V';
  return {
    name: 'greatest download of the tail',
    reads: [
      own ? 'tail_maximum_lift' : 'tail_section_maximum_lift',
      pressureRatioFigure(study),
      'tail_area',
      'wing_area',
      ...(vTail ? ['tail_v_angle'] : []),
    ],
    writes: ['tail_download'],
    cost: 4,
    kernel: (count, [maximum, eta, St, S, vAngle], [download]) => {
      for (let row = 0; row < count; row++) {
        const upright = vTail ? Math.cos(vAngle[row]) : 1;
        download[row] = tailDownload(share * maximum[row] * upright, eta[row], St[row] / S[row]);
      }
    },
  };
}

/** Figures that the lift of the tail at full up elevator is made of. */
const fullUpReads = [
  'lift_slope',
  'tail_lift_share',
  'tail_lift_at_zero_lift',
  'elevator_lift_slope',
  'tail_elevator_up',
] as const;

/** Forward limits at the stall: by elevator travel, and by the tail's own stall. */
function stallLimitsStage(study: Study): Stage {
  const powered = study.propeller !== undefined;
  return {
    name: 'forward limits at the stall',
    reads: [
      ...fullUpReads,
      'maximum_lift',
      'stall_couples',
      'rest_position',
      'tail_position',
      'tail_download',
      ...(powered ? ['propeller_lift_at_zero_lift'] : []),
    ],
    writes: ['forward_limit_elevator', 'forward_limit_tail_lift'],
    cost: 12,
    kernel: (
      count,
      [whole, share, atZero, elevator, up, maximum, couples, hr, ht, download, ofPropeller],
      [byElevator, byTail],
    ) => {
      for (let row = 0; row < count; row++) {
        const lift = maximum[row];
        const byAngle = lift - (powered ? ofPropeller[row] : 0);
        const slope = whole[row] - share[row];
        const fullUp = tailLiftAt(byAngle, slope, atZero[row], share[row], elevator[row], -up[row]);
        byElevator[row] = forwardLimitAtWingLift(lift, fullUp, couples[row], hr[row], ht[row]);
        byTail[row] = forwardLimitAtWingLift(lift, download[row], couples[row], hr[row], ht[row]);
      }
    },
  };
}

/** The weight as a lift coefficient at the speed of rotation. */
const rotationStage: Stage = {
  name: 'weight at rotation',
  reads: ['mass', 'landing_gear_rotation_speed', 'conditions_1_height', 'wing_area'],
  writes: ['rotation_weight'],
  cost: 100,
  kernel: (count, [mass, speed, height, S], [weight]) => {
    for (let row = 0; row < count; row++) {
      weight[row] = liftCoefficient(mass[row], speed[row], height[row], S[row]);
    }
  },
};

/** Forward limit by lifting the nose wheel at the speed of rotation, wheels on the ground. */
function noseWheelStage(study: Study, { power }: Condition): Stage {
  const running = power === 'fraction';
  const { heightGiven } = study.cg;
  const powered = study.propeller !== undefined;
  return {
    name: 'forward limit by the nose wheel',
    reads: [
      ...coupleReads,
      ...fullUpReads,
      'rotation_weight',
      'landing_gear_ground_angle',
      'zero_lift_body_angle',
      'rest_position',
      'tail_position',
      'tail_download',
      'landing_gear_main_wheels',
      'landing_gear_below_datum',
      'mac_leading_edge',
      'mac',
      ...(powered ? ['thrust_moment', 'propeller_lift_at_zero_lift'] : []),
      ...(heightGiven ? ['cg_above_datum'] : []),
    ],
    writes: ['forward_limit_nose_wheel'],
    cost: 30,
    kernel: (count, inputs, [limit]) => {
      const [rest, byHeight, cl, whole, share, atZero, elevator, up, weightOnWing] = inputs;
      const [groundAngle, alpha, hr, ht, download, wheels, below, leadingEdge, mac] = inputs.slice(9);
      const [thrust, ofPropeller] = powered ? inputs.slice(18) : [];
      const cgHeight = heightGiven ? inputs[inputs.length - 1] : undefined;
      for (let row = 0; row < count; row++) {
        const weight = weightOnWing[row];
        const slope = whole[row] - share[row];
        const byAngle = slope * (groundAngle[row] - alpha[row]);
        const lift = byAngle + (powered ? ofPropeller[row] : 0);
        const fullUp = tailLiftAt(byAngle, slope, atZero[row], share[row], elevator[row], -up[row]);
        const ofThrust = powered ? thrust[row] : 0;
        const couples = couplesAt(rest[row], byHeight[row], cl[row], ofThrust, running, lift, weight);
        const overGround = below[row] + (cgHeight === undefined ? 0 : cgHeight[row]);
        limit[row] = forwardLimitByNoseWheel(
          weight,
          lift,
          Math.max(fullUp, download[row]),
          couples,
          hr[row],
          ht[row],
          (wheels[row] - leadingEdge[row]) / mac[row],
          (customaryRollingFriction * overGround) / mac[row],
        );
      }
    },
  };
}

/** Whether the nose wheel limits the CG in a condition: the gear has one, and the wing is near the ground. */
export function hasNoseWheelLimit({ landingGear }: Pick<Study, 'landingGear'>, { groundEffect }: Condition) {
  return landingGear?.kind === 'nose_wheel' && groundEffect;
}

/** Whether the pull to slow down limits the CG: the study says how great it may be. */
export function hasStickForceLimit(study: Pick<Study, 'control' | 'hinge' | 'inputs'>): boolean {
  return hasStickForces(study) && study.inputs.has('control.greatest_pull');
}

/** Forward limit by the pull that slows from the condition's trimmed speed to its stall. */
const stickForceStage: Stage = {
  name: 'forward limit by the stick force',
  reads: [
    'control_greatest_pull',
    'lift_coefficient',
    'maximum_lift',
    'stick_force_by_margin',
    'nil_force_at_stall',
  ],
  writes: ['forward_limit_stick_force'],
  cost: 8,
  kernel: (count, [pull, cl, maximum, byMargin, nil], [limit]) => {
    for (let row = 0; row < count; row++) {
      const ratio = Math.sqrt(cl[row] / maximum[row]);
      // The steps of spring and bobweight are in the point of nil force, so no force stands beside it.
      limit[row] =
        ratio < slowestRatio
          ? forwardLimitByStickForce(pull[row], ratio, byMargin[row], 1, nil[row], 0)
          : Number.NaN;
    }
  },
};

/** Forward limits of the CG in one condition, after its trim and stick forces. */
export function forwardLimitStages(study: Study, condition: Condition): Stage[] {
  return [
    stallStage(study, condition),
    downloadStage(study),
    stallLimitsStage(study),
    ...(hasNoseWheelLimit(study, condition) ? [rotationStage, noseWheelStage(study, condition)] : []),
    ...(hasStickForceLimit(study) ? [stickForceStage] : []),
  ];
}
