import { figureOfInput } from '../figures/study-figures.ts';
import type { Condition, Study } from '../study/study.ts';
import type { BaselinePlaces } from './body.ts';
import { bodyCoupleStage, bodyMomentStages, bodyShapeStages, wakeLengthStage } from './body.ts';
import { airStage, maximumLiftStage, speedStages } from './condition.ts';
import { stagesOfConditions } from './conditions.ts';
import { assessesControl } from './control.ts';
import { forceMarginStages, stallForceStages } from './control-forces.ts';
import { controlLimitStages } from './control-limit.ts';
import { angleOfAttackStage, downwashStage, machRatioStage } from './downwash.ts';
import { flapDownwashStages, flapStages } from './flaps.ts';
import { forwardLimitStages } from './forward-limit.ts';
import { elevatorSizeStage, freeStickStages, hasStickForces } from './free-stick.ts';
import { governingStages } from './governing.ts';
import { groundLiftStage } from './ground-effect.ts';
import { loadingStages } from './loading.ts';
import { loadingRangeStages, marginsStage, windowStage } from './loading-range.ts';
import { manoeuvreStages } from './manoeuvre.ts';
import { heightStage, neutralPointStage, sharesStage, stepsStage } from './neutral-point.ts';
import { rangeStages, reasonStage } from './out-of-range.ts';
import { propellerShareStages, propellerStages, tailStreamStages } from './propeller.ts';
import { requirementEdges, requirementsStage } from './requirements.ts';
import { runOnce } from './run-once.ts';
import { withSizing } from './sizing.ts';
import { skipStage } from './skip.ts';
import type { Stage } from './stage.ts';
import {
  elevatorStage,
  tailCentreStage,
  tailLiftStage,
  tailPlaceStage,
  tailPlanformStage,
  tailSizeStage,
} from './tail.ts';
import { trimStages } from './trim.ts';
import { wingTwistStage } from './wing-couples.ts';
import { carryOverStage, centreStationStage, wingCentreStage, wingLiftStage } from './wing-lift.ts';
import { wingPlanformStage, wingStationsStage } from './wing-planform.ts';
import { zeroLiftStages } from './zero-lift.ts';

/**
 * Every stage of a study in the order of computation.
 * @param control whether trim, free stick, manoeuvre and the forward limit are worked out
 */
export function buildStages(study: Study, control = assessesControl(study)): Stage[] {
  const skip = study.skip.length === 0 ? [] : [skipStage(study.skip, figureOfInput(study))];
  const places = baselinePlaces(study);
  const ofConditions = stagesOfConditions(study, (condition) => [
    ...conditionStages(study, condition, places),
    ...(control ? controlStages(study, condition) : []),
    ...rangeStages(study),
  ]);
  const stages = [
    ...skip,
    ...placeStages(study),
    wingCentreStage(study),
    centreStationStage,
    wakeLengthStage,
    tailSizeStage(study),
    tailPlanformStage(study),
    tailCentreStage(study),
    elevatorStage(study),
    ...bodyShapeStages(study, places),
    ...loadingStages(study, places),
    ...loadingRangeStages(study),
    ...(control ? controlShapeStages(study, places) : []),
    ...ofConditions.stages,
    ...governingStages(study, ofConditions.common),
    ...(control ? [...forceMarginStages(study), ...controlLimitStages(study)] : []),
    windowStage(study, control),
    reasonStage(study),
    requirementsStage(requirementEdges(study)),
  ];
  return study.size === undefined
    ? stages
    : withSizing(stages, study.size, figureOfInput(study)(study.size.path));
}

/** Stages of one flight condition. */
function conditionStages(study: Study, condition: Condition, places: BaselinePlaces): Stage[] {
  const lift = condition.groundEffect
    ? [wingLiftStage(study, 'wing_lift_slope_away'), groundLiftStage]
    : [wingLiftStage(study)];
  return [
    airStage,
    ...flapStages(study, condition),
    maximumLiftStage(study),
    ...speedStages(condition),
    ...lift,
    carryOverStage,
    tailLiftStage(study),
    angleOfAttackStage(study),
    machRatioStage(study),
    downwashStage(study),
    ...flapDownwashStages(study, condition),
    ...bodyMomentStages(study, places),
    ...propellerStages(study, condition),
    ...tailStreamStages(study, condition),
    sharesStage(study),
    stepsStage(study),
    ...propellerShareStages(study),
    heightStage(study),
    neutralPointStage(study),
    marginsStage,
  ];
}

/** What trim and control need of the aeroplane whatever the condition. */
function controlShapeStages(study: Study, places: BaselinePlaces): Stage[] {
  const sized = hasStickForces(study) ? [elevatorSizeStage(study)] : [];
  return [wingTwistStage(study), bodyCoupleStage(study, places), ...sized];
}

/** Stages of trim, free stick, manoeuvre and forward limits in one condition. */
function controlStages(study: Study, condition: Condition): Stage[] {
  return [
    ...zeroLiftStages(study, condition),
    ...trimStages(study, condition),
    ...freeStickStages(study),
    ...manoeuvreStages(study),
    ...stallForceStages(study, condition),
    ...forwardLimitStages(study, condition),
  ];
}

/** Stages that settle where wing and tail stand. */
function placeStages(study: Study): Stage[] {
  return [wingPlanformStage(study), wingStationsStage, tailPlaceStage(study)];
}

/** Input figures of the baseline: every number at the value that the study itself gives, but for one that is worked out. */
export function baselineInputs(study: Study): Map<string, number> {
  const inputs = numbersOf(study);
  if (study.size !== undefined) inputs.delete(figureOfInput(study)(study.size.path));
  return inputs;
}

/** Every number in the study file. */
function numbersOf(study: Study): Map<string, number> {
  const figureName = figureOfInput(study);
  return new Map([...study.inputs].map(([path, value]) => [figureName(path), value]));
}

/** Where wing and tail stand with the numbers of the study file, around which the body is drawn. */
export function baselinePlaces(study: Study): BaselinePlaces {
  const figures = runOnce(placeStages(study), numbersOf(study));
  const value = (name: string) => figures.get(name) ?? Number.NaN;
  return {
    rootLeadingEdge: value('wing_root_leading_edge'),
    rootChord: value('wing_root_chord'),
    tail: value('quarter_mac_station') + value('tail_arm'),
  };
}
