import type { Stage } from './stage.ts';

/**
 * Runs stages one after the other on a single set of values, SI by figure name.
 * @returns every figure read or written
 */
export function runOnce(stages: readonly Stage[], inputs: ReadonlyMap<string, number>): Map<string, number> {
  const values = new Map(inputs);
  for (const stage of stages) {
    const reads = stage.reads.map((figure) => {
      const value = values.get(figure);
      if (value === undefined) throw new Error(`stage ${stage.name} reads ${figure}, which nothing wrote`);
      return Float64Array.of(value);
    });
    const writes = stage.writes.map(() => new Float64Array(1));
    stage.kernel(1, reads, writes);
    stage.writes.forEach((figure, k) => {
      if (figure !== null) values.set(figure, writes[k][0]);
    });
  }
  return values;
}
