/**
 * K_n(z) by its power series (DLMF 10.31.1), X = z^2/4, psi(k+1) = -gamma + 1 + 1/2 + .. + 1/k:
 *
 *   K_n = (n-1)!/2 (z/2)^-n sum_{k<n} (-X)^k / (k! (n-1)(n-2)..(n-k))
 *         + (-1)^n (z/2)^n / n! sum_k X^k / (k! (n+1)_k) [ (psi(k+1) + psi(n+k+1))/2 - ln(z/2) ].
 *
 * Converges everywhere; for |z| above a few units the two parts cancel like e^(-2 Re z): 1e-32 e^4 of K is left at 2.
 */
import {
  DC_ONE,
  DC_ZERO,
  DD_EULER_GAMMA,
  DD_ONE,
  type Dd,
  type DdComplex,
  dcAdd,
  dcLog,
  dcMultiply,
  dcNegate,
  dcOver,
  dcScale,
  dcSubtract,
  dd,
  ddAdd,
  ddDivide,
  ddNegate,
  ddTimes,
  type Scaled,
  scaled,
  scaledAdd,
  scaledDivide,
  scaledMultiply,
  scaledPower,
} from '../dd/index.ts';
import { factorial, powerOverFactorial, quarterSquare } from './i-series.ts';
import { isNegligible, noConvergence } from './sums.ts';

const MAX_TERMS = 1000;

/** @throws Problem NO_CONVERGENCE after 1000 terms */
export function besselK_series(n: number, z: DdComplex): Scaled {
  const x = quarterSquare(z);
  const regular = logarithmicPart(n, z, x);
  return n === 0 ? regular : scaledAdd(principalPart(n, z, x), regular);
}

/** The finite sum, with the pole at 0. */
function principalPart(n: number, z: DdComplex, x: DdComplex): Scaled {
  const minusX = dcNegate(x);
  let term = DC_ONE;
  let sum = DC_ONE;
  for (let k = 1; k < n; k++) {
    term = dcOver(dcMultiply(term, minusX), k * (n - k));
    sum = dcAdd(sum, term);
    if (isNegligible(term, sum) && 2 * k < n) break;
  }
  const { value, exponent } = scaled(z);
  const power = scaledPower({ value, exponent: exponent - 1 }, n);
  const front = scaledDivide(factorial(n - 1), power);
  return scaledMultiply({ value: front.value, exponent: front.exponent - 1 }, scaled(sum));
}

/** The sum with the logarithm. */
function logarithmicPart(n: number, z: DdComplex, x: DdComplex): Scaled {
  const logarithm = dcLog(dcOver(z, 2));
  let harmonic = ddTimes(harmonicNumber(n), 0.5);
  let term = DC_ONE;
  let sum = weight(harmonic, logarithm);
  for (let k = 1; k <= MAX_TERMS; k++) {
    const rise = ddAdd(ddDivide(DD_ONE, dd(2 * k)), ddDivide(DD_ONE, dd(2 * (n + k))));
    harmonic = ddAdd(harmonic, rise);
    term = dcOver(dcMultiply(term, x), k * (n + k));
    const part = dcMultiply(term, weight(harmonic, logarithm));
    sum = dcAdd(sum, part);
    if (isNegligible(part, sum)) {
      const signed = n % 2 === 0 ? sum : dcNegate(sum);
      return scaledMultiply(powerOverFactorial(n, z), scaled(signed));
    }
  }
  throw noConvergence('besselK_series', n, z, MAX_TERMS);
}

/** (psi(k+1) + psi(n+k+1))/2 - ln(z/2), from the mean of the two harmonic numbers */
function weight(harmonic: Dd, logarithm: DdComplex): DdComplex {
  const real = ddAdd(harmonic, ddNegate(DD_EULER_GAMMA));
  return dcSubtract(dcScale(DC_ONE, real), logarithm);
}

function harmonicNumber(n: number): Dd {
  let sum = DC_ZERO.re;
  for (let k = n; k >= 1; k--) sum = ddAdd(sum, ddDivide(DD_ONE, dd(k)));
  return sum;
}
