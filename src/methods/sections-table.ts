/**
 * NACA sections that studies can name. Smooth surface, low Mach number, from the two-dimensional
 * tests in Abbott & von Doenhoff, Theory of Wing Sections (the data of NACA TR 824), from memory.
 * Maximum lift is at Reynolds number 9e6, where that source is fullest; at 3e6 expect 0.1 to 0.3 less
 * (common practice, no source), and a rough leading edge costs about as much again. The slopes, angles
 * and moments change little from 3e6 to 9e6.
 */

/** One section; angles in rad. */
export interface Section {
  readonly name: string;
  /** a0, incompressible [1/rad] */
  readonly liftSlope: number;
  /** α_L0 [rad] */
  readonly zeroLiftAngle: number;
  /** c_m about the aerodynamic centre, nose-up positive [-] */
  readonly moment: number;
  /** aft of the leading edge, fraction of the chord [-] */
  readonly aerodynamicCentre: number;
  /** c_l,max at `maximumLiftReynolds` [-] */
  readonly maximumLift: number;
  readonly maximumLiftReynolds: number;
  /** thickness over chord [-] */
  readonly thickness: number;
  readonly source: string;
}

const radian = Math.PI / 180;
const testReynolds = 9e6;
const source =
  'Abbott & von Doenhoff, Theory of Wing Sections (NACA TR 824), Reynolds number 9e6, from memory';

/** α_L0 [deg], c_m,ac, a0 [1/deg], a.c., c_l,max, thickness: the order and units of the printed table. */
type PrintedRow = readonly [number, number, number, number, number, number];

const printed: Readonly<Record<string, PrintedRow>> = {
  'naca-0009': [0, 0, 0.109, 0.25, 1.32, 0.09],
  'naca-0012': [0, 0, 0.107, 0.25, 1.59, 0.12],
  'naca-1412': [-1.1, -0.025, 0.108, 0.252, 1.58, 0.12],
  'naca-2412': [-2.0, -0.047, 0.105, 0.247, 1.68, 0.12],
  'naca-2415': [-2.0, -0.049, 0.106, 0.246, 1.63, 0.15],
  'naca-4412': [-3.8, -0.093, 0.105, 0.247, 1.67, 0.12],
  'naca-4415': [-4.3, -0.093, 0.105, 0.245, 1.64, 0.15],
  'naca-23012': [-1.4, -0.014, 0.107, 0.247, 1.79, 0.12],
  'naca-23015': [-1.0, -0.007, 0.107, 0.243, 1.72, 0.15],
  'naca-63-215': [-1.0, -0.03, 0.116, 0.267, 1.6, 0.15],
  'naca-63-415': [-2.8, -0.069, 0.118, 0.262, 1.68, 0.15],
  'naca-64-212': [-1.3, -0.027, 0.113, 0.262, 1.55, 0.12],
  'naca-64-415': [-2.8, -0.07, 0.115, 0.264, 1.65, 0.15],
  'naca-65-415': [-2.6, -0.06, 0.111, 0.268, 1.61, 0.15],
};

function section(name: string, row: PrintedRow): Section {
  const [zeroLiftDegrees, moment, slopePerDegree, aerodynamicCentre, maximumLift, thickness] = row;
  return {
    name,
    liftSlope: slopePerDegree / radian,
    zeroLiftAngle: zeroLiftDegrees * radian,
    moment,
    aerodynamicCentre,
    maximumLift,
    maximumLiftReynolds: testReynolds,
    thickness,
    source,
  };
}

/** All shipped sections, in the order of their families. */
export const sections: readonly Section[] = Object.entries(printed).map(([name, row]) => section(name, row));

const byName = new Map(sections.map((entry) => [entry.name, entry]));

/** The section of that name (`naca-2412`, lower case, with hyphens), or undefined. */
export function sectionByName(name: string): Section | undefined {
  return byName.get(name);
}
