/**
 * I_n(z) by its power series (DLMF 10.25.2): (z/2)^n / n! * sum_k X^k / (k! (n+1)_k), X = z^2/4.
 * Converges everywhere; without cancellation where |X| <= n + 1. Near the imaginary axis and for |X| >> n + 1 the terms
 * are far larger than the sum: not to be used there.
 */
import {
  DC_ONE,
  DC_ZERO,
  DD_ONE,
  type DdComplex,
  dcAdd,
  dcMultiply,
  dcOver,
  ddTimes,
  type Scaled,
  scaled,
  scaledDivide,
  scaledMultiply,
  scaledPower,
} from '../dd/index.ts';
import { isNegligible, noConvergence } from './sums.ts';

const MAX_TERMS = 1000;

/** (z/2)^n / n! */
export function powerOverFactorial(n: number, z: DdComplex): Scaled {
  const { value, exponent } = scaled(z);
  return scaledDivide(scaledPower({ value, exponent: exponent - 1 }, n), factorial(n));
}

/** n! */
export function factorial(n: number): Scaled {
  let product: Scaled = { value: DC_ONE, exponent: 0 };
  for (let k = 2; k <= n; k++) {
    const re = ddTimes(product.value.re, k);
    product = scaled({ re, im: DC_ZERO.im }, product.exponent);
  }
  return product;
}

/** z^2/4 */
export function quarterSquare(z: DdComplex): DdComplex {
  return dcOver(dcMultiply(z, z), 4);
}

/**
 * @throws Problem NO_CONVERGENCE after 1000 terms
 */
export function besselI_series(n: number, z: DdComplex): Scaled {
  const x = quarterSquare(z);
  let term = DC_ONE;
  let sum: DdComplex = { re: DD_ONE, im: DC_ZERO.im };
  for (let k = 1; k <= MAX_TERMS; k++) {
    term = dcOver(dcMultiply(term, x), k * (n + k));
    sum = dcAdd(sum, term);
    if (isNegligible(term, sum)) return scaledMultiply(powerOverFactorial(n, z), scaled(sum));
  }
  throw noConvergence('besselI_series', n, z, MAX_TERMS);
}
