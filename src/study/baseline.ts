/**
 * The study's own fixed values worked through as far as sizes and places: needed to hold a number
 * that the study does not give itself, and to see whether the aeroplane hangs together.
 */
import {
  panelFigure,
  panelFigureCount,
  panelLeadingEdgeTangent,
  panelPlanform,
} from '../methods/panel-planform.ts';
import { areaFromVolume, tailVolume } from '../methods/tail.ts';
import type { TailChoices, WingChoices, WingSize } from './study.ts';

export interface WingBaseline {
  /** SI, by path: all four sizes. */
  readonly sizes: Readonly<Record<WingSize, number>>;
  readonly meanAerodynamicChord: number;
  /** Stations [m]. */
  readonly macLeadingEdge: number;
  readonly quarterMac: number;
  readonly rootTrailingEdge: number;
}

export type TailSize =
  | 'tail.area'
  | 'tail.volume'
  | 'tail.arm'
  | 'tail.station'
  | 'tail.aspect_ratio'
  | 'tail.span';
export type TailBaseline = Readonly<Record<TailSize, number>>;

type Inputs = ReadonlyMap<string, number>;
const quarter = 0.25;

/** One panel of the wing: width as a length or as a fraction of the semi-span, edges by one sweep. */
interface Panel {
  readonly width: number;
  readonly taper: number;
  readonly sweep: number;
  readonly sweepAt: 'quarter_chord' | 'leading_edge';
}

function panelsOf(inputs: Inputs, wing: WingChoices): Panel[] {
  const number = (path: string) => inputs.get(path) ?? Number.NaN;
  if (wing.form === 'trapezoid') {
    return [
      {
        width: 1,
        taper: number('wing.taper'),
        sweep: number(`wing.sweep_${wing.sweep}`),
        sweepAt: wing.sweep,
      },
    ];
  }
  return wing.panels.map(({ sweep }, index) => {
    const prefix = `wing.panels[${index + 1}]`;
    return {
      width: number(`${prefix}.${wing.panelWidth}`),
      taper: number(`${prefix}.taper`),
      sweep: number(`${prefix}.sweep_${sweep}`),
      sweepAt: sweep,
    };
  });
}

/** Area over span and root chord [-], from the panels' shares of the semi-span and their tapers. */
function fullness(panels: readonly Panel[]): number {
  const semiSpan = panels.reduce((sum, panel) => sum + panel.width, 0);
  let chord = 1;
  let area = 0;
  for (const { width, taper } of panels) {
    area += (width / semiSpan) * ((chord * (1 + taper)) / 2);
    chord *= taper;
  }
  return area;
}

/** Span from the two given sizes; k is area over span and root chord. */
function spanFrom(number: (path: WingSize) => number, has: (path: WingSize) => boolean, k: number): number {
  if (has('wing.span')) return number('wing.span');
  const area = number('wing.area');
  if (!has('wing.area')) return number('wing.aspect_ratio') * k * number('wing.root_chord');
  return has('wing.aspect_ratio')
    ? Math.sqrt(number('wing.aspect_ratio') * area)
    : area / (k * number('wing.root_chord'));
}

function areaFrom(
  number: (path: WingSize) => number,
  has: (path: WingSize) => boolean,
  span: number,
  k: number,
): number {
  if (has('wing.area')) return number('wing.area');
  return has('wing.aspect_ratio')
    ? span ** 2 / number('wing.aspect_ratio')
    : k * span * number('wing.root_chord');
}

/** Sizes and stations of the wing at the study's fixed values; NaN where a number has a fault. */
export function wingBaseline(inputs: Inputs, wing: WingChoices): WingBaseline {
  const number = (path: string) => inputs.get(path) ?? Number.NaN;
  const has = (path: WingSize) => wing.given.includes(path);
  const panels = panelsOf(inputs, wing);
  const k = fullness(panels);
  const widthsGiven = wing.form === 'panels' && wing.panelWidth === 'width';
  const widths = panels.reduce((sum, panel) => sum + panel.width, 0);
  const span = widthsGiven ? 2 * widths : spanFrom(number, has, k);
  const area = areaFrom(number, has, span, k);
  const rootChord = area / (k * span);
  const sizes = {
    'wing.area': area,
    'wing.span': span,
    'wing.aspect_ratio': span ** 2 / area,
    'wing.root_chord': rootChord,
  };
  return { sizes, ...placesOf(panels, span / 2 / widths, rootChord, number('wing.root_leading_edge')) };
}

function placesOf(panels: readonly Panel[], widthScale: number, rootChord: number, rootLeadingEdge: number) {
  const tapers = Float64Array.from(panels, (panel) => panel.taper);
  const widths = Float64Array.from(panels, (panel) => panel.width * widthScale);
  let innerChord = rootChord;
  const tangents = Float64Array.from(panels, ({ taper, sweep, sweepAt }, index) => {
    const chord = innerChord;
    innerChord *= taper;
    const tangent = Math.tan(sweep);
    return sweepAt === 'leading_edge'
      ? tangent
      : panelLeadingEdgeTangent(tangent, chord, taper, widths[index]!);
  });
  const out = new Float64Array(panelFigureCount);
  panelPlanform(panels.length, rootChord, widths, tapers, tangents, new Float64Array(panels.length), out);
  const meanAerodynamicChord = out[panelFigure.meanAerodynamicChord]!;
  const macLeadingEdge = rootLeadingEdge + out[panelFigure.leadingEdgeOfMac]!;
  return {
    meanAerodynamicChord,
    macLeadingEdge,
    quarterMac: macLeadingEdge + quarter * meanAerodynamicChord,
    rootTrailingEdge: rootLeadingEdge + rootChord,
  };
}

/** Sizes and place of the tail at the study's fixed values; NaN where a number has a fault. */
export function tailBaseline(inputs: Inputs, tail: TailChoices, wing: WingBaseline): TailBaseline {
  const number = (path: TailSize) => inputs.get(path) ?? Number.NaN;
  const wingArea = wing.sizes['wing.area'];
  const chord = wing.meanAerodynamicChord;
  const arm = tail.place === 'arm' ? number('tail.arm') : number('tail.station') - wing.quarterMac;
  const area =
    tail.size === 'area' ? number('tail.area') : areaFromVolume(number('tail.volume'), arm, wingArea, chord);
  const span = tail.planform === 'span' ? number('tail.span') : Math.sqrt(number('tail.aspect_ratio') * area);
  return {
    'tail.area': area,
    'tail.volume': tailVolume(area, arm, wingArea, chord),
    'tail.arm': arm,
    'tail.station': wing.quarterMac + arm,
    'tail.aspect_ratio': span ** 2 / area,
    'tail.span': span,
  };
}
