import { blockSize } from '../plan/plan.ts';
import { CsvBlockWriter } from '../results/csv-block.ts';
import { bytesNeeded, bytesPerRowEstimate } from '../results/disk.ts';
import { ParquetBlockWriter } from '../results/parquet-block.ts';
import { Evaluator } from './evaluator.ts';
import type { LaidOut } from './lay-out.ts';

export interface RunEstimate {
  readonly bytesNeeded: number;
  readonly seconds: number;
}

/** Starting workers, putting the table together and drawing take about this long whatever the size [s]. */
const fixedSeconds = 4;

/**
 * Tries one block in the middle of the study and extrapolates: time on this machine now, and room
 * for the table and its parts.
 * @param share of the combinations that are still to be done, 0…1
 */
export function estimateRun(laidOut: LaidOut, share: number, workers: number): RunEstimate {
  const { plan, columns } = laidOut;
  const evaluator = new Evaluator(
    plan,
    columns.map((column) => column.figure.name),
  );
  const count = Math.min(blockSize, plan.combinations);
  const first = Math.floor((plan.combinations - count) / 2);
  const rows = evaluator.evaluate(first, count);
  if (rows === 0) return { bytesNeeded: 0, seconds: fixedSeconds };
  const block = { rows, values: evaluator.columns };
  const perRow = bytesPerRowEstimate(columns, block);
  const start = performance.now();
  evaluator.evaluate(first, count);
  new CsvBlockWriter(columns).append(block);
  new ParquetBlockWriter(columns).append(block);
  const secondsPerCombination = (performance.now() - start) / 1000 / count;
  const expectedRows = (plan.combinations * rows) / count;
  return {
    bytesNeeded: bytesNeeded(expectedRows, perRow),
    seconds: fixedSeconds + (share * plan.combinations * secondsPerCombination) / workers,
  };
}
