import type { Condition } from '../study/study.ts';
import { controlFigures } from './catalogue/control-figures.ts';

/**
 * Figures that each flight condition has of its own. With several conditions a study has one of each
 * per condition (`neutral_point_cruise`), and the plain name is that of the condition which governs
 * the aft margin.
 */
const conditionFigures: ReadonlySet<string> = new Set([
  'density_ratio',
  'mach',
  'lift_coefficient',
  'wing_lift_slope',
  'wing_body_lift_slope',
  'wing_lift_slope_ratio',
  'root_angle_of_attack',
  'wake_height',
  'downwash_torenbeek',
  'downwash_handbook',
  'downwash_gradient',
  'body_moment_forward',
  'body_moment_slope',
  'body_wing_place',
  'tail_lift_slope',
  'tail_lift_share',
  'lift_slope',
  'neutral_point_wing',
  'neutral_point_tail',
  'neutral_point_body',
  'neutral_point_height',
  'neutral_point_height_lift',
  'neutral_point_height_datum',
  'neutral_point',
  'neutral_point_station',
  'static_margin_forward',
  'static_margin_aft',
  'outside_fitted_range',
  'maximum_lift',
  'stall_speed',
  'flap_zero_lift_change',
  'flap_moment',
  'flap_maximum_lift',
  'flap_downwash',
  'wing_lift_slope_away',
  'ground_induction',
  'thrust_coefficient',
  'thrust_on_wing',
  'propeller_inflow',
  'propeller_normal_slope',
  'propeller_stream_gradient',
  'tail_pressure_ratio',
  'tail_downwash_gradient',
  'lift_slope_rest',
  'propeller_lift_share',
  'propeller_position',
  'tail_position',
  'neutral_point_rest',
  'neutral_point_propeller',
  'neutral_point_correction',
]);

/** Figures of control that belong to the aeroplane, or to all conditions together. */
const controlOfAll: ReadonlySet<string> = new Set([
  'wing_twist_couple',
  'body_couple_slope',
  'tail_elevator_area',
  'tail_elevator_chord',
  'stick_force_at_limit_load',
  'limit_load_force_margin',
  'temporary_force_margin',
  'control_limit_forward',
  'control_limit_condition',
  'control_limit_kind',
  'control_margin_forward',
]);

function isOfCondition(name: string): boolean {
  return conditionFigures.has(name) || (Object.hasOwn(controlFigures, name) && !controlOfAll.has(name));
}

/** Bits of the single range checks, which the flags are gathered from. */
const rangeBit = /^range_bit_/;

export function isConditionFigure(name: string): boolean {
  return isOfCondition(name) || rangeBit.test(name);
}

/** Whether a figure of a condition is in the catalogue; bits of single checks are not. */
export function isTabledFigure(name: string): boolean {
  return isOfCondition(name);
}

/** `neutral_point` in the condition `cruise` → `neutral_point_cruise`. */
export function conditionFigureName(name: string, { name: condition }: Condition): string {
  return `${name}_${condition.replaceAll(/[^A-Za-z0-9]+/g, '_')}`;
}
