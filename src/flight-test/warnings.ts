/** What a reader of measured neutral points must be warned of. Each code has a test. */
export const warningCodes = {
  FEWER_THAN_TWO_CGS: 'no neutral point without two CG positions',
  TOO_FEW_POINTS: 'a CG position with too few points for a slope and its scatter',
  NARROW_SPEEDS: 'a CG position flown at nearly one lift coefficient',
  FORCES_MISSING: 'points without a stick force',
  CGS_CLOSE: 'CG positions too close to each other',
  CG_SPREAD: 'points counted as one CG position though it moved',
  NOT_STRAIGHT: 'curves that bend more than their scatter explains',
  SLOPES_ALIKE: 'slopes that do not differ significantly between the CG positions',
  LIMITS_OPEN: '95 % limits without an end',
  WRONG_WAY: 'slopes that grow steeper as the CG goes aft',
  NEAR_NEUTRAL: 'flown at, or close to, the neutral point',
  FAR_EXTRAPOLATION: 'a neutral point far beyond the flown CG positions',
  POWER_ON: 'power moves the CG at which the elevator goes flat',
  CONDITION_DIFFERS: 'a prediction for another state than the flown one',
  NO_PREDICTION: 'a study that gives no neutral point to compare with',
  CORRECTION_TOO_LARGE: 'a correction larger than studies take',
} as const;
export type WarningCode = keyof typeof warningCodes;

export interface Warning {
  readonly code: WarningCode;
  readonly text: string;
}
