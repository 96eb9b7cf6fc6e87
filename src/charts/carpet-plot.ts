import { placeAtEnds } from './geometry/end-labels.ts';
import { type Spot, spotsAlong } from './geometry/polyline.ts';
import { keyRow } from './key-row.ts';
import { type Label, type Layer, labels, type Position, polylines } from './marks.ts';
import { type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, sheet } from './sheet.ts';
import { cleanText, ellipsize } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

/** One of the two varied numbers of a carpet. */
export interface CarpetAxis {
  /** With unit: `Span [m]`. */
  readonly title: string;
  /** Values as text, in order: `9.25`. At least 2. */
  readonly labels: readonly string[];
}
export interface CarpetPlotData {
  readonly heading: ChartHeading;
  readonly a: CarpetAxis;
  readonly b: CarpetAxis;
  /** With unit: `Static margin, CG aft [% MAC]`. */
  readonly figureTitle: string;
  /** Figure at `[ia * nb + ib]`, in the unit of its title; NaN: not computed. */
  readonly values: ArrayLike<number>;
}

const plot = { width: 600, height: 430 } as const;
/** Shift of x over the whole of the first number; the shifts of the second to choose from. */
const shiftOfA = 1;
const shiftsOfB = [0.55, -0.55, 0.35, -0.35, 0.8, -0.8] as const;
const mostLines = 13;
const lineStyles = {
  a: { color: colours.accent, width: 1.8 },
  b: { color: colours.ink, width: 1.2, dash: [6, 3] },
} as const;

/**
 * Carpet plot: the figure upward; each value of both numbers is a line, shifted sideways by the
 * other one. Across there is no scale: the numbers stand at the ends of the lines.
 */
export function carpetPlot(data: CarpetPlotData): ChartSpec {
  const shiftOfB = widestOpening(data);
  const scales = { x: shiftScale(shiftOfB), y: figureScale(data) };
  const map = pixelMap(plot.width, plot.height, scales.x, scales.y);
  const drawn = { a: everySome(data.a.labels.length), b: everySome(data.b.labels.length) };
  const families = { a: family(data, 'a', drawn.a, shiftOfB), b: family(data, 'b', drawn.b, shiftOfB) };
  const ends = placeNumbers(data, families, map);
  const layers: Layer[] = [
    polylines(
      families.b.flatMap(({ runs }) => runs),
      lineStyles.b,
    ),
    polylines(
      families.a.flatMap(({ runs }) => runs),
      lineStyles.a,
    ),
    labels(ends.a, { size: textSize.small, color: colours.accentDark, weight: weight.strong }),
    labels(ends.b, { size: textSize.small, color: colours.ink }),
  ];
  const key = keyRow(
    [
      {
        symbol: { kind: 'line', style: lineStyles.a },
        text: `constant ${cleanText(data.a.title)} (bold numbers)`,
      },
      { symbol: { kind: 'line', style: lineStyles.b }, text: `constant ${cleanText(data.b.title)}` },
    ],
    plot.width,
  );
  return sheet(
    data.heading,
    plot.width + 50,
    [panel({ ...plot, ...scales, layers }), key],
    ['Read the figure upward; sideways there is no scale, lines are shifted to open the carpet'],
  );
}

/** Indices to draw: all of them, or evenly chosen ones when there are many, ends included. */
function everySome(count: number): number[] {
  const lines = Math.min(count, mostLines);
  return Array.from({ length: lines }, (_, k) => Math.round((k * (count - 1)) / Math.max(1, lines - 1)));
}

interface Families {
  readonly a: readonly CarpetLine[];
  readonly b: readonly CarpetLine[];
}
interface CarpetLine {
  readonly index: number;
  readonly runs: readonly Position[][];
}

/** The lines of one constant number; each runs over all values of the other. */
function family(
  data: CarpetPlotData,
  constant: 'a' | 'b',
  indices: readonly number[],
  shiftOfB: number,
): CarpetLine[] {
  const [na, nb] = [data.a.labels.length, data.b.labels.length];
  const length = constant === 'a' ? nb : na;
  return indices.map((index) => {
    const runs: Position[][] = [[]];
    for (let k = 0; k < length; k++) {
      const [ia, ib] = constant === 'a' ? [index, k] : [k, index];
      const y = data.values[ia * nb + ib]!;
      if (Number.isFinite(y)) runs.at(-1)!.push({ x: carpetShift(ia, na, ib, nb, shiftOfB), y });
      else runs.push([]);
    }
    return { index, runs: runs.filter((run) => run.length > 1) };
  });
}

/** Sideways place of a pair of values, 0 at the first of both. */
export function carpetShift(ia: number, na: number, ib: number, nb: number, shiftOfB: number): number {
  return (shiftOfA * ia) / Math.max(1, na - 1) + (shiftOfB * ib) / Math.max(1, nb - 1);
}

/**
 * The shift of the second number that opens the carpet widest, so that lines do not fall on one
 * another where the figure grows alike with both: the area of all its meshes against the plot's.
 */
export function widestOpening(data: CarpetPlotData): number {
  const opening = (shiftOfB: number) => meshArea(data, shiftOfB) / (shiftOfA + Math.abs(shiftOfB));
  return shiftsOfB.reduce<number>(
    (best, each) => (opening(each) > opening(best) * (1 + 1e-9) ? each : best),
    shiftsOfB[0],
  );
}

function meshArea({ a, b, values }: CarpetPlotData, shiftOfB: number): number {
  const [na, nb] = [a.labels.length, b.labels.length];
  const [stepA, stepB] = [shiftOfA / Math.max(1, na - 1), shiftOfB / Math.max(1, nb - 1)];
  let area = 0;
  for (let ia = 0; ia + 1 < na; ia++) {
    for (let ib = 0; ib + 1 < nb; ib++) {
      const here = values[ia * nb + ib]!;
      const mesh = stepA * (values[ia * nb + ib + 1]! - here) - stepB * (values[(ia + 1) * nb + ib]! - here);
      if (Number.isFinite(mesh)) area += Math.abs(mesh);
    }
  }
  return area;
}

const sideRoom = 0.14;
function shiftScale(shiftOfB: number): Scale {
  const [from, to] = [Math.min(0, shiftOfB), shiftOfA + Math.max(0, shiftOfB)];
  const room = (to - from) * sideRoom;
  return { from: from - room, to: to + room, axis: null };
}

function figureScale({ values, figureTitle }: CarpetPlotData): Scale {
  const known = Array.from(values).filter(Number.isFinite);
  const least = known.reduce((a, b) => Math.min(a, b), known[0] ?? 0);
  const greatest = known.reduce((a, b) => Math.max(a, b), known[0] ?? 1);
  const room = (greatest - least || Math.abs(greatest) || 1) * 0.1;
  return {
    from: least - room,
    to: greatest + room,
    axis: { title: cleanText(figureTitle), more: { tickCount: 7, grid: true, gridColor: colours.wash } },
  };
}

const longestName = 150;
const lineSpot = { every: 4, radius: 1.5 } as const;

/** Numbers at the ends of both families of lines, each with its axis' name where that finds room. */
function placeNumbers(data: CarpetPlotData, families: Families, map: PixelMap): { a: Label[]; b: Label[] } {
  const runs = [...families.a, ...families.b].flatMap((line) =>
    line.runs.map((run) => run.map(map.toPixels)),
  );
  const clear = runs.flatMap((run) => spotsAlong(run, lineSpot.every, lineSpot.radius));
  const numbers = (lines: readonly CarpetLine[], axis: CarpetAxis, keepClear: readonly Spot[]) => {
    const numbered = lines.map(({ index, runs: own }) => ({
      line: own.flat().map(map.toPixels),
      text: ellipsize(axis.labels[index]!, longestName, textSize.small),
    }));
    return placeAtEnds(numbered, ellipsize(axis.title, longestName, textSize.small), keepClear, plot);
  };
  const a = numbers(families.a, data.a, clear);
  const b = numbers(families.b, data.b, [...clear, ...a.spots]);
  const inScales = (placed: readonly Label[]) =>
    placed.map(({ x, y, text }) => ({ ...map.fromPixels({ x, y }), text }));
  return { a: inScales(a.labels), b: inScales(b.labels) };
}
