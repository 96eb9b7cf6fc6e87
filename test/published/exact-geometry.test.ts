import { describe, expect, it } from 'vitest';
import { panelFigure, panelFigureCount, panelPlanform } from '../../src/methods/panel-planform.ts';

/** Exact integrals of two wings; the numbers are closed forms (ellipse) and quadrature (three panels). */

/** Planform of straight panels through (y, leading edge, chord) of each break, root first. */
function throughBreaks(breaks: readonly (readonly [number, number, number])[]): Float64Array {
  const count = breaks.length - 1;
  const widths = new Float64Array(count);
  const tapers = new Float64Array(count);
  const tangents = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const [y0, x0, c0] = breaks[i];
    const [y1, x1, c1] = breaks[i + 1];
    widths[i] = y1 - y0;
    tapers[i] = c1 / c0;
    tangents[i] = (x1 - x0) / (y1 - y0);
  }
  const out = new Float64Array(panelFigureCount);
  panelPlanform(count, breaks[0][2], widths, tapers, tangents, new Float64Array(count), out);
  return out;
}

describe('elliptic wing, drawn with 4000 panels', () => {
  // c = c_r √(1 − η²): MAC/c_r = 8/(3π), y/(b/2) = 4/(3π). Exact integrals.
  const count = 4000;
  const breaks = Array.from({ length: count + 1 }, (_, i) => {
    const phi = (i / count) * (Math.PI / 2);
    return [Math.sin(phi), 0, i === count ? 0 : Math.cos(phi)] as const;
  });
  const out = throughBreaks(breaks);

  it('mean aerodynamic chord 0.84883 root chords', () => {
    expect(Math.abs(out[panelFigure.meanAerodynamicChord] - 0.8488263631567752)).toBeLessThan(1e-5);
  });
  it('station 0.42441 semi-spans', () => {
    expect(Math.abs(out[panelFigure.spanwiseStationOfMac] - 0.4244131815783876)).toBeLessThan(1e-5);
  });
});

describe('three-panel wing, closed form against quadrature', () => {
  const out = throughBreaks([
    [0, 0, 1.2],
    [3, 0, 1.2],
    [5, 0.15, 0.7],
    [7.5, 0.4, 0.35],
  ]);
  it.each([
    ['mean aerodynamic chord', panelFigure.meanAerodynamicChord, 1.0100917431192928],
    ['its leading edge', panelFigure.leadingEdgeOfMac, 0.06938837920488189],
    ['its station', panelFigure.spanwiseStationOfMac, 3.0611620795105736],
  ])('%s', (_, figure, value) => {
    expect(Math.abs(out[figure] - value)).toBeLessThan(1e-6);
  });
});
