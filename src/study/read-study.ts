import { tailBaseline, wingBaseline } from './baseline.ts';
import { checkCg, checkDerivedSizes, checkTailPlace, checkVariedShape } from './check-shape.ts';
import { FaultList } from './fault-list.ts';
import { describeHeld } from './held-words.ts';
import { applyHolds } from './hold.ts';
import { FigureNames, type KnownFigure } from './known-figures.ts';
import { parseYaml } from './parse-yaml.ts';
import { readBody } from './read-body.ts';
import { readCg } from './read-cg.ts';
import { readConditions } from './read-conditions.ts';
import { readMethods } from './read-methods.ts';
import { readColumns, readKeep, readPreferences, readRequirements } from './read-requirements.ts';
import { readSkip } from './read-skip.ts';
import { readTail } from './read-tail.ts';
import { type PlacedAxis, readVary } from './read-vary.ts';
import { readWing } from './read-wing.ts';
import { Reading } from './reading.ts';
import { mapIn, type SourceNode, wordIn } from './source.ts';
import { checkStructure } from './structure.ts';
import type { AircraftClass, Axis, BodyChoices, Study } from './study.ts';
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
  const conditions = readConditions(root, reading);
  const methods = readMethods(root, reading);
  const aeroplane = readAeroplane(root, reading);
  if (!aeroplane) return undefined;
  const { choices, body, axes } = aeroplane;
  const show = wordIn(root, 'show') === 'US' ? 'US' : 'metric';
  const question = wordIn(root, 'question');
  const aircraftClass = wordIn(root, 'class') as AircraftClass | undefined;
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
    hinge: choices.tail.allMoving ? 'none' : 'theory',
    conditions,
    methods,
    axes: axes.map(withoutPlaces),
    skip: readSkip(root, axes, choices, reading),
    band: {},
    requirements: [],
    preferences: [],
    keep: readKeep(root, reading),
    assumptions: reading.assumptions,
    held: describeHeld(axes, choices, reading.inputs, show),
  };
  return withFigures(outline, root, knownFigures, reading);
}

interface Aeroplane {
  readonly choices: Choices;
  readonly body: BodyChoices | undefined;
  readonly axes: readonly PlacedAxis[];
}

/** The aeroplane, what varies, and what is held: one knot, because a hold changes what is given. */
function readAeroplane(root: SourceNode, reading: Reading): Aeroplane | undefined {
  const map = mapIn(root, 'aeroplane');
  const [wingMap, tailMap, cgMap] = ['wing', 'tail', 'cg'].map((key) => mapIn(map, key));
  if (!map || !wingMap || !tailMap || !cgMap) return undefined;
  reading.take(map, 'mass', 'mass');
  const given: Choices = {
    wing: readWing(wingMap, reading),
    tail: readTail(tailMap, reading),
    cg: readCg(cgMap, reading),
  };
  const body = readBody(map, reading);
  const wing = wingBaseline(reading.inputs, given.wing);
  const baseline = { wing, tail: tailBaseline(reading.inputs, given.tail, wing) };
  checkDerivedSizes(given, baseline, reading);
  checkTailPlace(given, body, baseline, reading);
  checkCg(given, baseline, reading);
  const { axes, holds } = readVary(root, given, reading);
  checkVariedShape(axes, given, body, baseline, reading);
  return { choices: applyHolds(holds, axes, given, baseline, reading), body, axes };
}

function withoutPlaces({ name, paths, values }: PlacedAxis): Axis {
  return { name, paths, values };
}

/** Adds what names figures: requirements, preferences, columns. */
function withFigures(outline: Study, root: SourceNode, knownFigures: FiguresOf, reading: Reading): Study {
  const figures = new FigureNames(figuresOf(outline, knownFigures, reading));
  const { band, requirements } = readRequirements(root, outline.conditions, figures, reading);
  const preferences = readPreferences(root, figures, reading);
  const columns = readColumns(root, figures, reading);
  return { ...outline, band, requirements, preferences, ...(columns && { columns }) };
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
