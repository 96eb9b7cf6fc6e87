/**
 * Glauert's lifting line of an untwisted straight wing, by collocation on the odd terms of the Fourier
 * series: the limit that the wing table must approach as the aspect ratio grows. Method from memory.
 */
export interface LiftingLine {
  /** [1/rad] */
  readonly liftSlope: number;
  /** C_Di = C_L²/(πA) (1 + δ) [-] */
  readonly delta: number;
  /** a = a0/(1 + a0/(πA)(1 + τ)) [-] */
  readonly tau: number;
  /** 2y/b of the half wing's lift [-] */
  readonly centreOfLift: number;
}

const terms = 80;

/** `chordOverSpan` of the angle θ, 2y/b = cos θ. */
export function liftingLine(
  aspectRatio: number,
  chordOverSpan: (theta: number) => number,
  sectionSlope = 2 * Math.PI,
): LiftingLine {
  const rows = Array.from({ length: terms }, (_, i) => {
    const theta = ((i + 1) * Math.PI) / 2 / terms;
    const mu = (chordOverSpan(theta) * sectionSlope) / 4;
    const row = Array.from({ length: terms }, (_, j) => {
      const n = 2 * j + 1;
      return Math.sin(n * theta) * (n * mu + Math.sin(theta));
    });
    return [...row, mu * Math.sin(theta)];
  });
  const a = solve(rows);
  let delta = 0;
  let centre = 0;
  for (let j = 0; j < terms; j++) {
    const n = 2 * j + 1;
    if (j > 0) delta += n * (a[j] / a[0]) ** 2;
    const inner = Math.sin(((n - 2) * Math.PI) / 2) / (n - 2) - Math.sin(((n + 2) * Math.PI) / 2) / (n + 2);
    centre += (a[j] / a[0]) * (inner / Math.PI);
  }
  const liftSlope = Math.PI * aspectRatio * a[0];
  const tau = (sectionSlope / liftSlope - 1) * ((Math.PI * aspectRatio) / sectionSlope) - 1;
  return { liftSlope, delta, tau, centreOfLift: centre };
}

export const elliptic = (aspectRatio: number) => (theta: number) =>
  (4 / (Math.PI * aspectRatio)) * Math.sin(theta);

export const tapered = (aspectRatio: number, taper: number) => (theta: number) =>
  (2 / (aspectRatio * (1 + taper))) * (1 - (1 - taper) * Math.cos(theta));

/** Gaussian elimination with pivoting of an augmented matrix. */
function solve(rows: number[][]): number[] {
  const count = rows.length;
  for (let p = 0; p < count; p++) {
    let best = p;
    for (let r = p; r < count; r++) if (Math.abs(rows[r][p]) > Math.abs(rows[best][p])) best = r;
    [rows[p], rows[best]] = [rows[best], rows[p]];
    for (let r = p + 1; r < count; r++) {
      const factor = rows[r][p] / rows[p][p];
      for (let q = p; q <= count; q++) rows[r][q] -= factor * rows[p][q];
    }
  }
  const x = new Array<number>(count).fill(0);
  for (let p = count - 1; p >= 0; p--) {
    let sum = rows[p][count];
    for (let q = p + 1; q < count; q++) sum -= rows[p][q] * x[q];
    x[p] = sum / rows[p][p];
  }
  return x;
}
