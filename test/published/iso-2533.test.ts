import { describe, expect, it } from 'vitest';
import { standardDensity, standardPressure, standardTemperature } from '../../src/methods/atmosphere.ts';

/** ISO 2533 (ICAO Doc 7488), from memory, at geopotential heights [m]; half the last printed digit, density 2e-5. */
describe.each([
  [0, 101325, 288.15, 1.225],
  [1000, 89874.6, 281.65, 1.11164],
  [2000, 79495.2, 275.15, 1.00649],
  [3000, 70108.5, 268.65, 0.909122],
  [5000, 54019.9, 255.65, 0.736116],
  [11000, 22632, 216.65, 0.363918],
])('%i m', (height, pressure, temperature, density) => {
  it('pressure', () => expect(Math.abs(standardPressure(height) - pressure)).toBeLessThan(0.06));
  it('temperature', () => expect(Math.abs(standardTemperature(height) - temperature)).toBeLessThan(0.005));
  it('density', () => expect(Math.abs(standardDensity(height) - density)).toBeLessThan(2e-5));
});
