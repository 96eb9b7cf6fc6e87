/** Texts of studies with trim and control, for tests: the test aeroplane with flaps, propeller, control and gear. */
import { readStudyText } from '../../src/read-study-file.ts';
import type { Study } from '../../src/study/study.ts';
import { replaced, type StudyParts, studyText } from '../studies.ts';
import { figuresOf } from './aeroplane.ts';

export interface ControlParts {
  readonly conditions?: string;
  readonly mass?: string;
  /** Further keys of the wing and of the tail, and what stands in their place in the test aeroplane. */
  readonly wing?: string;
  readonly tail?: string;
  readonly elevator?: string;
  /** In % MAC. */
  readonly cg?: readonly [forward: number, aft: number];
  /** Height of the CG, with its unit; left out, the study does not give it. */
  readonly cgHeight?: string;
  /** Further keys of the aeroplane. */
  readonly equipment?: string;
  readonly require?: string;
  readonly rest?: string;
  readonly body?: string;
}

export const flaps = 'flaps: {kind: slotted, chord_fraction: 25 %, span_from: 12 %, span_to: 58 %}';
export const propeller = (more = '') =>
  `propeller: {place: tractor, diameter: 1.7 m, blades: 2, blade_chord: 0.13 m, blade_angle: 20 deg, station: 0.1 m, power: 73 kW, efficiency: 78 %${more}}`;
export const control = (more = '') => `control: {kind: stick, gearing: 1.9 rad/m${more}}`;
export const gear =
  'landing_gear: {kind: nose_wheel, main_wheels: 2.75 m, rotation_speed: 48 kt, below_datum: 0.9 m}';
export const threeConditions = `[{name: cruise, speed: 110 kt, height: 1500 m, power: 65 %}, {name: climb, times_stall: 1.3, height: 0 m, power: 100 %},
  {name: approach, speed: 62 kt, height: 0 m, flaps: 30 deg, wing_above_ground: 1.1 m}]`;

export function controlText({
  conditions,
  mass,
  wing = '',
  tail = '',
  elevator,
  cg = [24, 33],
  cgHeight,
  equipment = '',
  require,
  rest,
  body,
}: ControlParts): string {
  const own = elevator === undefined ? undefined : `elevator: {chord_fraction: 38 %, ${elevator}}`;
  const tailText = replaced(
    'tail',
    'dynamic_pressure_ratio',
    `${tail}${tail === '' ? '' : ', '}dynamic_pressure_ratio`,
  );
  const height = cgHeight === undefined ? '' : `, above_datum: ${cgHeight}`;
  const parts: StudyParts = {
    ...(conditions !== undefined && { conditions }),
    ...(mass !== undefined && { mass }),
    ...(require !== undefined && { require }),
    ...(rest !== undefined && { rest }),
    ...(body !== undefined && { body }),
    wing: replaced(
      'wing',
      'washout: 2 deg,',
      `washout: 2 deg, maximum_lift: 1.35${wing === '' ? '' : `, ${wing}`},`,
    ),
    tail: own === undefined ? tailText : tailText.replace(/elevator: \{.*\}(?=\})/, own),
    cg: `{as: percent_mac, forward: ${cg[0]} %, aft: ${cg[1]} %${height}}\n${equipment.replaceAll(/^/gm, '  ')}`,
  };
  return studyText(parts);
}

export function controlStudy(parts: ControlParts): Study {
  return readStudyText(controlText(parts), 'control.yaml');
}

/** Reads one figure of the baseline of a study; throws when it is not worked out. */
export function reader(parts: ControlParts): (name: string) => number {
  const figures = figuresOf(controlStudy(parts));
  return (name) => {
    const value = figures.get(name);
    if (value === undefined) throw new Error(`no figure ${name}`);
    return value;
  };
}
