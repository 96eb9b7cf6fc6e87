import { createRequire } from 'node:module';
import { Resvg } from '@resvg/resvg-js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { carpetShift, widestOpening } from '../../src/charts/carpet-plot.ts';
import { stackedBars } from '../../src/charts/neutral-point-build-up.ts';
import { bothSides, planFrame, scaleBarLength } from '../../src/charts/plan-view.ts';
import { smallestFittingTail } from '../../src/charts/tail-sizing.ts';
import {
  cleanText,
  countText,
  ellipsize,
  numberText,
  textWidth,
  wrapText,
} from '../../src/charts/text-width.ts';
import { weight } from '../../src/charts/theme.ts';
import { buildUp, outline } from './samples.ts';

describe('plan view', () => {
  it('has one scale across and along, whatever the shape of the room', () => {
    const size = fc.double({ min: 50, max: 900, noNaN: true });
    const span = fc.double({ min: 0.5, max: 30, noNaN: true });
    fc.assert(
      fc.property(size, size, span, (width, height, b) => {
        const frame = planFrame([outline(0, b, true)], { width, height });
        const across = frame.width / (frame.x.to - frame.x.from);
        const along = frame.height / (frame.y.from - frame.y.to);
        expect(across / along).toBeCloseTo(1, 9);
        expect(across).toBeCloseTo(frame.perUnit, 9);
        expect(frame.width).toBeLessThanOrEqual(width + 1e-6);
        expect(frame.height).toBeLessThanOrEqual(height + 1e-6);
      }),
    );
  });

  it('has its nose up and its two sides alike', () => {
    const frame = planFrame([outline(0, 9.4, true)], { width: 300, height: 300 });
    expect(frame.y.to).toBeLessThan(0.2);
    expect(frame.y.from).toBeGreaterThan(7.4);
    const shape = bothSides(outline(0, 9.4, true).wing);
    expect(shape.map(({ x }) => x).reduce((a, b) => a + b)).toBeCloseTo(0, 12);
    expect(Math.max(...shape.map(({ x }) => x))).toBe(4.7);
    expect(Math.min(...shape.map(({ x }) => x))).toBe(-4.7);
  });

  it.each([
    [30, 2],
    [100, 0.5],
    [7, 10],
    [450, 0.2],
  ])('%d px a metre: scale bar of %d m', (perUnit, length) => {
    expect(scaleBarLength(perUnit)).toBe(length);
  });
});

describe('smallest tail that fits', () => {
  const sizes = [0.2, 0.4, 0.6];
  const aft = { label: 'aft', cg: [20, 40, 60], forbidden: 'aft' as const };
  const tooStable = { label: 'too stable', cg: [5, 25, 45], forbidden: 'forward' as const };
  it('is where the aft limit meets the aft CG', () => {
    const loading = { forward: 24, aft: 33 };
    expect(smallestFittingTail({ sizes, limits: [aft, tooStable], loading })).toBeCloseTo(0.33, 12);
  });
  it('is none when the range is wider than the band', () => {
    const loading = { forward: 10, aft: 33 };
    expect(smallestFittingTail({ sizes, limits: [aft, tooStable], loading })).toBeNull();
  });
  it('obeys a limit that moves forward as the tail grows', () => {
    const stall = { label: 'stall', cg: [40, 30, 20], forbidden: 'forward' as const };
    // Forward limit 24 at size 0.52; the aft limit alone would allow 0.33.
    expect(
      smallestFittingTail({ sizes, limits: [aft, stall], loading: { forward: 24, aft: 33 } }),
    ).toBeCloseTo(0.52, 12);
  });
  it('includes its edges, and does not cross what is not known', () => {
    expect(smallestFittingTail({ sizes, limits: [aft], loading: { forward: 1, aft: 20 } })).toBe(0.2);
    const gap = { ...aft, cg: [20, Number.NaN, 60] };
    expect(smallestFittingTail({ sizes, limits: [gap], loading: { forward: 1, aft: 10 } })).toBeNull();
  });
});

describe('build-up', () => {
  it('steps from one end to the next and ends at the neutral point', () => {
    const all = stackedBars(buildUp(0, [25.4, 24, -7.9, -1.2]));
    expect(all.map(({ from, to }) => [from, to].map((x) => Number(x.toFixed(6))))).toEqual([
      [0, 25.4],
      [25.4, 49.4],
      [49.4, 41.5],
      [41.5, 40.3],
      [0, 40.3],
    ]);
    expect(all.map(({ text }) => text)).toEqual(['25.4', '+24.0', '−7.9', '−1.2', '40.3']);
  });
});

describe('carpet', () => {
  const carpetOf = (figure: (a: number, b: number) => number) => ({
    heading: { title: '', study: '', date: '', program: '' },
    a: { title: 'A', labels: ['0', '1', '2'] },
    b: { title: 'B', labels: ['0', '1', '2'] },
    figureTitle: 'F',
    values: [0, 1, 2].flatMap((a) => [0, 1, 2].map((b) => figure(a, b))),
  });
  it('opens to the other side when the figure grows with both', () => {
    expect(widestOpening(carpetOf((a, b) => a + b))).toBeLessThan(0);
    expect(widestOpening(carpetOf((a, b) => a - b))).toBeGreaterThan(0);
  });
  it('shifts both numbers evenly', () => {
    expect(carpetShift(0, 3, 0, 3, 0.5)).toBe(0);
    expect(carpetShift(1, 3, 2, 3, 0.5)).toBeCloseTo(1, 12);
    expect(carpetShift(2, 3, 1, 3, -0.4)).toBeCloseTo(0.8, 12);
  });
});

describe('text', () => {
  const { resolve } = createRequire(import.meta.url);
  const fontFiles = ['400Regular/Inter_400Regular.ttf', '600SemiBold/Inter_600SemiBold.ttf'].map((file) =>
    resolve(`@expo-google-fonts/inter/${file}`),
  );
  /** Width of the ink as another program sets it: resvg's text layout with the same font files. */
  function inkWidth(text: string, boldness: number): number {
    const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="2000" height="200"><text x="20" y="120" font-family="Inter" font-size="100" font-weight="${boldness}">${text}</text></svg>`;
    return new Resvg(svg, { font: { fontFiles, loadSystemFonts: false } }).getBBox()!.width;
  }
  it.each([
    ['Handgloves over 0123456789', weight.normal],
    ['Static margin, CG aft [% MAC]', weight.strong],
    ['wing.panels[2].sweep_leading_edge', weight.normal],
  ] as const)("is as wide as a text layout engine sets it: '%s'", (text, boldness) => {
    // Ink leaves out the side bearings of the first and last letter and includes kerning: 3 %.
    expect(Math.abs(textWidth(text, 100, boldness) / inkWidth(text, boldness) - 1)).toBeLessThan(0.03);
  });

  it('is cut or wrapped to its room', () => {
    const anything = fc.string({ unit: 'grapheme', minLength: 1, maxLength: 300 });
    fc.assert(
      fc.property(anything, fc.integer({ min: 60, max: 600 }), (text, room) => {
        expect(textWidth(ellipsize(text, room, 12), 12)).toBeLessThanOrEqual(room);
        const lines = wrapText(text, room, 12, 2);
        expect(lines.length).toBeLessThanOrEqual(2);
        for (const line of lines) expect(textWidth(line, 12)).toBeLessThanOrEqual(room);
      }),
    );
    expect(ellipsize('Tail volume', 500, 12)).toBe('Tail volume');
    expect(wrapText('Tail volume and tail arm', 80, 12, 3)).toEqual(['Tail volume', 'and tail arm']);
  });

  it('numbers have a true minus and no negative zero; counts have commas', () => {
    expect(numberText(-1.25, 1)).toMatch(/^−1\.[23]$/);
    expect(numberText(-0.04, 1)).toBe('0.0');
    expect(countText(326400)).toBe('326,400');
    expect(countText(12)).toBe('12');
    expect(cleanText(' a\n\tb ')).toBe('a b');
  });
});
