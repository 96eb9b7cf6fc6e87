import type { StarterKind } from '../study/starters.ts';
import { starterStudy } from '../study/starters.ts';
import { writeNewFile } from './new-file.ts';

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
  writeNewFile(to, text);
  process.stderr.write(`${to} is written. aftlimit check ${to} tells what it would do.\n`);
}
