/** Invented flight-test data: an aeroplane that obeys the linear law, flown at chosen CGs and speeds. */

import type { FlownPoint } from '../../src/flight-test/read-data.ts';
import { dynamicPressure, liftCoefficient } from '../../src/methods/atmosphere.ts';

const knot = 1852 / 3600;
export const degree = Math.PI / 180;
export const wing = { area: 11.4, mac: 1.24, macLeadingEdge: 1.9 } as const;

/** Repeatable normal numbers: mulberry32 (public domain), and Box and Muller. */
export function normalNumbers(seed: number): () => number {
  let state = seed;
  const even = () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  return () => Math.sqrt(-2 * Math.log(1 - even())) * Math.cos(2 * Math.PI * even());
}

export interface Flight {
  readonly cgs?: readonly number[];
  /** [kt] */
  readonly speeds?: readonly number[];
  readonly mass?: number;
  /** [m] */
  readonly height?: number;
  readonly flaps?: string;
  readonly power?: string;
  /** Elevator [rad] at a CG and lift coefficient. */
  readonly elevator?: (cg: number, lift: number) => number;
  /** Stick force over dynamic pressure [m²], likewise. */
  readonly force?: (cg: number, lift: number) => number;
}

/** Neutral points of the invented aeroplane: slopes of −24° and 9 N/kPa per MAC of margin. */
export const fixedAt = 0.42;
export const freeAt = 0.38;
export const straightElevator = (cg: number, lift: number) => (1.5 + 24 * (cg - fixedAt) * lift) * degree;
export const straightForce = (cg: number, lift: number) => 0.009 * (freeAt - cg) * (lift - 0.6);

/** One point for each CG and speed, as if read from a table. */
export function fly({
  cgs = [0.22, 0.27, 0.33],
  speeds = [55, 62, 70, 82, 100],
  mass = 590,
  height = 900,
  flaps = 'up',
  power = 'idle',
  elevator = straightElevator,
  force,
}: Flight = {}): FlownPoint[] {
  const places = cgs.flatMap((cg) => speeds.map((speed) => ({ cg, speed })));
  return places.map(({ cg, speed }, index) => {
    const calibratedSpeed = speed * knot;
    const lift = liftCoefficient(mass, calibratedSpeed, height, wing.area);
    const q = dynamicPressure(calibratedSpeed, height);
    return {
      name: String(index + 1),
      line: index + 2,
      calibratedSpeed,
      mass,
      cg,
      elevator: elevator(cg, lift),
      ...(force === undefined ? {} : { stickForce: force(cg, lift) * q }),
      flaps,
      power,
      height,
      liftCoefficient: lift,
      dynamicPressure: q,
    };
  });
}
