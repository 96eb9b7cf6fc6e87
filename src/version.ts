import { readFileSync } from 'node:fs';

const { name, version }: { name: string; version: string } = JSON.parse(
  readFileSync(new URL('../package.json', import.meta.url), 'utf8'),
);

/** Name and version of this program. */
export const program = { name, version } as const;
