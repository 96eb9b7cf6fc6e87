import type { Axis } from 'vega-lite/types_unstable/axis.js';
import type { Field } from 'vega-lite/types_unstable/channeldef.js';
import type { LayerSpec } from 'vega-lite/types_unstable/spec/index.js';
import { isEmpty, type Layer } from './marks.ts';
import { textSize, weight } from './theme.ts';

/** A straight scale of a panel: values at its two ends, and its axis. No axis: `null`. */
export interface Scale {
  readonly from: number;
  readonly to: number;
  readonly axis: { readonly title: string | null; readonly more?: Axis<never> } | null;
}

export interface PanelParts {
  /** Plot size [px]. */
  readonly width: number;
  readonly height: number;
  /** `pixels`: positions in layers are pixels from the top left. */
  readonly x: Scale | 'pixels';
  readonly y: Scale | 'pixels';
  readonly layers: readonly Layer[];
  /** Lines above the plot. */
  readonly title?: readonly string[];
  readonly subtitle?: readonly string[];
  readonly framed?: boolean;
}

export type Panel = LayerSpec<Field>;

/** One plot: layers over shared straight scales. The y scale runs upward from `from` to `to`. */
export function panel(parts: PanelParts): Panel {
  const marked = parts.layers.filter((layer) => !isEmpty(layer));
  return {
    width: parts.width,
    height: parts.height,
    ...(parts.framed === false ? { view: { stroke: null } } : {}),
    ...(parts.title === undefined ? {} : { title: panelTitle(parts.title, parts.subtitle) }),
    encoding: { x: channel('x', parts.x), y: channel('y', parts.y) },
    layer: marked.length > 0 ? marked : parts.layers.slice(0, 1),
  };
}

export function panelTitle(text: readonly string[], subtitle: readonly string[] = []) {
  return {
    text: [...text],
    fontSize: textSize.panel,
    fontWeight: weight.strong,
    lineHeight: 16,
    offset: 8,
    subtitleFontSize: textSize.small,
    subtitleLineHeight: 14,
    subtitlePadding: 2,
    ...(subtitle.length > 0 ? { subtitle: [...subtitle] } : {}),
  };
}

function channel(field: 'x' | 'y', scale: Scale | 'pixels') {
  if (scale === 'pixels') return { field, type: 'quantitative' as const, scale: null, axis: null };
  return {
    field,
    type: 'quantitative' as const,
    scale: { domain: [scale.from, scale.to], nice: false, zero: false },
    axis: scale.axis === null ? null : { title: scale.axis.title, ...scale.axis.more },
  };
}

/** Pixels per unit, and the way between values and pixels (from the top left) of a panel's scales. */
export interface PixelMap {
  readonly toPixels: (position: { x: number; y: number }) => { x: number; y: number };
  readonly fromPixels: (pixel: { x: number; y: number }) => { x: number; y: number };
}

export function pixelMap(width: number, height: number, x: Scale, y: Scale): PixelMap {
  const perX = width / (x.to - x.from);
  const perY = height / (y.to - y.from);
  return {
    toPixels: (position) => ({ x: (position.x - x.from) * perX, y: (y.to - position.y) * perY }),
    fromPixels: (pixel) => ({ x: x.from + pixel.x / perX, y: y.to - pixel.y / perY }),
  };
}
