import { StudyError, type StudyFault, type StudyFaultCode } from '../../src/errors.ts';
import type { KnownFigure } from '../../src/study/known-figures.ts';
import { readStudy } from '../../src/study/read-study.ts';
import type { Study } from '../../src/study/study.ts';

/** A study with one fault, and where it is told. */
export interface FaultCase {
  readonly what: string;
  readonly text: string;
  readonly code: StudyFaultCode;
  readonly mark: string;
  /** A piece of the line that the fault must stand on; the mark itself when left out. */
  readonly line?: string;
  readonly says?: RegExp;
}

/** An invented aeroplane whose numbers are all different, so that a swap shows. */
export const baseStudy = `title: Base study
aeroplane:
  mass: 610 kg
  wing:
    area: 11.4 m^2
    span: 9.4 m
    taper: 0.62
    sweep_quarter_chord: 1 deg
    dihedral: 5 deg
    root_leading_edge: 2.1 m
    section: naca-2412
  tail:
    volume: 0.42
    arm: 4.3 m
    aspect_ratio: 4.4
    taper: 0.7
    above_wing_root_chord: 0.3 m
    section: naca-0012
    elevator: {chord_fraction: 35 %, up: 24 deg}
  body:
    stations:
      - {at: 0 m, width: 0.4 m, depth: 0.5 m}
      - {at: 2 m, width: 1.1 m, depth: 1.2 m}
      - {at: 7 m, width: 0.2 m, depth: 0.3 m}
  cg: {as: percent_mac, forward: 24 %, aft: 33 %, above_datum: 0.1 m}
conditions:
  - {name: cruise, speed: 105 kt, height: 1000 m}
vary:
  wing.taper: [0.4, 0.5, 0.6]
  tail.arm: {from: 3.6 m, to: 5.2 m, count: 17}
require:
  static_margin: {at_least: {value: 5 %, in: all}, at_most: {value: 20 %, in: [cruise]}}
  handy_tail: {figure: tail_span, at_most: 3.5 m}
prefer:
  wing_area: less
`;

export const figures: readonly KnownFigure[] = [
  { name: 'wing_span', dimension: 'length' },
  { name: 'wing_span_tip', dimension: 'length' },
  { name: 'wing_area', dimension: 'area' },
  { name: 'wing_panels_1_taper', dimension: 'ratio' },
  { name: 'tail_span', dimension: 'length' },
  { name: 'tail_area', dimension: 'area' },
  { name: 'tail_arm', dimension: 'length' },
  { name: 'conditions_2_power', dimension: 'ratio' },
  { name: 'static_margin_aft', dimension: 'fraction_of_mac' },
  { name: 'feasible', dimension: 'count', onlyInTable: true },
];

export function read(text: string): Study {
  return readStudy(text, 'base.yaml', () => figures);
}

/** The base study with pieces of its text exchanged; a piece that is not there is a mistake of the test. */
export function edited(...changes: readonly (readonly [piece: string, by: string])[]): string {
  return changes.reduce((text, [piece, by]) => {
    if (text.split(piece).length !== 2) throw new Error(`'${piece}' does not stand in the study once`);
    return text.replace(piece, () => by);
  }, baseStudy);
}

/** The base study with its `vary` exchanged. */
export function varying(lines: string): string {
  const [before, rest] = baseStudy.split('vary:\n');
  return `${before}vary:\n${lines.replace(/^/gm, '  ')}\n${rest!.slice(rest!.indexOf('require:'))}`;
}

export function errorOf(text: string): StudyError {
  try {
    read(text);
  } catch (error) {
    if (error instanceof StudyError) return error;
    throw error;
  }
  throw new Error('the study has no fault');
}

/** What a fault marks in its line. */
export function marked(error: StudyError, { line, column, length }: StudyFault): string {
  return error.text.split('\n')[line - 1]!.slice(column - 1, column - 1 + length);
}
