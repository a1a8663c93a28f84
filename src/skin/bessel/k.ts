/** e^z K_n(z): the chooser among the methods, see cutoffs.ts. */
import { type DdComplex, dcExp, type Scaled, scaledMultiply } from '../dd/index.ts';
import { BESSEL_K_SERIES_MODULUS, HANKEL_MODULUS } from './cutoffs.ts';
import { besselK_forward } from './forward.ts';
import { besselK_asymptotic } from './k-asymptotic.ts';
import { besselK_series } from './k-series.ts';
import { besselK_temme } from './k-temme.ts';

/** e^z K_n(z) for Re z >= 0, z != 0. */
export function scaledBesselK(n: number, z: DdComplex): Scaled {
  const modulus = Math.hypot(z.re.hi, z.im.hi);
  if (modulus <= BESSEL_K_SERIES_MODULUS) return scaledMultiply(besselK_series(n, z), dcExp(z));
  if (modulus < HANKEL_MODULUS) {
    const { zero, one } = besselK_temme(z);
    return besselK_forward(n, z, zero, one);
  }
  return besselK_forward(n, z, besselK_asymptotic(0, z), besselK_asymptotic(1, z));
}
