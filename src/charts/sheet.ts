import type { TopLevelSpec } from 'vega-lite';
import type { NonNormalizedSpec } from 'vega-lite/types_unstable/spec/index.js';
import { labels } from './marks.ts';
import { panel } from './panel.ts';
import { cleanText, ellipsize, wrapText } from './text-width.ts';
import { colours, textSize, theme, weight } from './theme.ts';

/** What stands around a chart. All text is taken as text: nothing in it is ever read as markup or formula. */
export interface ChartHeading {
  /** What the chart shows. */
  readonly title: string;
  /** The study's title. */
  readonly study: string;
  /** The study's question, when it asks one. */
  readonly question?: string;
  /** Day of the run, `2026-12-01`. */
  readonly date: string;
  /** Program and version. */
  readonly program: string;
}

/** A chart as a complete Vega-Lite specification with its data inside. */
export type ChartSpec = TopLevelSpec;

/** Anything that can stand in a row of a sheet. */
export type SheetRow = NonNormalizedSpec;

const captionLine = 15;
const rowGap = 16;

export const schemaAddress = 'https://vega.github.io/schema/vega-lite/v6.json';

/**
 * A whole chart: heading, rows one under another, caption.
 * @param width width that text may take [px]
 * @param under lines under the title, before the study's title
 */
export function sheet(
  heading: ChartHeading,
  width: number,
  rows: readonly SheetRow[],
  under: readonly string[] = [],
): ChartSpec {
  const subtitle = [...under.flatMap((line) => wrapText(line, width, textSize.subtitle, 2))];
  subtitle.push(ellipsize(heading.study, width, textSize.subtitle));
  return {
    $schema: schemaAddress,
    description: cleanText(`${heading.title}. ${heading.study}`),
    config: theme,
    title: {
      text: wrapText(heading.title, width, textSize.title, 2, weight.strong),
      subtitle,
    },
    spacing: rowGap,
    vconcat: [...rows, caption(heading, width)],
  };
}

function caption(heading: ChartHeading, width: number): SheetRow {
  const size = textSize.caption;
  const made = `${heading.date}. ${heading.program}`;
  const said = 'Preliminary estimate; confirm by test. ';
  const lines = [
    ...(heading.question === undefined ? [] : wrapText(heading.question, width, size, 2)),
    ...wrapText(`${said}${ellipsize(heading.study, width * 0.6, size)}, ${made}`, width, size, 2),
  ];
  const rows = lines.map((text, line) => ({ x: 0, y: line * captionLine, text }));
  return panel({
    width,
    height: lines.length * captionLine,
    x: 'pixels',
    y: 'pixels',
    framed: false,
    layers: [labels(rows, { size, color: colours.muted, align: 'left', baseline: 'top' })],
  });
}

/** Small multiples in rows of `columns`, plots aligned. */
export function grid(panels: readonly SheetRow[], columns: number): SheetRow {
  return { concat: [...panels], columns, spacing: 26, align: 'all' } as SheetRow;
}
