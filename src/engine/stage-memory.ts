import type { AxisSet } from '../plan/dependencies.ts';
import type { Stage } from '../stages/stage.ts';
import { rowMap } from './tile.ts';
import type { FigureSource, Tiles } from './tiles.ts';

/** Bytes that one stage may keep of what it worked out. */
const memoryPerStage = 4 * 1024 * 1024;

const notEvaluated = -1;

/**
 * One stage of one worker: gathers its inputs, runs its kernel and remembers the results under
 * the standing digits of its own axes. Memory is a direct-mapped table: where two settings
 * share a slot the later one replaces the earlier.
 */
export class StageMemory {
  /** Axes of the stage's own space, slowest first. */
  private readonly space: readonly number[];
  /** Entries of that space. */
  private readonly entries: number;
  /** Depends on all axes: nothing to remember, evaluated for the kept rows only. */
  private readonly perRow: boolean;
  private readonly ownPrefix: readonly number[];
  private readonly usesChunk: boolean;

  private readonly slotKeys: Float64Array;
  private readonly slots: Float64Array[][];
  private readonly sources: readonly FigureSource[];
  private readonly outputs: readonly (FigureSource | null)[];
  private readonly gathered: readonly Float64Array[];
  /** Row of the own space → entry of each input; null when they are the same. */
  private readonly inputMaps: readonly (Int32Array | null)[];
  private readonly inputs: Float64Array[];

  constructor(
    private readonly stage: Stage,
    axes: AxisSet,
    private readonly tiles: Tiles,
  ) {
    const { suffixStart, chunks } = tiles.shape;
    this.space = tiles.runningAxes(axes);
    this.entries = this.space.reduce((product, axis) => product * tiles.lengthInTile(axis), 1);
    this.ownPrefix = [...Array(suffixStart).keys()].filter((axis) => axes.has(axis));
    this.usesChunk = chunks > 1 && this.space.length > 0;
    this.perRow = this.space.length === tiles.allRunning().length && this.ownPrefix.length === suffixStart;

    const slotCount = this.slotCount();
    this.slotKeys = new Float64Array(slotCount).fill(notEvaluated);
    this.slots = new Array(slotCount);
    this.sources = stage.reads.map((name) => tiles.source(name));
    this.outputs = stage.writes.map((name) =>
      name === null ? null : tiles.declare(name, new Float64Array(0), this.space, this.perRow),
    );
    this.gathered = stage.reads.map(() => new Float64Array(this.perRow ? 0 : this.entries));
    this.inputMaps = this.sources.map((source) => this.mapFrom(source));
    this.inputs = [...this.gathered];
  }

  /** Evaluates the stage for the current tile, for kept rows where it depends on every axis. */
  evaluate(rows: Int32Array | null, count: number): void {
    if (this.perRow) this.evaluateRows(rows, count);
    else this.evaluateShared();
  }

  /** Evaluates the whole own space of the stage unless it is remembered. */
  evaluateShared(): void {
    const key = this.key();
    const slot = key % this.slotKeys.length;
    if (this.slotKeys[slot] !== key) {
      for (let k = 0; k < this.sources.length; k++) this.gatherShared(k);
      this.slots[slot] ??= this.newColumns();
      // A kernel that throws leaves the slot half written: it must not pass for its old setting.
      this.slotKeys[slot] = notEvaluated;
      this.stage.kernel(this.entries, this.inputs, this.slots[slot]);
      this.slotKeys[slot] = key;
    }
    this.publish(this.slots[slot]);
  }

  private evaluateRows(rows: Int32Array | null, count: number): void {
    const { tick, shape } = this.tiles;
    for (let k = 0; k < this.sources.length; k++) {
      this.inputs[k] = this.sources[k].forRows(rows, count, tick, shape.rows);
    }
    this.slots[0] ??= this.newColumns();
    this.stage.kernel(count, this.inputs, this.slots[0]);
    this.publish(this.slots[0]);
  }

  private gatherShared(k: number): void {
    const { values } = this.sources[k];
    const map = this.inputMaps[k];
    if (map === null) {
      this.inputs[k] = values;
      return;
    }
    const column = this.gathered[k];
    for (let row = 0; row < this.entries; row++) column[row] = values[map[row]];
  }

  private publish(columns: readonly Float64Array[]): void {
    for (let k = 0; k < this.outputs.length; k++) {
      const output = this.outputs[k];
      if (output !== null) output.values = columns[k];
    }
  }

  /** Number of the standing digits of the stage's own axes. */
  private key(): number {
    const { axes } = this.tiles.plan;
    let key = 0;
    for (const axis of this.ownPrefix) key = key * axes[axis].size + this.tiles.digits[axis];
    return this.usesChunk ? key * this.tiles.shape.chunks + this.tiles.chunk : key;
  }

  /**
   * Settings that come round again, as far as memory allows. Going through the combinations, a standing
   * axis that the stage does not depend on brings back the settings of its faster ones; those of its
   * slower axes are never met again. Keys are counted with the faster axes last, so that the settings of
   * one round fall into slots of their own.
   */
  private slotCount(): number {
    if (this.perRow) return 1;
    const { axes } = this.tiles.plan;
    const { suffixStart, chunks } = this.tiles.shape;
    const own = new Set(this.ownPrefix);
    let missed = false;
    let settings = 1;
    for (let axis = 0; axis < suffixStart; axis++) {
      if (!own.has(axis)) missed = true;
      else if (missed) settings *= axes[axis].size;
    }
    if (missed && this.usesChunk) settings *= chunks;
    const bytes = 8 * this.entries * Math.max(1, this.stage.writes.length);
    return Math.max(1, Math.min(settings, Math.floor(memoryPerStage / bytes)));
  }

  private mapFrom(source: FigureSource): Int32Array | null {
    if (source.space.length === this.space.length) return null;
    return rowMap(this.space, source.space, this.tiles.lengthInTile);
  }

  private newColumns(): Float64Array[] {
    return this.stage.writes.map(() => new Float64Array(this.entries));
  }
}
