import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  equivalentSweepTangent,
  equivalentTaper,
  panelFigure,
  panelFigureCount,
  panelLeadingEdgeTangent,
  panelPlanform,
  panelRootChordFromArea,
} from '../../src/methods/panel-planform.ts';
import {
  areaFromRootChord,
  leadingEdgeOfMac,
  meanAerodynamicChord,
  spanwiseStationOfMac,
  sweepTangentAt,
} from '../../src/methods/planform.ts';
import { integrate } from './quadrature.ts';

interface Panel {
  width: number;
  taper: number;
  tangent: number;
  dihedral: number;
}

function planform(rootChord: number, panels: readonly Panel[]): Float64Array {
  const column = (pick: (panel: Panel) => number) => Float64Array.from(panels, pick);
  const out = new Float64Array(panelFigureCount);
  panelPlanform(
    panels.length,
    rootChord,
    column((p) => p.width),
    column((p) => p.taper),
    column((p) => p.tangent),
    column((p) => p.dihedral),
    out,
  );
  return out;
}

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const panel = fc.record({
  width: number(0.2, 5),
  taper: number(0.2, 1.3),
  tangent: number(-0.5, 0.9),
  dihedral: number(-0.1, 0.3),
});
const wing = fc.record({
  rootChord: number(0.2, 3),
  panels: fc.array(panel, { minLength: 1, maxLength: 5 }),
});

function expectClose(actual: Float64Array, expected: Float64Array): void {
  for (let i = 0; i < panelFigureCount; i++) {
    expect(Math.abs(actual[i] - expected[i])).toBeLessThan(1e-9 * (1 + Math.abs(expected[i])));
  }
}

describe('panelPlanform', () => {
  it('a panel split in two changes nothing', () => {
    fc.assert(
      fc.property(wing, number(0.05, 0.95), fc.nat(4), ({ rootChord, panels }, share, pick) => {
        const at = pick % panels.length;
        const whole = panels[at];
        const taperInner = 1 + share * (whole.taper - 1);
        const inner = { ...whole, width: share * whole.width, taper: taperInner };
        const outer = { ...whole, width: (1 - share) * whole.width, taper: whole.taper / taperInner };
        const split = [...panels.slice(0, at), inner, outer, ...panels.slice(at + 1)];
        expectClose(planform(rootChord, split), planform(rootChord, panels));
      }),
    );
  });

  it('one panel is the trapezoid', () => {
    fc.assert(
      fc.property(number(0.2, 3), panel, (rootChord, one) => {
        const out = planform(rootChord, [one]);
        const span = 2 * one.width;
        const station = spanwiseStationOfMac(span, one.taper);
        expect(out[panelFigure.area]).toBeCloseTo(areaFromRootChord(rootChord, span, one.taper), 9);
        expect(out[panelFigure.meanAerodynamicChord]).toBeCloseTo(
          meanAerodynamicChord(rootChord, one.taper),
          9,
        );
        expect(out[panelFigure.spanwiseStationOfMac]).toBeCloseTo(station, 9);
        expect(out[panelFigure.leadingEdgeOfMac]).toBeCloseTo(leadingEdgeOfMac(station, one.tangent), 9);
        expect(out[panelFigure.heightOfMac]).toBeCloseTo(station * Math.tan(one.dihedral), 9);
        expect(out[panelFigure.tipChord]).toBeCloseTo(rootChord * one.taper, 12);
        expect(out[panelFigure.leadingEdgeOfTip]).toBeCloseTo(one.width * one.tangent, 12);
        expect(out[panelFigure.heightOfTip]).toBeCloseTo(one.width * Math.tan(one.dihedral), 12);
      }),
    );
  });

  it('the area-weighted means equal quadrature over the half span', () => {
    fc.assert(
      fc.property(wing, ({ rootChord, panels }) => {
        let area = 0;
        let mac = 0;
        let x = 0;
        let z = 0;
        let y0 = 0;
        let y = 0;
        let chord = rootChord;
        let le = 0;
        let height = 0;
        // Quadrature panel by panel, so that the kinks fall on its ends.
        for (const p of panels) {
          const [c0, x0, z0, yInner] = [chord, le, height, y0];
          const c = (eta: number) => c0 * (1 + (p.taper - 1) * eta);
          const w = p.width;
          area += w * integrate(c, 0, 1);
          mac += w * integrate((eta) => c(eta) ** 2, 0, 1);
          y += w * integrate((eta) => c(eta) * (yInner + eta * w), 0, 1);
          x += w * integrate((eta) => c(eta) * (x0 + p.tangent * eta * w), 0, 1);
          z += w * integrate((eta) => c(eta) * (z0 + Math.tan(p.dihedral) * eta * w), 0, 1);
          chord = c(1);
          le += p.tangent * w;
          height += Math.tan(p.dihedral) * w;
          y0 += w;
        }
        const out = planform(rootChord, panels);
        expect(out[panelFigure.area]).toBeCloseTo(2 * area, 8);
        expect(out[panelFigure.meanAerodynamicChord]).toBeCloseTo(mac / area, 8);
        expect(out[panelFigure.spanwiseStationOfMac]).toBeCloseTo(y / area, 8);
        expect(out[panelFigure.leadingEdgeOfMac]).toBeCloseTo(x / area, 8);
        expect(out[panelFigure.heightOfMac]).toBeCloseTo(z / area, 8);
      }),
      { numRuns: 40 },
    );
  });

  it('scales: lengths with the scale, area with its square, and dihedral leaves the plan alone', () => {
    fc.assert(
      fc.property(wing, number(0.1, 10), ({ rootChord, panels }, scale) => {
        const larger = panels.map((p) => ({ ...p, width: scale * p.width }));
        const base = planform(rootChord, panels);
        const expected = base.map((value, i) => value * scale ** (i === panelFigure.area ? 2 : 1));
        expectClose(planform(scale * rootChord, larger), expected);
        const flat = planform(
          rootChord,
          panels.map((p) => ({ ...p, dihedral: 0 })),
        );
        expect(flat[panelFigure.heightOfMac]).toBe(0);
        base[panelFigure.heightOfMac] = 0;
        base[panelFigure.heightOfTip] = 0;
        expectClose(flat, base);
      }),
    );
  });

  it('the semiperimeter of a rectangle is its span and one chord', () => {
    const out = planform(1.5, [{ width: 4, taper: 1, tangent: 0, dihedral: 0 }]);
    expect(out[panelFigure.semiperimeter]).toBeCloseTo(8 + 1.5, 12);
  });
});

describe('root chord and leading edge of panels', () => {
  it('the root chord found from the area gives that area', () => {
    fc.assert(
      fc.property(wing, ({ rootChord, panels }) => {
        const area = planform(rootChord, panels)[panelFigure.area];
        const widths = Float64Array.from(panels, (p) => p.width);
        const tapers = Float64Array.from(panels, (p) => p.taper);
        expect(panelRootChordFromArea(panels.length, area, widths, tapers)).toBeCloseTo(rootChord, 9);
      }),
    );
  });

  it('converts quarter-chord sweep like the whole-wing rule', () => {
    // One panel: A = 2 w · 2 / (c(1+λ)).
    const [chord, taper, width, tangent] = [1.7, 0.6, 4.2, 0.15];
    const ratio = (4 * width) / (chord * (1 + taper));
    expect(panelLeadingEdgeTangent(tangent, chord, taper, width)).toBeCloseTo(
      sweepTangentAt(tangent, 0.25, 0, ratio, taper),
      12,
    );
  });
});

describe('equivalent trapezoid', () => {
  it('gives one straight-tapered wing its own taper and sweep back', () => {
    fc.assert(
      fc.property(number(0.05, 0.99), number(-0.4, 0.9), (taper, leading) => {
        const [rootChord, span] = [1.3, 11];
        const area = areaFromRootChord(rootChord, span, taper);
        const mac = meanAerodynamicChord(rootChord, taper);
        const station = spanwiseStationOfMac(span, taper);
        expect(equivalentTaper(mac, span, area)).toBeCloseTo(taper, 6);
        const quarter = sweepTangentAt(leading, 0, 0.25, span ** 2 / area, taper);
        const found = equivalentSweepTangent(leadingEdgeOfMac(station, leading), mac, station, rootChord);
        expect(found).toBeCloseTo(quarter, 9);
      }),
    );
  });

  it('a wing that widens outward gets its mirror taper', () => {
    const span = 9;
    const area = areaFromRootChord(1, span, 1.25);
    expect(equivalentTaper(meanAerodynamicChord(1, 1.25), span, area)).toBeCloseTo(1 / 1.25, 9);
  });

  it('rectangle, triangle, and what lies outside', () => {
    expect(equivalentTaper(1, 6, 6)).toBe(1);
    expect(equivalentTaper(4, 6, 18)).toBe(0);
    expect(equivalentTaper(5, 6, 18)).toBe(0);
    expect(equivalentTaper(0.9999, 6, 6)).toBe(1);
  });
});
