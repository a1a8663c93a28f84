/** e^-z I_n(z): the chooser among the methods, see cutoffs.ts. */
import {
  DC_ONE,
  DC_ZERO,
  type DdComplex,
  dcExp,
  dcNegate,
  dcSize,
  type Scaled,
  scaledMultiply,
} from '../dd/index.ts';
import { besselISeriesCutoff, FORWARD_AMPLIFICATION, HANKEL_MODULUS } from './cutoffs.ts';
import { besselI_forward } from './forward.ts';
import { forwardAmplification } from './growth.ts';
import { besselI_asymptotic } from './i-asymptotic.ts';
import { besselI_miller } from './i-miller.ts';
import { besselI_series } from './i-series.ts';

/** e^-z I_n(z) for Re z >= 0. */
export function scaledBesselI(n: number, z: DdComplex): Scaled {
  if (dcSize(z) === 0) return { value: n === 0 ? DC_ONE : DC_ZERO, exponent: 0 };
  const point = { re: z.re.hi, im: z.im.hi };
  const modulus = Math.hypot(point.re, point.im);
  if (besselISeriesCutoff(n, modulus)) return scaledMultiply(besselI_series(n, z), dcExp(dcNegate(z)));
  if (modulus >= HANKEL_MODULUS && forwardAmplification(n, point) <= FORWARD_AMPLIFICATION) {
    const zero = besselI_asymptotic(0, z);
    return n === 0 ? zero : besselI_forward(n, z, zero, besselI_asymptotic(1, z));
  }
  return besselI_miller(n, z);
}
