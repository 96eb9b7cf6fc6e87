import { expect, test } from 'vitest';
import { StudyError } from '../../src/errors.ts';
import { formatStudyError } from '../../src/study/format-study-error.ts';
import { edited, errorOf, varying } from './base-study.ts';

const plain = { color: false };

test('code, place, what was found, the line with its mark, what to do', () => {
  expect(formatStudyError(errorOf(varying('wing.taper: {from: 0.8, to: 0.3, step: 0.1}')), plain)).toBe(
    `base.yaml:29:15  EMPTY_AXIS
  vary.wing.taper runs from 0.8 down to 0.3 by steps of 0.1, so it has no values.
    29 |   wing.taper: {from: 0.8, to: 0.3, step: 0.1}
       |               ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
  Swap from and to, or change the sign of step.
`,
  );
});

test('faults are parted by an empty line', () => {
  const text = edited(['mass: 610 kg', 'mass: 610'], ['taper: 0.62', 'taper: 9']);
  expect(formatStudyError(errorOf(text), plain)).toMatch(/lb\.\n\nbase\.yaml:7:12 {2}OUT_OF_RANGE\n/);
});

test('colour is only added when asked for', () => {
  const error = errorOf(edited(['mass: 610 kg', 'mass: 610']));
  const coloured = formatStudyError(error, { color: true });
  expect(coloured).toContain('\u001b[31mMISSING_UNIT\u001b[0m');
  // biome-ignore lint/suspicious/noControlCharactersInRegex: escape sequences are what is removed
  expect(coloured.replace(/\u001b\[\d+m/g, '')).toBe(formatStudyError(error, plain));
});

test('a text can’t steer the terminal, and tabs keep the mark in place', () => {
  const text = 'title:\tx \u001b[31mred\u202e\n';
  const fault = {
    code: 'WRONG_TYPE',
    line: 1,
    column: 8,
    length: 1,
    found: 'a \u0007 bell',
    remedy: 'b',
  } as const;
  const shown = formatStudyError(new StudyError('x.yaml', text, [fault]), plain);
  expect(shown).toContain('     1 | title: x ·[31mred·\n       |        ^\n');
  expect(shown).toContain('a · bell');
});

test('a long line is cut to what stands round the mark', () => {
  const text = `title: ${'x'.repeat(500)}MARK${'y'.repeat(500)}`;
  const fault = { code: 'WRONG_TYPE', line: 1, column: 508, length: 4, found: 'a', remedy: 'b' } as const;
  const lines = formatStudyError(new StudyError('x.yaml', text, [fault]), plain).split('\n');
  expect(lines[2]!.length).toBeLessThan(120);
  expect(lines[2]!.slice(lines[3]!.indexOf('^'), lines[3]!.indexOf('^') + 4)).toBe('MARK');
});

test('a fault without a line of text has no excerpt', () => {
  const fault = { code: 'UNREADABLE_YAML', line: 1, column: 1, length: 1, found: 'f', remedy: 'r' } as const;
  expect(formatStudyError(new StudyError('x.yaml', '', [fault]), plain)).toBe(
    'x.yaml:1:1  UNREADABLE_YAML\n  f\n  r\n',
  );
});
