import { neededStages } from '../plan/needed-stages.ts';
import type { Plan } from '../plan/plan.ts';
import { blockSize } from '../plan/plan.ts';
import { StageMemory } from './stage-memory.ts';
import { Tiles } from './tiles.ts';

/** The figure that numbers the rows; the evaluator makes it itself. */
export const combinationFigure = 'combination';
/** When a stage writes this figure, rows where it is not 0 are dropped. */
export const skippedFigure = 'skipped';

/**
 * Evaluates ranges of combinations into dense columns, each stage only once for each distinct
 * setting of the axes it depends on, as far as its memory reaches, and only the stages that lead to
 * the wanted figures.
 *
 * A stage that depends on every axis is evaluated for the kept rows only; every other stage is
 * evaluated for all settings of its own axes inside the tile and remembered. Nothing is allocated
 * per combination.
 */
export class Evaluator {
  /** One column per wanted figure, SI, `blockSize` long; valid up to the count returned last. */
  readonly columns: readonly Float64Array[];
  private readonly tiles: Tiles;
  private readonly memories: readonly StageMemory[];
  private readonly skipStageCount: number;
  private readonly rows: Int32Array;

  constructor(
    private readonly plan: Plan,
    private readonly wanted: readonly string[],
    tileRows?: number,
  ) {
    this.tiles = new Tiles(plan, tileRows);
    const needed = neededStages(plan.stages, [...wanted, skippedFigure]);
    this.memories = needed.map(
      (index) => new StageMemory(plan.stages[index], plan.axesOfStage[index], this.tiles),
    );
    this.skipStageCount = 1 + needed.findIndex((index) => plan.stages[index].writes.includes(skippedFigure));
    this.columns = wanted.map(() => new Float64Array(blockSize));
    this.rows = new Int32Array(this.tiles.shape.rows);
    for (const name of wanted) if (name !== combinationFigure) this.tiles.source(name);
  }

  /**
   * Evaluates combinations first … first+count−1 (count ≤ blockSize) into `columns`.
   * @returns rows kept, after skips
   */
  evaluate(first: number, count: number): number {
    const { rows: tileRows, suffixTotal, chunks } = this.tiles.shape;
    const end = Math.min(first + count, this.plan.combinations);
    let kept = 0;
    let at = first;
    while (at < end) {
      const prefix = Math.floor(at / suffixTotal);
      const inSuffix = at - prefix * suffixTotal;
      const chunk = chunks === 1 ? 0 : Math.floor(inSuffix / tileRows);
      const tileFirst = prefix * suffixTotal + chunk * tileRows;
      const tileEnd = Math.min(tileFirst + tileRows, (prefix + 1) * suffixTotal, end);
      this.tiles.moveTo(prefix, chunk);
      kept += this.evaluateTile(tileFirst, at - tileFirst, tileEnd - tileFirst, kept);
      at = tileEnd;
    }
    return kept;
  }

  /** Evaluates rows from … to−1 of the current tile and appends them to the columns at `offset`. */
  private evaluateTile(tileFirst: number, from: number, to: number, offset: number): number {
    for (let index = 0; index < this.skipStageCount; index++) this.memories[index].evaluateShared();
    const count = this.chooseRows(from, to);
    if (count === 0) return 0;
    const rows = from === 0 && count === this.tiles.shape.rows ? null : this.rows;
    this.tiles.tick++;
    for (let index = this.skipStageCount; index < this.memories.length; index++) {
      this.memories[index].evaluate(rows, count);
    }
    for (let k = 0; k < this.wanted.length; k++) {
      const column = this.columns[k];
      if (this.wanted[k] === combinationFigure) {
        for (let row = 0; row < count; row++) column[offset + row] = tileFirst + this.rows[row];
      } else {
        this.tiles.source(this.wanted[k]).copyRows(rows, count, column, offset);
      }
    }
    return count;
  }

  /** Lists the rows of from … to−1 that are not skipped in `this.rows`. */
  private chooseRows(from: number, to: number): number {
    const { rows } = this;
    if (this.skipStageCount === 0) {
      for (let row = from; row < to; row++) rows[row - from] = row;
      return to - from;
    }
    const { values, map } = this.tiles.source(skippedFigure);
    let count = 0;
    for (let row = from; row < to; row++) {
      if (values[map === null ? row : map[row]] === 0) rows[count++] = row;
    }
    return count;
  }
}
