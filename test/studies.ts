/** Short studies for tests: an invented two-seater, changed where a test wants it. */
import { readStudyText } from '../src/read-study-file.ts';
import type { Study } from '../src/study/study.ts';

/** Sections of a study text by key; a test replaces the ones it is about. */
export interface StudyParts {
  readonly head?: string;
  readonly mass?: string;
  readonly wing?: string;
  readonly tail?: string;
  readonly body?: string;
  readonly cg?: string;
  readonly conditions?: string;
  readonly vary?: string;
  readonly skip?: string;
  readonly require?: string;
  readonly rest?: string;
}

/** The baseline, in flow maps so that a test can replace any of them on one line. */
const parts: Required<StudyParts> = {
  head: 'title: Test aeroplane',
  mass: '610 kg',
  wing: `{area: 11.4 m^2, span: 9.4 m, taper: 0.6, sweep_quarter_chord: 2 deg, dihedral: 4 deg, washout: 2 deg,
    root_leading_edge: 1.75 m, height: -0.25 m, section: {lift_slope: 6.1 /rad, zero_lift_angle: -1.2 deg, moment: -0.01, aerodynamic_centre: 0.243}}`,
  tail: `{layout: conventional, volume: 0.48, arm: 4.3 m, aspect_ratio: 4.4, taper: 0.7, sweep_quarter_chord: 5 deg,
    above_wing_root_chord: 0.45 m, dynamic_pressure_ratio: 0.9, section: {lift_slope: 6.2 /rad, aerodynamic_centre: 0.248},
    elevator: {chord_fraction: 38 %, span_fraction: 95 %, effectiveness_ratio: 0.8, up: 25 deg, down: 15 deg}}`,
  body: `{stations: [
    {at: 0 m, width: 0.36 m, depth: 0.42 m}, {at: 0.45 m, width: 0.86 m, depth: 0.74 m},
    {at: 1.2 m, width: 1.08 m, depth: 1.02 m}, {at: 2 m, width: 1.12 m, depth: 1.22 m},
    {at: 2.9 m, width: 1.02 m, depth: 1.16 m}, {at: 3.8 m, width: 0.66 m, depth: 0.78 m},
    {at: 5 m, width: 0.36 m, depth: 0.46 m}, {at: 6.95 m, width: 0.06 m, depth: 0.22 m}]}`,
  cg: '{as: percent_mac, forward: 24 %, aft: 33 %}',
  conditions: '[{name: cruise, speed: 110 kt, height: 1500 m}]',
  vary: '',
  skip: '',
  require: 'static_margin: {at_least: 5 %, at_most: 20 %}',
  rest: '',
};

/** The text of the test aeroplane's study with the given sections replaced. */
export function studyText(changed: StudyParts = {}): string {
  const { head, mass, wing, tail, body, cg, conditions, vary, skip, require, rest } = {
    ...parts,
    ...changed,
  };
  const block = (key: string, text: string) =>
    text === '' ? '' : `${key}:\n${text.replaceAll(/^/gm, '  ')}\n`;
  return `${head}
aeroplane:
  mass: ${mass}
  wing: ${wing}
  tail: ${tail}
  body: ${body}
  cg: ${cg}
conditions: ${conditions}
${block('vary', vary)}${block('skip', skip)}${block('require', require)}${rest}`;
}

export function testStudy(changed: StudyParts = {}): Study {
  return readStudyText(studyText(changed), 'test.yaml');
}

/** A section of the baseline with one piece of its text replaced; throws when it is not there. */
export function replaced(section: keyof StudyParts, piece: string, by: string): string {
  const text = parts[section];
  if (!text.includes(piece)) throw new Error(`${section} has no ${piece}`);
  return text.replace(piece, by);
}
