import type { Stage } from './stage.ts';

/** Stages that depend on some figures, directly or through other stages, in their order. */
export function stagesDependingOn(stages: readonly Stage[], figures: readonly string[]): Set<Stage> {
  const moving = new Set(figures);
  const dependent = new Set<Stage>();
  for (const stage of stages) {
    if (!stage.reads.some((figure) => moving.has(figure))) continue;
    dependent.add(stage);
    for (const figure of stage.writes) if (figure !== null) moving.add(figure);
  }
  return dependent;
}

/** Those of the stages that lead to a figure, in their order. */
export function stagesLeadingTo(stages: readonly Stage[], figure: string): Stage[] {
  const needed = new Set([figure]);
  const leading = stages.filter(() => false);
  for (const stage of [...stages].reverse()) {
    if (!stage.writes.some((written) => written !== null && needed.has(written))) continue;
    leading.unshift(stage);
    for (const read of stage.reads) needed.add(read);
  }
  return leading;
}

/** Rows that a chain takes at a time: few enough for all its columns to stay in the processor's cache. */
export const chainRows = 128;

interface Link {
  readonly kernel: Stage['kernel'];
  readonly inputs: readonly Float64Array[];
  readonly outputs: readonly Float64Array[];
}

/**
 * Stages from one figure to another, run over up to `chainRows` rows with columns of its own. Nothing is
 * allocated after it is made.
 */
export class StageChain {
  /** Figures that come from outside, in the order of `given`. */
  readonly reads: readonly string[];
  /** Columns of those figures. */
  readonly given: readonly Float64Array[];
  /** Column of the figure that is tried. */
  readonly trial = new Float64Array(chainRows);
  /** Column of the figure that is wanted. */
  readonly result: Float64Array;
  readonly cost: number;
  private readonly links: readonly Link[];

  /**
   * @param stages in the order of computation, each of which leads from `tried` to `wanted`
   * @param fixed  figures that are 0 in here
   */
  constructor(stages: readonly Stage[], tried: string, wanted: string, fixed: readonly string[] = []) {
    const columns = new Map<string, Float64Array>([[tried, this.trial]]);
    for (const figure of fixed) columns.set(figure, new Float64Array(chainRows));
    const reads: string[] = [];
    const columnOf = (figure: string): Float64Array => {
      const known = columns.get(figure);
      if (known !== undefined) return known;
      const column = new Float64Array(chainRows);
      columns.set(figure, column);
      reads.push(figure);
      return column;
    };
    this.links = stages.map(({ kernel, reads: read, writes }) => {
      const inputs = read.map(columnOf);
      const outputs = writes.map(() => new Float64Array(chainRows));
      writes.forEach((figure, k) => {
        if (figure !== null) columns.set(figure, outputs[k]);
      });
      return { kernel, inputs, outputs };
    });
    this.result = columnOf(wanted);
    this.reads = reads;
    this.given = reads.map((figure) => columnOf(figure));
    this.cost = stages.reduce((sum, stage) => sum + stage.cost, 0);
  }

  /** Takes row `row` of columns as given outside into row `place` of its own. */
  load(inputs: readonly Float64Array[], row: number, place: number): void {
    const { given } = this;
    for (let k = 0; k < given.length; k++) given[k][place] = inputs[k][row];
  }

  /** Moves the figures from outside of one row to another. */
  moveRow(from: number, to: number): void {
    const { given } = this;
    for (let k = 0; k < given.length; k++) given[k][to] = given[k][from];
  }

  /** Works rows 0 … count−1 through, from `trial` and `given` to `result`. */
  evaluate(count: number): void {
    const { links } = this;
    for (let k = 0; k < links.length; k++) links[k].kernel(count, links[k].inputs, links[k].outputs);
  }
}
