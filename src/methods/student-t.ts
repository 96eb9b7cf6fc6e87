/** Student's t distribution for a whole number of degrees of freedom. */
import { findRoot } from './find-root.ts';

/**
 * Probability that |t| stays below a value [-].
 * @param t                value, ≥ 0 [-]
 * @param degreesOfFreedom ν, a whole number ≥ 1
 * Exact: the finite series of Abramowitz & Stegun 26.7.3 and 26.7.4, from memory.
 */
export function studentTwoSided(t: number, degreesOfFreedom: number): number {
  const angle = Math.atan(t / Math.sqrt(degreesOfFreedom));
  const square = Math.cos(angle) ** 2;
  const odd = degreesOfFreedom % 2 === 1;
  let term = odd ? Math.cos(angle) : 1;
  let sum = degreesOfFreedom === 1 ? 0 : term;
  // Each term has two more powers of the cosine, up to ν − 2.
  for (let k = odd ? 3 : 2; k < degreesOfFreedom; k += 2) {
    term *= (square * (k - 1)) / k;
    sum += term;
  }
  return odd ? (2 / Math.PI) * (angle + Math.sin(angle) * sum) : Math.sin(angle) * sum;
}

const quantileTolerance = 1e-12;

/**
 * Value below which |t| stays with a probability [-].
 * @param confidence       probability, 0…1, both tails left out together (0.95 for 95 % limits) [-]
 * @param degreesOfFreedom ν, a whole number ≥ 1
 * Inverse of `studentTwoSided` by bracketed root finding over t = √ν tan θ; checked to 1e-9 of t for
 * confidences to 0.999. NaN outside its ranges.
 */
export function studentQuantile(confidence: number, degreesOfFreedom: number): number {
  if (!(confidence >= 0 && confidence < 1 && degreesOfFreedom >= 1)) return Number.NaN;
  const scale = Math.sqrt(degreesOfFreedom);
  const miss = (angle: number) => studentTwoSided(scale * Math.tan(angle), degreesOfFreedom) - confidence;
  const found = findRoot(miss, 0, Math.PI / 2, quantileTolerance, 1);
  return found.kind === 'found' ? scale * Math.tan(found.root) : Number.NaN;
}
