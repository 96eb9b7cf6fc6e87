import { describe, expect, it } from 'vitest';
import { tableSpanEfficiency } from '../../src/methods/wing-table.ts';
import { liftingLine, tapered } from './lifting-line.ts';

/** Hoerner's curve of induced drag against taper, as fitted by Nita & Scholz (2012), from memory: lifting line. */
function bestTaper(efficiency: (taper: number) => number): number {
  let best = 0.2;
  for (let taper = 0.2; taper <= 1; taper += 0.01) if (efficiency(taper) > efficiency(best)) best = taper;
  return best;
}
const byLine = (a: number) => bestTaper((taper) => -liftingLine(a, tapered(a, taper)).delta);
const byTable = (a: number) => bestTaper((taper) => tableSpanEfficiency(a, taper, 0));

describe('induced drag of straight wings', () => {
  it.each([
    [0.4, 0.00194544],
    [1, 0.0096],
  ])('lifting line, aspect ratio 10, taper %f: δ/A %f', (taper, value) => {
    expect(Math.abs(liftingLine(10, tapered(10, taper)).delta / 10 - value)).toBeLessThan(0.0012);
  });

  it('is least near taper 0.36 by the lifting line, aspect ratio 8', () => {
    expect(Math.abs(byLine(8) - 0.36)).toBeLessThanOrEqual(0.03);
  });

  it('by the lifting-surface table, at more taper the shorter the wing, and like the line for a long one', () => {
    expect(byTable(8)).toBeGreaterThan(byTable(12));
    expect(byTable(12)).toBeGreaterThan(byTable(24));
    expect(Math.abs(byTable(24) - 0.36)).toBeLessThanOrEqual(0.03);
  });
});
