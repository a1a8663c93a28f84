/**
 * e^z K_n(z) by Hankel's expansion sqrt(pi/(2z)) sum a_k(n)/z^k (DLMF 10.40.2), good up to the imaginary axis.
 * For |z| >= 40 and n^2 of the order of |z| at most; below, the least term e^(-2|z|) is seen.
 */
import {
  DD_PI,
  type DdComplex,
  dc,
  dcDivide,
  dcMultiply,
  dcScale,
  dcSqrt,
  type Scaled,
  scaled,
} from '../dd/index.ts';
import { hankelSums } from './sums.ts';

/** @throws Problem NO_CONVERGENCE where |z| is too small for the order */
export function besselK_asymptotic(n: number, z: DdComplex): Scaled {
  const root = dcSqrt(dcDivide(dcScale(dc(0.5, 0), DD_PI), z));
  return scaled(dcMultiply(root, hankelSums('besselK_asymptotic', n, z).plain));
}
