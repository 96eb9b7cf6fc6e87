import type { LoadingDiagramData } from './loading-data.ts';
import { type Layer, labels, segments } from './marks.ts';
import { niceValues } from './nice-steps.ts';
import type { Scale } from './panel.ts';
import { ellipsize, numberText } from './text-width.ts';
import { colours, textSize } from './theme.ts';

const stationTicks = 8;
const stationTick = 4;
/** The station scale along the top, drawn over the % MAC scale that the plot runs on. */
export function stationAxis(
  { title, leadingEdge, chord }: LoadingDiagramData['station'],
  { x, y }: { readonly x: Scale; readonly y: Scale },
  plot: { readonly width: number; readonly height: number },
): Layer[] {
  const stationOf = (cg: number) => leadingEdge + (cg / 100) * chord;
  const { values, decimals } = niceValues(stationOf(x.from), stationOf(x.to), stationTicks);
  const ticks = values.map((station) => ({
    x: ((station - leadingEdge) / chord) * 100,
    text: numberText(station, decimals),
  }));
  const top = y.to + ((y.to - y.from) * stationTick) / plot.height;
  const label = ellipsize(title, plot.width, textSize.axis);
  return [
    segments(
      ticks.map((tick) => ({ x: tick.x, x2: tick.x, y: y.to, y2: top })),
      { color: colours.rule, width: 1 },
    ),
    labels(
      ticks.map((tick) => ({ ...tick, y: y.to })),
      { size: textSize.axis, color: colours.muted, baseline: 'bottom', dy: -7 },
    ),
    labels([{ x: (x.from + x.to) / 2, y: y.to, text: label }], {
      size: textSize.axis,
      baseline: 'bottom',
      dy: -25,
    }),
  ];
}
