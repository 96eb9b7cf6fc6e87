import type { TableColumn } from '../figures/figure.ts';

/** Between the labels of one flags cell. */
export const flagSeparator = '; ';

/** The labels whose bits are set in `set`, in the order of the labels. */
export function flagLabels(labels: readonly string[], set: number): string[] {
  return labels.filter((_, bit) => (set & (1 << bit)) !== 0);
}

/** Text of a yes/no, choice or flags cell that is not empty. Throws on an index without a label. */
export function labelText(column: TableColumn, value: number): string {
  const { kind, labels = [] } = column.figure;
  if (kind === 'yes_no') return value === 0 ? 'no' : 'yes';
  if (kind === 'flags') return flagLabels(labels, value).join(flagSeparator);
  const label = labels[value];
  if (label === undefined) throw new RangeError(`${column.name} has no label ${value}`);
  return label;
}

/**
 * Spreadsheets run a text cell that begins with = + - @, a tab or a line end as a formula
 * (OWASP, "CSV Injection", from memory). An apostrophe in front makes it plain text. Texts that
 * already begin with apostrophes and such a sign get one more, so that reading can undo it exactly.
 */
export function neutralText(text: string): string {
  return /^'*[=+\-@\t\r\n]/.test(text) ? `'${text}` : text;
}

/** Undoes `neutralText`. */
export function originalText(text: string): string {
  return /^'+[=+\-@\t\r\n]/.test(text) ? text.slice(1) : text;
}

/** A text cell as RFC 4180, section 2, rules 5–7 wants it (from memory), neutralised first. */
export function csvText(text: string): string {
  const plain = neutralText(text);
  return /[",\r\n]/.test(plain) ? `"${plain.replaceAll('"', '""')}"` : plain;
}
