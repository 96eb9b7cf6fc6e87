import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  floatAngle,
  forwardLimitByStickForce,
  freeStickFactor,
  springStep,
  stickForce,
  stickForceBySpeed,
  stickForceScale,
  stickFreeLiftSlope,
  stickFreeStep,
} from '../../src/methods/free-stick.ts';
import {
  elevatorPerG,
  limitByForcePerG,
  manoeuvreStep,
  pitchDamping,
  stickForcePerG,
} from '../../src/methods/manoeuvre.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** An aeroplane as forces and moments, wing incidence 0, couples lumped; elevator with its hinge moment. */
const aeroplane = fc.record({
  rest: number(3.5, 6),
  restPlace: number(0.1, 0.3),
  couples: number(-0.15, 0.02),
  tailSlope: number(2.5, 5),
  tailPlace: number(2, 6),
  tailIncidence: number(-0.1, 0.05),
  areaRatio: number(0.08, 0.3),
  pressure: number(0.8, 1),
  downwash: number(0.2, 0.6),
  effectiveness: number(0.3, 0.8),
  byAngle: number(-0.5, -0.05),
  byElevator: number(-1, -0.4),
  hinge: number(-0.02, 0.02),
  elevatorSize: number(0.05, 0.5),
  gearing: number(0.5, 3),
  loading: number(200, 1500),
  spring: number(0, 60),
  margin: number(0.02, 0.3),
});
type Aeroplane = typeof aeroplane extends fc.Arbitrary<infer T> ? T : never;

function figures(p: Aeroplane) {
  const tail = p.pressure * p.tailSlope * p.areaRatio;
  const share = tail * (1 - p.downwash);
  const whole = p.rest + share;
  const neutral = (p.rest * p.restPlace + share * p.tailPlace) / whole;
  const factor = freeStickFactor(p.effectiveness, p.byAngle, p.byElevator);
  const free = neutral + stickFreeStep(neutral, p.tailPlace, share, whole, factor);
  const elevatorSlope = tail * p.effectiveness;
  const scale = stickForceScale(
    p.gearing,
    p.pressure,
    p.elevatorSize,
    p.byElevator,
    elevatorSlope,
    p.tailPlace,
    free,
  );
  return { share, whole, neutral, factor, free, elevatorSlope, scale, h: free - p.margin };
}

/** Wing angle and elevator at a lift and nil moment, solved from the forces themselves; the tail meets an extra angle. */
function balance(p: Aeroplane, lift: number, h: number, extraTailAngle = 0) {
  const tail = (p.couples + lift * (h - p.restPlace)) / (p.tailPlace - p.restPlace);
  const angle = (lift - tail) / p.rest;
  const tailAngle = angle * (1 - p.downwash) + p.tailIncidence + extraTailAngle;
  const elevator = (tail / (p.pressure * p.areaRatio * p.tailSlope) - tailAngle) / p.effectiveness;
  return { tailAngle, elevator };
}

/** Stick force of a balanced state; the tab adds a hinge coefficient. */
function force(p: Aeroplane, at: ReturnType<typeof balance>, pressure: number, tab: number): number {
  const coefficient = p.hinge + tab + p.byAngle * at.tailAngle + p.byElevator * at.elevator;
  return p.gearing * p.pressure * pressure * p.elevatorSize * coefficient;
}

describe('neutral point', () => {
  it('is that of shares with F times the tail', () => {
    fc.assert(
      fc.property(aeroplane, (p) => {
        const f = figures(p);
        const freed = f.factor * f.share;
        const slope = p.rest + freed;
        expect(stickFreeLiftSlope(f.whole, f.share, f.factor)).toBeCloseTo(slope, 12);
        expect(f.free).toBeCloseTo((p.rest * p.restPlace + freed * p.tailPlace) / slope, 12);
        expect(f.free).toBeLessThan(f.neutral);
      }),
    );
  });
  it('an elevator that does not float changes nothing', () => {
    expect(freeStickFactor(0.6, 0, -0.8)).toBe(1);
    expect(stickFreeStep(0.42, 3.7, 0.4, 5.3, 1)).toBeCloseTo(0, 15);
  });
  it('common factors on the hinge slopes cancel, separate ones do not', () => {
    const both = freeStickFactor(0.6, 0.7 * -0.4, 0.7 * -0.8);
    expect(both).toBeCloseTo(freeStickFactor(0.6, -0.4, -0.8), 12);
    expect(freeStickFactor(0.6, 0.6 * -0.4, 0.8 * -0.8)).toBeGreaterThan(both);
  });
  it('freeing the stick costs 0.02–0.10 MAC (common practice, no source)', () => {
    // Elevator of 0.4 chord: C_hα −0.25, C_hδ −0.6, τ 0.6.
    const step = stickFreeStep(0.42, 3.7, 0.39, 5.3, freeStickFactor(0.6, -0.25, -0.6));
    expect(-step).toBeGreaterThan(0.02);
    expect(-step).toBeLessThan(0.1);
  });
  it('the float angle leaves no hinge moment', () => {
    expect(floatAngle(0.01, -0.3, 0.05, -0.8)).toBeCloseTo((0.01 - 0.015) / 0.8, 12);
  });
});

describe('stick force', () => {
  it('is that of forces and hinge moments, trimmed by a tab', () => {
    fc.assert(
      fc.property(aeroplane, number(30, 70), number(0.6, 1.6), (p, trimmed, ratio) => {
        const f = figures(p);
        const q = (v: number) => 0.6125 * v * v;
        const at = (v: number) => balance(p, p.loading / q(v), f.h);
        const withSpring = (v: number, tab: number) => force(p, at(v), q(v), tab) + p.spring;
        // The tab takes the force away at the trimmed speed.
        const tab = -withSpring(trimmed, 0) / (p.gearing * p.pressure * q(trimmed) * p.elevatorSize);
        const direct = withSpring(ratio * trimmed, tab);
        const closed = stickForce(f.scale, p.loading, f.h, f.free, p.spring, ratio);
        expect(Math.abs(closed - direct)).toBeLessThan(1e-7 * (100 + Math.abs(direct)));
        if (ratio < 1) expect(closed).toBeGreaterThan(0);
        const step = 1e-4 * trimmed;
        const slope = (withSpring(trimmed + step, tab) - withSpring(trimmed - step, tab)) / (2 * step);
        const bySpeed = stickForceBySpeed(f.scale, p.loading, f.h, f.free, p.spring, trimmed);
        expect(bySpeed / slope).toBeCloseTo(1, 5);
        expect(bySpeed).toBeLessThan(0);
      }),
    );
  });
  it('a spring moves the point of nil force aft, where the force is nil at every speed', () => {
    fc.assert(
      fc.property(aeroplane, number(0.5, 1.8), (p, ratio) => {
        const f = figures(p);
        const step = springStep(p.spring, f.scale, p.loading);
        expect(step).toBeGreaterThanOrEqual(0);
        const there = stickForce(f.scale, p.loading, f.free + step, f.free, p.spring, ratio);
        expect(there).toBeCloseTo(0, 6);
      }),
    );
  });
  it('the forward limit is where the force is the limit', () => {
    fc.assert(
      fc.property(aeroplane, number(20, 200), number(0.5, 0.9), (p, limit, ratio) => {
        const f = figures(p);
        const h = forwardLimitByStickForce(limit, ratio, f.scale, p.loading, f.free, p.spring);
        expect(stickForce(f.scale, p.loading, h, f.free, p.spring, ratio)).toBeCloseTo(limit, 6);
      }),
    );
  });
});

describe('manoeuvre', () => {
  it('elevator and force per g are those of a pull-up, forces and moments written out', () => {
    fc.assert(
      fc.property(aeroplane, number(30, 70), number(0.5, 1.3), number(0.8, 2), (p, speed, density, chord) => {
        const f = figures(p);
        const q = 0.5 * density * speed * speed;
        const lift = p.loading / q;
        const [area, gravity] = [12, 9.80665];
        const mass = (p.loading * area) / gravity;
        // One more g: the pitch rate g/V turns the tail's stream by q l/V.
        const arm = p.tailPlace - f.h;
        const turn = (gravity / speed) * ((arm * chord) / speed);
        const level = balance(p, lift, f.h);
        const pulled = balance(p, 2 * lift, f.h, turn);
        // With the tail's lift by pitching in the balance, (l/c)² is the product of the arms from CG and neutral point.
        const step = (neutral: number) => {
          const effectiveArm = Math.sqrt(arm * (p.tailPlace - neutral));
          const damping = pitchDamping(p.tailSlope, p.pressure, p.areaRatio, effectiveArm, 1);
          return manoeuvreStep(damping, density, area, chord, mass);
        };
        const point = f.neutral + step(f.neutral);
        const perG = elevatorPerG(lift, f.h, point, f.neutral, f.elevatorSlope, p.tailPlace);
        expect(perG / (pulled.elevator - level.elevator)).toBeCloseTo(1, 6);
        const freePoint = f.free + f.factor * step(f.free);
        const closed = stickForcePerG(f.scale, p.loading, f.h, freePoint, 0);
        const direct = force(p, pulled, q, 0) - force(p, level, q, 0);
        expect(Math.abs(closed - direct)).toBeLessThan(1e-7 * (100 + Math.abs(direct)));
      }),
    );
  });
  it('bobweight adds its force, and the limit is where the force per g is the limit', () => {
    fc.assert(
      fc.property(aeroplane, number(5, 150), (p, limit) => {
        const f = figures(p);
        const h = limitByForcePerG(limit, f.scale, p.loading, f.free + 0.03, p.spring);
        expect(stickForcePerG(f.scale, p.loading, h, f.free + 0.03, p.spring)).toBeCloseTo(limit, 6);
      }),
    );
  });
  it('by hand; the margin is least high up and heavy', () => {
    // −2 · 1.1 · 0.9 · 3.9 · 0.19 · 3.4².
    const damping = pitchDamping(3.9, 0.9, 0.19, 3.4, 1.1);
    expect(damping).toBeCloseTo(-16.960601, 5);
    expect(manoeuvreStep(damping, 1.225, 11.4, 1.24, 700)).toBeCloseTo(0.104895, 5);
    expect(manoeuvreStep(damping, 0.9, 11.4, 1.24, 750)).toBeLessThan(0.104);
  });
});
