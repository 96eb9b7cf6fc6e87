import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitSplineGrid, splineAxis, splineWeights } from '../../src/methods/cubic-spline-grid.ts';
import {
  insideWingTable,
  tableAerodynamicCentre,
  tableCentreOfLift,
  tableLiftSlope,
  tableSpanEfficiency,
  wingTableRange,
} from '../../src/methods/wing-table.ts';
import {
  aerodynamicCentreValues,
  aspectRatioNodes,
  centreOfLiftValues,
  liftSlopeValues,
  spanEfficiencyValues,
  sweepNodesDegrees,
  taperNodes,
} from '../../src/methods/wing-table-data.ts';

const degree = Math.PI / 180;
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const inside = fc.tuple(number(4, 24), number(0.2, 1), number(-20 * degree, 40 * degree));

const quantities = [
  ['lift slope', tableLiftSlope, liftSlopeValues],
  ['aerodynamic centre', tableAerodynamicCentre, aerodynamicCentreValues],
  ['span efficiency', tableSpanEfficiency, spanEfficiencyValues],
  ['centre of lift', tableCentreOfLift, centreOfLiftValues],
] as const;

describe('wing table', () => {
  it.each(quantities)('%s passes through all 910 nodes', (_, at, values) => {
    expect(values).toHaveLength(910);
    let n = 0;
    let largest = 0;
    for (const a of aspectRatioNodes) {
      for (const taper of taperNodes) {
        for (const sweep of sweepNodesDegrees) {
          largest = Math.max(largest, Math.abs(at(a, taper, sweep * degree) - values[n++]));
        }
      }
    }
    expect(largest).toBeLessThan(1e-12);
  });

  it('holds the aerodynamic centre within 0.001 MAC when every other node is left out', () => {
    const everyOther = (count: number) => (i: number) => i % 2 === 0 || i === count - 1;
    const [keepA, keepT, keepS] = [10, 7, 13].map(everyOther);
    const axis = (nodes: readonly number[], keep: (i: number) => boolean, map: (x: number) => number) =>
      splineAxis(Float64Array.from(nodes.filter((_, i) => keep(i)).map(map)));
    const axes = [
      axis(aspectRatioNodes, keepA, Math.log),
      axis(taperNodes, keepT, Math.sqrt),
      axis(sweepNodesDegrees, keepS, (x) => x * degree),
    ];
    const node = (n: number) => [Math.floor(n / 91), Math.floor(n / 13) % 7, n % 13] as const;
    const kept = aerodynamicCentreValues.filter((_, n) => {
      const [i, j, k] = node(n);
      return keepA(i) && keepT(j) && keepS(k);
    });
    const coefficients = fitSplineGrid(axes, kept);
    const weights = new Float64Array(12);
    let largest = 0;
    let leftOut = 0;
    for (let n = 0; n < 910; n++) {
      const [i, j, k] = node(n);
      if (keepA(i) && keepT(j) && keepS(k)) continue;
      leftOut++;
      const place = [Math.log(aspectRatioNodes[i]), Math.sqrt(taperNodes[j]), sweepNodesDegrees[k] * degree];
      const first = axes.map((one, d) => splineWeights(one, place[d], weights, 4 * d));
      let sum = 0;
      for (let w = 0; w < 64; w++) {
        const [p, q, r] = [w >> 4, (w >> 2) & 3, w & 3];
        const index = ((first[0] + p) * axes[1].count + first[1] + q) * axes[2].count + first[2] + r;
        sum += weights[p] * weights[4 + q] * weights[8 + r] * coefficients[index];
      }
      largest = Math.max(largest, Math.abs(sum - aerodynamicCentreValues[n]));
    }
    expect(leftOut).toBe(910 - kept.length);
    expect(leftOut).toBeGreaterThan(700);
    expect(largest).toBeLessThan(0.001);
  });

  it('is continuous, across nodes too', () => {
    const step = 1e-7;
    fc.assert(
      fc.property(inside, fc.boolean(), ([a, taper, sweep], onNode) => {
        const at = onNode ? aspectRatioNodes[Math.floor(a) % aspectRatioNodes.length] : a;
        for (const [, value] of quantities) {
          const here = value(at, taper, sweep);
          expect(Math.abs(value(at + step, taper, sweep) - here)).toBeLessThan(1e-6);
          expect(Math.abs(value(at - step, taper, sweep) - here)).toBeLessThan(1e-6);
          expect(Math.abs(value(at, taper + step, sweep) - here)).toBeLessThan(1e-6);
          expect(Math.abs(value(at, taper, sweep + step) - here)).toBeLessThan(1e-6);
        }
      }),
    );
  });

  it('holds the edge outside, and says so', () => {
    expect(tableLiftSlope(2.5, 0.6, 0.1)).toBe(tableLiftSlope(4, 0.6, 0.1));
    expect(tableAerodynamicCentre(30, 0.1, 0.1)).toBe(tableAerodynamicCentre(24, 0.2, 0.1));
    expect(tableSpanEfficiency(9, 0.5, 1)).toBe(tableSpanEfficiency(9, 0.5, 40 * degree));
    expect(insideWingTable(2.5, 0.6, 0.1)).toBe(false);
    expect(insideWingTable(9, 0.19, 0.1)).toBe(false);
    expect(insideWingTable(9, 0.6, -0.4)).toBe(false);
    const { aspectRatio, taper, sweepQuarter } = wingTableRange;
    expect(insideWingTable(aspectRatio.from, taper.to, sweepQuarter.to)).toBe(true);
    expect(insideWingTable(aspectRatio.to, taper.from, sweepQuarter.from)).toBe(true);
  });

  it('lift slope grows with aspect ratio; the centre of lift moves outward with sweep', () => {
    fc.assert(
      fc.property(inside, ([a, taper, sweep]) => {
        fc.pre(a < 23.5 && sweep < 39 * degree);
        expect(tableLiftSlope(a + 0.5, taper, sweep)).toBeGreaterThan(tableLiftSlope(a, taper, sweep));
        expect(tableCentreOfLift(a, taper, sweep + degree)).toBeGreaterThan(
          tableCentreOfLift(a, taper, sweep),
        );
        expect(tableSpanEfficiency(a, taper, sweep)).toBeLessThan(1.001);
      }),
    );
  });
});

describe('spline grid', () => {
  it('gives back a cubic exactly, each axis in its own place', () => {
    const axes = [
      splineAxis(Float64Array.of(0, 1, 2, 4, 5)),
      splineAxis(Float64Array.of(-1, 0, 0.5, 2)),
      splineAxis(Float64Array.of(1, 2, 3, 4, 6, 7)),
    ];
    const cubic = (x: number, y: number, z: number) =>
      x ** 3 - 2 * x * y ** 2 + y ** 3 * z - 0.3 * z ** 3 + 5;
    const values = Array.from(axes[0].nodes).flatMap((x) =>
      Array.from(axes[1].nodes).flatMap((y) => Array.from(axes[2].nodes, (z) => cubic(x, y, z))),
    );
    const coefficients = fitSplineGrid(axes, values);
    fc.assert(
      fc.property(number(0, 5), number(-1, 2), number(1, 7), (x, y, z) => {
        const weights = new Float64Array(12);
        const first = [x, y, z].map((at, d) => splineWeights(axes[d], at, weights, 4 * d));
        let sum = 0;
        for (let w = 0; w < 64; w++) {
          const [p, q, r] = [w >> 4, (w >> 2) & 3, w & 3];
          const index = ((first[0] + p) * 4 + first[1] + q) * 6 + first[2] + r;
          sum += weights[p] * weights[4 + q] * weights[8 + r] * coefficients[index];
        }
        expect(Math.abs(sum - cubic(x, y, z))).toBeLessThan(1e-9);
      }),
    );
  });
});
