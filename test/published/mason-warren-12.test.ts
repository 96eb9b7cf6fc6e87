import { expect, it } from 'vitest';
import { areaFromRootChord, aspectRatio, sweepTangentAt } from '../../src/methods/planform.ts';

/** The Warren-12 wing (Mason, course notes at VPI, from memory): c_r 1.5, c_t 0.5, b 2√2, Λ_LE 53.54°. */
it('half-chord sweep of the Warren-12 wing is 45°', () => {
  const span = 2 * Math.SQRT2;
  const taper = 0.5 / 1.5;
  const ratio = aspectRatio(span, areaFromRootChord(1.5, span, taper));
  expect(ratio).toBeCloseTo(2 * Math.SQRT2, 12);
  const leading = Math.tan((53.54 * Math.PI) / 180);
  const half = (Math.atan(sweepTangentAt(leading, 0, 0.5, ratio, taper)) * 180) / Math.PI;
  expect(Math.abs(half - 45)).toBeLessThan(0.02);
});
