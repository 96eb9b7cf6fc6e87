import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  forwardLimitAtWholeLift,
  forwardLimitAtWingLift,
  forwardLimitByElevator,
  forwardLimitByNoseWheel,
  tailDownload,
  tailLiftAt,
} from '../../src/methods/forward-limit.ts';
import {
  bodyStep,
  tailLiftShare,
  tailStep,
  verticalPositionShift,
  wholeLiftSlope,
} from '../../src/methods/neutral-point.ts';
import { shareStep, thrustMoment, thrustMomentSlopeAtPower } from '../../src/methods/propeller.ts';
import {
  elevatorLiftSlope,
  elevatorSlopeBySpeed,
  elevatorSlopeToTrim,
  elevatorToTrim,
  tailLiftAtWingZeroLift,
  tailLiftCoefficient,
  tailLiftToTrim,
  trimFigure,
  trimFigureCount,
  trimSlopeLimit,
  trimState,
  verticalPositionMoment,
  wingAngleOfAttack,
  wingBodyPosition,
  zeroLiftMoment,
} from '../../src/methods/trim.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const aeroplane = fc.record({
  wingSlope: number(3.5, 6),
  wingPlace: number(0.15, 0.35),
  wingIncidence: number(-0.02, 0.08),
  zeroLift: number(-0.3, 0.02),
  wingMoment: number(-0.25, 0.03),
  tailSlope: number(2.5, 5),
  tailPlace: number(2, 6),
  tailIncidence: number(-0.1, 0.05),
  areaRatio: number(0.08, 0.4),
  pressure: number(0.8, 1.4),
  downwash: number(0.1, 0.7),
  extraDownwash: number(0, 0.05),
  effectiveness: number(0.2, 1),
  bodySlope: number(0, 0.5),
  bodyMoment: number(-0.05, 0.05),
  propellerSlope: number(0, 0.15),
  propellerPlace: number(-2, 3),
  propellerTilt: number(-0.1, 0.1),
  cg: number(0, 0.6),
});
type Aeroplane = typeof aeroplane extends fc.Arbitrary<infer T> ? T : never;

/** Lifts on S by part and the whole's moment about h, from the body's angle of attack and the elevator. */
function forces(p: Aeroplane, alpha: number, elevator: number, h: number) {
  const wingAngle = alpha + p.wingIncidence - p.zeroLift;
  const wing = p.wingSlope * wingAngle;
  const tailAngle =
    alpha + p.tailIncidence - p.downwash * wingAngle - p.extraDownwash + p.effectiveness * elevator;
  const tail = p.pressure * p.areaRatio * p.tailSlope * tailAngle;
  const propeller = p.propellerSlope * (alpha + p.propellerTilt);
  // The body's couple counts from nil wing lift.
  const body = p.bodyMoment + p.bodySlope * wingAngle;
  const moment =
    p.wingMoment +
    body +
    wing * (h - p.wingPlace) +
    tail * (h - p.tailPlace) +
    propeller * (h - p.propellerPlace);
  return { wing, tail, propeller, lift: wing + tail + propeller, moment };
}

/** The same aeroplane through the formulas. */
function figures(p: Aeroplane) {
  const share = tailLiftShare(p.tailSlope, p.pressure, p.areaRatio, p.downwash);
  const withTail = wholeLiftSlope(p.wingSlope, share);
  const withoutPropeller =
    p.wingPlace + tailStep(p.wingPlace, p.tailPlace, share, withTail) + bodyStep(p.bodySlope, withTail);
  const liftSlope = withTail + p.propellerSlope;
  const neutral =
    withoutPropeller + shareStep(withoutPropeller, p.propellerPlace, p.propellerSlope, withTail);
  const elevatorSlope = elevatorLiftSlope(p.tailSlope, p.pressure, p.areaRatio, p.effectiveness);
  const couples = p.wingMoment + p.bodyMoment;
  const tailAtZero = tailLiftAtWingZeroLift(
    p.tailSlope,
    p.pressure,
    p.areaRatio,
    p.zeroLift,
    p.wingIncidence,
    p.tailIncidence,
    p.extraDownwash,
  );
  const propellerAtZero = p.propellerSlope * (p.zeroLift - p.wingIncidence + p.propellerTilt);
  const moment =
    zeroLiftMoment(couples, tailAtZero, p.tailPlace, neutral) +
    zeroLiftMoment(0, propellerAtZero, p.propellerPlace, neutral);
  const wingBody = wingBodyPosition(p.wingPlace, p.bodySlope, p.wingSlope);
  const rest = wingBody + shareStep(wingBody, p.propellerPlace, p.propellerSlope, p.wingSlope);
  const restCouples = couples + zeroLiftMoment(0, propellerAtZero, p.propellerPlace, rest);
  return { share, liftSlope, neutral, elevatorSlope, tailAtZero, moment, couples, rest, restCouples };
}

const lift = number(-0.3, 2);
const close = (a: number, b: number, scale = 1) =>
  expect(Math.abs(a - b)).toBeLessThan(1e-9 * (scale + Math.abs(b)));

describe('trim', () => {
  it('the state found has the lift asked for and no moment, and the closed form agrees', () => {
    const out = new Float64Array(trimFigureCount);
    fc.assert(
      fc.property(aeroplane, lift, (p, cl) => {
        const f = figures(p);
        const atZero = forces(p, 0, 0, 0);
        trimState(
          cl,
          p.cg,
          atZero.lift,
          atZero.moment,
          f.liftSlope,
          f.neutral,
          f.elevatorSlope,
          p.tailPlace,
          out,
        );
        const found = forces(p, out[trimFigure.angleOfAttack], out[trimFigure.elevator], p.cg);
        close(found.lift, cl, 10);
        close(found.moment, 0, 10);
        const closed = elevatorToTrim(cl, p.cg, f.moment, f.neutral, f.elevatorSlope, p.tailPlace);
        close(out[trimFigure.elevator], closed, 10);
        const tail = tailLiftToTrim(cl, p.cg, f.restCouples, f.rest, p.tailPlace);
        close(found.tail, tail, 10);
        const coefficient = tailLiftCoefficient(tail, p.pressure, p.areaRatio);
        close(coefficient * p.pressure * p.areaRatio, found.tail, 10);
        const rootAngle = out[trimFigure.angleOfAttack] + p.wingIncidence;
        close(wingAngleOfAttack(found.wing, p.wingSlope, p.zeroLift), rootAngle, 10);
      }),
    );
  });

  it('at no lift the elevator does not depend on the CG; its slope is (h − h_n)/(C_Lδ (h_t − h_n))', () => {
    fc.assert(
      fc.property(aeroplane, lift, number(-0.3, 0.3), (p, cl, shift) => {
        const f = figures(p);
        const at = (l: number, h: number) =>
          elevatorToTrim(l, h, f.moment, f.neutral, f.elevatorSlope, p.tailPlace);
        expect(at(0, p.cg + shift)).toBe(at(0, p.cg));
        const slope = (at(cl + 0.5, p.cg) - at(cl - 0.5, p.cg)) / 1;
        close(elevatorSlopeToTrim(p.cg, f.neutral, f.elevatorSlope, p.tailPlace, 0), slope, 10);
      }),
    );
  });

  it('with the CG at the neutral point the curve is straight and flat, and flatter the further aft before it', () => {
    fc.assert(
      fc.property(aeroplane, number(0.2, 1.5), number(0.01, 0.4), (p, cl, margin) => {
        const f = figures(p);
        const at = (l: number, h: number) =>
          elevatorToTrim(l, h, f.moment, f.neutral, f.elevatorSlope, p.tailPlace);
        close(at(cl, f.neutral), at(0, f.neutral));
        const steep = (h: number) => at(cl, h) - at(cl + 0.2, h);
        expect(steep(f.neutral - margin)).toBeGreaterThan(0);
        expect(steep(f.neutral - 2 * margin)).toBeGreaterThan(steep(f.neutral - margin));
      }),
    );
  });

  it('against speed it is steeper at low speed, and the slope is that of differences', () => {
    fc.assert(
      fc.property(aeroplane, number(25, 80), number(200, 1500), number(0.02, 0.3), (p, v, load, margin) => {
        const f = figures(p);
        const h = f.neutral - margin;
        const cl = (speed: number) => load / (0.6125 * speed ** 2);
        const at = (speed: number) =>
          elevatorToTrim(cl(speed), h, f.moment, f.neutral, f.elevatorSlope, p.tailPlace);
        const slope = (speed: number) =>
          elevatorSlopeBySpeed(
            elevatorSlopeToTrim(h, f.neutral, f.elevatorSlope, p.tailPlace, 0),
            cl(speed),
            speed,
          );
        const differences = (at(v + 0.01) - at(v - 0.01)) / 0.02;
        expect(slope(v) / differences).toBeCloseTo(1, 5);
        expect(slope(v)).toBeGreaterThan(slope(1.1 * v));
      }),
    );
  });

  it('goes flat at the trim slope limit, with thrust line and heights, not at the neutral point', () => {
    fc.assert(
      fc.property(aeroplane, number(0.3, 1.4), number(-0.3, 0.3), number(-0.3, 0.3), (p, cl, zT, zW) => {
        const f = figures(p);
        // C_T 0.12 at C_L 0.8, at constant power.
        const thrust = (l: number) => thrustMoment(0.12 * (l / 0.8) ** 1.5, zT);
        const shift = (l: number) => verticalPositionShift(zW, l, p.wingSlope, 7.3, 0.9);
        const slope = thrustMomentSlopeAtPower(thrust(cl), cl) - shift(cl);
        const flat = trimSlopeLimit(f.neutral, slope);
        const at = (l: number) =>
          elevatorToTrim(
            l,
            flat,
            f.moment + thrust(l) + verticalPositionMoment(shift(l), l),
            f.neutral,
            f.elevatorSlope,
            p.tailPlace,
          );
        expect((at(cl + 1e-4) - at(cl - 1e-4)) / 2e-4).toBeCloseTo(0, 6);
        expect(elevatorSlopeToTrim(flat, f.neutral, f.elevatorSlope, p.tailPlace, slope)).toBeCloseTo(0, 10);
      }),
    );
  });

  it('thrust lines 0.2 c off move the flat point by 0.05 MAC, above it aft', () => {
    // C_T/C_L, that is thrust over weight, of 1/6.
    const slope = (z: number) => thrustMomentSlopeAtPower(thrustMoment(0.8 / 6, z), 0.8);
    expect(trimSlopeLimit(0.42, slope(0.2))).toBeCloseTo(0.47, 12);
    expect(trimSlopeLimit(0.42, slope(-0.2))).toBeCloseTo(0.37, 12);
  });

  it('by hand', () => {
    // η 0.9, a_t 3.9, S_t/S 0.19, τ 0.5; α_L0 −2.0°, i_w 1.5°, i_t −2°.
    const slope = elevatorLiftSlope(3.9, 0.9, 0.19, 0.5);
    expect(slope).toBeCloseTo(0.33345, 9);
    const atZero = tailLiftAtWingZeroLift(3.9, 0.9, 0.19, -0.0349, 0.0262, -0.0349, 0.01);
    expect(atZero).toBeCloseTo(0.6669 * -0.106, 9);
    const moment = zeroLiftMoment(-0.06, atZero, 3.7, 0.42);
    expect(moment).toBeCloseTo(-0.06 + 0.0706914 * 3.28, 8);
    expect(elevatorToTrim(1.2, 0.25, moment, 0.42, slope, 3.7)).toBeCloseTo(-0.0293789, 5);
  });
});

describe('forward limits', () => {
  const upElevator = number(-0.5, -0.1);

  it('by elevator travel: there the elevator to trim is full up, and further forward it is not enough', () => {
    fc.assert(
      fc.property(aeroplane, number(0.5, 2.5), upElevator, (p, cl, up) => {
        const f = figures(p);
        const limit = forwardLimitByElevator(cl, up, f.moment, f.neutral, f.elevatorSlope, p.tailPlace);
        const at = (h: number) => elevatorToTrim(cl, h, f.moment, f.neutral, f.elevatorSlope, p.tailPlace);
        close(at(limit), up);
        expect(at(limit - 0.01)).toBeLessThan(up);
      }),
    );
  });

  it('the wing’s and the whole’s form are two views of one state', () => {
    fc.assert(
      fc.property(aeroplane, number(0.8, 2.5), upElevator, (given, wing, up) => {
        const p = { ...given, propellerSlope: 0 };
        const f = figures(p);
        const tail = tailLiftAt(wing, p.wingSlope, f.tailAtZero, f.share, f.elevatorSlope, up);
        fc.pre(wing + tail > 0.2);
        const limit = forwardLimitAtWingLift(wing, tail, f.couples, f.rest, p.tailPlace);
        const alpha = wingAngleOfAttack(wing, p.wingSlope, p.zeroLift) - p.wingIncidence;
        const there = forces(p, alpha, up, limit);
        close(there.tail, tail, 10);
        close(there.moment, 0, 100);
        const whole = wing + tail;
        close(forwardLimitAtWholeLift(whole, tail, f.couples, f.rest, p.tailPlace), limit, 100);
        const byElevator = forwardLimitByElevator(
          whole,
          up,
          f.moment,
          f.neutral,
          f.elevatorSlope,
          p.tailPlace,
        );
        close(byElevator, limit, 100);
      }),
    );
  });

  it('the two forms differ by 0.01–0.10 MAC for a usual aeroplane (ours), the wing’s the further forward', () => {
    // Landing: couple −0.15, tail's greatest download 0.9 on its own area.
    const tail = tailDownload(0.9, 0.9, 0.19);
    expect(tail).toBeCloseTo(-0.1539, 9);
    const wing = forwardLimitAtWingLift(1.9, tail, -0.15, 0.18, 3.7);
    const whole = forwardLimitAtWholeLift(1.9, tail, -0.15, 0.18, 3.7);
    expect(whole - wing).toBeGreaterThan(0.01);
    expect(whole - wing).toBeLessThan(0.1);
  });

  it('nose wheel: the moments about the point of contact are nil, with the forces of acceleration', () => {
    fc.assert(
      fc.property(
        aeroplane,
        number(0.2, 1.2),
        number(1.2, 3),
        number(0.5, 1.2),
        number(0, 0.1),
        number(0.3, 1.2),
        number(-0.3, 0.3),
        (given, wing, weight, wheels, friction, height, zThrust) => {
          const p = { ...given, propellerSlope: 0 };
          const f = figures(p);
          const tail = tailLiftAt(wing, p.wingSlope, f.tailAtZero, f.share, f.elevatorSlope, -0.4);
          const thrust = 0.4;
          const couples = f.couples + thrustMoment(thrust, zThrust);
          const limit = forwardLimitByNoseWheel(
            weight,
            wing,
            tail,
            couples,
            f.rest,
            p.tailPlace,
            wheels,
            friction * height,
          );
          // About the contact point, lengths in MAC, forces over q S: weight ahead of the wheels pitches
          // down, lift ahead up; thrust at its height down, the force of inertia at the CG's height up.
          const onWheels = weight - wing - tail;
          const inertia = thrust - friction * onWheels;
          const about =
            -weight * (wheels - limit) +
            wing * (wheels - f.rest) +
            tail * (wheels - p.tailPlace) +
            f.couples -
            thrust * (height + zThrust) +
            inertia * height;
          expect(about).toBeCloseTo(0, 9);
          const lifted = forwardLimitByNoseWheel(
            wing + tail,
            wing,
            tail,
            couples,
            f.rest,
            p.tailPlace,
            wheels,
            friction,
          );
          const flying = forwardLimitAtWingLift(wing, tail, couples, f.rest, p.tailPlace);
          if (Math.abs(wing + tail) > 0.1) close(lifted, flying, 100);
        },
      ),
    );
  });

  it('weaker elevators move the limit aft', () => {
    fc.assert(
      fc.property(aeroplane, number(0.8, 2.5), upElevator, (p, cl, up) => {
        const f = figures(p);
        const at = (slope: number) => forwardLimitByElevator(cl, up, f.moment, f.neutral, slope, p.tailPlace);
        expect(at(0.7 * f.elevatorSlope)).toBeGreaterThan(at(f.elevatorSlope));
      }),
    );
  });

  it('seven tenths of the elevator’s effectiveness cost 0.06–0.23 MAC (ours)', () => {
    // Flaps down, C_L 1.6–2.2, 25° up, C_Lδ 0.33–0.5 /rad.
    for (const [lift, slope] of [
      [2.2, 0.33],
      [1.6, 0.33],
      [1.8, 0.5],
    ] as const) {
      const at = (part: number) => forwardLimitByElevator(lift, -0.436, -0.02, 0.42, part * slope, 3.7);
      expect(at(0.7) - at(1)).toBeGreaterThan(0.06);
      expect(at(0.7) - at(1)).toBeLessThan(0.23);
    }
  });
});
