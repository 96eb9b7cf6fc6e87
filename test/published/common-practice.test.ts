import { describe, expect, it } from 'vitest';
import { torenbeekDownwashGradient } from '../../src/methods/downwash.ts';
import { tableScaledLiftSlope } from '../../src/methods/lift-slope.ts';
import { meanAerodynamicChord, meanGeometricChord, rootChordFromArea } from '../../src/methods/planform.ts';
import { sections } from '../../src/methods/sections-table.ts';
import { tailVolume } from '../../src/methods/tail.ts';
import { tableAerodynamicCentre } from '../../src/methods/wing-table.ts';

/** Facts of the trade: common practice, no source. */
describe('aerodynamic centre', () => {
  it('of a thin section lies at 25 % of the chord', () => {
    for (const { name, thickness, aerodynamicCentre } of sections) {
      const within = name.startsWith('naca-6') ? 0.02 : 0.008;
      expect(Math.abs(aerodynamicCentre - 0.25), `${name}, thickness ${thickness}`).toBeLessThan(within);
    }
  });

  it('of an unswept rectangular wing lies near its quarter chord, a little ahead', () => {
    for (const a of [6, 8, 12, 20]) {
      const place = tableAerodynamicCentre(a, 1, 0);
      expect(place, `A ${a}`).toBeLessThan(0.25);
      expect(place, `A ${a}`).toBeGreaterThan(0.23);
    }
  });
});

describe('chords', () => {
  it('the mean aerodynamic chord is not the mean chord, unless the wing is rectangular', () => {
    const [area, span] = [11.4, 9.4];
    const mac = (taper: number) => meanAerodynamicChord(rootChordFromArea(area, span, taper), taper);
    expect(mac(1)).toBeCloseTo(meanGeometricChord(area, span), 12);
    expect(mac(0.5) / meanGeometricChord(area, span)).toBeCloseTo(1.037037, 6);
  });
});

describe('customary sizes', () => {
  it.each([
    ['light aeroplane', 7.25, 0.75, 2.75, 0.1, 0.3, 0.45],
    ['tourer', 10, 0.5, 2.75, 0.1, 0.3, 0.45],
    ['sailplane', 21.5, 0.375, 4.25, 0.1, 0.2, 0.3],
  ])(
    'downwash gradient of a %s in the middle of its ranges',
    (_, a, taper, armInMac, heightRatio, from, to) => {
      // The MAC taken as the mean chord b/A.
      const armRatio = (2 * armInMac) / a;
      const slope = tableScaledLiftSlope(a, taper, 0, 1, 0);
      const gradient = torenbeekDownwashGradient(slope, a, taper, armRatio, heightRatio);
      expect(gradient).toBeGreaterThan(from);
      expect(gradient).toBeLessThan(to);
    },
  );

  it('a light aeroplane’s tail of 20 % area at 2.8 MAC has a volume of 0.55–0.80', () => {
    const volume = tailVolume(0.2 * 11.4, 2.8 * 1.24, 11.4, 1.24);
    expect(volume).toBeGreaterThan(0.55);
    expect(volume).toBeLessThan(0.8);
  });
});
