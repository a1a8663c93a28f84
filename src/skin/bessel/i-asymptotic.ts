/**
 * e^-z I_n(z) by Hankel's expansion with both exponentials (DLMF 10.40.5), so that it holds up to the imaginary axis:
 * (2 pi z)^(-1/2) [ sum (-1)^k a_k / z^k  +- j (-1)^n e^(-2z) sum a_k / z^k ], the sign that of Im z.
 * For |z| >= 40 and n^2 of the order of |z| at most; below, the least term e^(-2|z|) is seen.
 */
import {
  DC_ONE,
  DD_PI,
  type DdComplex,
  dcDivide,
  dcExp,
  dcScale,
  dcSqrt,
  dcTimes,
  dcTimesJ,
  ddTimes,
  type Scaled,
  scaled,
  scaledAdd,
  scaledMultiply,
} from '../dd/index.ts';
import { hankelSums } from './sums.ts';

/** e^(-2 Re z) is below 1e-34 from here on */
const SECOND_EXPONENTIAL_LOST = 40;

/** @throws Problem NO_CONVERGENCE where |z| is too small for the order */
export function besselI_asymptotic(n: number, z: DdComplex): Scaled {
  const { alternating, plain } = hankelSums('besselI_asymptotic', n, z);
  const root = scaled(dcDivide(DC_ONE, dcSqrt(dcScale(z, ddTimes(DD_PI, 2)))));
  const first = scaledMultiply(root, scaled(alternating));
  if (z.re.hi > SECOND_EXPONENTIAL_LOST) return first;
  const sign = (z.im.hi < 0 ? -1 : 1) * (n % 2 === 0 ? 1 : -1);
  const decaying = scaledMultiply(dcExp(dcTimes(z, -2)), scaled(dcTimes(dcTimesJ(plain), sign)));
  return scaledAdd(first, scaledMultiply(root, decaying));
}
