/** What the study says of the flown aeroplane, at the study's own fixed values. */
import { conditionFigureName } from '../figures/condition-figures.ts';
import { elevatorLiftSlope, elevatorSlopeToTrim } from '../methods/trim.ts';
import { baselineInputs, buildStages } from '../stages/build-stages.ts';
import { runOnce } from '../stages/run-once.ts';
import type { Condition, Study } from '../study/study.ts';
import type { FlownWing } from './read-data.ts';

export interface Prediction {
  readonly condition: Condition;
  readonly wing: FlownWing;
  /** h_n, stick fixed, without the study's own corrections; NaN where it gives none [-]. */
  readonly neutralPoint: number;
  /** Slope of the elevator against the lift coefficient at a CG [rad]; no thrust term. */
  readonly elevatorSlopeAt: (cg: number) => number;
}

/** The study's baseline in one condition. Its own corrections are left out: new ones are found against the bare estimate. */
export function predict({ corrections: _, ...study }: Study, condition: Condition): Prediction {
  const values = runOnce(buildStages(study), baselineInputs(study));
  const plain = (name: string) => values.get(name) ?? Number.NaN;
  const value = (name: string) => values.get(conditionFigureName(name, condition)) ?? plain(name);
  const pressureRatio = values.has('tail_pressure_ratio')
    ? value('tail_pressure_ratio')
    : plain('tail_dynamic_pressure_ratio');
  const areaRatio = plain('tail_area') / plain('wing_area');
  const byElevator = elevatorLiftSlope(
    value('tail_lift_slope'),
    pressureRatio,
    areaRatio,
    plain('elevator_effectiveness'),
  );
  const neutralPoint = value('neutral_point');
  return {
    condition,
    wing: { area: plain('wing_area'), mac: plain('mac'), macLeadingEdge: plain('mac_leading_edge') },
    neutralPoint,
    elevatorSlopeAt: (cg) => elevatorSlopeToTrim(cg, neutralPoint, byElevator, value('tail_position'), 0),
  };
}
