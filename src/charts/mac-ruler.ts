import { spread } from './geometry/spread.ts';
import { type KeyItem, keyRow } from './key-row.ts';
import { bars, type Label, type Layer, labels, mergeAlike, points, type Segment, segments } from './marks.ts';
import { panel, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, sheet } from './sheet.ts';
import { ellipsize, numberText, textWidth } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

/** One combination's places on its mean aerodynamic chord, all in % MAC. */
export interface MacRulerRow {
  /** `#1234` */
  readonly label: string;
  /** Its key values in words: `span 9.5 m, tail arm 4.3 m`. */
  readonly detail: string;
  readonly cg: { readonly forward: number; readonly aft: number };
  /** CG positions that the band allows; reversed means that it allows none. An edge that the band leaves open is absent. */
  readonly window: { readonly from?: number; readonly to?: number };
  readonly neutralPoint: number;
  /** Aerodynamic centre of the wing. */
  readonly aerodynamicCentre: number;
}
export interface MacRulerData {
  readonly heading: ChartHeading;
  readonly rows: readonly MacRulerRow[];
}

const width = 620;
/** Lanes of one row, from its top [px]. */
const lane = { name: 8, bracket: 29, strip: 38, stripHeight: 12, below: 62, row: 86 } as const;
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
  const height = data.rows.length * lane.row;
  const layers = mergeAlike(data.rows.flatMap((row, index) => rowLayers(row, index * lane.row, x)));
  return sheet(data.heading, width + 30, [
    keyRow(keyItems(), width),
    panel({ width, height, x, y: 'pixels', layers, framed: false }),
  ]);
}

function keyItems(): KeyItem[] {
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
      text: 'CG window that the band allows',
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
  ];
}

/** 0–100 % MAC, and further in tens where a combination needs it. */
function chordScale(rows: readonly MacRulerRow[]): Scale {
  const all = rows
    .flatMap(({ cg, window, neutralPoint, aerodynamicCentre }) => [
      cg.forward,
      cg.aft,
      neutralPoint,
      aerodynamicCentre,
      window.from,
      window.to,
    ])
    .filter((value): value is number => value !== undefined && Number.isFinite(value));
  const from = Math.min(0, Math.floor(Math.min(...all) / 10) * 10);
  const to = Math.max(100, Math.ceil(Math.max(...all) / 10) * 10);
  return { from, to, axis: { title: 'Behind the leading edge of the MAC [% MAC]', more: { tickCount: 10 } } };
}

function rowLayers(row: MacRulerRow, top: number, x: Scale): Layer[] {
  const strip = { y: top + lane.strip, y2: top + lane.strip + lane.stripHeight };
  const middle = (strip.y + strip.y2) / 2;
  const inset = 2;
  return [
    bars([{ x: 0, x2: 100, ...strip }], { fill: colours.wash, stroke: colours.rule }),
    segments([{ x: quarterMac, x2: quarterMac, y: strip.y - 1, y2: strip.y2 + 1 }], quarterLine),
    bars(known([{ ...cgBar(row, x), y: strip.y + inset, y2: strip.y2 - inset }]), { fill: colours.accent }),
    points(known([{ x: row.aerodynamicCentre, y: strip.y2 + 2 }]), centreMark),
    points(known([{ x: row.neutralPoint, y: middle }]), neutralPointMark),
    ...windowLayers(row, top, x),
    ...nameLayers(row, top, x),
    labels(belowLabels(row, top + lane.below, x), { size: textSize.small, baseline: 'top' }),
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
function windowLayers({ window }: MacRulerRow, top: number, x: Scale): Layer[] {
  const { from, to } = window;
  const y = top + lane.bracket;
  const foot = top + lane.strip - 2;
  if (from === undefined && to === undefined) return [];
  const start = from ?? x.from;
  const end = to ?? x.to;
  if (!Number.isFinite(start) || !Number.isFinite(end)) return [];
  const style = { size: textSize.small, color: colours.accentDark };
  if (start > end) {
    const said = `CG window empty: it would run from ${numberText(start, 1)} to ${numberText(end, 1)} %`;
    return [labels([{ x: x.from, y, text: said }], { ...style, align: 'left' })];
  }
  const rows: Segment[] = [{ x: start, x2: end, y, y2: y }];
  if (from !== undefined) rows.push({ x: from, x2: from, y, y2: foot });
  if (to !== undefined) rows.push({ x: to, x2: to, y, y2: foot });
  const text = `window ${windowText(window)}`;
  const perPixel = (x.to - x.from) / width;
  const roomRight = (x.to - end) / perPixel;
  const right = roomRight > textWidth(text, textSize.small) + 8;
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
function belowLabels({ cg, neutralPoint, aerodynamicCentre }: MacRulerRow, y: number, x: Scale): Label[] {
  const wanted = [
    { at: aerodynamicCentre, text: `a.c. ${numberText(aerodynamicCentre, 1)} %` },
    { at: (cg.forward + cg.aft) / 2, text: `CG ${rangeText(cg.forward, cg.aft)}` },
    { at: neutralPoint, text: `n.p. ${numberText(neutralPoint, 1)} %` },
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
