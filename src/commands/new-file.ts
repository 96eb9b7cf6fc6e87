import { existsSync, statSync } from 'node:fs';
import { dirname } from 'node:path';
import { UsageError } from '../errors.ts';
import { writeFileAtomically } from '../results/atomic-file.ts';

/** Refuses a name that is taken, or whose folder is not there. */
export function checkNewFile(path: string): void {
  if (existsSync(path))
    throw new UsageError(
      'FILE_EXISTS',
      `${path} is already there.`,
      'Give another name; nothing is overwritten.',
    );
  if (isMissing(dirname(path))) {
    throw new UsageError('NO_SUCH_FILE', `There is no folder ${dirname(path)}.`, 'Make it, or name another.');
  }
}

/** Writes a file that is not there yet, whole or not at all. */
export function writeNewFile(path: string, text: string): void {
  checkNewFile(path);
  writeFileAtomically(path, text);
}

/** False for a folder that may not be looked at, too: writing tells what is wrong with that. */
function isMissing(folder: string): boolean {
  try {
    return statSync(folder, { throwIfNoEntry: false }) === undefined;
  } catch {
    return false;
  }
}
