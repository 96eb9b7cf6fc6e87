/** Faults of a study or a table as text: code, place, what was found, the line itself, what to do. */
import type { DataError, DataFault, StudyError, StudyFault } from '../errors.ts';

type Fault = StudyFault | DataFault;

export interface FormatOptions {
  readonly color: boolean;
}

/** More than this is no help; the rest is counted. */
const mostShown = 50;
const widestLine = 100;
/** Line numbers are set flush right in a column this wide. */
const numberWidth = 6;

const paint = (text: string, code: number, color: boolean) =>
  color ? `\u001b[${code}m${text}\u001b[0m` : text;
const bold = 1;
const red = 31;

/** All faults of a study or a table in the order of its text, ready to print; ends in a line break. */
export function formatStudyError(error: StudyError | DataError, { color }: FormatOptions): string {
  const lines = error.text.split('\n');
  const shown = error.faults.slice(0, mostShown).map((fault) => formatFault(error.file, lines, fault, color));
  const rest = error.faults.length - shown.length;
  const tail = rest > 0 ? [`and ${rest} more fault${rest === 1 ? '' : 's'}.\n`] : [];
  return [...shown, ...tail].join('\n');
}

function formatFault(file: string, lines: readonly string[], fault: Fault, color: boolean): string {
  const { code, line, column, found, remedy } = fault;
  const place = `${printable(file)}:${line}:${column}`;
  const excerpt = lines[line - 1] === undefined ? [] : markedLine(lines[line - 1]!, fault, color);
  return [
    `${paint(place, bold, color)}  ${paint(code, red, color)}`,
    `  ${printable(found)}`,
    ...excerpt,
    `  ${printable(remedy)}`,
    '',
  ].join('\n');
}

function markedLine(text: string, { line, column, length }: Fault, color: boolean): string[] {
  const whole = printable(text.replace(/\r$/, ''));
  const { cut, shift } = window(whole, column - 1, length);
  const margin = `${String(line).padStart(numberWidth)} | `;
  const room = Math.max(1, cut.length - (column - 1 - shift));
  const mark = '^'.repeat(Math.max(1, Math.min(length, room)));
  const blank = `${' '.repeat(numberWidth)} | ${' '.repeat(Math.max(0, column - 1 - shift))}`;
  return whole.trim() === '' ? [] : [margin + cut, blank + paint(mark, red, color)];
}

/** A long line is cut to what stands round the mark. */
function window(text: string, start: number, length: number): { cut: string; shift: number } {
  if (text.length <= widestLine) return { cut: text, shift: 0 };
  const lead = 20;
  const from = start + length <= widestLine ? 0 : Math.max(0, start - lead);
  return { cut: text.slice(from, from + widestLine), shift: from };
}

/** Tabs become one blank, and characters that would steer a terminal become dots; the length stays. */
function printable(text: string): string {
  return text
    .replace(/\t/g, ' ')
    .replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, (character) => '·'.repeat(character.length));
}
