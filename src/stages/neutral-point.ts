import {
  bodyStep,
  datumLineShift,
  neutralPoint,
  rootAngleOfAttack,
  tailLiftShare,
  tailPosition,
  tailStep,
  verticalPositionShift,
  wholeLiftSlope,
} from '../methods/neutral-point.ts';
import type { Study } from '../study/study.ts';
import { hasTailStream } from './propeller.ts';
import type { Stage } from './stage.ts';

type PowerStudy = Pick<Study, 'propeller' | 'conditions'>;

/** Share of the tail in the lift of the whole. With a propeller the whole is what the propeller does not carry. */
export function sharesStage(study: PowerStudy): Stage {
  const stream = hasTailStream(study);
  return {
    name: 'shares of lift',
    reads: [
      'tail_lift_slope',
      stream ? 'tail_pressure_ratio' : 'tail_dynamic_pressure_ratio',
      'tail_area',
      'wing_area',
      stream ? 'tail_downwash_gradient' : 'downwash_gradient',
      'wing_body_lift_slope',
    ],
    writes: ['tail_lift_share', study.propeller === undefined ? 'lift_slope' : 'lift_slope_rest'],
    cost: 5,
    kernel: (count, [at, eta, tailArea, area, downwash, withBody], [share, whole]) => {
      for (let row = 0; row < count; row++) {
        share[row] = tailLiftShare(at[row], eta[row], tailArea[row] / area[row], downwash[row]);
        whole[row] = wholeLiftSlope(withBody[row], share[row]);
      }
    },
  };
}

/** Effect of the wing's height over the CG; nothing when the study does not give the CG's height. */
export function heightStage({ cg, flaps }: Pick<Study, 'cg' | 'flaps'>): Stage {
  if (!cg.heightGiven) {
    return {
      name: 'vertical position',
      reads: [],
      writes: ['neutral_point_height', 'neutral_point_height_lift', 'neutral_point_height_datum'],
      cost: 1,
      kernel: (count, _, outputs) => {
        for (const output of outputs) output.fill(0, 0, count);
      },
    };
  }
  return {
    name: 'vertical position',
    reads: [
      'wing_height',
      'mac_height',
      'cg_above_datum',
      'mac',
      'lift_coefficient',
      'wing_lift_slope',
      'wing_aspect_ratio',
      'span_efficiency',
      'wing_section_zero_lift_angle',
      'wing_washout',
      'mac_spanwise_station',
      'wing_span',
      'wing_incidence',
      ...(flaps === undefined ? [] : ['flap_zero_lift_change']),
    ],
    writes: ['neutral_point_height', 'neutral_point_height_lift', 'neutral_point_height_datum'],
    cost: 15,
    kernel: (
      count,
      [wing, rise, cgHeight, mac, cl, a, A, e, zeroLift, washout, station, span, incidence, byFlaps],
      [shift, byLift, datum],
    ) => {
      for (let row = 0; row < count; row++) {
        const height = (wing[row] + rise[row] - cgHeight[row]) / mac[row];
        const noLift = 0;
        const macFraction = (2 * station[row]) / span[row];
        const section = zeroLift[row] + (byFlaps === undefined ? 0 : byFlaps[row]);
        const angle = rootAngleOfAttack(noLift, a[row], section, washout[row], macFraction);
        datum[row] = datumLineShift(height, angle, incidence[row]);
        byLift[row] = verticalPositionShift(height, cl[row], a[row], A[row], e[row]);
        shift[row] = byLift[row] + datum[row];
      }
    },
  };
}

/** Where the lift of the tail acts; the steps of wing, tail and body, and their sum. */
export function stepsStage({ propeller }: Pick<Study, 'propeller'>): Stage {
  return {
    name: 'steps of the neutral point',
    reads: [
      'wing_aerodynamic_centre',
      'tail_arm',
      'mac',
      'tail_mac',
      'tail_aerodynamic_centre',
      'tail_lift_share',
      propeller === undefined ? 'lift_slope' : 'lift_slope_rest',
      'body_moment_slope',
    ],
    writes: [
      'tail_position',
      'neutral_point_wing',
      'neutral_point_tail',
      'neutral_point_body',
      'neutral_point_rest',
    ],
    cost: 15,
    kernel: (
      count,
      [centre, arm, mac, tailMac, tailCentre, share, whole, bodySlope],
      [position, byWing, byTail, byBody, sum],
    ) => {
      for (let row = 0; row < count; row++) {
        const ht = tailPosition(arm[row], mac[row], tailMac[row], tailCentre[row]);
        const tail = tailStep(centre[row], ht, share[row], whole[row]);
        // + 0: without a body the step is 0, not −0.
        const body = bodyStep(bodySlope[row], whole[row]) + 0;
        position[row] = ht;
        byWing[row] = centre[row];
        byTail[row] = tail;
        byBody[row] = body;
        sum[row] = neutralPoint(centre[row], tail, body, 0);
      }
    },
  };
}

/** The neutral point: the steps so far, and those of propeller, height and a measured correction. */
export function neutralPointStage({
  propeller,
  corrections,
}: Pick<Study, 'propeller' | 'corrections'>): Stage {
  const correction = corrections?.neutralPoint ?? 0;
  return {
    name: 'neutral point',
    reads: [
      'neutral_point_rest',
      'neutral_point_height',
      'mac_leading_edge',
      'mac',
      ...(propeller === undefined ? [] : ['neutral_point_propeller']),
    ],
    writes: [
      'neutral_point',
      'neutral_point_station',
      ...(corrections === undefined ? [] : ['neutral_point_correction']),
    ],
    cost: 5,
    kernel: (count, [rest, byHeight, leadingEdge, mac, byPropeller], [point, station, byCorrection]) => {
      for (let row = 0; row < count; row++) {
        const powered = byPropeller === undefined ? 0 : byPropeller[row];
        const hn = rest[row] + powered + byHeight[row] + correction;
        point[row] = hn;
        station[row] = leadingEdge[row] + hn * mac[row];
        if (byCorrection !== undefined) byCorrection[row] = correction;
      }
    },
  };
}
