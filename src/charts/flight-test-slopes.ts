import type { FlightTestSlopesData, FlownCg, StraightLine } from './flight-test-data.ts';
import { slopeKey, slopePanel } from './flight-test-neutral-point.ts';
import { clipToFrame } from './geometry/clip.ts';
import type { Point } from './geometry/polyline.ts';
import { keyRow } from './key-row.ts';
import { type Layer, type PointShape, points } from './marks.ts';
import { type NamedLine, namedLineLayers, nameLabels, placeNames } from './named-lines.ts';
import { type Panel, type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartSpec, grid, sheet } from './sheet.ts';
import { cleanText, ellipsize, numberText } from './text-width.ts';
import { colours, textSize } from './theme.ts';

const plot = { width: 350, height: 330 } as const;
const shapes: readonly PointShape[] = ['circle', 'diamond', 'square', 'triangle-up', 'triangle-down'];
const fittedLine = { color: colours.accent, width: 1.6 } as const;
const predictedLine = { color: colours.ink, width: 1.2, dash: [5, 3] } as const;

/**
 * Measured curves at each CG position with fitted and predicted lines; beside them the slopes
 * against CG, carried on to zero: the neutral point with its 95 % limits.
 */
export function flightTestSlopes(data: FlightTestSlopesData): ChartSpec {
  const width = 2 * (plot.width + 70);
  const panels = [measuredPanel(data), slopePanel(data, plot)];
  const measuredKey = [
    {
      symbol: { kind: 'line' as const, style: fittedLine, point: pointOf(0) },
      text: 'measured, with fitted line',
    },
    ...(data.flown.some(({ predicted }) => predicted !== undefined)
      ? [{ symbol: { kind: 'line' as const, style: predictedLine }, text: 'predicted' }]
      : []),
  ];
  return sheet(
    data.heading,
    width,
    [grid(panels, 2), keyRow([...measuredKey, ...slopeKey(data)], width)],
    [
      neutralPointInWords(data),
      'Never flown to: approach the aft limit in small steps, under qualified supervision, and stay away from neutral',
    ],
  );
}

function neutralPointInWords({
  neutralPoint,
  predictedNeutralPoint,
  pointName,
}: FlightTestSlopesData): string {
  const predicted =
    predictedNeutralPoint === undefined || !Number.isFinite(predictedNeutralPoint)
      ? ''
      : `; predicted ${numberText(predictedNeutralPoint, 1)} %`;
  const name = cleanText(pointName);
  if (neutralPoint === null) return `The data give no ${name}${predicted}`;
  const { at, least, greatest } = neutralPoint;
  const limits =
    least !== undefined && greatest !== undefined
      ? `95 % limits ${numberText(least, 1)} to ${numberText(greatest, 1)} %`
      : least !== undefined
        ? `95 % limits from ${numberText(least, 1)} %, open aft`
        : greatest !== undefined
          ? `95 % limits open forward, to ${numberText(greatest, 1)} %`
          : '95 % limits open on both sides: the data do not fix it';
  return `Extrapolated ${name} ${numberText(at, 1)} % MAC, ${limits}${predicted}`;
}

function pointOf(index: number) {
  const filled = Math.floor(index / shapes.length) % 2 === 0;
  return {
    shape: shapes[index % shapes.length]!,
    size: 46,
    fill: filled ? colours.accent : colours.paper,
    stroke: filled ? colours.paper : colours.accent,
    width: filled ? 0.8 : 1.3,
  };
}

function measuredPanel(data: FlightTestSlopesData): Panel {
  const scales = measuredScales(data);
  const map = pixelMap(plot.width, plot.height, scales.x, scales.y);
  const lineOf = (line: StraightLine) => straightLine(line, scales.x, map);
  const fitted = data.flown.map(
    (flown): NamedLine => ({
      label: cgText(flown),
      lines: lineOf(flown.fitted),
      style: fittedLine,
      best: 0.85,
    }),
  );
  const marks = data.flown.map(positionsOf);
  const markRoom = marks.flat().map((position) => ({ ...map.toPixels(position), radius: 5 }));
  const names = placeNames(fitted, markRoom, plot, textSize.small);
  const texts = names.flatMap((name) => name?.spots ?? []);
  const predicted = data.flown.flatMap((flown) =>
    flown.predicted === undefined ? [] : lineOf(flown.predicted),
  );
  const layers: Layer[] = [
    ...namedLineLayers({ label: '', lines: predicted, style: predictedLine }, texts, plot, map),
    ...fitted.flatMap((line) => namedLineLayers(line, texts, plot, map)),
    ...marks.map((positions, index) => points(positions, pointOf(index))),
    nameLabels(names, map, textSize.small),
  ];
  const left = data.flown.filter((_, index) => names[index] === null).map(cgText);
  return panel({
    ...plot,
    ...scales,
    layers,
    title: ['Measured at each CG position'],
    subtitle: left.length === 0 ? [] : [ellipsize(`also ${left.join(', ')}`, plot.width, textSize.small)],
  });
}

function cgText({ cg }: FlownCg): string {
  return `CG ${numberText(cg, 1)} %`;
}

function positionsOf({ liftCoefficients, measured }: FlownCg): { x: number; y: number }[] {
  return Array.from(liftCoefficients, (x, index) => ({ x, y: measured[index]! })).filter(
    ({ x, y }) => Number.isFinite(x) && Number.isFinite(y),
  );
}

/** From no lift to a little over the greatest measured lift coefficient; upward what was measured decides. */
function measuredScales(data: FlightTestSlopesData): { x: Scale; y: Scale } {
  const all = data.flown.flatMap(positionsOf);
  const greatest = Math.max(0.1, ...all.map(({ x }) => x)) * 1.06;
  const heights = [
    ...all.map(({ y }) => y),
    ...data.flown.map(({ fitted }) => fitted.atNoLift).filter(Number.isFinite),
  ];
  const [least, most] = [Math.min(0, ...heights), Math.max(0, ...heights)];
  const room = (most - least || 1) * 0.08;
  return {
    x: { from: 0, to: greatest, axis: { title: 'Lift coefficient', more: { tickCount: 6 } } },
    y: {
      from: least - room,
      to: most + room,
      axis: { title: cleanText(data.measuredTitle), more: { tickCount: 7 } },
    },
  };
}

function straightLine({ slope, atNoLift }: StraightLine, x: Scale, map: PixelMap): Point[][] {
  return clipToFrame(
    [x.from, x.to].map((at) => map.toPixels({ x: at, y: atNoLift + slope * at })),
    plot,
  );
}
