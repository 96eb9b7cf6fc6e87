/** Runs the program as its users do: the built command line in a process of its own. */
import { spawn } from 'node:child_process';
import { chmodSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type StarterKind, starterStudy } from '../../src/study/starters.ts';

export const programFile = fileURLToPath(new URL('../../.build/cli.js', import.meta.url));
const brokenMachine = new URL('broken-machine.mjs', import.meta.url).href;

/** Ways in which broken-machine.mjs lets the machine fail. */
export type Breakage = 'small-disk' | 'full-disk' | 'dying-worker' | 'stillborn-worker' | 'bug';

export interface Answer {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

export interface Surroundings {
  readonly folder?: string;
  readonly environment?: Readonly<Record<string, string>>;
  readonly breakage?: Breakage;
  /** Run as this user, where the test itself may do so. */
  readonly user?: number;
}

export function aftlimit(args: readonly string[], surroundings: Surroundings = {}): Promise<Answer> {
  return answerOf(process.execPath, [programFile, ...args], surroundings);
}

export function answerOf(
  command: string,
  args: readonly string[],
  { folder = tmpdir(), environment = {}, breakage, user }: Surroundings = {},
): Promise<Answer> {
  const { NO_COLOR: _, FORCE_COLOR: __, ...own } = process.env;
  const broken = breakage && { NODE_OPTIONS: `--import=${brokenMachine}`, BROKEN_MACHINE: breakage };
  const child = spawn(command, args, {
    cwd: folder,
    env: { ...own, ...environment, ...broken },
    stdio: ['ignore', 'pipe', 'pipe'],
    ...(user === undefined ? {} : { uid: user, gid: user }),
  });
  let stdout = '';
  let stderr = '';
  child.stdout.setEncoding('utf8').on('data', (text: string) => {
    stdout += text;
  });
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    stderr += text;
  });
  return new Promise((resolve, reject) => {
    child.on('error', reject).on('close', (code) => resolve({ code, stdout, stderr }));
  });
}

/** An empty folder that every user may enter, and how to be rid of it. */
export function temporaryFolder(): { path: string; remove: () => void } {
  const path = mkdtempSync(join(tmpdir(), 'aftlimit-commands-'));
  chmodSync(path, 0o755);
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}

/** Writes a starter study into a folder. @returns its path */
export function starterFile(folder: string, kind: StarterKind = 'uncrewed'): string {
  const path = join(folder, `${kind}.yaml`);
  writeFileSync(path, starterStudy(kind));
  return path;
}

/** A short run without charts. @returns its folder */
export async function shortRun(folder: string, study = starterFile(folder), name = 'short'): Promise<string> {
  const { code, stderr } = await aftlimit([
    'run',
    study,
    '--out',
    folder,
    '--name',
    name,
    '--no-charts',
    '--workers',
    '1',
  ]);
  if (code !== 0) throw new Error(stderr);
  return join(folder, name);
}
