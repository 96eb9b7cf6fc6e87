/**
 * The structure of a study file, written once: the check of structure and the JSON Schema for
 * editors both come from here. What numbers mean, their units and limits stand in inputs.ts.
 */
import { z } from 'zod';
import { forcePresetNames } from './force-presets.ts';
import { inputDefinition, inputDefinitions } from './inputs.ts';
import { control, flaps, hinge, landingGear, loading, propeller } from './schema-equipment.ts';
import { anyNumber, input, optionalInput, words } from './schema-input.ts';

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
  preset: z
    .enum(forcePresetNames)
    .meta({
      description:
        'A limit of control force from a regulation text, to be confirmed against your own rules; in place of figure, at_least and at_most.',
    })
    .optional(),
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
