/** What an aeroplane may have besides wing, tail, body and CG, in the schema. */
import { z } from 'zod';
import { input, optionalInput } from './schema-input.ts';

export const flaps = z
  .strictObject({
    kind: z
      .enum(['plain', 'slotted'])
      .meta({ description: 'Kind of flap, with chord_fraction, span_from and span_to.' })
      .optional(),
    chord_fraction: optionalInput('wing.flaps.chord_fraction'),
    span_from: optionalInput('wing.flaps.span_from'),
    span_to: optionalInput('wing.flaps.span_to'),
    at: optionalInput('wing.flaps.at'),
    zero_lift_angle: optionalInput('wing.flaps.zero_lift_angle'),
    moment: optionalInput('wing.flaps.moment'),
    maximum_lift: optionalInput('wing.flaps.maximum_lift'),
    downwash: optionalInput('wing.flaps.downwash'),
  })
  .meta({
    description:
      'Flaps by their kind, chord and span, or by own increments of the wing at the deflection `at`.',
  });

export const hinge = z
  .strictObject({
    alpha: optionalInput('tail.elevator.hinge.alpha'),
    delta: optionalInput('tail.elevator.hinge.delta'),
    alpha_factor: optionalInput('tail.elevator.hinge.alpha_factor'),
    delta_factor: optionalInput('tail.elevator.hinge.delta_factor'),
  })
  .meta({ description: 'Hinge-moment slopes, or factors on those of thin-aerofoil theory.' });

export const propeller = z
  .union([
    z.literal('none').meta({ description: 'No propeller.' }),
    z.strictObject({
      place: z.enum(['tractor', 'pusher']).meta({ description: 'Ahead of the wing, or behind it.' }),
      diameter: input('propeller.diameter'),
      blades: input('propeller.blades'),
      blade_chord: input('propeller.blade_chord'),
      blade_angle: input('propeller.blade_angle'),
      station: input('propeller.station'),
      above_datum: optionalInput('propeller.above_datum'),
      power: input('propeller.power'),
      efficiency: optionalInput('propeller.efficiency'),
      tail_in_slipstream: optionalInput('propeller.tail_in_slipstream'),
    }),
  ])
  .meta({ description: 'The propeller, or none; none when left out.' });

export const control = z
  .strictObject({
    kind: z.enum(['stick', 'wheel']).meta({ description: 'What the pilot holds.' }),
    gearing: input('control.gearing'),
    spring: optionalInput('control.spring'),
    bobweight: optionalInput('control.bobweight'),
    greatest_pull: optionalInput('control.greatest_pull'),
    load_factor: optionalInput('control.load_factor'),
  })
  .meta({ description: 'The pitch control; without it there are no stick forces.' });

export const landingGear = z
  .strictObject({
    kind: z.enum(['nose_wheel', 'tail_wheel']).meta({ description: 'Where the third wheel is.' }),
    main_wheels: optionalInput('landing_gear.main_wheels'),
    rotation_speed: optionalInput('landing_gear.rotation_speed'),
    ground_angle: optionalInput('landing_gear.ground_angle'),
    below_datum: optionalInput('landing_gear.below_datum'),
  })
  .meta({ description: 'The landing gear; for the forward limit at nose-wheel lift-off.' });

const loadingItem = z
  .strictObject({
    mass: optionalInput('loading.items[n].mass'),
    mass_per_area: optionalInput('loading.items[n].mass_per_area'),
    station: optionalInput('loading.items[n].station'),
    carried_by: z
      .enum(['wing', 'tail', 'body'])
      .meta({ description: 'What the item moves with, in place of a station.' })
      .optional(),
    at: optionalInput('loading.items[n].at'),
    height: optionalInput('loading.items[n].height'),
    burns: z.boolean().meta({ description: 'true for what is used up in flight.' }).optional(),
  })
  .meta({ description: 'One item: its mass, or its mass per area of what carries it, and where it lies.' });

export const loading = z
  .strictObject({
    empty: z
      .strictObject({
        mass: input('loading.empty.mass'),
        station: input('loading.empty.station'),
        height: optionalInput('loading.empty.height'),
      })
      .meta({ description: 'The empty aeroplane.' })
      .optional(),
    items: z.record(z.string(), loadingItem).meta({ description: 'What is carried, by name.' }),
    cases: z
      .record(
        z.string(),
        z.array(z.string()).meta({ description: 'Items aboard; those that burn, in the order of burning.' }),
      )
      .meta({ description: 'Loading cases by name.' }),
    at_most: optionalInput('loading.at_most'),
  })
  .meta({ description: 'Masses and loading cases, from which the CG range follows; in place of cg.' });
