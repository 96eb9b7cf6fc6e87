/** Random aeroplanes for tests of laws, written as study texts in any units. */
import fc from 'fast-check';
import { readStudyText } from '../../src/read-study-file.ts';
import { baselineInputs, buildStages } from '../../src/stages/build-stages.ts';
import { runOnce } from '../../src/stages/run-once.ts';
import type { Study } from '../../src/study/study.ts';

/** SI and radians. */
export interface Aeroplane {
  readonly mass: number;
  readonly speed: number;
  readonly altitude: number;
  readonly area: number;
  readonly span: number;
  readonly taper: number;
  readonly sweep: number;
  readonly dihedral: number;
  readonly washout: number;
  readonly rootLeadingEdge: number;
  readonly wingHeight: number;
  readonly sectionSlope: number;
  readonly zeroLift: number;
  readonly tailArea: number;
  readonly tailArm: number;
  readonly tailAspectRatio: number;
  readonly tailTaper: number;
  readonly tailSweep: number;
  readonly tailHeight: number;
  readonly stations: readonly { readonly at: number; readonly width: number }[];
  readonly cgForward: number;
  readonly cgAft: number;
  readonly cgHeight: number;
}

/** A word for each kind of quantity and what a number in it is multiplied with to give SI. */
export interface Units {
  readonly length: readonly [string, number];
  readonly area: readonly [string, number];
  readonly mass: readonly [string, number];
  readonly speed: readonly [string, number];
  readonly angle: readonly [string, number];
  readonly slope: readonly [string, number];
  readonly fraction: readonly [string, number];
}

const degree = Math.PI / 180;
/** Exact by definition: international foot, pound and nautical mile (common practice, no source). */
const foot = 0.3048;
const pound = 0.45359237;
const knot = 1852 / 3600;

export const metric: Units = {
  length: ['m', 1],
  area: ['m^2', 1],
  mass: ['kg', 1],
  speed: ['m/s', 1],
  angle: ['rad', 1],
  slope: ['/rad', 1],
  fraction: ['', 1],
};

export const otherUnits: readonly Units[] = [
  {
    length: ['ft', foot],
    area: ['ft^2', foot ** 2],
    mass: ['lb', pound],
    speed: ['kt', knot],
    angle: ['deg', degree],
    slope: ['/deg', 1 / degree],
    fraction: ['%', 0.01],
  },
  {
    length: ['in', foot / 12],
    area: ['in^2', (foot / 12) ** 2],
    mass: ['g', 0.001],
    speed: ['km/h', 1 / 3.6],
    angle: ['deg', degree],
    slope: ['/rad', 1],
    fraction: ['%', 0.01],
  },
  {
    length: ['mm', 0.001],
    area: ['cm^2', 1e-4],
    mass: ['kg', 1],
    speed: ['mph', (5280 * foot) / 3600],
    angle: ['rad', 1],
    slope: ['/deg', 1 / degree],
    fraction: ['', 1],
  },
];

/** Pieces of the text that a test replaces; the number forms of the aeroplane by default. */
export interface TextChoices {
  readonly units?: Units;
  /** Keys of the wing between its braces, without those of `wingRest`. */
  readonly wing?: string;
  readonly tailSize?: string;
  readonly tailRest?: string;
  readonly body?: string;
  readonly cg?: string;
  readonly rest?: string;
}

export function writeIn(units: Units): (kind: keyof Units, value: number) => string {
  return (kind, value) => {
    const [word, factor] = units[kind];
    return word.startsWith('/') ? `${value / factor} ${word}` : `${value / factor} ${word}`.trim();
  };
}

export function aeroplaneText(a: Aeroplane, choices: TextChoices = {}): string {
  const write = writeIn(choices.units ?? metric);
  const wing =
    choices.wing ??
    `area: ${write('area', a.area)}, span: ${write('length', a.span)}, taper: ${a.taper}, ` +
      `sweep_quarter_chord: ${write('angle', a.sweep)}, dihedral: ${write('angle', a.dihedral)}`;
  const tailSize =
    choices.tailSize ?? `area: ${write('area', a.tailArea)}, arm: ${write('length', a.tailArm)}`;
  const stations = a.stations.map(
    ({ at, width }) =>
      `{at: ${write('length', at)}, width: ${write('length', width)}, depth: ${write('length', width)}}`,
  );
  return `title: Random aeroplane
aeroplane:
  mass: ${write('mass', a.mass)}
  wing: {${wing}, washout: ${write('angle', a.washout)}, root_leading_edge: ${write('length', a.rootLeadingEdge)},
    height: ${write('length', a.wingHeight)},
    section: {lift_slope: ${write('slope', a.sectionSlope)}, zero_lift_angle: ${write('angle', a.zeroLift)}}}
  tail: {${tailSize}, aspect_ratio: ${a.tailAspectRatio}, taper: ${a.tailTaper},
    sweep_quarter_chord: ${write('angle', a.tailSweep)}, above_wing_root_chord: ${write('length', a.tailHeight)}${choices.tailRest ?? ''}}
  body: ${choices.body ?? `{stations: [${stations.join(', ')}]}`}
  cg: ${
    choices.cg ??
    `{as: percent_mac, forward: ${write('fraction', a.cgForward)}, aft: ${write('fraction', a.cgAft)}, above_datum: ${write('length', a.cgHeight)}}`
  }
conditions: [{name: cruise, speed: ${write('speed', a.speed)}, height: ${write('length', a.altitude)}}]
${choices.rest ?? 'require: {static_margin: {at_least: 0.05, at_most: 0.2}}'}
`;
}

/** Every figure of a study's baseline, SI by name. */
export function figuresOf(study: Study): Map<string, number> {
  return runOnce(buildStages(study), baselineInputs(study));
}

export function figuresOfAeroplane(a: Aeroplane, choices?: TextChoices): Map<string, number> {
  return figuresOf(readStudyText(aeroplaneText(a, choices), 'random.yaml'));
}

export function figure(figures: ReadonlyMap<string, number>, name: string): number {
  const value = figures.get(name);
  if (value === undefined) throw new Error(`no figure ${name}`);
  return value;
}

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** Light aeroplanes of all proportions whose tail stands well behind the wing, inside the body. */
export const aeroplanes: fc.Arbitrary<Aeroplane> = fc
  .record({
    area: between(8, 20),
    aspectRatio: between(5, 16),
    taper: between(0.3, 0.95),
    sweep: between(-8 * degree, 25 * degree),
    dihedral: between(0, 7 * degree),
    washout: between(0, 4 * degree),
    rootLeadingEdge: between(1, 3),
    wingHeight: between(-0.5, 1),
    sectionSlope: between(5.5, 6.6),
    zeroLift: between(-5 * degree, 0),
    tailArea: between(1, 4),
    armOverChord: between(2.5, 5),
    tailAspectRatio: between(3, 6),
    tailTaper: between(0.4, 1),
    tailSweep: between(0, 15 * degree),
    tailHeight: between(-0.3, 1.5),
    width: between(0.6, 1.3),
    wingLoading: between(25, 80),
    speed: between(35, 70),
    altitude: between(0, 3000),
    cgForward: between(0.1, 0.25),
    cgAft: between(0.26, 0.4),
    cgHeight: between(-0.3, 0.6),
  })
  .map(({ aspectRatio, armOverChord, width, wingLoading, ...rest }) => {
    const span = Math.sqrt(aspectRatio * rest.area);
    const tailArm = (armOverChord * rest.area) / span;
    const end = rest.rootLeadingEdge + (span / 2) * Math.tan(Math.max(0, rest.sweep)) + tailArm + 2;
    const stations = [
      { at: 0, width: 0.4 * width },
      { at: 0.45 * rest.rootLeadingEdge, width },
      { at: rest.rootLeadingEdge + 0.9, width: 1.1 * width },
      { at: rest.rootLeadingEdge + 0.4 * tailArm, width: 0.7 * width },
      { at: end, width: 0.2 * width },
    ].sort((p, q) => p.at - q.at);
    return { ...rest, span, tailArm, mass: wingLoading * rest.area, stations };
  })
  .filter(({ stations }) => stations.every(({ at }, k) => k === 0 || at - stations[k - 1].at > 0.01));
