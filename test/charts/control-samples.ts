/** Invented data for the charts of trim, control limits, loading and flight test: usual and awkward. */
import {
  type CgLimit,
  type ChartHeading,
  type ChartSpec,
  elevatorToTrim,
  type FlightTestSlopesData,
  flightTestSlopes,
  type LoadingDiagramData,
  loadingDiagram,
  macRuler,
  neutralPointBuildUp,
  type TrimCurve,
  type TrimPanel,
  tailSizing,
} from '../../src/charts/index.ts';
import { buildUp, heading, longHeading, rulerRow, steps } from './samples.ts';

/** Elevator [°, trailing edge up] of a linear aeroplane: at no lift it does not depend on the CG, and it rises with (h_n − h) C_L. */
function elevatorAt(
  speed: number,
  stall: number,
  cg: number,
  neutralPoint: number,
  atNoLift: number,
): number {
  return atNoLift + 0.55 * (neutralPoint - cg) * 1.5 * (stall / speed) ** 2;
}

export function trimPanel(
  title: string,
  stall: number,
  neutralPoint: number,
  atNoLift: number,
  cgs: readonly number[] = [22, 34, neutralPoint],
  more: Partial<TrimPanel> = {},
): TrimPanel {
  const speeds = steps(40, stall, 135);
  const kinds = ['forward', 'aft', 'neutral point'] as const;
  const names = ['CG forward', 'CG aft', 'CG at the neutral point'];
  const curves = cgs.map(
    (cg, index): TrimCurve => ({
      label: names[index]!,
      kind: kinds[index]!,
      cg,
      elevator: speeds.map((speed) => elevatorAt(speed, stall, cg, neutralPoint, atNoLift)),
    }),
  );
  return { title, speeds, curves, stallSpeed: stall, greatestSpeed: 135, ...more };
}

export function trim(panels: readonly TrimPanel[], over: ChartHeading = heading): ChartSpec {
  return elevatorToTrim({
    heading: over,
    speedTitle: 'Calibrated airspeed [kt]',
    travel: { up: 25, down: -20 },
    panels,
  });
}

export const usualLoading: LoadingDiagramData = {
  heading,
  massTitle: 'Mass [kg]',
  station: { title: 'Station [m]', leadingEdge: 1.95, chord: 1.18 },
  empty: { cg: 20.4, mass: 385 },
  greatestMass: 650,
  limits: [
    {
      label: 'control limit: elevator travel at the stall',
      forbidden: 'forward',
      line: [
        { cg: 15, mass: 360 },
        { cg: 19.5, mass: 680 },
      ],
    },
    { label: 'aft limit: margin at least 5 %', forbidden: 'aft', line: [{ cg: 36.4, mass: 0 }] },
  ],
  cases: [
    {
      label: 'two up, full fuel',
      states: [
        { cg: 30.6, mass: 648 },
        { cg: 27.6, mass: 588 },
      ],
    },
    {
      label: 'two up, baggage',
      states: [
        { cg: 34.2, mass: 640 },
        { cg: 32.8, mass: 606 },
        { cg: 31.5, mass: 590 },
      ],
    },
    {
      label: 'solo',
      states: [
        { cg: 26.2, mass: 525 },
        { cg: 22.4, mass: 465 },
      ],
    },
    { label: 'solo, ballast', states: [{ cg: 24.6, mass: 480 }] },
  ],
};

const noise = [0.2, -0.3, 0.1, -0.15, 0.25, -0.1, 0.05, -0.2];
function flown(cg: number, over: Partial<FlightTestSlopesData['flown'][number]> = {}) {
  const liftCoefficients = steps(8, 0.35, 1.25);
  const slope = 0.42 * (41 - cg);
  return {
    cg,
    liftCoefficients,
    measured: liftCoefficients.map((lift, k) => -2 + slope * lift + noise[(k + Math.round(cg)) % 8]!),
    fitted: { slope, atNoLift: -2 },
    slopeUncertainty: 0.7,
    predicted: { slope: 0.42 * (43 - cg), atNoLift: -2.4 },
    ...over,
  };
}
export const usualFlightTest: FlightTestSlopesData = {
  heading,
  measuredTitle: 'Elevator, trailing edge up [°]',
  slopeTitle: 'Slope of the elevator [° per unit of lift coefficient]',
  pointName: 'stick-fixed neutral point',
  flown: [flown(22), flown(26.5), flown(31)],
  slopeLine: { slope: -0.42, atLeadingEdge: 0.42 * 41 },
  neutralPoint: { at: 41, least: 38.2, greatest: 45.9 },
  predictedNeutralPoint: 43,
};

const sizes = steps(9, 0.25, 0.65);
const control = (label: string, cg: (size: number) => number): CgLimit => ({
  label,
  cg: sizes.map(cg),
  forbidden: 'forward',
});
const sixLimits: readonly CgLimit[] = [
  { label: 'aft: neutral point − 5 %', cg: sizes.map((v) => 8 + 70 * v), forbidden: 'aft' },
  control('too stable: neutral point − 20 %', (v) => -7 + 70 * v),
  control('elevator travel at the stall', (v) => 34 - 34 * v),
  control('tail’s maximum lift at the stall', (v) => 41 - 52 * v),
  control('nose-wheel lift-off', (v) => 27 - 22 * v),
  control('stick force, 15 daN at 1.3 stall speed', (v) => -16 + 55 * v),
];
function sized(limits: readonly CgLimit[], loading: { forward: number; aft: number }, over = heading) {
  return tailSizing({
    heading: over,
    sizeTitle: 'Tail volume',
    sizeDecimals: 3,
    sizes,
    limits,
    loading,
    baseline: 0.42,
  });
}

const conditions = ['cruise', 'climb, full power', 'approach, flaps 30°, idle'];
const fullRow = {
  neutralPoint: 39.4,
  neutralPoints: [41.2, 39.4, 42.8],
  freeStickNeutralPoint: 36.1,
  manoeuvrePoint: 47.9,
  freeStickManoeuvrePoint: 44.2,
  window: { from: 23.1, to: 34.4 },
  controlLimit: { at: 23.1, name: 'elevator travel at the stall' },
};

/** Charts of trim, control limits, loading and flight test at usual and at awkward data, by name. */
export const controlCharts: Readonly<Record<string, () => ChartSpec>> = {
  'trim, four panels': () =>
    trim([
      trimPanel('Flaps up, idle', 52, 43, -2),
      trimPanel('Flaps up, full power', 49, 39, -1),
      trimPanel('Flaps 30°, idle', 45, 42, 3.5),
      trimPanel('Flaps 30°, full power', 42, 38, 4.5),
    ]),
  'trim, one panel': () => trim([trimPanel('Clean', 52, 43, -2, [22, 34])]),
  'trim, two panels': () => trim([trimPanel('Flaps up, idle', 52.4, 43, -2), trimPanel('Down', 45, 39, 2)]),
  'trim, six panels, beyond the travel, close curves': () =>
    trim(
      steps(6, 0, 5).map((k) =>
        trimPanel(
          `Flaps ${10 * k}°, a power state of a long name that goes on and on`,
          40 + 2 * k,
          40 + 6 * k,
          -14 + 6 * k,
          [2 + 6 * k, 36 + k, 37 + k],
        ),
      ),
      longHeading,
    ),
  'trim, empty places': () =>
    trim([
      trimPanel('No trim at the CG forward', 52, 43, -2, [22, 34], {
        curves: [
          { label: 'CG forward', kind: 'forward', cg: 22, elevator: steps(40, 0, 1).map(() => Number.NaN) },
          {
            label: 'CG aft',
            kind: 'aft',
            cg: 34,
            elevator: steps(40, 9, -3).map((y, k) => (k === 20 ? Number.NaN : y)),
          },
        ],
        stallSpeed: Number.NaN,
      }),
    ]),
  'loading, usual': () => loadingDiagram(usualLoading),
  'loading, twelve cases': () =>
    loadingDiagram({
      ...usualLoading,
      heading: longHeading,
      cases: steps(12, 0, 11).map((k) => ({
        label: `loading case ${k} of a long name, with baggage and ballast`,
        states: [
          { cg: 25 + 0.8 * k, mass: 610 + 3 * k },
          { cg: 24 + 0.7 * k, mass: 540 + 3 * k },
        ],
      })),
    }),
  'loading, in lb and in, far limits': () =>
    loadingDiagram({
      ...usualLoading,
      massTitle: 'Mass [lb]',
      station: { title: 'Station [in]', leadingEdge: 76.8, chord: 46.5 },
      limits: [
        { label: 'control limit, far ahead', forbidden: 'forward', line: [{ cg: -240, mass: 0 }] },
        { label: 'aft limit', forbidden: 'aft', line: [{ cg: 900, mass: 0 }] },
      ],
    }),
  'loading, one state, small mass': () =>
    loadingDiagram({
      heading,
      massTitle: 'Mass [kg]',
      station: usualLoading.station,
      empty: { cg: 31, mass: 2.4 },
      limits: [],
      cases: [
        { label: 'as flown', states: [{ cg: 31, mass: 2.4 }] },
        { label: 'not known', states: [{ cg: Number.NaN, mass: 3 }] },
      ],
    }),
  'tail, six limits': () => sized(sixLimits, { forward: 21.5, aft: 31 }),
  'tail, six limits, far and infinite': () =>
    sized(
      [
        ...sixLimits.slice(0, 3),
        control('a tail so strong that this limit is far ahead', (v) => -300 * v),
        control('never binding', () => Number.NEGATIVE_INFINITY),
        control('stick force', (v) => (v < 0.4 ? Number.NaN : 12 + 8 * v)),
      ],
      { forward: 23, aft: 31 },
      longHeading,
    ),
  'ruler, conditions and control limit': () =>
    macRuler({
      heading,
      conditions,
      rows: [
        rulerRow(0, fullRow),
        rulerRow(1, {
          ...fullRow,
          controlLimit: { at: 18.4, name: 'nose-wheel lift-off' },
          neutralPoints: [41.2, 41.2, 42],
        }),
        rulerRow(2, {
          ...fullRow,
          window: { from: 36, to: 34.4 },
          neutralPoints: [Number.NaN, 39.4, 39.6],
          controlLimit: { at: 36, name: 'elevator travel at the stall' },
        }),
        rulerRow(3, { ...fullRow, controlLimit: { at: Number.NaN, name: 'elevator travel at the stall' } }),
      ],
    }),
  'ruler, twelve conditions': () =>
    macRuler({
      heading: longHeading,
      conditions: steps(12, 1, 12).map((k) => `condition of a long name, ${k}`),
      rows: steps(12, 0, 11).map((k) =>
        rulerRow(k, {
          ...fullRow,
          neutralPoints: steps(12, 39, 42),
          controlLimit: { at: 23.1, name: 'a limit of a very long name '.repeat(5) },
        }),
      ),
    }),
  'build-up, seven steps': () =>
    neutralPointBuildUp({
      heading,
      combinations: steps(3, 0, 2).map((k) => {
        const before = buildUp(k, [25.4, 24, -7.9, -1.2]);
        const further = [
          { name: 'propeller', change: -3.1 },
          { name: 'flaps', change: 0.4 },
          { name: 'free stick', change: -4.6 },
        ];
        return {
          ...before,
          steps: [...before.steps, ...further],
          neutralPoint: before.neutralPoint + further.reduce((sum, { change }) => sum + change, 0),
        };
      }),
    }),
  'flight test, usual': () => flightTestSlopes(usualFlightTest),
  'flight test, two close positions, open limits': () =>
    flightTestSlopes({
      ...usualFlightTest,
      heading: longHeading,
      pointName: 'stick-free neutral point',
      flown: [flown(30), { ...flown(30.4), slopeUncertainty: 3 }],
      neutralPoint: { at: 41, least: 33 },
      predictedNeutralPoint: 41.3,
    }),
  'flight test, no result': () =>
    flightTestSlopes({
      heading,
      measuredTitle: 'Stick force, pull [N]',
      slopeTitle: 'Slope of the force [N per unit of lift coefficient]',
      pointName: 'stick-free neutral point',
      flown: [
        {
          cg: 25,
          liftCoefficients: [0.4, 0.8, Number.NaN],
          measured: [-3, -9, 1],
          fitted: { slope: -15, atNoLift: 3 },
        },
      ],
      slopeLine: null,
      neutralPoint: null,
    }),
  'flight test, far point, eight positions': () =>
    flightTestSlopes({
      ...usualFlightTest,
      flown: steps(8, 22, 32).map((cg) => flown(cg)),
      neutralPoint: { at: 300 },
      predictedNeutralPoint: Number.NaN,
    }),
};
