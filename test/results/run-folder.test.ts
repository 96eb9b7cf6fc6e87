import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { type RunRecord, readRun, runPaths, thisMachine, writeRun } from '../../src/results/run-folder.ts';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'aftlimit-run-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

const record: RunRecord = {
  program: 'aftlimit',
  version: '0.1.0',
  studyFile: 'coastal-tourer.yaml',
  studyText: 'title: Two-seat coastal tourer\n',
  studyHash: 'a'.repeat(64),
  status: 'running',
  combinations: 306_000,
  blockSize: 16_384,
  blocksPerPart: 1,
  rows: 300_000,
  columns: ['combination', 'wing_span_m'],
  methods: { downwash: 'torenbeek' },
  machine: thisMachine(),
  started: '2026-01-01T10:00:00.000Z',
  seconds: 0,
};

describe('run.json', () => {
  test('comes back as written, and a later record replaces it', () => {
    const run = join(folder, 'out', 'coastal-tourer');
    writeRun(run, record);
    expect(readRun(run)).toEqual(record);
    const finished: RunRecord = {
      ...record,
      status: 'finished',
      finished: '2026-01-01T10:01:00.000Z',
      seconds: 60,
    };
    writeRun(run, finished);
    expect(readRun(run)).toEqual(finished);
    expect(readdirSync(run)).toEqual(['run.json']);
  });

  test('says nothing of whose machine it was', () => {
    expect(JSON.stringify(thisMachine())).not.toContain(hostname());
    expect(Object.keys(thisMachine())).toEqual(['cores', 'node', 'platform']);
  });

  test('that is missing is NO_SUCH_RUN', () => {
    const wanted = {
      name: 'UsageError',
      code: 'NO_SUCH_RUN',
      message: expect.stringContaining('no run.json'),
    };
    expect(() => readRun(folder)).toThrow(expect.objectContaining(wanted));
    expect(() => readRun(join(folder, 'nowhere'))).toThrow(expect.objectContaining(wanted));
  });

  test.each([
    ['{"program": "aft', 'not well-formed JSON'],
    ['[]', 'holds no record'],
    [JSON.stringify({ ...record, status: 'done' }), 'status is missing or of the wrong kind'],
    [JSON.stringify({ ...record, rows: -1 }), 'rows is missing or of the wrong kind'],
    [JSON.stringify({ ...record, columns: [1] }), 'columns is missing or of the wrong kind'],
    [JSON.stringify({ ...record, studyText: undefined }), 'studyText is missing or of the wrong kind'],
    [JSON.stringify({ ...record, machine: null }), 'machine is missing or of the wrong kind'],
  ])('that is damaged (%s) is NO_SUCH_RUN and says how', (text, fault) => {
    writeFileSync(runPaths(folder).record, text);
    const wanted = { name: 'UsageError', code: 'NO_SUCH_RUN', message: expect.stringContaining(fault) };
    expect(() => readRun(folder)).toThrow(expect.objectContaining(wanted));
  });

  test('that may not be read is a fault of the machine', () => {
    // A folder of that name cannot be read as a file, whoever asks.
    const run = join(folder, 'run');
    writeRun(join(run, 'run.json'), record);
    expect(() => readRun(run)).toThrow(
      expect.objectContaining({ name: 'MachineError', code: 'READ_FAILED' }),
    );
  });
});
