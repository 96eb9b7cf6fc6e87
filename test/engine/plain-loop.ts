/**
 * One combination at a time: the formulas of src/methods/ called one after the other for a
 * straight-tapered wing, with nothing shared between combinations. It checks what the engine
 * computes and is the measure against which its speed is told.
 */
import { insideAtmosphere, liftCoefficient, machFromCalibratedSpeed } from '../../src/methods/atmosphere.ts';
import { bodyMomentSlope, multhoppAft, multhoppForward } from '../../src/methods/body.ts';
import { bodyWidthAt } from '../../src/methods/body-stations.ts';
import {
  handbookDownwashGradient,
  torenbeekDownwashGradient,
  torenbeekInRange,
  wakePlaneHeight,
} from '../../src/methods/downwash.ts';
import { bodyCarryOver, bodyCarryOverInRange, polhamusLiftSlope } from '../../src/methods/lift-slope.ts';
import {
  bodyStep,
  neutralPoint,
  rootAngleOfAttack,
  staticMargin,
  stationOfFraction,
  tailLiftShare,
  tailPosition,
  tailStep,
  wholeLiftSlope,
} from '../../src/methods/neutral-point.ts';
import {
  aspectRatio,
  equivalentRectangularSpan,
  leadingEdgeOfMac,
  meanAerodynamicChord,
  meanGeometricChord,
  rootChordFromArea,
  spanFromAspectRatio,
  spanwiseStationOfMac,
  sweepTangentAt,
} from '../../src/methods/planform.ts';
import { flapEffectiveness } from '../../src/methods/section.ts';
import { areaFromVolume } from '../../src/methods/tail.ts';
import {
  insideWingTable,
  tableAerodynamicCentre,
  tableSpanEfficiency,
} from '../../src/methods/wing-table.ts';
import type { Study } from '../../src/study/study.ts';

/** The numbers of one combination, SI and radians, under their path in the study (`wing.span`). */
export interface PlainNumbers {
  mass: number;
  'wing.area': number;
  'wing.span': number;
  'wing.taper': number;
  'wing.sweep_quarter_chord': number;
  'wing.washout': number;
  'wing.root_leading_edge': number;
  'wing.section.lift_slope': number;
  'wing.section.zero_lift_angle': number;
  'wing.section.aerodynamic_centre': number;
  'wing.section.maximum_lift': number;
  'tail.volume': number;
  'tail.arm': number;
  'tail.aspect_ratio': number;
  'tail.taper': number;
  'tail.sweep_quarter_chord': number;
  'tail.above_wing_root_chord': number;
  'tail.dynamic_pressure_ratio': number;
  'tail.elevator.chord_fraction': number;
  'tail.elevator.span_fraction': number;
  'tail.elevator.effectiveness_ratio': number;
  'tail.section.lift_slope': number;
  'tail.section.aerodynamic_centre': number;
  'cg.forward': number;
  'cg.aft': number;
  'conditions[1].speed': number;
  'conditions[1].height': number;
}

export type PlainPath = keyof PlainNumbers;

/** One edge to be kept: value ≥ limit (`sign` 1) or value ≤ limit (`sign` −1). */
interface PlainEdge {
  /** Place of the figure among `plainFigures`. */
  readonly figure: number;
  readonly sign: 1 | -1;
  readonly limit: number;
  readonly scale: number;
}

export interface PlainInputs {
  /** Set the varied ones before each call. */
  readonly numbers: PlainNumbers;
  /** Body stations of the baseline, ascending, and widths there [m]. */
  readonly stationsAt: Float64Array;
  readonly stationWidths: Float64Array;
  /** Where the body was drawn around: root leading and trailing edge, tail's quarter-MAC of the baseline [m]. */
  readonly baseline: { readonly leadingEdge: number; readonly rootChord: number; readonly tail: number };
  readonly band: { readonly lower: number; readonly upper: number };
  readonly edges: readonly PlainEdge[];
}

/** Order of the figures that `evaluatePlain` writes: the table's, without the combination's number. */
export const plainFigures = [
  'wing_span',
  'wing_taper',
  'wing_sweep_quarter_chord',
  'tail_arm',
  'tail_volume',
  'cg_forward',
  'cg_aft',
  'wing_area',
  'wing_aspect_ratio',
  'wing_root_chord',
  'wing_tip_chord',
  'mean_chord',
  'mac',
  'mac_spanwise_station',
  'mac_leading_edge',
  'quarter_mac_station',
  'equivalent_wing_span',
  'wing_formula_taper',
  'wing_formula_sweep',
  'mach',
  'lift_coefficient',
  'wing_lift_slope',
  'wing_body_lift_slope',
  'span_efficiency',
  'wing_aerodynamic_centre_table',
  'wing_aerodynamic_centre_quarter_mac',
  'wing_aerodynamic_centre',
  'aerodynamic_centre_station',
  'tail_station',
  'tail_area',
  'tail_aspect_ratio',
  'tail_span',
  'tail_root_chord',
  'tail_mac',
  'tail_lift_slope',
  'tail_aerodynamic_centre',
  'elevator_effectiveness',
  'wake_height',
  'downwash_torenbeek',
  'downwash_handbook',
  'downwash_gradient',
  'body_moment_slope',
  'lift_slope',
  'neutral_point_wing',
  'neutral_point_tail',
  'neutral_point_body',
  'neutral_point_height',
  'neutral_point',
  'neutral_point_station',
  'cg_forward_station',
  'cg_aft_station',
  'static_margin_forward',
  'static_margin_aft',
  'cg_window_forward',
  'cg_window_aft',
  'not_computed_because',
  'outside_fitted_range',
  'feasible',
  'fails_first',
  'fails_count',
  'fails',
  'not_computed',
  'largest_shortfall',
] as const;

const plainPaths: Record<PlainPath, true> = {
  mass: true,
  'wing.area': true,
  'wing.span': true,
  'wing.taper': true,
  'wing.sweep_quarter_chord': true,
  'wing.washout': true,
  'wing.root_leading_edge': true,
  'wing.section.lift_slope': true,
  'wing.section.zero_lift_angle': true,
  'wing.section.aerodynamic_centre': true,
  'wing.section.maximum_lift': true,
  'tail.volume': true,
  'tail.arm': true,
  'tail.aspect_ratio': true,
  'tail.taper': true,
  'tail.sweep_quarter_chord': true,
  'tail.above_wing_root_chord': true,
  'tail.dynamic_pressure_ratio': true,
  'tail.elevator.chord_fraction': true,
  'tail.elevator.span_fraction': true,
  'tail.elevator.effectiveness_ratio': true,
  'tail.section.lift_slope': true,
  'tail.section.aerodynamic_centre': true,
  'cg.forward': true,
  'cg.aft': true,
  'conditions[1].speed': true,
  'conditions[1].height': true,
};

export function isPlainPath(path: string): path is PlainPath {
  return Object.hasOwn(plainPaths, path);
}

/**
 * The fixed values of a study as plain inputs. Throws on a study of another form than the plain
 * loop knows: trapezoid by area, span and quarter-chord sweep; tail by volume, arm, aspect ratio and
 * quarter-chord sweep, hinged and no V; a body without a boom; CG as % MAC without its height;
 * default methods.
 */
export function plainInputs(study: Study): PlainInputs {
  const { wing, tail, body, cg, methods } = study;
  const known =
    wing.form === 'trapezoid' &&
    [...wing.given].sort().join() === 'wing.area,wing.span' &&
    wing.sweep === 'quarter_chord' &&
    `${tail.size} ${tail.place} ${tail.planform} ${tail.sweep}` === 'volume arm aspect_ratio quarter_chord' &&
    tail.layout !== 'V' &&
    !tail.allMoving &&
    body?.boom === false &&
    `${cg.forward} ${cg.aft}` === 'percent_mac percent_mac' &&
    !cg.heightGiven &&
    Object.values(methods).sort().join() === 'multhopp,polhamus,table,torenbeek';
  if (!known) throw new Error('the plain loop does not know studies of this form');
  const number = (path: string): number => {
    const value = study.inputs.get(path);
    if (value === undefined) throw new Error(`the study lacks ${path}`);
    return value;
  };
  const numbers = Object.fromEntries(
    Object.keys(plainPaths).map((path) => [path, number(path)]),
  ) as unknown as PlainNumbers;
  const stations = Array.from({ length: body.stations }, (_, k) => `body.stations[${k + 1}]`);
  return {
    numbers,
    stationsAt: Float64Array.from(stations, (station) => number(`${station}.at`)),
    stationWidths: Float64Array.from(stations, (station) => number(`${station}.width`)),
    baseline: placesOf(numbers),
    band: { lower: study.band.lower ?? Number.NaN, upper: study.band.upper ?? Number.NaN },
    edges: study.requirements.flatMap(edgesOf),
  };
}

function edgesOf({ figure, atLeast, atMost, scale }: Study['requirements'][number]): PlainEdge[] {
  const inRange = figure === 'in_range';
  const place = (plainFigures as readonly string[]).indexOf(inRange ? 'outside_fitted_range' : figure);
  if (place < 0) throw new Error(`the plain loop does not write ${figure}`);
  if (inRange) return [{ figure: place, sign: -1, limit: 0, scale }];
  const edges: PlainEdge[] = [];
  if (atLeast !== undefined) edges.push({ figure: place, sign: 1, limit: atLeast, scale });
  if (atMost !== undefined) edges.push({ figure: place, sign: -1, limit: atMost, scale });
  return edges;
}

function placesOf(numbers: PlainNumbers): PlainInputs['baseline'] {
  const S = numbers['wing.area'];
  const b = numbers['wing.span'];
  const taper = numbers['wing.taper'];
  const rootChord = rootChordFromArea(S, b, taper);
  const mac = meanAerodynamicChord(rootChord, taper);
  const tangent = Math.tan(numbers['wing.sweep_quarter_chord']);
  const edge = sweepTangentAt(tangent, quarterChord, 0, aspectRatio(b, S), taper);
  const leadingEdge = numbers['wing.root_leading_edge'];
  const quarterMac = leadingEdge + leadingEdgeOfMac(spanwiseStationOfMac(b, taper), edge) + mac / 4;
  return { leadingEdge, rootChord, tail: quarterMac + numbers['tail.arm'] };
}

const quarterChord = 0.25;
const thinSectionSlope = 2 * Math.PI;
const edgeTolerance = 1e-9;
const flagsPlace = plainFigures.indexOf('outside_fitted_range');

/** Bits of the formulas used outside their range, as the table's labels number them. */
const bits = {
  wingTable: 1,
  tailTable: 2,
  carryOver: 16,
  torenbeek: 32,
  atmosphere: 256,
  mach: 1024,
  linearLift: 2048,
} as const;

/**
 * Evaluates one combination.
 * @param out at least `plainFigures.length` long, filled in that order; SI, NaN for an empty cell
 */
export function evaluatePlain(inputs: PlainInputs, out: Float64Array): void {
  const { numbers, stationsAt, stationWidths, baseline, band } = inputs;

  // the wing's outline
  const S = numbers['wing.area'];
  const b = numbers['wing.span'];
  const taper = numbers['wing.taper'];
  const sweep = numbers['wing.sweep_quarter_chord'];
  const rootLeadingEdge = numbers['wing.root_leading_edge'];
  const A = aspectRatio(b, S);
  const rootChord = rootChordFromArea(S, b, taper);
  const mac = meanAerodynamicChord(rootChord, taper);
  const macStation = spanwiseStationOfMac(b, taper);
  const sweepTangent = Math.tan(sweep);
  const leadingEdgeTangent = sweepTangentAt(sweepTangent, quarterChord, 0, A, taper);
  const macLeadingEdge = rootLeadingEdge + leadingEdgeOfMac(macStation, leadingEdgeTangent);
  const quarterMac = macLeadingEdge + mac / 4;

  // the condition and the wing's lift
  const speed = numbers['conditions[1].speed'];
  const height = numbers['conditions[1].height'];
  const mach = machFromCalibratedSpeed(speed, height);
  const cl = liftCoefficient(numbers.mass, speed, height, S);
  const kappa = numbers['wing.section.lift_slope'] / thinSectionSlope;
  const halfTangent = sweepTangentAt(sweepTangent, quarterChord, 0.5, A, taper);
  const a = polhamusLiftSlope(A, halfTangent, kappa, mach);
  const slopeRatio = a / polhamusLiftSlope(A, halfTangent, kappa, 0);
  const wingChord = baseline.leadingEdge + baseline.rootChord / 4;
  const bodyWidth = bodyWidthAt(stationsAt.length, stationsAt, stationWidths, wingChord);
  const withBody = a * bodyCarryOver(bodyWidth / b);
  const sectionShift = numbers['wing.section.aerodynamic_centre'] - quarterChord;
  const efficiency = tableSpanEfficiency(A, taper, sweep);
  const centre = tableAerodynamicCentre(A, taper, sweep) + sectionShift;

  // the tail; it must stand behind the root's trailing edge
  const arm = numbers['tail.arm'];
  const tailStation = quarterMac + arm;
  const behind = tailStation - rootLeadingEdge - rootChord;
  const wakeLength = behind > 0 ? behind : Number.NaN;
  const volume = numbers['tail.volume'];
  const tailArea = arm > 0 ? areaFromVolume(volume, arm, S, mac) : Number.NaN;
  const tailA = numbers['tail.aspect_ratio'];
  const tailTaper = numbers['tail.taper'];
  const tailSpan = spanFromAspectRatio(tailArea, tailA);
  const tailRootChord = rootChordFromArea(tailArea, tailSpan, tailTaper);
  const tailMac = meanAerodynamicChord(tailRootChord, tailTaper);
  const tailSweep = numbers['tail.sweep_quarter_chord'];
  const tailHalf = sweepTangentAt(Math.tan(tailSweep), quarterChord, 0.5, tailA, tailTaper);
  const tailKappa = numbers['tail.section.lift_slope'] / thinSectionSlope;
  const tailSlope = polhamusLiftSlope(tailA, tailHalf, tailKappa, mach);
  const tailSectionShift = numbers['tail.section.aerodynamic_centre'] - quarterChord;
  const tailCentre = tableAerodynamicCentre(tailA, tailTaper, tailSweep) + tailSectionShift;
  const elevator =
    flapEffectiveness(numbers['tail.elevator.chord_fraction']) *
    numbers['tail.elevator.span_fraction'] *
    numbers['tail.elevator.effectiveness_ratio'];

  // downwash
  const tailHeight = numbers['tail.above_wing_root_chord'];
  const alpha = rootAngleOfAttack(
    cl,
    a,
    numbers['wing.section.zero_lift_angle'],
    numbers['wing.washout'],
    (2 * macStation) / b,
  );
  const wakeHeight = wakePlaneHeight(tailHeight, wakeLength, alpha, cl, A);
  const armBehind = behind > 0 ? arm : Number.NaN;
  const downwash = torenbeekDownwashGradient(a, A, taper, (2 * armBehind) / b, (2 * wakeHeight) / b);
  const handbook = handbookDownwashGradient(A, taper, sweep, tailHeight / b, armBehind / b, slopeRatio);

  // the body
  const forward = multhoppForward(
    stationsAt.length,
    stationsAt,
    stationWidths,
    baseline.leadingEdge,
    rootChord,
    b,
    S,
    a,
  );
  const trailingEdge = baseline.leadingEdge + baseline.rootChord;
  const aft = multhoppAft(
    stationsAt.length,
    stationsAt,
    stationWidths,
    trailingEdge,
    baseline.tail,
    wakeLength,
    0,
  );
  const bodySlope = bodyMomentSlope(forward, aft, downwash, S, mac);

  // the neutral point and what follows from it
  const eta = numbers['tail.dynamic_pressure_ratio'];
  const share = tailLiftShare(tailSlope, eta, tailArea / S, downwash);
  const whole = wholeLiftSlope(withBody, share);
  const byTail = tailStep(centre, tailPosition(arm, mac, tailMac, tailCentre), share, whole);
  const byBody = bodyStep(bodySlope, whole);
  const hn = neutralPoint(centre, byTail, byBody, 0);
  const cgForward = numbers['cg.forward'];
  const cgAft = numbers['cg.aft'];

  out[0] = b;
  out[1] = taper;
  out[2] = sweep;
  out[3] = arm;
  out[4] = volume;
  out[5] = cgForward;
  out[6] = cgAft;
  out[7] = S;
  out[8] = A;
  out[9] = rootChord;
  out[10] = taper * rootChord;
  out[11] = meanGeometricChord(S, b);
  out[12] = mac;
  out[13] = macStation;
  out[14] = macLeadingEdge;
  out[15] = quarterMac;
  out[16] = equivalentRectangularSpan(S, mac);
  out[17] = taper;
  out[18] = sweep;
  out[19] = mach;
  out[20] = cl;
  out[21] = a;
  out[22] = withBody;
  out[23] = efficiency;
  out[24] = centre;
  out[25] = quarterChord + sectionShift;
  out[26] = centre;
  out[27] = macLeadingEdge + centre * mac;
  out[28] = tailStation;
  out[29] = tailArea;
  out[30] = tailA;
  out[31] = tailSpan;
  out[32] = tailRootChord;
  out[33] = tailMac;
  out[34] = tailSlope;
  out[35] = tailCentre;
  out[36] = elevator;
  out[37] = wakeHeight;
  out[38] = downwash;
  out[39] = handbook;
  out[40] = downwash;
  out[41] = bodySlope;
  out[42] = whole;
  out[43] = centre;
  out[44] = byTail;
  out[45] = byBody;
  out[46] = 0;
  out[47] = hn;
  out[48] = macLeadingEdge + hn * mac;
  out[49] = stationOfFraction(cgForward, macLeadingEdge, mac);
  out[50] = stationOfFraction(cgAft, macLeadingEdge, mac);
  out[51] = staticMargin(hn, cgForward);
  out[52] = staticMargin(hn, cgAft);
  out[53] = hn - band.upper;
  out[54] = hn - band.lower;
  out[55] = Number.isFinite(hn) ? Number.NaN : behind > 0 ? 1 : 0;
  out[56] =
    (insideWingTable(A, taper, sweep) ? 0 : bits.wingTable) +
    (insideWingTable(tailA, tailTaper, tailSweep) ? 0 : bits.tailTable) +
    (bodyCarryOverInRange(bodyWidth / b) ? 0 : bits.carryOver) +
    (torenbeekInRange(taper, sweep, (2 * arm) / b) ? 0 : bits.torenbeek) +
    (insideAtmosphere(height) ? 0 : bits.atmosphere) +
    (mach <= 0.7 ? 0 : bits.mach) +
    (cl <= numbers['wing.section.maximum_lift'] ? 0 : bits.linearLift);
  judge(inputs.edges, out);
}

/** Fills the six figures on requirements, the last of `plainFigures`, from the figures before them. */
function judge(edges: readonly PlainEdge[], out: Float64Array): void {
  let fails = 0;
  let failsCount = 0;
  let failsFirst = Number.NaN;
  let notComputed = 0;
  let largest = 0;
  // judge every edge in the order of the file
  for (let e = 0; e < edges.length; e++) {
    const { figure, sign, limit, scale } = edges[e];
    const missed = sign * (limit - out[figure]);
    // flags are there or not, whichever formulas they name
    const shortfall = figure === flagsPlace ? Math.min(missed, 1) : missed;
    if (Number.isNaN(shortfall)) notComputed += 2 ** e;
    if (!(shortfall > edgeTolerance)) continue;
    fails += 2 ** e;
    failsCount++;
    if (shortfall / scale > largest) {
      largest = shortfall / scale;
      failsFirst = e;
    }
  }
  out[57] = failsCount === 0 && notComputed === 0 ? 1 : 0;
  out[58] = failsFirst;
  out[59] = failsCount;
  out[60] = fails;
  out[61] = notComputed;
  out[62] = largest;
}
