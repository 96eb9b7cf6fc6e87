import { thrustMoment, thrustMomentSlopeAtPower } from '../methods/propeller.ts';
import {
  elevatorSlopeToTrim,
  elevatorToTrim,
  restPosition,
  tailLiftCoefficient,
  tailLiftToTrim,
  trimSlopeLimit,
  verticalPositionMoment,
  zeroLiftMoment,
} from '../methods/trim.ts';
import type { Condition, Study } from '../study/study.ts';
import { pressureRatioFigure } from './propeller.ts';
import type { Stage } from './stage.ts';

/** Moment of the thrust about the CG; about the datum line where the study does not give the CG's height. */
function thrustStage({ cg }: Study): Stage {
  return {
    name: 'moment of the thrust',
    reads: ['thrust_on_wing', 'propeller_above_datum', 'mac', ...(cg.heightGiven ? ['cg_above_datum'] : [])],
    writes: ['thrust_moment'],
    cost: 3,
    kernel: (count, [thrust, line, mac, cgHeight], [moment]) => {
      for (let row = 0; row < count; row++) {
        const height = line[row] - (cgHeight === undefined ? 0 : cgHeight[row]);
        // + 0: a thrust line through the CG gives 0, not −0.
        moment[row] = thrustMoment(thrust[row], height / mac[row]) + 0;
      }
    },
  };
}

/**
 * How the couples that change with lift do so along level flight: height, and thrust at constant power. An
 * idling propeller's thrust coefficient does not change.
 */
function coupleSlopeStage(study: Study, { power }: Condition): Stage {
  const running = study.propeller !== undefined && power === 'fraction';
  return {
    name: 'slope of the couples',
    reads: ['neutral_point_height_lift', ...(running ? ['thrust_moment', 'lift_coefficient'] : [])],
    writes: ['couple_slope'],
    cost: 3,
    kernel: (count, [byHeight, byThrust, cl], [slope]) => {
      for (let row = 0; row < count; row++) {
        const ofThrust = running ? thrustMomentSlopeAtPower(byThrust[row], cl[row]) : 0;
        slope[row] = ofThrust - byHeight[row];
      }
    },
  };
}

/**
 * The balance of moments: the neutral point without the step by height that grows with lift, the place of
 * all but the tail, the moment at nil lift, and the couples that act beside the lift of all but the tail.
 */
function balanceStage({ propeller }: Study): Stage {
  const powered = propeller !== undefined;
  return {
    name: 'balance of moments',
    reads: [
      'neutral_point',
      'neutral_point_height_lift',
      'lift_slope',
      'tail_lift_share',
      'tail_position',
      'zero_lift_couples',
      'tail_lift_at_zero_lift',
      'lift_coefficient',
      ...(powered ? ['thrust_moment', 'propeller_lift_at_zero_lift', 'propeller_position'] : []),
    ],
    writes: ['neutral_point_level', 'rest_position', 'zero_lift_moment', 'rest_couples'],
    cost: 15,
    kernel: (
      count,
      [point, byHeight, whole, share, ht, couples, tailLift, cl, byThrust, liftP, hp],
      [level, rest, moment, restCouples],
    ) => {
      for (let row = 0; row < count; row++) {
        const hn = point[row] - byHeight[row];
        const hr = restPosition(hn, whole[row], ht[row], share[row]);
        const atLift = verticalPositionMoment(byHeight[row], cl[row]) + (powered ? byThrust[row] : 0);
        const fixed = couples[row] + atLift;
        level[row] = hn;
        rest[row] = hr;
        moment[row] = zeroLiftMoment(fixed, tailLift[row], ht[row], hn);
        restCouples[row] = couples[row];
        if (powered) {
          moment[row] += zeroLiftMoment(0, liftP[row], hp[row], hn);
          restCouples[row] += zeroLiftMoment(0, liftP[row], hp[row], hr);
        }
      }
    },
  };
}

const ends = ['forward', 'aft'] as const;

/** Elevator to trim and its slope at one end of the loading range. */
function elevatorStage(end: (typeof ends)[number]): Stage {
  return {
    name: `elevator to trim, ${end} CG`,
    reads: [
      'lift_coefficient',
      `cg_${end}`,
      'zero_lift_moment',
      'neutral_point_level',
      'elevator_lift_slope',
      'tail_position',
      'couple_slope',
    ],
    writes: [`elevator_to_trim_${end}`, `elevator_slope_${end}`],
    cost: 8,
    kernel: (count, [cl, h, moment, hn, slope, ht, coupleSlope], [angle, gradient]) => {
      for (let row = 0; row < count; row++) {
        angle[row] = elevatorToTrim(cl[row], h[row], moment[row], hn[row], slope[row], ht[row]);
        gradient[row] = elevatorSlopeToTrim(h[row], hn[row], slope[row], ht[row], coupleSlope[row]);
      }
    },
  };
}

const slopeLimitStage: Stage = {
  name: 'trim slope limit',
  reads: ['neutral_point_level', 'couple_slope'],
  writes: ['trim_slope_limit'],
  cost: 2,
  kernel: (count, [hn, slope], [limit]) => {
    for (let row = 0; row < count; row++) limit[row] = trimSlopeLimit(hn[row], slope[row]);
  },
};

/** Lift coefficient of the tail at trim with the foremost CG. */
function tailLiftStage(study: Study): Stage {
  const powered = study.propeller !== undefined;
  return {
    name: 'lift of the tail at trim',
    reads: [
      'lift_coefficient',
      'cg_forward',
      'rest_couples',
      'rest_position',
      'tail_position',
      'neutral_point_height_lift',
      pressureRatioFigure(study),
      'tail_area',
      'wing_area',
      ...(powered ? ['thrust_moment'] : []),
    ],
    writes: ['tail_lift_coefficient_forward'],
    cost: 8,
    kernel: (count, [cl, h, rest, hr, ht, byHeight, eta, St, S, byThrust], [coefficient]) => {
      for (let row = 0; row < count; row++) {
        const couples =
          rest[row] + verticalPositionMoment(byHeight[row], cl[row]) + (powered ? byThrust[row] : 0);
        const lift = tailLiftToTrim(cl[row], h[row], couples, hr[row], ht[row]);
        coefficient[row] = tailLiftCoefficient(lift, eta[row], St[row] / S[row]);
      }
    },
  };
}

/** Trim in one condition, after what the aeroplane does at nil wing lift. */
export function trimStages(study: Study, condition: Condition): Stage[] {
  return [
    ...(study.propeller === undefined ? [] : [thrustStage(study)]),
    coupleSlopeStage(study, condition),
    balanceStage(study),
    ...ends.map(elevatorStage),
    slopeLimitStage,
    tailLiftStage(study),
  ];
}
