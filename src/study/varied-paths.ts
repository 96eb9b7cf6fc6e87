/** Which numbers of a study can vary, and what to say of a path that names none. */
import { findInputDefinition, type InputDefinition } from './inputs.ts';
import { offer } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import { tailPairs } from './read-tail.ts';
import { wingSizes } from './read-wing.ts';
import type { Reading } from './reading.ts';
import type { Span } from './source.ts';
import type { CgChoices, TailChoices, WingChoices } from './study.ts';

export interface Choices {
  readonly wing: WingChoices;
  readonly tail: TailChoices;
  readonly cg: CgChoices;
}

/** Paths are relative to `aeroplane`; writing it out is no fault. */
export function plainPath(word: string): string {
  return word.trim().replace(/^aeroplane\.?/, '');
}

/** The definition of a number as this study gives it. */
export function definitionIn(path: string, cg: CgChoices): InputDefinition | undefined {
  if (path === 'cg.forward') return findInputDefinition(path, cg.forward);
  if (path === 'cg.aft') return findInputDefinition(path, cg.aft);
  return findInputDefinition(path);
}

/** The number that a path names; where it names none a fault is told. */
export function variedNumber(
  word: string,
  span: Span,
  choices: Choices,
  reading: Reading,
): InputDefinition | undefined {
  const path = plainPath(word);
  const definition = definitionIn(path, choices.cg);
  if (definition && reading.inputs.has(path)) return definition;
  const given = definition ? givenInstead(path, choices) : undefined;
  if (given) {
    const pair = given.join(' and ');
    reading.faults.add(
      'DERIVED_VARIED',
      span,
      `${path} follows from ${pair}, which the study gives.`,
      `Vary ${given.join(' or ')}, or give ${path.slice(path.indexOf('.') + 1)} in aeroplane in place of one of them.`,
    );
  } else tellNoNumber(word, path, definition !== undefined, span, reading);
  return undefined;
}

/** The given numbers that settle a derived one; undefined for a number that nothing settles. */
export function givenInstead(path: string, { wing, tail }: Choices): string[] | undefined {
  if (path === 'wing.span' && wing.form === 'panels' && wing.panelWidth === 'width')
    return ['the widths of the panels'];
  if ((wingSizes as readonly string[]).includes(path)) {
    return wing.given.length === 1 ? [...wing.given, 'the widths of the panels'] : [...wing.given];
  }
  const key = path.replace(/^tail\./, '');
  const inPair = (pair: readonly string[]) => path.startsWith('tail.') && pair.includes(key);
  if (inPair(tailPairs.size) || inPair(tailPairs.place)) return [`tail.${tail.size}`, `tail.${tail.place}`];
  if (inPair(tailPairs.planform)) return [`tail.${tail.size}`, `tail.${tail.planform}`];
  return undefined;
}

function tellNoNumber(word: string, path: string, known: boolean, span: Span, reading: Reading): void {
  const entry = /^(.*?)\[(\d+)\]/.exec(path);
  const list = entry?.[1];
  const entries = new Set(
    [...reading.inputs.keys()]
      .filter((key) => list && key.startsWith(`${list}[`))
      .map((key) => key.split(']')[0]),
  );
  const found = `'${shorten(word)}' names no number of this study`;
  if (list && entries.size > 0 && !entries.has(`${list}[${entry[2]}`)) {
    reading.faults.add(
      'NOT_A_NUMBER_OF_THE_STUDY',
      span,
      `${found}: ${list} has ${entries.size} entries.`,
      'List entries count from 1.',
    );
  } else if (known) {
    const remedy = `Give ${path} a fixed value first: it is the baseline of the study.`;
    reading.faults.add('NOT_A_NUMBER_OF_THE_STUDY', span, `${found}: it has no fixed value.`, remedy);
  } else {
    reading.faults.add(
      'NOT_A_NUMBER_OF_THE_STUDY',
      span,
      `${found}.`,
      offer(path, [...reading.inputs.keys()]),
    );
  }
}
