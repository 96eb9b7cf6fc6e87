/** Commented studies to begin with; invented aeroplanes of three kinds. */

export const starterKinds = ['tourer', 'sailplane', 'uncrewed'] as const;
export type StarterKind = (typeof starterKinds)[number];

const tourer = `# A study of wing and tail: change the numbers to your aeroplane's.
# Every number with a dimension carries its unit. Angles: deg or rad. Speeds: kt, km/h, m/s, mph.
title: Two-seat tourer, wing and tail
question: Which tail keeps the margin over the whole loading range?
show: metric                        # or US: units of charts and summary
class: light_aeroplane              # only for notes on customary ranges

aeroplane:                          # the fixed values are the baseline of the study
  mass: 600 kg
  wing:
    area: 11.6 m^2                  # any two of area, span, aspect_ratio, root_chord
    span: 9.2 m
    taper: 0.7                      # tip chord over root chord
    sweep_quarter_chord: 0 deg      # or sweep_leading_edge
    dihedral: 5 deg
    incidence: 2 deg
    washout: 2 deg
    root_leading_edge: 1.9 m        # station of the leading edge on the centreline
    height: -0.4 m                  # root chord above (+) or below (-) the datum line
    section: naca-2412
  tail:
    layout: conventional            # or mid, T, V
    volume: 0.42                    # or area
    arm: 4.2 m                      # or station; wing quarter-MAC to tail quarter-MAC
    aspect_ratio: 4.2               # or span
    taper: 0.7
    above_wing_root_chord: 0.6 m
    section: naca-0009
    elevator: {chord_fraction: 40 %, span_fraction: 95 %, up: 25 deg, down: 15 deg}
  body:                             # or: body: none
    stations:
      - {at: 0 m, width: 0.5 m, depth: 0.5 m}
      - {at: 0.9 m, width: 0.95 m, depth: 0.9 m}
      - {at: 2.2 m, width: 1.1 m, depth: 1.15 m}
      - {at: 3.6 m, width: 0.9 m, depth: 0.9 m}
      - {at: 6.8 m, width: 0.2 m, depth: 0.35 m}
  cg: {as: percent_mac, forward: 23 %, aft: 33 %, above_datum: 0 m}

  # With more of the aeroplane come more figures. Take away the #, and change the numbers.
  # Power moves the neutral point; without these lines the propeller is left out.
  #propeller: {place: tractor, diameter: 1.7 m, blades: 2, blade_chord: 0.13 m, blade_angle: 20 deg, station: 0.1 m, power: 73 kW}
  # Forces at the grip, and the lift-off of a nose wheel.
  #control: {kind: stick, gearing: 1.9 rad/m}
  #landing_gear: {kind: nose_wheel, main_wheels: 2.6 m, rotation_speed: 48 kt}
  # Masses in place of mass and cg above: then the range of the centre of gravity follows.
  #loading:
  #  empty: {mass: 326 kg, station: 2.04 m}
  #  items:
  #    wing: {mass_per_area: 5.5 kg/m^2, carried_by: wing, at: 40 %}   # grows with the wing
  #    crew: {mass: 160 kg, station: 2.3 m}
  #    fuel: {mass: 60 kg, station: 2.5 m, burns: true}
  #  cases:
  #    full: [crew, fuel]
  #  at_most: 620 kg

conditions:                         # one to twelve
  - {name: cruise, speed: 105 kt, height: 2000 ft}
  #- {name: climb, times_stall: 1.3, height: 0 m, power: 100 %}

vary:                               # each line is an axis; all combinations are evaluated
  wing.span: {from: 8.4 m, to: 10.4 m, step: 0.25 m, hold: area}
  wing.taper: [0.5, 0.6, 0.7, 0.85, 1]
  tail.volume: {from: 0.3, to: 0.6, count: 16}
  tail.arm: {from: 3.8 m, to: 4.6 m, step: 0.2 m}

skip:
  - {when: {wing.taper: {below: 0.55}, wing.span: {above: 10 m}}, because: tip too slender}

require:                            # what a combination must keep to be feasible
  static_margin: {at_least: 5 %, at_most: 20 %}

prefer:                             # what the shortlist is ordered by
  tail_area: less

shortlist: {keep: 8}
`;

const sailplane = `# A study of a sailplane with a wing of three panels and a T-tail.
title: Club sailplane, tail size and arm
question: How small may the tail be?
show: metric
class: sailplane

aeroplane:
  mass: 340 kg
  wing:
    area: 11.0 m^2                  # the span follows from the panel widths
    panels:                         # from the centreline outward; widths on one side
      - {width: 3.6 m, taper: 0.92, sweep_leading_edge: 0 deg, dihedral: 2 deg}
      - {width: 2.6 m, taper: 0.75, sweep_leading_edge: 1 deg, dihedral: 3 deg}
      - {width: 1.3 m, taper: 0.55, sweep_leading_edge: 3.5 deg, dihedral: 4 deg}
    incidence: 3 deg
    root_leading_edge: 2.1 m
    height: 0.3 m
    # A section by its own numbers; the unit of the slope is needed.
    section: {lift_slope: 0.108 /deg, zero_lift_angle: -3.5 deg, moment: -0.1, maximum_lift: 1.45, thickness: 15 %}
  tail:
    layout: T
    area: 1.05 m^2
    arm: 4.0 m
    aspect_ratio: 6.5
    taper: 0.6
    above_wing_root_chord: 1.1 m
  body:
    stations:
      - {at: 0 m, width: 0.1 m, depth: 0.15 m}
      - {at: 0.9 m, width: 0.6 m, depth: 0.75 m}
      - {at: 2.2 m, width: 0.62 m, depth: 0.85 m}
      - {at: 3.2 m, width: 0.3 m, depth: 0.45 m}
    boom: {width: 0.16 m, depth: 0.22 m}   # from the last station to the tail
  cg: {as: percent_mac, forward: 24 %, aft: 40 %}

conditions:
  - {name: cruise, speed: 90 km/h, height: 1000 m}

vary:
  tail.area: {from: 0.8 m^2, to: 1.3 m^2, step: 0.05 m^2}
  tail.arm: {from: 3.6 m, to: 4.6 m, step: 0.1 m}
  wing.panels[3].taper: [0.45, 0.55, 0.65]
  cg: [{forward: 22 %, aft: 38 %}, {forward: 24 %, aft: 40 %}]   # step side by side

require:
  static_margin: {at_least: 4 %, at_most: 25 %}

prefer:
  tail_area: less
  tail_arm: less
`;

const uncrewed = `# A study of a small uncrewed aeroplane with a V-tail on a boom.
title: Small survey aeroplane, V-tail on a boom
show: metric
class: uncrewed

aeroplane:
  mass: 6.5 kg
  wing:
    span: 2.4 m
    aspect_ratio: 9.5
    taper: 0.65
    sweep_leading_edge: 2 deg
    washout: 1.5 deg
    root_leading_edge: 420 mm
    height: 60 mm
    section: naca-4412
  tail:
    layout: V
    v_angle: 35 deg                 # each panel above the horizontal
    volume: 0.6                     # area of both panels, laid flat
    arm: 800 mm
    aspect_ratio: 5
    taper: 0.75
    above_wing_root_chord: 40 mm
  body:
    stations:
      - {at: 0 mm, width: 60 mm, depth: 60 mm}
      - {at: 200 mm, width: 150 mm, depth: 160 mm}
      - {at: 650 mm, width: 150 mm, depth: 160 mm}
      - {at: 820 mm, width: 50 mm, depth: 60 mm}
    boom: {width: 28 mm, depth: 28 mm}
  cg: {as: behind_mac_leading_edge, forward: 60 mm, aft: 85 mm}

conditions:
  - {name: survey, speed: 17 m/s, height: 120 m}

vary:
  tail.arm: {from: 650 mm, to: 950 mm, step: 50 mm}
  tail.volume: {from: 0.4, to: 0.8, count: 9}
  # Numbers that step side by side make one axis.
  tied:
    - {wing.aspect_ratio: [8.5, 9.5, 10.5], wing.taper: [0.75, 0.65, 0.55]}

require:
  static_margin: {at_least: 8 %, at_most: 25 %}
  short_tail: {figure: tail.span, at_most: 0.8 m}

prefer:
  tail_area: less
`;

const texts: Readonly<Record<StarterKind, string>> = { tourer, sailplane, uncrewed };

/** The text of a starter study, with comments; it reads without a fault. */
export function starterStudy(kind: StarterKind): string {
  return texts[kind];
}
