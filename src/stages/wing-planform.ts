import {
  equivalentSweepTangent,
  equivalentTaper,
  panelFigure,
  panelFigureCount,
  panelLeadingEdgeTangent,
  panelPlanform,
} from '../methods/panel-planform.ts';
import {
  areaFromAspectRatio,
  areaFromRootChord,
  aspectRatio,
  equivalentRectangularSpan,
  halfChord,
  meanGeometricChord,
  quarterChord,
  rootChordFromArea,
  spanFromAspectRatio,
  spanFromAspectRatioAndRootChord,
  spanFromRootChord,
  sweepTangentAt,
} from '../methods/planform.ts';
import type { Study, WingSize } from '../study/study.ts';
import type { Stage } from './stage.ts';

/** Area and span from the two sizes given; `taper` is 2S/(b c_r) − 1, the tip-to-root ratio of one panel. */
interface SizeRule {
  readonly area: (first: number, second: number, taper: number) => number;
  readonly span: (first: number, second: number, taper: number) => number;
}

/** One rule for each pair of sizes, keyed by the pair in alphabetical order. */
const sizeRules: Record<string, SizeRule> = {
  'wing.area wing.aspect_ratio': { area: (S) => S, span: (S, A) => spanFromAspectRatio(S, A) },
  'wing.area wing.root_chord': { area: (S) => S, span: spanFromRootChord },
  'wing.area wing.span': { area: (S) => S, span: (_, b) => b },
  'wing.aspect_ratio wing.root_chord': {
    area: (A, cr, taper) => areaFromRootChord(cr, spanFromAspectRatioAndRootChord(A, cr, taper), taper),
    span: spanFromAspectRatioAndRootChord,
  },
  'wing.aspect_ratio wing.span': { area: (A, b) => areaFromAspectRatio(b, A), span: (_, b) => b },
  'wing.root_chord wing.span': { area: areaFromRootChord, span: (_, b) => b },
};

const figureOfSize: Record<WingSize, string> = {
  'wing.area': 'wing_area',
  'wing.span': 'wing_span',
  'wing.aspect_ratio': 'wing_aspect_ratio',
  'wing.root_chord': 'wing_root_chord',
};

type WingStudy = Pick<Study, 'wing'>;

export interface PanelReads {
  readonly width: string | null;
  readonly taper: string;
  readonly sweep: string;
  readonly sweepAtQuarterChord: boolean;
  readonly dihedral: string;
}

/** Figures that describe each panel; a plain trapezoid is a wing of one panel. */
export function panelReads({ wing }: Pick<Study, 'wing'>): PanelReads[] {
  if (wing.form === 'trapezoid') {
    return [
      {
        width: null,
        taper: 'wing_taper',
        sweep: `wing_sweep_${wing.sweep}`,
        sweepAtQuarterChord: wing.sweep === 'quarter_chord',
        dihedral: 'wing_dihedral',
      },
    ];
  }
  return wing.panels.map(({ sweep }, index) => {
    const panel = `wing_panels_${index + 1}`;
    return {
      width: `${panel}_${wing.panelWidth}`,
      taper: `${panel}_taper`,
      sweep: `${panel}_sweep_${sweep}`,
      sweepAtQuarterChord: sweep === 'quarter_chord',
      dihedral: `${panel}_dihedral`,
    };
  });
}

/** The outline of the wing: sizes, chords, MAC, and the taper and sweep that formulas are given. */
export function wingPlanformStage(study: WingStudy): Stage {
  const { wing } = study;
  const panels = panelReads(study);
  const widthsGiven = wing.form === 'panels' && wing.panelWidth === 'width';
  const sizes: WingSize[] = widthsGiven ? [...wing.given, 'wing.span'] : [...wing.given];
  sizes.sort();
  const rule = sizeRules[sizes.join(' ')];
  if (rule === undefined) throw new Error(`no wing is settled by ${sizes.join(' and ')}`);
  const given = new Set(wing.given.map((size) => figureOfSize[size]));
  const unlessGiven = (figure: string) => (given.has(figure) ? null : figure);
  const sizeReads = sizes.map((size) => (widthsGiven && size === 'wing.span' ? null : figureOfSize[size]));
  const reads = [
    ...sizeReads,
    ...panels.flatMap(({ width, taper, sweep, dihedral }) => [width, taper, sweep, dihedral]),
  ];
  const inputOf = inputPositions(reads);
  return {
    name: 'wing planform',
    reads: reads.filter((figure) => figure !== null),
    writes: [
      unlessGiven('wing_area'),
      unlessGiven('wing_span'),
      unlessGiven('wing_aspect_ratio'),
      unlessGiven('wing_root_chord'),
      'wing_tip_chord',
      'mean_chord',
      'mac',
      'mac_spanwise_station',
      'mac_leading_edge_offset',
      'mac_height',
      'equivalent_wing_span',
      'wing_formula_taper',
      'wing_formula_sweep',
      'wing_formula_sweep_half_chord',
    ],
    cost: 200,
    kernel: planformKernel({
      panels,
      rule,
      inputOf,
      widthKind: wing.form === 'trapezoid' ? 'whole' : wing.panelWidth,
      singleTaper: wing.form === 'trapezoid',
    }),
  };
}

/** Position of each read among the kernel's inputs; absent (−1) for a read that is null. */
function inputPositions(reads: readonly (string | null)[]): Int32Array {
  const positions = new Int32Array(reads.length).fill(-1);
  let next = 0;
  reads.forEach((figure, index) => {
    if (figure !== null) positions[index] = next++;
  });
  return positions;
}

interface PlanformKernel {
  readonly panels: readonly PanelReads[];
  readonly rule: SizeRule;
  readonly inputOf: Int32Array;
  readonly widthKind: 'whole' | 'width' | 'span_fraction';
  readonly singleTaper: boolean;
}

const sizeCount = 2;
const readsPerPanel = 4;

function planformKernel({ panels, rule, inputOf, widthKind, singleTaper }: PlanformKernel): Stage['kernel'] {
  const n = panels.length;
  const widths = new Float64Array(n);
  const tapers = new Float64Array(n);
  const sweeps = new Float64Array(n);
  const dihedrals = new Float64Array(n);
  const out = new Float64Array(panelFigureCount);
  const readPanel = (inputs: readonly Float64Array[], panel: number, which: number, row: number) =>
    inputs[inputOf[sizeCount + readsPerPanel * panel + which]][row];
  const sweepAsGiven = singleTaper && panels[0].sweepAtQuarterChord;
  const readSize = (inputs: readonly Float64Array[], which: number, row: number, span: number) =>
    inputOf[which] < 0 ? span : inputs[inputOf[which]][row];

  return (count, inputs, outputs) => {
    for (let row = 0; row < count; row++) {
      let sumOfWidths = 0;
      for (let p = 0; p < n; p++) {
        widths[p] = widthKind === 'whole' ? 1 : readPanel(inputs, p, 0, row);
        tapers[p] = readPanel(inputs, p, 1, row);
        dihedrals[p] = readPanel(inputs, p, 3, row);
        sumOfWidths += widths[p];
      }
      const taper = 2 * meanChordOverRootChord(widths, tapers, sumOfWidths) - 1;
      const first = readSize(inputs, 0, row, 2 * sumOfWidths);
      const second = readSize(inputs, 1, row, 2 * sumOfWidths);
      const S = rule.area(first, second, taper);
      const b = rule.span(first, second, taper);
      const rootChord = rootChordFromArea(S, b, taper);
      let chord = rootChord;
      for (let p = 0; p < n; p++) {
        widths[p] *= b / 2 / sumOfWidths;
        const tangent = Math.tan(readPanel(inputs, p, 2, row));
        sweeps[p] = panels[p].sweepAtQuarterChord
          ? panelLeadingEdgeTangent(tangent, chord, tapers[p], widths[p])
          : tangent;
        chord *= tapers[p];
      }
      panelPlanform(n, rootChord, widths, tapers, sweeps, dihedrals, out);
      const mac = out[panelFigure.meanAerodynamicChord];
      const macLeadingEdge = out[panelFigure.leadingEdgeOfMac];
      const macStation = out[panelFigure.spanwiseStationOfMac];
      const A = aspectRatio(b, S);
      const formulaTaper = singleTaper ? tapers[0] : equivalentTaper(mac, b, S);
      const sweepTangent = equivalentSweepTangent(macLeadingEdge, mac, macStation, rootChord);
      outputs[0][row] = S;
      outputs[1][row] = b;
      outputs[2][row] = A;
      outputs[3][row] = rootChord;
      outputs[4][row] = out[panelFigure.tipChord];
      outputs[5][row] = meanGeometricChord(S, b);
      outputs[6][row] = mac;
      outputs[7][row] = macStation;
      outputs[8][row] = macLeadingEdge;
      outputs[9][row] = out[panelFigure.heightOfMac];
      outputs[10][row] = equivalentRectangularSpan(S, mac);
      outputs[11][row] = formulaTaper;
      // A sweep that is given is passed on as it is, so that an edge of a formula's range stays an edge.
      outputs[12][row] = sweepAsGiven ? readPanel(inputs, 0, 2, row) : Math.atan(sweepTangent);
      outputs[13][row] = Math.atan(sweepTangentAt(sweepTangent, quarterChord, halfChord, A, formulaTaper));
    }
  };
}

/** Mean chord over root chord of panels whose chords follow each other's tapers [-]. */
function meanChordOverRootChord(widths: Float64Array, tapers: Float64Array, sumOfWidths: number): number {
  let chord = 1;
  let area = 0;
  for (let p = 0; p < widths.length; p++) {
    area += (widths[p] * chord * (1 + tapers[p])) / 2;
    chord *= tapers[p];
  }
  return area / sumOfWidths;
}

/** Places along the body that follow from the wing's outline and its root leading edge. */
export const wingStationsStage: Stage = {
  name: 'wing stations',
  reads: ['wing_root_leading_edge', 'mac_leading_edge_offset', 'mac'],
  writes: ['mac_leading_edge', 'quarter_mac_station'],
  cost: 5,
  kernel: (count, [root, offset, mac], [leadingEdge, quarter]) => {
    for (let row = 0; row < count; row++) {
      const station = root[row] + offset[row];
      leadingEdge[row] = station;
      quarter[row] = station + mac[row] / 4;
    }
  },
};
