import { expect, test } from 'vitest';
import type { KnownFigure } from '../../src/study/known-figures.ts';
import { decodeStudy } from '../../src/study/parse-yaml.ts';
import { readStudy } from '../../src/study/read-study.ts';
import { starterKinds, starterStudy } from '../../src/study/starters.ts';
import type { Study } from '../../src/study/study.ts';
import { baseStudy, edited, errorOf, figures, read, varying } from './base-study.ts';

const deg = Math.PI / 180;
const numberOf = (study: Study, path: string) => study.inputs.get(path);

test('numbers are SI and radians, under their path', () => {
  const study = read(baseStudy);
  const expected = {
    mass: 610,
    'wing.area': 11.4,
    'wing.span': 9.4,
    'wing.taper': 0.62,
    'wing.sweep_quarter_chord': deg,
    'wing.root_leading_edge': 2.1,
    'tail.volume': 0.42,
    'tail.arm': 4.3,
    'tail.elevator.chord_fraction': 0.35,
    'tail.elevator.up': 24 * deg,
    'body.stations[3].depth': 0.3,
    'cg.forward': 0.24,
    'cg.aft': 0.33,
    'cg.above_datum': 0.1,
    // the knot is 1852 m an hour by international definition (1929), from memory
    'conditions[1].speed': (105 * 1852) / 3600,
    'conditions[1].height': 1000,
  };
  for (const [path, value] of Object.entries(expected))
    expect(numberOf(study, path), path).toBeCloseTo(value, 12);
  expect([...study.inputs.values()].every(Number.isFinite)).toBe(true);
});

test('what a number is given as stands in the choices', () => {
  const study = read(baseStudy);
  expect(study.wing).toEqual({
    form: 'trapezoid',
    given: ['wing.area', 'wing.span'],
    sweep: 'quarter_chord',
    panels: [],
    panelWidth: 'width',
    section: 'naca-2412',
  });
  expect(study.tail).toMatchObject({
    layout: 'conventional',
    allMoving: false,
    size: 'volume',
    place: 'arm',
  });
  expect(study.body).toEqual({ stations: 3, boom: false });
  expect(study.cg).toEqual({ forward: 'percent_mac', aft: 'percent_mac', heightGiven: true });
  expect(study.conditions).toEqual([
    { name: 'cruise', speedAs: 'speed', power: 'idle', flapsDown: false, groundEffect: false },
  ]);
  expect(study.inputs.has('wing.aspect_ratio')).toBe(false);
  expect(study.inputs.has('tail.area')).toBe(false);
});

test('what is left out is assumed, and said with its source', () => {
  const { assumptions } = read(baseStudy);
  const byPath = new Map(assumptions.map((one) => [one.path, one]));
  // common practice, no source
  expect(byPath.get('tail.dynamic_pressure_ratio')?.value).toBe(0.9);
  expect(byPath.get('tail.elevator.down')?.value).toBeCloseTo(15 * deg, 12);
  expect(byPath.get('methods.downwash')?.value).toBe('torenbeek');
  expect(byPath.has('wing.dihedral')).toBe(false);
  expect(assumptions.every((one) => one.source.length > 0)).toBe(true);
});

test('the dynamic pressure of a tail follows its layout', () => {
  const ratio = (layout: string) =>
    numberOf(read(edited(['  tail:\n', `  tail:\n    layout: ${layout}\n`])), 'tail.dynamic_pressure_ratio');
  // common practice, no source
  expect([ratio('conventional'), ratio('mid'), ratio('T')]).toEqual([0.9, 0.95, 1]);
});

test('a section is a shipped one or has its own numbers, per degree as well', () => {
  const own = edited(['naca-2412', '{lift_slope: 0.105 /deg, zero_lift_angle: -2 deg, moment: -0.05}']);
  const study = read(own);
  expect(numberOf(study, 'wing.section.lift_slope')).toBeCloseTo(0.105 / deg, 12);
  expect(numberOf(study, 'wing.section.moment')).toBe(-0.05);
  expect(study.wing.section).toBeUndefined();
  expect(numberOf(study, 'tail.section.thickness')).toBe(0.12);
});

test('panels give widths or shares of the semi-span', () => {
  const list = (one: string, two: string) =>
    `    panels: [{${one}, taper: 0.8}, {${two}, taper: 0.6, sweep_leading_edge: 3 deg}]\n`;
  const piece = '    taper: 0.62\n    sweep_quarter_chord: 1 deg\n    dihedral: 5 deg\n';
  const axis = ['  wing.taper: [0.4, 0.5, 0.6]', '  wing.panels[2].taper: [0.4, 0.5, 0.6]'] as const;
  const shares = read(edited([piece, list('span_fraction: 55 %', 'span_fraction: 0.45')], axis));
  expect(shares.wing).toMatchObject({
    form: 'panels',
    panelWidth: 'span_fraction',
    given: ['wing.area', 'wing.span'],
  });
  expect(shares.wing.panels).toEqual([{ sweep: 'quarter_chord' }, { sweep: 'leading_edge' }]);
  expect(numberOf(shares, 'wing.panels[1].sweep_quarter_chord')).toBe(0);
  expect(shares.axes[0]?.paths).toEqual(['wing.panels[2].taper']);
  const widths = read(edited([`    span: 9.4 m\n${piece}`, list('width: 3 m', 'width: 1.7 m')], axis));
  expect(widths.wing).toMatchObject({ panelWidth: 'width', given: ['wing.area'] });
  expect(numberOf(widths, 'wing.panels[2].width')).toBe(1.7);
});

test('the ends of the CG range may be given differently', () => {
  const study = read(edited(['forward: 24 %', 'forward: {as: station, at: 2.31 m}']));
  expect(study.cg).toMatchObject({ forward: 'station', aft: 'percent_mac' });
  expect(numberOf(study, 'cg.forward')).toBe(2.31);
});

test('requirements keep the order of the file, with a scale each', () => {
  const study = read(
    `${edited(['  handy_tail: {figure: tail_span, at_most: 3.5 m}', '  handy_tail: {figure: tail.span, at_most: 3.5 m}\n  in_range: true\n  wing_area: {at_least: 10 m^2, at_most: 12 m^2, scale: 0.3 m^2}'])}`,
  );
  expect(study.band).toEqual({ lower: 0.05, upper: 0.2, lowerIn: ['cruise'], upperIn: ['cruise'] });
  expect(study.requirements).toEqual([
    { name: 'static_margin.at_least', figure: 'static_margin_aft', atLeast: 0.05, scale: 0.01 },
    { name: 'static_margin.at_most', figure: 'static_margin_forward', atMost: 0.2, scale: 0.01 },
    { name: 'handy_tail', figure: 'tail_span', atMost: 3.5, scale: expect.closeTo(0.175, 12) },
    { name: 'in_range', figure: 'in_range', scale: 1 },
    { name: 'wing_area', figure: 'wing_area', atLeast: 10, atMost: 12, scale: 0.3 },
  ]);
});

test('preferences, shortlist and columns', () => {
  const text = `${edited(['  wing_area: less', '  wing_area: less\n  static_margin_aft: {nearest: 10 %}'])}shortlist: {keep: 7}\ntable: {columns: [wing.span, tail_area]}\n`;
  const study = read(text);
  expect(study.preferences).toEqual([
    { figure: 'wing_area', want: 'less' },
    { figure: 'static_margin_aft', want: 'nearest', nearest: 0.1 },
  ]);
  expect(study.keep).toBe(7);
  expect(study.columns).toEqual(['wing_span', 'tail_area']);
  expect(read(baseStudy).keep).toBe(12);
  expect(read(baseStudy).columns).toBeUndefined();
});

test('skip rules test varied numbers, at the very values of the axis', () => {
  const study = read(
    `${varying('wing.taper: {from: 0.1, to: 0.7, step: 0.1}')}skip:\n  - {when: {wing.taper: 60 %}, because: ugly}\n  - {when: {wing.taper: {below: 0.3, above: 0.15}}, because: thin}\n`,
  );
  expect(study.skip).toEqual([
    { tests: [{ path: 'wing.taper', equal: study.axes[0]!.values[0]![5] }], because: 'ugly' },
    { tests: [{ path: 'wing.taper', below: 0.3, above: 0.15 }], because: 'thin' },
  ]);
});

test('a byte-order mark and CRLF line ends change nothing but the text', () => {
  const { text: _, ...plain } = read(baseStudy);
  const { text: __, ...marked } = read(`\ufeff${baseStudy.replaceAll('\n', '\r\n')}`);
  expect(marked).toEqual(plain);
});

test('a study without vary is one combination', () => {
  const text = baseStudy.replace(/vary:\n(?: {2}.*\n)+/, '');
  expect(read(text).axes).toEqual([]);
});

test('the figures are asked for with the study as far as it is read', () => {
  let asked: Study | undefined;
  readStudy(baseStudy, 'base.yaml', (study) => {
    asked = study;
    return figures;
  });
  expect(asked?.inputs.get('wing.span')).toBe(9.4);
  expect(asked?.axes.length).toBe(2);
});

test('a list of figures that fails on a faulty study hides none of its faults', () => {
  const fails = (): readonly KnownFigure[] => {
    throw new RangeError('no such input');
  };
  expect(() => readStudy(edited(['9.4 m', '9.4']), 'base.yaml', fails)).toThrow(
    expect.objectContaining({
      name: 'StudyError',
      faults: [expect.objectContaining({ code: 'MISSING_UNIT' })],
    }),
  );
  expect(() => readStudy(baseStudy, 'base.yaml', fails)).toThrow(RangeError);
});

test.each(starterKinds)('the starter study of a %s reads without a fault', (kind) => {
  const study = readStudy(starterStudy(kind), `${kind}.yaml`, () => figures);
  expect(study.axes.length).toBeGreaterThan(1);
  expect(study.requirements.length).toBeGreaterThan(1);
  expect(starterStudy(kind)).toMatch(/#/);
});

test('what the starter offers in comments reads without a fault as well', () => {
  const full = starterStudy('tourer')
    .replace(/^( *)#(?! \S)/gm, '$1')
    .replace(/^ {2}(mass|cg):.*\n/gm, '');
  const study = readStudy(full, 'tourer.yaml', () => figures);
  expect(study.loading?.cases).toHaveLength(1);
  expect(study.conditions.map(({ power }) => power)).toEqual(['idle', 'fraction']);
  expect(study.propeller && study.control && study.landingGear).toBeDefined();
});

test('a file is decoded as UTF-8 or refused in plain words', () => {
  const bytes = new TextEncoder().encode(baseStudy);
  expect(decodeStudy(bytes, 'a.yaml')).toBe(baseStudy);
  const refused = (content: Uint8Array) => {
    try {
      decodeStudy(content, 'a.yaml');
    } catch (error) {
      return error;
    }
    return undefined;
  };
  const unreadable = (found: RegExp) => ({
    name: 'StudyError',
    faults: [
      expect.objectContaining({
        code: 'UNREADABLE_YAML',
        line: 1,
        column: 1,
        found: expect.stringMatching(found),
      }),
    ],
  });
  expect(refused(new Uint8Array([0x74, 0xe9, 0x3a]))).toMatchObject(unreadable(/not UTF-8/));
  expect(refused(new Uint8Array([0xff, 0xfe, 0x74, 0]))).toMatchObject(unreadable(/UTF-16/));
  expect(refused(new Uint8Array(1_000_001))).toMatchObject(unreadable(/1000001 bytes/));
  expect(errorOf(`${baseStudy}#${'x'.repeat(1_000_000)}`).faults[0]?.code).toBe('UNREADABLE_YAML');
});
