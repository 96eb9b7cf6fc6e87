import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bodyMomentSlope, multhoppAft, multhoppForward, upwashAhead } from '../../src/methods/body.ts';
import {
  munkApparentMass,
  quickBodyMoment,
  quickBodyMomentInRange,
} from '../../src/methods/body-estimates.ts';
import { bodyStationPlace, bodyWidthAt } from '../../src/methods/body-stations.ts';
import { integrate } from './quadrature.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** A two-seater's body in our own numbers: nose at 0, root leading edge at 2.1 m, tail at 6.6 m. */
const stations = Float64Array.of(0, 0.35, 1.1, 2, 3.2, 4.6, 6.9);
const widths = Float64Array.of(0.3, 0.82, 0.96, 1.12, 1.08, 0.55, 0.14);
const [leadingEdge, rootChord, tail] = [2.1, 1.45, 6.6];
const trailingEdge = leadingEdge + rootChord;
const [span, area, slope] = [9.4, 11.4, 4.62];

const bodies = fc
  .array(fc.tuple(number(0.1, 1.5), number(0.05, 1.5)), { minLength: 3, maxLength: 8 })
  .map((steps) => {
    let x = 0;
    const places = steps.map(([step]) => (x += step));
    return { places: Float64Array.from(places), widths: Float64Array.from(steps, (s) => s[1]) };
  });

/** ∫ from the nose to the leading edge by adaptive quadrature in the square root of the distance. */
function forwardByQuadrature(places: Float64Array, w: Float64Array, edge: number): number {
  const f = (t: number) => {
    const distance = t * t;
    const width = bodyWidthAt(places.length, places, w, edge - distance);
    const upwash = distance === 0 ? 0 : 2 * t * (1 + upwashAhead(distance, rootChord, span, area, slope));
    // At the leading edge itself 2t·u tends to (a/π)√c_r.
    return width ** 2 * (distance === 0 ? (slope / Math.PI) * Math.sqrt(rootChord) : upwash);
  };
  const kinks = [...places].filter((x) => x < edge).map((x) => Math.sqrt(edge - x));
  const ends = [...kinks, 0];
  let sum = 0;
  for (let i = 0; i + 1 < ends.length; i++) sum += integrate(f, ends[i + 1], ends[i], 1e-10);
  return sum;
}

describe('multhoppForward', () => {
  it('agrees with adaptive quadrature within 0.01 % on a two-seater', () => {
    const closed = multhoppForward(7, stations, widths, leadingEdge, rootChord, span, area, slope);
    const fine = forwardByQuadrature(stations, widths, leadingEdge);
    expect(Math.abs(closed / fine - 1)).toBeLessThan(1e-4);
  });

  it('agrees with adaptive quadrature within 0.001 % on any body', () => {
    fc.assert(
      fc.property(bodies, number(0.4, 6), ({ places, widths: w }, edge) => {
        fc.pre(edge > places[0] + 0.05 && edge <= places[places.length - 1]);
        const closed = multhoppForward(places.length, places, w, edge, rootChord, span, area, slope);
        const fine = forwardByQuadrature(places, w, edge);
        expect(Math.abs(closed / fine - 1)).toBeLessThan(1e-5);
      }),
      { numRuns: 60 },
    );
  });

  it('is nil for a body that begins behind the wing, and ∫w² without lift', () => {
    expect(multhoppForward(7, stations, widths, -1, rootChord, span, area, slope)).toBe(0);
    const cylinder = Float64Array.of(0.9, 0.9);
    expect(multhoppForward(2, Float64Array.of(0, 3), cylinder, 2, 1.4, 9, 11, 0)).toBeCloseTo(0.81 * 2, 10);
  });

  it('swapping any two numbers of the wing changes it', () => {
    const base = multhoppForward(7, stations, widths, leadingEdge, rootChord, span, area, slope);
    const numbers = [leadingEdge, rootChord, span, area, slope];
    for (let i = 0; i < numbers.length; i++) {
      for (let j = i + 1; j < numbers.length; j++) {
        const s = [...numbers];
        [s[i], s[j]] = [s[j], s[i]];
        expect(
          Math.abs(multhoppForward(7, stations, widths, s[0], s[1], s[2], s[3], s[4]) / base - 1),
          `${i} and ${j}`,
        ).toBeGreaterThan(0.001);
      }
    }
  });

  it('scales with the cube of length', () => {
    fc.assert(
      fc.property(bodies, number(0.2, 5), ({ places, widths: w }, k) => {
        const edge = (places[0] + places[places.length - 1]) / 2;
        const count = places.length;
        const one = multhoppForward(count, places, w, edge, rootChord, span, area, slope);
        const larger = multhoppForward(
          count,
          places.map((x) => k * x),
          w.map((x) => k * x),
          k * edge,
          k * rootChord,
          k * span,
          k * k * area,
          slope,
        );
        expect(larger / (k ** 3 * one)).toBeCloseTo(1, 9);
      }),
    );
  });
});

describe('upwashAhead', () => {
  it('tends to that of the whole lift as one small vortex, and is infinite like a flat plate’s at the edge', () => {
    // Near the edge u → (a/2π)√(c/x).
    const near = upwashAhead(1e-8, rootChord, span, area, slope);
    expect(near / ((slope / (2 * Math.PI)) * Math.sqrt(rootChord / 1e-8))).toBeCloseTo(1, 3);
    // Far ahead the horseshoe leaves Γ s/(4π) · (…)/X²: the sum falls with the square of the distance.
    const far = upwashAhead(1000, rootChord, span, area, slope);
    expect(upwashAhead(2000, rootChord, span, area, slope) / far).toBeCloseTo(0.25, 2);
    expect(far).toBeGreaterThan(0);
  });

  it('the horseshoe part is the field of its three vortices by Biot and Savart', () => {
    const [distance, c] = [1.3, 1e-9];
    const s = (Math.PI / 8) * span;
    const circulation = (2 * slope * area) / (Math.PI * span);
    const x = distance + c / 4;
    const bound = integrate((y) => (circulation / (4 * Math.PI)) * (x / (x * x + y * y) ** 1.5), -s, s);
    // Each trailing leg runs from the bound vortex to infinity; u = X/(X+ξ) maps it to 0…1.
    const leg = integrate(
      (u) => {
        if (u === 0) return 0;
        const along = x / u;
        return ((circulation / (4 * Math.PI)) * s * x) / (u * u * (along * along + s * s) ** 1.5);
      },
      0,
      1,
    );
    expect(upwashAhead(distance, c, span, area, slope)).toBeCloseTo(bound - 2 * leg, 6);
  });
});

describe('multhoppAft', () => {
  it('equals quadrature for the baseline, whose last station lies behind the tail', () => {
    const wakeLength = tail - trailingEdge;
    const f = (x: number) =>
      bodyWidthAt(7, stations, widths, x) ** 2 * Math.min(1, (x - trailingEdge) / wakeLength);
    let expected = 0;
    const kinks = [trailingEdge, 4.6, tail, 6.9];
    for (let i = 0; i + 1 < kinks.length; i++) expected += integrate(f, kinks[i], kinks[i + 1], 1e-11);
    expect(multhoppAft(7, stations, widths, trailingEdge, tail, wakeLength, 0)).toBeCloseTo(expected, 8);
  });

  it('equals quadrature over a body with a station on the trailing edge, stretched by the rule', () => {
    // Put a station on the trailing edge, so that the width is linear between placed stations.
    const places = Float64Array.of(0, 2, trailingEdge, 4.6, 6.9);
    const w = Float64Array.of(0.4, 1.1, 0.95, 0.55, 0.14);
    const wakeLength = 4.3;
    const stretch = (wakeLength + 6.9 - tail) / (6.9 - trailingEdge);
    const newPlaces = places.map((x) =>
      x <= trailingEdge ? x : trailingEdge + stretch * (x - trailingEdge),
    );
    const width = (x: number) => bodyWidthAt(5, newPlaces, w, x);
    const f = (x: number) => width(x) ** 2 * Math.min(1, (x - trailingEdge) / wakeLength);
    let expected = 0;
    const kinks = [trailingEdge, newPlaces[3], trailingEdge + wakeLength, newPlaces[4]];
    for (let i = 0; i + 1 < kinks.length; i++) expected += integrate(f, kinks[i], kinks[i + 1], 1e-11);
    expect(multhoppAft(5, places, w, trailingEdge, tail, wakeLength, 0)).toBeCloseTo(expected, 8);
    expect(newPlaces[4] - (trailingEdge + wakeLength)).toBeCloseTo(6.9 - tail, 12);
  });

  it('a cylinder from the trailing edge to the tail has ½ w² L; past the tail w² more', () => {
    const places = Float64Array.of(0, 5);
    const w = Float64Array.of(0.6, 0.6);
    expect(multhoppAft(2, places, w, 2, 5, 3, 0)).toBeCloseTo(0.36 * 1.5, 12);
    expect(multhoppAft(2, places, w, 2, 4.5, 2.5, 0)).toBeCloseTo(0.36 * (1.25 + 0.5), 12);
    // Stretched to twice the length without overhang.
    expect(multhoppAft(2, places, w, 2, 5, 6, 0)).toBeCloseTo(0.36 * 3, 12);
  });

  it('a boom leaves the body alone and fills the gap to the tail', () => {
    const places = Float64Array.of(0, 3);
    const w = Float64Array.of(0.6, 0.6);
    const pod = 0.36 * (1 / (2 * 4));
    const boom = (0.01 * (4 ** 2 - 1)) / (2 * 4);
    expect(multhoppAft(2, places, w, 2, 5, 4, 0.1)).toBeCloseTo(pod + boom, 12);
    // A pod that ends ahead of the trailing edge leaves the boom alone, from the trailing edge.
    expect(multhoppAft(2, places, w, 3.5, 5, 4, 0.1)).toBeCloseTo(0.01 * 2, 12);
    expect(multhoppAft(2, places, w, 3.5, 5, 4, 0)).toBe(0);
  });

  it('splitting a segment changes nothing', () => {
    fc.assert(
      fc.property(number(3.6, 6.85), number(1.5, 6), (x, wakeLength) => {
        fc.pre(![...stations].includes(x));
        const at = stations.findIndex((place) => place > x);
        const more = Float64Array.from([...stations.slice(0, at), x, ...stations.slice(at)]);
        const w = bodyWidthAt(7, stations, widths, x);
        const moreWidths = Float64Array.from([...widths.slice(0, at), w, ...widths.slice(at)]);
        expect(multhoppAft(8, more, moreWidths, trailingEdge, tail, wakeLength, 0)).toBeCloseTo(
          multhoppAft(7, stations, widths, trailingEdge, tail, wakeLength, 0),
          10,
        );
      }),
    );
  });

  it('moving the datum changes nothing', () => {
    const moved = stations.map((x) => x + 12.5);
    expect(multhoppAft(7, moved, widths, trailingEdge + 12.5, tail + 12.5, 3.3, 0)).toBeCloseTo(
      multhoppAft(7, stations, widths, trailingEdge, tail, 3.3, 0),
      10,
    );
    expect(multhoppForward(7, moved, widths, leadingEdge + 12.5, rootChord, span, area, slope)).toBeCloseTo(
      multhoppForward(7, stations, widths, leadingEdge, rootChord, span, area, slope),
      10,
    );
  });

  it('has no value where the tail is not behind the trailing edge', () => {
    expect(multhoppAft(7, stations, widths, trailingEdge, tail, -0.1, 0)).toBeNaN();
    expect(multhoppAft(2, Float64Array.of(0, 5), Float64Array.of(1, 1), 2, 6, 0.5, 0)).toBeNaN();
  });
});

describe('bodyMomentSlope', () => {
  it('by hand: (π/2)(2.1 + 0.6·1.5)/(11.4·1.24), and aft counts less the more downwash', () => {
    expect(bodyMomentSlope(2.1, 1.5, 0.4, 11.4, 1.24)).toBeCloseTo(0.333361, 6);
    expect(bodyMomentSlope(2.1, 1.5, 1, 11.4, 1.24)).toBeCloseTo(bodyMomentSlope(2.1, 9, 1, 11.4, 1.24), 12);
  });
});

describe('body stations', () => {
  const place = (x: number, chord: number, newTail: number, boom = false) =>
    bodyStationPlace(x, 1.45, 4.5, 4.8, chord, newTail, boom);

  it('stay put in the baseline', () => {
    for (const x of [-2, 0, 0.7, 1.45, 3, 4.8]) expect(place(x, 1.45, 4.5)).toBeCloseTo(x, 12);
  });

  it('keep their distance ahead, map over the chord, stretch aft', () => {
    expect(place(-2, 1.8, 5)).toBe(-2);
    expect(place(0.725, 1.8, 5)).toBeCloseTo(0.9, 12);
    expect(place(4.8, 1.8, 5)).toBeCloseTo(5.3, 12);
    // Half way from trailing edge to last station stays half way.
    expect(place((1.45 + 4.8) / 2, 1.8, 5)).toBeCloseTo((1.8 + 5.3) / 2, 12);
    expect(place(2, 1.8, 5, true)).toBeCloseTo(2.35, 12);
  });

  it('width is linear between stations and nil beyond', () => {
    expect(bodyWidthAt(7, stations, widths, 1.55)).toBeCloseTo(1.04, 12);
    expect(bodyWidthAt(7, stations, widths, 0)).toBe(0.3);
    expect(bodyWidthAt(7, stations, widths, 6.9)).toBeCloseTo(0.14, 12);
    expect(bodyWidthAt(7, stations, widths, 7)).toBe(0);
    expect(bodyWidthAt(7, stations, widths, -0.01)).toBe(0);
  });
});

describe('quickBodyMoment', () => {
  it('by hand, between two points of the table, and at its ends', () => {
    // K_f at 26 %: 0.172 + 0.6 (0.344 − 0.172) = 0.2752.
    expect(quickBodyMoment(1.1, 6.2, 11.4, 1.24, 0.26)).toBeCloseTo((0.2752 * 1.21 * 6.2) / 14.136, 9);
    expect(quickBodyMoment(1, 1, 1, 1, 0.7)).toBeCloseTo(1.146, 12);
    expect(quickBodyMoment(1, 1, 1, 1, 0.9)).toBeCloseTo(1.146, 12);
    expect(quickBodyMoment(1, 1, 1, 1, 0.05)).toBeCloseTo(0.115, 12);
    expect(quickBodyMomentInRange(0.05)).toBe(false);
    expect(quickBodyMomentInRange(0.7)).toBe(true);
  });

  it('is of the size of Multhopp’s strips for the two-seater', () => {
    const wake = tail - trailingEdge;
    const forward = multhoppForward(7, stations, widths, leadingEdge, rootChord, span, area, slope);
    const aft = multhoppAft(7, stations, widths, trailingEdge, tail, wake, 0);
    const strips = bodyMomentSlope(forward, aft, 0.45, area, 1.24);
    const quick = quickBodyMoment(1.12, 6.9, area, 1.24, (leadingEdge + rootChord / 4) / 6.9);
    expect(quick / strips).toBeGreaterThan(0.5);
    expect(quick / strips).toBeLessThan(2);
  });
});

describe('munkApparentMass', () => {
  it('is nil for a sphere, 1 for a needle, and smooth where the series hands over', () => {
    expect(munkApparentMass(1)).toBe(0);
    expect(munkApparentMass(0.8)).toBe(0);
    expect(munkApparentMass(1e4)).toBeCloseTo(1, 5);
    const e = 0.01;
    const fineness = 1 / Math.sqrt(1 - e * e);
    const [below, above] = [munkApparentMass(fineness - 1e-9), munkApparentMass(fineness + 1e-9)];
    expect(Math.abs(above / below - 1)).toBeLessThan(1e-3);
  });
});
