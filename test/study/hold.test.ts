import { expect, test } from 'vitest';
import { edited, errorOf, read, varying } from './base-study.ts';

/** The base wing: S 11.4 m², b 9.4 m, λ 0.62. */
const area = 11.4;
const span = 9.4;
const rootChord = (2 * area) / (span * 1.62);

test('the partner of a varied size is held', () => {
  const study = read(varying('wing.span: [9 m, 10 m]'));
  expect(study.wing.given).toEqual(['wing.area', 'wing.span']);
  expect(study.held[0]).toMatchObject({
    varied: 'wing.span',
    held: expect.arrayContaining(['wing.area (11.400 m²)', 'tail.volume (0.4200)', 'tail.arm (4.300 m)']),
    follows: expect.arrayContaining(['wing.aspect_ratio', 'wing.root_chord', 'tail.area']),
  });
});

test.each([
  ['root_chord', rootChord],
  ['wing.aspect_ratio', span ** 2 / area],
])('hold: %s takes the partner’s place at its baseline value', (held, value) => {
  const study = read(varying(`wing.span: {from: 9 m, to: 10 m, count: 2, hold: ${held}}`));
  const path = `wing.${held.replace('wing.', '')}`;
  expect(study.wing.given).toEqual([path, 'wing.span']);
  expect(study.inputs.get(path)).toBeCloseTo(value, 12);
  expect(study.inputs.has('wing.area')).toBe(false);
});

test('hold: area of a tail given by volume keeps the baseline area', () => {
  const study = read(varying('tail.arm: {from: 4 m, to: 5 m, count: 2, hold: area}'));
  // exact: MAC of a straight-tapered wing, and S_t = V S c / l
  const chord = ((2 / 3) * rootChord * (1 + 0.62 + 0.62 ** 2)) / 1.62;
  expect(study.tail).toMatchObject({ size: 'area', place: 'arm' });
  expect(study.inputs.get('tail.area')).toBeCloseTo((0.42 * area * chord) / 4.3, 12);
  expect(study.inputs.has('tail.volume')).toBe(false);
  expect(study.held[0]?.follows).toEqual(['tail.station', 'tail.volume']);
});

test('without hold the volume stays and the area follows', () => {
  const study = read(varying('tail.arm: {from: 4 m, to: 5 m, count: 2}'));
  expect(study.tail.size).toBe('volume');
  expect(study.held[0]).toEqual({
    varied: 'tail.arm',
    held: ['tail.volume (0.4200)', 'tail.aspect_ratio (4.4000)'],
    follows: ['tail.station', 'tail.area', 'tail.span'],
  });
});

test('hold: station while the area varies keeps the tail where it is', () => {
  const study = read(varying('tail.volume: {from: 0.3, to: 0.5, count: 3, hold: station}'));
  expect(study.tail).toMatchObject({ size: 'volume', place: 'station' });
  // the quarter-MAC of a wing swept 1° along its quarter chord, root leading edge at 2.1 m
  const spanwise = ((span / 6) * (1 + 2 * 0.62)) / 1.62;
  const quarterMac = 2.1 + rootChord / 4 + spanwise * Math.tan(Math.PI / 180);
  expect(study.inputs.get('tail.station')).toBeCloseTo(quarterMac + 4.3, 10);
});

test('hold: span lets the tail’s aspect ratio go', () => {
  const study = read(varying('tail.volume: {from: 0.3, to: 0.5, count: 3, hold: span}'));
  expect(study.tail.planform).toBe('span');
  expect(study.inputs.has('tail.aspect_ratio')).toBe(false);
});

test.each([
  ['itself', 'wing.span: {from: 9 m, to: 10 m, count: 2, hold: span}', 'NOT_A_NUMBER_OF_THE_STUDY'],
  [
    'the other of its own pair',
    'tail.arm: {from: 4 m, to: 5 m, count: 2, hold: station}',
    'NOT_A_NUMBER_OF_THE_STUDY',
  ],
  ['nothing known', 'wing.span: {from: 9 m, to: 10 m, count: 2, hold: aria}', 'NOT_A_NUMBER_OF_THE_STUDY'],
  [
    'two that disagree',
    'tail.arm: {from: 4 m, to: 5 m, count: 2, hold: area}\ntail.aspect_ratio: {from: 4, to: 5, count: 2, hold: volume}',
    'OVERDETERMINED',
  ],
])('a hold of %s is refused', (_, lines, code) => {
  expect(errorOf(varying(lines)).faults.map((fault) => fault.code)).toEqual([code]);
});

test('a CG in % MAC rides with the wing, one at a station stays; the words say so', () => {
  const rides = read(varying('wing.span: [9 m, 10 m]')).held[0]!.held;
  expect(rides).toContain('cg.aft in % MAC (it rides with the wing)');
  const text = edited(
    ['{as: percent_mac, forward: 24 %, aft: 33 %', '{as: station, forward: 2.4 m, aft: 2.5 m'],
    ['  wing.taper: [0.4, 0.5, 0.6]', '  wing.span: [9 m, 10 m]'],
  );
  expect(read(text).held[0]!.held).toContain('cg.aft as a station (it stays where it is)');
});

test('with panels of stated width the span stays unless a width varies', () => {
  const panelled = (axis: string) =>
    read(
      edited(
        [
          '    span: 9.4 m\n    taper: 0.62\n    sweep_quarter_chord: 1 deg\n    dihedral: 5 deg\n',
          '    panels: [{width: 3 m, taper: 0.8}, {width: 1.7 m, taper: 0.6}]\n',
        ],
        ['  wing.taper: [0.4, 0.5, 0.6]', `  ${axis}`],
      ),
    ).held[0]!.follows;
  const taper = panelled('wing.panels[1].taper: [0.7, 0.8]');
  expect(taper).toContain('wing.root_chord');
  expect(taper).not.toContain('wing.span');
  expect(panelled('wing.panels[1].width: [3 m, 3.2 m]')).toEqual(
    expect.arrayContaining(['wing.span', 'wing.aspect_ratio', 'wing.root_chord']),
  );
});
