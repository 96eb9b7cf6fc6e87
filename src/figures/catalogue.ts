import type { Dimension, Figure, FigureKind } from './figure.ts';

/**
 * Every figure that the program works out, in the order in which it is worked out: the single
 * source of column names, units, meanings, formulas and sources for the table, the worksheet,
 * the data package and the list of figures. Symbols in formulas are those of other figures.
 */

const exact = 'exact';
const definition = 'definition';
const ours = 'our own lifting-surface results';
const polhamus = 'Lowry and Polhamus, NACA TN 3911, from memory';
const shares = 'exact for linear parts';
const study = 'the study';

interface Entry {
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly meaning: string;
  readonly formula: string;
  readonly source: string;
  readonly kind?: FigureKind;
}

function entry(
  symbol: string,
  dimension: Dimension,
  meaning: string,
  formula: string,
  source: string,
  kind?: FigureKind,
): Entry {
  return kind === undefined
    ? { symbol, dimension, meaning, formula, source }
    : { symbol, dimension, meaning, formula, source, kind };
}

const entries = {
  combination: entry('no.', 'count', 'Number of the combination, from 0.', 'position in the plan', study),

  wing_area: entry(
    'S',
    'area',
    'Wing reference area, out to the centreline.',
    'S = b²/A = b c_r (1+λ)/2',
    exact,
  ),
  wing_span: entry('b', 'length', 'Wing span, projected.', 'b = √(S A)', exact),
  wing_aspect_ratio: entry('A', 'ratio', 'Wing aspect ratio.', 'A = b²/S', exact),
  wing_root_chord: entry('c_r', 'length', 'Wing chord on the centreline.', 'c_r = 2S/(b (1+λ))', exact),
  wing_tip_chord: entry('c_t', 'length', 'Wing chord at the tip.', 'c_t = λ c_r, panel by panel', exact),
  mean_chord: entry('S/b', 'length', 'Mean geometric chord; not the MAC.', 'S/b', definition),
  mac: entry('c', 'length', 'Mean aerodynamic chord.', 'c = (2/S)∫c(y)² dy = ⅔ c_r (1+λ+λ²)/(1+λ)', exact),
  mac_spanwise_station: entry(
    'y_c',
    'length',
    'Distance of the MAC from the centreline.',
    'y_c = (2/S)∫c y dy = (b/6)(1+2λ)/(1+λ)',
    exact,
  ),
  mac_leading_edge_offset: entry(
    'Δx_c',
    'length',
    'Leading edge of the MAC aft of the leading edge on the centreline.',
    'Δx_c = (2/S)∫c x_LE dy = y_c tan Λ_LE for one panel',
    exact,
  ),
  mac_leading_edge: entry(
    'x_c',
    'length',
    'Station of the leading edge of the MAC.',
    'x_c = x_r + Δx_c',
    exact,
  ),
  mac_height: entry(
    'z_c',
    'length',
    'Height of the MAC above the plane of the root chord.',
    'z_c = (2/S)∫c z dy',
    exact,
  ),
  quarter_mac_station: entry(
    'x_¼',
    'length',
    'Station of the quarter point of the MAC.',
    'x_¼ = x_c + c/4',
    definition,
  ),
  equivalent_wing_span: entry(
    'b_e',
    'length',
    'Span of the equivalent rectangular wing, whose chord is the MAC.',
    'b_e = S/c',
    definition,
  ),
  wing_formula_taper: entry(
    'λ_e',
    'ratio',
    'Taper that formulas wanting one taper are given: of the trapezoid with the same area, span and MAC.',
    'c b/S = (4/3)(1+λ_e+λ_e²)/(1+λ_e)²',
    exact,
  ),
  wing_formula_sweep: entry(
    'Λ_e',
    'angle',
    'Quarter-chord sweep that formulas are given: of the line from the root quarter chord through the quarter point of the MAC.',
    'tan Λ_e = (x_¼ − x_r − c_r/4)/y_c',
    exact,
  ),
  wing_formula_sweep_half_chord: entry(
    'Λ_½',
    'angle',
    'Half-chord sweep belonging to λ_e and Λ_e.',
    'tan Λ_½ = tan Λ_e − (1/A)(1−λ_e)/(1+λ_e)',
    exact,
  ),

  mach: entry(
    'M',
    'ratio',
    'Mach number of the condition.',
    'M from calibrated speed and height',
    'ISO 2533',
  ),
  lift_coefficient: entry(
    'C_L',
    'ratio',
    'Lift coefficient of the condition.',
    'C_L = m g/(½ ρ0 V_e² S)',
    'exact; V_e from calibrated speed and height',
  ),

  wing_lift_slope: entry(
    'a',
    'per_angle',
    'Lift-curve slope of the wing alone, at the condition’s Mach number.',
    'a = 2πA/(2 + √(A²β²/κ² (1 + tan²Λ_½/β²) + 4)), κ = a_0/2π, β² = 1 − M²',
    polhamus,
  ),
  body_width_at_wing: entry(
    'd',
    'length',
    'Width of the body at the wing root’s quarter chord.',
    'd from the body stations, linear between them',
    study,
  ),
  wing_body_lift_slope: entry(
    'a_wb',
    'per_angle',
    'Lift-curve slope of the wing with the body’s carry-over.',
    'a_wb = K a, K = 1 + 0.025 d/b − 0.25 (d/b)²',
    'from memory',
  ),
  span_efficiency: entry(
    'e',
    'ratio',
    'Span efficiency of the wing.',
    'e from the wing table at A, λ_e, Λ_e',
    ours,
  ),
  wing_aerodynamic_centre_table: entry(
    'h_table',
    'fraction_of_mac',
    'Aerodynamic centre of the wing by the table of lifting-surface results.',
    'h_table from the wing table at A, λ_e, Λ_e, + x_ac/c − ¼',
    ours,
  ),
  wing_aerodynamic_centre_quarter_mac: entry(
    'h_quarter',
    'fraction_of_mac',
    'Aerodynamic centre of the wing taken at the quarter point of the MAC.',
    'h_quarter = ¼ + x_ac/c − ¼',
    'common practice, no source',
  ),
  wing_aerodynamic_centre: entry(
    'h_ac',
    'fraction_of_mac',
    'Aerodynamic centre of the wing, as used.',
    'h_ac = h_table or h_quarter, as the study’s methods say',
    study,
  ),
  aerodynamic_centre_station: entry(
    'x_ac',
    'length',
    'Station of the wing’s aerodynamic centre.',
    'x_ac = x_c + h_ac c',
    definition,
  ),

  tail_arm: entry(
    'l',
    'length',
    'Tail arm, wing quarter-MAC to tail quarter-MAC.',
    'l = x_t − x_¼',
    definition,
  ),
  tail_station: entry(
    'x_t',
    'length',
    'Station of the quarter point of the tail’s MAC.',
    'x_t = x_¼ + l',
    definition,
  ),
  tail_area: entry('S_t', 'area', 'Tail area.', 'S_t = V S c/l', definition),
  tail_volume: entry('V', 'ratio', 'Tail volume coefficient with that arm.', 'V = S_t l/(S c)', definition),
  tail_aspect_ratio: entry('A_t', 'ratio', 'Tail aspect ratio.', 'A_t = b_t²/S_t', exact),
  tail_span: entry('b_t', 'length', 'Tail span.', 'b_t = √(S_t A_t)', exact),
  tail_root_chord: entry(
    'c_r,t',
    'length',
    'Tail chord on its centreline.',
    'c_r,t = 2S_t/(b_t (1+λ_t))',
    exact,
  ),
  tail_mac: entry(
    'c_t̄',
    'length',
    'Mean aerodynamic chord of the tail.',
    'c_t̄ = ⅔ c_r,t (1+λ_t+λ_t²)/(1+λ_t)',
    exact,
  ),
  tail_lift_slope: entry(
    'a_t',
    'per_angle',
    'Lift-curve slope of the tail alone; of a V-tail for its lift in the vertical, cos²Γ included.',
    'a_t as a, with the tail’s own A_t, λ_t, Λ_t, a_0,t',
    polhamus,
  ),
  tail_aerodynamic_centre: entry(
    'h_ac,t',
    'fraction_of_mac',
    'Aerodynamic centre of the tail, fraction of its own MAC.',
    'as h_ac, with the tail’s own A_t, λ_t, Λ_t',
    ours,
  ),
  elevator_effectiveness: entry(
    'τ',
    'ratio',
    'Change of the tail’s angle of attack per elevator angle, span fraction included.',
    'τ = k_δ (1 − (θ − sin θ)/π) b_δ/b_t, θ = arccos(2E − 1); 1 for an all-moving tail',
    'Glauert, thin-aerofoil theory, exact; k_δ the study',
  ),

  wake_length: entry(
    'l_w',
    'length',
    'Wing root’s trailing edge to the tail’s quarter-MAC; empty where the tail is not behind the wing.',
    'l_w = x_t − x_r − c_r',
    definition,
  ),
  root_angle_of_attack: entry(
    'α_r',
    'angle',
    'Angle of attack of the root chord at the condition’s lift.',
    'α_r = C_L/a + α_L0 + washout · 2y_c/b',
    'strip mean of the twist, ours',
  ),
  wing_lift_slope_ratio: entry(
    'a(M)/a(0)',
    'ratio',
    'Lift-curve slope of the wing at the condition’s Mach number over that at Mach 0.',
    'a(M)/a(0)',
    'as a',
  ),
  wake_height: entry(
    'z_wake',
    'length',
    'Height of the tail’s quarter-MAC above the plane of the wake at the condition’s lift.',
    'z_wake = z_t cos α_r − l_w (sin α_r − 2C_L/(πA))',
    'ours',
  ),
  downwash_torenbeek: entry(
    'ε_α,T',
    'ratio',
    'Downwash gradient at the tail, Torenbeek’s form.',
    'ε_α,T = 1.75 a/(πA (λ_e r)^¼ (1+|m|)), r = 2l/b, m = 2 z_wake/b',
    'Torenbeek, Synthesis of Subsonic Airplane Design, 1976, App. E, from memory',
  ),
  downwash_handbook: entry(
    'ε_α,H',
    'ratio',
    'Downwash gradient at the tail, handbook form.',
    'ε_α,H = 4.44 (K_A K_λ K_H √cos Λ_e)^1.19 a(M)/a(0)',
    'handbook form, from memory',
  ),
  downwash_gradient: entry(
    'ε_α',
    'ratio',
    'Downwash gradient at the tail, as used.',
    'ε_α = ε_α,T or ε_α,H, as the study’s methods say',
    study,
  ),

  body_moment_forward: entry(
    'I_f',
    'volume',
    'Body ahead of the root leading edge, in the wing’s upwash.',
    'I_f = ∫w² (1+u) dx',
    'Multhopp, NACA TM 1036; upwash ours',
  ),
  body_moment_aft: entry(
    'I_a',
    'volume',
    'Body aft of the root trailing edge, in the downwash.',
    'I_a = ∫w² ξ dx, ξ rising from 0 to 1 at the tail',
    'Multhopp, NACA TM 1036',
  ),
  body_wing_place: entry(
    'x_w/L',
    'ratio',
    'Wing root’s quarter chord along the body, for the quick estimate.',
    'x_w/L',
    definition,
  ),
  body_moment_slope: entry(
    'C_mα,b',
    'per_angle',
    'Moment slope of the body, nose-up positive.',
    'C_mα,b = (π/2)(I_f + (1−ε_α) I_a)/(S c), or K_f w² L/(S c)',
    'Multhopp, NACA TM 1036; quick estimate Gilruth and White, NACA TR 711, from memory',
  ),

  tail_lift_share: entry(
    'a_s,t',
    'per_angle',
    'Share of the tail in the lift-curve slope of the whole.',
    'a_s,t = η a_t (S_t/S)(1−ε_α)',
    shares,
  ),
  lift_slope: entry(
    'C_Lα',
    'per_angle',
    'Lift-curve slope of the whole aeroplane.',
    'C_Lα = a_wb + a_s,t',
    shares,
  ),
  neutral_point_wing: entry(
    'Δh_wing',
    'fraction_of_mac',
    'Build-up of the neutral point: wing with carry-over.',
    'Δh_wing = h_ac',
    shares,
  ),
  neutral_point_tail: entry(
    'Δh_tail',
    'fraction_of_mac',
    'Build-up of the neutral point: tail.',
    'Δh_tail = (a_s,t/C_Lα)(h_t − h_ac), h_t = ¼ + l/c + (h_ac,t − ¼) c_t̄/c',
    shares,
  ),
  neutral_point_body: entry(
    'Δh_body',
    'fraction_of_mac',
    'Build-up of the neutral point: body.',
    'Δh_body = −C_mα,b/C_Lα',
    shares,
  ),
  neutral_point_height: entry(
    'Δh_z',
    'fraction_of_mac',
    'Build-up of the neutral point: wing above or below the CG, at the condition’s lift; 0 unless the study gives the height of the CG.',
    'Δh_z = (z_w/c) C_L (2/a − 2/(πAe)), z_w = wing height + z_c − CG height',
    'derived from the tilt of lift and induced drag',
  ),
  neutral_point: entry(
    'h_n',
    'fraction_of_mac',
    'Neutral point, stick fixed, power off, aft of the leading edge of the MAC.',
    'h_n = Δh_wing + Δh_tail + Δh_body + Δh_z',
    shares,
  ),
  neutral_point_station: entry(
    'x_n',
    'length',
    'Station of the neutral point.',
    'x_n = x_c + h_n c',
    definition,
  ),

  cg_forward: entry('h_fwd', 'fraction_of_mac', 'Foremost CG.', 'h_fwd = (x_fwd − x_c)/c', definition),
  cg_aft: entry('h_aft', 'fraction_of_mac', 'Aftmost CG.', 'h_aft = (x_aft − x_c)/c', definition),
  cg_forward_station: entry(
    'x_fwd',
    'length',
    'Station of the foremost CG.',
    'x_fwd = x_c + h_fwd c',
    definition,
  ),
  cg_aft_station: entry('x_aft', 'length', 'Station of the aftmost CG.', 'x_aft = x_c + h_aft c', definition),
  static_margin_forward: entry(
    'K_fwd',
    'fraction_of_mac',
    'Static margin at the foremost CG, stick fixed.',
    'K_fwd = h_n − h_fwd',
    definition,
  ),
  static_margin_aft: entry(
    'K_aft',
    'fraction_of_mac',
    'Static margin at the aftmost CG, stick fixed: the smallest of the loading range.',
    'K_aft = h_n − h_aft',
    definition,
  ),
  cg_window_forward: entry(
    'h_w,fwd',
    'fraction_of_mac',
    'Foremost CG that the band’s upper edge allows; empty without an upper edge.',
    'h_w,fwd = h_n − upper edge',
    definition,
  ),
  cg_window_aft: entry(
    'h_w,aft',
    'fraction_of_mac',
    'Aftmost CG that the band’s lower edge allows; empty without a lower edge.',
    'h_w,aft = h_n − lower edge',
    definition,
  ),

  not_computed_because: entry(
    '–',
    'count',
    'Why the combination could not be worked out; empty when it could.',
    'checks of the geometry',
    definition,
    'choice',
  ),
  outside_fitted_range: entry(
    '–',
    'count',
    'Formulas used outside the range they were fitted to.',
    'each formula’s stated range',
    'as each formula',
    'flags',
  ),
  feasible: entry('–', 'count', 'Whether every requirement is met.', 'all requirements met', study, 'yes_no'),
  fails_first: entry(
    '–',
    'count',
    'Requirement with the largest shortfall over its own scale.',
    'largest shortfall/scale; ties in file order',
    study,
    'choice',
  ),
  fails_count: entry('–', 'count', 'Number of requirements not met.', 'count of shortfalls', study),
  fails: entry('–', 'count', 'Requirements not met.', 'shortfall > 1e-9', study, 'flags'),
  not_computed: entry(
    '–',
    'count',
    'Requirements whose figure is empty: neither met nor failed.',
    'figure empty',
    study,
    'flags',
  ),
  largest_shortfall: entry(
    '–',
    'ratio',
    'Largest shortfall over its scale; 0 when every requirement is met.',
    'max of shortfall/scale',
    study,
  ),
} as const satisfies Record<string, Entry>;

export type FigureName = keyof typeof entries;

/** Figures that show the inside of the calculation: in worksheets, not in the bulk table. */
const worksheetOnly: ReadonlySet<FigureName> = new Set<FigureName>([
  'wing_formula_sweep_half_chord',
  'body_moment_forward',
  'body_moment_aft',
  'tail_lift_share',
  'mac_height',
  'mac_leading_edge_offset',
  'body_width_at_wing',
  'wake_length',
  'root_angle_of_attack',
  'wing_lift_slope_ratio',
  'body_wing_place',
]);

export function isWorksheetOnly(name: string): boolean {
  return worksheetOnly.has(name as FigureName);
}

/** Names of all figures worked out, in order. */
export const figureNames = Object.keys(entries) as FigureName[];

/** The catalogue's entry of a figure; `labels` belong to the study. */
export function catalogueFigure(name: FigureName, labels?: readonly string[]): Figure {
  const { kind = 'number', ...rest }: Entry = entries[name];
  return labels === undefined ? { name, kind, ...rest } : { name, kind, ...rest, labels };
}
