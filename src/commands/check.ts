import { availableParallelism } from 'node:os';
import { estimateRun } from '../engine/estimate.ts';
import { layOut } from '../engine/lay-out.ts';
import { readStudyFile } from '../read-study-file.ts';
import { checkReport } from '../reports/check-report.ts';
import { freeBytes } from '../results/disk.ts';
import { defaultOut } from './run.ts';

/** Reads a study and prints its plan and estimates; writes nothing. */
export async function check({ study: file, out }: { study: string; out: string | undefined }): Promise<void> {
  const study = readStudyFile(file);
  const laidOut = layOut(study);
  const workers = availableParallelism();
  const estimate = estimateRun(laidOut, 1, workers);
  const bytesFree = freeBytes(out ?? defaultOut);
  process.stdout.write(checkReport({ study, laidOut, workers, ...estimate, bytesFree }));
}
