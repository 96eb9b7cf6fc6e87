import { readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { evaluateParts } from '../../src/engine/evaluate-parts.ts';
import { layOut } from '../../src/engine/lay-out.ts';
import { partsOf } from '../../src/plan/plan.ts';
import { findParts } from '../../src/results/part-files.ts';
import { testStudy } from '../studies.ts';
import { narrowTable, temporaryFolder } from './run-folder.ts';

const study = testStudy(narrowTable);
const { plan, columns } = layOut(study);
const parts = partsOf(plan, 1);

async function evaluate(dying: { part: number; how: 'exit' | 'throw'; times: number }, workers: number) {
  const folder = temporaryFolder();
  writeFileSync(join(folder, 'dying.json'), JSON.stringify(dying));
  const done: number[] = [];
  const notes: string[] = [];
  const result = await evaluateParts({
    setup: { study, partsFolder: join(folder, 'parts') },
    parts,
    workers,
    stop: new AbortController().signal,
    onPart: ({ number }) => done.push(number),
    onNote: (text) => notes.push(text),
    workerFile: new URL('./dying-worker.mjs', import.meta.url).href,
  });
  const finished = findParts(join(folder, 'parts'), columns, { everyByte: true }).finished.map(
    ({ part }) => part,
  );
  const deaths = readdirSync(folder).filter((name) => name.startsWith('death-')).length;
  return { ...result, done: done.sort(), notes, finished, deaths };
}

describe('a worker that dies', () => {
  it.each([
    ['exit', 1],
    ['exit', 2],
    ['throw', 1],
  ] as const)('once (%s, %i workers): its part is tried again, nothing is lost', async (how, workers) => {
    const found = await evaluate({ part: 2, how, times: 1 }, workers);
    expect(found).toMatchObject({ stopped: false, lost: [], deaths: 1 });
    expect(found.done).toEqual([0, 1, 2, 3, 4]);
    expect(found.finished).toEqual([0, 1, 2, 3, 4]);
    expect(found.notes.filter((note) => note.startsWith('The worker on part 2 failed'))).toHaveLength(1);
    expect(found.notes.every((note) => note.endsWith('it is tried once more.'))).toBe(true);
  });

  it.each(['exit', 'throw'] as const)(
    'each time (%s): its part is told by number, the others are kept',
    async (how) => {
      const found = await evaluate({ part: 1, how, times: 9 }, 2);
      expect(found).toMatchObject({ stopped: false, lost: [1], deaths: 2 });
      expect(found.done).toEqual([0, 2, 3, 4]);
      expect(found.finished).toEqual([0, 2, 3, 4]);
      expect(found.notes.at(-1)).toContain('it is left out');
      if (how === 'throw') expect(found.notes[0]).toContain('(died as asked)');
    },
  );
});
