import { offer } from './nearest-known.ts';
import type { PlacedAxis } from './read-vary.ts';
import type { Reading } from './reading.ts';
import { firstOf, mapIn, type SourceNode, type Span, valueIn, wordIn } from './source.ts';
import type { SkipRule, SkipTest } from './study.ts';
import { type Choices, definitionIn, plainPath } from './varied-paths.ts';

const edges = ['below', 'above', 'equal'] as const;
/** A tested value this close to one of the axis [share of the value] is that value. */
const sameValue = 1e-9;

/** Reads `skip`: rules whose tests read varied numbers only. */
export function readSkip(
  root: SourceNode,
  axes: readonly PlacedAxis[],
  choices: Choices,
  reading: Reading,
): SkipRule[] {
  const list = valueIn(root, 'skip');
  if (list?.kind !== 'list') return [];
  return list.items.flatMap((rule) => {
    const when = mapIn(rule, 'when');
    const because = wordIn(rule, 'because');
    if (!when || because === undefined) return [];
    if (when.entries.size === 0) {
      reading.faults.add(
        'MISSING_KEY',
        firstOf(when),
        'A skip rule tests nothing, so it would skip everything.',
        'Name a varied number under when.',
      );
    }
    const tests = [...when.entries].map(([key, entry]) =>
      readTest(key, entry.key, entry.value, axes, choices, reading),
    );
    return tests.every((test) => test !== undefined) ? [{ tests, because }] : [];
  });
}

function readTest(
  word: string,
  span: Span,
  node: SourceNode,
  axes: readonly PlacedAxis[],
  choices: Choices,
  reading: Reading,
): SkipTest | undefined {
  const path = plainPath(word, choices);
  const axis = axes.find((one) => one.paths.includes(path));
  const definition = definitionIn(path, choices.cg);
  if (!axis || !definition) {
    const varied = axes.flatMap((one) => one.paths);
    const remedy = varied.length ? offer(path, varied) : 'Nothing varies in this study.';
    reading.faults.add('NOT_A_NUMBER_OF_THE_STUDY', span, `skip tests ${path}, which does not vary.`, remedy);
    return undefined;
  }
  const read = (value: SourceNode | undefined) => {
    // a test may lie outside the limits of the number itself
    const kind = { ...definition, least: -Number.MAX_VALUE, most: Number.MAX_VALUE };
    return reading.quantity(value, kind, `skip.when.${path}`)?.si;
  };
  if (node.kind === 'scalar') return withEdges(path, { equal: read(node) }, axis);
  if (edges.every((edge) => !valueIn(node, edge))) {
    reading.faults.add(
      'UNDERDETERMINED',
      span,
      `skip tests ${path} against nothing.`,
      'Give below, above or equal.',
    );
    return undefined;
  }
  const given = Object.fromEntries(edges.map((edge) => [edge, read(valueIn(node, edge))]));
  return withEdges(path, given, axis);
}

function withEdges(
  path: string,
  given: {
    readonly below?: number | undefined;
    readonly above?: number | undefined;
    readonly equal?: number | undefined;
  },
  axis: PlacedAxis,
): SkipTest {
  const column = axis.values[axis.paths.indexOf(path)]!;
  const known = Object.entries(given).filter(([, value]) => value !== undefined);
  return { path, ...Object.fromEntries(known.map(([edge, value]) => [edge, onAxis(value!, column)])) };
}

/** The axis' own value where the test means it, so that a comparison needs no tolerance. */
function onAxis(value: number, column: Float64Array): number {
  const same = column.find((one) => Math.abs(one - value) <= sameValue * Math.abs(value));
  return same ?? value;
}
