import { groundDownwashFactor } from '../methods/ground-effect.ts';
import { propellerLiftShare } from '../methods/propeller.ts';
import { elevatorLiftSlope, tailLiftAtWingZeroLift } from '../methods/trim.ts';
import type { Condition, Study } from '../study/study.ts';
import { pressureRatioFigure } from './propeller.ts';
import type { Stage } from './stage.ts';

const onePropeller = 1;

/** The body's angle at nil wing lift, and the couples there: wing sections, washout, flaps, body, tail section. */
function couplesStages(study: Study): Stage[] {
  const { flaps } = study;
  const angle: Stage = {
    name: 'angle at nil wing lift',
    reads: [
      'wing_section_zero_lift_angle',
      'wing_washout',
      'mac_spanwise_station',
      'wing_span',
      'wing_incidence',
      ...(flaps === undefined ? [] : ['flap_zero_lift_change']),
    ],
    writes: ['zero_lift_body_angle'],
    cost: 5,
    kernel: (count, [section, washout, macStation, span, incidence, byFlaps], [alpha]) => {
      for (let row = 0; row < count; row++) {
        const ofRoot = section[row] + (washout[row] * 2 * macStation[row]) / span[row];
        alpha[row] = ofRoot + (byFlaps === undefined ? 0 : byFlaps[row]) - incidence[row];
      }
    },
  };
  const couples: Stage = {
    name: 'couples at nil wing lift',
    reads: [
      'wing_section_moment',
      'wing_twist_couple',
      'wing_lift_slope',
      'body_couple_slope',
      'zero_lift_body_angle',
      'tail_section_moment',
      pressureRatioFigure(study),
      'tail_area',
      'tail_mac',
      'wing_area',
      'mac',
      ...(flaps === undefined ? [] : ['flap_moment']),
    ],
    writes: ['zero_lift_couples'],
    cost: 10,
    kernel: (count, [section, twist, a, body, alpha, tail, eta, St, ct, S, c, byFlaps], [sum]) => {
      for (let row = 0; row < count; row++) {
        const ofTail = (tail[row] * eta[row] * St[row] * ct[row]) / (S[row] * c[row]);
        const ofFlaps = byFlaps === undefined ? 0 : byFlaps[row];
        sum[row] = section[row] + a[row] * twist[row] + ofFlaps + body[row] * alpha[row] + ofTail;
      }
    },
  };
  return [angle, couples];
}

/**
 * Downwash at the tail at nil wing lift: what part-span flaps leave, less near the ground, and what the
 * slipstream is turned by the propeller's own angle.
 */
function downwashStage(study: Study, { groundEffect }: Condition): Stage {
  const byFlaps = study.flaps !== undefined;
  const powered = study.propeller !== undefined;
  const slipstream = [
    'downwash_gradient',
    'tail_downwash_gradient',
    'propeller_stream_gradient',
    'zero_lift_body_angle',
  ];
  const ground = ['conditions_1_wing_above_ground', 'tail_above_wing_root_chord', 'wing_span'];
  return {
    name: 'downwash at nil wing lift',
    reads: [
      ...(byFlaps ? ['flap_downwash'] : []),
      ...(powered ? slipstream : []),
      ...(groundEffect ? ground : []),
    ],
    writes: ['zero_lift_downwash'],
    cost: 12,
    kernel: (count, inputs, [downwash]) => {
      const [extra] = byFlaps ? inputs : [];
      const [gradient, withStream, stream, alpha] = powered ? inputs.slice(byFlaps ? 1 : 0) : [];
      const [wing, above, span] = groundEffect ? inputs.slice(-ground.length) : [];
      for (let row = 0; row < count; row++) {
        const near = groundEffect ? groundDownwashFactor(wing[row], wing[row] + above[row], span[row]) : 1;
        const ofFlaps = byFlaps ? near * extra[row] : 0;
        // Turned per angle of the propeller, which at nil wing lift is the body's: no upwash, no downwash.
        const turned = powered ? (withStream[row] - near * gradient[row]) / stream[row] : 0;
        downwash[row] = powered ? ofFlaps + turned * alpha[row] : ofFlaps;
      }
    },
  };
}

/** Lift of the tail at nil wing lift with the elevator straight. */
function tailStage(study: Study): Stage {
  return {
    name: 'tail at nil wing lift',
    reads: [
      'tail_lift_slope',
      pressureRatioFigure(study),
      'tail_area',
      'wing_area',
      'zero_lift_body_angle',
      'tail_incidence',
      'tail_section_zero_lift_angle',
      'zero_lift_downwash',
    ],
    writes: ['tail_lift_at_zero_lift'],
    cost: 6,
    kernel: (count, [at, eta, St, S, alpha, incidence, zeroLift, downwash], [lift]) => {
      for (let row = 0; row < count; row++) {
        // The body's angle at nil wing lift is the wing's zero-lift angle less its incidence.
        lift[row] = tailLiftAtWingZeroLift(
          at[row],
          eta[row],
          St[row] / S[row],
          alpha[row],
          0,
          incidence[row] - zeroLift[row],
          downwash[row],
        );
      }
    },
  };
}

/** Normal force of the propeller at nil wing lift: there is no upwash or downwash of the wing then. */
const propellerStage: Stage = {
  name: 'propeller at nil wing lift',
  reads: ['propeller_normal_slope', 'propeller_diameter', 'wing_area', 'zero_lift_body_angle'],
  writes: ['propeller_lift_at_zero_lift'],
  cost: 5,
  kernel: (count, [slope, diameter, S, alpha], [lift]) => {
    for (let row = 0; row < count; row++) {
      lift[row] = propellerLiftShare(onePropeller, slope[row], diameter[row], S[row], 1) * alpha[row];
    }
  },
};

/** Lift by the elevator. The panels of a V-tail turn about their own hinges: only one cosine of their angle counts. */
function elevatorStage(study: Study): Stage {
  const vTail = study.tail.layout === 'V';
  return {
    name: 'lift by the elevator',
    reads: [
      'tail_lift_slope',
      pressureRatioFigure(study),
      'tail_area',
      'wing_area',
      'elevator_effectiveness',
      ...(vTail ? ['tail_v_angle'] : []),
    ],
    writes: ['elevator_lift_slope'],
    cost: 5,
    kernel: (count, [at, eta, St, S, tau, vAngle], [slope]) => {
      for (let row = 0; row < count; row++) {
        const ofPanels = vTail ? at[row] / Math.cos(vAngle[row]) : at[row];
        slope[row] = elevatorLiftSlope(ofPanels, eta[row], St[row] / S[row], tau[row]);
      }
    },
  };
}

/** What the aeroplane does at nil wing lift, and what its elevator does, in one condition. */
export function zeroLiftStages(study: Study, condition: Condition): Stage[] {
  return [
    ...couplesStages(study),
    downwashStage(study, condition),
    tailStage(study),
    ...(study.propeller === undefined ? [] : [propellerStage]),
    elevatorStage(study),
  ];
}
