import { datum, deg, type Row, zero } from './input-row.ts';

const wheels = 'the ground under the wheels is near the aeroplane';

/** Numbers of the pitch control and of the landing gear. */
export const controlRows: Row[] = [
  [
    'control.gearing',
    'G',
    'per_length',
    'Elevator angle per travel of the grip.',
    0.1,
    50,
    'a grip moves between a few millimetres and half a metre',
  ],
  [
    'control.spring',
    'F_s',
    'force',
    'Constant force of a spring as felt at the grip, positive where the pilot must pull against it.',
    -300,
    300,
    'more than one hand can hold',
    zero('no spring; common practice, no source'),
  ],
  [
    'control.bobweight',
    'F_w',
    'force',
    'Force of a bobweight at the grip per g, positive where the pilot must pull against it.',
    -300,
    300,
    'more than one hand can hold',
    zero('no bobweight; common practice, no source'),
  ],
  [
    'control.greatest_pull',
    'P_max',
    'force',
    'Greatest pull allowed to slow from the speed of a condition, trimmed there, to its stall.',
    1,
    500,
    'more than two hands can hold',
  ],
  [
    'control.load_factor',
    'n_lim',
    'ratio',
    'Positive limit load factor, at which the regulation asks for a least stick force.',
    1.5,
    12,
    'from a large transport’s to an unlimited aerobatic aeroplane’s',
    { value: 3.8, source: 'normal category; common practice, no source' },
  ],
];

export const landingGearRows: Row[] = [
  [
    'landing_gear.main_wheels',
    'x_m',
    'length',
    'Station where the main wheels touch the ground.',
    -100,
    160,
    datum,
  ],
  [
    'landing_gear.rotation_speed',
    'V_R',
    'speed',
    'Calibrated airspeed at which the nose wheel is to lift off.',
    1,
    120,
    'from a hand-sized model to far above any light aeroplane',
  ],
  [
    'landing_gear.ground_angle',
    'θ_g',
    'angle',
    'Datum line to the ground while rolling on all wheels, nose-up positive.',
    -10 * deg,
    20 * deg,
    'an aeroplane on its nose wheel stands nearly level',
    zero('the datum line is level on the ground; common practice, no source'),
  ],
  [
    'landing_gear.below_datum',
    'z_m',
    'length',
    'Ground under the main wheels below the datum line.',
    -5,
    10,
    wheels,
    zero('not given: the ground is taken at the datum line'),
  ],
];
