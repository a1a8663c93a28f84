/**
 * r_n = z I_{n+1}(z) / I_n(z) with 31 digits: the chooser and its two methods. On the ray of 45 degrees z^2 is imaginary
 * to the last bit, and the recurrence keeps each part of r_n to its own relative accuracy, however small beside the other;
 * the quotient of two values does not.
 */
import {
  DC_ZERO,
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcMultiply,
  type Scaled,
  scaled,
  scaledDivide,
  scaledMultiply,
} from '../dd/index.ts';
import { besselISeriesCutoff } from './cutoffs.ts';
import { backwardStart } from './growth.ts';
import { scaledBesselI } from './i.ts';

/** r_{k-1} = z^2 / (2k + r_k) from r = 0 far above, where I_{k+1} is 1e-34 of I_n. Good at any z off the zeros of I_n. */
export function besselRatio_backward(n: number, z: DdComplex): Scaled {
  const square = dcMultiply(z, z);
  let r = DC_ZERO;
  for (let k = backwardStart(n, { re: z.re.hi, im: z.im.hi }); k > n; k--) {
    r = dcDivide(square, dcAdd(dc(2 * k, 0), r));
  }
  return scaled(r);
}

/** The quotient of the values of both orders. */
export function besselRatio_quotient(n: number, z: DdComplex): Scaled {
  return scaledMultiply(scaled(z), scaledDivide(scaledBesselI(n + 1, z), scaledBesselI(n, z)));
}

/** r_n for Re z >= 0, z != 0; the recurrence where it is short and the parts may differ much in size. */
export function scaledBesselRatio(n: number, z: DdComplex): Scaled {
  const short = besselISeriesCutoff(n, Math.hypot(z.re.hi, z.im.hi));
  return short ? besselRatio_backward(n, z) : besselRatio_quotient(n, z);
}
