import type { Config } from 'vega-lite';

/** Colours: ink, greys and one accent. Everything is told by lightness, shape or line as well as by hue. */
export const colours = {
  paper: '#ffffff',
  ink: '#1f262d',
  muted: '#59636d',
  rule: '#9aa4ad',
  faint: '#d5dade',
  wash: '#eef1f3',
  accent: '#0c5a73',
  accentTint: '#d3e5ea',
  accentDark: '#083f52',
} as const;

/** Lightness ramp of cells, from least to most. */
export const ramp = ['#e9f1f3', '#8fb9c6', '#0a4a60'] as const;

export const fontFamily = 'Inter, system-ui, "Segoe UI", "Helvetica Neue", Arial, sans-serif';

/** Sizes of text [px]. */
export const textSize = {
  title: 17,
  subtitle: 12,
  panel: 12,
  axis: 11,
  label: 11,
  small: 10,
  caption: 10.5,
} as const;

export const weight = { normal: 400, strong: 600 } as const;
export type Weight = (typeof weight)[keyof typeof weight];

/** The look of every chart, as a Vega-Lite configuration. */
export const theme: Config = {
  background: colours.paper,
  padding: 18,
  font: fontFamily,
  // Thousands of marks need no spoken label each; the picture as a whole has its description.
  aria: false,
  view: { stroke: colours.faint, strokeWidth: 1 },
  axis: {
    labelFontSize: textSize.axis,
    labelColor: colours.muted,
    labelPadding: 5,
    titleFontSize: textSize.axis,
    titleFontWeight: weight.normal,
    titleColor: colours.ink,
    titlePadding: 9,
    domainColor: colours.rule,
    tickColor: colours.rule,
    tickSize: 4,
    grid: false,
    labelLimit: 220,
    titleLimit: 0,
    labelFlush: false,
  },
  title: {
    anchor: 'start',
    frame: 'bounds',
    color: colours.ink,
    fontSize: textSize.title,
    fontWeight: weight.strong,
    lineHeight: 22,
    subtitleColor: colours.muted,
    subtitleFontSize: textSize.subtitle,
    subtitleLineHeight: 17,
    subtitlePadding: 5,
    offset: 14,
    limit: 0,
  },
  legend: {
    labelFontSize: textSize.axis,
    labelColor: colours.muted,
    titleFontSize: textSize.axis,
    titleFontWeight: weight.normal,
    titleColor: colours.ink,
  },
  text: { fontSize: textSize.label, color: colours.ink },
  rule: { color: colours.ink },
};
