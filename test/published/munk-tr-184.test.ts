import { expect, it } from 'vitest';
import { munkApparentMass } from '../../src/methods/body-estimates.ts';

/** Munk, NACA TR 184, table of k2 − k1 against fineness (after Lamb), from memory; tolerance 0.003. */
it.each([
  [1.5, 0.316],
  [2, 0.493],
  [2.51, 0.607],
  [2.99, 0.681],
  [3.99, 0.778],
  [4.99, 0.836],
  [6.01, 0.873],
  [6.97, 0.897],
  [8.01, 0.916],
  [9.02, 0.93],
  [9.97, 0.939],
])('fineness %f: %f', (fineness, value) => {
  expect(Math.abs(munkApparentMass(fineness) - value)).toBeLessThan(0.003);
});
