import { MachineError } from '../errors.ts';
import type { TableColumn } from '../figures/figure.ts';
import type { AssembledCases, PartCopy } from '../results/assemble.ts';
import { assembleCases, copyPart } from '../results/assemble.ts';
import type { PartInfo } from '../results/part-files.ts';
import { builtFile } from './built-file.ts';
import type { CopyAnswer, CopyPart } from './messages.ts';
import { ThreadPool } from './thread-pool.ts';

/** Below this many bytes of parts, starting threads takes longer than they save. */
const worthThreads = 100e6;

/**
 * Puts the table together from its parts, on several threads where that is quicker. A worker that
 * dies costs nothing but time: this thread copies its part in its place.
 * @param workerFile for tests: another worker file
 */
export async function assembleTable(
  folder: string,
  parts: readonly PartInfo[],
  columns: readonly TableColumn[],
  workers: number,
  workerFile: string = builtFile('copy-worker'),
): Promise<AssembledCases> {
  const bytes = parts.reduce((sum, part) => sum + part.bytes, 0);
  if (workers === 1 || bytes < worthThreads) return assembleCases(folder, parts, columns);
  const pool = new ThreadPool<CopyPart, CopyAnswer>(workerFile, workers);
  const copy = async (work: PartCopy): Promise<boolean> => {
    const answer = await pool.run({ kind: 'copy_part', copy: work }).catch(() => undefined);
    if (answer === undefined) return copyPart(work);
    if (answer.kind === 'part_copied') return answer.whole;
    throw new MachineError(answer.code, answer.message, answer.remedy);
  };
  try {
    return await assembleCases(folder, parts, columns, { copy, atOnce: workers });
  } finally {
    await pool.close();
  }
}
