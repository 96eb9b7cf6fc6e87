/**
 * The structure of a study file, written once: the check of structure and the JSON Schema for
 * editors both come from here. What numbers mean, their units and limits stand in inputs.ts.
 */
import { z } from 'zod';
import type { Dimension } from '../figures/figure.ts';
import { type InputDefinition, inputDefinition, inputDefinitions } from './inputs.ts';
import { shortNumber, unitExamples } from './quantities.ts';
import type { CgKind } from './study.ts';

const words = (text: string) => z.string().meta({ description: text });
const anyNumber = z.union([z.number(), z.string()]);

const examples: Record<Dimension, readonly (string | number)[]> = {
  length: ['2.5 m', '250 mm', '8.2 ft', '98 in'],
  area: ['11.4 m^2', '123 ft^2'],
  volume: ['0.5 m^3', '18 ft^3'],
  mass: ['610 kg', '1340 lb'],
  speed: ['105 kt', '195 km/h', '54 m/s', '121 mph'],
  angle: ['3 deg', '0.05 rad'],
  per_angle: ['6.1 /rad', '0.106 /deg'],
  force: ['400 N', '90 lbf'],
  power: ['73 kW', '98 hp'],
  moment: ['120 N*m', '90 lbf*ft'],
  per_length: ['1.9 rad/m', '2.8 deg/in'],
  force_per_speed: ['0.4 N/kt', '0.1 lbf/kt'],
  ratio: [0.4, '40 %'],
  fraction_of_mac: ['25 %', 0.25],
  count: [5],
};

function unitWords(dimension: Dimension): string {
  if (dimension === 'ratio') return 'A ratio: a bare number, or %.';
  if (dimension === 'fraction_of_mac') return 'A fraction of the MAC: %, or a bare fraction.';
  return `Unit: ${unitExamples[dimension].join(', ')}.`;
}

function limitWords({ dimension, least, most }: InputDefinition): string {
  if (dimension !== 'angle') return `Limits (SI): ${shortNumber(least)} to ${shortNumber(most)}.`;
  const inDegrees = (angle: number) => shortNumber((angle * 180) / Math.PI);
  return `Limits: ${inDegrees(least)} deg to ${inDegrees(most)} deg.`;
}

/** One number of the input table; its description is the table's. */
function input(path: string, cgKind: CgKind = 'percent_mac') {
  const entry = inputDefinition(path.replace('[n]', '[1]'), cgKind);
  const meaning = entry.meaning.replace(/ ?\(?\b1\b\)?(?=[ ,.])/, '');
  return anyNumber.meta({
    description: [
      path.includes('[n]') ? meaning : entry.meaning,
      unitWords(entry.dimension),
      limitWords(entry),
    ].join(' '),
    examples: [...examples[entry.dimension]],
  });
}

function optionalInput(path: string) {
  return input(path).optional();
}

const section = (surface: 'wing' | 'tail') =>
  z
    .union([
      words('Name of a shipped section, such as naca-2412.'),
      z.strictObject({
        lift_slope: input(`${surface}.section.lift_slope`),
        zero_lift_angle: optionalInput(`${surface}.section.zero_lift_angle`),
        moment: optionalInput(`${surface}.section.moment`),
        aerodynamic_centre: optionalInput(`${surface}.section.aerodynamic_centre`),
        maximum_lift: optionalInput(`${surface}.section.maximum_lift`),
        thickness: optionalInput(`${surface}.section.thickness`),
      }),
    ])
    .meta({ description: `Section of the ${surface}: the name of a shipped one, or own numbers.` });

const panel = z.strictObject({
  width: optionalInput('wing.panels[n].width'),
  span_fraction: optionalInput('wing.panels[n].span_fraction'),
  taper: input('wing.panels[n].taper'),
  sweep_quarter_chord: optionalInput('wing.panels[n].sweep_quarter_chord'),
  sweep_leading_edge: optionalInput('wing.panels[n].sweep_leading_edge'),
  dihedral: optionalInput('wing.panels[n].dihedral'),
});

const flaps = z
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

const wing = z
  .strictObject({
    area: optionalInput('wing.area'),
    span: optionalInput('wing.span'),
    aspect_ratio: optionalInput('wing.aspect_ratio'),
    root_chord: optionalInput('wing.root_chord'),
    taper: optionalInput('wing.taper'),
    sweep_quarter_chord: optionalInput('wing.sweep_quarter_chord'),
    sweep_leading_edge: optionalInput('wing.sweep_leading_edge'),
    panels: z
      .array(panel)
      .meta({ description: 'Straight panels from the centreline outward, instead of one taper and sweep.' })
      .optional(),
    dihedral: optionalInput('wing.dihedral'),
    incidence: optionalInput('wing.incidence'),
    washout: optionalInput('wing.washout'),
    root_leading_edge: input('wing.root_leading_edge'),
    height: optionalInput('wing.height'),
    section: section('wing'),
    maximum_lift: optionalInput('wing.maximum_lift'),
    flaps: flaps.optional(),
  })
  .meta({ description: 'The wing: any two of area, span, aspect_ratio and root_chord settle its size.' });

const hinge = z
  .strictObject({
    alpha: optionalInput('tail.elevator.hinge.alpha'),
    delta: optionalInput('tail.elevator.hinge.delta'),
    alpha_factor: optionalInput('tail.elevator.hinge.alpha_factor'),
    delta_factor: optionalInput('tail.elevator.hinge.delta_factor'),
  })
  .meta({ description: 'Hinge-moment slopes, or factors on those of thin-aerofoil theory.' });

const elevator = z
  .strictObject({
    chord_fraction: optionalInput('tail.elevator.chord_fraction'),
    span_fraction: optionalInput('tail.elevator.span_fraction'),
    effectiveness_ratio: optionalInput('tail.elevator.effectiveness_ratio'),
    up: optionalInput('tail.elevator.up'),
    down: optionalInput('tail.elevator.down'),
    area: optionalInput('tail.elevator.area'),
    chord: optionalInput('tail.elevator.chord'),
    hinge: hinge.optional(),
  })
  .meta({ description: 'The elevator; of an all-moving tail its travel and hinge only.' });

const tail = z
  .strictObject({
    layout: z
      .enum(['conventional', 'mid', 'T', 'V'])
      .meta({
        description: 'Where the tail sits: on the body, part-way up the fin, on the fin’s top, or a V.',
      })
      .optional(),
    all_moving: z.boolean().meta({ description: 'The whole tail turns, without an elevator.' }).optional(),
    v_angle: optionalInput('tail.v_angle'),
    area: optionalInput('tail.area'),
    volume: optionalInput('tail.volume'),
    arm: optionalInput('tail.arm'),
    station: optionalInput('tail.station'),
    aspect_ratio: optionalInput('tail.aspect_ratio'),
    span: optionalInput('tail.span'),
    taper: optionalInput('tail.taper'),
    sweep_quarter_chord: optionalInput('tail.sweep_quarter_chord'),
    sweep_leading_edge: optionalInput('tail.sweep_leading_edge'),
    above_wing_root_chord: optionalInput('tail.above_wing_root_chord'),
    incidence: optionalInput('tail.incidence'),
    dynamic_pressure_ratio: optionalInput('tail.dynamic_pressure_ratio'),
    section: section('tail').optional(),
    maximum_lift: optionalInput('tail.maximum_lift'),
    elevator: elevator.optional(),
  })
  .meta({
    description:
      'The horizontal tail: one of area and volume, one of arm and station, one of aspect_ratio and span.',
  });

const body = z
  .union([
    z.literal('none').meta({ description: 'No body: its moment is left out.' }),
    z.strictObject({
      stations: z
        .array(
          z.strictObject({
            at: input('body.stations[n].at'),
            width: input('body.stations[n].width'),
            depth: input('body.stations[n].depth'),
          }),
        )
        .meta({ description: 'Cross-sections from the nose aft, at least two.' }),
      boom: z
        .strictObject({ width: input('body.boom.width'), depth: input('body.boom.depth') })
        .meta({ description: 'A slender boom from the last station to the tail.' })
        .optional(),
    }),
  ])
  .meta({ description: 'The body as stations of width and depth, or none, which must be said.' });

const cgKind = z.enum(['percent_mac', 'station', 'behind_mac_leading_edge']).meta({
  description:
    'How the centre of gravity is given: % of the MAC, station, or distance behind the MAC’s leading edge.',
});
const cgEnd = (end: 'forward' | 'aft') => {
  const description = `${end === 'forward' ? 'Foremost' : 'Aftmost'} centre of gravity, with the unit of its kind.`;
  return z
    .union([
      anyNumber,
      z.strictObject({
        as: cgKind,
        at: anyNumber.meta({ description: 'The number, with the unit of its kind.' }),
      }),
    ])
    .meta({ description, examples: ['25 %', '2.31 m'] });
};
const cg = z
  .strictObject({
    as: cgKind.optional(),
    forward: cgEnd('forward'),
    aft: cgEnd('aft'),
    above_datum: optionalInput('cg.above_datum'),
  })
  .meta({ description: 'The range of the centre of gravity, forward and aft end.' });

const propeller = z
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

const control = z
  .strictObject({
    kind: z.enum(['stick', 'wheel']).meta({ description: 'What the pilot holds.' }),
    gearing: input('control.gearing'),
    spring: optionalInput('control.spring'),
    bobweight: optionalInput('control.bobweight'),
  })
  .meta({ description: 'The pitch control; without it there are no stick forces.' });

const landingGear = z
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
    mass: input('loading.items[n].mass'),
    station: optionalInput('loading.items[n].station'),
    carried_by: z
      .enum(['wing', 'tail', 'body'])
      .meta({ description: 'What the item moves with, in place of a station.' })
      .optional(),
    at: optionalInput('loading.items[n].at'),
    height: optionalInput('loading.items[n].height'),
    burns: z.boolean().meta({ description: 'true for what is used up in flight.' }).optional(),
  })
  .meta({ description: 'One item: its mass and where it lies.' });

const loading = z
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

const aeroplane = z
  .strictObject({
    mass: optionalInput('mass'),
    wing,
    tail,
    body,
    cg: cg.optional(),
    propeller: propeller.optional(),
    control: control.optional(),
    landing_gear: landingGear.optional(),
    loading: loading.optional(),
  })
  .meta({ description: 'The aeroplane with its fixed values: the baseline of the study.' });

const condition = z.strictObject({
  name: words('A name for the condition, used in require, vary and figure names.'),
  speed: optionalInput('conditions[n].speed'),
  lift_coefficient: optionalInput('conditions[n].lift_coefficient'),
  times_stall: optionalInput('conditions[n].times_stall'),
  height: input('conditions[n].height'),
  power: optionalInput('conditions[n].power'),
  flaps: optionalInput('conditions[n].flaps'),
  wing_above_ground: optionalInput('conditions[n].wing_above_ground'),
});

const methods = z
  .strictObject({
    lift_slope: z
      .enum(['polhamus', 'jones', 'table'])
      .meta({
        description:
          'Lift-curve slope of wing and tail: Lowry and Polhamus, R. T. Jones, or the shipped table.',
      })
      .optional(),
    downwash: z
      .enum(['torenbeek', 'handbook'])
      .meta({ description: 'Downwash gradient at the tail: Torenbeek, or the handbook form.' })
      .optional(),
    aerodynamic_centre: z
      .enum(['table', 'quarter_mac'])
      .meta({
        description: 'Aerodynamic centre of the wing: the shipped table, or the quarter point of the MAC.',
      })
      .optional(),
    body_moment: z
      .enum(['multhopp', 'quick_estimate'])
      .meta({ description: 'Moment of the body: Multhopp’s strips, or the quick estimate.' })
      .optional(),
  })
  .meta({ description: 'Methods by name.' });

const axisList = z.array(anyNumber).meta({ description: 'The values, each with its unit.' });
const hold = words(
  'The number that stays at its fixed value while this one varies, such as area.',
).optional();
const axisRange = z.strictObject({
  from: anyNumber.meta({ description: 'First value.' }),
  to: anyNumber.meta({ description: 'Last value; it belongs to the axis.' }),
  step: anyNumber.meta({ description: 'Distance between values; it must land on the last.' }).optional(),
  count: z.number().meta({ description: 'How many values, both ends included; instead of step.' }).optional(),
  spacing: z
    .enum(['linear', 'logarithmic'])
    .meta({ description: 'Equal steps, or equal ratios; logarithmic goes with count.' })
    .optional(),
  hold,
});
const axisMaps = z
  .array(z.record(z.string(), anyNumber))
  .meta({ description: 'Maps whose numbers step side by side.' });
const axis = z
  .union([axisList, axisRange, axisMaps])
  .meta({ description: 'The values of this number: a list, or from, to and step or count.' });
const tiedGroups = z
  .array(z.record(z.string(), z.union([axisList, axisRange])))
  .meta({ description: 'Groups of numbers that step side by side, one axis a group.' });

/** Paths without list entries, so that an editor can complete them under `vary`. */
const variedPaths = inputDefinitions
  .map((entry) => entry.path)
  .filter((path) => !path.includes('[n]'))
  .map((path) => [path, axis.meta({ description: inputDefinition(path).meaning }).optional()] as const);
const vary = z
  .object({
    ...Object.fromEntries(variedPaths),
    cg: axis.meta({ description: 'The CG range: a list of maps with forward and aft.' }).optional(),
    tied: tiedGroups.optional(),
  })
  .catchall(axis)
  .meta({ description: 'What varies, by path: wing.span, wing.panels[1].taper, conditions[1].speed.' });

const skipTest = z.union([
  anyNumber,
  z.strictObject({
    below: anyNumber.meta({ description: 'Holds for smaller values.' }).optional(),
    above: anyNumber.meta({ description: 'Holds for larger values.' }).optional(),
    equal: anyNumber.meta({ description: 'Holds for this value.' }).optional(),
  }),
]);
const skip = z
  .array(
    z.strictObject({
      when: z.record(z.string(), skipTest).meta({ description: 'Tests of varied numbers; all must hold.' }),
      because: words('Why such combinations are left out.'),
    }),
  )
  .meta({ description: 'Combinations that are never evaluated.' });

const edge = (description: string) =>
  z
    .union([
      anyNumber,
      z.strictObject({
        value: anyNumber.meta({ description: 'The edge of the band.' }),
        in: z
          .union([z.string(), z.array(z.string())])
          .meta({ description: 'Conditions by name in which the edge counts, or all.' })
          .optional(),
      }),
    ])
    .meta({ description });
const scale = anyNumber
  .meta({ description: 'What counts as one unit of shortfall, to compare requirements.' })
  .optional();
const margin = z
  .strictObject({
    at_least: edge('Least static margin, at the aft CG.').optional(),
    at_most: edge('Greatest static margin, at the forward CG.').optional(),
    scale,
  })
  .meta({ description: 'The static-margin band, kept over the whole CG range.' });
const requirement = z.strictObject({
  figure: words('Name of the figure; the requirement’s own name when left out.').optional(),
  at_least: anyNumber.meta({ description: 'Least value allowed.' }).optional(),
  at_most: anyNumber.meta({ description: 'Greatest value allowed.' }).optional(),
  scale,
});
const require = z
  .object({
    static_margin: margin.optional(),
    in_range: z
      .boolean()
      .meta({ description: 'Reject combinations that lie outside the fitted range of a formula.' })
      .optional(),
  })
  .catchall(requirement.meta({ description: 'Limits on one figure, under a name of your own.' }))
  .meta({ description: 'What a combination must keep to be feasible.' });

const size = z
  .strictObject({
    choose: words('Path of the number that is chosen in each combination, such as tail.area.'),
    so_that: words('The figure that is to take a value.'),
    is: anyNumber.meta({ description: 'The value that the figure is to take.' }),
    between: z
      .array(anyNumber)
      .meta({ description: 'Least and greatest value that the number may be given.' }),
  })
  .meta({ description: 'A number chosen in each combination so that a figure takes a value.' });

const corrections = z
  .strictObject({
    neutral_point: anyNumber.meta({
      description: 'Added to the neutral point of every condition. Unit: %. Limits: -20 % to 20 %.',
      examples: ['-1.2 %'],
    }),
    source: words('Where the correction comes from, such as a flight test.'),
  })
  .meta({ description: 'Corrections from measurement.' });

const preference = z.union([
  z.enum(['less', 'more']),
  z.strictObject({ nearest: anyNumber.meta({ description: 'The value sought.' }) }),
]);

export const studySchema = z
  .strictObject({
    title: words('Title of the study, shown on every chart and page.'),
    question: words('What the study is to answer.').optional(),
    show: z
      .enum(['metric', 'US'])
      .meta({ description: 'Units of drawings, charts and summary; table columns stay SI.' })
      .optional(),
    class: z
      .enum(['light_aeroplane', 'homebuilt', 'sailplane', 'twin', 'uncrewed'])
      .meta({ description: 'Kind of aircraft; only for notes on customary ranges.' })
      .optional(),
    aeroplane,
    conditions: z.array(condition).meta({ description: 'Flight conditions, one to twelve.' }),
    methods: methods.optional(),
    vary: vary.optional(),
    skip: skip.optional(),
    size: size.optional(),
    corrections: corrections.optional(),
    require: require.optional(),
    prefer: z
      .record(z.string(), preference)
      .meta({ description: 'Figures to have less of, more of, or near a value; for the shortlist.' })
      .optional(),
    shortlist: z
      .strictObject({
        keep: z.number().meta({ description: 'How many combinations are kept, 1 to 100.' }).optional(),
      })
      .meta({ description: 'The best combinations, worked out in full.' })
      .optional(),
    table: z
      .strictObject({ columns: z.array(z.string()).meta({ description: 'Figure names.' }).optional() })
      .meta({ description: 'Which figures the table holds; all when left out.' })
      .optional(),
  })
  .meta({ title: 'aftlimit study', description: 'A trade study of wing and tail.' });

/** The structure as JSON Schema (draft 2020-12), for editors. */
export function studyJsonSchema(): Record<string, unknown> {
  return z.toJSONSchema(studySchema, { io: 'input' }) as Record<string, unknown>;
}
