import { bodyCarryOver } from '../methods/lift-slope.ts';
import { quarterChord } from '../methods/planform.ts';
import { tableAerodynamicCentre, tableSpanEfficiency } from '../methods/wing-table.ts';
import type { Study } from '../study/study.ts';
import { liftSlopeBy } from './lift-slope.ts';
import type { Stage } from './stage.ts';

type MethodsStudy = Pick<Study, 'methods'>;

/**
 * Lift-curve slope of the wing alone.
 * @param figure written: `wing_lift_slope`, or `wing_lift_slope_away` where the ground changes it afterwards
 */
export function wingLiftStage({ methods }: MethodsStudy, figure = 'wing_lift_slope'): Stage {
  const slope = liftSlopeBy[methods.lift_slope];
  return {
    name: 'wing lift slope',
    reads: [
      'wing_aspect_ratio',
      'wing_formula_taper',
      'wing_formula_sweep',
      'wing_formula_sweep_half_chord',
      'wing_section_lift_slope',
      'mach',
    ],
    writes: [figure],
    cost: 80,
    kernel: (count, [A, taper, sweep, sweepHalf, a0, mach], [a]) => {
      for (let row = 0; row < count; row++) {
        a[row] = slope(A[row], taper[row], sweep[row], sweepHalf[row], a0[row], mach[row]);
      }
    },
  };
}

export const carryOverStage: Stage = {
  name: 'body carry-over',
  reads: ['wing_lift_slope', 'wing_span', 'body_width_at_wing'],
  writes: ['wing_body_lift_slope'],
  cost: 5,
  kernel: (count, [a, span, width], [withBody]) => {
    for (let row = 0; row < count; row++) withBody[row] = a[row] * bodyCarryOver(width[row] / span[row]);
  },
};

/** Aerodynamic centre by both methods, the one used, and span efficiency. */
export function wingCentreStage({ methods }: MethodsStudy): Stage {
  const useTable = methods.aerodynamic_centre === 'table';
  return {
    name: 'wing aerodynamic centre',
    reads: [
      'wing_aspect_ratio',
      'wing_formula_taper',
      'wing_formula_sweep',
      'wing_section_aerodynamic_centre',
    ],
    writes: [
      'span_efficiency',
      'wing_aerodynamic_centre_table',
      'wing_aerodynamic_centre_quarter_mac',
      'wing_aerodynamic_centre',
    ],
    cost: 300,
    kernel: (count, [A, taper, sweep, section], [efficiency, byTable, byQuarter, used]) => {
      for (let row = 0; row < count; row++) {
        const sectionShift = section[row] - quarterChord;
        efficiency[row] = tableSpanEfficiency(A[row], taper[row], sweep[row]);
        byTable[row] = tableAerodynamicCentre(A[row], taper[row], sweep[row]) + sectionShift;
        byQuarter[row] = quarterChord + sectionShift;
        used[row] = useTable ? byTable[row] : byQuarter[row];
      }
    },
  };
}

export const centreStationStage: Stage = {
  name: 'aerodynamic centre station',
  reads: ['mac_leading_edge', 'mac', 'wing_aerodynamic_centre'],
  writes: ['aerodynamic_centre_station'],
  cost: 5,
  kernel: (count, [leadingEdge, mac, centre], [station]) => {
    for (let row = 0; row < count; row++) station[row] = leadingEdge[row] + centre[row] * mac[row];
  },
};
