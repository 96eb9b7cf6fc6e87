/** The two edges of the static-margin band as requirements: their names and the figures they judge. */
export const bandRequirements = {
  lower: { name: 'static_margin.at_least', figure: 'static_margin_aft' },
  upper: { name: 'static_margin.at_most', figure: 'static_margin_forward' },
} as const;

/** An edge counts as kept when it is missed by no more than this, in the figure's SI unit. */
export const edgeTolerance = 1e-9;

/** One per cent of the MAC: the scale on which shortfalls of a margin are compared with others. */
export const marginScale = 0.01;
