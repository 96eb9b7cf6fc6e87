import { expect, it } from 'vitest';
import { staticMargin } from '../../src/methods/neutral-point.ts';

/** M. V. Cook, Flight Dynamics Principles, 2nd ed., appendix 1, p. 410. Read. */
it('margin 0.122 for a neutral point at 0.412 and a CG at 0.29', () => {
  expect(Math.abs(staticMargin(0.412, 0.29) - 0.122)).toBeLessThan(1e-9);
});
