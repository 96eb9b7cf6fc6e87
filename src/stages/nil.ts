import type { Stage } from './stage.ts';

/** A stage that writes zeros: something that is not there. */
export function nilStage(name: string, writes: readonly string[]): Stage {
  return {
    name,
    reads: [],
    writes,
    cost: 1,
    kernel: (count, _, outputs) => {
      for (const output of outputs) output.fill(0, 0, count);
    },
  };
}
