/** What every result carries. */
export const cautions = [
  'A preliminary estimate for choosing a configuration, not a proof of stability: confirm by calculation for the built aeroplane and by test.',
  'Power off, stick fixed. A single tractor propeller at full power costs 1 to 8 % MAC of margin, a free stick 2 to 10 % MAC (common practice, no source).',
  'First flights with the CG well forward; approach the aft limit in small steps.',
  'Local airworthiness rules and licensed practice decide.',
] as const;

export const shortCaution = 'Preliminary estimate; confirm by test.';

/** Effects that no figure of this program knows of. */
export const notAssessed =
  'Not assessed: power, free stick, manoeuvre margin, control at forward CG, ground effect, spin, the stall of a T-tail in the wing’s wake, tip-back on the main wheels, aeroelastics.';
