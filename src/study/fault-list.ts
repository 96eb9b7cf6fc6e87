import { StudyError, type StudyFault, type StudyFaultCode } from '../errors.ts';
import type { Span } from './source.ts';

interface PlacedFault {
  readonly code: StudyFaultCode;
  readonly span: Span;
  readonly found: string;
  readonly remedy: string;
}

/** Gathers the faults of one study while it is read, so that all of them are told together. */
export class FaultList {
  readonly #faults: PlacedFault[] = [];
  readonly #told = new Set<string>();
  readonly #starts = new Set<number>();

  add(code: StudyFaultCode, span: Span, found: string, remedy: string): void {
    const codeAndPlace = `${code} ${span.start}`;
    if (this.#told.has(codeAndPlace)) return;
    this.#told.add(codeAndPlace);
    this.#starts.add(span.start);
    this.#faults.push({ code, span, found, remedy });
  }

  /** As `add`, for faults of which several may stand at one place, such as two missing keys. */
  addBeside(code: StudyFaultCode, span: Span, found: string, remedy: string): void {
    this.#told.delete(`${code} ${span.start}`);
    this.add(code, span, found, remedy);
  }

  /** Whether a fault is already told at this very place. */
  touches(span: Span): boolean {
    return this.#starts.has(span.start);
  }

  get size(): number {
    return this.#faults.length;
  }

  /** All faults in the order of the text. */
  toError(file: string, text: string): StudyError {
    const lineStarts = startsOfLines(text);
    const ordered = [...this.#faults].sort((a, b) => a.span.start - b.span.start);
    return new StudyError(
      file,
      text,
      ordered.map(({ code, span, found, remedy }) => ({
        code,
        ...placeOf(text, lineStarts, span),
        found,
        remedy,
      })),
    );
  }
}

function startsOfLines(text: string): number[] {
  const starts = [0];
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) starts.push(at + 1);
  return starts;
}

function placeOf(
  text: string,
  lineStarts: readonly number[],
  span: Span,
): Pick<StudyFault, 'line' | 'column' | 'length'> {
  const start = Math.min(span.start, text.length);
  let low = 0;
  let high = lineStarts.length - 1;
  // find the last line that starts at or before the place
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (lineStarts[middle]! <= start) low = middle;
    else high = middle - 1;
  }
  const lineStart = lineStarts[low]!;
  const lineEnd = (lineStarts[low + 1] ?? text.length + 1) - 1;
  const marked = text.slice(start, Math.min(span.end, lineEnd)).trimEnd();
  return { line: low + 1, column: start - lineStart + 1, length: Math.max(1, marked.length) };
}
