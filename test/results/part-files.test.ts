import { execFileSync, spawnSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  truncateSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { AtomicFile, sweepTemporaryFiles, writeFileAtomically } from '../../src/results/atomic-file.ts';
import { writeFault } from '../../src/results/machine-fault.ts';
import { findParts, PartWriter, partPath, removeParts } from '../../src/results/part-files.ts';
import { column, mixedBlock, mixedColumns } from './sample-table.ts';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'aftlimit-parts-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

function writeParts(count: number): PartWriter {
  const writer = new PartWriter(folder, mixedColumns);
  for (let part = 0; part < count; part++) {
    writer.begin(part, part * 500);
    writer.append(mixedBlock(part * 500, 300));
    writer.append({ rows: 0, values: mixedColumns.map(() => new Float64Array(0)) });
    writer.append(mixedBlock(part * 500 + 300, 200));
    writer.finish();
  }
  return writer;
}

describe('parts on disk', () => {
  test('are listed in order with rows, first combination and blocks', () => {
    writeParts(3);
    const { finished, damaged } = findParts(folder, mixedColumns, { everyByte: true });
    expect(damaged).toEqual([]);
    expect(finished.map(({ part, firstCombination, rows }) => [part, firstCombination, rows])).toEqual([
      [0, 0, 500],
      [1, 500, 500],
      [2, 1000, 500],
    ]);
    expect(finished[0].blocks.map(({ rows }) => rows)).toEqual([300, 200]);
    expect(readdirSync(folder)).toEqual(['000000.part', '000001.part', '000002.part']);
  });

  test('are none in a folder that is not there', () => {
    expect(findParts(join(folder, 'nowhere'), mixedColumns)).toEqual({ finished: [], damaged: [] });
  });

  test('begun and not finished are not there, and leave nothing when abandoned', () => {
    const writer = writeParts(1);
    writer.begin(1, 500);
    writer.append(mixedBlock(500, 10));
    expect(findParts(folder, mixedColumns).finished).toHaveLength(1);
    expect(readdirSync(folder)).toHaveLength(2);
    writer.abandon();
    expect(readdirSync(folder)).toEqual(['000000.part']);
    expect(() => writer.append(mixedBlock(0, 1))).toThrow('no part was begun');
  });

  test('are noticed when cut short anywhere', () => {
    writeParts(1);
    const path = partPath(folder, 0);
    const whole = readFileSync(path);
    for (const length of [0, 1, 43, 44, 1000, whole.length - 45, whole.length - 1]) {
      writeFileSync(path, whole);
      truncateSync(path, length);
      expect(findParts(folder, mixedColumns)).toEqual({ finished: [], damaged: [path] });
    }
    writeFileSync(path, Buffer.concat([whole, Buffer.from('more')]));
    expect(findParts(folder, mixedColumns).damaged).toEqual([path]);
  });

  test('are noticed when one bit is altered anywhere', () => {
    writeParts(1);
    const path = partPath(folder, 0);
    const whole = readFileSync(path);
    for (let k = 0; k < 40; k++) {
      const at = Math.floor((k / 39) * (whole.length - 1));
      const altered = Buffer.from(whole);
      altered[at] ^= 1 << (k % 8);
      writeFileSync(path, altered);
      expect(findParts(folder, mixedColumns, { everyByte: true }).damaged).toEqual([path]);
    }
    writeFileSync(path, whole);
    expect(findParts(folder, mixedColumns, { everyByte: true }).damaged).toEqual([]);
  });

  test('of another table, or under another number, are not taken for finished ones', () => {
    writeParts(1);
    const path = partPath(folder, 0);
    expect(findParts(folder, [...mixedColumns, column('one_more')]).damaged).toEqual([path]);
    writeFileSync(partPath(folder, 7), readFileSync(path));
    expect(findParts(folder, mixedColumns).damaged).toEqual([partPath(folder, 7)]);
  });

  test('are removed, with their folder when it is empty', () => {
    writeParts(2);
    writeFileSync(join(folder, 'note.txt'), 'kept');
    removeParts(folder);
    expect(readdirSync(folder)).toEqual(['note.txt']);
    rmSync(join(folder, 'note.txt'));
    removeParts(folder);
    expect(existsSync(folder)).toBe(false);
    removeParts(folder);
  });
});

describe('temporary files', () => {
  const name = (host: string, id: number) =>
    `000001.part.${host}.${id}.${randomBytes(6).toString('hex')}.tmp`;
  const here = hostname().replaceAll(/[^A-Za-z0-9-]/g, '-') || 'unnamed';

  test('of dead processes and of this one are swept; those of living ones and of other machines stay a day', () => {
    const dead = spawnSync(process.execPath, ['-e', '']).pid;
    const mine = name(here, process.pid);
    const ofDead = name(here, dead);
    const ofLiving = name(here, process.ppid);
    const elsewhere = name('another-machine', dead);
    const old = name('another-machine', 1);
    const other = ['000001.part', 'notes.tmp'];
    for (const file of [mine, ofDead, ofLiving, elsewhere, old, ...other])
      writeFileSync(join(folder, file), '');
    const longAgo = Date.now() / 1000 - 2 * 24 * 3600;
    utimesSync(join(folder, old), longAgo, longAgo);
    expect(sweepTemporaryFiles(folder)).toBe(3);
    expect(readdirSync(folder).sort()).toEqual([ofLiving, elsewhere, ...other].sort());
  });

  test('are the ones that an unfinished file leaves', () => {
    const file = new AtomicFile(join(folder, 'table.csv'));
    file.write(Buffer.from('half'));
    expect(readdirSync(folder)).toHaveLength(1);
    expect(sweepTemporaryFiles(folder)).toBe(1);
    expect(readdirSync(folder)).toEqual([]);
  });

  test('are gone after commit, and the older file is replaced', () => {
    const path = join(folder, 'note.txt');
    writeFileAtomically(path, 'first');
    writeFileAtomically(path, 'second');
    expect(readFileSync(path, 'utf8')).toBe('second');
    expect(readdirSync(folder)).toEqual(['note.txt']);
  });
});

describe('faults of the machine', () => {
  test('a full disk is DISK_FULL, and the parts before it stay whole', (context) => {
    const disk = join(folder, 'disk');
    mkdirSync(disk);
    try {
      execFileSync('mount', ['-t', 'tmpfs', '-o', 'size=2m', 'tmpfs', disk], { stdio: 'ignore' });
    } catch {
      context.skip('a small disk may not be mounted here');
    }
    try {
      const writer = new PartWriter(disk, mixedColumns);
      const fill = () => {
        for (let part = 0; ; part++) {
          writer.begin(part, part * 5000);
          writer.append(mixedBlock(part * 5000, 5000));
          writer.finish();
        }
      };
      expect(fill).toThrow(expect.objectContaining({ name: 'MachineError', code: 'DISK_FULL' }));
      const { finished, damaged } = findParts(disk, mixedColumns, { everyByte: true });
      expect(finished.length).toBeGreaterThan(0);
      expect(damaged).toEqual([]);
      expect(readdirSync(disk)).toHaveLength(finished.length);
    } finally {
      execFileSync('umount', [disk]);
    }
  });

  test.each([
    ['ENOSPC', 'DISK_FULL'],
    ['EDQUOT', 'DISK_FULL'],
    ['EACCES', 'NO_PERMISSION'],
    ['EROFS', 'NO_PERMISSION'],
    ['EIO', 'WRITE_FAILED'],
  ])('%s is %s', (code, kind) => {
    const error = Object.assign(new Error(code), { code, syscall: 'write' });
    expect(writeFault(error, 'parts/000012.part')).toMatchObject({ name: 'MachineError', code: kind });
  });

  test('what the file system did not raise stays what it was', () => {
    const bug = new TypeError('a bug');
    expect(writeFault(bug, 'x')).toBe(bug);
  });

  test('a part in a folder that is a file cannot be written', () => {
    const file = join(folder, 'file');
    writeFileSync(file, '');
    const make = () => new PartWriter(join(file, 'parts'), mixedColumns);
    expect(make).toThrow(expect.objectContaining({ name: 'MachineError', code: 'WRITE_FAILED' }));
  });
});
