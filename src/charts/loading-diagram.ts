import { arrowheads } from './geometry/arrows.ts';
import { burnPath, type MassPoint } from './geometry/burn-path.ts';
import { clipToFrame } from './geometry/clip.ts';
import { type MarkedPoint, placeBeside } from './geometry/point-labels.ts';
import { type Point, type Spot, spotsAlong } from './geometry/polyline.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import type { LoadingDiagramData } from './loading-data.ts';
import { type Layer, labels, points, polygons, polylines } from './marks.ts';
import {
  cgAbsent,
  cgAcross,
  cgSide,
  limitKey,
  limitStyle,
  lineRoom,
  type NamedLine,
  namedLineLayers,
  nameLabels,
  placeNames,
  placeTags,
} from './named-lines.ts';
import { type PixelMap, panel, pixelMap, type Scale } from './panel.ts';
import { type ChartSpec, sheet } from './sheet.ts';
import { stationAxis } from './station-axis.ts';
import { cleanText, ellipsize, numberText } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

const plot = { width: 640, height: 440 } as const;
const arrowLength = 9;
const pathRoom = 4;
const longestName = 170;
const pathLine = { color: colours.accent, width: 1.8 } as const;
const fullPoint = { shape: 'circle', size: 60, fill: colours.accent, width: 1 } as const;
const burntPoint = {
  shape: 'circle',
  size: 46,
  fill: colours.paper,
  stroke: colours.accent,
  width: 1.5,
} as const;
const emptyPoint = { shape: 'square', size: 90, fill: colours.ink } as const;

/** CG across with forward at the left (station along the top), mass upward: loading cases as paths between the limits. */
export function loadingDiagram(data: LoadingDiagramData): ChartSpec {
  const scales = { x: cgScale(data), y: massScale(data) };
  const map = pixelMap(plot.width, plot.height, scales.x, scales.y);
  const limits = limitLines(data, scales, map);
  const paths = data.cases.map(({ states }) => burnPath(states).map((state) => pixelOf(state, map)));
  const pathSpots = paths.flatMap((path) => spotsAlong(path, pathRoom, pathRoom));
  const ends = markedEnds(data, map);
  const limitNames = placeNames(limits, [...pathSpots, ...ends], plot);
  const tags = placeTags(limits, limitNames, [...pathSpots, ...ends], plot);
  const nameSpots = [...limitNames, ...tags].flatMap((text) => text?.spots ?? []);
  const keepClear = [...limits.flatMap(lineRoom), ...nameSpots, ...pathSpots];
  const caseNames = placeCaseNames(data, map, ends, keepClear);
  const layers: Layer[] = [
    ...limits.flatMap((limit) => namedLineLayers(limit, nameSpots, plot, map)),
    nameLabels(limitNames, map),
    nameLabels(tags, map),
    ...pathLayers(data, paths, map),
    labels(caseNames.labels, { size: textSize.small, weight: weight.strong }),
    ...stationAxis(data.station, scales, plot),
  ];
  const unnamed = limits.flatMap((limit, index) =>
    limitNames[index] === null ? [limitKey(limit, tags[index]!)] : [],
  );
  return sheet(
    data.heading,
    plot.width + 50,
    [
      panel({ ...plot, ...scales, layers }),
      keyRow([...keyItems(data), ...unnamed, ...caseNames.left], plot.width),
    ],
    [rangeInWords(data)],
  );
}

function rangeInWords({ cases }: LoadingDiagramData): string {
  const cgs = cases.flatMap(({ states }) => states.map(({ cg }) => cg)).filter(Number.isFinite);
  if (cgs.length === 0) return 'No loading case has a known CG';
  const [forward, aft] = [Math.min(...cgs), Math.max(...cgs)];
  if (forward === aft) return `CG of these cases: ${numberText(aft, 1)} % MAC`;
  return `CG range of these cases: ${numberText(forward, 1)} to ${numberText(aft, 1)} % MAC`;
}

function keyItems(data: LoadingDiagramData): KeyItem[] {
  const burns = data.cases.some(({ states }) => states.length > 1);
  return [
    { symbol: { kind: 'point', point: emptyPoint }, text: 'empty' },
    { symbol: { kind: 'point', point: fullPoint }, text: 'loading case, full' },
    ...(burns
      ? [
          { symbol: { kind: 'point' as const, point: burntPoint }, text: 'burnt down' },
          {
            symbol: { kind: 'none' as const },
            text: 'Arrows point the way of the burn',
          },
        ]
      : []),
    ...(data.limits.length > 0 || data.greatestMass !== undefined
      ? [{ symbol: { kind: 'none' as const }, text: 'Hatch ticks stand on the forbidden side' }]
      : []),
  ];
}

function known({ cg, mass }: MassPoint): boolean {
  return Number.isFinite(cg) && Number.isFinite(mass);
}

/** The loading decides the plot; limits farther off than `mostWidening` of it are cut. */
const mostWidening = 0.8;
function cgScale({ cases, limits, empty }: LoadingDiagramData): Scale {
  const core = [empty, ...cases.flatMap(({ states }) => states)].filter(known).map(({ cg }) => cg);
  const [least, greatest] = [Math.min(...core), Math.max(...core)];
  const further = limits
    .flatMap(({ line }) => line)
    .filter(known)
    .map(({ cg }) => cg);
  const widening = Math.max(10, (greatest - least) * mostWidening);
  const from = Math.max(least - widening, Math.min(least, ...further));
  const to = Math.min(greatest + widening, Math.max(greatest, ...further));
  const room = Math.max(1, (to - from) * 0.07);
  return { from: from - room, to: to + room, axis: { title: cgAcross, more: { tickCount: 9 } } };
}

function massScale({ cases, empty, greatestMass, massTitle }: LoadingDiagramData): Scale {
  const states = [empty, ...cases.flatMap((each) => each.states)].filter(known);
  const all = [...states.map(({ mass }) => mass), ...(greatestMass === undefined ? [] : [greatestMass])];
  const [least, greatest] = [Math.min(...all), Math.max(...all)];
  const room = (greatest - least || greatest) * 0.1;
  return {
    from: Math.max(0, least - room),
    to: greatest + room,
    axis: { title: cleanText(massTitle), more: { tickCount: 7 } },
  };
}

function pixelOf({ cg, mass }: MassPoint, map: PixelMap): Point {
  return map.toPixels({ x: cg, y: mass });
}

function limitLines(
  { limits, greatestMass }: LoadingDiagramData,
  { x, y }: { readonly x: Scale; readonly y: Scale },
  map: PixelMap,
): NamedLine[] {
  const ofCg = limits.map(({ label, forbidden, line }, index): NamedLine => {
    const [only] = line;
    const whole =
      line.length === 1
        ? [
            { cg: only!.cg, mass: y.from },
            { cg: only!.cg, mass: y.to },
          ]
        : [...line].sort((a, b) => a.mass - b.mass);
    const pixels = whole.map((point) => pixelOf(point, map));
    return {
      label,
      lines: clipToFrame(pixels, plot),
      style: limitStyle(index),
      side: cgSide(forbidden),
      absent: cgAbsent(
        line.map(({ cg }) => cg),
        forbidden,
        x,
      ),
    };
  });
  if (greatestMass === undefined) return ofCg;
  const ends = [x.from, x.to].map((cg) => pixelOf({ cg, mass: greatestMass }, map));
  return [
    ...ofCg,
    {
      label: `greatest mass ${massText(greatestMass)}`,
      lines: [ends],
      style: limitStyle(0),
      side: ({ y: down }) => (down < 0 ? 1 : -1),
      best: 0.5,
    },
  ];
}

function massText(mass: number): string {
  return numberText(mass, mass < 10 ? 2 : mass < 100 ? 1 : 0);
}

function pathLayers(data: LoadingDiagramData, paths: readonly Point[][], map: PixelMap): Layer[] {
  const at = ({ cg, mass }: MassPoint) => ({ x: cg, y: mass });
  const states = data.cases.map((each) => each.states.filter(known)).filter((each) => each.length > 0);
  const heads = paths.flatMap((path) => arrowheads(path, arrowLength));
  return [
    polylines(
      paths.flatMap((path) => clipToFrame(path, plot)).map((part) => part.map(map.fromPixels)),
      pathLine,
    ),
    polygons(
      heads.map((head) => head.map(map.fromPixels)),
      { fill: colours.accent },
    ),
    points(
      states.filter((each) => each.length > 1).map((each) => at(each.at(-1)!)),
      burntPoint,
    ),
    points(
      states.map((each) => at(each[0]!)),
      fullPoint,
    ),
    points(known(data.empty) ? [at(data.empty)] : [], emptyPoint),
  ];
}

const endRadius = 5;
/** Both ends of every path and the empty point. */
function markedEnds({ cases, empty }: LoadingDiagramData, map: PixelMap): Spot[] {
  const ends = cases.flatMap(({ states }) => (states.length > 0 ? [states[0]!, states.at(-1)!] : []));
  return [empty, ...ends].filter(known).map((state) => ({ ...pixelOf(state, map), radius: endRadius }));
}

interface CaseNames {
  readonly labels: { x: number; y: number; text: string }[];
  /** Key lines of the cases that found no room. */
  readonly left: KeyItem[];
}

/** Names beside the full end of their paths, else beside the burnt one; without room there, a number and the name in the key. */
function placeCaseNames(
  { cases, empty }: LoadingDiagramData,
  map: PixelMap,
  ends: readonly Spot[],
  keepClear: readonly Spot[],
): CaseNames {
  const placed: CaseNames = { labels: [], left: [] };
  const taken = [...keepClear, ...ends];
  const place = (text: string, states: readonly MassPoint[]): boolean => {
    for (const state of states) {
      const own: MarkedPoint = { ...pixelOf(state, map), radius: endRadius, text };
      const { labels: [found] = [], spots } = placeBeside([own], taken, plot);
      if (found === undefined) continue;
      taken.push(...spots);
      placed.labels.push({ ...map.fromPixels(found), text });
      return true;
    }
    return false;
  };
  if (known(empty)) place('empty', [empty]);
  for (const { label, states } of cases) {
    const usable = states.filter(known);
    const [full, burnt] = [usable[0], usable.at(-1)];
    if (full === undefined || burnt === undefined) {
      placed.left.push({ symbol: { kind: 'none' }, text: `${cleanText(label)}: CG not known` });
      continue;
    }
    const name = ellipsize(label, longestName, textSize.small, weight.strong);
    if (place(name, [full, burnt])) continue;
    const number = String(placed.left.length + 1);
    const found = place(number, [full, burnt]);
    placed.left.push(found ? numbered(number, label) : inWords(label, full, burnt));
  }
  return placed;
}

function numbered(number: string, label: string): KeyItem {
  return { symbol: { kind: 'none' }, text: `${number} ${cleanText(label)}` };
}

/** Where even a number has no room, the case is told by its mass and CG. */
function inWords(label: string, full: MassPoint, burnt: MassPoint): KeyItem {
  const state = ({ mass, cg }: MassPoint) => `${massText(mass)} at ${numberText(cg, 1)} %`;
  const way = full === burnt ? state(full) : `${state(full)} to ${state(burnt)}`;
  return { symbol: { kind: 'line', style: pathLine }, text: `${cleanText(label)}: ${way}` };
}
