import type { FlightTestSlopesData } from './flight-test-data.ts';
import { clipToFrame } from './geometry/clip.ts';
import { spread } from './geometry/spread.ts';
import type { KeyItem } from './key-row.ts';
import {
  bars,
  type Layer,
  labels,
  type Position,
  points,
  polylines,
  type Segment,
  segments,
} from './marks.ts';
import { type Panel, panel, pixelMap, type Scale } from './panel.ts';
import { cleanText, ellipsize, numberText, textWidth } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

const slopePoint = { shape: 'circle', size: 60, fill: colours.accent, width: 1 } as const;
const foundPoint = { shape: 'diamond', size: 120, fill: colours.accent } as const;
const predictedPoint = {
  shape: 'diamond',
  size: 100,
  fill: colours.paper,
  stroke: colours.ink,
  width: 1.5,
} as const;
const slopeLine = { color: colours.accent, width: 1.6 } as const;
const beyondLine = { color: colours.accent, width: 1.4, dash: [3, 3] } as const;
const zeroLine = { color: colours.ink, width: 1 } as const;
const errorLine = { color: colours.accent, width: 1.2 } as const;
const errorFoot = 4;
const limitsThickness = 9;

/** Key of the slope panel. */
export function slopeKey({
  neutralPoint,
  predictedNeutralPoint,
  pointName,
  flown,
}: FlightTestSlopesData): KeyItem[] {
  const name = cleanText(pointName);
  const uncertain = flown.some(({ slopeUncertainty }) => slopeUncertainty !== undefined);
  return [
    {
      symbol: { kind: 'line', style: slopeLine, point: slopePoint },
      text: uncertain ? 'slope, with 95 % limits' : 'slope',
    },
    ...(neutralPoint === null
      ? []
      : [
          { symbol: { kind: 'line' as const, style: beyondLine }, text: 'carried on to zero' },
          { symbol: { kind: 'point' as const, point: foundPoint }, text: name },
          {
            symbol: { kind: 'swatch' as const, fill: colours.accentTint, stroke: colours.accent },
            text: 'its 95 % limits',
          },
        ]),
    ...(predictedNeutralPoint === undefined || !Number.isFinite(predictedNeutralPoint)
      ? []
      : [{ symbol: { kind: 'point' as const, point: predictedPoint }, text: `predicted ${name}` }]),
  ];
}

interface PlotSize {
  readonly width: number;
  readonly height: number;
}

/** Slope of each flown CG against the CG, with the line through them down to zero. */
export function slopePanel(data: FlightTestSlopesData, plot: PlotSize): Panel {
  const x = cgScale(data);
  const y = slopeScale(data, plot);
  const measured = data.flown.map(({ cg, fitted }): Position => ({ x: cg, y: fitted.slope })).filter(isKnown);
  const layers: Layer[] = [
    segments([{ x: x.from, x2: x.to, y: 0, y2: 0 }], zeroLine),
    ...limitsLayers(data, x, y, plot),
    ...extrapolation(data, measured, x, y, plot),
    segments(errorBars(data, x, plot), errorLine),
    points(measured, slopePoint),
    points(onZero(data.predictedNeutralPoint, x), predictedPoint),
    points(onZero(data.neutralPoint?.at, x), foundPoint),
    pointLabels(data, x, y, plot),
  ];
  return panel({
    ...plot,
    x,
    y,
    layers,
    title: [
      ellipsize(
        `Slope against CG, carried on to the ${cleanText(data.pointName)}`,
        plot.width,
        textSize.panel,
        weight.strong,
      ),
    ],
  });
}

function isKnown({ x, y }: Position): boolean {
  return Number.isFinite(x) && Number.isFinite(y);
}

/** A point of the zero line, if the plot reaches so far. */
function onZero(at: number | undefined, x: Scale): Position[] {
  return at !== undefined && at >= x.from && at <= x.to ? [{ x: at, y: 0 }] : [];
}

/** A limit or an extrapolated point farther off than this many times the flown range, and than so many % MAC, leaves the plot. */
const farthest = { timesFlown: 4, percentMac: 15 } as const;
function cgScale({ flown, neutralPoint, predictedNeutralPoint }: FlightTestSlopesData): Scale {
  const cgs = flown.map(({ cg }) => cg).filter(Number.isFinite);
  const [forward, aft] = [Math.min(...cgs), Math.max(...cgs)];
  const reach = Math.max(farthest.percentMac, (aft - forward) * farthest.timesFlown);
  const wanted = [
    neutralPoint?.at,
    neutralPoint?.least,
    neutralPoint?.greatest,
    predictedNeutralPoint,
  ].filter((value): value is number => value !== undefined && Number.isFinite(value));
  const from = Math.max(forward - reach, Math.min(forward, ...wanted));
  const to = Math.min(aft + reach, Math.max(aft, ...wanted));
  const room = Math.max(0.5, (to - from) * 0.08);
  return {
    from: from - room,
    to: to + room,
    axis: { title: 'CG [% MAC]', more: { tickCount: 7 } },
  };
}

/** Room under the zero line for the numbers of the points on it [px]. */
const underZero = 46;
function slopeScale({ flown, slopeTitle }: FlightTestSlopesData, plot: PlotSize): Scale {
  const ends = flown
    .flatMap(({ fitted, slopeUncertainty = 0 }) => [
      fitted.slope - slopeUncertainty,
      fitted.slope + slopeUncertainty,
    ])
    .filter(Number.isFinite);
  const [least, greatest] = [Math.min(0, ...ends), Math.max(0, ...ends)];
  const perPixel = (greatest - least || 1) / (plot.height - underZero - 16);
  return {
    from: Math.min(least - 8 * perPixel, -underZero * perPixel),
    to: greatest + 16 * perPixel,
    axis: { title: cleanText(slopeTitle), more: { tickCount: 7 } },
  };
}

function errorBars({ flown }: FlightTestSlopesData, x: Scale, plot: PlotSize): Segment[] {
  const foot = (errorFoot * (x.to - x.from)) / plot.width;
  return flown.flatMap(({ cg, fitted, slopeUncertainty }) => {
    if (slopeUncertainty === undefined || !Number.isFinite(fitted.slope + slopeUncertainty)) return [];
    const [low, high] = [fitted.slope - slopeUncertainty, fitted.slope + slopeUncertainty];
    return [
      { x: cg, x2: cg, y: low, y2: high },
      ...[low, high].map((y) => ({ x: cg - foot, x2: cg + foot, y, y2: y })),
    ];
  });
}

/** The fitted line of slopes: full over the flown range, dashed beyond it to where it reaches zero. */
function extrapolation(
  { slopeLine: line, neutralPoint }: FlightTestSlopesData,
  measured: readonly Position[],
  x: Scale,
  y: Scale,
  plot: PlotSize,
): Layer[] {
  if (line === null || measured.length < 2) return [];
  const map = pixelMap(plot.width, plot.height, x, y);
  const stretch = (from: number, to: number): Position[][] =>
    clipToFrame(
      [from, to].map((cg) => map.toPixels({ x: cg, y: line.atLeadingEdge + line.slope * cg })),
      plot,
    ).map((part) => part.map(map.fromPixels));
  const cgs = measured.map(({ x: cg }) => cg);
  const [forward, aft] = [Math.min(...cgs), Math.max(...cgs)];
  const at = neutralPoint?.at ?? Number.NaN;
  const beyond = at > aft ? stretch(aft, at) : at < forward ? stretch(at, forward) : [];
  return [polylines(stretch(forward, aft), slopeLine), polylines(beyond, beyondLine)];
}

/** 95 % limits as a bar on the zero line; an open side runs to the edge of the plot. */
function limitsLayers({ neutralPoint }: FlightTestSlopesData, x: Scale, y: Scale, plot: PlotSize): Layer[] {
  if (neutralPoint === null || !Number.isFinite(neutralPoint.at)) return [];
  const { least = x.from, greatest = x.to } = neutralPoint;
  const half = ((limitsThickness / 2) * (y.to - y.from)) / plot.height;
  const bar = { x: Math.max(least, x.from), x2: Math.min(greatest, x.to), y: -half, y2: half };
  return [bars(bar.x < bar.x2 ? [bar] : [], { fill: colours.accentTint, stroke: colours.accent })];
}

const belowMarks = 20;
/** Extrapolated and predicted point in numbers under their marks, moved apart where they would touch; an arrow to those beyond the plot. */
function pointLabels(data: FlightTestSlopesData, x: Scale, y: Scale, plot: PlotSize): Layer {
  const wanted = [
    { at: data.neutralPoint?.at ?? Number.NaN, word: 'found' },
    { at: data.predictedNeutralPoint ?? Number.NaN, word: 'predicted' },
  ]
    .filter(({ at }) => Number.isFinite(at))
    .map(({ at, word }) => {
      const said = `${word} ${numberText(at, 1)} %`;
      return { at, text: at < x.from ? `← ${said}` : at > x.to ? `${said} →` : said };
    });
  const perPixel = (x.to - x.from) / plot.width;
  const places = spread(
    wanted.map(({ at, text }) => ({ at, size: textWidth(text, textSize.small) * perPixel })),
    x.from,
    x.to,
    8 * perPixel,
  );
  const rows = wanted.map(({ text }, index) => ({
    x: places[index]!,
    y: (-belowMarks * (y.to - y.from)) / plot.height,
    text,
  }));
  return labels(rows, { size: textSize.small });
}
