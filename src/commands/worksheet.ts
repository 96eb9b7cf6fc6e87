import { existsSync, statSync } from 'node:fs';
import { join } from 'node:path';
import type { LaidOut } from '../engine/lay-out.ts';
import { layOut } from '../engine/lay-out.ts';
import { UsageError } from '../errors.ts';
import { figureOfInput } from '../figures/study-figures.ts';
import { readStudyFile, readStudyText } from '../read-study-file.ts';
import type { Worksheet } from '../reports/worksheet.ts';
import {
  baselineWorksheet,
  inputsOfCombination,
  makeWorksheet,
  worksheetMarkdown,
  worksheetText,
} from '../reports/worksheet.ts';
import { readRun } from '../results/run-folder.ts';
import { runOnce } from '../stages/run-once.ts';
import { readReplacement } from '../study/replace-number.ts';
import type { Study } from '../study/study.ts';
import { usageFailure } from './failure.ts';

export interface WorksheetArguments {
  /** Study file or run folder. */
  readonly study: string;
  readonly combination: number | undefined;
  readonly set: readonly string[] | undefined;
  readonly markdown: boolean | undefined;
}

/** Prints the worksheet of one combination, or of the baseline. */
export async function worksheet({
  study: path,
  combination,
  set,
  markdown,
}: WorksheetArguments): Promise<void> {
  const study = readStudyOf(path);
  const laidOut = layOut(study);
  const sheet =
    combination === undefined
      ? baselineWorksheet(study, laidOut, replacements(study, set ?? []))
      : combinationWorksheet(study, laidOut, combination, set ?? []);
  process.stdout.write(markdown ? worksheetMarkdown(sheet) : worksheetText(sheet));
}

/** The study of a file, or the one that a run folder was made from. */
export function readStudyOf(path: string): Study {
  if (!existsSync(path) || !statSync(path).isDirectory()) return readStudyFile(path);
  const { studyText, studyFile } = readRun(path);
  return readStudyText(studyText, join(path, studyFile));
}

function combinationWorksheet(
  study: Study,
  laidOut: LaidOut,
  combination: number,
  set: readonly string[],
): Worksheet {
  if (set.length > 0) throw usageFailure('--set goes with the baseline, not with --combination.');
  const { combinations } = laidOut.plan;
  if (!Number.isInteger(combination) || combination < 0 || combination >= combinations) {
    throw new UsageError(
      'NO_SUCH_COMBINATION',
      `There is no combination ${combination}.`,
      `They are numbered from 0 to ${combinations - 1}.`,
    );
  }
  const inputs = inputsOfCombination(laidOut, combination);
  if (runOnce(laidOut.plan.stages, inputs).get('skipped') === 1) {
    throw new UsageError(
      'NO_SUCH_COMBINATION',
      `Combination ${combination} is dropped by a skip rule.`,
      'Choose another, or give its numbers with --set.',
    );
  }
  return makeWorksheet(study, laidOut, inputs, `combination ${combination}`);
}

function replacements(study: Study, set: readonly string[]): Map<string, number> {
  const figureName = figureOfInput(study);
  const replaced = new Map<string, number>();
  for (const text of set) {
    const { path, value } = readReplacement(study, text);
    if (replaced.has(figureName(path))) throw usageFailure(`--set gives ${path} twice.`);
    replaced.set(figureName(path), value);
  }
  return replaced;
}
