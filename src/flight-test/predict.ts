/** What the study says of the flown aeroplane, at the study's own fixed values. */
import { conditionFigureName } from '../figures/condition-figures.ts';
import { elevatorLiftSlope, elevatorSlopeToTrim, elevatorToTrim } from '../methods/trim.ts';
import { baselineInputs, buildStages } from '../stages/build-stages.ts';
import { runOnce } from '../stages/run-once.ts';
import type { Condition, Study } from '../study/study.ts';
import type { PointKind } from './measure.ts';
import type { FlownWing } from './read-data.ts';

/** A line of the control against lift coefficient, SI. */
export interface PredictedLine {
  readonly slope: number;
  /** NaN where the study does not settle it, as a trim tab's setting. */
  readonly atNoLift: number;
}

export interface PredictedPoint {
  /** CG at which the control goes flat: at idle the neutral point; NaN where the study gives none [-]. */
  readonly at: number;
  readonly lineAt: (cg: number) => PredictedLine;
}

export interface Prediction {
  readonly condition: Condition;
  readonly wing: FlownWing;
  readonly of: Readonly<Record<PointKind, PredictedPoint>>;
}

/** A figure in the condition, or the one that all conditions share; NaN where the study does not have it. */
type Figures = (name: string) => number;

/** Figures that are worked out because something names them, which a study's own columns may not. */
const wanted = ['trim_slope_limit', 'zero_lift_moment', 'neutral_point_free_stick', 'stick_force_scale'];

/** The study's baseline in one condition. Its own correction is left out: a new one is found against the bare estimate. */
export function predict({ corrections: _, ...study }: Study, condition: Condition): Prediction {
  const values = runOnce(buildStages({ ...study, columns: wanted }), baselineInputs(study));
  const figure: Figures = (name) =>
    values.get(conditionFigureName(name, condition)) ?? values.get(name) ?? Number.NaN;
  return {
    condition,
    wing: { area: figure('wing_area'), mac: figure('mac'), macLeadingEdge: figure('mac_leading_edge') },
    of: { 'stick-fixed': stickFixed(figure), 'stick-free': stickFree(figure) },
  };
}

/** The first of two that is a number. */
function either(first: number, second: number): number {
  return Number.isNaN(first) ? second : first;
}

/** Studies without control figures give the neutral point and the slopes, but not the elevator at a lift. */
function stickFixed(figure: Figures): PredictedPoint {
  const neutralPoint = either(figure('neutral_point_level'), figure('neutral_point'));
  const coupleSlope = either(figure('couple_slope'), 0);
  const tailPosition = figure('tail_position');
  const elevatorSlope = either(
    figure('elevator_lift_slope'),
    elevatorLiftSlope(
      figure('tail_lift_slope'),
      either(figure('tail_pressure_ratio'), figure('tail_dynamic_pressure_ratio')),
      figure('tail_area') / figure('wing_area'),
      figure('elevator_effectiveness'),
    ),
  );
  const lift = figure('lift_coefficient');
  const moment = figure('zero_lift_moment');
  return {
    at: either(figure('trim_slope_limit'), figure('neutral_point')),
    lineAt: (cg) => {
      const slope = elevatorSlopeToTrim(cg, neutralPoint, elevatorSlope, tailPosition, coupleSlope);
      const atLift = elevatorToTrim(lift, cg, moment, neutralPoint, elevatorSlope, tailPosition);
      return { slope, atNoLift: atLift - slope * lift };
    },
  };
}

/** Freeing the stick moves the CG of flat force as it moves the neutral point. */
function stickFree(figure: Figures): PredictedPoint {
  const byCouples = either(figure('trim_slope_limit'), figure('neutral_point')) - figure('neutral_point');
  const at = figure('neutral_point_free_stick') + byCouples;
  return {
    at,
    lineAt: (cg) => ({ slope: figure('stick_force_scale') * (cg - at), atNoLift: Number.NaN }),
  };
}
