/**
 * The text of a study as a tree whose every key and value knows where it stands. Nothing of YAML is
 * left after this file: no aliases, tags, merge keys or several documents.
 */

/** Offsets into the text, end exclusive. */
export interface Span {
  readonly start: number;
  readonly end: number;
}

export interface ScalarNode {
  readonly kind: 'scalar';
  /** As written, without quotes: `24 %`, `0.62`. */
  readonly text: string;
  readonly value: string | number | boolean | null;
  readonly span: Span;
}
export interface ListNode {
  readonly kind: 'list';
  readonly items: readonly SourceNode[];
  readonly span: Span;
}
export interface MapEntry {
  readonly key: Span;
  readonly value: SourceNode;
}
export interface MapNode {
  readonly kind: 'map';
  readonly entries: ReadonlyMap<string, MapEntry>;
  readonly span: Span;
  /** The key that holds this map; undefined for list entries and the whole study. */
  readonly owner?: Span;
}
export type SourceNode = ScalarNode | ListNode | MapNode;

export type SourcePath = readonly (string | number)[];

/** What an entry of a map holds, when it is a map; undefined otherwise. */
export function mapIn(node: SourceNode | undefined, key: string): MapNode | undefined {
  const value = valueIn(node, key);
  return value?.kind === 'map' ? value : undefined;
}

export function valueIn(node: SourceNode | undefined, key: string): SourceNode | undefined {
  return node?.kind === 'map' ? node.entries.get(key)?.value : undefined;
}

/** The key itself where there is one, else the short place of the whole node. */
export function keySpan(node: SourceNode, key: string): Span {
  return (node.kind === 'map' ? node.entries.get(key)?.key : undefined) ?? firstOf(node);
}

export function wordIn(node: SourceNode | undefined, key: string): string | undefined {
  const value = valueIn(node, key);
  return value?.kind === 'scalar' && typeof value.value === 'string' ? value.value : undefined;
}

/** A short place for a whole node: of a map its own key or its first, so that the mark is not a page long. */
export function firstOf(node: SourceNode): Span {
  if (node.kind !== 'map') return node.span;
  if (node.owner) return node.owner;
  for (const entry of node.entries.values()) return entry.key;
  return node.span;
}

/** The node at a path, and the key that leads to it; undefined when the path ends early. */
export function nodeAt(root: SourceNode, path: SourcePath): { node: SourceNode; key?: Span } | undefined {
  let found: { node: SourceNode; key?: Span } = { node: root };
  for (const step of path) {
    const { node } = found;
    if (node.kind === 'map') {
      const entry = node.entries.get(String(step));
      if (!entry) return undefined;
      found = { node: entry.value, key: entry.key };
    } else if (node.kind === 'list') {
      const item = node.items[Number(step)];
      if (!item) return undefined;
      found = { node: item };
    } else return undefined;
  }
  return found;
}

/** Plain values for the structure check; maps have no prototype. */
export function plainValue(node: SourceNode): unknown {
  if (node.kind === 'scalar') return node.value;
  if (node.kind === 'list') return node.items.map(plainValue);
  const plain: Record<string, unknown> = Object.create(null);
  for (const [key, entry] of node.entries) plain[key] = plainValue(entry.value);
  return plain;
}

/** `['vary', 'wing.span', 'from']` → `vary.wing.span.from`; list entries count from 1. */
export function pathText(path: SourcePath): string {
  return path
    .map((step, index) => (typeof step === 'number' ? `[${step + 1}]` : (index ? '.' : '') + step))
    .join('');
}
