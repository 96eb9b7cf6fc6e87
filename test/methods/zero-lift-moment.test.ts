import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { panelFigure, panelFigureCount, panelPlanform } from '../../src/methods/panel-planform.ts';
import { sweepTangentAt } from '../../src/methods/planform.ts';
import {
  bodyZeroLiftMoment,
  coupleFigure,
  coupleFigureCount,
  panelCouples,
  washoutMoment,
} from '../../src/methods/zero-lift-moment.ts';
import { integrate } from './quadrature.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const panel = fc.record({
  width: number(0.5, 5),
  taper: number(0.3, 1.1),
  tangent: number(-0.4, 0.6),
  moment: number(-0.12, 0.02),
  twist: number(-0.08, 0.02),
});
const wing = fc.record({ root: number(0.5, 2.5), panels: fc.array(panel, { minLength: 1, maxLength: 4 }) });
type Wing = typeof wing extends fc.Arbitrary<infer T> ? T : never;

function couples({ root, panels }: Wing, moments: number[], twists: number[], slope = 4.7) {
  const out = new Float64Array(coupleFigureCount);
  const field = (key: 'width' | 'taper' | 'tangent') => Float64Array.from(panels, (p) => p[key]);
  panelCouples(
    panels.length,
    root,
    field('width'),
    field('taper'),
    field('tangent'),
    Float64Array.from(moments),
    Float64Array.from(twists),
    slope,
    out,
  );
  return out;
}
const tips = ({ panels }: Wing, key: 'moment' | 'twist', root: number) => [
  root,
  ...panels.map((p) => p[key]),
];

describe('wing', () => {
  it('one section all along: the wing has the section’s moment', () => {
    fc.assert(
      fc.property(wing, (w) => {
        const even = new Array(w.panels.length + 1).fill(-0.047);
        const none = new Array(w.panels.length + 1).fill(0);
        const out = couples(w, even, none);
        expect(out[coupleFigure.sections]).toBeCloseTo(-0.047, 12);
        expect(out[coupleFigure.twist]).toBeCloseTo(0, 12);
      }),
    );
  });

  it('equals quadrature strip by strip', () => {
    fc.assert(
      fc.property(wing, (w) => {
        const moments = tips(w, 'moment', -0.05);
        const twists = tips(w, 'twist', 0);
        const out = couples(w, moments, twists);
        const planform = new Float64Array(panelFigureCount);
        panelPlanform(
          w.panels.length,
          w.root,
          Float64Array.from(w.panels, (p) => p.width),
          Float64Array.from(w.panels, (p) => p.taper),
          Float64Array.from(w.panels, (p) => p.tangent),
          new Float64Array(w.panels.length),
          planform,
        );
        const strips = w.panels.map((p, i) => {
          const inner = w.panels.slice(0, i);
          const chord = inner.reduce((c, q) => c * q.taper, w.root);
          const edge = inner.reduce((x, q) => x + q.width * q.tangent, 0);
          const along = (from: number, to: number) => (t: number) => from + (to - from) * t;
          const c = along(chord, chord * p.taper);
          const x = (t: number) => along(edge, edge + p.width * p.tangent)(t) + c(t) / 4;
          return {
            width: p.width,
            c,
            x,
            m: along(moments[i], moments[i + 1]),
            e: along(twists[i], twists[i + 1]),
          };
        });
        type Strip = (typeof strips)[number];
        const over = (f: (s: Strip, t: number) => number) =>
          strips.reduce((sum, s) => sum + s.width * integrate((t) => f(s, t), 0, 1), 0);
        const [area, mac] = [planform[panelFigure.area], planform[panelFigure.meanAerodynamicChord]];
        const scale = 2 / (area * mac);
        expect(out[coupleFigure.sections]).toBeCloseTo(scale * over((s, t) => s.m(t) * s.c(t) ** 2), 8);
        const mean = (2 / area) * over((s, t) => s.e(t) * s.c(t));
        expect(out[coupleFigure.meanTwist]).toBeCloseTo(mean, 8);
        const twist = -scale * 4.7 * over((s, t) => s.c(t) * (s.e(t) - mean) * s.x(t));
        expect(out[coupleFigure.twist]).toBeCloseTo(twist, 7);
      }),
    );
  });

  it('a panel split in two changes nothing', () => {
    const whole: Wing = {
      root: 1.5,
      panels: [{ width: 4, taper: 0.6, tangent: 0.2, moment: -0.03, twist: -0.05 }],
    };
    const half = (1 + 0.6) / 2;
    const split: Wing = {
      root: 1.5,
      panels: [
        { width: 2, taper: half, tangent: 0.2, moment: -0.045, twist: -0.025 },
        { width: 2, taper: 0.6 / half, tangent: 0.2, moment: -0.03, twist: -0.05 },
      ],
    };
    const one = couples(whole, tips(whole, 'moment', -0.06), tips(whole, 'twist', 0));
    const two = couples(split, tips(split, 'moment', -0.06), tips(split, 'twist', 0));
    for (const at of Object.values(coupleFigure)) expect(two[at]).toBeCloseTo(one[at], 12);
  });

  it('washout on a straight-tapered wing: the closed form, nose-up when swept aft', () => {
    fc.assert(
      fc.property(
        number(0.2, 1),
        number(4, 20),
        number(-0.3, 0.7),
        number(0.005, 0.1),
        (taper, a, quarter, w) => {
          const root = 1.3;
          const semi = (root * a * (1 + taper)) / 4;
          const tangent = sweepTangentAt(quarter, 0.25, 0, a, taper);
          const one: Wing = { root, panels: [{ width: semi, taper, tangent, moment: 0, twist: -w }] };
          const out = couples(one, [0, 0], [0, -w], 4.4);
          const closed = washoutMoment(4.4, w, quarter, a, taper);
          expect(out[coupleFigure.twist]).toBeCloseTo(closed, 10);
          if (Math.abs(quarter) > 1e-6) expect(Math.sign(closed)).toBe(Math.sign(quarter));
        },
      ),
    );
  });
});

describe('body', () => {
  it('a cylinder by hand: (π/2)(k2 − k1) w² L (α_0 + i)/(S c)', () => {
    const at = (angle: number, camber: number) =>
      bodyZeroLiftMoment(
        3,
        new Float64Array([0.3, 2, 5.3]),
        new Float64Array([1.1, 1.1, 1.1]),
        new Float64Array([camber, camber, camber]),
        angle,
        0.86,
        12,
        1.3,
      );
    // π/2 · 0.86 · 1.21 · 5 · (−0.06)/15.6.
    expect(at(-0.06, 0)).toBeCloseTo(-0.0314338, 6);
    expect(at(-0.04, -0.02)).toBeCloseTo(at(-0.06, 0), 12);
  });
  it('equals quadrature for widths and camber linear between stations', () => {
    fc.assert(
      fc.property(
        number(0.1, 1),
        number(0.1, 1.5),
        number(-0.1, 0.05),
        number(-0.1, 0.05),
        (w0, w1, i0, i1) => {
          const value = bodyZeroLiftMoment(
            2,
            new Float64Array([1, 4]),
            new Float64Array([w0, w1]),
            new Float64Array([i0, i1]),
            -0.05,
            0.9,
            11,
            1.2,
          );
          const along = (a: number, b: number, x: number) => a + ((b - a) * (x - 1)) / 3;
          const sum = integrate((x) => along(w0, w1, x) ** 2 * (along(i0, i1, x) - 0.05), 1, 4);
          expect(value).toBeCloseTo(((Math.PI / 2) * 0.9 * sum) / (11 * 1.2), 10);
        },
      ),
    );
  });
});
