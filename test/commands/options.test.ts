import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { takesValue } from '../../src/commands/arguments.ts';
import { readBand } from '../../src/commands/charts.ts';
import { UsageError } from '../../src/errors.ts';
import { aftlimit } from './command-line.ts';

/** Arguments that cannot be used, and a word of what is said of them. */
const refused: readonly [string, string][] = [
  ['', 'A command is wanted'],
  ['frobnicate', 'Unknown argument: frobnicate'],
  ['rnu x.yaml', 'There is no such command; did you mean run?'],
  ['run', 'Too few arguments: 0 given, 1 needed'],
  ['run x.yaml y.yaml', 'Unknown argument: y.yaml'],
  ['schema x', 'Unknown argument: x'],
  ['run x.yaml --wrokers 2', 'Unknown argument: wrokers'],
  ['run x.yaml --workers abc', '--workers takes one number'],
  ['run x.yaml --workers 2x', '--workers takes one number'],
  ['run x.yaml --workers=', '--workers takes one number'],
  ['run x.yaml --workers', '--workers is given without its value'],
  ['run x.yaml --workers 2 --workers 3', '--workers takes one number'],
  ['run x.yaml --no-workers', '--workers takes one number'],
  ['run x.yaml --workers 0', '--workers is a whole number from 1 to 256'],
  ['run x.yaml --workers -1', '--workers is a whole number from 1 to 256'],
  ['run x.yaml --workers 1.5', '--workers is a whole number from 1 to 256'],
  ['run x.yaml --workers 257', '--workers is a whole number from 1 to 256'],
  ['run x.yaml --part-size 0', '--part-size is a whole number from 1 up'],
  ['run x.yaml --out=', '--out takes one text'],
  ['run x.yaml --out a --out b', '--out takes one text'],
  ['run x.yaml --out.folder a', 'Unknown argument: out.folder'],
  ['run x.yaml --quiet --json-lines', 'mutually exclusive'],
  ['worksheet x.yaml --combination=', '--combination takes one number'],
  ['worksheet x.yaml --combination 1 --combination 2', '--combination takes one number'],
  ['new biplane', '"tourer", "sailplane", "uncrewed"'],
];

describe.concurrent('arguments that cannot be used', () => {
  test.each(refused)('aftlimit %s', async (line, said) => {
    const { code, stdout, stderr } = await aftlimit(line === '' ? [] : line.split(' '));
    expect(stderr).toMatch(/^BAD_ARGUMENT {2}/);
    expect(stderr).toContain(said);
    expect({ code, stdout }).toEqual({ code: 2, stdout: '' });
  });
});

describe('--band', () => {
  test.each([
    ['8%:18%', { lower: 0.08, upper: 0.18 }],
    ['8 % : 18 %', { lower: 0.08, upper: 0.18 }],
    ['0.08:18%', { lower: 0.08, upper: 0.18 }],
    ['8%:', { lower: 0.08 }],
    [':18%', { upper: 0.18 }],
    ['-5%:0', { lower: -0.05, upper: 0 }],
    ['7.5%:7.5%', { lower: 0.075, upper: 0.075 }],
  ])('%s is read', (text, band) => {
    expect(readBand(text)).toEqual(band);
  });

  test.each([
    ['8%', /lower:upper/],
    [':', /lower:upper/],
    ['8%:18%:20%', /lower:upper/],
    ['8%-18%', /lower:upper/],
    ['eight:18%', /lower:upper/],
    ['8:18', /from -100 to 100 %/],
    ['8 %:180 %', /from -100 to 100 %/],
    ['18%:8%', /lower edge is above/],
  ])('%s is refused', (text, message) => {
    expect(() => readBand(text)).toThrow(UsageError);
    expect(() => readBand(text)).toThrow(message);
  });

  test('per cent and fraction are one', () => {
    const edge = fc.integer({ min: -1000, max: 1000 });
    fc.assert(
      fc.property(edge, edge, (a, b) => {
        const [lower, upper] = a < b ? [a, b] : [b, a];
        const inPercent = readBand(`${lower / 10}%:${upper / 10} %`);
        const asFraction = readBand(`${(lower / 1000).toFixed(3)}:${(upper / 1000).toFixed(3)}`);
        expect(inPercent.lower).toBeCloseTo(asFraction.lower!, 12);
        expect(inPercent.upper).toBeCloseTo(asFraction.upper!, 12);
      }),
    );
  });
});

test.each([
  ['--out', true],
  ['--workers', true],
  ['--set', true],
  ['--out=runs', false],
  ['--afresh', false],
  ['--no-charts', false],
  ['--json-lines', false],
  ['--help', false],
  ['-q', false],
  ['study.yaml', false],
])('the word after %s is its value: %s', (word, expected) => {
  expect(takesValue(word)).toBe(expected);
});
