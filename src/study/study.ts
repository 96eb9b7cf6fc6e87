/**
 * A checked study: what `readStudy` returns once every fault has been ruled out.
 * All numbers are SI and radians. Numbers live under their path in the study file
 * (`wing.span`, `wing.panels[1].taper`, `body.stations[3].width`; list entries count from 1).
 */

import type { ForcePresetName } from './force-presets.ts';

export type ShowSystem = 'metric' | 'US';
export type AircraftClass = 'light_aeroplane' | 'homebuilt' | 'sailplane' | 'twin' | 'uncrewed';
export type SweepKind = 'quarter_chord' | 'leading_edge';
export type CgKind = 'percent_mac' | 'station' | 'behind_mac_leading_edge';

export type LiftSlopeMethod = 'polhamus' | 'jones' | 'table';
export type DownwashMethod = 'torenbeek' | 'handbook';
export type AerodynamicCentreMethod = 'table' | 'quarter_mac';
export type BodyMomentMethod = 'multhopp' | 'quick_estimate';

export interface Methods {
  readonly lift_slope: LiftSlopeMethod;
  readonly downwash: DownwashMethod;
  readonly aerodynamic_centre: AerodynamicCentreMethod;
  readonly body_moment: BodyMomentMethod;
}

/**
 * The wing's two size numbers after any `hold`: exactly two of area, span, aspect ratio, root
 * chord. With panels of stated width the span follows from the widths, and `given` holds one
 * entry only.
 */
export type WingSize = 'wing.area' | 'wing.span' | 'wing.aspect_ratio' | 'wing.root_chord';

export interface WingChoices {
  readonly form: 'trapezoid' | 'panels';
  readonly given: readonly WingSize[];
  /** Trapezoid only. */
  readonly sweep: SweepKind;
  /** Panels from the centreline outward; empty for a trapezoid. */
  readonly panels: readonly { readonly sweep: SweepKind }[];
  /** How panel widths are given: as lengths, or as fractions of the semi-span that add up to 1. */
  readonly panelWidth: 'width' | 'span_fraction';
  /** Name of the shipped section; undefined where the study gives its own numbers. */
  readonly section?: string;
}

export interface TailChoices {
  readonly layout: 'conventional' | 'mid' | 'T' | 'V';
  readonly allMoving: boolean;
  /** The pair given, after any `hold`. */
  readonly size: 'area' | 'volume';
  readonly place: 'arm' | 'station';
  readonly planform: 'aspect_ratio' | 'span';
  readonly sweep: SweepKind;
  /** Name of the shipped section; undefined where the study gives its own numbers. */
  readonly section?: string;
}

export interface BodyChoices {
  readonly stations: number;
  readonly boom: boolean;
}

export interface CgChoices {
  readonly forward: CgKind;
  readonly aft: CgKind;
  /** False when `above_datum` was not given: then the vertical position has no effect. */
  readonly heightGiven: boolean;
}

export interface Condition {
  /** Letters, digits, `_` and `-`; unique even without regard to case and to `-` against `_`. */
  readonly name: string;
  /** Which of the three the condition gives: the input `conditions[n].speed` and so on. */
  readonly speedAs: 'speed' | 'lift_coefficient' | 'times_stall';
  /** `fraction`: input `conditions[n].power`, of the propeller's rated power. `idle`: no such input. */
  readonly power: 'idle' | 'fraction';
  /**
   * True when the deflection (input `conditions[n].flaps`) is other than 0 somewhere in the study.
   * False: flaps up, whether or not the input is there.
   */
  readonly flapsDown: boolean;
  /** True when the condition gives the height of its wing over the ground (`conditions[n].wing_above_ground`). */
  readonly groundEffect: boolean;
}

/**
 * `section`: inputs `wing.flaps.chord_fraction`, `.span_from`, `.span_to` (of the semi-span).
 * `increments`: inputs `wing.flaps.at`, `.zero_lift_angle`, `.moment`, `.maximum_lift`, `.downwash`;
 * increments of the whole wing at the deflection `at`, linear in deflection.
 */
export type FlapChoices =
  | { readonly as: 'section'; readonly kind: 'plain' | 'slotted' }
  | { readonly as: 'increments' };

/** Inputs `propeller.diameter`, `.blades`, `.blade_chord`, `.blade_angle`, `.station` …, all present. */
export interface PropellerChoices {
  readonly place: 'tractor' | 'pusher';
}

/**
 * `given`: inputs `tail.elevator.hinge.alpha` and `.delta`; on an all-moving tail `.delta` may be absent
 * and is then the same as `.alpha`. `theory`: inputs `tail.elevator.hinge.alpha_factor` and
 * `.delta_factor` on thin-aerofoil theory. `none`: an all-moving tail without data, so no figures with
 * a free stick.
 */
export type HingeKind = 'given' | 'theory' | 'none';

/**
 * Inputs `control.gearing`, `.spring`, `.bobweight`, `.load_factor`, all present; `.greatest_pull` where
 * given, or where a preset requirement limits it.
 */
export interface ControlChoices {
  readonly kind: 'stick' | 'wheel';
}

/**
 * `nose_wheel`: inputs `landing_gear.main_wheels`, `.rotation_speed`, `.ground_angle` and
 * `.below_datum`, all present. `tail_wheel`: `landing_gear.main_wheels` where given.
 */
export interface LandingGearChoices {
  readonly kind: 'nose_wheel' | 'tail_wheel';
}

/** Item n of `loading.items`, from 1 in the order of the file. */
export interface LoadingItem {
  readonly name: string;
  /**
   * `mass`: input `loading.items[n].mass`. `mass_per_area`: input `.mass_per_area`, to be multiplied with
   * the area of the wing or of the tail, whichever carries the item; never of one that burns.
   */
  readonly massAs: 'mass' | 'mass_per_area';
  /** `station`: input `.station`; otherwise input `.at`, a fraction of MAC, tail MAC or body length. */
  readonly carriedBy: 'station' | 'wing' | 'tail' | 'body';
  /** Used up in flight. */
  readonly burns: boolean;
  /** Named in no case and so part of the empty aeroplane: aboard in all cases. */
  readonly always: boolean;
}

export interface LoadingCase {
  readonly name: string;
  /**
   * Numbers of the items aboard, from 1: first those always aboard, then the case's own in its order,
   * in which those that burn are used up.
   */
  readonly items: readonly number[];
}

/**
 * Masses instead of a stated CG range. Then there are no inputs `cg.forward` and `cg.aft`, both kinds
 * are `station`; `mass` is an input only where given, else the mass is that of the heaviest case.
 */
export interface LoadingChoices {
  /** Inputs `loading.empty.mass` and `.station`; heights (`.height`) are inputs where given. */
  readonly empty: boolean;
  readonly items: readonly LoadingItem[];
  readonly cases: readonly LoadingCase[];
}

/** In each combination the input `path` is chosen between the ends so that the figure takes the value; SI. */
export interface Sizing {
  readonly path: string;
  readonly figure: string;
  readonly value: number;
  readonly from: number;
  readonly to: number;
}

/** Measured corrections. */
export interface Corrections {
  /** Added to the neutral point of every condition; fraction of the MAC. */
  readonly neutralPoint: number;
  readonly source: string;
}

/** One varied axis: one or several numbers that step side by side. */
export interface Axis {
  /** `wing.span`; for a map-valued list the map's path (`cg`); for tied numbers the paths joined by ` + `. */
  readonly name: string;
  readonly paths: readonly string[];
  /** One column of SI values per path, all of one length ≥ 1. */
  readonly values: readonly Float64Array[];
}

export interface SkipTest {
  readonly path: string;
  readonly below?: number;
  readonly above?: number;
  readonly equal?: number;
}
/** A combination is skipped when every test of one rule holds. Tests read varied numbers only. */
export interface SkipRule {
  readonly tests: readonly SkipTest[];
  readonly because: string;
}

export interface Requirement {
  readonly name: string;
  /** Figure name (`tail_span`), or `in_range` for the flags. */
  readonly figure: string;
  readonly atLeast?: number;
  readonly atMost?: number;
  /** Shortfalls are divided by this, in the figure's SI unit. > 0 */
  readonly scale: number;
  /** The preset that figure and edge come from. */
  readonly preset?: ForcePresetName;
}

export interface Preference {
  readonly figure: string;
  readonly want: 'less' | 'more' | 'nearest';
  /** The value sought, SI; only for `nearest`. */
  readonly nearest?: number;
}

/** Static-margin band as fractions of the MAC; either edge may be absent. */
export interface Band {
  readonly lower?: number;
  readonly upper?: number;
  /** Names of the conditions in which the lower edge counts; there when the edge is. All when left out. */
  readonly lowerIn?: readonly string[];
  /** Likewise of the upper edge; the first condition when left out. */
  readonly upperIn?: readonly string[];
}

/** What the program took for a number that the study left out, and why that value. */
export interface Assumption {
  readonly path: string;
  readonly value: number | string;
  readonly source: string;
}

/** What is held while a number varies, and what follows from it; for `check` and the summary. */
export interface Held {
  readonly varied: string;
  readonly held: readonly string[];
  readonly follows: readonly string[];
}

export interface Study {
  readonly file: string;
  readonly text: string;
  readonly title: string;
  readonly question?: string;
  readonly show: ShowSystem;
  readonly aircraftClass?: AircraftClass;

  /**
   * Every number of the aeroplane and its conditions, given or assumed, SI, by path. Not there when
   * left out, because they follow from others that may vary: `wing.maximum_lift` and
   * `tail.maximum_lift` (`shareOfSectionMaximumLift` of the section's), `tail.elevator.area` and `.chord` (from
   * `tail.elevator.chord_fraction` and the tail's planform).
   */
  readonly inputs: ReadonlyMap<string, number>;
  readonly wing: WingChoices;
  readonly tail: TailChoices;
  /** Undefined when the study says `body: none`. */
  readonly body?: BodyChoices;
  readonly cg: CgChoices;
  /** Undefined when the wing has no flaps, or the study says nothing of them. */
  readonly flaps?: FlapChoices;
  /** Undefined when the study says `propeller: none` or nothing. */
  readonly propeller?: PropellerChoices;
  readonly hinge: HingeKind;
  /** Undefined: no figures of stick force. */
  readonly control?: ControlChoices;
  readonly landingGear?: LandingGearChoices;
  readonly loading?: LoadingChoices;
  /** One to twelve. */
  readonly conditions: readonly Condition[];
  readonly size?: Sizing;
  readonly corrections?: Corrections;
  readonly methods: Methods;

  readonly axes: readonly Axis[];
  readonly skip: readonly SkipRule[];
  readonly band: Band;
  readonly requirements: readonly Requirement[];
  readonly preferences: readonly Preference[];
  readonly keep: number;
  /** Columns wanted in the table, by figure name; undefined: all. */
  readonly columns?: readonly string[];

  readonly assumptions: readonly Assumption[];
  readonly held: readonly Held[];
}
