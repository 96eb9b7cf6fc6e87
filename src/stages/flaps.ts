import {
  flapEffectivenessRatio,
  flapExtraDownwash,
  flapMaximumLiftChange,
  flapMomentChange,
  flapZeroLiftChange,
  wingMomentChange,
  wingZeroLiftChange,
} from '../methods/flaps.ts';
import { areaFractionBetween } from '../methods/planform.ts';
import type { Condition, Study } from '../study/study.ts';
import { nilStage } from './nil.ts';
import type { Stage } from './stage.ts';

type FlapStudy = Pick<Study, 'flaps'>;

const flapFigures = ['flap_zero_lift_change', 'flap_moment', 'flap_maximum_lift'] as const;

/** What the flaps do to the wing in one condition; nothing when they are up. None when there are no flaps. */
export function flapStages({ flaps }: FlapStudy, { flapsDown }: Condition): Stage[] {
  if (flaps === undefined) return [];
  if (!flapsDown) return [nilStage('flaps up', flapFigures)];
  return [flaps.as === 'increments' ? incrementsStage : sectionStage(flaps.kind)];
}

/** Own increments at a stated deflection, linear in deflection. */
const incrementsStage: Stage = {
  name: 'flaps, own increments',
  reads: [
    'conditions_1_flaps',
    'wing_flaps_at',
    'wing_flaps_zero_lift_angle',
    'wing_flaps_moment',
    'wing_flaps_maximum_lift',
  ],
  writes: [...flapFigures],
  cost: 10,
  kernel: (count, [deflection, at, zeroLift, moment, lift], [byZeroLift, byMoment, byLift]) => {
    for (let row = 0; row < count; row++) {
      const share = deflection[row] / at[row];
      byZeroLift[row] = share * zeroLift[row];
      byMoment[row] = share * moment[row];
      byLift[row] = share * lift[row];
    }
  },
};

function sectionStage(kind: 'plain' | 'slotted'): Stage {
  return {
    name: `${kind} flaps`,
    reads: [
      'conditions_1_flaps',
      'wing_flaps_chord_fraction',
      'wing_flaps_span_from',
      'wing_flaps_span_to',
      'wing_formula_taper',
    ],
    writes: [...flapFigures],
    cost: 80,
    kernel: (count, [deflection, chord, from, to, taper], [byZeroLift, byMoment, byLift]) => {
      for (let row = 0; row < count; row++) {
        const ratio = flapEffectivenessRatio(kind, deflection[row]);
        const zeroLift = flapZeroLiftChange(chord[row], deflection[row], ratio);
        const moment = flapMomentChange(chord[row], deflection[row], ratio);
        const flapped = areaFractionBetween(from[row], to[row], taper[row]);
        byZeroLift[row] = wingZeroLiftChange(zeroLift, from[row], to[row], taper[row]);
        byMoment[row] = wingMomentChange(moment, from[row], to[row], taper[row]);
        byLift[row] = flapMaximumLiftChange(kind, deflection[row]) * flapped;
      }
    },
  };
}

/** Downwash at the tail that does not vanish with the wing's lift, of part-span flaps. */
export function flapDownwashStages({ flaps }: FlapStudy, { flapsDown }: Condition): Stage[] {
  if (flaps === undefined) return [];
  if (!flapsDown) return [nilStage('no downwash by flaps', ['flap_downwash'])];
  if (flaps.as === 'increments') {
    return [
      {
        name: 'downwash by flaps, own increment',
        reads: ['conditions_1_flaps', 'wing_flaps_at', 'wing_flaps_downwash'],
        writes: ['flap_downwash'],
        cost: 3,
        kernel: (count, [deflection, at, downwash], [by]) => {
          for (let row = 0; row < count; row++) by[row] = (deflection[row] / at[row]) * downwash[row];
        },
      },
    ];
  }
  return [
    {
      name: 'downwash by flaps',
      reads: ['downwash_gradient', 'flap_zero_lift_change', 'wing_flaps_span_to'],
      writes: ['flap_downwash'],
      cost: 5,
      kernel: (count, [gradient, zeroLift, to], [by]) => {
        for (let row = 0; row < count; row++)
          by[row] = flapExtraDownwash(gradient[row], zeroLift[row], to[row]);
      },
    },
  ];
}
