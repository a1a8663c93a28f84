/**
 * Complex linear systems by the generalised minimal residual method, without restart.
 *
 * Method: Saad & Schultz 1986, algorithm 3, with modified Gram-Schmidt done twice where cancellation shows
 * (Daniel, Gragg, Kaufman & Stewart 1976) and complex Givens rotations. The operator is a callback.
 * Converges fast where the operator is the identity plus a contraction; it can stagnate at rounding level for
 * operators with a norm far above one, which is reported, not hidden.
 */
import { Problem } from '../problem.ts';
import {
  applyRotations,
  backSubstitute,
  inverseNormEstimate,
  makeRotation,
  rotateRightSide,
  rotations,
} from './hessenberg.ts';
import { type ComplexVector, norm2 } from './vector.ts';

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
  const columns: Float64Array[] = [];
  const rotation = rotations(most);
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
