import { randomBytes } from 'node:crypto';
import {
  closeSync,
  fsyncSync,
  openSync,
  readdirSync,
  renameSync,
  rmSync,
  statSync,
  writeSync,
} from 'node:fs';
import { hostname } from 'node:os';
import { basename, dirname, join } from 'node:path';
import { writeFault } from './machine-fault.ts';

const temporarySuffix = '.tmp';
/** A temporary file of another machine, or of a living process, is left alone for so long. */
const abandonedAfter = 24 * 3600 * 1000;

/** This machine's name as it stands in temporary names: letters, digits and hyphens. */
function host(): string {
  return hostname().replaceAll(/[^A-Za-z0-9-]/g, '-') || 'unnamed';
}

/**
 * A file that is there whole or not at all: written under a temporary name beside it (machine,
 * process, random), synced, renamed, and its folder synced. Failed writes are MachineErrors and
 * remove the temporary file.
 */
export class AtomicFile {
  /** Bytes written so far. */
  size = 0;
  /** Where the bytes are until `commit`; others may write into it at places of their own. */
  readonly temporary: string;
  readonly #handle: number;
  #open = true;

  constructor(readonly path: string) {
    const unique = [host(), process.pid, randomBytes(6).toString('hex')].join('.');
    this.temporary = `${path}.${unique}${temporarySuffix}`;
    try {
      this.#handle = openSync(this.temporary, 'wx');
    } catch (error) {
      throw writeFault(error, path);
    }
  }

  write(bytes: Uint8Array): void {
    this.#guard(() => {
      // One call may write less than asked for.
      for (let done = 0; done < bytes.length; ) {
        done += writeSync(this.#handle, bytes, done, bytes.length - done);
      }
    });
    this.size += bytes.length;
  }

  /** Writes bytes at a place of their own, which may lie beyond what is written so far. */
  writeAt(bytes: Uint8Array, at: number): void {
    this.#guard(() => {
      for (let done = 0; done < bytes.length; ) {
        done += writeSync(this.#handle, bytes, done, bytes.length - done, at + done);
      }
    });
    this.size = Math.max(this.size, at + bytes.length);
  }

  /** Puts the file in its place, over any older one. */
  commit(): void {
    this.#guard(() => {
      fsyncSync(this.#handle);
      this.#close();
      renameSync(this.temporary, this.path);
      syncFolder(dirname(this.path));
    });
  }

  /** Removes what was written; does nothing after `commit`. */
  abandon(): void {
    this.#close();
    rmSync(this.temporary, { force: true });
  }

  #close(): void {
    if (this.#open) closeSync(this.#handle);
    this.#open = false;
  }

  #guard(step: () => void): void {
    try {
      step();
    } catch (error) {
      this.abandon();
      throw writeFault(error, this.path);
    }
  }
}

/** Writes a whole file atomically. */
export function writeFileAtomically(path: string, content: string | Uint8Array): void {
  const file = new AtomicFile(path);
  file.write(typeof content === 'string' ? new TextEncoder().encode(content) : content);
  file.commit();
}

/** Makes renames in a folder last; systems that cannot open folders keep them by themselves. */
export function syncFolder(folder: string): void {
  let handle: number;
  try {
    handle = openSync(folder, 'r');
  } catch {
    return;
  }
  try {
    fsyncSync(handle);
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? error.code : undefined;
    if (code !== 'EINVAL' && code !== 'EPERM' && code !== 'EISDIR') throw error;
  } finally {
    closeSync(handle);
  }
}

/**
 * Removes temporary files that nobody is writing any more and returns how many. Called before this
 * process writes into the folder: its own earlier ones count as abandoned, those of other living
 * processes and of other machines only after a day.
 */
export function sweepTemporaryFiles(folder: string): number {
  let swept = 0;
  for (const name of readdirSync(folder)) {
    const owner = ownerOf(name);
    if (owner === undefined) continue;
    const path = join(folder, name);
    if (!isAbandoned(path, owner)) continue;
    rmSync(path, { force: true });
    swept++;
  }
  return swept;
}

interface Owner {
  readonly host: string;
  readonly process: number;
}

function ownerOf(name: string): Owner | undefined {
  const match = /\.([A-Za-z0-9-]+)\.(\d+)\.[0-9a-f]{12}\.tmp$/.exec(basename(name));
  return match === null ? undefined : { host: match[1], process: Number(match[2]) };
}

function isAbandoned(path: string, owner: Owner): boolean {
  const ofThisMachine = owner.host === host();
  if (ofThisMachine && (owner.process === process.pid || !isAlive(owner.process))) return true;
  const age = Date.now() - (statSync(path, { throwIfNoEntry: false })?.mtimeMs ?? Date.now());
  return age > abandonedAfter;
}

function isAlive(id: number): boolean {
  try {
    process.kill(id, 0);
    return true;
  } catch (error) {
    // Another user's process may not be signalled, but it is there.
    return error instanceof Error && 'code' in error && error.code === 'EPERM';
  }
}
