/** Each code with its place: the marked text and its line. */
import { expect, test } from 'vitest';
import { type StudyFaultCode, studyFaultCodes } from '../../src/errors.ts';
import { aeroplaneCases } from './aeroplane-cases.ts';
import { baseStudy, edited, errorOf, type FaultCase, marked, varying } from './base-study.ts';

const panels = '    panels: [{width: 3 m, taper: 0.8}, {width: 1.7 m, taper: 0.6}]\n';
const fixedTaper = ['  wing.taper: [0.4, 0.5, 0.6]\n', ''] as const;
const panelWing = (list = panels) =>
  edited(fixedTaper, [
    '    span: 9.4 m\n    taper: 0.62\n    sweep_quarter_chord: 1 deg\n    dihedral: 5 deg\n',
    list,
  ]);
const fractionWing = (sum: number) =>
  edited(fixedTaper, [
    '    taper: 0.62\n    sweep_quarter_chord: 1 deg\n    dihedral: 5 deg\n',
    `    panels: [{span_fraction: 55 %, taper: 0.8}, {span_fraction: ${sum - 55} %, taper: 0.6}]\n`,
  ]);
const withRequire = (line: string) =>
  edited(['  handy_tail: {figure: tail_span, at_most: 3.5 m}', `  ${line}`]);

const shapeCases: readonly FaultCase[] = [
  // YAML
  {
    what: 'a bracket left open',
    text: edited(['{name: cruise', '[{name: cruise']),
    code: 'UNREADABLE_YAML',
    mark: 'v',
    line: 'vary:',
  },
  {
    what: 'a tab as indentation',
    text: edited(['    span: 9.4 m', '\tspan: 9.4 m']),
    code: 'UNREADABLE_YAML',
    mark: '\t',
    line: 'span: 9.4 m',
    says: /tab/,
  },
  {
    what: 'a second document',
    text: `${baseStudy}---\ntitle: again\n`,
    code: 'UNREADABLE_YAML',
    mark: 'title: again',
    says: /second document/,
  },
  {
    what: 'a tag',
    text: edited(['title: Base study', 'title: !!str Base']),
    code: 'UNREADABLE_YAML',
    mark: 'Base',
    says: /tag/,
  },
  {
    what: 'a control character',
    text: edited(['Base study', 'Base\u0000study']),
    code: 'UNREADABLE_YAML',
    mark: '\u0000',
    line: 'title',
  },
  {
    what: 'a lone carriage return',
    text: edited(['Base study\n', 'Base study\r']),
    code: 'UNREADABLE_YAML',
    mark: '\r',
    line: 'title',
    says: /carriage return/,
  },
  { what: 'an empty file', text: '', code: 'UNREADABLE_YAML', mark: '', line: '', says: /empty/ },
  {
    what: 'an undecodable character',
    text: edited(['Base study', 'Base\ufffdstudy']),
    code: 'UNREADABLE_YAML',
    mark: '\ufffd',
    line: 'title',
  },
  {
    what: 'an anchor',
    text: edited(['area: 11.4 m^2', 'area: &a 11.4 m^2']),
    code: 'ALIAS_REFUSED',
    mark: '&a 11.4 m^2',
  },
  {
    what: 'an alias',
    text: edited(['area: 11.4 m^2', 'area: &a 11.4 m^2'], ['span: 9.4 m', 'span: *a']),
    code: 'ALIAS_REFUSED',
    mark: '*a',
  },
  {
    what: 'a merge key',
    text: edited(['  mass: 610 kg', '  mass: 610 kg\n  <<: {a: 1}']),
    code: 'ALIAS_REFUSED',
    mark: '<<',
  },
  {
    what: 'a key twice',
    text: edited(['    span: 9.4 m', '    span: 9.4 m\n    taper: 0.7']),
    code: 'DUPLICATE_KEY',
    mark: 'taper',
    line: 'taper: 0.62',
  },
  // structure
  {
    what: 'a misspelt key',
    text: edited(['    taper: 0.62', '    taper: 0.62\n    dihedrel: 3 deg'], ['    dihedral: 5 deg\n', '']),
    code: 'UNKNOWN_KEY',
    mark: 'dihedrel',
    says: /Did you mean 'dihedral'/,
  },
  {
    what: 'a key of the prototype',
    text: edited(['title: Base study', 'title: Base study\n__proto__: {a: 1}']),
    code: 'UNKNOWN_KEY',
    mark: '__proto__',
  },
  {
    what: 'a key named constructor',
    text: edited(['title: Base study', 'title: Base study\nconstructor: 1']),
    code: 'UNKNOWN_KEY',
    mark: 'constructor',
  },
  { what: 'no mass', text: edited(['  mass: 610 kg\n', '']), code: 'MISSING_KEY', mark: 'aeroplane' },
  {
    what: 'no body',
    text: edited([baseStudy.slice(baseStudy.indexOf('  body:'), baseStudy.indexOf('  cg:')), '']),
    code: 'MISSING_KEY',
    mark: 'aeroplane',
    says: /body: none/,
  },
  { what: 'no title', text: edited(['title: Base study\n', '']), code: 'MISSING_KEY', mark: 'aeroplane' },
  {
    what: 'neither taper nor panels',
    text: edited(['    taper: 0.62\n', '']),
    code: 'MISSING_KEY',
    mark: 'wing',
    line: '  wing:',
  },
  {
    what: 'no angle of a V-tail',
    text: edited(['  tail:\n', '  tail:\n    layout: V\n']),
    code: 'MISSING_KEY',
    mark: 'layout',
  },
  {
    what: 'no kind of the CG',
    text: edited(['{as: percent_mac, ', '{']),
    code: 'MISSING_KEY',
    mark: 'forward',
  },
  {
    what: 'a list for a text',
    text: edited(['title: Base study', 'title: [1]']),
    code: 'WRONG_TYPE',
    mark: '[1]',
  },
  {
    what: 'a text for a number',
    text: edited(['taper: 0.62', 'taper: much']),
    code: 'WRONG_TYPE',
    mark: 'much',
  },
  {
    what: 'a decimal comma',
    text: edited(['area: 11.4 m^2', 'area: 11,4 m^2']),
    code: 'WRONG_TYPE',
    mark: '11,4 m^2',
    says: /point/,
  },
  {
    what: 'no value',
    text: edited(['taper: 0.62', 'taper:']),
    code: 'WRONG_TYPE',
    mark: 'taper',
    line: 'taper:',
  },
  { what: 'not a number', text: edited(['taper: 0.62', 'taper: .nan']), code: 'WRONG_TYPE', mark: '.nan' },
  { what: 'a map for the study', text: '- 1\n', code: 'WRONG_TYPE', mark: '- 1' },
  {
    what: 'an unknown word',
    text: edited(['  tail:\n', '  tail:\n    layout: convential\n']),
    code: 'UNKNOWN_WORD',
    mark: 'convential',
    says: /Did you mean 'conventional'/,
  },
  // numbers
  { what: 'no unit', text: edited(['span: 9.4 m', 'span: 9.4']), code: 'MISSING_UNIT', mark: '9.4' },
  {
    what: 'no unit of a slope',
    text: edited(['section: naca-2412', 'section: {lift_slope: 6.1}']),
    code: 'MISSING_UNIT',
    mark: '6.1',
  },
  {
    what: 'an unknown unit',
    text: edited(['span: 9.4 m', 'span: 9.4 metres long']),
    code: 'UNKNOWN_UNIT',
    mark: '9.4 metres long',
  },
  {
    what: 'an area for a length',
    text: edited(['span: 9.4 m', 'span: 9.4 m^2']),
    code: 'WRONG_DIMENSION',
    mark: '9.4 m^2',
    says: /unit of an area/,
  },
  {
    what: 'kilograms for a speed',
    text: edited(['speed: 105 kt', 'speed: 105 kg']),
    code: 'WRONG_DIMENSION',
    mark: '105 kg',
    says: /unit of a mass/,
  },
  {
    what: 'a percent of a length',
    text: edited(['span: 9.4 m', 'span: 9.4 %']),
    code: 'WRONG_DIMENSION',
    mark: '9.4 %',
  },
  {
    what: 'a slope per degree read as per radian',
    text: edited(['section: naca-2412', 'section: {lift_slope: 0.105 /rad}']),
    code: 'OUT_OF_RANGE',
    mark: '0.105 /rad',
  },
  {
    what: 'a bare 24 for a fraction',
    text: edited(['forward: 24 %', 'forward: 24']),
    code: 'OUT_OF_RANGE',
    mark: '24',
    says: /24 % for 0\.24/,
  },
  {
    what: 'a varied value beyond its limits',
    text: varying('wing.taper: [0.4, 1.9]'),
    code: 'OUT_OF_RANGE',
    mark: '1.9',
  },
  {
    what: 'an end of a range beyond its limits',
    text: varying('wing.taper: {from: 0.01, to: 0.5, count: 3}'),
    code: 'OUT_OF_RANGE',
    mark: '0.01',
  },
  {
    what: 'a size that follows and is impossible',
    text: edited(['area: 11.4 m^2', 'area: 0.9 m^2']),
    code: 'OUT_OF_RANGE',
    mark: '0.9 m^2',
    says: /wing.aspect_ratio/,
  },
  { what: 'infinity', text: edited(['taper: 0.62', 'taper: 1e999']), code: 'OUT_OF_RANGE', mark: '1e999' },
  {
    what: 'one body station',
    text: edited([
      '      - {at: 2 m, width: 1.1 m, depth: 1.2 m}\n      - {at: 7 m, width: 0.2 m, depth: 0.3 m}\n',
      '',
    ]),
    code: 'OUT_OF_RANGE',
    mark: '- {at: 0 m, width: 0.4 m, depth: 0.5 m}',
  },
  {
    what: 'a count of nothing kept',
    text: `${baseStudy}shortlist: {keep: 0}\n`,
    code: 'OUT_OF_RANGE',
    mark: '0',
    line: 'keep',
  },
  {
    what: 'logarithmic through zero',
    text: varying('wing.height: {from: -1 m, to: 1 m, count: 3, spacing: logarithmic}'),
    code: 'OUT_OF_RANGE',
    mark: 'spacing',
  },
  // pairs
  {
    what: 'three sizes',
    text: edited(['    span: 9.4 m', '    span: 9.4 m\n    root_chord: 1.5 m']),
    code: 'OVERDETERMINED',
    mark: 'root_chord',
  },
  {
    what: 'two sweeps',
    text: edited(['    taper: 0.62', '    taper: 0.62\n    sweep_leading_edge: 3 deg']),
    code: 'OVERDETERMINED',
    mark: 'sweep_leading_edge',
  },
  {
    what: 'area and volume',
    text: edited(['    volume: 0.42', '    volume: 0.42\n    area: 2 m^2']),
    code: 'OVERDETERMINED',
    mark: 'volume',
    line: 'volume: 0.42',
  },
  {
    what: 'taper beside panels',
    text: edited(
      fixedTaper,
      ['    span: 9.4 m\n', panels],
      ['    sweep_quarter_chord: 1 deg\n    dihedral: 5 deg\n', ''],
    ),
    code: 'OVERDETERMINED',
    mark: 'taper',
    line: '    taper: 0.62',
  },
  {
    what: 'a span beside panel widths',
    text: panelWing(`    span: 9.4 m\n${panels}`),
    code: 'OVERDETERMINED',
    mark: 'span',
  },
  {
    what: 'fractions that do not add up',
    text: fractionWing(99),
    code: 'OVERDETERMINED',
    mark: 'span_fraction',
    says: /add up to 99 %/,
  },
  {
    what: 'a v_angle without a V',
    text: edited(['    volume: 0.42', '    volume: 0.42\n    v_angle: 35 deg']),
    code: 'OVERDETERMINED',
    mark: 'v_angle',
  },
  {
    what: 'an elevator chord on an all-moving tail',
    text: edited(['    volume: 0.42', '    volume: 0.42\n    all_moving: true']),
    code: 'OVERDETERMINED',
    mark: 'chord_fraction',
  },
  {
    what: 'step and count',
    text: varying('wing.taper: {from: 0.4, to: 0.6, step: 0.1, count: 3}'),
    code: 'OVERDETERMINED',
    mark: 'count',
  },
  {
    what: 'a hold of a number that is no pair',
    text: varying('mass: {from: 500 kg, to: 600 kg, count: 3, hold: area}'),
    code: 'OVERDETERMINED',
    mark: 'area',
    line: 'hold: area',
  },
  {
    what: 'a hold that lets a varied number go',
    text: varying(
      'wing.span: {from: 9 m, to: 10 m, count: 2, hold: root_chord}\nwing.area: [11 m^2, 12 m^2]',
    ),
    code: 'OVERDETERMINED',
    mark: 'root_chord',
  },
  {
    what: 'a fraction varied alone',
    text: `${fractionWing(100).split('vary:')[0]}vary:\n  wing.panels[1].span_fraction: [55 %, 50 %]\n`,
    code: 'OVERDETERMINED',
    mark: '50 %',
  },
  {
    what: 'one size',
    text: edited(['    span: 9.4 m\n', '']),
    code: 'UNDERDETERMINED',
    mark: 'area',
    line: '    area:',
  },
  {
    what: 'neither arm nor station',
    text: edited(['    arm: 4.3 m\n', ''], ['  tail.arm: {from: 3.6 m, to: 5.2 m, count: 17}\n', '']),
    code: 'UNDERDETERMINED',
    mark: 'tail',
    line: '  tail:',
  },
  {
    what: 'neither step nor count',
    text: varying('wing.taper: {from: 0.4, to: 0.6}'),
    code: 'UNDERDETERMINED',
    mark: 'wing.taper',
  },
  {
    what: 'a requirement without a limit',
    text: withRequire('handy_tail: {figure: tail_span}'),
    code: 'UNDERDETERMINED',
    mark: 'handy_tail',
  },
  {
    what: 'a derived size varied',
    text: varying('wing.aspect_ratio: [7, 8]'),
    code: 'DERIVED_VARIED',
    mark: 'wing.aspect_ratio',
    says: /wing\.area and wing\.span/,
  },
  {
    what: 'a derived tail number varied',
    text: varying('tail.area: [2 m^2, 3 m^2]'),
    code: 'DERIVED_VARIED',
    mark: 'tail.area',
    says: /tail\.volume and tail\.arm/,
  },
  {
    what: 'a path that is nothing',
    text: varying('wing.tapper: [0.4, 0.5]'),
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'wing.tapper',
    says: /'wing\.taper'/,
  },
  {
    what: 'a number without a baseline',
    text: varying('tail.v_angle: [30 deg, 40 deg]'),
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'tail.v_angle',
    says: /baseline/,
  },
  {
    what: 'a list entry that is not there',
    text: varying('body.stations[4].width: [1 m, 2 m]'),
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'body.stations[4].width',
    says: /3 entries/,
  },
  {
    what: 'a skip that tests a fixed number',
    text: `${baseStudy}skip:\n  - {when: {mass: {above: 600 kg}}, because: heavy}\n`,
    code: 'NOT_A_NUMBER_OF_THE_STUDY',
    mark: 'mass',
    line: 'because: heavy',
  },
  // axes
  { what: 'an empty list', text: varying('wing.taper: []'), code: 'EMPTY_AXIS', mark: '[]' },
  {
    what: 'a step the wrong way',
    text: varying('wing.taper: {from: 0.8, to: 0.3, step: 0.1}'),
    code: 'EMPTY_AXIS',
    mark: '{from: 0.8, to: 0.3, step: 0.1}',
  },
  {
    what: 'a step of nothing',
    text: varying('wing.taper: {from: 0.3, to: 0.8, step: 0}'),
    code: 'EMPTY_AXIS',
    mark: '{from: 0.3, to: 0.8, step: 0}',
  },
  {
    what: 'a step that misses',
    text: varying('wing.span: {from: 8 m, to: 12 m, step: 0.3 m}'),
    code: 'STEP_MISSES_END',
    mark: 'step',
    says: /count: 14 fits .*to: 11\.9 m/,
  },
  {
    what: 'a step that misses, with a round one near',
    text: varying('wing.span: {from: 8 m, to: 12 m, step: 240 mm}'),
    code: 'STEP_MISSES_END',
    mark: 'step',
    says: /step: 235\.2941|step: 250 mm|count: 18/,
  },
  {
    what: 'a value twice',
    text: varying('wing.taper: [0.4, 0.5, 40 %]'),
    code: 'DUPLICATE_VALUE',
    mark: '40 %',
  },
  {
    what: 'a CG range twice',
    text: varying('cg: [{forward: 22 %, aft: 31 %}, {forward: 0.22, aft: 0.31}]'),
    code: 'DUPLICATE_VALUE',
    mark: '0.22',
  },
  {
    what: 'two axes for one number',
    text: varying('cg: [{forward: 22 %, aft: 31 %}]\ncg.forward: [20 %, 21 %]'),
    code: 'DUPLICATE_AXIS',
    mark: 'cg.forward',
  },
  {
    what: 'tied lists of unequal length',
    text: varying('tied:\n  - {tail.arm: [4 m, 5 m], wing.taper: [0.4, 0.5, 0.6]}'),
    code: 'TIED_LENGTHS_DIFFER',
    mark: 'wing.taper',
  },
  {
    what: '10^15 combinations',
    text: varying(
      [
        'wing.taper',
        'tail.taper',
        'tail.volume',
        'tail.elevator.span_fraction',
        'tail.elevator.effectiveness_ratio',
      ]
        .map((path) => `${path}: {from: 0.5, to: 0.9, count: 1000}`)
        .join('\n'),
    ),
    code: 'TOO_MANY_COMBINATIONS',
    mark: 'vary',
    says: /1,000,000,000,000,000 combinations/,
  },
  {
    what: 'an axis of 10^12 values',
    text: varying('wing.taper: {from: 0.5, to: 0.9, count: 1e12}'),
    code: 'TOO_MANY_COMBINATIONS',
    mark: 'wing.taper',
  },
  // names
  {
    what: 'an unknown figure',
    text: withRequire('handy: {figure: tail_spam, at_most: 3.5 m}'),
    code: 'UNKNOWN_FIGURE',
    mark: 'tail_spam',
    says: /'tail_span'/,
  },
  {
    what: 'an unknown figure to prefer',
    text: edited(['wing_area: less', 'wing_aria: less']),
    code: 'UNKNOWN_FIGURE',
    mark: 'wing_aria',
  },
  {
    what: 'a verdict to prefer',
    text: edited(['wing_area: less', 'feasible: more']),
    code: 'UNKNOWN_FIGURE',
    mark: 'feasible',
    says: /no number/,
  },
  {
    what: 'an unknown column',
    text: `${baseStudy}table: {columns: [wing_span, nothing]}\n`,
    code: 'UNKNOWN_FIGURE',
    mark: 'nothing',
  },
  {
    what: 'an unknown section',
    text: edited(['naca-2412', 'naca-2411']),
    code: 'UNKNOWN_SECTION',
    mark: 'naca-2411',
  },
  {
    what: 'an unknown condition',
    text: edited(['in: [cruise]', 'in: [cruse]']),
    code: 'UNKNOWN_CONDITION',
    mark: 'cruse',
    says: /'cruise'/,
  },
  {
    what: 'a condition named all',
    text: edited(['name: cruise', 'name: all'], [', in: [cruise]', '']),
    code: 'DUPLICATE_NAME',
    mark: 'all',
    line: 'name: all',
  },
  {
    what: 'a column twice',
    text: `${baseStudy}table: {columns: [wing_span, wing.span]}\n`,
    code: 'DUPLICATE_NAME',
    mark: 'wing.span',
    line: 'columns',
  },
  // the aeroplane as a whole
  {
    what: 'a band upside down',
    text: edited(['value: 5 %', 'value: 25 %']),
    code: 'BAND_REVERSED',
    mark: 'at_least',
    line: 'static_margin',
  },
  {
    what: 'a requirement upside down',
    text: withRequire('handy: {figure: tail_span, at_least: 4 m, at_most: 3.5 m}'),
    code: 'BAND_REVERSED',
    mark: 'at_least',
    line: 'handy',
  },
  {
    what: 'a CG range upside down',
    text: edited(['forward: 24 %', 'forward: 34 %']),
    code: 'CG_REVERSED',
    mark: '34 %',
  },
  {
    what: 'a varied CG range upside down',
    text: varying('cg: [{forward: 22 %, aft: 31 %}, {forward: 35 %, aft: 34 %}]'),
    code: 'CG_REVERSED',
    mark: '35 %',
  },
  {
    what: 'CG ends of two kinds, upside down',
    text: edited(['forward: 24 %', 'forward: {as: station, at: 2.7 m}']),
    code: 'CG_REVERSED',
    mark: '2.7 m',
  },
  {
    what: 'a tail ahead of the trailing edge',
    text: edited(['    arm: 4.3 m', '    arm: 0.6 m']),
    code: 'TAIL_AHEAD_OF_WING',
    mark: '0.6 m',
  },
  {
    what: 'an arm that reaches zero',
    text: varying('tail.arm: {from: 0 m, to: 4 m, count: 5}'),
    code: 'TAIL_AHEAD_OF_WING',
    mark: '0 m',
  },
  {
    what: 'a tail beyond the body',
    text: edited(['    arm: 4.3 m', '    arm: 5.3 m']),
    code: 'TAIL_BEYOND_BODY',
    mark: '5.3 m',
  },
  {
    what: 'stations out of order',
    text: edited(['{at: 2 m', '{at: 8 m']),
    code: 'STATIONS_NOT_ASCENDING',
    mark: '7 m',
  },
  {
    what: 'a varied station out of order',
    text: varying('body.stations[2].at: [1 m, 2 m, 7 m]'),
    code: 'STATIONS_NOT_ASCENDING',
    mark: '7 m',
  },
];

const cases: readonly FaultCase[] = [...shapeCases, ...aeroplaneCases];

test.each(cases)('$code: $what', ({ text, code, mark, line, says }) => {
  const error = errorOf(text);
  const fault = error.faults.find((one) => one.code === code && marked(error, one) === mark);
  expect(
    error.faults.map((one) => `${one.code} ${one.line} ${one.found}`),
    'the faults told',
  ).toContainEqual(expect.stringMatching(new RegExp(`^${code} `)));
  expect(
    fault,
    `a fault that marks '${mark}' among ${error.faults.map((one) => marked(error, one))}`,
  ).toBeDefined();
  expect(text.split('\n')[fault!.line - 1]).toContain(line ?? mark);
  if (says) expect(`${fault!.found} ${fault!.remedy}`).toMatch(says);
});

test.each(cases.filter(({ what }) => !what.includes('tail beyond') && !what.includes('anchor')))(
  'nothing else is told: $what',
  ({ text, code }) => {
    const codes = new Set(errorOf(text).faults.map((fault) => fault.code));
    expect([...codes]).toEqual([code]);
  },
);

test('every code of the closed list has a case', () => {
  const covered = new Set(cases.map((one) => one.code));
  expect(Object.keys(studyFaultCodes).filter((code) => !covered.has(code as StudyFaultCode))).toEqual([]);
});

test('all faults of a study are told in one go, in the order of the text', () => {
  const text = edited(
    ['mass: 610 kg', 'mass: 610'],
    ['taper: 0.62', 'taper: 9'],
    ['naca-2412', 'naca-24'],
    ['arm: 4.3 m', 'arm: 4.3 kg'],
    ['forward: 24 %', 'forwards: 24 %'],
    ['[0.4, 0.5, 0.6]', '[]'],
    ['tail_span', 'tail_spam'],
    ['wing_area: less', 'wing_area: lots'],
  );
  expect(errorOf(text).faults.map((fault) => fault.code)).toEqual([
    'MISSING_UNIT',
    'OUT_OF_RANGE',
    'UNKNOWN_SECTION',
    'WRONG_DIMENSION',
    'MISSING_KEY',
    'UNKNOWN_KEY',
    'EMPTY_AXIS',
    'UNKNOWN_FIGURE',
    'UNKNOWN_WORD',
  ]);
});

test('several keys missing from one map are told one by one', () => {
  const text = edited(['    root_leading_edge: 2.1 m\n    section: naca-2412\n', '']);
  const told = errorOf(text).faults.filter((fault) => fault.code === 'MISSING_KEY');
  expect(told.map((fault) => fault.found)).toEqual([
    'aeroplane.wing has no root_leading_edge.',
    'aeroplane.wing has no section.',
  ]);
});

test('a line number counts the lines before it, CRLF or not', () => {
  const text = edited(['taper: 0.62', 'taper: 9']).replaceAll('\n', '\r\n');
  const { faults } = errorOf(text);
  expect(faults.map(({ line, column, length }) => [line, column, length])).toEqual([[7, 12, 1]]);
});
