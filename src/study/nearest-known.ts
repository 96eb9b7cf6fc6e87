import { distance } from 'fastest-levenshtein';

/** A word may differ from the known one by a third of its letters, and by two in any case. */
const shareOfLetters = 1 / 3;
const alwaysAllowed = 2;
/** Longer words are nobody's slip of the pen, and comparing them costs time. */
const longestWord = 200;

/** The known word nearest to one that is not known; undefined when none is near. Case is no difference. */
export function nearestKnown(word: string, known: Iterable<string>): string | undefined {
  if (word.length > longestWord) return undefined;
  const sought = word.toLowerCase();
  let nearest: string | undefined;
  let least = Math.max(alwaysAllowed, Math.floor(word.length * shareOfLetters)) + 1;
  for (const candidate of known) {
    const apart = distance(sought, candidate.toLowerCase());
    // two short words with nothing in common are not near each other
    if (apart < least && apart < Math.max(sought.length, candidate.length)) {
      least = apart;
      nearest = candidate;
    }
  }
  return nearest;
}

/** `Did you mean 'taper'?`, or the list when nothing is near and the list is short. */
export function offer(word: string, known: readonly string[]): string {
  const near = nearestKnown(word, known);
  if (near !== undefined) return `Did you mean '${near}'?`;
  const most = 24;
  if (known.length === 0) return 'Remove it.';
  if (known.length > most) return 'Check its spelling.';
  return `Known here: ${known.join(', ')}.`;
}
