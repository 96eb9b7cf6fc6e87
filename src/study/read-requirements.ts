/** `require`, `prefer`, `shortlist` and `table`. */
import { bandRequirements, marginScale } from '../figures/band.ts';
import type { Dimension } from '../figures/figure.ts';
import type { FigureNames, KnownFigure } from './known-figures.ts';
import type { QuantityKind } from './quantities.ts';
import { allConditions, checkConditionName } from './read-conditions.ts';
import { presetRequirement } from './read-presets.ts';
import type { Reading } from './reading.ts';
import { keySpan, type MapEntry, mapIn, type SourceNode, type Span, valueIn, wordIn } from './source.ts';
import type { Band, Condition, Preference, Requirement, Study } from './study.ts';

const bandKey = 'static_margin';
const inRangeKey = 'in_range';

/** A margin outside these is no static margin but a slip of the unit. */
const marginKind: QuantityKind = {
  dimension: 'fraction_of_mac',
  least: -0.5,
  most: 1,
  limits: 'a static margin',
};
/** One unit of shortfall of anything but a margin: a twentieth of the limit. */
const shareOfLimit = 0.05;
const smallestLimit = 1e-6;

/** Failed edges stand in the table as bits of a 32-bit signed number. */
const mostEdges = 31;

export interface Requirements {
  readonly band: Band;
  readonly requirements: readonly Requirement[];
}

function anyOf(dimension: Dimension): QuantityKind {
  return { dimension, least: -Number.MAX_VALUE, most: Number.MAX_VALUE, limits: 'a number' };
}

/** Reads `require`, in the order of the file. */
export function readRequirements(
  root: SourceNode,
  study: Pick<Study, 'conditions' | 'control' | 'hinge'>,
  figures: FigureNames,
  reading: Reading,
): Requirements {
  let band: Band = {};
  const requirements: Requirement[] = [];
  for (const [key, entry] of mapIn(root, 'require')?.entries ?? []) {
    if (key === bandKey) {
      const read = readBand(entry.value, study.conditions, reading);
      band = read.band;
      requirements.push(...read.requirements);
    } else if (key === inRangeKey) {
      const wanted = entry.value.kind === 'scalar' && entry.value.value === true;
      if (wanted) requirements.push({ name: inRangeKey, figure: inRangeKey, scale: 1 });
    } else if (valueIn(entry.value, 'preset')) {
      const scale = (otherwise: number) =>
        readScale(entry.value, 'force', otherwise, `require.${key}`, reading);
      const requirement = presetRequirement(key, entry, study, scale, reading);
      if (requirement) requirements.push(requirement);
    } else {
      const requirement = readRequirement(key, entry, figures, reading);
      if (requirement) requirements.push(requirement);
    }
    if (edgeCount(requirements) > mostEdges) {
      tellTooMany(entry.key, reading);
      break;
    }
  }
  return { band, requirements };
}

function edgeCount(requirements: readonly Requirement[]): number {
  return requirements.reduce(
    (sum, { atLeast, atMost }) =>
      sum + Math.max(1, Number(atLeast !== undefined) + Number(atMost !== undefined)),
    0,
  );
}

function tellTooMany(span: Span, reading: Reading): void {
  reading.faults.add(
    'OUT_OF_RANGE',
    span,
    `With this requirement the study has more than ${mostEdges} edges, at_least and at_most counted each.`,
    'Leave out the requirements that nothing fails.',
  );
}

function readBand(map: SourceNode, conditions: readonly Condition[], reading: Reading): Requirements {
  const lower = readEdge(map, 'at_least', conditions, reading);
  const upper = readEdge(map, 'at_most', conditions, reading);
  const scale = readScale(map, 'fraction_of_mac', marginScale, `require.${bandKey}`, reading);
  const hasEdge = valueIn(map, 'at_least') || valueIn(map, 'at_most');
  if (map.kind === 'map' && !hasEdge) tellNoEdge(map, bandKey, reading);
  if (lower && upper && lower.value > upper.value) tellReversed(map, `require.${bandKey}`, reading);
  return {
    band: {
      ...(lower && { lower: lower.value, lowerIn: lower.in ?? conditions.map(({ name }) => name) }),
      ...(upper && {
        upper: upper.value,
        upperIn: upper.in ?? conditions.slice(0, 1).map(({ name }) => name),
      }),
    },
    requirements: [
      ...(lower ? [{ ...bandRequirements.lower, atLeast: lower.value, scale }] : []),
      ...(upper ? [{ ...bandRequirements.upper, atMost: upper.value, scale }] : []),
    ],
  };
}

interface Edge {
  readonly value: number;
  /** Names of the conditions in which the edge counts; undefined where the study does not say. */
  readonly in: readonly string[] | undefined;
}

function readEdge(
  map: SourceNode,
  key: 'at_least' | 'at_most',
  conditions: readonly Condition[],
  reading: Reading,
): Edge | undefined {
  const edge = valueIn(map, key);
  const node = edge?.kind === 'map' ? valueIn(edge, 'value') : edge;
  const where = valueIn(edge, 'in');
  const value = reading.quantity(node, marginKind, `require.${bandKey}.${key}`)?.si;
  const names = where && readNames(where, `require.${bandKey}.${key}`, conditions, reading);
  return value === undefined ? undefined : { value, in: names };
}

/** The conditions named under `in`, in the order of the study. */
function readNames(
  where: SourceNode,
  label: string,
  conditions: readonly Condition[],
  reading: Reading,
): string[] {
  const nodes = where.kind === 'list' ? where.items : [where];
  if (nodes.length === 0) {
    const remedy = `Name conditions, or write ${allConditions}.`;
    reading.faults.add('MISSING_KEY', where.span, `${label} counts in no condition.`, remedy);
  }
  const wanted = new Set<string>();
  for (const node of nodes) {
    if (node.kind !== 'scalar' || typeof node.value !== 'string') continue;
    checkConditionName(node.value, node.span, conditions, reading);
    wanted.add(node.value);
  }
  return conditions.map(({ name }) => name).filter((name) => wanted.has(name) || wanted.has(allConditions));
}

function tellNoEdge(map: SourceNode, name: string, reading: Reading): void {
  reading.faults.add(
    'UNDERDETERMINED',
    keySpan(map, ''),
    `require.${name} has neither at_least nor at_most.`,
    'Give one of them, or both.',
  );
}

function tellReversed(map: SourceNode, label: string, reading: Reading): void {
  reading.faults.add(
    'BAND_REVERSED',
    keySpan(map, 'at_least'),
    `${label}: at_least lies above at_most, so nothing can be feasible.`,
    'Swap the two edges.',
  );
}

function readScale(
  map: SourceNode,
  dimension: Dimension,
  otherwise: number,
  label: string,
  reading: Reading,
): number {
  const node = valueIn(map, 'scale');
  if (!node) return otherwise;
  const kind = {
    dimension,
    least: Number.MIN_VALUE,
    most: Number.MAX_VALUE,
    limits: 'a scale is greater than zero',
  };
  return reading.quantity(node, kind, `${label}.scale`)?.si ?? otherwise;
}

function readRequirement(
  name: string,
  { key, value: map }: MapEntry,
  figures: FigureNames,
  reading: Reading,
): Requirement | undefined {
  if (map.kind !== 'map') return undefined;
  const word = wordIn(map, 'figure');
  if (word === undefined && valueIn(map, 'figure')) return undefined;
  const figure = figures.findNumber(
    word ?? name,
    word === undefined ? key : valueIn(map, 'figure')!.span,
    reading,
  );
  if (!valueIn(map, 'at_least') && !valueIn(map, 'at_most')) tellNoEdge(map, name, reading);
  if (!figure) return undefined;
  const limit = (edge: 'at_least' | 'at_most') =>
    reading.quantity(valueIn(map, edge), anyOf(figure.dimension), `require.${name}.${edge}`)?.si;
  const atLeast = limit('at_least');
  const atMost = limit('at_most');
  if (atLeast !== undefined && atMost !== undefined && atLeast > atMost)
    tellReversed(map, `require.${name}`, reading);
  const scale = readScale(
    map,
    figure.dimension,
    customaryScale(figure, atLeast, atMost),
    `require.${name}`,
    reading,
  );
  return {
    name,
    figure: figure.name,
    ...(atLeast !== undefined && { atLeast }),
    ...(atMost !== undefined && { atMost }),
    scale,
  };
}

function customaryScale({ dimension }: KnownFigure, atLeast = 0, atMost = 0): number {
  if (dimension === 'fraction_of_mac') return marginScale;
  return shareOfLimit * Math.max(Math.abs(atLeast), Math.abs(atMost), smallestLimit);
}

/** Reads `prefer`, in the order of the file. */
export function readPreferences(root: SourceNode, figures: FigureNames, reading: Reading): Preference[] {
  return [...(mapIn(root, 'prefer')?.entries ?? [])].flatMap(([key, entry]): Preference[] => {
    const figure = figures.findNumber(key, entry.key, reading);
    if (!figure) return [];
    const word = entry.value.kind === 'scalar' ? entry.value.value : undefined;
    if (word === 'less' || word === 'more') return [{ figure: figure.name, want: word }];
    const nearest = reading.quantity(
      valueIn(entry.value, 'nearest'),
      anyOf(figure.dimension),
      `prefer.${key}.nearest`,
    );
    return nearest ? [{ figure: figure.name, want: 'nearest', nearest: nearest.si }] : [];
  });
}

const customaryKeep = 12;
const mostKept = 100;

/** Reads `shortlist.keep`. */
export function readKeep(root: SourceNode, reading: Reading): number {
  const node = valueIn(valueIn(root, 'shortlist'), 'keep');
  if (node?.kind !== 'scalar' || typeof node.value !== 'number') return customaryKeep;
  if (Number.isInteger(node.value) && node.value >= 1 && node.value <= mostKept) return node.value;
  reading.faults.add(
    'OUT_OF_RANGE',
    node.span,
    `shortlist.keep is ${node.text}.`,
    `Give a whole number from 1 to ${mostKept}.`,
  );
  return customaryKeep;
}

/** Reads `table.columns`; undefined where all figures are wanted. */
export function readColumns(root: SourceNode, figures: FigureNames, reading: Reading): string[] | undefined {
  const list = valueIn(valueIn(root, 'table'), 'columns');
  if (list?.kind !== 'list') return undefined;
  const columns: string[] = [];
  for (const item of list.items) {
    if (item.kind !== 'scalar' || typeof item.value !== 'string') continue;
    const name = figures.find(item.value, item.span, reading)?.name;
    if (name === undefined) continue;
    if (columns.includes(name)) {
      reading.faults.add('DUPLICATE_NAME', item.span, `table.columns lists ${name} twice.`, 'Keep one.');
    } else columns.push(name);
  }
  return columns;
}
