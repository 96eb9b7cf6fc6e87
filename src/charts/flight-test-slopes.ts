import type { FlightTestSlopesData, FlownCg, StraightLine } from './flight-test-data.ts';
import { slopeKey, slopePanel } from './flight-test-neutral-point.ts';
import { clipToFrame } from './geometry/clip.ts';
import type { Point } from './geometry/polyline.ts';
import { spread } from './geometry/spread.ts';
import { keyRow } from './key-row.ts';
import { type Layer, labels, type PointShape, points, polylines } from './marks.ts';
import { type Panel, type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartSpec, grid, sheet } from './sheet.ts';
import { cleanText, numberText } from './text-width.ts';
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
  const width = 2 * (plot.width + 70) + 60;
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
      'A neutral point is extrapolated, never flown to: approach the aft limit in small steps, under qualified supervision',
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
  const lineOf = (line: StraightLine | undefined) =>
    line === undefined ? [] : straightLine(line, scales.x, map).map((part) => part.map(map.fromPixels));
  const layers: Layer[] = [
    polylines(
      data.flown.flatMap(({ predicted }) => lineOf(predicted)),
      predictedLine,
    ),
    polylines(
      data.flown.flatMap(({ fitted }) => lineOf(fitted)),
      fittedLine,
    ),
    ...data.flown.map((flown, index) => points(positionsOf(flown), pointOf(index))),
    labels(namesAtEnd(data.flown, scales), { size: textSize.small, align: 'left', dx: 6 }),
  ];
  return panel({ ...plot, ...scales, layers, title: ['Measured at each CG position'] });
}

/** The CG of each fitted line beside its end, moved apart where they would touch. */
function namesAtEnd(flown: readonly FlownCg[], { x, y }: { readonly x: Scale; readonly y: Scale }) {
  const ended = flown
    .map((each) => ({ at: each.fitted.atNoLift + each.fitted.slope * x.to, text: cgText(each) }))
    .filter(({ at }) => Number.isFinite(at));
  const size = (textSize.small * 1.2 * (y.to - y.from)) / plot.height;
  const places = spread(
    ended.map(({ at }) => ({ at, size })),
    y.from,
    y.to,
  );
  return ended.map(({ text }, index) => ({ x: x.to, y: places[index]!, text }));
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
    ...data.flown
      .flatMap(({ fitted: { atNoLift, slope } }) => [atNoLift, atNoLift + slope * greatest])
      .filter(Number.isFinite),
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
