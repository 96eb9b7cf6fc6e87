import { tableColumn } from '../../src/figures/display.ts';
import type { Dimension, FigureKind, TableColumn } from '../../src/figures/figure.ts';
import type { Block } from '../../src/results/block.ts';

/** A column for tests; the figure's texts do not matter to the table. */
export function column(
  name: string,
  kind: FigureKind = 'number',
  dimension: Dimension = 'ratio',
  labels?: readonly string[],
): TableColumn {
  return tableColumn({
    name,
    symbol: name,
    dimension,
    kind,
    meaning: `What ${name} means.`,
    formula: 'given',
    source: 'invented',
    ...(labels === undefined ? {} : { labels }),
  });
}

/** Mulberry32 (Tommy Ettinger, public domain, from memory): the same numbers on every machine. */
export function randomNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** Labels that would trip a careless writer: separators, quotes, line ends, formulas, other alphabets. */
export const awkwardLabels = ['=1+2', 'tail; span', 'quoted "so"', 'two\nlines', 'plain', 'Flügel ☂ 翼'];

/** One column of each kind that the table has. */
export const mixedColumns: readonly TableColumn[] = [
  column('combination', 'number', 'count'),
  column('wing_span', 'number', 'length'),
  column('static_margin_aft', 'number', 'fraction_of_mac'),
  column('wing_sweep', 'number', 'angle'),
  column('feasible', 'yes_no'),
  column('fails_first', 'choice', 'ratio', awkwardLabels),
  column('fails', 'flags', 'ratio', awkwardLabels),
];

/** A block of `mixedColumns` with empty cells in every column but the first. */
export function mixedBlock(first: number, rows: number): Block {
  const random = randomNumbers(first + 1);
  const values = mixedColumns.map(() => new Float64Array(rows));
  for (let i = 0; i < rows; i++) {
    const n = first + i;
    const drawn = [
      n,
      8 + (Math.floor(n / 40) % 17) / 4,
      random() * 0.3 - 0.05,
      random() < 0.3 ? 0 : (random() - 0.5) * 10 ** Math.floor(random() * 30 - 15),
      random() < 0.3 ? 1 : 0,
      Math.floor(random() * awkwardLabels.length),
      Math.floor(random() * 2 ** awkwardLabels.length),
    ];
    drawn.forEach((value, c) => {
      values[c][i] = c > 0 && random() < 0.05 ? Number.NaN : value;
    });
  }
  return { rows, values };
}
