/**
 * The held set of the exchange method: the n + 1 constraints taken as equalities, and the inverse of their
 * matrix, kept up by rank-one updates and made afresh from time to time. Constraints are numbered: 2 i and
 * 2 i + 1 keep error i from above and below, then come two for each variable, the lower and the upper end
 * of its box.
 */
export interface MinimaxProblem {
  /** [1] e, one entry a row */
  readonly errors: Float64Array;
  /** [1] a, row-major, `low.length` columns */
  readonly slopes: Float64Array;
  /** [1] lower ends of the box, <= 0 */
  readonly low: Float64Array;
  /** [1] upper ends of the box, >= 0 */
  readonly high: Float64Array;
}

/**
 * A constraint g . (d, t) >= h. Rows 2 i and 2 i + 1 hold error i from above and below; then two a variable
 * for the box.
 */
export interface Workspace {
  /** [1] variables */
  readonly n: number;
  /** [1] errors */
  readonly rows: number;
  readonly problem: MinimaxProblem;
  /** [1] ends of the box as far as it is open by now */
  readonly low: Float64Array;
  /** [1] */
  readonly high: Float64Array;
  /** [1] inverse of the matrix whose rows are the g of the held constraints; row-major, n + 1 by n + 1 */
  readonly inverse: Float64Array;
  readonly held: Int32Array;
  /** 1 for each held constraint: equalities by definition, whatever rounding says */
  readonly isHeld: Uint8Array;
  /** [1] what is minimised: t, and a trace of each d_j so that no two vertices tie */
  readonly cost: Float64Array;
  /** [1] one for each held constraint, >= 0 */
  readonly multipliers: Float64Array;
}

/**
 * Gradient of constraint `index`. Even rows: t - e_i - a_i d >= 0; odd rows: t + e_i + a_i d >= 0; then d_j
 * >= low, -d_j >= -high.
 */
export function gradient({ n, rows, problem }: Workspace, index: number, out: Float64Array): void {
  const sign = index % 2 === 0 ? -1 : 1;
  if (index < 2 * rows) {
    const at = (index >> 1) * n;
    for (let j = 0; j < n; j++) out[j] = sign * problem.slopes[at + j];
    out[n] = 1;
  } else {
    out.fill(0);
    out[(index - 2 * rows) >> 1] = -sign;
  }
}

export function rightSide({ rows, problem, low, high }: Workspace, index: number): number {
  const even = index % 2 === 0;
  if (index < 2 * rows) return even ? problem.errors[index >> 1] : -problem.errors[index >> 1];
  const j = (index - 2 * rows) >> 1;
  return even ? low[j] : -high[j];
}

export function timesInverse(row: Float64Array, inverse: Float64Array, out: Float64Array): void {
  const size = row.length;
  out.fill(0);
  for (let j = 0; j < size; j++) {
    if (row[j] === 0) continue;
    for (let k = 0; k < size; k++) out[k] += row[j] * inverse[j * size + k];
  }
}

/** Inverse after row `leaving` of the matrix was replaced by one that is `share` of the old rows. */
export function exchangeRow(inverse: Float64Array, size: number, share: Float64Array, leaving: number): void {
  for (let j = 0; j < size; j++) {
    const at = j * size;
    const pivot = inverse[at + leaving] / share[leaving];
    for (let k = 0; k < size; k++) inverse[at + k] -= pivot * share[k];
    inverse[at + leaving] = pivot;
  }
}

/** Gauss-Jordan with row pivots; false when the held set is singular. */
export function refreshInverse(work: Workspace): boolean {
  const size = work.n + 1;
  const wide = 2 * size;
  const m = new Float64Array(size * wide);
  for (let k = 0; k < size; k++) {
    gradient(work, work.held[k], m.subarray(k * wide, k * wide + size));
    m[k * wide + size + k] = 1;
  }
  for (let c = 0; c < size; c++) {
    let pivot = c;
    for (let r = c + 1; r < size; r++)
      if (Math.abs(m[r * wide + c]) > Math.abs(m[pivot * wide + c])) pivot = r;
    if (m[pivot * wide + c] === 0) return false;
    if (pivot !== c) {
      const swap = m.slice(c * wide, (c + 1) * wide);
      m.copyWithin(c * wide, pivot * wide, (pivot + 1) * wide);
      m.set(swap, pivot * wide);
    }
    const inverse = 1 / m[c * wide + c];
    for (let j = c; j < wide; j++) m[c * wide + j] *= inverse;
    for (let r = 0; r < size; r++) {
      const factor = m[r * wide + c];
      if (r === c || factor === 0) continue;
      for (let j = c; j < wide; j++) m[r * wide + j] -= factor * m[c * wide + j];
    }
  }
  for (let r = 0; r < size; r++) work.inverse.set(m.subarray(r * wide + size, (r + 1) * wide), r * size);
  return true;
}
