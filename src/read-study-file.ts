import { readFileSync } from 'node:fs';
import { UsageError } from './errors.ts';
import { figuresOfStudy } from './figures/study-figures.ts';
import { buildStages } from './stages/build-stages.ts';
import { decodeStudy } from './study/parse-yaml.ts';
import type { KnownFigure } from './study/read-study.ts';
import { readStudy } from './study/read-study.ts';
import type { Study } from './study/study.ts';

/** Reads and checks a study file. Throws StudyError with every fault, or UsageError when there is no such file. */
export function readStudyFile(path: string): Study {
  return readStudyText(decodeStudy(readBytes(path), path), path);
}

export function readStudyText(text: string, file: string): Study {
  return readStudy(text, file, knownFigures);
}

/** The figures that a study can require, prefer or put in its table: those that it gives or that are worked out. */
function knownFigures(study: Study): KnownFigure[] {
  const figures = figuresOfStudy(study, { requirements: [], ranges: [], reasons: [], conditions: [] });
  // Naming a figure of control is a reason to work it out, so all of them are known here.
  const workedOut = new Set(buildStages(study, true).flatMap((stage) => stage.writes));
  return [...figures.values()]
    .filter(({ name, formula }) => formula === 'given' || workedOut.has(name))
    .map(({ name, dimension, kind }) => ({ name, dimension, onlyInTable: kind !== 'number' }));
}

function readBytes(path: string): Uint8Array {
  try {
    return readFileSync(path);
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? error.code : undefined;
    const why =
      code === 'ENOENT' ? 'is not there' : code === 'EISDIR' ? 'is a folder' : `cannot be read (${code})`;
    throw new UsageError(
      'NO_SUCH_FILE',
      `${path} ${why}.`,
      'Check the name; `aftlimit new tourer --to my.yaml` writes a study to start from.',
    );
  }
}
