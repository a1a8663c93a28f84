/** Sums that the methods share, each bounded, with one rule of when to stop. */
import { Problem } from '../../problem.ts';
import {
  DC_ONE,
  type DdComplex,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcOver,
  dcSize,
  dcSubtract,
  dcTimes,
} from '../dd/index.ts';

/** [1] what a double-double sum can not hold any more, with room for a part that is small beside the other */
const NEGLIGIBLE = 1e-34;

/** [1] a term counts until it is lost even in the smaller part; a part that is exactly zero does not count. */
export function isNegligible(term: DdComplex, sum: DdComplex): boolean {
  const re = Math.abs(sum.re.hi);
  const im = Math.abs(sum.im.hi);
  const smaller = re === 0 ? im : im === 0 ? re : Math.min(re, im);
  return dcSize(term) <= NEGLIGIBLE * smaller;
}

/** Message of a method that ran out of steps. */
export function noConvergence(method: string, n: number, z: DdComplex, steps: number): Problem {
  return new Problem(
    'NO_CONVERGENCE',
    `${method}: order ${n} at ${z.re.hi} + j ${z.im.hi} did not settle in ${steps} steps; it lies outside of ` +
      'the range of this method, call the chooser instead',
  );
}

export interface HankelSums {
  /** sum (-1)^k a_k(n) / z^k */
  readonly alternating: DdComplex;
  /** sum a_k(n) / z^k */
  readonly plain: DdComplex;
}

/** Terms fall until k is near 2|z| and rise from there; the least is near e^(-2|z|). */
const MAX_HANKEL_TERMS = 200;

/**
 * Hankel's asymptotic sums, a_k(n) = (4n^2 - 1)(4n^2 - 9) .. (4n^2 - (2k-1)^2) / (k! 8^k)  (DLMF 10.17.1).
 * @throws Problem NO_CONVERGENCE where the terms rise before they are below 1e-30
 */
export function hankelSums(method: string, n: number, z: DdComplex): HankelSums {
  const inverse = dcDivide(DC_ONE, z);
  let term = DC_ONE;
  let alternating = DC_ONE;
  let plain = DC_ONE;
  for (let k = 1; k <= MAX_HANKEL_TERMS; k++) {
    const next = dcOver(dcTimes(dcMultiply(term, inverse), 4 * n * n - (2 * k - 1) ** 2), 8 * k);
    if (dcSize(next) > dcSize(term) && 2 * k > n) {
      if (dcSize(term) < 1e-30) return { alternating, plain };
      break;
    }
    term = next;
    alternating = k % 2 === 1 ? dcSubtract(alternating, term) : dcAdd(alternating, term);
    plain = dcAdd(plain, term);
    if (isNegligible(term, alternating) && isNegligible(term, plain)) return { alternating, plain };
  }
  throw noConvergence(method, n, z, MAX_HANKEL_TERMS);
}
