import { sizeOutcomeIndex } from '../figures/size-outcomes.ts';
import { bracketedStep, parabolaVertex } from '../methods/bracketed-step.ts';
import type { StageChain } from './stage-chain.ts';
import { chainRows } from './stage-chain.ts';

/** Places tried first, ends included. */
const gridPoints = 9;
const last = gridPoints - 1;
const mostBrackets = last * chainRows;
/** A figure is at its value when it is this near, SI. */
const closeEnough = 1e-9;
/** A bracket this narrow, as a fraction of the range, holds its root to rounding. */
const narrowest = 1e-12;
/** A function that is continuous comes this near to nil in such a bracket, as a fraction of its change over the first one; one that jumps does not. */
const jumpShare = 1e-9;
/** Places tried where a figure turns short of its value. */
const turnAttempts = 4;
/** Bisection alone would need 40. */
const mostSteps = 100;

const outcomes = {
  solved: sizeOutcomeIndex('solved'),
  none: sizeOutcomeIndex('no solution between the ends'),
  several: sizeOutcomeIndex('several solutions; none taken'),
  noEffect: sizeOutcomeIndex('the chosen number has no effect on the figure'),
  partly: sizeOutcomeIndex('no solution found, and the figure cannot be worked out over part of the range'),
} as const;

/**
 * Finds for whole columns of rows the number at which a chain of stages gives a wanted value. Every row is
 * tried on an even grid; each change of sign is then closed in on, all rows side by side. A pair of roots
 * between two places of the grid shows no change of sign: where the figure turns short of its value a few
 * more places are tried. Nothing is allocated after it is made.
 */
export class ColumnRoots {
  private readonly grid = new Float64Array(gridPoints * chainRows);
  private readonly places: Float64Array;
  private readonly step: number;
  private readonly narrow: number;

  /** Roots found in each row of the block, and the latest of them. */
  private readonly found = new Int32Array(chainRows);
  private readonly root = new Float64Array(chainRows);
  /** Place of the grid about which the figure turns short of its value; 0 for none. */
  private readonly turn = new Int32Array(chainRows);

  // Three places about where a row turns, and the figure there.
  private readonly xa = new Float64Array(chainRows);
  private readonly fa = new Float64Array(chainRows);
  private readonly xb = new Float64Array(chainRows);
  private readonly fb = new Float64Array(chainRows);
  private readonly xc = new Float64Array(chainRows);
  private readonly fc = new Float64Array(chainRows);

  // Brackets of the block: row, latest place, opposite end, the place before, and the first change of the figure.
  private readonly row = new Int32Array(mostBrackets);
  private readonly x1 = new Float64Array(mostBrackets);
  private readonly f1 = new Float64Array(mostBrackets);
  private readonly x2 = new Float64Array(mostBrackets);
  private readonly f2 = new Float64Array(mostBrackets);
  private readonly x3 = new Float64Array(mostBrackets);
  private readonly f3 = new Float64Array(mostBrackets);
  private readonly change = new Float64Array(mostBrackets);
  private brackets = 0;

  constructor(
    private readonly chain: StageChain,
    private readonly value: number,
    from: number,
    to: number,
  ) {
    this.step = (to - from) / last;
    this.narrow = narrowest * (to - from);
    this.places = Float64Array.from({ length: gridPoints }, (_, i) =>
      i === last ? to : from + this.step * i,
    );
  }

  /** Writes the number chosen, NaN where there is not exactly one, and what came of it. */
  solve(count: number, inputs: readonly Float64Array[], chosen: Float64Array, outcome: Float64Array): void {
    for (let first = 0; first < count; first += chainRows) {
      const rows = Math.min(chainRows, count - first);
      this.tryGrid(inputs, first, rows);
      this.brackets = 0;
      let turns = 0;
      for (let k = 0; k < rows; k++) {
        this.scan(k);
        if (this.turn[k] > 0) turns++;
      }
      if (turns > 0) this.tryTurns(rows);
      this.closeIn(inputs, first);
      for (let k = 0; k < rows; k++) {
        outcome[first + k] = this.outcomeOf(k);
        chosen[first + k] = this.found[k] === 1 ? this.root[k] : Number.NaN;
      }
    }
  }

  /** Figure minus wanted value of every row at every place of the grid. */
  private tryGrid(inputs: readonly Float64Array[], first: number, rows: number): void {
    const { chain, grid, value, places } = this;
    for (let k = 0; k < rows; k++) chain.load(inputs, first + k, k);
    for (let i = 0; i < gridPoints; i++) {
      chain.trial.fill(places[i], 0, rows);
      chain.evaluate(rows);
      for (let k = 0; k < rows; k++) grid[i * chainRows + k] = chain.result[k] - value;
    }
  }

  private at(i: number, k: number): number {
    return i < 0 || i > last ? Number.NaN : this.grid[i * chainRows + k];
  }

  /** Lists a row's changes of sign; notes where it turns short of its value. */
  private scan(k: number): void {
    this.found[k] = 0;
    this.turn[k] = 0;
    for (let i = 0; i <= last; i++) {
      const f = this.at(i, k);
      if (Math.abs(f) <= closeEnough) {
        this.take(k, this.places[i]);
        continue;
      }
      const before = this.at(i - 1, k);
      const changes = f > 0 ? before < -closeEnough : before > closeEnough;
      if (changes) this.addBracket(i, k);
      else if (this.turnsShort(before, f, this.at(i + 1, k))) this.turn[k] = i;
    }
  }

  private turnsShort(before: number, f: number, after: number): boolean {
    if (f > 0) return before > f && after > f;
    return before < f && after < f;
  }

  private take(k: number, root: number): void {
    this.found[k]++;
    this.root[k] = root;
  }

  /** A change of sign between places i−1 and i of the grid. */
  private addBracket(i: number, k: number): void {
    const beyond = this.at(i + 1, k);
    const upward = !Number.isNaN(beyond);
    const [latest, opposite, before] = upward ? [i, i - 1, i + 1] : [i - 1, i, i - 2];
    const { places } = this;
    this.put(
      k,
      places[latest],
      this.at(latest, k),
      places[opposite],
      this.at(opposite, k),
      before < 0 ? Number.NaN : places[before],
      this.at(before, k),
    );
  }

  private put(k: number, x1: number, f1: number, x2: number, f2: number, x3: number, f3: number): void {
    const b = this.brackets++;
    this.row[b] = k;
    this.x1[b] = x1;
    this.f1[b] = f1;
    this.x2[b] = x2;
    this.f2[b] = f2;
    this.x3[b] = x3;
    this.f3[b] = f3;
    this.change[b] = Math.abs(f1 - f2);
  }

  /** Follows a figure that turns short of its value to where it turns, and lists the two roots if it passes the value there. */
  private tryTurns(rows: number): void {
    const { chain, turn, xa, fa, xb, fb, xc, fc } = this;
    for (let k = 0; k < rows; k++) {
      const i = turn[k];
      if (i > 0) this.startTurn(i, k);
    }
    for (let attempt = 0; attempt < turnAttempts; attempt++) {
      let open = 0;
      for (let k = 0; k < rows; k++) {
        const vertex = turn[k] > 0 ? parabolaVertex(xa[k], fa[k], xb[k], fb[k], xc[k], fc[k]) : Number.NaN;
        if (vertex > xa[k] && vertex < xc[k] && vertex !== xb[k]) open++;
        else turn[k] = 0;
        chain.trial[k] = turn[k] > 0 ? vertex : this.places[0];
      }
      if (open === 0) return;
      chain.evaluate(rows);
      for (let k = 0; k < rows; k++)
        if (turn[k] > 0) this.followTurn(k, chain.trial[k], chain.result[k] - this.value);
    }
  }

  private startTurn(i: number, k: number): void {
    const { places } = this;
    this.xa[k] = places[i - 1];
    this.fa[k] = this.at(i - 1, k);
    this.xb[k] = places[i];
    this.fb[k] = this.at(i, k);
    this.xc[k] = places[i + 1];
    this.fc[k] = this.at(i + 1, k);
  }

  /** Takes one more place of a row that turns: a root on either side if the figure is past its value there. */
  private followTurn(k: number, x: number, f: number): void {
    const { xa, fa, xb, fb, xc, fc } = this;
    if (Math.abs(f) <= closeEnough) {
      this.take(k, x);
      this.turn[k] = 0;
    } else if (Number.isNaN(f)) {
      this.turn[k] = 0;
    } else if (f > 0 !== fb[k] > 0) {
      this.put(k, x, f, xa[k], fa[k], Number.NaN, Number.NaN);
      this.put(k, x, f, xc[k], fc[k], Number.NaN, Number.NaN);
      this.turn[k] = 0;
    } else if (Math.abs(f) < Math.abs(fb[k])) {
      this.narrowTurn(k, xb[k], fb[k], xb[k] > x);
      xb[k] = x;
      fb[k] = f;
    } else this.narrowTurn(k, x, f, x > xb[k]);
  }

  private narrowTurn(k: number, x: number, f: number, fromAbove: boolean): void {
    if (fromAbove) {
      this.xc[k] = x;
      this.fc[k] = f;
    } else {
      this.xa[k] = x;
      this.fa[k] = f;
    }
  }

  /** Closes in on the roots of all brackets, as many at a time as the chain takes. */
  private closeIn(inputs: readonly Float64Array[], first: number): void {
    for (let start = 0; start < this.brackets; start += chainRows) {
      const count = Math.min(chainRows, this.brackets - start);
      for (let k = 0; k < count; k++) this.chain.load(inputs, first + this.row[start + k], k);
      this.closeInFrom(start, count);
    }
  }

  private closeInFrom(start: number, count: number): void {
    const { chain, value, narrow, row, x1, f1, x2, f2, x3, f3 } = this;
    let open = count;
    for (let step = 0; step < mostSteps && open > 0; step++) {
      // Choose the next place of every open bracket.
      for (let k = 0; k < open; k++) {
        const b = start + k;
        const width = x2[b] - x1[b];
        const least = Math.min(1 / 2, narrow / 2 / Math.abs(width));
        const share = bracketedStep(x1[b], f1[b], x2[b], f2[b], x3[b], f3[b]);
        chain.trial[k] = x1[b] + Math.min(1 - least, Math.max(least, share)) * width;
      }
      chain.evaluate(open);
      // Narrow every bracket; those that are done make room for the others.
      let kept = 0;
      for (let k = 0; k < open; k++) {
        const b = start + k;
        const x = chain.trial[k];
        const f = chain.result[k] - value;
        if (f > 0 === f1[b] > 0) {
          x3[b] = x1[b];
          f3[b] = f1[b];
        } else {
          x3[b] = x2[b];
          f3[b] = f2[b];
          x2[b] = x1[b];
          f2[b] = f1[b];
        }
        x1[b] = x;
        f1[b] = f;
        if (Number.isNaN(f)) continue;
        if (Math.abs(f) <= closeEnough) this.take(row[b], x);
        else if (Math.abs(x2[b] - x) <= narrow) this.settle(b);
        else {
          if (kept < k) {
            this.moveBracket(b, start + kept);
            chain.moveRow(k, kept);
          }
          kept++;
        }
      }
      open = kept;
    }
    for (let k = 0; k < open; k++) this.settle(start + k);
  }

  /** Takes what is left of a bracket as a root, unless the figure jumps over its value there. */
  private settle(b: number): void {
    const latest = Math.abs(this.f1[b]) <= Math.abs(this.f2[b]);
    const x = latest ? this.x1[b] : this.x2[b];
    const f = latest ? this.f1[b] : this.f2[b];
    if (Math.abs(f) <= closeEnough + jumpShare * this.change[b]) this.take(this.row[b], x);
  }

  private moveBracket(from: number, to: number): void {
    this.row[to] = this.row[from];
    this.x1[to] = this.x1[from];
    this.f1[to] = this.f1[from];
    this.x2[to] = this.x2[from];
    this.f2[to] = this.f2[from];
    this.x3[to] = this.x3[from];
    this.f3[to] = this.f3[from];
    this.change[to] = this.change[from];
  }

  private outcomeOf(k: number): number {
    let constant = true;
    let gaps = false;
    for (let i = 0; i <= last; i++) {
      const f = this.at(i, k);
      if (Number.isNaN(f)) gaps = true;
      if (f !== this.at(0, k)) constant = false;
    }
    if (constant) {
      this.found[k] = 0;
      return outcomes.noEffect;
    }
    if (this.found[k] === 1) return outcomes.solved;
    if (this.found[k] > 1) return outcomes.several;
    return gaps ? outcomes.partly : outcomes.none;
  }
}
