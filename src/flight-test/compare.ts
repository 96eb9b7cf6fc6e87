/** Measured against predicted: what a study should be corrected by. */
import type { Condition } from '../study/study.ts';
import type { MeasuredNeutralPoint, SoundFit } from './measure.ts';
import type { Prediction } from './predict.ts';
import type { FlownState } from './states.ts';
import type { Warning, WarningCode } from './warnings.ts';

/** One state measured and compared. */
export interface ComparedState {
  readonly state: FlownState;
  readonly measured: readonly MeasuredNeutralPoint[];
  readonly prediction: Prediction;
  /** Absent where data and study do not give one that a study can take. */
  readonly correction?: Correction;
  /** Of the comparison; those of the measurement are with it. */
  readonly warnings: readonly Warning[];
}

export interface Correction {
  /** Measured less predicted, stick fixed [-]. */
  readonly value: number;
  /** That with the forward 95 % limit in place of the measured point [-]. */
  readonly cautious: number;
  readonly fit: SoundFit;
}

/** Studies take no more either way [-]; the limits of `corrections.neutral_point`. */
const largestCorrection = 0.2;

export function compareState(
  state: FlownState,
  measured: readonly MeasuredNeutralPoint[],
  prediction: Prediction,
): ComparedState {
  const warnings = conditionWarnings(state, prediction);
  const fit = measured.find(({ kind }) => kind === 'stick-fixed')?.sound;
  const compared = { state, measured, prediction, warnings };
  const predicted = prediction.of['stick-fixed'].at;
  if (Number.isNaN(predicted)) return withWarning(compared, 'NO_PREDICTION', noPrediction);
  // A difference between two states would be taken for an error of the estimate.
  if (fit === undefined || warnings.length > 0) return compared;
  const value = fit.neutralPoint - predicted;
  if (Math.abs(value) <= largestCorrection) {
    return { ...compared, correction: { value, cautious: fit.limits.lower - predicted, fit } };
  }
  const text = `The correction would be ${(100 * value).toFixed(1)} % MAC, and studies take 20 % at most: is this the aeroplane that was flown?`;
  return withWarning(compared, 'CORRECTION_TOO_LARGE', text);
}

const noPrediction =
  'The study gives no neutral point at its own fixed values; aftlimit worksheet tells why.';

function withWarning(compared: ComparedState, code: WarningCode, text: string): ComparedState {
  return { ...compared, warnings: [...compared.warnings, { code, text }] };
}

/** The first condition that agrees with a state in power and flaps, as far as words tell; else the first of all. */
export function conditionOf(state: FlownState, conditions: readonly Condition[]): Condition {
  return conditions.find((condition) => differences(state, condition).length === 0) ?? conditions[0]!;
}

function conditionWarnings(state: FlownState, { condition }: Prediction): Warning[] {
  const apart = differences(state, condition);
  if (apart.length === 0) return [];
  const text = `The prediction is for the condition ${condition.name}: ${apart.join('; ')}. Name the one that was flown with --condition, or add it to the study; till then there is no correction.`;
  return [{ code: 'CONDITION_DIFFERS', text }];
}

/** In what a condition is not that of the flown state, as far as words tell. */
function differences({ idle, flapsDown }: FlownState, condition: Condition): string[] {
  const apart: string[] = [];
  if (idle !== (condition.power === 'idle')) {
    apart.push(
      `it was flown ${idle ? 'at idle' : 'with power'}, and the condition is ${idle ? 'with power' : 'at idle'}`,
    );
  }
  if (flapsDown !== undefined && flapsDown !== condition.flapsDown) {
    apart.push(
      `it was flown with flaps ${flapsDown ? 'down' : 'up'}, and the condition has them ${flapsDown ? 'up' : 'down'}`,
    );
  }
  return apart;
}
