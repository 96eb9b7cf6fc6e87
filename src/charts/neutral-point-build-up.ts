import { bars, type Label, type Layer, labels, type Segment, segments } from './marks.ts';
import { type Panel, panel, type Scale } from './panel.ts';
import { type ChartHeading, type ChartSpec, grid, sheet } from './sheet.ts';
import { ellipsize, numberText, wrapText } from './text-width.ts';
import { colours, textSize, weight } from './theme.ts';

/** How one combination's neutral point comes about; all in % MAC. */
export interface BuildUp {
  /** `#1234` */
  readonly label: string;
  readonly detail: string;
  /** The steps in order: the wing's own place first, then what each part adds (aft positive). They add up to the neutral point. */
  readonly steps: readonly { readonly name: string; readonly change: number }[];
  readonly neutralPoint: number;
}
export interface NeutralPointBuildUpData {
  readonly heading: ChartHeading;
  readonly combinations: readonly BuildUp[];
}

const plotWidths = [420, 330, 250] as const;
const step = 22;
const barHeight = 13;
const textRoom = 44;

/** Stepped bars from the wing's own place to the neutral point, values printed. */
export function neutralPointBuildUp(data: NeutralPointBuildUpData): ChartSpec {
  const columns = Math.min(plotWidths.length, data.combinations.length);
  const plotWidth = plotWidths[columns - 1]!;
  const x = positionScale(data.combinations, plotWidth);
  const panels = data.combinations.map((combination, index) =>
    buildUpPanel(combination, x, plotWidth, index % columns === 0),
  );
  const width = Math.max(columns * (plotWidth + 30) + 80, 560);
  return sheet(
    data.heading,
    width,
    [grid(panels, columns)],
    ['What each part adds to the neutral point; a bar to the right moves it aft'],
  );
}

interface Bar {
  readonly name: string;
  readonly from: number;
  readonly to: number;
  readonly text: string;
  readonly total: boolean;
}

/** Where each bar starts and ends: the first from 0, every further one from the end of the one before. */
export function stackedBars({ steps, neutralPoint }: BuildUp): Bar[] {
  let reached = 0;
  const stacked = steps.map(({ name, change }, index) => {
    const from = reached;
    reached += change;
    const text = numberText(change, 1);
    const sign = index > 0 && Number(text) > 0 ? '+' : '';
    return { name, from, to: reached, text: sign + text, total: false };
  });
  return [
    ...stacked,
    { name: 'neutral point', from: 0, to: neutralPoint, text: numberText(neutralPoint, 1), total: true },
  ];
}

function positionScale(combinations: readonly BuildUp[], plotWidth: number): Scale {
  const ends = combinations
    .flatMap((combination) => stackedBars(combination).flatMap(({ from, to }) => [from, to]))
    .filter(Number.isFinite);
  const least = Math.min(0, ...ends);
  const greatest = Math.max(10, ...ends);
  const perPixel = (greatest - least) / (plotWidth - textRoom * (least < 0 ? 2 : 1));
  return {
    from: least < 0 ? least - textRoom * perPixel : 0,
    to: greatest + textRoom * perPixel,
    axis: { title: 'Behind the leading edge of the MAC [% MAC]', more: { tickCount: 5 } },
  };
}

function buildUpPanel(combination: BuildUp, x: Scale, plotWidth: number, first: boolean): Panel {
  const all = stackedBars(combination).filter(({ from, to }) => Number.isFinite(from) && Number.isFinite(to));
  const top = (index: number) => index * step + (step - barHeight) / 2;
  const rows = (total: boolean): Segment[] =>
    all.flatMap((bar, index) =>
      bar.total === total ? [{ x: bar.from, x2: bar.to, y: top(index), y2: top(index) + barHeight }] : [],
    );
  const joints: Segment[] = all.slice(1).map((bar, index) => {
    const at = bar.total ? bar.to : bar.from;
    return { x: at, x2: at, y: top(index) + barHeight, y2: top(index + 1) };
  });
  const layers: Layer[] = [
    bars(rows(false), { fill: colours.accentTint, stroke: colours.accent }),
    bars(rows(true), { fill: colours.accent }),
    segments(joints, { color: colours.rule, width: 1 }),
    labels(valueLabels(all, top, false), { size: textSize.small, align: 'left', dx: 5 }),
    labels(valueLabels(all, top, true), { size: textSize.small, align: 'right', dx: -5 }),
    ...(first ? [nameLabels(all, x)] : []),
  ];
  const title = [ellipsize(combination.label, plotWidth, textSize.panel, weight.strong)];
  const subtitle = wrapText(combination.detail, plotWidth, textSize.small, 2);
  return panel({
    width: plotWidth,
    height: (combination.steps.length + 1) * step,
    x,
    y: 'pixels',
    layers,
    title,
    subtitle,
  });
}

/** Values of forward steps stand left of their bar, the others right. */
function valueLabels(all: readonly Bar[], top: (index: number) => number, forward: boolean): Label[] {
  return all.flatMap(({ from, to, text }, index) =>
    to < from === forward
      ? [{ x: forward ? to : Math.max(from, to), y: top(index) + barHeight / 2, text }]
      : [],
  );
}

const longestName = 150;
function nameLabels(all: readonly Bar[], x: Scale): Layer {
  const rows = all.map(({ name }, index) => ({
    x: x.from,
    y: index * step + step / 2,
    text: ellipsize(name, longestName, textSize.axis),
  }));
  return labels(rows, { size: textSize.axis, align: 'right', dx: -8 });
}
