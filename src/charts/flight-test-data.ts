import type { ChartHeading } from './sheet.ts';

/** A straight line of the measured quantity against lift coefficient. */
export interface StraightLine {
  /** Per unit of lift coefficient, in the unit of the measured title. */
  readonly slope: number;
  /** At no lift, in the unit of the measured title. */
  readonly atNoLift: number;
}

/** What was measured at one CG position. */
export interface FlownCg {
  /** CG [% MAC]. */
  readonly cg: number;
  readonly liftCoefficients: ArrayLike<number>;
  /** One for each lift coefficient, in the unit of the measured title, trailing edge up (or pull) positive. */
  readonly measured: ArrayLike<number>;
  /** Least-squares line through the points. */
  readonly fitted: StraightLine;
  /** Half width of the 95 % limits of the fitted slope. */
  readonly slopeUncertainty?: number;
  /** Line that the study's aeroplane gives at this CG. */
  readonly predicted?: StraightLine;
}

export interface FlightTestSlopesData {
  readonly heading: ChartHeading;
  /** With unit: `Elevator, trailing edge up [°]`. */
  readonly measuredTitle: string;
  /** With unit: `Slope of the elevator [° per unit of lift coefficient]`. */
  readonly slopeTitle: string;
  /** `stick-fixed neutral point` */
  readonly pointName: string;
  readonly flown: readonly FlownCg[];
  /** The line of slope against CG [per % MAC], null when it could not be fitted. */
  readonly slopeLine: { readonly slope: number; readonly atLeadingEdge: number } | null;
  /** Where that line reaches zero and its 95 % limits [% MAC]; a limit that the data leave open is absent. */
  readonly neutralPoint: { readonly at: number; readonly least?: number; readonly greatest?: number } | null;
  /** Of the study's aeroplane [% MAC]. */
  readonly predictedNeutralPoint?: number;
}
