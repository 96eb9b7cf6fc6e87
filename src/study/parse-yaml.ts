/** YAML text → source tree. What studies do not use of YAML is refused here, with its place. */
import { Composer, type CST, type Document, isAlias, isMap, isScalar, isSeq, type Node, Parser } from 'yaml';
import { StudyError } from '../errors.ts';
import type { FaultList } from './fault-list.ts';
import { shorten } from './quantities.ts';
import type { ListNode, MapEntry, MapNode, ScalarNode, SourceNode, Span } from './source.ts';

/** A study is some hundred lines; a megabyte is no study. */
export const largestStudy = 1_000_000;
/** One missing bracket upsets all that follows: later faults of syntax are mostly echoes. */
const mostSyntaxFaults = 3;
/** A study nests six deep; far less than what would exhaust the stack. */
const deepestNesting = 30;

/**
 * Bytes of a file → its text.
 * @throws StudyError for a text that is not UTF-8 or is over a megabyte
 */
export function decodeStudy(bytes: Uint8Array, file: string): string {
  const refuse = (found: string, remedy: string) =>
    new StudyError(file, '', [{ code: 'UNREADABLE_YAML', line: 1, column: 1, length: 1, found, remedy }]);
  if (bytes.length > largestStudy) throw refuse(tooLarge(bytes.length), 'Is this the right file?');
  const mark = (bytes[0] ?? 0) * 256 + (bytes[1] ?? 0);
  if (mark === 0xfffe || mark === 0xfeff) throw refuse('The file is UTF-16.', 'Save it as UTF-8.');
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: false }).decode(bytes);
  } catch {
    throw refuse('The file is not UTF-8 text.', 'Save it as UTF-8.');
  }
}

function tooLarge(length: number): string {
  return `The file holds ${length} bytes; a study is at most ${largestStudy}.`;
}

/** The tree of a study's text; undefined when the text can't be read at all. */
export function parseYaml(text: string, faults: FaultList): SourceNode | undefined {
  if (!textIsPlain(text, faults)) return undefined;
  const tokens = [...new Parser().parse(text)];
  const tooDeep = placeTooDeep(tokens);
  if (tooDeep !== undefined) {
    faults.add(
      'UNREADABLE_YAML',
      { start: tooDeep, end: tooDeep + 1 },
      `Lists and maps are nested more than ${deepestNesting} deep here.`,
      'A study nests six deep at most: look for a bracket that is not closed or a runaway indentation.',
    );
    return undefined;
  }
  const documents = [
    ...new Composer({ uniqueKeys: false, logLevel: 'silent' }).compose(tokens, true, text.length),
  ];
  const before = faults.size;
  for (const document of documents) addYamlErrors(document, text, faults);
  const second = documents[1];
  if (second) {
    faults.add(
      'UNREADABLE_YAML',
      spanOf(second.contents, second.range[0]),
      'A second document begins here.',
      'A study is one document: remove the line of three dashes.',
    );
  }
  if (faults.size > before) return undefined;
  const contents = documents[0]?.contents;
  if (!contents) {
    faults.add('UNREADABLE_YAML', { start: 0, end: 1 }, 'The file is empty.', 'Begin with a starter study.');
    return undefined;
  }
  return new TreeBuilder(text, faults).node(contents);
}

function textIsPlain(text: string, faults: FaultList): boolean {
  const refuse = (at: number, found: string, remedy: string) => {
    faults.add('UNREADABLE_YAML', { start: at, end: at + 1 }, found, remedy);
    return false;
  };
  if (text.length > largestStudy) return refuse(0, tooLarge(text.length), 'Is this the right file?');
  const broken = text.indexOf('\ufffd');
  if (broken >= 0) return refuse(broken, 'A character here could not be decoded.', 'Save the file as UTF-8.');
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is sought
  const control = text.search(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/);
  if (control >= 0)
    return refuse(control, 'There is a control character here.', 'Remove it; a study is plain text.');
  const lone = text.search(/\r(?!\n)/);
  if (lone >= 0)
    return refuse(
      lone,
      'This line ends in a carriage return alone.',
      'Save the file with LF or CRLF line ends.',
    );
  return true;
}

/** Offset of the first collection that is nested too deep. No recursion: the text may be hostile. */
function placeTooDeep(tokens: readonly CST.Token[]): number | undefined {
  const open: { token: CST.Token; depth: number }[] = tokens.map((token) => ({ token, depth: 0 }));
  for (let next = open.pop(); next; next = open.pop()) {
    const { token, depth } = next;
    if (depth > deepestNesting) return token.offset;
    if (token.type === 'document' && token.value) open.push({ token: token.value, depth: depth + 1 });
    if (!('items' in token)) continue;
    for (const item of token.items) {
      if (item.key) open.push({ token: item.key, depth: depth + 1 });
      if (item.value) open.push({ token: item.value, depth: depth + 1 });
    }
  }
  return undefined;
}

const yamlErrorWords: Record<string, readonly [found: string, remedy: string]> = {
  TAB_AS_INDENT: ['A tab indents this line.', 'Indent with spaces.'],
  BAD_INDENT: ['This line is not indented like its neighbours.', 'Line it up with the keys of the same map.'],
  BLOCK_AS_IMPLICIT_KEY: [
    'A map begins inside a value here.',
    'Put it on its own line, or quote a text that holds a colon.',
  ],
  BLOCK_IN_FLOW: [
    'An indented list or map stands between brackets.',
    'Close the bracket first, or write the part on one line.',
  ],
  MISSING_CHAR: [
    'A bracket, quote, comma or colon is missing here.',
    'Close what was opened; part entries by commas.',
  ],
  MULTILINE_IMPLICIT_KEY: [
    'This reads as a key that runs over several lines.',
    'Is a colon missing, or a bracket not closed?',
  ],
  UNEXPECTED_TOKEN: ['This does not belong here.', 'Look for a stray or a missing bracket, comma or colon.'],
  BAD_SCALAR_START: ['A text may not begin with this character.', 'Put the text in quotes.'],
  BAD_DQ_ESCAPE: ['A backslash in a quoted text is not followed by a known letter.', 'Use single quotes.'],
  BAD_ALIAS: ['An alias is misspelt.', 'Write the value out.'],
  BAD_COLLECTION_TYPE: ['A tag does not fit what follows it.', 'Remove the tag.'],
  TAG_RESOLVE_FAILED: ['A tag stands here.', 'Remove it; studies use no tags.'],
};

function addYamlErrors(document: Document.Parsed, text: string, faults: FaultList): void {
  for (const { code, pos } of [...document.errors, ...document.warnings].slice(0, mostSyntaxFaults)) {
    const [start, end] = pos;
    const [found, remedy] = yamlErrorWords[code] ?? [
      'The text can’t be read as YAML here.',
      'Look at this line and the one above it.',
    ];
    const last = Math.max(0, text.trimEnd().length - 1);
    const place = Math.min(start, last);
    faults.add('UNREADABLE_YAML', { start: place, end: Math.max(place + 1, end) }, found, remedy);
  }
}

function spanOf(node: Node | null | undefined, otherwise = 0): Span {
  const range = node?.range;
  return range
    ? { start: range[0], end: Math.max(range[1], range[0] + 1) }
    : { start: otherwise, end: otherwise + 1 };
}

class TreeBuilder {
  constructor(
    private readonly text: string,
    private readonly faults: FaultList,
  ) {}

  node(node: Node): SourceNode {
    this.#refuseExtras(node);
    if (isMap(node)) return this.#map(node);
    if (isSeq(node)) return this.#list(node);
    return this.#scalar(node);
  }

  #refuseExtras(node: Node): void {
    const anchored = 'anchor' in node && node.anchor !== undefined;
    if (isAlias(node) || anchored) {
      // an anchor stands before its node: point at the sign itself
      const end = spanOf(node).end;
      const start = isAlias(node) ? spanOf(node).start : this.text.lastIndexOf('&', spanOf(node).start);
      this.faults.add(
        'ALIAS_REFUSED',
        { start: Math.max(0, start), end },
        isAlias(node)
          ? `An alias, *${shorten(node.source)}, stands for another value.`
          : 'An anchor marks this value.',
        'Write every value out where it is used.',
      );
    }
    if (!isAlias(node) && 'tag' in node && node.tag !== undefined) {
      this.faults.add(
        'UNREADABLE_YAML',
        spanOf(node),
        'A tag stands before this value.',
        'Remove it; studies use no tags.',
      );
    }
  }

  #map(map: { items: readonly unknown[] } & Node): MapNode {
    const entries = new Map<string, MapEntry>();
    for (const item of map.items as readonly { key: Node | null; value: Node | null }[]) {
      const key = item.key;
      const span = spanOf(key, map.range?.[0]);
      if (!isScalar(key) || key.value === null) {
        this.faults.add(
          'UNREADABLE_YAML',
          span,
          'A key here is empty, or is itself a list or a map.',
          'A key is one word followed by a colon.',
        );
        continue;
      }
      this.#refuseExtras(key);
      const word = key.source ?? String(key.value);
      if (this.#keyIsRefused(word, span, entries)) continue;
      entries.set(word, { key: span, value: item.value ? owned(this.node(item.value), span) : empty(span) });
    }
    return { kind: 'map', entries, span: spanOf(map) };
  }

  #keyIsRefused(word: string, span: Span, entries: ReadonlyMap<string, MapEntry>): boolean {
    if (entries.has(word)) {
      this.faults.add(
        'DUPLICATE_KEY',
        span,
        `'${shorten(word)}' is written twice in one map.`,
        'Keep one of them.',
      );
      return true;
    }
    if (word === '<<') {
      this.faults.add(
        'ALIAS_REFUSED',
        span,
        'A merge key (<<) stands here.',
        'Write every value out where it is used.',
      );
      return true;
    }
    if (word === '__proto__') {
      this.faults.add('UNKNOWN_KEY', span, "There is no key '__proto__' in a study.", 'Remove it.');
      return true;
    }
    return false;
  }

  #list(list: { items: readonly unknown[] } & Node): ListNode {
    const span = spanOf(list);
    const items = (list.items as readonly (Node | null)[]).map((item) =>
      item ? this.node(item) : empty(span),
    );
    return { kind: 'list', items, span };
  }

  #scalar(node: Node): ScalarNode {
    const span = spanOf(node);
    if (!isScalar(node)) return { kind: 'scalar', text: '*', value: null, span };
    const { value } = node;
    const text = node.source ?? String(value);
    // a number beyond what a double holds stays a text, which the reading of quantities refuses
    const isPlain = Number.isFinite(value) || typeof value === 'boolean' || value === null;
    return { kind: 'scalar', text, value: isPlain ? (value as ScalarNode['value']) : text, span };
  }
}

/** An empty value has no extent of its own: its key stands for it. */
function owned(node: SourceNode, key: Span): SourceNode {
  if (node.kind === 'map') return { ...node, owner: key };
  return node.kind === 'scalar' && node.text === '' ? { ...node, span: key } : node;
}

function empty(span: Span): ScalarNode {
  return { kind: 'scalar', text: '', value: null, span };
}
