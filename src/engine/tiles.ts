import type { AxisSet } from '../plan/dependencies.ts';
import type { Plan } from '../plan/plan.ts';
import type { TileShape } from './tile.ts';
import { rowMap, tileShape } from './tile.ts';

/**
 * Where the values of one figure lie for the current tile. The space of a figure is spanned by
 * those of its axes that run inside the tile.
 */
export class FigureSource {
  /** Values over the figure's own space, or one per kept row when `compact`. */
  values: Float64Array;
  /** The figure for the kept rows, gathered once for all stages that read it. */
  private gathered = new Float64Array(0);
  /** For which rows `gathered` stands; of a figure that stands still, how far it is filled and with what. */
  private gatheredAt = -1;
  private filled = 0;
  private filledWith = Number.NaN;

  constructor(
    values: Float64Array,
    /** Axes of the space, slowest first. */
    readonly space: readonly number[],
    /** Row of the tile → entry of `values`; null when they are the same. */
    readonly map: Int32Array | null,
    /** True when `values` holds kept rows rather than the figure's space. */
    readonly compact: boolean,
  ) {
    this.values = values;
  }

  /**
   * The figure for the kept rows, not to be written; valid until the rows change.
   * @param rows kept rows of the tile, all of them when null
   * @param tick number of this choice of rows
   * @param most rows of a full tile
   */
  forRows(rows: Int32Array | null, count: number, tick: number, most: number): Float64Array {
    if (this.compact || (this.map === null && rows === null)) return this.values;
    if (this.gatheredAt === tick) return this.gathered;
    if (this.gathered.length === 0) this.gathered = new Float64Array(most);
    if (this.space.length === 0) this.fill(count);
    else this.copyRows(rows, count, this.gathered, 0);
    this.gatheredAt = tick;
    return this.gathered;
  }

  /** Fills the gathered column of a figure that stands still, as far as it is not filled with that value already. */
  private fill(count: number): void {
    const value = this.values[0];
    if (Object.is(value, this.filledWith) && count <= this.filled) return;
    this.gathered.fill(value, 0, count);
    this.filled = count;
    this.filledWith = value;
  }

  /** Copies the figure for the kept rows (all rows of the tile when null) into a column. */
  copyRows(rows: Int32Array | null, count: number, column: Float64Array, offset: number): void {
    const { values, map } = this;
    if (this.space.length === 0 && !this.compact) {
      column.fill(values[0], offset, offset + count);
    } else if (this.compact || (map === null && rows === null)) {
      for (let row = 0; row < count; row++) column[offset + row] = values[row];
    } else if (map === null) {
      const kept = rows as Int32Array;
      for (let row = 0; row < count; row++) column[offset + row] = values[kept[row]];
    } else if (rows === null) {
      for (let row = 0; row < count; row++) column[offset + row] = values[map[row]];
    } else {
      for (let row = 0; row < count; row++) column[offset + row] = values[map[rows[row]]];
    }
  }
}

/** The current tile of a plan: which digits stand, and where every figure's values are. */
export class Tiles {
  readonly shape: TileShape;
  /** Positions of the prefix axes, slowest first. */
  readonly digits: Int32Array;
  chunk = 0;
  /** Number of the present choice of rows. */
  tick = 0;
  private prefix = -1;
  private readonly sources = new Map<string, FigureSource>();
  private readonly standing: {
    readonly values: Float64Array;
    readonly axis: number;
    readonly source: FigureSource;
  }[] = [];
  private readonly cut: { readonly values: Float64Array; readonly source: FigureSource }[] = [];

  constructor(
    readonly plan: Plan,
    tileRows?: number,
  ) {
    this.shape = tileShape(plan, tileRows);
    this.digits = new Int32Array(this.shape.suffixStart);
    for (const [name, value] of plan.fixed) this.declare(name, Float64Array.of(value), []);
    plan.axes.forEach((axis, position) => {
      axis.figures.forEach((name, k) => {
        this.declareAxis(name, axis.values[k], position);
      });
    });
  }

  /** Axes among `axes` that run inside the tile, slowest first. */
  runningAxes(axes: AxisSet): number[] {
    return this.allRunning().filter((axis) => axes.has(axis));
  }

  /** Length of an axis inside a tile. */
  readonly lengthInTile = (axis: number): number =>
    this.shape.chunks === 1 ? this.plan.axes[axis].size : this.shape.rows;

  /** Every axis that runs inside the tile, slowest first. */
  allRunning(): number[] {
    return [...this.plan.axes.keys()].slice(this.shape.suffixStart);
  }

  declare(name: string, values: Float64Array, space: readonly number[], compact = false): FigureSource {
    const all = this.allRunning();
    const whole = space.length === all.length;
    const map = whole ? null : rowMap(all, space, this.lengthInTile);
    const source = new FigureSource(values, space, map, compact);
    this.sources.set(name, source);
    return source;
  }

  source(name: string): FigureSource {
    const source = this.sources.get(name);
    if (source === undefined) throw new Error(`no stage writes the figure ${name}`);
    return source;
  }

  /** Sets the standing digits and, where the fastest axis is cut, the window on its values. */
  moveTo(prefix: number, chunk: number): void {
    const { axes } = this.plan;
    if (prefix !== this.prefix) {
      this.prefix = prefix;
      let rest = prefix;
      for (let axis = this.digits.length - 1; axis >= 0; axis--) {
        const { size } = axes[axis];
        this.digits[axis] = rest % size;
        rest = Math.floor(rest / size);
      }
      for (const { values, axis, source } of this.standing) source.values[0] = values[this.digits[axis]];
    }
    this.chunk = chunk;
    for (const { values, source } of this.cut) copyWindow(values, chunk * this.shape.rows, source.values);
  }

  private declareAxis(name: string, values: Float64Array, axis: number): void {
    if (axis < this.shape.suffixStart) {
      this.standing.push({ values, axis, source: this.declare(name, new Float64Array(1), []) });
    } else if (this.shape.chunks > 1) {
      this.cut.push({ values, source: this.declare(name, new Float64Array(this.shape.rows), [axis]) });
    } else {
      this.declare(name, values, [axis]);
    }
  }
}

/** Fills `window` from `start` on; past the end it repeats the last value, whose rows are never kept. */
function copyWindow(values: Float64Array, start: number, window: Float64Array): void {
  const available = Math.min(window.length, values.length - start);
  window.set(values.subarray(start, start + available));
  window.fill(values[values.length - 1], available);
}
