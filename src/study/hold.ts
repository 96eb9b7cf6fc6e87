/** The exchanges of given numbers that `hold` asks for. */
import type { TailBaseline, WingBaseline } from './baseline.ts';
import { offer } from './nearest-known.ts';
import { shorten } from './quantities.ts';
import { tailPairs } from './read-tail.ts';
import type { HoldRequest, PlacedAxis } from './read-vary.ts';
import { wingSizes } from './read-wing.ts';
import type { Reading } from './reading.ts';
import type { TailChoices, WingChoices, WingSize } from './study.ts';
import { type Choices, withoutAeroplane } from './varied-paths.ts';

type PairName = keyof typeof tailPairs;
const tailPairNames = Object.keys(tailPairs) as PairName[];

export interface Baseline {
  readonly wing: WingBaseline;
  readonly tail: TailBaseline;
}

/** The study's choices and the varied paths while holds are worked in, one after the other. */
interface Exchange {
  wing: WingChoices;
  tail: TailChoices;
  readonly varied: ReadonlySet<string>;
  /** Who asked for what, to tell two that disagree. */
  readonly settled: Map<string, HoldRequest>;
}

/** Exchanges given numbers as the `hold`s ask, at their baseline values; returns the pairs after that. */
export function applyHolds(
  holds: readonly HoldRequest[],
  axes: readonly PlacedAxis[],
  choices: Choices,
  baseline: Baseline,
  reading: Reading,
): Choices {
  const varied = new Set(axes.flatMap((axis) => axis.paths));
  const exchange: Exchange = { wing: choices.wing, tail: choices.tail, varied, settled: new Map() };
  for (const hold of holds) {
    if (hold.varied.startsWith('wing.')) holdInWing(hold, exchange, baseline.wing, reading);
    else if (hold.varied.startsWith('tail.')) holdInTail(hold, exchange, baseline.tail, reading);
    else
      refuse(
        hold,
        `${hold.varied} is not one of a pair, so nothing else is held or let go.`,
        'Remove hold.',
        reading,
      );
  }
  return { ...choices, wing: exchange.wing, tail: exchange.tail };
}

function refuse(hold: HoldRequest, found: string, remedy: string, reading: Reading): void {
  reading.faults.add('OVERDETERMINED', hold.span, found, remedy);
}

function heldPath(
  hold: HoldRequest,
  surface: 'wing' | 'tail',
  known: readonly string[],
  reading: Reading,
): string | undefined {
  const word = withoutAeroplane(hold.held);
  const path = word.startsWith(`${surface}.`) ? word : `${surface}.${word}`;
  if (known.includes(path)) return path;
  const names = known.map((name) => name.slice(surface.length + 1));
  const found = `hold names '${shorten(hold.held)}', which ${hold.varied} can't hold.`;
  reading.faults.add('NOT_A_NUMBER_OF_THE_STUDY', hold.span, found, offer(hold.held, names));
  return undefined;
}

/** Enters the baseline value of the number to hold in place of the one that is let go. */
function exchangeInput(
  hold: HoldRequest,
  leaves: string,
  enters: string,
  value: number,
  exchange: Exchange,
  reading: Reading,
): boolean {
  if (exchange.varied.has(leaves)) {
    refuse(
      hold,
      `${hold.varied} asks to hold ${enters}, and ${leaves} varies as well.`,
      'Remove hold, or vary only one of the pair.',
      reading,
    );
    return false;
  }
  reading.inputs.delete(leaves);
  reading.inputs.set(enters, value);
  reading.spans.set(enters, hold.span);
  return true;
}

function disagrees(
  hold: HoldRequest,
  about: string,
  path: string,
  exchange: Exchange,
  reading: Reading,
): boolean {
  const other = exchange.settled.get(about);
  exchange.settled.set(about, other ?? hold);
  if (!other || withoutAeroplane(other.held).split('.').at(-1) === path.split('.').at(-1)) return false;
  refuse(
    hold,
    `${hold.varied} asks to hold ${hold.held}, and ${other.varied} to hold ${other.held}.`,
    'Hold the same number on both.',
    reading,
  );
  return true;
}

function holdInWing(hold: HoldRequest, exchange: Exchange, baseline: WingBaseline, reading: Reading): void {
  const { given } = exchange.wing;
  if (!given.includes(hold.varied as WingSize) || given.length < 2) {
    refuse(
      hold,
      `${hold.varied} is not one of a pair, so nothing else is held or let go.`,
      'Remove hold.',
      reading,
    );
    return;
  }
  const path = heldPath(
    hold,
    'wing',
    wingSizes.filter((size) => size !== hold.varied),
    reading,
  ) as WingSize | undefined;
  if (!path || disagrees(hold, 'wing', path, exchange, reading)) return;
  const partner = given.find((size) => size !== hold.varied)!;
  if (path === partner || !exchangeInput(hold, partner, path, baseline.sizes[path], exchange, reading))
    return;
  exchange.wing = { ...exchange.wing, given: given.map((size) => (size === partner ? path : size)) };
}

const pairOf = (path: string): PairName | undefined =>
  tailPairNames.find((name) => (tailPairs[name] as readonly string[]).includes(path.replace(/^tail\./, '')));

function holdInTail(hold: HoldRequest, exchange: Exchange, baseline: TailBaseline, reading: Reading): void {
  const ownPair = pairOf(hold.varied);
  if (!ownPair) {
    refuse(
      hold,
      `${hold.varied} is not one of a pair, so nothing else is held or let go.`,
      'Remove hold.',
      reading,
    );
    return;
  }
  const known = tailPairNames
    .filter((name) => name !== ownPair)
    .flatMap((name) => tailPairs[name].map((key) => `tail.${key}`));
  const path = heldPath(hold, 'tail', known, reading) as keyof TailBaseline | undefined;
  if (!path) return;
  const pair = pairOf(path)!;
  if (disagrees(hold, pair, path, exchange, reading)) return;
  const leaves = `tail.${exchange.tail[pair]}`;
  if (path === leaves || !exchangeInput(hold, leaves, path, baseline[path], exchange, reading)) return;
  exchange.tail = { ...exchange.tail, [pair]: path.slice('tail.'.length) };
}
