/** One worker thread: evaluates parts and writes them itself; only a word goes back. */
import { workerData } from 'node:worker_threads';
import { MachineError } from '../errors.ts';
import { blockSize } from '../plan/plan.ts';
import { PartWriter } from '../results/part-files.ts';
import { Evaluator } from './evaluator.ts';
import { layOut } from './lay-out.ts';
import type { EvaluatePart, PartAnswer, WorkerSetup } from './messages.ts';

/** piscina hands a worker its own data as the second entry. */
const setup = (Array.isArray(workerData) ? workerData[1] : workerData) as WorkerSetup;
const { plan, columns } = layOut(setup.study);
const evaluator = new Evaluator(
  plan,
  columns.map((column) => column.figure.name),
);
const writer = new PartWriter(setup.partsFolder, columns);

export default function evaluatePart({ part }: EvaluatePart): PartAnswer {
  try {
    writer.begin(part.number, part.firstBlock * blockSize);
    for (let block = part.firstBlock; block < part.firstBlock + part.blocks; block++) {
      const rows = evaluator.evaluate(block * blockSize, blockSize);
      writer.append({ rows, values: evaluator.columns });
    }
    const { rows } = writer.finish();
    return { kind: 'part_done', number: part.number, rows };
  } catch (error) {
    writer.abandon();
    if (error instanceof MachineError) {
      const { code, message, remedy } = error;
      return { kind: 'part_not_written', number: part.number, code, message, remedy };
    }
    throw error;
  }
}
