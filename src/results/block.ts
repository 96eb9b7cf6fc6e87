import type { TableColumn } from '../figures/figure.ts';

/** Most rows one block may hold; row groups and scratch arrays are sized by it. */
export const largestBlock = 16_384;

/**
 * Some consecutive rows of the table, column by column.
 * A block covers a fixed range of combination numbers, whatever the parts are, so the files
 * do not depend on how the work was shared out.
 */
export interface Block {
  /** 0 … largestBlock; rows beyond it in the arrays are ignored. */
  readonly rows: number;
  /** One array per table column, SI; NaN is an empty cell. Kinds as `FigureKind` tells. */
  readonly values: readonly Float64Array[];
}

/** Throws when a block does not fit the columns: a bug of the caller, never of a study. */
export function checkBlock(block: Block, columns: readonly TableColumn[]): void {
  if (block.rows < 0 || block.rows > largestBlock || !Number.isInteger(block.rows)) {
    throw new RangeError(`a block of ${block.rows} rows; 0 to ${largestBlock} are possible`);
  }
  if (block.values.length !== columns.length) {
    throw new RangeError(`a block of ${block.values.length} columns for a table of ${columns.length}`);
  }
  for (let c = 0; c < columns.length; c++) {
    if (block.values[c].length < block.rows) {
      throw new RangeError(`column ${columns[c].name} holds ${block.values[c].length} of ${block.rows} rows`);
    }
  }
}
