import { type GridField, isolines } from './geometry/contours.ts';
import { type LineLabel, type LineLabelRequest, placeOnLines } from './geometry/line-labels.ts';
import { cutOut, type Point, type Polyline, type Spot } from './geometry/polyline.ts';
import type { KeyItem } from './key-row.ts';
import { type Label, type Layer, labels, polylines } from './marks.ts';
import type { PixelMap } from './panel.ts';
import { gridField, inPixels, inValues, type SliceChartData, slicePlot } from './slice-data.ts';
import { numberText, textWidth } from './text-width.ts';
import { colours, textSize } from './theme.ts';

/** Steps between contours to choose from [% MAC]. */
const contourSteps = [1, 2, 5, 10, 20, 50, 100] as const;
/** Least distance between neighbouring contours that still reads [px]. */
const closestContours = 11;
const strongEvery = 5;

export interface ContourSet {
  readonly step: number;
  readonly lines: readonly Point[][];
  readonly strong: readonly Point[][];
  readonly labels: readonly LineLabel[];
}

/**
 * Contours with their labels.
 * @param clear  spots that labels keep clear of
 * @param hidden spots that lines are cut at as well, so that texts there stand free
 */
export function marginContours(
  data: SliceChartData,
  map: PixelMap,
  clear: readonly Spot[],
  hidden: readonly Spot[],
): ContourSet {
  const margin = gridField(data, data.aftMargin);
  const step = contourStep(margin, map);
  const levels = levelsOf(margin, step).map((level) => ({
    level,
    strong: level % (step * strongEvery) === 0,
    lines: inPixels(isolines(margin, level), map),
  }));
  // Round numbers are placed first, so that they keep their labels where room is short.
  const byRank = [...levels].sort((a, b) => Number(b.strong) - Number(a.strong) || a.level - b.level);
  const placed = placeOnLines(byRank.map(contourLabel), clear, slicePlot).filter((label) => label !== null);
  const spots = [...hidden, ...placed.flatMap((label) => label.spots)];
  const cut = (strong: boolean) =>
    levels
      .filter((level) => level.strong === strong)
      .flatMap(({ lines }) => lines.flatMap((line) => cutOut(line, spots)));
  return { step, lines: cut(false), strong: cut(true), labels: placed };
}

function contourLabel({ level, lines }: { level: number; lines: readonly Polyline[] }): LineLabelRequest {
  const text = `${numberText(level, 0)} %`;
  return { text, width: textWidth(text, textSize.small), height: textSize.small + 1, lines, best: 0.62 };
}

function levelsOf({ values }: GridField, step: number): number[] {
  const finite = Array.from(values).filter(Number.isFinite);
  if (finite.length === 0) return [];
  const first = Math.ceil(finite.reduce((a, b) => Math.min(a, b)) / step);
  const last = Math.floor(finite.reduce((a, b) => Math.max(a, b)) / step);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, k) => (first + k) * step);
}

/** The finest step of contours [% MAC] whose lines stand far enough apart over most of the slicePlot. */
export function contourStep(margin: GridField, map: PixelMap): number {
  const slopes = slopesPerPixel(margin, map).sort((a, b) => a - b);
  const steep = slopes[Math.floor(slopes.length * 0.7)] ?? 0;
  return contourSteps.find((step) => step >= steep * closestContours) ?? contourSteps.at(-1)!;
}

function slopesPerPixel({ xs, ys, values }: GridField, map: PixelMap): number[] {
  const slopes: number[] = [];
  const n = xs.length;
  for (let j = 0; j + 1 < ys.length; j++) {
    for (let i = 0; i + 1 < n; i++) {
      const a = map.toPixels({ x: xs[i]!, y: ys[j]! });
      const b = map.toPixels({ x: xs[i + 1]!, y: ys[j + 1]! });
      const here = values[j * n + i]!;
      const slope = Math.hypot(
        (values[j * n + i + 1]! - here) / (b.x - a.x),
        (values[(j + 1) * n + i]! - here) / (b.y - a.y),
      );
      if (Number.isFinite(slope)) slopes.push(slope);
    }
  }
  return slopes;
}

export function contourLayers(set: ContourSet, map: PixelMap): Layer[] {
  return [
    polylines(inValues(set.lines, map), { color: colours.rule, width: 0.8 }),
    polylines(inValues(set.strong, map), { color: colours.muted, width: 1.3 }),
    labels(
      set.labels.map((label) => labelAt(label, map, true)),
      { size: textSize.small, color: colours.muted },
    ),
  ];
}

export function labelAt({ text, x, y, angle }: LineLabel, map: PixelMap, turned: boolean): Label {
  return { ...map.fromPixels({ x, y }), text, ...(turned ? { angle } : {}) };
}

/** What the key says of the contours. */
export function contoursKey(data: SliceChartData, { step, lines, strong }: ContourSet): KeyItem {
  if (lines.length + strong.length > 0) {
    const style = { color: colours.muted, width: 1.3 };
    return { symbol: { kind: 'line', style }, text: `aft margin every ${step} % MAC` };
  }
  const known = Array.from(data.aftMargin).find((margin) => !Number.isNaN(margin));
  const said =
    known === undefined ? 'not computed here' : `about ${numberText(known, 1)} % MAC all over this slice`;
  return { symbol: { kind: 'none' }, text: `Aft margin ${said}` };
}
