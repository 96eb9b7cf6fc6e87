/** Loaded before the program, in each of its threads: lets the machine fail as BROKEN_MACHINE says. */
import fs from 'node:fs';
import { syncBuiltinESMExports } from 'node:module';
import { isMainThread } from 'node:worker_threads';

/** An error as the operating system's refusal comes through node. */
function refusal(code, syscall) {
  return Object.assign(new Error(`${code}: made up for a test, ${syscall}`), { code, syscall });
}

const breakages = {
  'small-disk': () => {
    fs.statfsSync = () => ({ bavail: 1000, bsize: 4096 });
  },
  'full-disk': () => {
    if (isMainThread) return;
    fs.writeSync = () => {
      throw refusal('ENOSPC', 'write');
    };
  },
  'dying-worker': () => {
    if (isMainThread) return;
    const { openSync } = fs;
    fs.openSync = (path, ...more) => (/\d+\.part\./.test(path) ? process.exit(3) : openSync(path, ...more));
  },
  'stillborn-worker': () => {
    if (!isMainThread) process.exit(3);
  },
  bug: () => {
    fs.existsSync = () => {
      throw new TypeError('a mistake of the programmer, made up for a test');
    };
  },
};

breakages[process.env.BROKEN_MACHINE]();
syncBuiltinESMExports();
