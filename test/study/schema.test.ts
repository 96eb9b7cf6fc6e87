import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { parse } from 'yaml';
import { figureNameOf, inputDefinition, inputDefinitions } from '../../src/study/inputs.ts';
import { readStudy } from '../../src/study/read-study.ts';
import { studyJsonSchema } from '../../src/study/schema.ts';
import { figures } from './base-study.ts';
import { inputsMarkdown } from './inputs-markdown.ts';

const reference = readFileSync(new URL('../../studies/README.md', import.meta.url), 'utf8');

interface Part {
  readonly description?: string;
  readonly properties?: Record<string, Part>;
  readonly anyOf?: readonly Part[];
  readonly items?: Part;
  readonly additionalProperties?: Part | boolean;
}

/** Every key of the schema with its path. */
function keysOf(part: Part, path = ''): { path: string; key: string; part: Part }[] {
  const here = Object.entries(part.properties ?? {}).flatMap(([key, inner]) => [
    { path: `${path}.${key}`, key, part: inner },
    ...keysOf(inner, `${path}.${key}`),
  ]);
  const deeper = [...(part.anyOf ?? []), part.items, part.additionalProperties]
    .filter((inner): inner is Part => typeof inner === 'object')
    .flatMap((inner) => keysOf(inner, path));
  return [...here, ...deeper];
}

const keys = keysOf(studyJsonSchema() as Part);

test('the schema is an object of known keys, with the needed ones named', () => {
  const schema = studyJsonSchema();
  expect(schema.required).toEqual(['title', 'aeroplane', 'conditions']);
  expect(schema.additionalProperties).toBe(false);
  expect(keys.length).toBeGreaterThan(150);
});

test('every key of the schema has a description', () => {
  expect(keys.filter(({ part }) => !part.description).map(({ path }) => path)).toEqual([]);
});

test('an editor can complete the varied paths', () => {
  const varied = keys.filter(({ path }) => path.startsWith('.vary.')).map(({ key }) => key);
  expect(varied).toEqual(expect.arrayContaining(['wing.span', 'tail.arm', 'cg', 'tied']));
});

test('every key of the schema stands in the reference', () => {
  const missing = [...new Set(keys.map(({ key }) => key))].filter(
    (key) => !new RegExp(`\\b${key}\\b`).test(reference),
  );
  expect(missing).toEqual([]);
});

test('the reference’s table of numbers is the program’s', () => {
  expect(reference.slice(reference.indexOf('| path | symbol |')).trim()).toBe(inputsMarkdown());
});

test('every whole study in the reference reads without a fault', () => {
  const blocks = [...reference.matchAll(/```yaml\n(.*?)```/gs)].map((match) => match[1]!);
  const whole = blocks.filter((block) => block.startsWith('title:'));
  expect(whole.length).toBeGreaterThan(0);
  for (const block of whole) expect(readStudy(block, 'README.md', () => figures).title).not.toBe('');
  for (const block of blocks) expect(() => parse(block)).not.toThrow();
});

test('the table of numbers has each path once, with limits the right way round', () => {
  const paths = inputDefinitions.map((entry) => entry.path);
  expect(new Set(paths).size).toBe(paths.length);
  for (const { path, least, most, meaning, limits, whenLeftOut } of inputDefinitions) {
    expect(least, path).toBeLessThan(most);
    expect(meaning, path).toMatch(/^[A-Z].*\.$/);
    expect(limits, path).not.toBe('');
    if (whenLeftOut) {
      expect(whenLeftOut.value, path).toBeGreaterThanOrEqual(least);
      expect(whenLeftOut.value, path).toBeLessThanOrEqual(most);
    }
  }
});

test('a path of a list entry is filled in', () => {
  expect(inputDefinition('wing.panels[2].taper')).toMatchObject({
    path: 'wing.panels[2].taper',
    symbol: 'λ_2',
    meaning: 'Outboard chord over inboard chord of wing panel 2.',
  });
  expect(inputDefinition('cg.aft').dimension).toBe('fraction_of_mac');
  expect(inputDefinition('cg.aft', 'station').dimension).toBe('length');
  expect(figureNameOf('wing.panels[2].taper')).toBe('wing_panels_2_taper');
  expect(() => inputDefinition('wing.nothing')).toThrow(RangeError);
});
