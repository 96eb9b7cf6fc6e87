import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findRoot } from '../../src/methods/find-root.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('one root', () => {
  it('is found within the tolerance, whichever way the function runs and the ends are given', () => {
    fc.assert(
      fc.property(number(0.01, 2.99), number(-5, 5), fc.boolean(), fc.boolean(), (root, bend, up, turned) => {
        fc.pre(Math.abs(root) > 1e-6);
        const sign = up ? 1 : -1;
        const f = (x: number) => sign * (Math.exp(bend * x) * 2 * (x - root) + (x - root) ** 3);
        const [from, to] = turned ? [3, 0] : [0, 3];
        const found = findRoot(f, from, to, 1e-9);
        expect(found.kind).toBe('found');
        if (found.kind === 'found') {
          expect(Math.abs(found.root - root)).toBeLessThan(1.1e-9);
          expect(found.value).toBe(f(found.root));
        }
      }),
    );
  });
  it('a smooth function takes few evaluations beyond the grid', () => {
    const found = findRoot((x) => Math.cos(x) - x, 0, 1, 1e-10);
    expect(found.kind === 'found' && found.root).toBeCloseTo(0.7390851332151607, 10);
    expect(found.evaluations).toBeLessThan(9 + 8);
  });
  it('on a grid place or at an end it counts once', () => {
    expect(findRoot((x) => x, -1, 1, 1e-9)).toMatchObject({ kind: 'found', root: 0, value: 0 });
    expect(findRoot((x) => x - 1, 0, 1, 1e-9)).toMatchObject({ kind: 'found', root: 1 });
    expect(findRoot((x) => x, 0, 1, 1e-9)).toMatchObject({ kind: 'found', root: 0 });
  });
  it('flat ones and steep ones too', () => {
    const flat = findRoot((x) => (x - 0.37) ** 9, 0, 1, 1e-6);
    expect(flat.kind === 'found' && Math.abs(flat.root - 0.37)).toBeLessThan(1e-6);
    const steep = findRoot((x) => Math.tanh(1e6 * (x - 0.37)), 0, 1, 1e-12);
    expect(steep.kind === 'found' && Math.abs(steep.root - 0.37)).toBeLessThan(1e-11);
  });
});

describe('no root', () => {
  it('tells the nearest miss', () => {
    const found = findRoot((x) => 0.2 + (x - 0.5) ** 2, 0, 1, 1e-9, 4);
    expect(found).toMatchObject({ kind: 'none', nearest: 0.5, value: 0.2, jumps: 0, evaluations: 5 });
  });
  it('a pole and a step are not roots', () => {
    expect(findRoot((x) => 1 / (x - 0.37), 0, 1, 1e-9)).toMatchObject({ kind: 'none', jumps: 1 });
    expect(findRoot((x) => (x < 0.37 ? -1 : 2), 0, 1, 1e-9)).toMatchObject({ kind: 'none', jumps: 1 });
  });
  it('where the function can’t be computed it says so, and looks elsewhere', () => {
    expect(findRoot(() => Number.NaN, 0, 1, 1e-9, 3)).toEqual({ kind: 'not-computed', evaluations: 4 });
    const part = findRoot((x) => (x < 0.3 ? Number.NaN : x - 0.8), 0, 1, 1e-9);
    expect(part.kind === 'found' && part.root).toBeCloseTo(0.8, 8);
    const hole = (x: number) => (Math.abs(x - 0.5) < 0.3 ? Number.NaN : x - 0.5);
    expect(findRoot(hole, 0, 1, 1e-9).kind).toBe('none');
  });
});

describe('several roots', () => {
  it('are listed, ascending, from either end', () => {
    const f = (x: number) => (x - 0.1) * (x - 0.45) * (x - 0.9);
    for (const [from, to] of [
      [0, 1],
      [1, 0],
    ] as const) {
      const found = findRoot(f, from, to, 1e-10);
      expect(found.kind).toBe('several');
      if (found.kind !== 'several') return;
      expect(found.roots.map((root) => Number(root.toFixed(8)))).toEqual([0.1, 0.45, 0.9]);
    }
  });
});
