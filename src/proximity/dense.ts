/**
 * The multipole system as a dense matrix: column by column from the operator, then LU with partial pivoting.
 * Slow (n^3) but without stagnation; its condition estimate bounds the norm of the inverse.
 */
import { type ComplexVector, conditionEstimate, factoriseLu, solveLu } from '../complex/index.ts';

/** [1] Most unknowns factorised: 64 MB and some seconds. */
export const MAX_DENSE = 2000;

export interface DenseSolution {
  readonly solution: ComplexVector;
  /** [1] 1-norm condition estimate over the 1-norm: an estimate of the norm of the inverse */
  readonly inverseNorm: number;
}

export function solveDense(
  apply: (v: ComplexVector, out: ComplexVector) => void,
  b: ComplexVector,
): DenseSolution {
  const n = b.re.length;
  const a = new Float64Array(2 * n * n);
  const unit = { re: new Float64Array(n), im: new Float64Array(n) };
  const column = { re: new Float64Array(n), im: new Float64Array(n) };
  for (let k = 0; k < n; k++) {
    unit.re[k] = 1;
    apply(unit, column);
    unit.re[k] = 0;
    for (let i = 0; i < n; i++) {
      a[2 * (i * n + k)] = column.re[i];
      a[2 * (i * n + k) + 1] = column.im[i];
    }
  }
  const lu = factoriseLu(a, n);
  const x = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) {
    x[2 * i] = b.re[i];
    x[2 * i + 1] = b.im[i];
  }
  solveLu(lu, x);
  const solution = {
    re: Float64Array.from({ length: n }, (_, i) => x[2 * i]),
    im: Float64Array.from({ length: n }, (_, i) => x[2 * i + 1]),
  };
  return { solution, inverseNorm: conditionEstimate(lu) / lu.norm1 };
}
