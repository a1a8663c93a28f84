/**
 * Complex linear systems by the generalised minimal residual method, without restart.
 *
 * Method: Saad & Schultz 1986, algorithm 3, with modified Gram-Schmidt done twice where cancellation shows
 * (Daniel, Gragg, Kaufman & Stewart 1976) and complex Givens rotations. The operator is a callback.
 * Converges fast where the operator is the identity plus a contraction; it can stagnate at rounding level for
 * operators with a norm far above one, which is reported, not hidden.
 */
import { Problem } from '../problem.ts';

/** A complex vector as two flat arrays of one length. */
export interface ComplexVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface GmresOptions {
  /** [1] stop when the residual norm is below this times the norm of the right side */
  readonly relativeResidual: number;
  /** most operator products */
  readonly maxIterations: number;
}

export interface GmresResult {
  /** operator products used */
  readonly iterations: number;
  /** [1] norm of the residual over the norm of the right side, by the recurrence */
  readonly relativeResidual: number;
  /** [1] estimate of the norm of the inverse on the space searched */
  readonly inverseNorm: number;
  /** false when the residual wanted was not met */
  readonly converged: boolean;
}

/** Work space kept between solves, so that hot loops allocate nothing. */
export class KrylovSpace {
  private readonly basis: ComplexVector[] = [];
  private length = 0;

  /** The k-th basis vector of a space of vectors with `length` entries. */
  vector(k: number, length: number): ComplexVector {
    if (length !== this.length) {
      this.basis.length = 0;
      this.length = length;
    }
    while (this.basis.length <= k) {
      this.basis.push({
        re: new Float64Array(length),
        im: new Float64Array(length),
      });
    }
    return this.basis[k] as ComplexVector;
  }
}

/** [1] Euclidean norm. */
export function norm2(v: ComplexVector): number {
  let sum = 0;
  for (let i = 0; i < v.re.length; i++) sum += v.re[i] * v.re[i] + v.im[i] * v.im[i];
  return Math.sqrt(sum);
}

/**
 * Solves A x = b for x with a zero first guess.
 *
 * @param apply writes A v into out (out never aliases v)
 * @param b right side; unchanged
 * @param x overwritten with the solution
 * @throws Problem NO_CONVERGENCE when a value that is not finite appears
 */
export function gmres(
  apply: (v: ComplexVector, out: ComplexVector) => void,
  b: ComplexVector,
  x: ComplexVector,
  space: KrylovSpace,
  options: GmresOptions,
): GmresResult {
  const length = b.re.length;
  const most = options.maxIterations;
  x.re.fill(0);
  x.im.fill(0);
  const beta = norm2(b);
  if (beta === 0)
    return {
      iterations: 0,
      relativeResidual: 0,
      inverseNorm: 1,
      converged: true,
    };
  const first = space.vector(0, length);
  for (let i = 0; i < length; i++) {
    first.re[i] = b.re[i] / beta;
    first.im[i] = b.im[i] / beta;
  }
  // Triangular factor of the Hessenberg matrix, column k in rows 0..k, interleaved (re, im).
  const columns: Float64Array[] = [];
  const rotation = {
    c: new Float64Array(most),
    sRe: new Float64Array(most),
    sIm: new Float64Array(most),
  };
  const gRe = new Float64Array(most + 1);
  const gIm = new Float64Array(most + 1);
  gRe[0] = beta;
  let steps = 0;
  let residual = 1;
  while (steps < most && residual > options.relativeResidual) {
    const next = space.vector(steps + 1, length);
    apply(space.vector(steps, length), next);
    const column = orthogonalise(space, steps, next, length);
    applyRotations(column, steps, rotation);
    const last = makeRotation(column, steps, rotation);
    if (!Number.isFinite(last)) {
      throw new Problem(
        'NO_CONVERGENCE',
        `gmres met a value that is not finite at step ${steps + 1} of ${most}, ${length} unknowns`,
      );
    }
    columns.push(column);
    rotateRightSide(gRe, gIm, steps, rotation);
    steps++;
    residual = Math.hypot(gRe[steps], gIm[steps]) / beta;
    if (last === 0) break;
  }
  const y = backSubstitute(columns, gRe, gIm, steps);
  for (let k = 0; k < steps; k++) {
    const v = space.vector(k, length);
    const yr = y[2 * k];
    const yi = y[2 * k + 1];
    for (let i = 0; i < length; i++) {
      x.re[i] += yr * v.re[i] - yi * v.im[i];
      x.im[i] += yr * v.im[i] + yi * v.re[i];
    }
  }
  return {
    iterations: steps,
    relativeResidual: residual,
    inverseNorm: inverseNormEstimate(columns, steps),
    converged: residual <= options.relativeResidual,
  };
}

/** Makes `next` orthogonal to the first k + 1 basis vectors and normal; returns the Hessenberg column. */
function orthogonalise(space: KrylovSpace, k: number, next: ComplexVector, length: number): Float64Array {
  const column = new Float64Array(2 * (k + 2));
  const before = norm2(next);
  subtractProjections(space, k, next, length, column);
  let after = norm2(next);
  // Below a tenth of its norm the vector lost digits: a second pass restores orthogonality ("twice is enough").
  if (after < 0.1 * before) {
    subtractProjections(space, k, next, length, column);
    after = norm2(next);
  }
  column[2 * (k + 1)] = after;
  if (after > 0) {
    for (let i = 0; i < length; i++) {
      next.re[i] /= after;
      next.im[i] /= after;
    }
  }
  return column;
}

function subtractProjections(
  space: KrylovSpace,
  k: number,
  next: ComplexVector,
  length: number,
  column: Float64Array,
): void {
  const { re: wr, im: wi } = next;
  for (let j = 0; j <= k; j++) {
    const v = space.vector(j, length);
    const vr = v.re;
    const vi = v.im;
    let hr = 0;
    let hi = 0;
    for (let i = 0; i < length; i++) {
      hr += vr[i] * wr[i] + vi[i] * wi[i];
      hi += vr[i] * wi[i] - vi[i] * wr[i];
    }
    for (let i = 0; i < length; i++) {
      wr[i] -= hr * vr[i] - hi * vi[i];
      wi[i] -= hr * vi[i] + hi * vr[i];
    }
    column[2 * j] += hr;
    column[2 * j + 1] += hi;
  }
}

interface Rotations {
  readonly c: Float64Array;
  readonly sRe: Float64Array;
  readonly sIm: Float64Array;
}

/** Earlier rotations on a new column: [c, s; -conj(s), c] with real c. */
function applyRotations(column: Float64Array, k: number, r: Rotations): void {
  for (let j = 0; j < k; j++) {
    const ar = column[2 * j];
    const ai = column[2 * j + 1];
    const br = column[2 * j + 2];
    const bi = column[2 * j + 3];
    const sr = r.sRe[j];
    const si = r.sIm[j];
    column[2 * j] = r.c[j] * ar + sr * br - si * bi;
    column[2 * j + 1] = r.c[j] * ai + sr * bi + si * br;
    column[2 * j + 2] = r.c[j] * br - sr * ar - si * ai;
    column[2 * j + 3] = r.c[j] * bi - sr * ai + si * ar;
  }
}

/** The rotation that clears the subdiagonal entry of column k (real, not negative); returns the diagonal's size. */
function makeRotation(column: Float64Array, k: number, r: Rotations): number {
  const ar = column[2 * k];
  const ai = column[2 * k + 1];
  const b = column[2 * k + 2];
  const a = Math.hypot(ar, ai);
  const size = Math.hypot(a, b);
  if (a === 0) {
    r.c[k] = 0;
    r.sRe[k] = 1;
    r.sIm[k] = 0;
    column[2 * k] = b;
    column[2 * k + 1] = 0;
  } else {
    r.c[k] = a / size;
    r.sRe[k] = (ar / a) * (b / size);
    r.sIm[k] = (ai / a) * (b / size);
    column[2 * k] = (ar / a) * size;
    column[2 * k + 1] = (ai / a) * size;
  }
  column[2 * k + 2] = 0;
  return size;
}

function rotateRightSide(gRe: Float64Array, gIm: Float64Array, k: number, r: Rotations): void {
  const ar = gRe[k];
  const ai = gIm[k];
  gRe[k] = r.c[k] * ar;
  gIm[k] = r.c[k] * ai;
  gRe[k + 1] = -(r.sRe[k] * ar + r.sIm[k] * ai);
  gIm[k + 1] = -(r.sRe[k] * ai - r.sIm[k] * ar);
}

function backSubstitute(
  columns: Float64Array[],
  gRe: Float64Array,
  gIm: Float64Array,
  n: number,
): Float64Array {
  const y = new Float64Array(2 * n);
  for (let i = n - 1; i >= 0; i--) {
    let sr = gRe[i];
    let si = gIm[i];
    for (let k = i + 1; k < n; k++) {
      const hr = columns[k][2 * i];
      const hi = columns[k][2 * i + 1];
      sr -= hr * y[2 * k] - hi * y[2 * k + 1];
      si -= hr * y[2 * k + 1] + hi * y[2 * k];
    }
    const dr = columns[i][2 * i];
    const di = columns[i][2 * i + 1];
    const d = dr * dr + di * di;
    if (d === 0) continue;
    y[2 * i] = (sr * dr + si * di) / d;
    y[2 * i + 1] = (si * dr - sr * di) / d;
  }
  return y;
}

/** Norm of the inverse of the triangular factor by three steps of the inverse power method. */
function inverseNormEstimate(columns: Float64Array[], n: number): number {
  if (n === 0) return 1;
  let vRe = new Float64Array(n).fill(1 / Math.sqrt(n));
  let vIm = new Float64Array(n);
  let growth = 1;
  for (let step = 0; step < 3; step++) {
    const w = backSubstitute(columns, vRe, vIm, n);
    const z = forwardSubstituteAdjoint(columns, w, n);
    let size = 0;
    for (let i = 0; i < 2 * n; i++) size += z[i] * z[i];
    size = Math.sqrt(size);
    if (!(size > 0)) return growth;
    growth = Math.sqrt(size);
    vRe = new Float64Array(n);
    vIm = new Float64Array(n);
    for (let i = 0; i < n; i++) {
      vRe[i] = z[2 * i] / size;
      vIm[i] = z[2 * i + 1] / size;
    }
  }
  return growth;
}

/** Solves R^H z = w for the upper triangular R. */
function forwardSubstituteAdjoint(columns: Float64Array[], w: Float64Array, n: number): Float64Array {
  const z = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) {
    let sr = w[2 * i];
    let si = w[2 * i + 1];
    const column = columns[i];
    for (let k = 0; k < i; k++) {
      const hr = column[2 * k];
      const hi = -column[2 * k + 1];
      sr -= hr * z[2 * k] - hi * z[2 * k + 1];
      si -= hr * z[2 * k + 1] + hi * z[2 * k];
    }
    const dr = column[2 * i];
    const di = -column[2 * i + 1];
    const d = dr * dr + di * di;
    if (d === 0) continue;
    z[2 * i] = (sr * dr + si * di) / d;
    z[2 * i + 1] = (si * dr - sr * di) / d;
  }
  return z;
}
