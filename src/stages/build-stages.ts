import { figureOfInput } from '../figures/study-figures.ts';
import type { Study } from '../study/study.ts';
import type { BaselinePlaces } from './body.ts';
import { bodyStages, wakeLengthStage } from './body.ts';
import { liftCoefficientStage, machStage } from './condition.ts';
import { angleOfAttackStage, downwashStage, machRatioStage } from './downwash.ts';
import { loadingRangeStages, marginsStage, windowStage } from './loading-range.ts';
import { heightStage, neutralPointStage, sharesStage } from './neutral-point.ts';
import { rangeStages, reasonStage } from './out-of-range.ts';
import { requirementEdges, requirementsStage } from './requirements.ts';
import { runOnce } from './run-once.ts';
import { skipStage } from './skip.ts';
import type { Stage } from './stage.ts';
import { elevatorStage, tailLiftStage, tailPlaceStage, tailPlanformStage, tailSizeStage } from './tail.ts';
import { carryOverStage, centreStationStage, wingCentreStage, wingLiftStage } from './wing-lift.ts';
import { wingPlanformStage, wingStationsStage } from './wing-planform.ts';

/** Every stage of a study in the order of computation. */
export function buildStages(study: Study): Stage[] {
  const skip = study.skip.length === 0 ? [] : [skipStage(study.skip, figureOfInput(study))];
  const [width, ...body] = bodyStages(study, baselinePlaces(study));
  return [
    ...skip,
    ...placeStages(study),
    machStage,
    liftCoefficientStage,
    wingLiftStage(study),
    width,
    carryOverStage,
    wingCentreStage(study),
    centreStationStage,
    wakeLengthStage,
    tailSizeStage(study),
    tailPlanformStage(study),
    tailLiftStage(study),
    elevatorStage(study),
    angleOfAttackStage,
    machRatioStage(study),
    downwashStage(study),
    ...body,
    sharesStage,
    heightStage(study),
    neutralPointStage,
    ...loadingRangeStages(study),
    marginsStage,
    windowStage(study),
    ...rangeStages(study),
    reasonStage,
    requirementsStage(requirementEdges(study)),
  ];
}

/** Stages that settle where wing and tail stand. */
function placeStages(study: Study): Stage[] {
  return [wingPlanformStage(study), wingStationsStage, tailPlaceStage(study)];
}

/** Input figures of the baseline: every number at the value that the study itself gives. */
export function baselineInputs(study: Study): Map<string, number> {
  const figureName = figureOfInput(study);
  return new Map([...study.inputs].map(([path, value]) => [figureName(path), value]));
}

function baselinePlaces(study: Study): BaselinePlaces {
  const figures = runOnce(placeStages(study), baselineInputs(study));
  const value = (name: string) => figures.get(name) ?? Number.NaN;
  return {
    rootLeadingEdge: value('wing_root_leading_edge'),
    rootChord: value('wing_root_chord'),
    tail: value('quarter_mac_station') + value('tail_arm'),
  };
}
