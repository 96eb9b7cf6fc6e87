import { expect, it } from 'vitest';
import { flatSheetDownwash, rolledUpPairDownwash } from '../../src/methods/downwash.ts';

/** Far behind an elliptic wing, ε A/C_L at 200 semi-spans; exact (Prandtl; Biot and Savart for the pair, in the form of Phillips et al., J. Aircraft 39(4), 2002, equations not read). */
it('flat sheet 0.63662', () => {
  expect(Math.abs(6.5 * flatSheetDownwash(1, 6.5) - 0.6366197723675814)).toBeLessThan(1e-4);
});

it('rolled-up pair 0.51602', () => {
  expect(Math.abs(6.5 * rolledUpPairDownwash(1, 6.5) - 0.5160245509311919)).toBeLessThan(1e-4);
});
