import { createRequire } from 'node:module';
import type { Loader, LoggerInterface } from 'vega';
import type { ChartSpec } from './sheet.ts';
import { textWidth } from './text-width.ts';
import { colours, weight } from './theme.ts';

/** Pixels of the picture per pixel of the chart. */
export const pictureScale = 2;

/** Charts carry their data; nothing is ever fetched, and asking for it is an error. */
const refusingLoader: Loader = {
  options: {},
  load: refuse,
  sanitize: refuse,
  http: refuse,
  file: refuse,
} as Loader;

function refuse(): Promise<never> {
  return Promise.reject(new Error('A chart asked for data from outside its specification.'));
}

/** Collects what the libraries warn of instead of printing it. */
export function quietLogger(warnings: string[] = []): LoggerInterface {
  const logger = {
    level: () => logger,
    error: (...said: unknown[]) => keep(said),
    warn: (...said: unknown[]) => keep(said),
    info: () => logger,
    debug: () => logger,
  };
  function keep(said: unknown[]) {
    warnings.push(said.map(String).join(' '));
    return logger;
  }
  return logger as unknown as LoggerInterface;
}

let drawing: Promise<{ vega: typeof import('vega'); vegaLite: typeof import('vega-lite') }> | undefined;

/** Vega and Vega-Lite cost a good part of a second to load; they are loaded when the first chart is drawn. */
function loadDrawing() {
  drawing ??= Promise.all([import('vega'), import('vega-lite')]).then(([vega, vegaLite]) => {
    measureWithInter(vega);
    return { vega, vegaLite };
  });
  return drawing;
}

/** Without a canvas Vega guesses text widths; the charts' own font is measured instead, so layouts fit the text. */
function measureWithInter(vega: typeof import('vega')): void {
  const { textMetrics } = vega as unknown as {
    textMetrics: { width: (item: TextItem, text: unknown) => number };
  };
  textMetrics.width = (item, text) => {
    const boldness =
      Number(item.fontWeight ?? weight.normal) >= weight.strong ? weight.strong : weight.normal;
    return textWidth(String(text ?? ''), item.fontSize ?? 11, boldness);
  };
}
interface TextItem {
  readonly fontSize?: number;
  readonly fontWeight?: number | string;
}

let lastDrawn: Promise<unknown> = Promise.resolve();

/**
 * The chart as SVG text. The same specification gives the same bytes.
 * @param warnings receives what Vega-Lite and Vega warn of; they are otherwise silent
 */
export function drawSvg(spec: ChartSpec, warnings: string[] = []): Promise<string> {
  // One after another: clip and gradient names come from a counter that all drawings share.
  const drawn = lastDrawn.then(() => drawOne(spec, warnings));
  lastDrawn = drawn.catch(() => undefined);
  return drawn;
}

async function drawOne(spec: ChartSpec, warnings: string[]): Promise<string> {
  const { vega, vegaLite } = await loadDrawing();
  const logger = quietLogger(warnings);
  const compiled = vegaLite.compile(spec, { logger }).spec;
  const view = new vega.View(vega.parse(compiled), { renderer: 'none', loader: refusingLoader, logger });
  try {
    // That counter runs for the life of the process; set back, names depend on the chart alone.
    (vega as unknown as { resetSVGDefIds: () => void }).resetSVGDefIds();
    return (await view.toSVG()).replace('<svg ', '<svg style="font-variant-numeric: tabular-nums" ');
  } finally {
    view.finalize();
  }
}

/** The SVG as a PNG picture, drawn with the shipped font files only, so that every machine draws the same. */
export async function drawPng(svg: string): Promise<Uint8Array> {
  const { renderAsync } = await import('@resvg/resvg-js');
  // Drawn on a thread of its own, so that several pictures can be drawn side by side.
  const picture = await renderAsync(svg, {
    background: colours.paper,
    fitTo: { mode: 'zoom', value: pictureScale },
    font: {
      fontFiles: fontFiles(),
      loadSystemFonts: false,
      defaultFontFamily: 'Inter',
      sansSerifFamily: 'Inter',
    },
    logLevel: 'off',
  });
  return picture.asPng();
}

function fontFiles(): string[] {
  const { resolve } = createRequire(import.meta.url);
  return ['400Regular/Inter_400Regular.ttf', '600SemiBold/Inter_600SemiBold.ttf'].map((file) =>
    resolve(`@expo-google-fonts/inter/${file}`),
  );
}
