/**
 * Greatest lift coefficient of a whole wing or tail over that of its section [-], taken where a study
 * does not give it: common practice for unswept surfaces of moderate taper, no source.
 */
export const shareOfSectionMaximumLift = 0.9;
