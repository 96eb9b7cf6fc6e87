import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bodyStep, tailLiftShare, tailStep } from '../../src/methods/neutral-point.ts';
import { areaFractionBetween, momentFractionBetween } from '../../src/methods/planform.ts';
import {
  bladeChordFromSolidity,
  bladeSideArea,
  discArea,
  idleThrustCoefficient,
  inflowFactor,
  inflowInRange,
  normalForceFactor,
  propellerLiftShare,
  propellerNormalSlope,
  shareStep,
  thrustAtLowSpeed,
  thrustCoefficient,
  thrustFromPower,
  thrustMoment,
  thrustMomentSlopeAtPower,
  thrustMomentSlopeAtThrust,
  thrustOnWing,
} from '../../src/methods/propeller.ts';
import {
  immersedFraction,
  poweredDownwashGradient,
  poweredPressureRatio,
  slipstreamDiameter,
  slipstreamDownwashGradient,
  slipstreamPressureRatio,
} from '../../src/methods/slipstream.ts';
import { integrate } from './quadrature.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('blades', () => {
  it('side area equals the quadrature of chord times sine', () => {
    fc.assert(
      fc.property(number(0.06, 0.3), number(1, 3), number(0.1, 0.7), (chord, diameter, angle) => {
        const sine = (x: number) => Math.sin(Math.atan((0.75 * Math.tan(angle)) / x));
        const oneBlade = chord * (diameter / 2) * integrate(sine, 0.2, 1);
        expect(bladeSideArea(3, chord, diameter, angle)).toBeCloseTo(1.5 * oneBlade, 8);
      }),
    );
  });
  it('chord from solidity, by hand', () => {
    // 0.061 · π · 0.75 · 1.9/2 m.
    expect(bladeChordFromSolidity(0.061, 2, 1.9)).toBeCloseTo(0.136542, 5);
  });
});

describe('thrust', () => {
  it('the inflow factor gives the thrust back by momentum', () => {
    fc.assert(
      fc.property(number(20, 90), number(0.6, 1.3), number(0.3, 3), number(-0.3, 3), (v, rho, d, tc) => {
        const a = inflowFactor(tc);
        const thrust = rho * discArea(d) * v * (1 + a) * (2 * a * v);
        expect(thrustCoefficient(thrust, rho, v, d)).toBeCloseTo(tc, 9);
        expect(thrustOnWing(tc, d, 11.3) * 0.5 * rho * v * v * 11.3).toBeCloseTo(thrust, 5);
      }),
    );
  });
  it('windmilling: nil and idle in range, a brake beyond −π/9 not, beyond −π/8 not a number', () => {
    expect(inflowFactor(0)).toBe(0);
    expect(idleThrustCoefficient).toBeLessThan(0);
    expect(inflowInRange(idleThrustCoefficient)).toBe(true);
    expect(inflowFactor(-Math.PI / 9)).toBeCloseTo(-1 / 3, 12);
    expect(inflowInRange(-Math.PI / 9 + 1e-12)).toBe(true);
    expect(inflowInRange(-0.36)).toBe(false);
    expect(inflowFactor(-0.4)).toBeNaN();
  });
  it('near rest: finite, static thrust by momentum; fast: the power over the speed', () => {
    const [power, fraction, density, diameter] = [75_000, 0.85, 1.225, 1.8];
    const ideal = Math.cbrt(2 * density * discArea(diameter) * (fraction * power) ** 2);
    expect(thrustAtLowSpeed(power, fraction, 0, density, diameter)).toBeCloseTo(ideal, 6);
    const fast = thrustAtLowSpeed(power, fraction, 300, density, diameter);
    expect(fast / thrustFromPower(power, fraction, 300)).toBeCloseTo(1, 3);
    expect(thrustAtLowSpeed(0, fraction, 40, density, diameter)).toBe(0);
  });
  it('near rest: power in is power out, and thrust falls with speed', () => {
    fc.assert(
      fc.property(number(500, 3e5), number(0, 100), number(0.3, 3), (power, speed, diameter) => {
        const thrust = thrustAtLowSpeed(power, 0.8, speed, 1.1, diameter);
        // v from T = 2ρ S_p v (V + v), by the quadratic.
        const load = thrust / (2 * 1.1 * discArea(diameter));
        const v = -speed / 2 + Math.sqrt(speed ** 2 / 4 + load);
        expect((thrust * (speed + v)) / (0.8 * power)).toBeCloseTo(1, 8);
        expect(thrustAtLowSpeed(power, 0.8, speed + 1, 1.1, diameter)).toBeLessThan(thrust);
      }),
    );
  });
});

describe('normal force', () => {
  it('the factor of thrust grows with thrust, and is below 1 at idle', () => {
    expect(normalForceFactor(inflowFactor(idleThrustCoefficient))).toBeLessThan(1);
    fc.assert(
      fc.property(number(-0.3, 3), number(0.001, 1), (a, more) => {
        expect(normalForceFactor(a + more)).toBeGreaterThan(normalForceFactor(a));
      }),
    );
  });
  it('by hand', () => {
    // a 0.2: 1.2 (1.2 + 1.96)/2.96; fin slope 16π/(2 + √68).
    const factor = 1.281081;
    expect(normalForceFactor(0.2)).toBeCloseTo(factor, 6);
    const slope = propellerNormalSlope(0.05, 1.8, 1.14, 0.2);
    expect(slope).toBeCloseTo((factor * 1.14 * 4.905763 * 0.05) / 2.54469, 5);
    expect(propellerLiftShare(2, slope, 1.8, 15, 1.1)).toBeCloseTo((2 * slope * 2.54469 * 1.1) / 15, 6);
  });
  it('a tractor ahead moves the neutral point forward, a pusher behind aft; the step is that of the shares', () => {
    fc.assert(
      fc.property(
        number(0.1, 0.8),
        number(-3, 4),
        number(0.001, 0.5),
        number(3, 7),
        (neutral, place, share, slope) => {
          const step = shareStep(neutral, place, share, slope);
          expect(Math.sign(step)).toBe(Math.sign(place - neutral));
          const byShares = (slope * neutral + share * place) / (slope + share);
          expect(neutral + step).toBeCloseTo(byShares, 12);
        },
      ),
    );
  });
  it('full power costs a single tractor 0.01–0.08 MAC (common practice, no source)', () => {
    // A two-seat tourer at its climbing speed: 75 kW, 1.8 m, 34 m/s at sea level; tail 3 m, half in the stream.
    const thrust = thrustAtLowSpeed(75_000, 0.85, 34, 1.225, 1.8);
    const tc = thrustCoefficient(thrust, 1.225, 34, 1.8);
    const inflow = inflowFactor(tc);
    const chord = bladeChordFromSolidity(0.061, 2, 1.8);
    const slope = propellerNormalSlope(bladeSideArea(2, chord, 1.8, 0.3), 1.8, 1.14, inflow);
    const share = propellerLiftShare(1, slope, 1.8, 11.4, 1.15);
    const immersed = immersedFraction(slipstreamDiameter(1.8, inflow), 0.1, 0, 3, 0.6);
    const ratio = slipstreamPressureRatio(tc);
    const stream = slipstreamDownwashGradient(slope, inflow, 1.15);
    const neutral = (pressure: number, downwash: number, propeller: number) => {
      const tail = tailLiftShare(3.9, pressure, 0.19, downwash);
      const whole = 4.9 + tail;
      const without = 0.24 + tailStep(0.24, 3.7, tail, whole) + bodyStep(0.3, whole);
      return without + shareStep(without, -1.2, propeller, whole);
    };
    const idle = neutral(0.9, 0.42, 0);
    const byNormalForce = idle - neutral(0.9, 0.42, share);
    const withSlipstream =
      idle -
      neutral(
        poweredPressureRatio(0.9, immersed, ratio),
        poweredDownwashGradient(0.42, stream, immersed, ratio),
        share,
      );
    expect(byNormalForce).toBeGreaterThan(0.004);
    expect(withSlipstream).toBeGreaterThan(0.01);
    expect(withSlipstream).toBeLessThan(0.08);
    console.info(
      `Full power, tourer at its climbing speed: neutral point forward by ${withSlipstream.toFixed(3)} MAC, ` +
        `${byNormalForce.toFixed(3)} of it by the normal force`,
    );
  });
});

describe('thrust line', () => {
  it('above the CG it pitches down', () => {
    expect(thrustMoment(0.1, 0.2)).toBeCloseTo(-0.02, 15);
    expect(thrustMoment(0.1, -0.2)).toBeCloseTo(0.02, 15);
  });
  it('its slopes are those of level flight, by differences', () => {
    fc.assert(
      fc.property(number(0.2, 1.6), number(-0.3, 0.3), number(300, 2000), (lift, height, loading) => {
        // q = (W/S)/C_L; C_T by constant power P/S per area, or by constant thrust.
        const speed = (cl: number) => Math.sqrt((2 * loading) / (1.225 * cl));
        const moment = (force: (v: number) => number) => (cl: number) =>
          thrustMoment((force(speed(cl)) * cl) / loading, height);
        const slope = (f: (cl: number) => number) => (f(lift + 1e-5) - f(lift - 1e-5)) / 2e-5;
        const byPower = moment((v) => 4000 / v);
        const byThrust = moment(() => 120);
        expect(thrustMomentSlopeAtPower(byPower(lift), lift)).toBeCloseTo(slope(byPower), 6);
        expect(thrustMomentSlopeAtThrust(byThrust(lift), lift)).toBeCloseTo(slope(byThrust), 6);
      }),
    );
  });
});

describe('parts of a tapered wing', () => {
  it('equal quadrature, and the whole is 1', () => {
    fc.assert(
      fc.property(number(0, 1), number(0, 1), number(0, 1.2), (p, q, taper) => {
        const [from, to] = [Math.min(p, q), Math.max(p, q)];
        const chord = (eta: number) => 1 - (1 - taper) * eta;
        const part = (f: (eta: number) => number) => integrate(f, from, to) / integrate(f, 0, 1);
        expect(areaFractionBetween(from, to, taper)).toBeCloseTo(part(chord), 8);
        expect(momentFractionBetween(from, to, taper)).toBeCloseTo(
          part((eta) => chord(eta) ** 2),
          8,
        );
        expect(areaFractionBetween(0, 1, taper)).toBeCloseTo(1, 12);
        expect(momentFractionBetween(0, 1, taper)).toBeCloseTo(1, 12);
      }),
    );
  });
});
