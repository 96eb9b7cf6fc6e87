import {
  jonesLiftSlope,
  polhamusLiftSlope,
  semiperimeterRatio,
  tableScaledLiftSlope,
} from '../methods/lift-slope.ts';
import type { LiftSlopeMethod } from '../study/study.ts';

/**
 * Lift-curve slope of a wing or tail by the study's method [1/rad].
 * Arguments: A, taper, quarter- and half-chord sweep [rad], a_0 of the section [1/rad], Mach number.
 */
export type LiftSlope = (
  aspectRatio: number,
  taper: number,
  sweepQuarter: number,
  sweepHalf: number,
  sectionSlope: number,
  mach: number,
) => number;

const thinSectionSlope = 2 * Math.PI;

/** Wing and tail take the same method, so that its excess nearly cancels in the neutral point. */
export const liftSlopeBy: Record<LiftSlopeMethod, LiftSlope> = {
  polhamus: (A, _taper, _sweepQuarter, sweepHalf, a0, mach) =>
    polhamusLiftSlope(A, Math.tan(sweepHalf), a0 / thinSectionSlope, mach),
  table: (A, taper, sweepQuarter, _sweepHalf, a0, mach) =>
    tableScaledLiftSlope(A, taper, sweepQuarter, a0 / thinSectionSlope, mach),
  jones: (A, taper, sweepQuarter, _sweepHalf, a0, mach) =>
    jonesLiftSlope(A, semiperimeterRatio(A, taper, Math.tan(sweepQuarter)), a0, mach),
};
