import { speedOfSound, standardDensity } from '../methods/atmosphere.ts';
import { upwashAhead } from '../methods/body.ts';
import { groundDownwashFactor } from '../methods/ground-effect.ts';
import {
  bladeSideArea,
  customarySpinnerFactor,
  idleThrustCoefficient,
  inflowFactor,
  propellerLiftShare,
  propellerNormalSlope,
  shareStep,
  thrustCoefficient,
  thrustFromPower,
  thrustOnWing,
} from '../methods/propeller.ts';
import {
  poweredDownwashGradient,
  poweredPressureRatio,
  slipstreamDownwashGradient,
  slipstreamPressureRatio,
} from '../methods/slipstream.ts';
import type { Condition, Study } from '../study/study.ts';
import type { Stage } from './stage.ts';

const onePropeller = 1;

/** Thrust, inflow and normal-force slope of the propeller in one condition. */
function thrustStage({ power }: Condition): Stage {
  const running = power === 'fraction';
  return {
    name: running ? 'propeller under power' : 'propeller at idle',
    reads: [
      'propeller_diameter',
      'propeller_blades',
      'propeller_blade_chord',
      'propeller_blade_angle',
      'wing_area',
      ...(running
        ? ['propeller_power', 'propeller_efficiency', 'conditions_1_power', 'mach', 'conditions_1_height']
        : []),
    ],
    writes: ['thrust_coefficient', 'thrust_on_wing', 'propeller_inflow', 'propeller_normal_slope'],
    cost: 120,
    kernel: (count, inputs, [tc, onWing, inflow, slope]) => {
      const [diameter, blades, chord, angle, area, rated, efficiency, fraction, mach, height] = inputs;
      for (let row = 0; row < count; row++) {
        const D = diameter[row];
        tc[row] = idleThrustCoefficient;
        if (running) {
          const speed = mach[row] * speedOfSound(height[row]);
          const thrust = thrustFromPower(fraction[row] * rated[row], efficiency[row], speed);
          tc[row] = thrustCoefficient(thrust, standardDensity(height[row]), speed, D);
        }
        const side = bladeSideArea(blades[row], chord[row], D, angle[row]);
        onWing[row] = thrustOnWing(tc[row], D, area[row]);
        inflow[row] = inflowFactor(tc[row]);
        slope[row] = propellerNormalSlope(side, D, customarySpinnerFactor, inflow[row]);
      }
    },
  };
}

/** How the stream at the propeller turns with the angle of attack: the wing's upwash, or its downwash. */
function streamStage(place: 'tractor' | 'pusher'): Stage {
  if (place === 'pusher') {
    return {
      name: 'stream at the pusher',
      reads: ['downwash_gradient'],
      writes: ['propeller_stream_gradient'],
      cost: 2,
      kernel: (count, [downwash], [gradient]) => {
        for (let row = 0; row < count; row++) gradient[row] = 1 - downwash[row];
      },
    };
  }
  return {
    name: 'stream at the tractor',
    reads: [
      'wing_root_leading_edge',
      'propeller_station',
      'wing_root_chord',
      'wing_span',
      'wing_area',
      'wing_lift_slope',
    ],
    writes: ['propeller_stream_gradient'],
    cost: 60,
    kernel: (count, [leadingEdge, station, chord, span, area, slope], [gradient]) => {
      for (let row = 0; row < count; row++) {
        // A tractor that is not ahead of the wing has no such upwash: NaN, and the row says why.
        const ahead = leadingEdge[row] - station[row];
        const upwash =
          ahead > 0 ? upwashAhead(ahead, chord[row], span[row], area[row], slope[row]) : Number.NaN;
        gradient[row] = 1 + upwash;
      }
    },
  };
}

/** Thrust, and the stream that the propeller stands in. None without a propeller. */
export function propellerStages({ propeller }: Pick<Study, 'propeller'>, condition: Condition): Stage[] {
  return propeller === undefined ? [] : [thrustStage(condition), streamStage(propeller.place)];
}

/** Whether dynamic pressure and downwash at the tail differ from those of the gliding aeroplane in any condition. */
export function hasTailStream({ propeller, conditions }: Pick<Study, 'propeller' | 'conditions'>): boolean {
  return propeller !== undefined || conditions.some(({ groundEffect }) => groundEffect);
}

/** The figure that holds the dynamic-pressure ratio at the tail. */
export function pressureRatioFigure(study: Pick<Study, 'propeller' | 'conditions'>): string {
  return hasTailStream(study) ? 'tail_pressure_ratio' : 'tail_dynamic_pressure_ratio';
}

/** Dynamic-pressure ratio and downwash gradient at the tail with slipstream and ground. */
export function tailStreamStages(
  study: Pick<Study, 'propeller' | 'conditions'>,
  { groundEffect }: Condition,
): Stage[] {
  if (!hasTailStream(study)) return [];
  const powered = study.propeller !== undefined;
  const ground = ['conditions_1_wing_above_ground', 'tail_above_wing_root_chord', 'wing_span'];
  const slipstream = [
    'propeller_tail_in_slipstream',
    'thrust_coefficient',
    'propeller_inflow',
    'propeller_normal_slope',
    'propeller_stream_gradient',
  ];
  return [
    {
      name: 'stream at the tail',
      reads: [
        'tail_dynamic_pressure_ratio',
        'downwash_gradient',
        ...(powered ? slipstream : []),
        ...(groundEffect ? ground : []),
      ],
      writes: ['tail_pressure_ratio', 'tail_downwash_gradient'],
      cost: 25,
      kernel: (count, inputs, [pressure, downwash]) => {
        const [eta, gradient] = inputs;
        const [immersed, tc, inflow, slope, stream] = powered ? inputs.slice(2) : [];
        const [wingHeight, tailHeight, span] = groundEffect ? inputs.slice(powered ? 7 : 2) : [];
        for (let row = 0; row < count; row++) {
          const nearGround = groundEffect
            ? groundDownwashFactor(wingHeight[row], wingHeight[row] + tailHeight[row], span[row])
            : 1;
          const byWing = gradient[row] * nearGround;
          if (!powered) {
            pressure[row] = eta[row];
            downwash[row] = byWing;
            continue;
          }
          const f = immersed[row];
          const ratio = slipstreamPressureRatio(tc[row]);
          const bySlipstream = slipstreamDownwashGradient(slope[row], inflow[row], stream[row]);
          pressure[row] = poweredPressureRatio(eta[row], f, ratio);
          downwash[row] = poweredDownwashGradient(byWing, bySlipstream, f, ratio);
        }
      },
    },
  ];
}

/** The propeller's share of the lift and its step of the neutral point. None without a propeller. */
export function propellerShareStages({ propeller }: Pick<Study, 'propeller'>): Stage[] {
  if (propeller === undefined) return [];
  return [
    {
      name: 'propeller’s share',
      reads: [
        'propeller_normal_slope',
        'propeller_diameter',
        'wing_area',
        'propeller_stream_gradient',
        'propeller_station',
        'mac_leading_edge',
        'mac',
        'lift_slope_rest',
        'neutral_point_rest',
      ],
      writes: ['propeller_lift_share', 'propeller_position', 'lift_slope', 'neutral_point_propeller'],
      cost: 15,
      kernel: (
        count,
        [slope, diameter, area, stream, station, leadingEdge, mac, rest, restPoint],
        [share, position, whole, step],
      ) => {
        for (let row = 0; row < count; row++) {
          const ap = propellerLiftShare(onePropeller, slope[row], diameter[row], area[row], stream[row]);
          const hp = (station[row] - leadingEdge[row]) / mac[row];
          share[row] = ap;
          position[row] = hp;
          whole[row] = rest[row] + ap;
          step[row] = shareStep(restPoint[row], hp, ap, rest[row]);
        }
      },
    },
  ];
}
