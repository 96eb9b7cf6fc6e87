import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  areaFromAspectRatio,
  areaFromRootChord,
  aspectRatio,
  equivalentRectangularSpan,
  leadingEdgeOfMac,
  meanAerodynamicChord,
  meanGeometricChord,
  rootChordFromArea,
  spanFromAspectRatio,
  spanFromAspectRatioAndRootChord,
  spanFromRootChord,
  spanwiseStationOfMac,
  sweepTangentAt,
} from '../../src/methods/planform.ts';
import { integrate } from './quadrature.ts';

const positive = (from: number, to: number) => fc.double({ min: from, max: to, noNaN: true });
const wing = fc.record({ span: positive(1, 40), taper: positive(0.05, 1.5), rootChord: positive(0.1, 5) });

describe('size of a trapezoid', () => {
  it('any two of area, span, aspect ratio and root chord give the others back', () => {
    fc.assert(
      fc.property(wing, ({ span, taper, rootChord }) => {
        const area = areaFromRootChord(rootChord, span, taper);
        const ratio = aspectRatio(span, area);
        expect(rootChordFromArea(area, span, taper)).toBeCloseTo(rootChord, 10);
        expect(spanFromRootChord(area, rootChord, taper)).toBeCloseTo(span, 10);
        expect(spanFromAspectRatio(area, ratio)).toBeCloseTo(span, 10);
        expect(spanFromAspectRatioAndRootChord(ratio, rootChord, taper)).toBeCloseTo(span, 10);
        expect(areaFromAspectRatio(span, ratio) / area).toBeCloseTo(1, 12);
        expect(meanGeometricChord(area, span) * span).toBeCloseTo(area, 8);
        expect(equivalentRectangularSpan(area, 2) * 2).toBeCloseTo(area, 8);
      }),
    );
  });

  it('a hand-worked wing', () => {
    // b 9.4 m, c_r 1.5 m, λ 0.62 by pocket calculator.
    expect(areaFromRootChord(1.5, 9.4, 0.62)).toBeCloseTo(11.421, 9);
    expect(meanAerodynamicChord(1.5, 0.62)).toBeCloseTo(1.237284, 6);
    expect(spanwiseStationOfMac(9.4, 0.62)).toBeCloseTo(2.166255, 6);
    expect(leadingEdgeOfMac(2.166255, 0.1)).toBeCloseTo(0.2166255, 9);
  });
});

describe('mean aerodynamic chord', () => {
  it('equals quadrature of the chord, and so does its station', () => {
    fc.assert(
      fc.property(wing, ({ span, taper, rootChord }) => {
        const half = span / 2;
        const chord = (y: number) => rootChord * (1 - ((1 - taper) * y) / half);
        const area = 2 * integrate(chord, 0, half);
        const mac = (2 / area) * integrate((y) => chord(y) ** 2, 0, half);
        const station = (2 / area) * integrate((y) => chord(y) * y, 0, half);
        expect(meanAerodynamicChord(rootChord, taper) / mac).toBeCloseTo(1, 9);
        expect(spanwiseStationOfMac(span, taper) / station).toBeCloseTo(1, 9);
        expect(areaFromRootChord(rootChord, span, taper) / area).toBeCloseTo(1, 9);
      }),
      { numRuns: 40 },
    );
  });

  it('scales with length, and lies between mean chord and root chord', () => {
    fc.assert(
      fc.property(wing, positive(0.1, 10), ({ rootChord, taper }, scale) => {
        const mac = meanAerodynamicChord(rootChord, taper);
        expect(meanAerodynamicChord(scale * rootChord, taper)).toBeCloseTo(scale * mac, 9);
        const mean = (rootChord * (1 + taper)) / 2;
        expect(mac).toBeGreaterThanOrEqual(mean * (1 - 1e-12));
      }),
    );
  });
});

describe('sweep at another chord fraction', () => {
  it('goes there and back, and agrees with the tip chord drawn out', () => {
    fc.assert(
      fc.property(wing, positive(-0.8, 0.8), ({ span, taper, rootChord }, leading) => {
        const ratio = aspectRatio(span, areaFromRootChord(rootChord, span, taper));
        const at = sweepTangentAt(leading, 0, 0.7, ratio, taper);
        // The 70 % point of the tip less that of the root, over the half span.
        const drawn = (leading * (span / 2) + 0.7 * rootChord * taper - 0.7 * rootChord) / (span / 2);
        expect(at).toBeCloseTo(drawn, 9);
        expect(sweepTangentAt(at, 0.7, 0, ratio, taper)).toBeCloseTo(leading, 9);
      }),
    );
  });
});
