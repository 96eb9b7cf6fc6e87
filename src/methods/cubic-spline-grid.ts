/**
 * Interpolation of values on a rectangular grid of three axes by a tensor product of cubic splines
 * (B-splines, not-a-knot ends; de Boor, A Practical Guide to Splines, from memory). Passes through
 * every value, continuous to the second derivative. Fitted once; evaluation allocates nothing.
 */

const order = 4;

/** One axis of the grid: its B-spline knots, `count` + 4 of them, four equal ones at each end. */
export interface SplineAxis {
  readonly count: number;
  readonly knots: Float64Array;
  readonly nodes: Float64Array;
}

/** A spline axis through ascending nodes, at least 4. The second and the last node but one carry no knot. */
export function splineAxis(nodes: Float64Array): SplineAxis {
  const count = nodes.length;
  const knots = new Float64Array(count + order);
  knots.fill(nodes[0], 0, order);
  knots.set(nodes.subarray(2, count - 2), order);
  knots.fill(nodes[count - 1], count);
  return { count, knots, nodes };
}

/**
 * The four B-splines that are not nil at x, into `weights` from `at` on; returns the index of the first.
 * x must lie between the first and the last node. Cox and de Boor's recurrence from degree 0 to 3,
 * written out because this is where the time goes.
 */
export function splineWeights(axis: SplineAxis, x: number, weights: Float64Array, at: number): number {
  const { knots, count } = axis;
  let first = 0;
  // Find the knot interval that holds x.
  while (first < count - order && x >= knots[first + order]) first++;
  const left1 = x - knots[first + 3];
  const left2 = x - knots[first + 2];
  const left3 = x - knots[first + 1];
  const right1 = knots[first + 4] - x;
  const right2 = knots[first + 5] - x;
  const right3 = knots[first + 6] - x;
  const linear = 1 / (right1 + left1);
  const inner = (right1 * linear) / (right1 + left2);
  const outer = (left1 * linear) / (right2 + left1);
  const low = (right1 * inner) / (right1 + left3);
  const middle = (left2 * inner + right2 * outer) / (right2 + left2);
  const high = (left1 * outer) / (right3 + left1);
  weights[at] = right1 * low;
  weights[at + 1] = left3 * low + right2 * middle;
  weights[at + 2] = left2 * middle + right3 * high;
  weights[at + 3] = left1 * high;
  return first;
}

/**
 * Spline coefficients of a grid of values, first axis slowest; the same order as the values.
 * Solves one axis after the other; done once, when the table is loaded.
 */
export function fitSplineGrid(axes: readonly SplineAxis[], values: readonly number[]): Float64Array {
  const coefficients = Float64Array.from(values);
  let stride = coefficients.length;
  // Replace values by coefficients along each axis in turn.
  for (const axis of axes) {
    const block = stride;
    stride /= axis.count;
    const inverse = inverseCollocation(axis);
    for (let start = 0; start < coefficients.length; start += block) {
      for (let offset = 0; offset < stride; offset++) {
        multiplyLine(inverse, axis.count, coefficients, start + offset, stride);
      }
    }
  }
  return coefficients;
}

/** Replaces one line of the grid (first index, stride) by matrix × line. */
function multiplyLine(
  matrix: Float64Array,
  count: number,
  grid: Float64Array,
  first: number,
  stride: number,
): void {
  const line = Float64Array.from({ length: count }, (_, i) => grid[first + i * stride]);
  for (let row = 0; row < count; row++) {
    let sum = 0;
    for (let column = 0; column < count; column++) sum += matrix[row * count + column] * line[column];
    grid[first + row * stride] = sum;
  }
}

/** Inverse of the matrix of B-splines (columns) at the nodes (rows), row by row; Gauss–Jordan, no pivoting. */
function inverseCollocation(axis: SplineAxis): Float64Array {
  const { count, nodes } = axis;
  const width = 2 * count;
  const rows = new Float64Array(count * width);
  const weights = new Float64Array(order);
  for (let row = 0; row < count; row++) {
    const first = splineWeights(axis, nodes[row], weights, 0);
    rows.set(weights, row * width + first);
    rows[row * width + count + row] = 1;
  }
  // Eliminate column by column: the matrix is totally positive, so no pivoting is needed.
  for (let pivot = 0; pivot < count; pivot++) {
    scaleRow(rows, pivot, width, 1 / rows[pivot * width + pivot]);
    for (let row = 0; row < count; row++) {
      if (row !== pivot) subtractRow(rows, row, pivot, width, rows[row * width + pivot]);
    }
  }
  const inverse = new Float64Array(count * count);
  for (let row = 0; row < count; row++) {
    inverse.set(rows.subarray(row * width + count, (row + 1) * width), row * count);
  }
  return inverse;
}

function scaleRow(rows: Float64Array, row: number, width: number, factor: number): void {
  for (let i = row * width; i < (row + 1) * width; i++) rows[i] *= factor;
}

function subtractRow(rows: Float64Array, row: number, from: number, width: number, factor: number): void {
  for (let i = 0; i < width; i++) rows[row * width + i] -= factor * rows[from * width + i];
}
