/** Kinds of options, each refusing what it cannot use: yargs makes a list of a repeated option. */
import { usageFailure } from './failure.ts';

/** Options that take no value; a word after one of them is an argument of its own. */
const flagNames = ['afresh', 'charts', 'quiet', 'json-lines', 'markdown', 'json'] as const;
type FlagName = (typeof flagNames)[number];

/** A number is read as text, since yargs takes `--workers=` for 0. */
export function numberOption(name: string, describe: string) {
  const coerce = (value: unknown): number | undefined => {
    if (value === undefined) return undefined;
    const read = typeof value === 'string' && value.trim() !== '' ? Number(value) : Number.NaN;
    if (!Number.isFinite(read)) throw usageFailure(`--${name} takes one number.`);
    return read;
  };
  return { type: 'string', describe, coerce, requiresArg: true } as const;
}

export function textOption(name: string, describe: string) {
  const coerce = (value: unknown): string | undefined => {
    if (value === undefined) return undefined;
    if (typeof value !== 'string' || value === '') throw usageFailure(`--${name} takes one text.`);
    return value;
  };
  return { type: 'string', describe, coerce, requiresArg: true } as const;
}

/** A text without which the command cannot do; the parser tells when it is missing. */
export function neededTextOption(name: string, describe: string) {
  const { coerce: read, ...option } = textOption(name, describe);
  const coerce = (value: unknown): string => read(value) ?? '';
  return { ...option, coerce, demandOption: true } as const;
}

/** One text each time the option is given. */
export function repeatedTextOption(describe: string) {
  return { type: 'string', array: true, nargs: 1, describe, requiresArg: true } as const;
}

/** The name ties each flag to the list above. */
export function flag(_name: FlagName, describe: string) {
  return { type: 'boolean', describe } as const;
}

/** Whether the word after this one is its value, as in `--out FOLDER`. */
export function takesValue(word: string): boolean {
  const [, name] = /^--(?:no-)?([^=]+)$/.exec(word) ?? [];
  return name !== undefined && !['help', 'version', ...flagNames].includes(name);
}
