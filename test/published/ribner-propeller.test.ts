import { expect, it } from 'vitest';
import {
  bladeChordFromSolidity,
  bladeSideArea,
  normalForceFactor,
  propellerNormalSlope,
} from '../../src/methods/propeller.ts';

/**
 * H. S. Ribner, NACA TR 819 and 820: factor 1 without thrust, and the fin rule; the values are typical ones
 * of Perkins & Hage, Airplane Performance Stability and Control, sec. 5-6. All from memory. Blade angle
 * 20° at 0.75 R, spinner factor 1.14, no thrust; per degree.
 */
it('no thrust, factor 1', () => expect(Math.abs(normalForceFactor(0) - 1)).toBeLessThan(1e-12));

it.each([
  [2, 0.061, 0.00165],
  [3, 0.091, 0.00235],
  [4, 0.121, 0.00296],
])('%i blades of solidity %f: slope %f per degree', (blades, solidity, value) => {
  const diameter = 1.9;
  const chord = bladeChordFromSolidity(solidity, blades, diameter);
  const sideArea = bladeSideArea(blades, chord, diameter, (20 * Math.PI) / 180);
  const slope = propellerNormalSlope(sideArea, diameter, 1.14, 0) * (Math.PI / 180);
  console.info(`Propeller of ${blades} blades: ${slope.toFixed(5)} per degree, typical ${value}`);
  expect(Math.abs(slope - value)).toBeLessThan(0.0005);
});
