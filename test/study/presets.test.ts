/** Requirements by a preset's name, and their faults. */
import { expect, test } from 'vitest';
import { forcePresetNames } from '../../src/study/force-presets.ts';
import { edited, errorOf, type FaultCase, marked, read } from './base-study.ts';
import { wholeEdited } from './whole-study.ts';

const handyTail = '  handy_tail: {figure: tail_span, at_most: 3.5 m}';
const ofWhole = '  conditions.climb.power: {at_most: 1}';
const required = (map: string) => wholeEdited([ofWhole, `${ofWhole}\n  pull: {${map}}`]);
const pull = '14-cfr-23.143-c-2016';

const cases: readonly FaultCase[] = [
  {
    what: 'a preset that is not known',
    text: required('preset: 14-cfr-23.143c-2016'),
    code: 'UNKNOWN_WORD',
    mark: '14-cfr-23.143c-2016',
    says: /Did you mean '14-cfr-23\.143-c-2016'/,
  },
  {
    what: 'a preset that is like none',
    text: required('preset: stick'),
    code: 'UNKNOWN_WORD',
    mark: 'stick',
    says: /14-cfr-23\.155-2016/,
  },
  {
    what: 'a preset that is no word',
    text: required('preset: 155'),
    code: 'WRONG_TYPE',
    mark: '155',
  },
  {
    what: 'a preset beside a figure',
    text: required(`preset: ${pull}, figure: wing_span`),
    code: 'OVERDETERMINED',
    mark: 'figure',
    says: /beside a preset/,
  },
  {
    what: 'a preset beside at_least',
    text: required(`at_least: 3 N, preset: ${pull}`),
    code: 'OVERDETERMINED',
    mark: 'at_least',
  },
  {
    what: 'a preset beside at_most',
    text: required(`preset: ${pull}, at_most: 3 N`),
    code: 'OVERDETERMINED',
    mark: 'at_most',
  },
  {
    what: 'a preset without a control',
    text: edited([handyTail, `  pull: {preset: ${pull}}`]),
    code: 'MISSING_KEY',
    mark: pull,
    says: /has no control/,
  },
  {
    what: 'a preset without hinge moments',
    text: required(`preset: ${pull}`).replace(/ {4}elevator: .*\n/, '    all_moving: true\n'),
    code: 'MISSING_KEY',
    mark: pull,
    says: /hinge moments/,
  },
  {
    what: 'a scale of another kind',
    text: required(`preset: ${pull}, scale: 1 kg`),
    code: 'WRONG_DIMENSION',
    mark: '1 kg',
  },
  {
    what: 'a scale of nothing',
    text: required(`preset: ${pull}, scale: 0 N`),
    code: 'OUT_OF_RANGE',
    mark: '0 N',
  },
  {
    what: 'a preset of the static-margin band',
    text: wholeEdited(['static_margin: {at_least: 5 %', `static_margin: {preset: ${pull}, at_least: 5 %`]),
    code: 'UNKNOWN_KEY',
    mark: 'preset',
  },
  {
    what: 'a load factor without a turn',
    text: wholeEdited(['load_factor: 4.4', 'load_factor: 1']),
    code: 'OUT_OF_RANGE',
    mark: '1',
    line: 'load_factor',
  },
];

test.each(cases)('$code: $what', ({ text, code, mark, line, says }) => {
  const error = errorOf(text);
  const told = error.faults.map((one) => `${one.code} at '${marked(error, one)}': ${one.found}`);
  const fault = error.faults.find((one) => one.code === code && marked(error, one) === mark);
  expect(fault, told.join('\n')).toBeDefined();
  expect(error.text.split('\n')[fault!.line - 1]).toContain(line ?? mark);
  if (says) expect(`${fault!.found} ${fault!.remedy}`).toMatch(says);
  expect(told).toHaveLength(1);
});

test('every preset is read, and needs no figure of its own name', () => {
  for (const preset of forcePresetNames) {
    const requirement = read(required(`preset: ${preset}`)).requirements.at(-1);
    expect(requirement).toMatchObject({ name: 'pull', preset, atLeast: 0 });
    expect(requirement).not.toHaveProperty('atMost');
  }
});

test('several presets are faults together where there is no control', () => {
  const lines = forcePresetNames.map((preset, k) => `  force_${k}: {preset: ${preset}}`);
  const error = errorOf(edited([handyTail, lines.join('\n')]));
  expect(error.faults.map((fault) => marked(error, fault))).toEqual(forcePresetNames);
});
