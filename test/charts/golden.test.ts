import { expect, it } from 'vitest';
import {
  type ChartSpec,
  flightTestSlopes,
  loadingDiagram,
  macRuler,
  marginAlongAxis,
  neutralPointBuildUp,
  planView,
} from '../../src/charts/index.ts';
import { controlCharts, trim, trimPanel, usualFlightTest, usualLoading } from './control-samples.ts';
import { axis, buildUp, carpet, heading, outline, region, rulerRow, slice, tail } from './samples.ts';

/** Small inputs whose whole specification is kept as text (not `.json`, which the formatter would rewrite); a change of any chart shows as a change of its file. */
const small: Readonly<Record<string, () => ChartSpec>> = {
  'region-map': () =>
    region(
      3,
      2,
      (i, j) => (i * j) / 4,
      (i, j) => 3 * i - 2 * j,
    ),
  'slice-chart': () =>
    slice(4, (x, y) => 2 * (x - 8) + 5 * (y - 3.6), [
      ['Margin at least 5 %', (x, y) => 2 * (x - 8) + 5 * (y - 3.6) - 5],
    ]),
  'margin-along-axis': () =>
    marginAlongAxis({ heading, band: { lower: 5, upper: 20 }, axes: [axis('Span [m]', [8, 9, 10], 2)] }),
  'tail-sizing': () => tail({ forward: 24, aft: 33 }),
  'mac-ruler': () => macRuler({ heading, rows: [rulerRow(0)] }),
  'neutral-point-build-up': () =>
    neutralPointBuildUp({ heading, combinations: [buildUp(0, [25.4, 24, -7.9, -1.2])] }),
  'carpet-plot': () => carpet(3, 2, (a, b) => a + 2 * b),
  'elevator-to-trim': () => trim([trimPanel('Flaps up, idle', 52, 43, -2)]),
  'loading-diagram': () => loadingDiagram(usualLoading),
  'tail-sizing-control': () => controlCharts['tail, six limits']!(),
  'mac-ruler-conditions': () => controlCharts['ruler, conditions and control limit']!(),
  'neutral-point-build-up-seven': () => controlCharts['build-up, seven steps']!(),
  'flight-test-slopes': () => flightTestSlopes(usualFlightTest),
  'plan-view': () => planView({ heading, unit: 'm', outlines: [outline(0, 9.4, true)] }),
};

it.each(Object.entries(small))('%s', async (name, chart) => {
  await expect(`${JSON.stringify(chart(), null, 1)}\n`).toMatchFileSnapshot(`./golden/${name}.golden`);
});
