/** The structure check: what the schema finds, told in our words with its place. */
import type { z } from 'zod';
import type { FaultList } from './fault-list.ts';
import { nearestKnown, offer } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import { studyJsonSchema, studySchema } from './schema.ts';
import {
  firstOf,
  nodeAt,
  pathText,
  plainValue,
  type ScalarNode,
  type SourceNode,
  type SourcePath,
} from './source.ts';

type Issue = z.core.$ZodIssue;
type PlainPath = readonly (string | number)[];

/** Adds every fault of structure: missing and unknown keys, wrong kinds of value, unknown words. */
export function checkStructure(root: SourceNode, faults: FaultList): void {
  const checked = studySchema.safeParse(plainValue(root));
  if (checked.success) return;
  for (const issue of checked.error.issues) tell(issue, [], root, faults);
}

function tell(issue: Issue, base: PlainPath, root: SourceNode, faults: FaultList): void {
  const path = [...base, ...(issue.path as PlainPath)];
  const found = nodeAt(root, path);
  if (!found) tellMissing(path, root, faults);
  else if (issue.code === 'unrecognized_keys') tellUnknownKeys(issue.keys, path, found.node, faults);
  else if (!faults.touches(firstOf(found.node))) tellValue(issue, path, found.node, root, faults);
}

function tellValue(
  issue: Issue,
  path: PlainPath,
  node: SourceNode,
  root: SourceNode,
  faults: FaultList,
): void {
  const branch = issue.code === 'invalid_union' ? deepestBranch(issue.errors) : undefined;
  const words = node.kind === 'scalar' && typeof node.value === 'string' ? wordsOf(issue) : [];
  if (branch) for (const inner of branch) tell(inner, path, root, faults);
  else if (words.length > 0) tellUnknownWord(words, wantedBy(issue), path, node as ScalarNode, faults);
  else tellWrongType(wantedBy(issue), path, node, faults);
}

/** The words that may stand there, over all alternatives. */
function wordsOf(issue: Issue): string[] {
  if (issue.code === 'invalid_value') return issue.values.map(String);
  return issue.code === 'invalid_union' ? issue.errors.flat().flatMap(wordsOf) : [];
}

/** The branch of a union that the author meant: the one whose faults lie deeper than the value itself. */
function deepestBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] | undefined {
  const meant = branches.filter((branch) => branch.every((issue) => !isAboutTheValueItself(issue)));
  return meant.sort((a, b) => a.length - b.length)[0];
}

function isAboutTheValueItself(issue: Issue): boolean {
  return issue.path.length === 0 && issue.code !== 'unrecognized_keys';
}

const kindWords: Record<string, string> = {
  string: 'a text',
  number: 'a number',
  boolean: 'true or false',
  object: 'a map of keys',
  record: 'a map of keys',
  array: 'a list',
};

/** What an issue would have accepted: `a number with its unit or a map of keys`. */
function wantedBy(issue: Issue): string {
  const wanted = new Set<string>();
  const collect = (one: Issue): void => {
    if (one.code === 'invalid_type') wanted.add(kindWords[one.expected] ?? one.expected);
    else if (one.code === 'invalid_value') for (const value of one.values) wanted.add(`'${String(value)}'`);
    else if (one.code === 'invalid_union') {
      for (const branch of one.errors)
        for (const inner of branch) if (inner.path.length === 0) collect(inner);
    }
  };
  collect(issue);
  if (wanted.has('a number') && wanted.delete('a text')) {
    wanted.delete('a number');
    return ['a number with its unit', ...wanted].join(' or ');
  }
  return [...wanted].join(' or ') || 'something else';
}

function tellMissing(path: SourcePath, root: SourceNode, faults: FaultList): void {
  const parent = nodeAt(root, path.slice(0, -1));
  if (parent?.node.kind !== 'map') return;
  const key = String(path.at(-1));
  const where = path.length > 1 ? pathText(path.slice(0, -1)) : 'the study';
  const remedy =
    pathText(path) === 'aeroplane.body'
      ? 'Add body: with its stations, or say body: none.'
      : `Add ${key}: to ${where}.`;
  const span = firstOf(parent.node);
  // several keys can be missing from one map: each is told
  faults.addBeside('MISSING_KEY', span, `${where} has no ${key}.`, remedy);
}

function tellUnknownKeys(
  keys: readonly string[],
  path: SourcePath,
  node: SourceNode,
  faults: FaultList,
): void {
  if (node.kind !== 'map') return;
  const known = knownKeysAt(path);
  const where = path.length ? pathText(path) : 'a study';
  for (const key of keys) {
    const entry = node.entries.get(key);
    if (!entry) continue;
    const free = known.filter((word) => !node.entries.has(word));
    faults.add('UNKNOWN_KEY', entry.key, `There is no key '${shorten(key)}' in ${where}.`, offer(key, free));
  }
}

function tellUnknownWord(
  words: readonly string[],
  wanted: string,
  path: SourcePath,
  node: ScalarNode,
  faults: FaultList,
): void {
  const near = nearestKnown(node.text, words);
  faults.add(
    'UNKNOWN_WORD',
    node.span,
    `${pathText(path)} is '${shorten(node.text)}', where ${wanted} is wanted.`,
    near ? `Did you mean '${near}'?` : `Write ${wanted}.`,
  );
}

function tellWrongType(wanted: string, path: SourcePath, node: SourceNode, faults: FaultList): void {
  const what = path.length ? pathText(path) : 'The study';
  faults.add(
    'WRONG_TYPE',
    firstOf(node),
    `${what} is ${describe(node)}, where ${wanted} is wanted.`,
    `Write ${wanted}.`,
  );
}

function describe(node: SourceNode): string {
  if (node.kind === 'list') return 'a list';
  if (node.kind === 'map') return 'a map of keys';
  return node.value === null ? 'empty' : `'${shorten(node.text)}'`;
}

interface SchemaPart {
  readonly properties?: Record<string, SchemaPart>;
  readonly additionalProperties?: SchemaPart | boolean;
  readonly items?: SchemaPart;
  readonly anyOf?: readonly SchemaPart[];
}

/** Keys that the schema has at a path, over all its alternatives. */
function knownKeysAt(path: SourcePath): string[] {
  let parts: SchemaPart[] = [studyJsonSchema()];
  for (const step of path) {
    parts = alternatives(parts).flatMap((part) => {
      if (typeof step === 'number') return part.items ? [part.items] : [];
      const named =
        part.properties && Object.hasOwn(part.properties, step) ? part.properties[step] : undefined;
      if (named) return [named];
      return typeof part.additionalProperties === 'object' ? [part.additionalProperties] : [];
    });
  }
  return [...new Set(alternatives(parts).flatMap((part) => Object.keys(part.properties ?? {})))];
}

function alternatives(parts: readonly SchemaPart[]): SchemaPart[] {
  return parts.flatMap((part) => (part.anyOf ? alternatives(part.anyOf) : [part]));
}
