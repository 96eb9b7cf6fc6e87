import { areaAtLeast } from './geometry/contours.ts';
import { type MarkedPoint, placeBeside } from './geometry/point-labels.ts';
import type { Point } from './geometry/polyline.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import { type Layer, labels, points, polygons } from './marks.ts';
import { type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartSpec, sheet } from './sheet.ts';
import { type ContourSet, contourLayers, contoursKey, labelAt, marginContours } from './slice-contours.ts';
import { type GridAxis, gridField, type SliceChartData, slicePlot } from './slice-data.ts';
import { type Edge, edgeLayers, edgeSpots, placeTags, requirementEdge } from './slice-edges.ts';
import { cleanText } from './text-width.ts';
import { colours, textSize } from './theme.ts';

/**
 * Slice through the baseline over two axes: aft margin as contours, each requirement's edge hatched
 * on its failing side, the feasible area shaded, baseline and shortlisted combinations marked.
 */
export function sliceChart(data: SliceChartData): ChartSpec {
  const scales = { x: gridScale(data.x), y: gridScale(data.y) };
  const map = pixelMap(slicePlot.width, slicePlot.height, scales.x, scales.y);
  const edges = data.requirements.map((requirement, index) => requirementEdge(requirement, index, data, map));
  const marks = markedPoints(data, map);
  const beside = placeBeside(marks, edges.flatMap(edgeSpots), slicePlot);
  const clear = [...edges.flatMap(edgeSpots), ...beside.spots];
  const tags = placeTags(edges, clear);
  const tagSpots = tags.flatMap((tag) => tag?.spots ?? []);
  const contourSet = marginContours(data, map, [...clear, ...tagSpots], [...beside.spots, ...tagSpots]);
  const feasible = feasibleArea(data);
  const layers = [
    polygons(feasible, { fill: colours.accentTint }),
    ...contourLayers(contourSet, map),
    ...edges.flatMap((edge, index) => edgeLayers(edge, tags[index]?.spots ?? [], map)),
    labels(
      tags.flatMap((tag) => (tag === null ? [] : [labelAt(tag, map, false)])),
      { weight: 600 },
    ),
    ...pointLayers(data),
    labels(
      beside.labels.map(({ x, y, text }) => ({ ...map.fromPixels({ x, y }), text })),
      { weight: 600, size: textSize.small },
    ),
  ];
  const rows = [
    panel({ ...slicePlot, ...scales, layers }),
    keyRow(keyItems(data, edges, feasible.length > 0, contourSet), slicePlot.width),
  ];
  return sheet(data.heading, slicePlot.width + 40, rows, [
    'Slice through the baseline: every other number is held at its baseline value',
  ]);
}

function gridScale({ title, values }: GridAxis): Scale {
  return {
    from: values[0]!,
    to: values[values.length - 1]!,
    axis: { title: cleanText(title), more: { tickCount: 8 } },
  };
}

/** Where every requirement is kept; empty when there are none to keep. */
function feasibleArea(data: SliceChartData): Point[][] {
  if (data.requirements.length === 0) return [];
  const inCells = data.requirements.map(({ slack }) => ({
    slack,
    step: steepestStep(slack, data.x.values.length),
  }));
  const least = Array.from({ length: data.aftMargin.length }, (_, index) =>
    inCells.reduce(
      (worst, { slack, step }) => Math.min(worst, slack[index]! / step),
      Number.POSITIVE_INFINITY,
    ),
  );
  return areaAtLeast(gridField(data, least), 0);
}

/**
 * Largest change of a slack from one grid point to the next; 1 for a level one. Slacks divided by it
 * count in cells, so that the least of several runs straight up to each one's own edge.
 */
function steepestStep(slack: ArrayLike<number>, columns: number): number {
  let steepest = 0;
  for (let index = 0; index < slack.length; index++) {
    const across = index % columns === 0 ? 0 : Math.abs(slack[index]! - slack[index - 1]!);
    const upward = index < columns ? 0 : Math.abs(slack[index]! - slack[index - columns]!);
    if (across > steepest) steepest = across;
    if (upward > steepest) steepest = upward;
  }
  return steepest === 0 ? 1 : steepest;
}

const baselinePoint = { shape: 'square', size: 110, fill: colours.ink } as const;
const pickPoint = { shape: 'diamond', size: 120, fill: colours.accent } as const;

function isInside(data: SliceChartData, { x, y }: { x: number; y: number }): boolean {
  const within = (axis: GridAxis, value: number) =>
    value >= axis.values[0]! && value <= axis.values[axis.values.length - 1]!;
  return within(data.x, x) && within(data.y, y);
}

function pointLayers(data: SliceChartData): Layer[] {
  const baseline = data.baseline !== undefined && isInside(data, data.baseline) ? [data.baseline] : [];
  return [
    points(
      data.picks.filter((pick) => isInside(data, pick)),
      pickPoint,
    ),
    points(baseline, baselinePoint),
  ];
}

const namesAtOnePlace = 2;
/** Picks that fall on one place share one label. */
function markedPoints(data: SliceChartData, map: PixelMap): MarkedPoint[] {
  const places = new Map<string, { at: Point; names: string[] }>();
  for (const pick of data.picks.filter((each) => isInside(data, each))) {
    const key = `${pick.x} ${pick.y}`;
    const place = places.get(key) ?? { at: map.toPixels(pick), names: [] };
    place.names.push(cleanText(pick.label));
    places.set(key, place);
  }
  const picks = [...places.values()].map(({ at, names }) => {
    const rest = names.length - namesAtOnePlace;
    const text = names.slice(0, namesAtOnePlace).join(', ') + (rest > 0 ? ` +${rest}` : '');
    return { ...at, radius: 8, text };
  });
  const baseline =
    data.baseline !== undefined && isInside(data, data.baseline)
      ? [{ ...map.toPixels(data.baseline), radius: 8, text: '' }]
      : [];
  return [...baseline, ...picks];
}

function keyItems(
  data: SliceChartData,
  edges: readonly Edge[],
  feasible: boolean,
  contours: ContourSet,
): KeyItem[] {
  const items: KeyItem[] = edges.map(({ letter, name, style, everywhere }) =>
    everywhere === undefined
      ? { symbol: { kind: 'letter', letter, style }, text: name }
      : { symbol: { kind: 'none' }, text: `${cleanText(name)}: ${everywhere} everywhere here` },
  );
  items.push(
    feasible
      ? {
          symbol: { kind: 'swatch', fill: colours.accentTint },
          text: 'feasible; hatch ticks stand on the failing side',
        }
      : { symbol: { kind: 'none' }, text: 'No point of this slice is feasible' },
    contoursKey(data, contours),
  );
  if (data.baseline !== undefined)
    items.push({ symbol: { kind: 'point', point: baselinePoint }, text: 'baseline' });
  if (data.picks.length > 0)
    items.push({
      symbol: { kind: 'point', point: pickPoint },
      text: 'shortlisted (its other numbers may differ)',
    });
  return items;
}
