/** Which numbers of a study can vary, and what to say of a path that names none. */
import { findInputDefinition, type InputDefinition } from './inputs.ts';
import { offer } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import { speedKeys } from './read-conditions.ts';
import { tailPairs } from './read-tail.ts';
import { wingSizes } from './read-wing.ts';
import type { Reading } from './reading.ts';
import type { Span } from './source.ts';
import type { CgChoices, Study } from './study.ts';

export type Choices = Pick<Study, 'wing' | 'tail' | 'cg' | 'conditions' | 'loading'>;

/** What a path may call by name instead of by number. */
export type Named = Pick<Study, 'conditions' | 'loading'>;

/** Paths are relative to `aeroplane`; writing it out is no fault. */
export function withoutAeroplane(word: string): string {
  return word.trim().replace(/^aeroplane\.?/, '');
}

/**
 * The path that a study's author means. A condition or an item of the loading
 * may be named: `conditions.cruise.power` → `conditions[1].power`.
 */
export function plainPath(word: string, { conditions, loading }: Named): string {
  const path = withoutAeroplane(word);
  const [, list, name, rest = ''] = /^(conditions|loading\.items)\.([\w-]+)(\..*)?$/.exec(path) ?? [];
  if (list === undefined) return path;
  const entries: readonly { readonly name: string }[] =
    list === 'conditions' ? conditions : (loading?.items ?? []);
  const index = entries.findIndex((entry) => entry.name === name);
  return index < 0 ? path : `${list}[${index + 1}]${rest}`;
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
  const path = plainPath(word, choices);
  const definition = definitionIn(path, choices.cg);
  if (definition && reading.inputs.has(path)) return definition;
  const settled = definition ? settledBy(path, choices, reading) : undefined;
  if (settled) {
    reading.faults.add(
      'DERIVED_VARIED',
      span,
      `${path} follows from ${settled.given.join(' and ')}, which the study gives.`,
      settled.remedy,
    );
  } else tellNoNumber(word, path, definition !== undefined, span, reading);
  return undefined;
}

interface Settled {
  readonly given: readonly string[];
  readonly remedy: string;
}

/** The given numbers that settle a derived one; undefined for a number that nothing settles. */
function settledBy(path: string, choices: Choices, reading: Reading): Settled | undefined {
  const key = path.slice(path.lastIndexOf('.') + 1);
  const shape = givenSizes(path, choices);
  if (shape) {
    const remedy = `Vary ${shape.join(' or ')}, or give ${key} in aeroplane in place of one of them.`;
    return { given: shape, remedy };
  }
  if (choices.loading && /^(mass$|cg\.)/.test(path))
    return { given: ['the loading'], remedy: 'Vary masses or stations of the loading.' };
  const mass = itemMassInPlace(path, choices.loading);
  if (mass) return { given: [mass], remedy: `Vary ${mass}, or give ${key} in its place.` };
  const condition = /^(conditions\[\d+\])\./.exec(path)?.[1];
  const speed = speedKeys.find((other) => reading.inputs.has(`${condition}.${other}`));
  if (!condition || !speed || !(speedKeys as readonly string[]).includes(key)) return undefined;
  const given = `${condition}.${speed}`;
  return { given: [given], remedy: `Vary ${given}, or give ${key} in the condition in its place.` };
}

/** Of an item's mass and its mass per area the one that the study gives, when the path names the other. */
function itemMassInPlace(path: string, loading: Choices['loading']): string | undefined {
  const [, entry, number, key] = /^(loading\.items\[(\d+)\])\.(mass|mass_per_area)$/.exec(path) ?? [];
  const item = loading?.items[Number(number) - 1];
  const hasArea = item?.carriedBy === 'wing' || item?.carriedBy === 'tail';
  return item && hasArea && item.massAs !== key ? `${entry}.${item.massAs}` : undefined;
}

function givenSizes(path: string, { wing, tail }: Choices): string[] | undefined {
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
