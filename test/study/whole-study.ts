/** An invented aeroplane with all that a study can say of it; its numbers are all different. */
export const wholeStudy = `title: Whole study
aeroplane:
  wing:
    area: 11.4 m^2
    span: 9.4 m
    taper: 0.62
    root_leading_edge: 2.1 m
    section: naca-2412
    maximum_lift: 1.41
    flaps: {kind: slotted, chord_fraction: 25 %, span_from: 12 %, span_to: 58 %}
  tail:
    area: 2.1 m^2
    arm: 4.3 m
    aspect_ratio: 4.4
    section: naca-0012
    maximum_lift: 1.02
    elevator: {chord_fraction: 35 %, area: 0.61 m^2, chord: 0.26 m, hinge: {alpha: -0.06 /rad, delta: -0.35 /rad}}
  body:
    stations:
      - {at: 0 m, width: 0.4 m, depth: 0.5 m}
      - {at: 2 m, width: 1.1 m, depth: 1.2 m}
      - {at: 7 m, width: 0.2 m, depth: 0.3 m}
  propeller: {place: tractor, diameter: 1.7 m, blades: 2, blade_chord: 0.13 m, blade_angle: 20 deg, station: 0.1 m, above_datum: 0.05 m, power: 98 hp, efficiency: 78 %, tail_in_slipstream: 60 %}
  control: {kind: stick, gearing: 1.9 rad/m, spring: 4 N, bobweight: 3 N, load_factor: 4.4}
  landing_gear: {kind: nose_wheel, main_wheels: 2.75 m, rotation_speed: 48 kt, ground_angle: 2 deg, below_datum: 0.9 m}
  loading:
    empty: {mass: 310 kg, station: 2.02 m, height: 0.11 m}
    items:
      pilot: {mass: 81 kg, station: 2.25 m, height: 0.2 m}
      passenger: {mass: 79 kg, station: 2.26 m, height: 0.21 m}
      fuel: {mass: 60 kg, station: 2.6 m, height: -0.1 m, burns: true}
      wing_structure: {mass: 70 kg, carried_by: wing, at: 40 %, height: -0.2 m}
    cases:
      two_up: [pilot, passenger, fuel]
      solo_light: [pilot]
    at_most: 650 kg
conditions:
  - {name: cruise, speed: 110 kt, height: 1500 m, power: 65 %}
  - {name: climb, times_stall: 1.3, height: 0 m, power: 100 %}
  - {name: glide, lift_coefficient: 0.8, height: 100 m, power: idle}
  - {name: approach, speed: 62 kt, height: 0 m, flaps: 30 deg, wing_above_ground: 1.1 m}
vary:
  wing.taper: [0.5, 0.62, 0.7]
  conditions.cruise.power: [55 %, 75 %]
  loading.items.fuel.mass: [40 kg, 60 kg]
size: {choose: tail.area, so_that: static_margin_aft, is: 8 %, between: [0.6 m^2, 2.5 m^2]}
corrections: {neutral_point: -1.2 %, source: 'flight test of the prototype, 2026'}
require:
  static_margin: {at_least: 5 %, at_most: {value: 20 %, in: [climb, cruise]}}
  conditions.climb.power: {at_most: 1}
prefer:
  wing_area: less
`;

/** The whole study with pieces of its text exchanged; a piece that is not there once is a mistake of the test. */
export function wholeEdited(...changes: readonly (readonly [piece: string, by: string])[]): string {
  return changes.reduce((text, [piece, by]) => {
    if (text.split(piece).length !== 2) throw new Error(`'${piece}' does not stand in the study once`);
    return text.replace(piece, () => by);
  }, wholeStudy);
}
