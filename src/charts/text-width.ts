import { type Weight, weight } from './theme.ts';

/**
 * Advance widths of U+0020…U+007E in hundredths of the font size, read from the horizontal
 * metrics of the Inter font files that the charts are drawn with (regular and semi-bold).
 */
const advances: Record<Weight, readonly number[]> = {
  [weight.normal]: [
    28, 29, 47, 63, 64, 98, 64, 30, 36, 36, 50, 66, 29, 46, 29, 36, 63, 41, 61, 62, 65, 59, 62, 57, 62, 62,
    29, 30, 66, 66, 66, 51, 97, 69, 65, 73, 72, 60, 59, 75, 74, 27, 57, 67, 57, 90, 75, 76, 64, 76, 64, 64,
    65, 74, 69, 99, 68, 68, 63, 36, 36, 36, 47, 46, 32, 56, 61, 57, 61, 58, 37, 61, 59, 24, 24, 55, 24, 88,
    59, 60, 61, 61, 38, 53, 33, 59, 56, 82, 55, 56, 55, 43, 33, 43, 66,
  ],
  [weight.strong]: [
    25, 32, 52, 64, 65, 100, 66, 33, 37, 37, 54, 67, 32, 47, 32, 38, 66, 42, 62, 64, 67, 61, 64, 58, 64, 64,
    32, 33, 67, 67, 67, 54, 100, 73, 66, 74, 72, 61, 59, 75, 75, 28, 58, 70, 57, 92, 76, 77, 65, 77, 65, 65,
    66, 74, 73, 102, 72, 71, 65, 37, 38, 37, 48, 47, 35, 57, 62, 58, 62, 59, 39, 63, 61, 26, 26, 57, 26, 90,
    61, 61, 62, 62, 40, 55, 35, 61, 59, 84, 57, 59, 57, 45, 36, 45, 67,
  ],
};
const firstAdvance = 0x20;
/** Signs beyond ASCII that charts use, hundredths of the font size (the wider of the two weights). */
const signAdvances: Readonly<Record<string, number>> = {
  '°': 46,
  '–': 50,
  '—': 100,
  '²': 45,
  '³': 46,
  '…': 96,
  '·': 32,
  '¼': 83,
  '\u00a0': 28,
};
const letterAdvance = 70;
const wideAdvance = 125;
/** From here on letters are taken as full-width (CJK, emoji). */
const firstWideCodePoint = 0x1100;
const lastNarrowSymbol = 0x2e7f;

/**
 * Width of one line of text [px].
 * @param size font size [px]
 * From the Inter font's own metrics for ASCII; other letters are taken generously. Kerning is ignored.
 */
export function textWidth(text: string, size: number, boldness: Weight = weight.normal): number {
  const table = advances[boldness];
  let hundredths = 0;
  for (const sign of text) {
    const codePoint = sign.codePointAt(0)!;
    hundredths += table[codePoint - firstAdvance] ?? signAdvances[sign] ?? otherAdvance(codePoint);
  }
  return (hundredths * size) / 100;
}

function otherAdvance(codePoint: number): number {
  const wide = codePoint >= firstWideCodePoint && (codePoint < 0x2000 || codePoint > lastNarrowSymbol);
  return wide ? wideAdvance : letterAdvance;
}

/** Control signs, lone surrogates and direction overrides: they break XML or reorder the text around them. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are the signs to be removed
const unprintable = /[\u0000-\u001f\u007f-\u009f\u200e\u200f\u202a-\u202e\u2066-\u2069\ufffe\uffff]|\p{Cs}/gu;

/** Text as it may stand in a picture: one line, printable signs only. */
export function cleanText(text: string): string {
  return text.replace(unprintable, ' ').replace(/\s+/gu, ' ').trim();
}

/** The text, cut with an ellipsis when it is wider than `room` [px]. */
export function ellipsize(
  text: string,
  room: number,
  size: number,
  boldness: Weight = weight.normal,
): string {
  const clean = cleanText(text);
  if (textWidth(clean, size, boldness) <= room) return clean;
  const signs = Array.from(clean);
  while (signs.length > 0 && textWidth(`${signs.join('')}…`, size, boldness) > room) signs.pop();
  return `${signs.join('').trimEnd()}…`;
}

/** The text on at most `lines` lines of width `room` [px], broken at spaces; what is left over ends in an ellipsis. */
export function wrapText(
  text: string,
  room: number,
  size: number,
  lines: number,
  boldness: Weight = weight.normal,
): string[] {
  const words = cleanText(text).split(' ');
  const wrapped: string[] = [];
  while (words.length > 0 && wrapped.length < lines - 1) wrapped.push(takeLine(words, room, size, boldness));
  if (words.length > 0) wrapped.push(ellipsize(words.join(' '), room, size, boldness));
  return wrapped;
}

/** Takes from the front of `words` as many as fit one line; a word too long for a line is broken. */
function takeLine(words: string[], room: number, size: number, boldness: Weight): string {
  let line = words.shift()!;
  if (textWidth(line, size, boldness) > room) {
    const signs = Array.from(line);
    const rest: string[] = [];
    while (signs.length > 1 && textWidth(signs.join(''), size, boldness) > room) rest.unshift(signs.pop()!);
    words.unshift(rest.join(''));
    return signs.join('');
  }
  while (words.length > 0 && textWidth(`${line} ${words[0]}`, size, boldness) <= room)
    line += ` ${words.shift()}`;
  return line;
}

/** A number with a true minus sign and `decimals` decimals; never '−0'. */
export function numberText(value: number, decimals: number): string {
  const digits = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(digits) !== 0 ? `−${digits}` : digits;
}

/** A count with a comma at every third digit. */
export function countText(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, ',');
}
