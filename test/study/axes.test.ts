import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Axis } from '../../src/study/study.ts';
import { errorOf, read, varying } from './base-study.ts';

const axesOf = (lines: string): readonly Axis[] => read(varying(lines)).axes;
const valuesOf = (lines: string): number[] => [...axesOf(lines)[0]!.values[0]!];

test('from, to and step: both ends belong, and the values are the decimals meant', () => {
  expect(valuesOf('wing.taper: {from: 0.1, to: 0.7, step: 0.1}')).toEqual([
    0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7,
  ]);
  expect(valuesOf('wing.span: {from: 8 m, to: 9 m, step: 25 cm, hold: area}')).toEqual([
    8, 8.25, 8.5, 8.75, 9,
  ]);
  expect(valuesOf('wing.taper: {from: 0.7, to: 0.4, step: -0.1}')).toEqual([0.7, 0.6, 0.5, 0.4]);
  expect(valuesOf('wing.incidence: {from: -2 deg, to: 2 deg, step: 2 deg}')[1]).toBe(0);
  expect(valuesOf('wing.taper: {from: 0.5, to: 0.5, step: 0.1}')).toEqual([0.5]);
});

test('a range of a millimetre in steps of a tenth keeps its ends', () => {
  const values = valuesOf('tail.arm: {from: 4000 mm, to: 4001 mm, step: 0.1 mm}');
  expect(values).toHaveLength(11);
  expect([values[0], values[10]]).toEqual([4, 4.001]);
});

test('from, to and count', () => {
  expect(valuesOf('tail.arm: {from: 3.6 m, to: 5.2 m, count: 17}')).toEqual(
    Array.from({ length: 17 }, (_, i) => Number((3.6 + i / 10).toFixed(1))),
  );
});

test('logarithmic spacing has equal ratios', () => {
  const values = valuesOf('mass: {from: 1 kg, to: 10000 kg, count: 5, spacing: logarithmic}');
  expect(values[0]).toBe(1);
  expect(values[4]).toBe(10_000);
  for (const [i, exact] of [1, 10, 100, 1000, 10_000].entries()) expect(values[i]).toBeCloseTo(exact, 9);
});

test('a list keeps its order and mixes units', () => {
  expect(valuesOf('tail.arm: [5 m, 400 cm, 13 ft]')).toEqual([5, 4, 13 * 0.3048]);
});

test('maps and tied groups step side by side', () => {
  const axes = axesOf(
    'cg: [{forward: 22 %, aft: 31 %}, {aft: 34 %, forward: 24 %}]\ntied:\n  - {tail.arm: [3.6 m, 4 m, 5 m], wing.taper: {from: 0.4, to: 0.6, step: 0.1}}\n  - {mass: [600 kg]}',
  );
  expect(axes.map((axis) => [axis.name, axis.paths, axis.values.map((column) => [...column])])).toEqual([
    [
      'cg',
      ['cg.forward', 'cg.aft'],
      [
        [0.22, 0.24],
        [0.31, 0.34],
      ],
    ],
    [
      'tail.arm + wing.taper',
      ['tail.arm', 'wing.taper'],
      [
        [3.6, 4, 5],
        [0.4, 0.5, 0.6],
      ],
    ],
    ['mass', ['mass'], [[600]]],
  ]);
});

test('paths may be written out from the aeroplane, and conditions vary too', () => {
  const axes = axesOf(
    'aeroplane.wing.taper: [0.4, 0.5]\nconditions[1].speed: [90 kt, 100 kt]\nbody.stations[2].width: [1 m, 1.2 m]',
  );
  expect(axes.map((axis) => axis.name)).toEqual([
    'wing.taper',
    'conditions[1].speed',
    'body.stations[2].width',
  ]);
});

test('a step that fits is accepted, one that misses by more than a billionth of the range is not', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 1, max: 400 }),
      fc.integer({ min: 1, max: 90 }),
      fc.boolean(),
      (steps, percent, up) => {
        const from = up ? 4 : 4 + percent / 100;
        const to = up ? 4 + percent / 100 : 4;
        const step = (to - from) / steps;
        const line = (width: number) => `tail.arm: {from: ${from} m, to: ${to} m, step: ${width} m}`;
        const values = valuesOf(line(step));
        expect(values).toHaveLength(steps + 1);
        expect([values[0], values.at(-1)]).toEqual([from, to]);
        if (steps > 1) {
          const off = errorOf(varying(line(step * (1 + 1e-7))));
          expect(off.faults.map((fault) => fault.code)).toEqual(['STEP_MISSES_END']);
        }
      },
    ),
    { numRuns: 60 },
  );
});

test('the step or count that is offered fits', () => {
  fc.assert(
    fc.property(fc.integer({ min: 11, max: 290 }), (hundredths) => {
      const line = (rest: string) => varying(`tail.arm: {from: 3 m, to: 6 m, ${rest}}`);
      const text = line(`step: ${hundredths / 100} m`);
      if (300 % hundredths === 0) return;
      const [fault] = errorOf(text).faults;
      expect(fault?.code).toBe('STEP_MISSES_END');
      const offered = /(step: [\d.]+ m|count: \d+) fits/.exec(fault!.remedy)![1]!;
      expect(read(line(offered)).axes[0]!.values[0]!.length).toBeGreaterThan(1);
      const end = /to: ([\d.]+) m/.exec(fault!.remedy)?.[1];
      if (end) read(varying(`tail.arm: {from: 3 m, to: ${end} m, step: ${hundredths / 100} m}`));
    }),
    { numRuns: 40 },
  );
});

test('a million values are read and ten million refused, without being written out', () => {
  expect(valuesOf('tail.arm: {from: 3 m, to: 4 m, count: 1000000}')).toHaveLength(1_000_000);
  const faults = errorOf(varying('tail.arm: {from: 3 m, to: 4 m, count: 10000000}')).faults;
  expect(faults.map((fault) => fault.code)).toEqual(['TOO_MANY_COMBINATIONS']);
  expect(faults[0]!.found).toContain('10,000,000');
});

test('too many combinations name the longest axes', () => {
  const [fault] = errorOf(
    varying(
      'tail.arm: {from: 3 m, to: 4 m, count: 2000}\nwing.taper: {from: 0.4, to: 0.8, count: 900}\nmass: {from: 500 kg, to: 700 kg, count: 1000}',
    ),
  ).faults;
  expect(fault?.found).toContain('1,800,000,000 combinations');
  expect(fault?.remedy).toMatch(/tail\.arm \(2,000\), mass \(1,000\), wing\.taper \(900\)/);
});
