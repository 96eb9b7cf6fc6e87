/** A pure step from figures to figures. */
export interface Stage {
  readonly name: string;
  /** Names of the figures read, in the order of the kernel's inputs. */
  readonly reads: readonly string[];
  /**
   * Names of the figures written, in the order of the kernel's outputs. `null` where the study
   * gives that figure itself: the kernel's column is then dropped.
   */
  readonly writes: readonly (string | null)[];
  /** Rough cost of one evaluation [ns]; the plan lets axes of costly stages change slowest. */
  readonly cost: number;
  readonly kernel: Kernel;
}

/**
 * Evaluates rows 0 … count−1. Every input and output column has at least `count` entries; inputs
 * may be longer and must not be written. An entry that cannot be computed is NaN.
 */
export type Kernel = (
  count: number,
  inputs: readonly Float64Array[],
  outputs: readonly Float64Array[],
) => void;
