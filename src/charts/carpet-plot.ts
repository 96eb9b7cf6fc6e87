import { inside, isClear, textSpots } from './geometry/line-labels.ts';
import { type Spot, simplify } from './geometry/polyline.ts';
import { keyRow } from './key-row.ts';
import { type Label, type Layer, labels, type Position, polylines } from './marks.ts';
import { type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, sheet } from './sheet.ts';
import { cleanText, ellipsize, textWidth } from './text-width.ts';
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
/** Widths of the two shifts of x; unequal, so that the carpet opens even where the figure grows alike with both. */
const shift = { a: 1, b: 0.55 } as const;
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
  const scales = { x: shiftScale(), y: figureScale(data) };
  const map = pixelMap(plot.width, plot.height, scales.x, scales.y);
  const drawn = { a: everySome(data.a.labels.length), b: everySome(data.b.labels.length) };
  const families = { a: family(data, 'a', drawn.a), b: family(data, 'b', drawn.b) };
  const ends = placeEnds(data, families, map);
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

interface CarpetLine {
  readonly index: number;
  readonly runs: readonly Position[][];
}

/** The lines of one constant number; each runs over all values of the other. */
function family(data: CarpetPlotData, constant: 'a' | 'b', indices: readonly number[]): CarpetLine[] {
  const [na, nb] = [data.a.labels.length, data.b.labels.length];
  const length = constant === 'a' ? nb : na;
  return indices.map((index) => {
    const runs: Position[][] = [[]];
    for (let k = 0; k < length; k++) {
      const [ia, ib] = constant === 'a' ? [index, k] : [k, index];
      const y = data.values[ia * nb + ib]!;
      if (Number.isFinite(y)) runs.at(-1)!.push({ x: carpetShift(ia, na, ib, nb), y });
      else runs.push([]);
    }
    return { index, runs: runs.filter((run) => run.length > 1) };
  });
}

/** Sideways place of a pair of values, 0 at the first of both. */
export function carpetShift(ia: number, na: number, ib: number, nb: number): number {
  return (shift.a * ia) / Math.max(1, na - 1) + (shift.b * ib) / Math.max(1, nb - 1);
}

function shiftScale(): Scale {
  const room = 0.16;
  return { from: -room, to: shift.a + shift.b + room, axis: null };
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

const endGap = 6;
const longestName = 200;

/** Numbers at the ends of the lines, the axis' name at one of them; those that would touch are left out. */
function placeEnds(
  data: CarpetPlotData,
  families: { a: CarpetLine[]; b: CarpetLine[] },
  map: PixelMap,
): { a: Label[]; b: Label[] } {
  const taken: Spot[] = [];
  const frame = { width: plot.width, height: plot.height };
  const put = (lines: readonly CarpetLine[], axis: CarpetAxis, atStart: boolean): Label[] => {
    const name = ellipsize(axis.title, longestName, textSize.small);
    const placed: Label[] = [];
    const middle = Math.floor(lines.length / 2);
    // The ends of the family first: they tell its range.
    const order = [...lines.keys()].sort((i, j) => rank(i, lines.length) - rank(j, lines.length) || i - j);
    for (const position of order) {
      const line = lines[position]!;
      const run = atStart ? line.runs[0] : line.runs.at(-1);
      if (run === undefined) continue;
      const text = ellipsize(axis.labels[line.index]!, longestName, textSize.small);
      for (const candidate of position === middle ? [`${name}: ${text}`, text] : [text]) {
        const at = beyondEnd(run.map(map.toPixels), atStart, candidate);
        const spots = textSpots(
          at.x,
          at.y,
          0,
          textWidth(candidate, textSize.small, weight.strong),
          textSize.small,
        );
        if (!spots.every((spot) => inside(spot, frame) && isClear(spot, taken))) continue;
        taken.push(...spots);
        placed.push({ ...map.fromPixels(at), text: candidate });
        break;
      }
    }
    return placed;
  };
  const a = put(families.a, data.a, false);
  return { a, b: put(families.b, data.b, true) };
}

function rank(position: number, count: number): number {
  if (position === 0 || position === count - 1) return 0;
  return position === Math.floor(count / 2) ? 1 : 2;
}

/** Middle of a text that follows a line beyond its end, clear of it whatever the line's direction. */
function beyondEnd(line: readonly Position[], atStart: boolean, text: string): Position {
  const straight = simplify(line, 0.5);
  const end = atStart ? straight[0]! : straight.at(-1)!;
  const before = atStart ? straight[1]! : straight.at(-2)!;
  const length = Math.hypot(end.x - before.x, end.y - before.y) || 1;
  const [ux, uy] = [(end.x - before.x) / length, (end.y - before.y) / length];
  const half = textWidth(text, textSize.small, weight.strong) / 2;
  return { x: end.x + Math.sign(ux) * (half + endGap), y: end.y + uy * (endGap + textSize.small / 2) };
}
