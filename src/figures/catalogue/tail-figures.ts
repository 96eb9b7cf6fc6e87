import { entry, sources } from './entry.ts';

const { exact, definition, ours, polhamus, study } = sources;

/** Place, size and lift of the tail, and the downwash it flies in. */
export const tailFigures = {
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
    'a_t as a, with the tail’s own A_t, λ_t, Λ_t, a_0_t',
    polhamus,
  ),
  tail_aerodynamic_centre: entry(
    'h_ac,t',
    'fraction_of_mac',
    'Aerodynamic centre of the tail, fraction of its own MAC.',
    'h_ac,t from the wing table at A_t, λ_t, Λ_t, + x_ac_t/c − ¼',
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
    'α_r = C_L/a + α_L0 + ε_t · 2y_c/b',
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
    'ε_α,H = 4.44 (K_A K_λ K_H √cos Λ_e)^1.19 a(M)/a(0), K_A = 1/A − 1/(1+A^1.7), K_λ = (10−3λ_e)/7, K_H = (1−|z_t/b|)/(2l/b)^⅓',
    'handbook form, from memory',
  ),
  downwash_gradient: entry(
    'ε_α',
    'ratio',
    'Downwash gradient at the tail, as used.',
    'ε_α = ε_α,T or ε_α,H, as the study’s methods say',
    study,
  ),
} as const;
