import { existsSync, statSync } from 'node:fs';
import { dirname } from 'node:path';
import { UsageError } from '../errors.ts';
import { writeFileAtomically } from '../results/atomic-file.ts';
import type { StarterKind } from '../study/starters.ts';
import { starterStudy } from '../study/starters.ts';

export interface NewArguments {
  readonly kind: StarterKind;
  readonly to: string | undefined;
}

/** Prints a starter study, or writes it into a file that is not there yet. */
export async function newStudy({ kind, to }: NewArguments): Promise<void> {
  const text = starterStudy(kind);
  if (to === undefined) {
    process.stdout.write(text);
    return;
  }
  if (existsSync(to))
    throw new UsageError(
      'FILE_EXISTS',
      `${to} is already there.`,
      'Give another name; nothing is overwritten.',
    );
  if (isMissing(dirname(to))) {
    throw new UsageError('NO_SUCH_FILE', `There is no folder ${dirname(to)}.`, 'Make it, or name another.');
  }
  writeFileAtomically(to, text);
  process.stderr.write(`${to} is written. aftlimit check ${to} tells what it would do.\n`);
}

/** False for a folder that may not be looked at, too: writing tells what is wrong with that. */
function isMissing(folder: string): boolean {
  try {
    return statSync(folder, { throwIfNoEntry: false }) === undefined;
  } catch {
    return false;
  }
}
