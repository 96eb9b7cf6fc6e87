import {
  aspectRatio,
  halfChord,
  meanAerodynamicChord,
  quarterChord,
  rootChordFromArea,
  spanFromAspectRatio,
  sweepTangentAt,
} from '../methods/planform.ts';
import { flapEffectiveness } from '../methods/section.ts';
import { areaFromVolume, tailVolume, vTailFactor } from '../methods/tail.ts';
import { tableAerodynamicCentre } from '../methods/wing-table.ts';
import type { Study } from '../study/study.ts';
import { liftSlopeBy } from './lift-slope.ts';
import type { Stage } from './stage.ts';

type TailStudy = Pick<Study, 'tail' | 'methods'>;

/** Arm and station of the tail: one is given, the other follows. */
export function tailPlaceStage({ tail }: TailStudy): Stage {
  const armGiven = tail.place === 'arm';
  return {
    name: 'tail place',
    reads: [armGiven ? 'tail_arm' : 'tail_station', 'quarter_mac_station'],
    writes: [armGiven ? 'tail_station' : 'tail_arm'],
    cost: 3,
    kernel: (count, [given, quarter], [other]) => {
      const sign = armGiven ? 1 : -1;
      for (let row = 0; row < count; row++) other[row] = given[row] + sign * quarter[row];
    },
  };
}

/** Area and volume of the tail: one is given, the other follows. Empty where the arm is not positive. */
export function tailSizeStage({ tail }: TailStudy): Stage {
  const areaGiven = tail.size === 'area';
  return {
    name: 'tail size',
    reads: [areaGiven ? 'tail_area' : 'tail_volume', 'tail_arm', 'wing_area', 'mac'],
    writes: [areaGiven ? 'tail_volume' : 'tail_area'],
    cost: 5,
    kernel: (count, [given, arm, S, mac], [other]) => {
      const formula = areaGiven ? tailVolume : areaFromVolume;
      for (let row = 0; row < count; row++) {
        other[row] = arm[row] > 0 ? formula(given[row], arm[row], S[row], mac[row]) : Number.NaN;
      }
    },
  };
}

export function tailPlanformStage({ tail }: TailStudy): Stage {
  const aspectRatioGiven = tail.planform === 'aspect_ratio';
  return {
    name: 'tail planform',
    reads: ['tail_area', aspectRatioGiven ? 'tail_aspect_ratio' : 'tail_span', 'tail_taper'],
    writes: [aspectRatioGiven ? 'tail_span' : 'tail_aspect_ratio', 'tail_root_chord', 'tail_mac'],
    cost: 15,
    kernel: (count, [area, given, taper], [other, rootChord, mac]) => {
      for (let row = 0; row < count; row++) {
        const span = aspectRatioGiven ? spanFromAspectRatio(area[row], given[row]) : given[row];
        other[row] = aspectRatioGiven ? span : aspectRatio(span, area[row]);
        rootChord[row] = rootChordFromArea(area[row], span, taper[row]);
        mac[row] = meanAerodynamicChord(rootChord[row], taper[row]);
      }
    },
  };
}

/** Lift-curve slope of the tail on its own. */
export function tailLiftStage({ tail, methods }: TailStudy): Stage {
  const slope = liftSlopeBy[methods.lift_slope];
  const sweepFrom = tail.sweep === 'quarter_chord' ? quarterChord : 0;
  const vTail = tail.layout === 'V';
  const reads = [
    'tail_aspect_ratio',
    'tail_taper',
    `tail_sweep_${tail.sweep}`,
    'tail_section_lift_slope',
    'mach',
  ];
  return {
    name: 'tail lift slope',
    reads: vTail ? [...reads, 'tail_v_angle'] : reads,
    writes: ['tail_lift_slope'],
    cost: 100,
    kernel: (count, [A, taper, sweep, a0, mach, vAngle], [a]) => {
      for (let row = 0; row < count; row++) {
        const tangent = Math.tan(sweep[row]);
        const quarter = Math.atan(sweepTangentAt(tangent, sweepFrom, quarterChord, A[row], taper[row]));
        const half = Math.atan(sweepTangentAt(tangent, sweepFrom, halfChord, A[row], taper[row]));
        const flat = slope(A[row], taper[row], quarter, half, a0[row], mach[row]);
        a[row] = vTail ? flat * vTailFactor(vAngle[row]) : flat;
      }
    },
  };
}

/** Aerodynamic centre of the tail on its own MAC. */
export function tailCentreStage({ tail, methods }: TailStudy): Stage {
  const sweepFrom = tail.sweep === 'quarter_chord' ? quarterChord : 0;
  const useTable = methods.aerodynamic_centre === 'table';
  return {
    name: 'tail aerodynamic centre',
    reads: ['tail_aspect_ratio', 'tail_taper', `tail_sweep_${tail.sweep}`, 'tail_section_aerodynamic_centre'],
    writes: ['tail_aerodynamic_centre'],
    cost: 100,
    kernel: (count, [A, taper, sweep, section], [centre]) => {
      for (let row = 0; row < count; row++) {
        if (!useTable) {
          centre[row] = section[row];
          continue;
        }
        const tangent = Math.tan(sweep[row]);
        const quarter = Math.atan(sweepTangentAt(tangent, sweepFrom, quarterChord, A[row], taper[row]));
        centre[row] = tableAerodynamicCentre(A[row], taper[row], quarter) + section[row] - quarterChord;
      }
    },
  };
}

/** Effectiveness of the elevator: thin-aerofoil theory times the stated ratio and the span fraction. */
export function elevatorStage({ tail }: TailStudy): Stage {
  if (tail.allMoving) {
    return {
      name: 'elevator',
      reads: [],
      writes: ['elevator_effectiveness'],
      cost: 1,
      kernel: (count, _, [tau]) => {
        tau.fill(1, 0, count);
      },
    };
  }
  return {
    name: 'elevator',
    reads: [
      'tail_elevator_chord_fraction',
      'tail_elevator_span_fraction',
      'tail_elevator_effectiveness_ratio',
    ],
    writes: ['elevator_effectiveness'],
    cost: 20,
    kernel: (count, [chord, span, ratio], [tau]) => {
      for (let row = 0; row < count; row++) tau[row] = flapEffectiveness(chord[row]) * span[row] * ratio[row];
    },
  };
}
