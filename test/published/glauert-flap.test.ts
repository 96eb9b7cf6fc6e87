import { expect, it } from 'vitest';
import { flapEffectiveness } from '../../src/methods/section.ts';

/** Glauert's thin-aerofoil flap, closed form; exact. */
it.each([
  [0.2, 0.5498],
  [0.25, 0.609],
  [0.3, 0.6607],
  [0.4, 0.7478],
])('a flap of %f chord has effectiveness %f', (chordFraction, value) => {
  expect(Math.abs(flapEffectiveness(chordFraction) - value)).toBeLessThan(0.0002);
});
