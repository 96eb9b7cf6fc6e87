import { dynamicPressureAtLift } from '../methods/atmosphere.ts';
import { freeStickFactor, springStep, stickForceScale, stickFreeStep } from '../methods/free-stick.ts';
import {
  sectionHingeSlopeByAngle,
  sectionHingeSlopeByElevator,
  tailHingeSlopeByAngle,
  tailHingeSlopeByElevator,
} from '../methods/hinge-moment.ts';
import { staticMargin } from '../methods/neutral-point.ts';
import { vTailFactor } from '../methods/tail.ts';
import type { Study } from '../study/study.ts';
import { pressureRatioFigure } from './propeller.ts';
import type { Stage } from './stage.ts';

/** At this lift coefficient dynamic pressure and wing loading are one. */
const unitLift = 1;

/** Size of the elevator behind its hinge, where the study does not give it. */
export function elevatorSizeStage({ tail, inputs }: Study): Stage {
  const writes = ['area', 'chord'].map((key) =>
    inputs.has(`tail.elevator.${key}`) ? null : `tail_elevator_${key}`,
  );
  if (tail.allMoving) {
    return {
      name: 'size of the all-moving tail',
      reads: ['tail_area', 'tail_mac'],
      writes,
      cost: 2,
      kernel: (count, [St, ct], [area, chord]) => {
        for (let row = 0; row < count; row++) {
          area[row] = St[row];
          chord[row] = ct[row];
        }
      },
    };
  }
  return {
    name: 'size of the elevator',
    reads: ['tail_area', 'tail_span', 'tail_elevator_chord_fraction', 'tail_elevator_span_fraction'],
    writes,
    cost: 3,
    kernel: (count, [St, bt, chordFraction, spanFraction], [area, chord]) => {
      for (let row = 0; row < count; row++) {
        area[row] = chordFraction[row] * spanFraction[row] * St[row];
        chord[row] = (chordFraction[row] * St[row]) / bt[row];
      }
    },
  };
}

/** Hinge-moment slopes of the tail: as given, or by thin-aerofoil theory and the tail's own lift slope. */
function hingeStage({ hinge, tail, inputs }: Study): Stage {
  const writes = ['hinge_slope_alpha', 'hinge_slope_delta'];
  if (hinge === 'given') {
    const path = 'tail.elevator.hinge.delta';
    const delta = inputs.has(path) ? 'tail_elevator_hinge_delta' : 'tail_elevator_hinge_alpha';
    return {
      name: 'hinge moments as given',
      reads: ['tail_elevator_hinge_alpha', delta],
      writes,
      cost: 1,
      kernel: (count, [alpha, delta], [byAngle, byElevator]) => {
        byAngle.set(alpha.subarray(0, count));
        byElevator.set(delta.subarray(0, count));
      },
    };
  }
  const vTail = tail.layout === 'V';
  return {
    name: 'hinge moments by theory',
    reads: [
      'tail_elevator_chord_fraction',
      'tail_elevator_hinge_alpha_factor',
      'tail_elevator_hinge_delta_factor',
      'tail_lift_slope',
      'tail_section_lift_slope',
      'elevator_effectiveness',
      ...(vTail ? ['tail_v_angle'] : []),
    ],
    writes,
    cost: 90,
    kernel: (count, [chord, ka, kd, at, a0, tau, vAngle], [byAngle, byElevator]) => {
      for (let row = 0; row < count; row++) {
        const ofPanels = vTail ? at[row] / vTailFactor(vAngle[row]) : at[row];
        const section = sectionHingeSlopeByAngle(chord[row], ka[row]);
        const sectionDelta = sectionHingeSlopeByElevator(chord[row], kd[row]);
        byAngle[row] = tailHingeSlopeByAngle(section, ofPanels, a0[row]);
        byElevator[row] = tailHingeSlopeByElevator(sectionDelta, section, tau[row], ofPanels, a0[row]);
      }
    },
  };
}

const factorStage: Stage = {
  name: 'free stick',
  reads: [
    'elevator_effectiveness',
    'hinge_slope_alpha',
    'hinge_slope_delta',
    'neutral_point_level',
    'tail_position',
    'tail_lift_share',
    'lift_slope',
  ],
  writes: ['free_stick_factor', 'free_stick_step'],
  cost: 6,
  kernel: (count, [tau, alpha, delta, hn, ht, share, whole], [factor, step]) => {
    for (let row = 0; row < count; row++) {
      factor[row] = freeStickFactor(tau[row], alpha[row], delta[row]);
      step[row] = stickFreeStep(hn[row], ht[row], share[row], whole[row], factor[row]);
    }
  },
};

/** Scale of stick forces, wing loading, and how far spring and bobweight move the points of nil force. */
function scaleStage(study: Study): Stage {
  return {
    name: 'scale of stick forces',
    reads: [
      'control_gearing',
      pressureRatioFigure(study),
      'tail_elevator_area',
      'tail_elevator_chord',
      'hinge_slope_delta',
      'elevator_lift_slope',
      'tail_position',
      'neutral_point_level',
      'free_stick_step',
      'mass',
      'wing_area',
      'control_spring',
      'control_bobweight',
    ],
    writes: ['stick_force_scale', 'stick_force_by_margin', 'spring_step', 'bobweight_step'],
    cost: 12,
    kernel: (
      count,
      [gearing, eta, area, chord, delta, slope, ht, hn, step, mass, S, spring, bobweight],
      [scale, byMargin, bySpring, byBobweight],
    ) => {
      for (let row = 0; row < count; row++) {
        const size = area[row] * chord[row];
        const free = hn[row] + step[row];
        const K = stickForceScale(gearing[row], eta[row], size, delta[row], slope[row], ht[row], free);
        const wingLoading = dynamicPressureAtLift(mass[row], unitLift, S[row]);
        scale[row] = K;
        byMargin[row] = K * wingLoading;
        // At 1 g a bobweight pulls as a spring does.
        bySpring[row] = springStep(spring[row] + bobweight[row], K, wingLoading);
        byBobweight[row] = springStep(bobweight[row], K, wingLoading);
      }
    },
  };
}

/** Neutral point and margins with the stick free. */
function marginsStage({ control }: Study): Stage {
  const sprung = control !== undefined;
  return {
    name: 'margins with free stick',
    reads: ['neutral_point', 'free_stick_step', 'cg_forward', 'cg_aft', ...(sprung ? ['spring_step'] : [])],
    writes: ['neutral_point_free_stick', 'static_margin_free_stick_forward', 'static_margin_free_stick_aft'],
    cost: 4,
    kernel: (count, [hn, step, forward, aft, spring], [point, marginForward, marginAft]) => {
      for (let row = 0; row < count; row++) {
        const free = hn[row] + step[row] + (sprung ? spring[row] : 0);
        const reversed = forward[row] > aft[row];
        point[row] = free;
        marginForward[row] = reversed ? Number.NaN : staticMargin(free, forward[row]);
        marginAft[row] = reversed ? Number.NaN : staticMargin(free, aft[row]);
      }
    },
  };
}

/** Whether stick forces are worked out: they need a pitch control and hinge moments. */
export function hasStickForces({ control, hinge }: Pick<Study, 'control' | 'hinge'>): boolean {
  return control !== undefined && hinge !== 'none';
}

/** Free stick in one condition, after its trim; none where nothing is known of the hinge moments. */
export function freeStickStages(study: Study): Stage[] {
  if (study.hinge === 'none') return [];
  return [
    hingeStage(study),
    factorStage,
    ...(hasStickForces(study) ? [scaleStage(study)] : []),
    marginsStage(study),
  ];
}
