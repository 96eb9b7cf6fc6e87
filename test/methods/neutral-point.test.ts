import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  bodyStep,
  datumLineShift,
  fractionOfMac,
  neutralPoint,
  rootAngleOfAttack,
  staticMargin,
  stationOfFraction,
  tailLiftShare,
  tailPosition,
  tailStep,
  verticalPositionShift,
  wholeLiftSlope,
} from '../../src/methods/neutral-point.ts';
import { integrate } from './quadrature.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const aeroplane = fc.record({
  wingSlope: number(3, 6),
  wingPlace: number(0.15, 0.35),
  tailSlope: number(2.5, 5),
  pressure: number(0.8, 1),
  areaRatio: number(0.05, 0.4),
  downwash: number(0.1, 0.7),
  tailPlace: number(2, 6),
  bodySlope: number(0, 0.5),
});

describe('build-up', () => {
  it('adds up to the sum of shares', () => {
    fc.assert(
      fc.property(aeroplane, (p) => {
        const share = tailLiftShare(p.tailSlope, p.pressure, p.areaRatio, p.downwash);
        const whole = wholeLiftSlope(p.wingSlope, share);
        const built = neutralPoint(
          p.wingPlace,
          tailStep(p.wingPlace, p.tailPlace, share, whole),
          bodyStep(p.bodySlope, whole),
          0,
        );
        const shares = (p.wingSlope * p.wingPlace + share * p.tailPlace - p.bodySlope) / whole;
        expect(built).toBeCloseTo(shares, 12);
      }),
    );
  });

  it('more tail area moves the neutral point aft, more body forward', () => {
    fc.assert(
      fc.property(aeroplane, (p) => {
        const at = (areaRatio: number, body: number) => {
          const share = tailLiftShare(p.tailSlope, p.pressure, areaRatio, p.downwash);
          const whole = wholeLiftSlope(p.wingSlope, share);
          const step = tailStep(p.wingPlace, p.tailPlace, share, whole);
          return neutralPoint(p.wingPlace, step, bodyStep(body, whole), 0);
        };
        const here = at(p.areaRatio, p.bodySlope);
        expect(at(1.1 * p.areaRatio, p.bodySlope)).toBeGreaterThan(here);
        expect(at(p.areaRatio, p.bodySlope + 0.01)).toBeLessThan(here);
      }),
    );
  });

  it('by hand', () => {
    // η 0.9, a_t 3.9, S_t/S 0.19, ε_α 0.42; l 4.3 m, c 1.24 m, c_t 0.71 m, tail's own a.c. 0.24.
    const share = tailLiftShare(3.9, 0.9, 0.19, 0.42);
    expect(share).toBeCloseTo(0.386802, 9);
    const place = tailPosition(4.3, 1.24, 0.71, 0.24);
    expect(place).toBeCloseTo(3.7120161, 6);
    expect(tailStep(0.243, place, share, 5.0)).toBeCloseTo(0.268363, 5);
    expect(bodyStep(0.3, 5)).toBeCloseTo(-0.06, 12);
    expect(staticMargin(0.41, 0.3)).toBeCloseTo(0.11, 12);
  });
});

describe('vertical position', () => {
  it('a low wing costs 5 % MAC at lift coefficient 1', () => {
    // −0.15 (2/4.5 − 2/(π 7.3 0.9)), by pocket calculator.
    const shift = verticalPositionShift(-0.15, 1, 4.5, 7.3, 0.9);
    expect(shift).toBeCloseTo(-0.052132, 5);
    expect(verticalPositionShift(0.15, 1, 4.5, 7.3, 0.9)).toBeCloseTo(-shift, 12);
    expect(verticalPositionShift(-0.15, 0, 4.5, 7.3, 0.9)).toBeCloseTo(0, 12);
  });

  it('equals the slope of the moment of the chordwise force, by differences', () => {
    fc.assert(
      fc.property(number(-0.4, 0.4), number(0, 1.4), number(3, 6), number(4, 25), (z, lift, a, ratio) => {
        const e = 0.93;
        // Force along the zero-lift line, aft positive, for small angles: C_D − C_L α.
        const moment = (cl: number) => z * (cl ** 2 / (Math.PI * ratio * e) - cl * (cl / a));
        const slope = (moment(lift + 1e-4) - moment(lift - 1e-4)) / 2e-4;
        expect(verticalPositionShift(z, lift, a, ratio, e)).toBeCloseTo(-slope, 7);
      }),
    );
  });
});

describe('places', () => {
  it('station and fraction of the MAC are inverse, and the datum does not matter', () => {
    fc.assert(
      fc.property(
        number(-5, 20),
        number(-3, 12),
        number(0.1, 5),
        number(-9, 9),
        (station, edge, mac, datum) => {
          const h = fractionOfMac(station, edge, mac);
          expect(stationOfFraction(h, edge, mac)).toBeCloseTo(station, 9);
          expect(fractionOfMac(station + datum, edge + datum, mac)).toBeCloseTo(h, 9);
        },
      ),
    );
    expect(fractionOfMac(2.5, 2.2, 1.2)).toBeCloseTo(0.25, 12);
  });

  it('margin falls one for one with the CG', () => {
    expect(staticMargin(0.45, 0.25) - staticMargin(0.45, 0.3)).toBeCloseTo(0.05, 12);
  });
});

describe('angle of attack', () => {
  it('by hand, and the washout term is the strip mean of a linear twist', () => {
    expect(rootAngleOfAttack(0.5, 4.6, -0.035, 0.04, 0.46)).toBeCloseTo(0.0920957, 6);
    const taper = 0.6;
    const chord = (eta: number) => 1 - (1 - taper) * eta;
    const mean = integrate((eta) => chord(eta) * eta, 0, 1) / integrate(chord, 0, 1);
    const macStation = (1 + 2 * taper) / (3 * (1 + taper));
    expect(rootAngleOfAttack(0, 5, 0, 0.05, macStation)).toBeCloseTo(0.05 * mean, 10);
  });
});

describe('heights measured square to the datum line', () => {
  it('agree with forces and moments written out with exact trigonometry, for small angles', () => {
    fc.assert(
      fc.property(
        fc.record({
          z: fc.double({ min: -0.3, max: 0.3, noNaN: true }),
          lift: fc.double({ min: 0.1, max: 1, noNaN: true }),
          slope: fc.double({ min: 4, max: 5.5, noNaN: true }),
          ratio: fc.double({ min: 6, max: 20, noNaN: true }),
          zeroLift: fc.double({ min: -0.06, max: 0.01, noNaN: true }),
          incidence: fc.double({ min: -0.02, max: 0.06, noNaN: true }),
        }),
        ({ z, lift, slope, ratio, zeroLift, incidence }) => {
          const e = 0.9;
          // Nose-up moment of the force along the datum line at the height z over the CG, wing at the CG's station.
          const moment = (cl: number) => {
            const angle = cl / slope + zeroLift - incidence;
            const drag = cl ** 2 / (Math.PI * ratio * e);
            return z * (drag * Math.cos(angle) - cl * Math.sin(angle));
          };
          const step = 1e-5;
          const measured = -(moment(lift + step) - moment(lift - step)) / (2 * step);
          const ours =
            verticalPositionShift(z, lift, slope, ratio, e) + datumLineShift(z, zeroLift, incidence);
          // Small angles: the cubic of the sine is what is left.
          expect(Math.abs(ours - measured)).toBeLessThan(0.05 * Math.abs(z) + 1e-9);
        },
      ),
    );
  });

  it('cost a high wing with camber and incidence part of its shift', () => {
    expect(datumLineShift(0.3, -0.06, 0.04)).toBeCloseTo(-0.03, 12);
    expect(datumLineShift(-0.3, -0.06, 0.04)).toBeCloseTo(0.03, 12);
  });
});
