/**
 * Dense complex LU factorisation with partial pivoting and a condition estimate.
 *
 * Method: right-looking elimination by rows (Golub & Van Loan 2013, algorithm 3.4.1); 1-norm condition by
 * Hager 1984 as refined by N. Higham 1988. Storage: one interleaved (re, im) array, row major.
 * Fails only where a pivot is exactly zero; near-singular systems show in the condition estimate.
 */
import { Problem } from '../problem.ts';

export interface ComplexLu {
  readonly n: number;
  /** L below the diagonal (unit), U on and above it; interleaved, row major, 2 n n numbers */
  readonly factors: Float64Array;
  /** row of the original matrix that stands in row i */
  readonly rows: Int32Array;
  /** [1] 1-norm of the original matrix */
  readonly norm1: number;
}

/**
 * Factorises in place.
 *
 * @param a n x n matrix, interleaved (re, im), row major; overwritten by the factors
 * @throws Problem DOMAIN for a singular matrix
 */
export function factoriseLu(a: Float64Array, n: number): ComplexLu {
  const norm1 = matrixNorm1(a, n);
  const rows = new Int32Array(n);
  for (let i = 0; i < n; i++) rows[i] = i;
  for (let k = 0; k < n; k++) {
    let best = k;
    let size = -1;
    for (let i = k; i < n; i++) {
      const at = 2 * (i * n + k);
      const s = Math.abs(a[at]) + Math.abs(a[at + 1]);
      if (s > size) {
        size = s;
        best = i;
      }
    }
    if (!(size > 0)) {
      throw new Problem('DOMAIN', `matrix of order ${n} is singular: pivot ${k + 1} is ${size}`);
    }
    if (best !== k) swapRows(a, rows, n, k, best);
    eliminate(a, n, k);
  }
  return { n, factors: a, rows, norm1 };
}

function swapRows(a: Float64Array, rows: Int32Array, n: number, i: number, j: number): void {
  for (let c = 0; c < 2 * n; c++) {
    const t = a[2 * i * n + c];
    a[2 * i * n + c] = a[2 * j * n + c];
    a[2 * j * n + c] = t;
  }
  const t = rows[i];
  rows[i] = rows[j];
  rows[j] = t;
}

function eliminate(a: Float64Array, n: number, k: number): void {
  const kk = 2 * (k * n + k);
  const pr = a[kk];
  const pi = a[kk + 1];
  const d = pr * pr + pi * pi;
  const end = 2 * (k + 1) * n;
  for (let i = k + 1; i < n; i++) {
    const ik = 2 * (i * n + k);
    const br = a[ik];
    const bi = a[ik + 1];
    if (br === 0 && bi === 0) continue;
    const fr = (br * pr + bi * pi) / d;
    const fi = (bi * pr - br * pi) / d;
    a[ik] = fr;
    a[ik + 1] = fi;
    for (let s = kk + 2, t = ik + 2; s < end; s += 2, t += 2) {
      a[t] -= fr * a[s] - fi * a[s + 1];
      a[t + 1] -= fr * a[s + 1] + fi * a[s];
    }
  }
}

/** Solves A x = b in place; `b` is interleaved, 2 n numbers. */
export function solveLu(lu: ComplexLu, b: Float64Array): void {
  const { n, factors: a, rows } = lu;
  const x = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) {
    let sr = b[2 * rows[i]];
    let si = b[2 * rows[i] + 1];
    for (let k = 0, at = 2 * i * n; k < i; k++, at += 2) {
      sr -= a[at] * x[2 * k] - a[at + 1] * x[2 * k + 1];
      si -= a[at] * x[2 * k + 1] + a[at + 1] * x[2 * k];
    }
    x[2 * i] = sr;
    x[2 * i + 1] = si;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sr = x[2 * i];
    let si = x[2 * i + 1];
    for (let k = i + 1, at = 2 * (i * n + i + 1); k < n; k++, at += 2) {
      sr -= a[at] * x[2 * k] - a[at + 1] * x[2 * k + 1];
      si -= a[at] * x[2 * k + 1] + a[at + 1] * x[2 * k];
    }
    const at = 2 * (i * n + i);
    const d = a[at] * a[at] + a[at + 1] * a[at + 1];
    x[2 * i] = (sr * a[at] + si * a[at + 1]) / d;
    x[2 * i + 1] = (si * a[at] - sr * a[at + 1]) / d;
  }
  b.set(x);
}

/** Solves A^H x = b in place; `b` is interleaved, 2 n numbers. */
export function solveLuAdjoint(lu: ComplexLu, b: Float64Array): void {
  const { n, factors: a, rows } = lu;
  const y = Float64Array.from(b);
  for (let i = 0; i < n; i++) {
    const at = 2 * (i * n + i);
    const d = a[at] * a[at] + a[at + 1] * a[at + 1];
    const yr = (y[2 * i] * a[at] - y[2 * i + 1] * a[at + 1]) / d;
    const yi = (y[2 * i + 1] * a[at] + y[2 * i] * a[at + 1]) / d;
    y[2 * i] = yr;
    y[2 * i + 1] = yi;
    subtractAdjointRow(a, y, n, i, i + 1, n);
  }
  for (let i = n - 1; i >= 0; i--) subtractAdjointRow(a, y, n, i, 0, i);
  for (let i = 0; i < n; i++) {
    b[2 * rows[i]] = y[2 * i];
    b[2 * rows[i] + 1] = y[2 * i + 1];
  }
}

/** y_k -= conj(a_ik) y_i for k in [from, to). */
function subtractAdjointRow(
  a: Float64Array,
  y: Float64Array,
  n: number,
  i: number,
  from: number,
  to: number,
): void {
  const yr = y[2 * i];
  const yi = y[2 * i + 1];
  for (let k = from, at = 2 * (i * n + from); k < to; k++, at += 2) {
    y[2 * k] -= a[at] * yr + a[at + 1] * yi;
    y[2 * k + 1] -= a[at] * yi - a[at + 1] * yr;
  }
}

function matrixNorm1(a: Float64Array, n: number): number {
  let worst = 0;
  for (let k = 0; k < n; k++) {
    let sum = 0;
    for (let i = 0; i < n; i++) sum += Math.hypot(a[2 * (i * n + k)], a[2 * (i * n + k) + 1]);
    if (sum > worst) worst = sum;
  }
  return worst;
}

/** Most rounds of the estimator; Higham 1988 finds that more than five never pay. */
const CONDITION_ROUNDS = 5;

/** [1] Estimate (a lower bound, in practice within a factor of three) of the 1-norm condition number. */
export function conditionEstimate(lu: ComplexLu): number {
  const { n } = lu;
  let x = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) x[2 * i] = 1 / n;
  let best = 0;
  let unit = -1;
  for (let round = 0; round < CONDITION_ROUNDS; round++) {
    solveLu(lu, x);
    let size = 0;
    for (let i = 0; i < n; i++) size += Math.hypot(x[2 * i], x[2 * i + 1]);
    if (size <= best) break;
    best = size;
    for (let i = 0; i < n; i++) {
      const m = Math.hypot(x[2 * i], x[2 * i + 1]);
      x[2 * i] = m === 0 ? 1 : x[2 * i] / m;
      x[2 * i + 1] = m === 0 ? 0 : x[2 * i + 1] / m;
    }
    solveLuAdjoint(lu, x);
    let at = 0;
    let largest = -1;
    for (let i = 0; i < n; i++) {
      const m = Math.hypot(x[2 * i], x[2 * i + 1]);
      if (m > largest) {
        largest = m;
        at = i;
      }
    }
    if (at === unit) break;
    unit = at;
    x = new Float64Array(2 * n);
    x[2 * at] = 1;
  }
  return best * lu.norm1;
}
