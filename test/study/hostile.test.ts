/** Whatever the text, the answer is a study or a StudyError; never a stack trace, a hang or a full memory. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { StudyError } from '../../src/errors.ts';
import { formatStudyError } from '../../src/study/format-study-error.ts';
import { starterStudy } from '../../src/study/starters.ts';
import { baseStudy, edited, errorOf, read, varying } from './base-study.ts';
import { wholeStudy } from './whole-study.ts';

test.each([
  ['a list in flow', `a: ${'['.repeat(10_000)}${']'.repeat(10_000)}`],
  ['a list never closed', `a: ${'['.repeat(10_000)}`],
  ['a list in blocks', `${'- '.repeat(10_000)}a`],
  ['maps in flow', `${'{a: '.repeat(10_000)}1${'}'.repeat(10_000)}`],
  ['maps in blocks', Array.from({ length: 1000 }, (_, i) => `${' '.repeat(i)}a:`).join('\n')],
  ['keys of keys', `${'? '.repeat(10_000)}a`],
])('%s, ten thousand deep, is one fault with a place', (_, text) => {
  const { faults } = errorOf(text);
  expect(faults.map((fault) => fault.code)).toEqual(['UNREADABLE_YAML']);
  expect(faults[0]!.found).toMatch(/nested/);
});

test('an alias bomb is refused at each of its anchors and never expanded', () => {
  const names = 'abcdefghij';
  const lines = [...names].map(
    (name, i) => `${name}: &${name} [${i ? Array(9).fill(`*${names[i - 1]}`) : 'x'}]`,
  );
  const { faults } = errorOf(`${lines.join('\n')}\n`);
  const aliases = faults.filter((fault) => fault.code === 'ALIAS_REFUSED');
  expect(aliases[0]).toMatchObject({ line: 1, column: 4 });
  expect(aliases).toHaveLength(names.length + 9 * (names.length - 1));
});

test('keys of the prototype change no prototype', () => {
  const text = edited([
    '  mass: 610 kg',
    '  mass: 610 kg\n  __proto__: {polluted: 1}\n  constructor: {prototype: {polluted: 1}}',
  ]);
  expect(errorOf(text).faults.map((fault) => fault.code)).toEqual(['UNKNOWN_KEY', 'UNKNOWN_KEY']);
  expect('polluted' in {}).toBe(false);
  expect(errorOf(varying('__proto__: [1, 2]')).faults[0]?.code).toBe('UNKNOWN_KEY');
  expect(errorOf(varying('toString: [1, 2]')).faults[0]?.code).toBe('NOT_A_NUMBER_OF_THE_STUDY');
  expect(errorOf(`${baseStudy}table: {columns: [constructor]}\n`).faults[0]?.code).toBe('UNKNOWN_FIGURE');
});

test('a count that no machine can hold is refused with its place', () => {
  for (const count of ['1e300', '9007199254740993', '1e15']) {
    const { faults } = errorOf(varying(`wing.taper: {from: 0.4, to: 0.6, count: ${count}}`));
    expect(faults.map((fault) => fault.code)).toEqual(['TOO_MANY_COMBINATIONS']);
  }
  const { faults } = errorOf(varying('wing.taper: {from: 0.4, to: 0.6, step: 1e-300}'));
  expect(faults.map((fault) => fault.code)).toEqual(['TOO_MANY_COMBINATIONS']);
});

test('ten thousand faults are told, and printed only as far as they help', () => {
  const text = `${baseStudy}${Array.from({ length: 10_000 }, (_, i) => `k${i}: 1`).join('\n')}\n`;
  const error = errorOf(text);
  expect(error.faults).toHaveLength(10_000);
  expect(formatStudyError(error, { color: false })).toMatch(/and 9950 more faults\.\n$/);
});

/** Pieces that break studies: YAML signs, hostile words, numbers at the edge. */
const pieces = fc.oneof(
  fc.constantFrom(
    ...[
      '[',
      ']',
      '{',
      '}',
      ':',
      ': ',
      ',',
      '- ',
      '? ',
      '&a ',
      '*a',
      '<<: ',
      '!!map ',
      '|',
      '>',
      '"',
      "'",
      '#',
      '%',
      '@',
      '\t',
      '\n',
      '\r',
      '---\n',
      '...\n',
      '~',
      '\u0000',
      '\ufffd',
      '\u202e',
      '😀',
    ],
    ...[
      '__proto__',
      'constructor',
      'null',
      'true',
      '.inf',
      '.nan',
      '1e999',
      '-1e-999',
      '0x10',
      '0',
      '-0',
      '1e15',
      '610',
      '24',
      'none',
      'all',
      'hold: area',
      'count: 0',
      'step: 0',
    ],
  ),
  fc.string({ maxLength: 6 }),
);
const edits = fc.array(
  fc.record({
    at: fc.double({ min: 0, max: 1, noNaN: true }),
    cut: fc.integer({ min: 0, max: 30 }),
    insert: pieces,
  }),
  { minLength: 1, maxLength: 4 },
);

test('a study damaged anywhere gives a study or faults with a place inside its text', () => {
  const good = [
    baseStudy,
    wholeStudy,
    starterStudy('tourer'),
    starterStudy('sailplane'),
    starterStudy('uncrewed'),
  ];
  fc.assert(
    fc.property(fc.constantFrom(...good), edits, (study, changes) => {
      let text = study;
      for (const { at, cut, insert } of changes) {
        const start = Math.floor(at * text.length);
        text = text.slice(0, start) + insert + text.slice(start + cut);
      }
      try {
        read(text);
      } catch (error) {
        if (!(error instanceof StudyError)) throw error;
        const lines = error.text.split('\n');
        expect(error.faults.length).toBeGreaterThan(0);
        for (const { line, column, length, found, remedy } of error.faults) {
          expect(line).toBeLessThanOrEqual(lines.length);
          expect(column).toBeLessThanOrEqual(lines[line - 1]!.length + 1);
          expect(length).toBeGreaterThanOrEqual(1);
          expect(`${found} ${remedy}`).not.toMatch(/undefined|NaN|\[object|Invalid input/);
        }
        formatStudyError(error, { color: true });
      }
    }),
    { numRuns: 600 },
  );
}, 120_000);

/** Texts with any one value exchanged, in blocks and inside braces. */
const lineValue = /(?<=: ).*$/gm;
const innerValue = /(?<=: )[^,{}[\]\n]+|(?<=\[)[^[\]{}\n]*(?=\])/g;

test.each([
  ['a plain study', baseStudy],
  ['a whole study', wholeStudy],
])(
  '%s with a value exchanged for any other gives a study or faults',
  (_, study) => {
    const places = [...study.matchAll(lineValue), ...study.matchAll(innerValue)];
    const values = fc.oneof(
      pieces,
      fc.constantFrom('[1, 2]', '{a: 1}', '[[1]]', '[{a: 1 m}]', '5 kg', '5 m', '5 %', '5 deg', '""', ''),
    );
    fc.assert(
      fc.property(fc.integer({ min: 0, max: places.length - 1 }), values, (index, value) => {
        const { 0: old, index: start } = places[index]!;
        const text = study.slice(0, start) + value + study.slice(start + old.length);
        try {
          read(text);
        } catch (error) {
          if (!(error instanceof StudyError)) throw error;
          for (const { found, remedy } of error.faults)
            expect(`${found} ${remedy}`).not.toMatch(/undefined|NaN|\[object|Invalid input/);
        }
      }),
      { numRuns: 400 },
    );
  },
  120_000,
);
