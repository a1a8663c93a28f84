/**
 * Least squares with coefficients that are not negative: min |A x - b|, x >= 0. Active-set method of C. L.
 * Lawson, R. J. Hanson, Solving Least Squares Problems (1974), chapter 23, on a Householder factorisation
 * of the free columns that grows by one column at a time: no normal equations, so the condition of A is not
 * squared.
 */
import { Problem } from '../problem.ts';

/** Columns are stored one after the other: entry (i, j) at `values[j * rows + i]`. */
export interface ColumnMatrix {
  /** [1] */
  readonly rows: number;
  /** [1] */
  readonly columns: number;
  /** [1] */
  readonly values: Float64Array;
}

/**
 * Householder reflections of the free columns: reflectors below and R on and above the diagonal, R's
 * diagonal apart.
 */
interface Factor {
  readonly reflectors: Float64Array;
  readonly diagonal: Float64Array;
  readonly rhs: Float64Array;
}

/**
 * @param matrix columns of unit order of size (scale them before)
 * @param rhs [1] one entry a row
 * @returns x [1], one entry a column, each >= 0, most of them exactly 0
 * @throws Problem NO_CONVERGENCE when the active set does not settle within 10 exchanges a column
 */
export function nonNegativeLeastSquares(matrix: ColumnMatrix, rhs: Float64Array): Float64Array {
  const { rows, columns, values } = matrix;
  const x = new Float64Array(columns);
  const capacity = Math.min(rows, columns);
  const factor: Factor = {
    reflectors: new Float64Array(rows * capacity),
    diagonal: new Float64Array(capacity),
    rhs: new Float64Array(rows),
  };
  let free: number[] = [];
  const residual = Float64Array.from(rhs);
  // a gradient below rounding of the right side can not lower the residual: 8 eps |a| |b|, |a| of order 1
  const least = 8 * 2.2e-16 * Math.sqrt(rows) * norm(rhs);
  const refused = new Set<number>();
  for (let exchange = 0; exchange < 10 * columns; exchange++) {
    const entering = steepest(matrix, residual, x, refused, least);
    if (entering < 0 || free.length === capacity) return x;
    free.push(entering);
    let trial = solveFree(matrix, rhs, free, factor);
    // a column that the free ones already span comes in with a rounding-sized or negative share: pass it by
    if (trial === undefined || !(trial[free.length - 1] > 0)) {
      free.pop();
      refused.add(entering);
      continue;
    }
    for (let inner = 0; trial.some((value) => !(value > 0)); inner++) {
      if (inner > columns) throw new Problem('NO_CONVERGENCE', `non-negative start: ${inner} inner steps`);
      free = stepToBoundary(x, free, trial);
      trial = solveFree(matrix, rhs, free, factor) ?? new Float64Array(0);
      if (trial.length === 0) break;
    }
    refused.clear();
    x.fill(0);
    for (let k = 0; k < free.length; k++) x[free[k]] = trial[k];
    residual.set(rhs);
    for (const j of free) for (let i = 0; i < rows; i++) residual[i] -= x[j] * values[j * rows + i];
  }
  throw new Problem(
    'NO_CONVERGENCE',
    `non-negative start: ${10 * columns} exchanges of ${columns} columns were not enough`,
  );
}

/** Index of the column along which the residual falls fastest, or -1 when none falls. */
function steepest(
  { rows, columns, values }: ColumnMatrix,
  residual: Float64Array,
  x: Float64Array,
  refused: ReadonlySet<number>,
  least: number,
): number {
  let best = least;
  let at = -1;
  for (let j = 0; j < columns; j++) {
    if (x[j] > 0 || refused.has(j)) continue;
    let slope = 0;
    for (let i = 0; i < rows; i++) slope += residual[i] * values[j * rows + i];
    if (slope > best) {
      best = slope;
      at = j;
    }
  }
  return at;
}

/** Moves x towards the trial until the first coefficient reaches zero, and drops those that did. */
function stepToBoundary(x: Float64Array, free: number[], trial: Float64Array): number[] {
  let share = 1;
  let first = -1;
  for (let k = 0; k < free.length; k++) {
    if (trial[k] > 0) continue;
    const here = x[free[k]] / (x[free[k]] - trial[k]);
    if (here <= share) {
      share = here;
      first = k;
    }
  }
  const kept: number[] = [];
  for (let k = 0; k < free.length; k++) {
    const j = free[k];
    x[j] += share * (trial[k] - x[j]);
    if (k === first || !(x[j] > 0)) x[j] = 0;
    else kept.push(j);
  }
  return kept;
}

/**
 * Unconstrained least squares over the free columns; undefined when they are linearly dependent to
 * rounding.
 */
function solveFree(
  { rows, values }: ColumnMatrix,
  rhs: Float64Array,
  free: readonly number[],
  { reflectors, diagonal, rhs: turned }: Factor,
): Float64Array | undefined {
  turned.set(rhs);
  for (let k = 0; k < free.length; k++) {
    const at = k * rows;
    for (let i = 0; i < rows; i++) reflectors[at + i] = values[free[k] * rows + i];
    for (let p = 0; p < k; p++) reflect(reflectors, p * rows, p, rows, reflectors, at);
    let size = 0;
    for (let i = k; i < rows; i++) size += reflectors[at + i] ** 2;
    size = Math.sqrt(size);
    // what is left of a column of unit order after the others are projected out
    if (!(size > 1e-13)) return undefined;
    diagonal[k] = reflectors[at + k] > 0 ? -size : size;
    reflectors[at + k] -= diagonal[k];
    reflect(reflectors, at, k, rows, turned, 0);
  }
  const solution = new Float64Array(free.length);
  for (let k = free.length - 1; k >= 0; k--) {
    let sum = turned[k];
    for (let j = k + 1; j < free.length; j++) sum -= reflectors[j * rows + k] * solution[j];
    solution[k] = sum / diagonal[k];
  }
  return solution;
}

/** Applies the reflection with vector v (entries `from` to the end of its column) to a target column. */
function reflect(
  v: Float64Array,
  at: number,
  from: number,
  rows: number,
  target: Float64Array,
  start: number,
) {
  let dot = 0;
  let size = 0;
  for (let i = from; i < rows; i++) {
    dot += v[at + i] * target[start + i];
    size += v[at + i] * v[at + i];
  }
  const factor = (2 * dot) / size;
  for (let i = from; i < rows; i++) target[start + i] -= factor * v[at + i];
}

function norm(values: Float64Array): number {
  return Math.sqrt(values.reduce((sum, value) => sum + value * value, 0));
}
