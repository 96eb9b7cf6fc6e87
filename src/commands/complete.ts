/** What a shell offers while a command line is typed. */
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { takesValue } from './arguments.ts';

const studySuffix = /\.ya?ml$/;
const filesOfCommand: Readonly<Record<string, { studies: boolean; runs: boolean }>> = {
  run: { studies: true, runs: false },
  check: { studies: true, runs: false },
  worksheet: { studies: true, runs: true },
  figures: { studies: true, runs: true },
  charts: { studies: false, runs: true },
};

/**
 * Words to offer. Nothing, where a value of the user's own is wanted: the shell then offers its files.
 * @param words   typed so far, the program's name first and the unfinished word last
 * @param offered commands, options and choices that the argument parser knows for this place
 */
export function complete(words: readonly string[], offered: readonly string[]): string[] {
  const [, command = ''] = words;
  const current = words.at(-1) ?? '';
  const before = words.slice(2, -1);
  if (takesValue(before.at(-1) ?? '')) return [];
  if (current.startsWith('-')) return offered.filter((word) => !isShort(word));
  const wanted = words.length > 2 ? filesOfCommand[command] : undefined;
  const given = before.some((word, i) => !word.startsWith('-') && !takesValue(before[i - 1] ?? ''));
  if (wanted !== undefined && !given) return filesBelow(current, wanted);
  const choices = offered.filter((word) => !word.startsWith('-'));
  return choices.length > 0 || current !== '' ? choices : offered.filter((word) => !isShort(word));
}

/** `-q`, and the `--q` that the parser makes of it: the long form stands for both. */
function isShort(word: string): boolean {
  return /^--?[a-z](:|\t|$)/.test(word);
}

/** Studies and run folders in the folder of the unfinished word and in the folders one below it. */
function filesBelow(current: string, wanted: { studies: boolean; runs: boolean }): string[] {
  const typedFolder = current.slice(0, current.lastIndexOf('/') + 1);
  const found: string[] = [];
  const visit = (folder: string, deeper: boolean) => {
    for (const { name, isFolder } of entriesOf(folder)) {
      const path = folder + name;
      if (!path.startsWith(current)) continue;
      if (!isFolder && wanted.studies && studySuffix.test(name)) found.push(path);
      if (!isFolder) continue;
      if (wanted.runs && existsSync(join(path, 'run.json'))) found.push(path);
      else if (deeper) visit(`${path}/`, false);
    }
  };
  visit(typedFolder, true);
  return found;
}

/** Entries that are not hidden; none for a folder that cannot be read. */
function entriesOf(folder: string): { name: string; isFolder: boolean }[] {
  try {
    return readdirSync(folder === '' ? '.' : folder, { withFileTypes: true })
      .filter(({ name }) => !name.startsWith('.') && name !== 'node_modules')
      .map((entry) => ({ name: entry.name, isFolder: entry.isDirectory() }))
      .sort((a, b) => (a.name < b.name ? -1 : 1));
  } catch {
    return [];
  }
}
