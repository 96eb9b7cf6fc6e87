import { spread } from './geometry/spread.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import type { MacRulerData, MacRulerRow } from './mac-ruler-data.ts';
import {
  conditionKey,
  conditionLayers,
  controlLimitKey,
  controlLimitLayers,
  controlLimitText,
  furtherMarks,
} from './mac-ruler-marks.ts';
import { bars, type Label, type Layer, labels, mergeAlike, points, type Segment, segments } from './marks.ts';
import { panel, type Scale } from './panel.ts';
import { type ChartSpec, sheet } from './sheet.ts';
import { ellipsize, numberText, textWidth } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

const width = 620;
/** Lanes of one row, from its top [px]. */
const lane = { name: 8, bracket: 29, strip: 38, stripHeight: 12, below: 62, row: 86 } as const;
/** Room under the strip for the numbers of the conditions [px]. */
const conditionRoom = 18;
const quarterMac = 25;
const neutralPointMark = { shape: 'diamond', size: 110, fill: colours.ink } as const;
const centreMark = {
  shape: 'triangle-up',
  size: 55,
  fill: colours.paper,
  stroke: colours.ink,
  width: 1.2,
} as const;
const bracketLine = { color: colours.accent, width: 1.5 } as const;
const quarterLine = { color: colours.ink, width: 1 } as const;

/** A strip of the mean aerodynamic chord for each combination: CG range, CG window, neutral point, aerodynamic centre. */
export function macRuler(data: MacRulerData): ChartSpec {
  const x = chordScale(data.rows);
  const extra = data.rows.some(({ neutralPoints = [] }) => neutralPoints.length > 0) ? conditionRoom : 0;
  const rowHeight = lane.row + extra;
  const height = data.rows.length * rowHeight;
  const layers = mergeAlike(data.rows.flatMap((row, index) => rowLayers(row, index * rowHeight, extra, x)));
  return sheet(data.heading, width + 30, [
    keyRow(keyItems(data), width),
    panel({ width, height, x, y: 'pixels', layers, framed: false }),
  ]);
}

function keyItems(data: MacRulerData): KeyItem[] {
  return [
    { symbol: { kind: 'swatch', fill: colours.accent }, text: 'CG range' },
    {
      symbol: {
        kind: 'point',
        point: {
          shape: 'M-0.5,0.3V-0.3H0.5V0.3',
          size: 190,
          fill: 'transparent',
          stroke: colours.accent,
          width: 1.5,
        },
      },
      text: data.rows.some(({ controlLimit }) => controlLimit !== undefined)
        ? 'CG window that band and control allow'
        : 'CG window that the band allows',
    },
    { symbol: { kind: 'point', point: neutralPointMark }, text: 'neutral point' },
    { symbol: { kind: 'point', point: centreMark }, text: 'wing aerodynamic centre' },
    {
      symbol: {
        kind: 'point',
        point: { shape: 'M0,-0.5V0.5', size: 190, fill: 'transparent', stroke: colours.ink, width: 1 },
      },
      text: 'quarter MAC',
    },
    ...furtherMarks.flatMap(({ point, text, placeOf }) =>
      data.rows.some((row) => placeOf(row) !== undefined)
        ? [{ symbol: { kind: 'point' as const, point }, text }]
        : [],
    ),
    ...controlLimitKey(data),
    ...conditionKey(data),
  ];
}

/** 0–100 % MAC, and further in tens where a combination needs it. */
function chordScale(rows: readonly MacRulerRow[]): Scale {
  const all = rows
    .flatMap((row) => [
      row.cg.forward,
      row.cg.aft,
      row.neutralPoint,
      row.aerodynamicCentre,
      row.window.from,
      row.window.to,
      row.controlLimit?.at,
      ...(row.neutralPoints ?? []),
      ...furtherMarks.map(({ placeOf }) => placeOf(row)),
    ])
    .filter((value): value is number => value !== undefined && Number.isFinite(value));
  const from = Math.min(0, Math.floor(Math.min(...all) / 10) * 10);
  const to = Math.max(100, Math.ceil(Math.max(...all) / 10) * 10);
  return { from, to, axis: { title: 'Behind the leading edge of the MAC [% MAC]', more: { tickCount: 10 } } };
}

function rowLayers(row: MacRulerRow, top: number, extra: number, x: Scale): Layer[] {
  const strip = { y: top + lane.strip, y2: top + lane.strip + lane.stripHeight };
  const middle = (strip.y + strip.y2) / 2;
  const inset = 2;
  return [
    bars([{ x: 0, x2: 100, ...strip }], { fill: colours.wash, stroke: colours.rule }),
    segments([{ x: quarterMac, x2: quarterMac, y: strip.y - 1, y2: strip.y2 + 1 }], quarterLine),
    bars(known([{ ...cgBar(row, x), y: strip.y + inset, y2: strip.y2 - inset }]), { fill: colours.accent }),
    points(known([{ x: row.aerodynamicCentre, y: strip.y2 + 2 }]), centreMark),
    ...furtherMarks.map(({ point, placeOf }) =>
      points(known([{ x: placeOf(row) ?? Number.NaN, y: middle }]), point),
    ),
    points(known([{ x: row.neutralPoint, y: middle }]), neutralPointMark),
    ...conditionLayers(row.neutralPoints ?? [], strip.y2, x, width),
    ...controlLimitLayers(row, strip, x, width),
    ...windowLayers(row, top, x),
    ...nameLayers(row, top, x),
    labels(belowLabels(row, top + lane.below + extra, x), { size: textSize.small, baseline: 'top' }),
  ];
}

const thinnestBar = 3;
/** The CG range, never thinner than can be seen. */
function cgBar({ cg }: MacRulerRow, x: Scale): { x: number; x2: number } {
  const thin = (thinnestBar / 2 / width) * (x.to - x.from);
  const middle = (cg.forward + cg.aft) / 2;
  return { x: Math.min(cg.forward, middle - thin), x2: Math.max(cg.aft, middle + thin) };
}

function known<T extends { x: number }>(positions: readonly T[]): T[] {
  return positions.filter((position) => Number.isFinite(position.x));
}

const nameGap = 10;
function nameLayers({ label, detail }: MacRulerRow, top: number, x: Scale): Layer[] {
  const name = ellipsize(label, width / 3, textSize.label, weight.strong);
  const dx = textWidth(name, textSize.label, weight.strong) + nameGap;
  const y = top + lane.name;
  const after = x.from + (dx / width) * (x.to - x.from);
  const words = ellipsize(detail, width - dx, textSize.small);
  return [
    labels([{ x: x.from, y, text: name }], { weight: weight.strong, align: 'left' }),
    labels([{ x: after, y, text: words }], { size: textSize.small, color: colours.muted, align: 'left' }),
  ];
}

/** The window as a bracket over the strip, with its numbers; an open side has no foot. */
function windowLayers(row: MacRulerRow, top: number, x: Scale): Layer[] {
  const { from, to } = row.window;
  const y = top + lane.bracket;
  const foot = top + lane.strip - 2;
  if (from === undefined && to === undefined) return [];
  const start = from ?? x.from;
  const end = to ?? x.to;
  if (!Number.isFinite(start) || !Number.isFinite(end)) return [];
  const style = { size: textSize.small, color: colours.accentDark };
  if (start > end) {
    const said = `CG window empty: it would run from ${numberText(start, 1)} to ${numberText(end, 1)} %`;
    const text = ellipsize(said + controlLimitText(row), width, textSize.small);
    return [labels([{ x: x.from, y, text }], { ...style, align: 'left' })];
  }
  const rows: Segment[] = [{ x: start, x2: end, y, y2: y }];
  if (from !== undefined) rows.push({ x: from, x2: from, y, y2: foot });
  if (to !== undefined) rows.push({ x: to, x2: to, y, y2: foot });
  const said = `window ${windowText(row.window)}${controlLimitText(row)}`;
  const perPixel = (x.to - x.from) / width;
  const [roomLeft, roomRight] = [(start - x.from) / perPixel - 8, (x.to - end) / perPixel - 8];
  const right = roomRight > textWidth(said, textSize.small) || roomRight > roomLeft;
  const text = ellipsize(said, right ? roomRight : roomLeft, textSize.small);
  return [
    segments(rows, bracketLine),
    labels([{ x: right ? end : start, y, text }], {
      ...style,
      align: right ? 'left' : 'right',
      dx: right ? 6 : -6,
    }),
  ];
}

function windowText({ from, to }: MacRulerRow['window']): string {
  if (from === undefined) return `up to ${numberText(to!, 1)} %`;
  return to === undefined ? `from ${numberText(from, 1)} % aft` : rangeText(from, to);
}

/** A dash between numbers would hide in minus signs. */
function rangeText(from: number, to: number): string {
  return `${numberText(from, 1)}${from < 0 || to < 0 ? ' to ' : '–'}${numberText(to, 1)} %`;
}

/** CG range, neutral point and aerodynamic centre in numbers under their marks, moved apart where they would touch. */
function belowLabels(row: MacRulerRow, y: number, x: Scale): Label[] {
  const { cg, neutralPoint, aerodynamicCentre } = row;
  const wanted = [
    { at: aerodynamicCentre, text: `a.c. ${numberText(aerodynamicCentre, 1)} %` },
    { at: (cg.forward + cg.aft) / 2, text: `CG ${rangeText(cg.forward, cg.aft)}` },
    { at: neutralPoint, text: `n.p. ${numberText(neutralPoint, 1)} %` },
    ...furtherMarks.map(({ short, placeOf }) => {
      const at = placeOf(row) ?? Number.NaN;
      return { at, text: `${short} ${numberText(at, 1)} %` };
    }),
  ].filter(({ at }) => Number.isFinite(at));
  const perPixel = (x.to - x.from) / width;
  const gap = 10 * perPixel;
  const places = spread(
    wanted.map(({ at, text }) => ({ at, size: textWidth(text, textSize.small) * perPixel })),
    x.from,
    x.to,
    gap,
  );
  return wanted.map(({ text }, index) => ({ x: places[index]!, y, text }));
}
