import { deg, hundred, type Row, symmetric } from './input-row.ts';

/** Rows of a section, the same for wing and tail; `surface` is the path before `.section`. */
export function sectionRows(surface: 'wing' | 'tail', mark: string): Row[] {
  const path = (key: string) => `${surface}.section.${key}`;
  const of = `of the ${surface}'s section`;
  return [
    [
      path('lift_slope'),
      `a_0${mark}`,
      'per_angle',
      `Lift-curve slope ${of}, incompressible.`,
      4.5,
      7.5,
      'thin-aerofoil theory gives 2π = 6.28 /rad; a slope per degree read as per radian falls outside',
    ],
    [
      path('zero_lift_angle'),
      `α_L0${mark}`,
      'angle',
      `Angle of attack without lift ${of}.`,
      -15 * deg,
      15 * deg,
      'more camber than any plain section has',
      symmetric,
    ],
    [
      path('moment'),
      `c_m${mark}`,
      'ratio',
      `Moment coefficient ${of} about its aerodynamic centre, nose-up positive.`,
      -0.5,
      0.5,
      'more camber than any plain section has',
      symmetric,
    ],
    [
      path('aerodynamic_centre'),
      `x_ac${mark}/c`,
      'ratio',
      `Aerodynamic centre ${of}, fraction of the chord behind the leading edge.`,
      15 / hundred,
      35 / hundred,
      'sections at subsonic speed lie near 25 %',
      { value: 25 / hundred, source: 'quarter chord; common practice, no source' },
    ],
    [
      path('maximum_lift'),
      `c_l,max${mark}`,
      'ratio',
      `Greatest lift coefficient ${of}.`,
      0.3,
      4,
      'a flat plate reaches more than 0.3; 4 is beyond slotted flaps on a whole wing',
      { value: 1.4, source: 'common practice, no source' },
    ],
    [
      path('thickness'),
      `t/c${mark}`,
      'ratio',
      `Thickness ${of}, fraction of the chord.`,
      1 / hundred,
      40 / hundred,
      'from a flat plate to a faired strut',
      { value: 12 / hundred, source: 'common practice, no source' },
    ],
  ];
}
