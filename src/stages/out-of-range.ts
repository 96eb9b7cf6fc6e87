import { sizeOutcomeFigure, sizeOutcomes } from '../figures/size-outcomes.ts';
import { insideAtmosphere } from '../methods/atmosphere.ts';
import { quickBodyMomentInRange } from '../methods/body-estimates.ts';
import { handbookInRange, torenbeekInRange } from '../methods/downwash.ts';
import { bodyCarryOverInRange, jonesInRange } from '../methods/lift-slope.ts';
import { quarterChord, sweepTangentAt } from '../methods/planform.ts';
import { insideWingTable } from '../methods/wing-table.ts';
import type { Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

/** Formulas whose use outside their fitted range is flagged; each is one bit, in this order. */
export const rangeLabels = [
  'wing table (wing)',
  'wing table (tail)',
  'lift slope by Jones (wing)',
  'lift slope by Jones (tail)',
  'body carry-over',
  'downwash by Torenbeek',
  'downwash by the handbook',
  'quick body estimate',
  'standard atmosphere',
  'equivalent taper of a wing hollower than a triangle',
  'lift slope at this Mach number',
  'linear lift (C_L above the section’s greatest)',
] as const;

type RangeLabel = (typeof rangeLabels)[number];

const bitOf = Object.fromEntries(rangeLabels.map((label, k) => [label, 2 ** k])) as Record<
  RangeLabel,
  number
>;

/** Mach number up to which wings of ordinary thickness stay free of shocks: common practice, no source. */
const shockFreeMach = 0.7;

/** One check: the figures it reads and whether the formula is in its range. */
interface RangeCheck {
  readonly label: RangeLabel;
  readonly reads: readonly string[];
  readonly inside: (values: readonly number[]) => boolean;
}

const checksOfEveryStudy: readonly RangeCheck[] = [
  {
    label: 'body carry-over',
    reads: ['body_width_at_wing', 'wing_span'],
    inside: ([width, span]) => bodyCarryOverInRange(width / span),
  },
  {
    label: 'standard atmosphere',
    reads: ['conditions_1_height'],
    inside: ([height]) => insideAtmosphere(height),
  },
  {
    label: 'lift slope at this Mach number',
    reads: ['mach'],
    inside: ([mach]) => mach <= shockFreeMach,
  },
  {
    label: 'linear lift (C_L above the section’s greatest)',
    reads: ['lift_coefficient', 'wing_section_maximum_lift'],
    inside: ([liftCoefficient, greatest]) => liftCoefficient <= greatest,
  },
];

/** The checks that apply to a study: those of the methods it uses. */
function checksOf(study: Study): RangeCheck[] {
  const { methods, tail, cg } = study;
  const wing = ['wing_aspect_ratio', 'wing_formula_taper', 'wing_formula_sweep'];
  const tailReads = ['tail_aspect_ratio', 'tail_taper', `tail_sweep_${tail.sweep}`];
  const tailSweep = (A: number, taper: number, sweep: number) =>
    tail.sweep === 'quarter_chord'
      ? sweep
      : Math.atan(sweepTangentAt(Math.tan(sweep), 0, quarterChord, A, taper));
  const checks: RangeCheck[] = [...checksOfEveryStudy];
  const tableForBoth = methods.aerodynamic_centre === 'table' || methods.lift_slope === 'table';
  // the vertical position takes the span efficiency from the table
  if (tableForBoth || cg.heightGiven) {
    checks.push({
      label: 'wing table (wing)',
      reads: wing,
      inside: ([A, taper, sweep]) => insideWingTable(A, taper, sweep),
    });
  }
  if (tableForBoth) {
    checks.push({
      label: 'wing table (tail)',
      reads: tailReads,
      inside: ([A, taper, sweep]) => insideWingTable(A, taper, tailSweep(A, taper, sweep)),
    });
  }
  if (study.wing.form === 'panels') {
    checks.push({
      label: 'equivalent taper of a wing hollower than a triangle',
      reads: ['wing_formula_taper'],
      inside: ([taper]) => taper > 0,
    });
  }
  if (methods.lift_slope === 'jones') {
    checks.push(
      { label: 'lift slope by Jones (wing)', reads: wing, inside: ([, , sweep]) => jonesInRange(sweep) },
      {
        label: 'lift slope by Jones (tail)',
        reads: tailReads,
        inside: ([A, taper, sweep]) => jonesInRange(tailSweep(A, taper, sweep)),
      },
    );
  }
  checks.push(downwashCheck(study));
  if (methods.body_moment === 'quick_estimate' && study.body !== undefined) {
    checks.push({
      label: 'quick body estimate',
      reads: ['body_wing_place'],
      inside: ([place]) => quickBodyMomentInRange(place),
    });
  }
  return checks;
}

function downwashCheck({ methods }: Study): RangeCheck {
  if (methods.downwash === 'torenbeek') {
    return {
      label: 'downwash by Torenbeek',
      reads: ['wing_formula_taper', 'wing_formula_sweep', 'tail_arm', 'wing_span'],
      inside: ([taper, sweep, arm, span]) => torenbeekInRange(taper, sweep, (2 * arm) / span),
    };
  }
  return {
    label: 'downwash by the handbook',
    reads: ['wing_formula_sweep', 'tail_above_wing_root_chord', 'tail_arm', 'wing_span'],
    inside: ([sweep, height, arm, span]) => handbookInRange(sweep, height / span, arm / span),
  };
}

/** One stage a check, so that each is evaluated only as often as its own axes ask, and one that gathers the bits. */
export function rangeStages(study: Study): Stage[] {
  const checks = checksOf(study);
  const stages = checks.map((check, index) => checkStage(check, `range_bit_${index}`));
  const gather: Stage = {
    name: 'ranges',
    reads: checks.map((_, index) => `range_bit_${index}`),
    writes: ['outside_fitted_range'],
    cost: 2 * checks.length,
    kernel: (count, inputs, [flags]) => {
      flags.fill(0, 0, count);
      for (const bits of inputs) {
        for (let row = 0; row < count; row++) flags[row] += bits[row];
      }
    },
  };
  return [...stages, gather];
}

function checkStage({ label, reads, inside }: RangeCheck, writes: string): Stage {
  const values = new Array<number>(reads.length).fill(0);
  const bit = bitOf[label];
  return {
    name: `range of ${label}`,
    reads,
    writes: [writes],
    cost: 10,
    kernel: (count, inputs, [bits]) => {
      for (let row = 0; row < count; row++) {
        for (let k = 0; k < values.length; k++) values[k] = inputs[k][row];
        bits[row] = inside(values) ? 0 : bit;
      }
    },
  };
}

/** Why a combination could not be worked out. */
export const reasonLabels = [
  'the tail’s quarter-MAC is not behind the wing root’s trailing edge',
  'the body stations do not run aft',
  'the forward CG lies aft of the aft CG',
  'the neutral point is not finite',
  'the wing is hollower than a triangle: it has no equivalent taper',
  ...sizeOutcomes.slice(1).map((outcome) => `sizing: ${outcome}`),
] as const;

/** Reasons before those of sizing. */
const ofGeometry = reasonLabels.length - (sizeOutcomes.length - 1);

/**
 * Writes the reason's index, or an empty cell where neutral point and margins were worked out. A number that
 * sizing did not find is the first of all reasons: what follows from it is empty too.
 */
export function reasonStage({ size }: Pick<Study, 'size'>): Stage {
  const reads = [
    'wake_length',
    'body_moment_aft',
    'neutral_point',
    'cg_forward',
    'cg_aft',
    'wing_formula_taper',
  ];
  return {
    name: 'reasons',
    reads: size === undefined ? reads : [...reads, sizeOutcomeFigure],
    writes: ['not_computed_because'],
    cost: 2,
    kernel: (count, [wake, body, point, forward, aft, taper, outcome], [reason]) => {
      for (let row = 0; row < count; row++) {
        if (outcome !== undefined && outcome[row] > 0) reason[row] = ofGeometry + outcome[row] - 1;
        else if (Number.isNaN(wake[row])) reason[row] = 0;
        else if (Number.isNaN(body[row])) reason[row] = 1;
        else if (!Number.isFinite(point[row])) reason[row] = taper[row] === 0 ? 4 : 3;
        else reason[row] = forward[row] > aft[row] ? 2 : Number.NaN;
      }
    },
  };
}
