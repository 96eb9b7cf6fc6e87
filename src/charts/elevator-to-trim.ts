import { clipToFrame } from './geometry/clip.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import type { Layer, LineStyle } from './marks.ts';
import { lineRoom, type NamedLine, namedLineLayers, nameLabels, placeNames } from './named-lines.ts';
import { type Panel, type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, grid, sheet } from './sheet.ts';
import { cleanText, numberText, wrapText } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

/** Which CG a curve belongs to; it decides the look of the line. */
export type TrimCg = 'forward' | 'aft' | 'neutral point';

/** Elevator to trim at one CG position. */
export interface TrimCurve {
  /** For the key, the same for every curve of its kind: `CG forward`. */
  readonly label: string;
  readonly kind: TrimCg;
  /** CG [% MAC]. */
  readonly cg: number;
  /** Elevator angle [°], trailing edge up positive, for each speed; NaN: no trim there. */
  readonly elevator: ArrayLike<number>;
}

/** One flap setting at one power state. */
export interface TrimPanel {
  /** `Flaps 30°, idle` */
  readonly title: string;
  /** Calibrated airspeeds, ascending, in the unit of the speed title. */
  readonly speeds: readonly number[];
  readonly curves: readonly TrimCurve[];
  /** Of this flap setting and power, in the unit of the speed title. */
  readonly stallSpeed?: number;
  readonly greatestSpeed?: number;
}

export interface ElevatorToTrimData {
  readonly heading: ChartHeading;
  /** With unit: `Calibrated airspeed [kt]`. */
  readonly speedTitle: string;
  /** Ends of the elevator's travel [°], trailing edge up positive: up 25, down −20. */
  readonly travel: { readonly up: number; readonly down: number };
  readonly panels: readonly TrimPanel[];
}

interface PlotSize {
  readonly width: number;
  readonly height: number;
}
const plotSizes: readonly PlotSize[] = [
  { width: 520, height: 340 },
  { width: 350, height: 280 },
  { width: 264, height: 250 },
];
/** Four panels stand two by two: flaps down the page, power across. */
const squareOf = 4;
/** Room beyond the travel, as a part of it: curves end there. */
const beyondTravel = 0.14;

const looks: Readonly<Record<TrimCg, LineStyle>> = {
  forward: { color: colours.ink, width: 1.8 },
  aft: { color: colours.accent, width: 1.8, dash: [6, 3] },
  'neutral point': { color: colours.muted, width: 1.4, dash: [1.5, 2.5] },
};
const travelLine = { color: colours.ink, width: 1.2 } as const;
const speedLine = { color: colours.rule, width: 1 } as const;

/**
 * Elevator to trim against calibrated airspeed, one panel for each flap setting and power state:
 * curves of the forward, the aft and, if given, the neutral CG between the ends of the travel.
 */
export function elevatorToTrim(data: ElevatorToTrimData): ChartSpec {
  const count = data.panels.length;
  const columns = count === squareOf ? 2 : Math.min(plotSizes.length, count);
  const plot = plotSizes[columns - 1]!;
  const scales = { x: speedScale(data), y: elevatorScale(data) };
  const panels = data.panels.map((each, index) => trimPanel(each, data, scales, plot, index % columns === 0));
  const width = Math.max(columns * (plot.width + 70), 560);
  return sheet(
    data.heading,
    width,
    [keyRow(keyItems(data), width), grid(panels, columns)],
    ['Elevator that holds steady flight at each speed; the numbers on the curves are CG positions'],
  );
}

function keyItems({ panels }: ElevatorToTrimData): KeyItem[] {
  const curves = panels.flatMap(({ curves }) => curves);
  const kinds = (Object.keys(looks) as TrimCg[]).flatMap((kind): KeyItem[] => {
    const curve = curves.find((each) => each.kind === kind);
    return curve === undefined ? [] : [{ symbol: { kind: 'line', style: looks[kind] }, text: curve.label }];
  });
  return [
    ...kinds,
    {
      symbol: { kind: 'line', style: travelLine, ticks: true },
      text: 'end of the elevator’s travel, hatched beyond',
    },
  ];
}

function speedScale({ panels, speedTitle }: ElevatorToTrimData): Scale {
  const all = panels
    .flatMap(({ speeds, stallSpeed, greatestSpeed }) => [...speeds, stallSpeed, greatestSpeed])
    .filter((speed): speed is number => speed !== undefined && Number.isFinite(speed));
  const [least, greatest] = [Math.min(...all), Math.max(...all)];
  const room = (greatest - least || 1) * 0.04;
  return {
    from: least - room,
    to: greatest + room,
    axis: { title: cleanText(speedTitle), more: { tickCount: 6 } },
  };
}

function elevatorScale({ travel }: ElevatorToTrimData): Scale {
  const room = (travel.up - travel.down) * beyondTravel;
  return {
    from: travel.down - room,
    to: travel.up + room,
    axis: { title: 'Elevator, trailing edge up [°]', more: { tickCount: 8 } },
  };
}

function trimPanel(
  data: TrimPanel,
  { travel }: ElevatorToTrimData,
  scales: { readonly x: Scale; readonly y: Scale },
  plot: PlotSize,
  first: boolean,
): Panel {
  const map = pixelMap(plot.width, plot.height, scales.x, scales.y);
  const curves = data.curves.map((curve) => namedCurve(curve, data.speeds, map, plot));
  const limits = [...travelLimits(travel, scales.x, map), ...speedLimits(data, scales.y, map)];
  const names = placeNames(limits, curves.flatMap(lineRoom), plot, textSize.small);
  const taken = [...limits.flatMap(lineRoom), ...names.flatMap((name) => name?.spots ?? [])];
  const numbers = placeNames(curves, taken, plot, textSize.small);
  const texts = [...names, ...numbers].flatMap((text) => text?.spots ?? []);
  const layers: Layer[] = [
    ...[...limits, ...curves].flatMap((line) => namedLineLayers(line, texts, plot, map)),
    nameLabels(names, map, textSize.small),
    nameLabels(numbers, map, textSize.small),
  ];
  const left = [
    ...limits.filter((_, index) => names[index] === null).map(({ label }) => label),
    ...data.curves
      .map(({ label, cg }, index) => {
        const said = `${cleanText(label)} ${numberText(cg, 1)} %`;
        return curves[index]!.lines.length === 0 ? `${said}: no trim within this plot` : said;
      })
      .filter((_, index) => numbers[index] === null),
  ];
  return panel({
    ...plot,
    x: scales.x,
    y: first ? scales.y : { ...scales.y, axis: { title: null, more: { tickCount: 8 } } },
    layers,
    title: wrapText(data.title, plot.width, textSize.panel, 2, weight.strong),
    subtitle: left.length === 0 ? [] : wrapText(left.join(', '), plot.width, textSize.small, 2),
  });
}

function namedCurve(
  { kind, cg, elevator }: TrimCurve,
  speeds: readonly number[],
  map: PixelMap,
  plot: PlotSize,
): NamedLine {
  const line = speeds.map((speed, index) => map.toPixels({ x: speed, y: elevator[index]! }));
  return {
    label: `${numberText(cg, 1)} %`,
    lines: clipToFrame(line, plot),
    style: looks[kind],
    best: 0.35,
  };
}

function travelLimits(travel: ElevatorToTrimData['travel'], x: Scale, map: PixelMap): NamedLine[] {
  const rule = (angle: number, label: string, up: boolean): NamedLine => ({
    label,
    lines: [[map.toPixels({ x: x.from, y: angle }), map.toPixels({ x: x.to, y: angle })]],
    style: travelLine,
    side: ({ y }) => (y < 0 === up ? 1 : -1),
    best: 0.75,
  });
  return [
    rule(travel.up, `travel ${angleText(travel.up)} up`, true),
    rule(
      travel.down,
      travel.down < 0 ? `travel ${angleText(-travel.down)} down` : `travel ${angleText(travel.down)} up`,
      false,
    ),
  ];
}

function angleText(angle: number): string {
  return `${numberText(angle, Number.isInteger(angle) ? 0 : 1)}°`;
}

function speedLimits({ stallSpeed, greatestSpeed }: TrimPanel, y: Scale, map: PixelMap): NamedLine[] {
  const upright = (speed: number | undefined, name: string): NamedLine[] =>
    speed === undefined || !Number.isFinite(speed)
      ? []
      : [
          {
            label: `${name} ${numberText(speed, Number.isInteger(speed) ? 0 : 1)}`,
            lines: [[map.toPixels({ x: speed, y: y.from }), map.toPixels({ x: speed, y: y.to })]],
            style: speedLine,
            best: 0.28,
          },
        ];
  return [...upright(stallSpeed, 'stall'), ...upright(greatestSpeed, 'greatest')];
}
