/**
 * A checked study: what `readStudy` returns once every fault has been ruled out.
 * All numbers are SI and radians. Numbers live under their path in the study file
 * (`wing.span`, `wing.panels[1].taper`, `body.stations[3].width`; list entries count from 1).
 */

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
  readonly name: string;
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

  /** Every number of the aeroplane and its conditions, given or assumed, SI, by path. */
  readonly inputs: ReadonlyMap<string, number>;
  readonly wing: WingChoices;
  readonly tail: TailChoices;
  /** Undefined when the study says `body: none`. */
  readonly body?: BodyChoices;
  readonly cg: CgChoices;
  readonly conditions: readonly Condition[];
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
