import { hatchTicks } from './geometry/hatch.ts';
import { spread } from './geometry/spread.ts';
import type { KeyItem, PointStyle } from './key-row.ts';
import type { MacRulerData, MacRulerRow } from './mac-ruler-data.ts';
import { type Layer, labels, type Segment, segments } from './marks.ts';
import type { Scale } from './panel.ts';
import { cleanText, numberText, textWidth } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

interface FurtherMark {
  readonly text: string;
  /** As printed under the strip. */
  readonly short: string;
  readonly point: PointStyle;
  readonly placeOf: (row: MacRulerRow) => number | undefined;
}
const open = { fill: colours.paper, stroke: colours.ink, width: 1.4 } as const;

/** Marks on the strip beside the neutral point; each is drawn and keyed only where it is given. */
export const furtherMarks: readonly FurtherMark[] = [
  {
    text: 'neutral point, stick free',
    short: 'n.p. free',
    point: { shape: 'diamond', size: 90, ...open },
    placeOf: ({ freeStickNeutralPoint }) => freeStickNeutralPoint,
  },
  {
    text: 'manoeuvre point',
    short: 'm.p.',
    point: { shape: 'circle', size: 80, fill: colours.ink },
    placeOf: ({ manoeuvrePoint }) => manoeuvrePoint,
  },
  {
    text: 'manoeuvre point, stick free',
    short: 'm.p. free',
    point: { shape: 'circle', size: 70, ...open },
    placeOf: ({ freeStickManoeuvrePoint }) => freeStickManoeuvrePoint,
  },
];

const tickEnd = 5;
const numberTop = 10;
const numberGap = 5;

/** Numbers of the conditions under the strip, each tied to its neutral point; equal places share a number's place. */
export function conditionLayers(
  neutralPoints: readonly number[],
  bottom: number,
  x: Scale,
  width: number,
): Layer[] {
  const marks = groupByPlace(neutralPoints);
  const perPixel = (x.to - x.from) / width;
  const places = spread(
    marks.map(({ at, text }) => ({ at, size: textWidth(text, textSize.small, weight.strong) * perPixel })),
    x.from,
    x.to,
    numberGap * perPixel,
  );
  const ties = marks.flatMap(({ at }, index): Segment[] => [
    { x: at, x2: at, y: bottom - 2, y2: bottom + tickEnd },
    { x: at, x2: places[index]!, y: bottom + tickEnd, y2: bottom + numberTop },
  ]);
  const numbers = marks.map(({ text }, index) => ({ x: places[index]!, y: bottom + numberTop + 1, text }));
  return [
    segments(ties, { color: colours.ink, width: 1 }),
    labels(numbers, { size: textSize.small, weight: weight.strong, baseline: 'top' }),
  ];
}

/** Conditions whose neutral points print alike are told together: `1, 3`. */
export function groupByPlace(neutralPoints: readonly number[]): { at: number; text: string }[] {
  const groups = new Map<string, { at: number; text: string }>();
  neutralPoints.forEach((at, index) => {
    if (!Number.isFinite(at)) return;
    const key = numberText(at, 1);
    const before = groups.get(key);
    groups.set(key, {
      at: before?.at ?? at,
      text: before === undefined ? `${index + 1}` : `${before.text}, ${index + 1}`,
    });
  });
  return [...groups.values()];
}

/** Which number is which condition. */
export function conditionKey({ conditions = [], rows }: MacRulerData): KeyItem[] {
  if (rows.every(({ neutralPoints = [] }) => neutralPoints.length === 0)) return [];
  return [
    { symbol: { kind: 'none' }, text: 'Neutral point in each condition:' },
    ...conditions.map(
      (name, index): KeyItem => ({ symbol: { kind: 'none' }, text: `${index + 1} ${cleanText(name)}` }),
    ),
  ];
}

const limitLine = { color: colours.ink, width: 1.6 } as const;
const hatchLine = { color: colours.ink, width: 1 } as const;

/** How far the control limit stands out of the strip [px]. */
const overhang = 3;
/** The control limit across the strip, hatched forward of it. */
export function controlLimitLayers(
  { controlLimit }: MacRulerRow,
  strip: { readonly y: number; readonly y2: number },
  x: Scale,
  width: number,
): Layer[] {
  if (controlLimit === undefined || !Number.isFinite(controlLimit.at)) return [];
  const [top, bottom] = [strip.y - overhang, strip.y2 + overhang];
  const { at } = controlLimit;
  const perPixel = (x.to - x.from) / width;
  const line = [
    { x: (at - x.from) / perPixel, y: top },
    { x: (at - x.from) / perPixel, y: bottom },
  ];
  const ticks = hatchTicks(line, 5, 6, (_, normal) => (normal.x < 0 ? 1 : -1));
  const rows = ticks.map(({ from, to }) => ({
    x: x.from + from.x * perPixel,
    x2: x.from + to.x * perPixel,
    y: from.y,
    y2: to.y,
  }));
  return [segments([{ x: at, x2: at, y: top, y2: bottom }], limitLine), segments(rows, hatchLine)];
}

export function controlLimitKey({ rows }: MacRulerData): KeyItem[] {
  if (rows.every(({ controlLimit }) => controlLimit === undefined)) return [];
  return [
    { symbol: { kind: 'line', style: limitLine, ticks: true }, text: 'control limit, hatched forward of it' },
  ];
}

const same = 1e-6;
/** What the control limit does to the window, in words. */
export function controlLimitText({ controlLimit, window }: MacRulerRow): string {
  if (controlLimit === undefined) return '';
  const name = cleanText(controlLimit.name);
  if (!Number.isFinite(controlLimit.at)) return `; control limit not known (${name})`;
  if (window.from !== undefined && Math.abs(window.from - controlLimit.at) < same)
    return `, front set by ${name}`;
  return `; control limit ${numberText(controlLimit.at, 1)} % (${name})`;
}
