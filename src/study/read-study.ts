import { tailBaseline, wingBaseline } from './baseline.ts';
import { carrierAreas, checkCg, checkDerivedSizes, checkTailPlace, checkVariedShape } from './check-shape.ts';
import { FaultList } from './fault-list.ts';
import { describeHeld } from './held-words.ts';
import { applyHolds } from './hold.ts';
import { FigureNames, type KnownFigure } from './known-figures.ts';
import { parseYaml } from './parse-yaml.ts';
import { readBody } from './read-body.ts';
import { readCg } from './read-cg.ts';
import {
  checkConditionNeeds,
  checkFigureNames,
  readConditions,
  withFlapsSettled,
} from './read-conditions.ts';
import { readControl, readLandingGear } from './read-control.ts';
import { readFlaps } from './read-flaps.ts';
import { checkCaseMasses, readLoading } from './read-loading.ts';
import { readMethods } from './read-methods.ts';
import { assumeGreatestPull } from './read-presets.ts';
import { readPropeller } from './read-propeller.ts';
import { readColumns, readKeep, readPreferences, readRequirements } from './read-requirements.ts';
import { readCorrections, readSizeRange, readSizing, type SizeRange } from './read-size.ts';
import { readSkip } from './read-skip.ts';
import { readTail } from './read-tail.ts';
import { type PlacedAxis, readVary } from './read-vary.ts';
import { readWing } from './read-wing.ts';
import { Reading } from './reading.ts';
import { firstOf, mapIn, type SourceNode, wordIn } from './source.ts';
import { checkStructure } from './structure.ts';
import type { AircraftClass, Axis, BodyChoices, Condition, Study } from './study.ts';
import type { Choices } from './varied-paths.ts';

export type { KnownFigure } from './known-figures.ts';

/** Which figures a study has, by name; given the study without its requirements and preferences. */
export type FiguresOf = (study: Study) => readonly KnownFigure[];

/**
 * Reads and checks a whole study.
 * @param text         the file's text, decoded (`decodeStudy`)
 * @param file         the file's name, for messages
 * @param knownFigures the figures that requirements, preferences and table columns may name
 * @throws StudyError with all faults at once, each with its place
 */
export function readStudy(text: string, file: string, knownFigures: FiguresOf): Study {
  const plain = text.startsWith('\ufeff') ? text.slice(1) : text;
  const faults = new FaultList();
  const root = parseYaml(plain, faults);
  const study = root ? readTree(root, plain, file, knownFigures, new Reading(faults)) : undefined;
  if (!study || faults.size > 0) throw faults.toError(file, plain);
  return study;
}

function readTree(
  root: SourceNode,
  text: string,
  file: string,
  knownFigures: FiguresOf,
  reading: Reading,
): Study | undefined {
  checkStructure(root, reading.faults);
  const named = readConditions(root, reading);
  const methods = readMethods(root, reading);
  const aeroplane = readAeroplane(root, named, reading);
  if (!aeroplane) return undefined;
  const { choices, equipment, body, axes } = aeroplane;
  assumeGreatestPull(root, equipment, reading);
  const show = wordIn(root, 'show') === 'US' ? 'US' : 'metric';
  const question = wordIn(root, 'question');
  const aircraftClass = wordIn(root, 'class') as AircraftClass | undefined;
  const corrections = readCorrections(root, reading);
  const range = readSizeRange(root, axes, choices, reading);
  const outline: Study = {
    file,
    text,
    title: wordIn(root, 'title') ?? '',
    ...(question !== undefined && { question }),
    show,
    ...(aircraftClass !== undefined && { aircraftClass }),
    inputs: reading.inputs,
    ...choices,
    ...(body && { body }),
    ...equipment,
    ...(corrections && { corrections }),
    methods,
    axes: axes.map(withoutPlaces),
    skip: readSkip(root, axes, choices, reading),
    band: {},
    requirements: [],
    preferences: [],
    keep: readKeep(root, reading),
    assumptions: reading.assumptions,
    held: describeHeld(axes, choices, reading.inputs, show, range?.path),
  };
  return withFigures(outline, range, root, knownFigures, reading);
}

interface Aeroplane {
  readonly choices: Choices;
  readonly equipment: Equipment;
  readonly body: BodyChoices | undefined;
  readonly axes: readonly PlacedAxis[];
}

/** What an aeroplane may have besides wing, tail and body. */
type Equipment = Pick<Study, 'flaps' | 'propeller' | 'hinge' | 'control' | 'landingGear'>;

/** The aeroplane, what varies, and what is held: one knot, because a hold changes what is given. */
function readAeroplane(
  root: SourceNode,
  named: readonly Condition[],
  reading: Reading,
): Aeroplane | undefined {
  const map = mapIn(root, 'aeroplane');
  const [wingMap, tailMap] = ['wing', 'tail'].map((key) => mapIn(map, key));
  if (!map || !wingMap || !tailMap) return undefined;
  const loading = readLoading(map, reading);
  readMass(map, loading, reading);
  const wingChoices = readWing(wingMap, reading);
  const { tail: tailChoices, hinge } = readTail(tailMap, reading);
  const given: Choices = {
    wing: wingChoices,
    tail: tailChoices,
    cg: readCg(map, loading, reading),
    conditions: named,
    ...(loading && { loading }),
  };
  const body = readBody(map, reading);
  const equipment = readEquipment(map, wingMap, hinge, reading);
  if (equipment.propeller && !given.cg.heightGiven) assumeThrustHeight(reading);
  const wing = wingBaseline(reading.inputs, given.wing);
  const baseline = { wing, tail: tailBaseline(reading.inputs, given.tail, wing) };
  checkDerivedSizes(given, baseline, reading);
  checkTailPlace(given, body, baseline, reading);
  checkCg(given, baseline, reading);
  if (loading) checkCaseMasses(map, loading, carrierAreas(baseline), reading);
  const { axes, holds } = readVary(root, given, reading);
  checkVariedShape(axes, given, body, baseline, reading);
  const conditions = withFlapsSettled(named, axes, reading);
  checkConditionNeeds(root, conditions, equipment, reading);
  const choices = { ...applyHolds(holds, axes, given, baseline, reading), conditions };
  return { choices, equipment, body, axes };
}

function readEquipment(
  aeroplane: SourceNode,
  wing: SourceNode,
  hinge: Study['hinge'],
  reading: Reading,
): Equipment {
  const flaps = readFlaps(wing, reading);
  const propeller = readPropeller(aeroplane, reading);
  const control = readControl(aeroplane, reading);
  const landingGear = readLandingGear(aeroplane, reading);
  if (control) assumeElevatorSize(reading);
  return {
    hinge,
    ...(flaps && { flaps }),
    ...(propeller && { propeller }),
    ...(control && { control }),
    ...(landingGear && { landingGear }),
  };
}

/** The thrust's moment needs the height of the CG. */
function assumeThrustHeight({ assumptions }: Reading): void {
  assumptions.push({
    path: 'cg.above_datum',
    value: 'on the datum line',
    source: 'not given; the moment of the thrust is taken about the datum line',
  });
}

/** Stick forces need the elevator's size, which follows from the tail where it is not given. */
function assumeElevatorSize({ inputs, assumptions }: Reading): void {
  for (const path of ['tail.elevator.area', 'tail.elevator.chord']) {
    if (inputs.has(path)) continue;
    const source = 'not given; follows from the tail and the elevator’s fractions of it';
    assumptions.push({ path, value: 'worked out', source });
  }
}

/** The mass may be left out beside a loading: it is then the heaviest case's. */
function readMass(aeroplane: SourceNode, loading: Study['loading'], reading: Reading): void {
  if (reading.take(aeroplane, 'mass', 'mass')) return;
  if (loading) {
    reading.assumptions.push({
      path: 'mass',
      value: 'that of the heaviest loading case',
      source: 'not given',
    });
    return;
  }
  reading.inputs.set('mass', Number.NaN);
  reading.faults.addBeside(
    'MISSING_KEY',
    firstOf(aeroplane),
    'aeroplane has no mass.',
    'Add mass: to aeroplane.',
  );
}

function withoutPlaces({ name, paths, values }: PlacedAxis): Axis {
  return { name, paths, values };
}

/** Adds what names figures: requirements, preferences, columns, and what sizing is to reach. */
function withFigures(
  outline: Study,
  range: SizeRange | undefined,
  root: SourceNode,
  knownFigures: FiguresOf,
  reading: Reading,
): Study {
  const figures = new FigureNames(figuresOf(outline, knownFigures, reading), outline);
  checkNamesOfFigures(outline, root, knownFigures, reading);
  const size = readSizing(range, root, figures, reading);
  const { band, requirements } = readRequirements(root, outline, figures, reading);
  const preferences = readPreferences(root, figures, reading);
  const columns = readColumns(root, figures, reading);
  return {
    ...outline,
    ...(size && { size }),
    band,
    requirements,
    preferences,
    ...(columns && { columns }),
  };
}

/** With several conditions each has figures of its own, by its name. */
function checkNamesOfFigures(
  outline: Study,
  root: SourceNode,
  knownFigures: FiguresOf,
  reading: Reading,
): void {
  const { conditions } = outline;
  if (conditions.length < 2) return;
  const plain = figuresOf({ ...outline, conditions: conditions.slice(0, 1) }, knownFigures, reading);
  if (plain)
    checkFigureNames(
      root,
      conditions,
      plain.map((figure) => figure.name),
      reading,
    );
}

function figuresOf(
  outline: Study,
  knownFigures: FiguresOf,
  reading: Reading,
): readonly KnownFigure[] | undefined {
  if (reading.faults.size === 0) return knownFigures(outline);
  try {
    return knownFigures(outline);
  } catch {
    // the outline of a faulty study may be too broken to list its figures; its faults are told anyway
    return undefined;
  }
}
