/**
 * The program's worker, but it dies on one part as dying.json beside the parts folder says:
 * {part, how: 'exit' | 'throw', times}. Each death leaves a file, so that a successor counts it.
 */
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { workerData } from 'node:worker_threads';
import evaluatePart from '../../.build/engine/worker.js';

const setup = Array.isArray(workerData) ? workerData[1] : workerData;
const folder = dirname(setup.partsFolder);
const { part, how, times } = JSON.parse(readFileSync(join(folder, 'dying.json'), 'utf8'));

export default function evaluateOrDie(task) {
  const deaths = readdirSync(folder).filter((name) => name.startsWith('death-')).length;
  if (task.part.number === part && deaths < times) {
    writeFileSync(join(folder, `death-${deaths}`), '');
    if (how === 'exit') process.exit(3);
    throw new Error('died as asked');
  }
  return evaluatePart(task);
}
