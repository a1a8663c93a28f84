/**
 * How the functions grow with the order, from the leading term of the uniform expansions (DLMF 10.41):
 * |I_n(z)| ~ exp(g(n)), |K_n(z)| ~ exp(-g(n)),  g(n) = Re[ w + n ln(z / (n + w)) ],  w = sqrt(n^2 + z^2).
 * It falls with n, slowly up to n near |z|. An estimate in plain double that only sets depths and choices.
 */
import { Problem } from '../../problem.ts';
import type { ComplexPoint } from './argument.ts';

/** [1] g(n), natural logarithm of the size of I_n up to algebraic factors */
export function besselGrowth(n: number, z: ComplexPoint): number {
  const sRe = n * n + (z.re - z.im) * (z.re + z.im);
  const sIm = 2 * z.re * z.im;
  const modulus = Math.hypot(sRe, sIm);
  const wRe = Math.sqrt(Math.max(0, (modulus + sRe) / 2));
  const wIm = Math.sqrt(Math.max(0, (modulus - sRe) / 2)) * (sIm < 0 || z.im < 0 ? -1 : 1);
  if (n === 0) return wRe;
  return wRe + n * Math.log(Math.hypot(z.re, z.im) / Math.hypot(n + wRe, wIm));
}

/** [1] natural logarithm by which an error of I_0, I_1 grows beside I_n in the forward recurrence, ~ K_n I_0 / (K_0 I_n) */
export function forwardAmplification(n: number, z: ComplexPoint): number {
  return 2 * (besselGrowth(0, z) - besselGrowth(n, z));
}

/** What a start 0 at order M leaves behind in order n, and in the sum over all orders: e^-78 = 1e-34. */
const DROP = 78;

/**
 * [1] order M to start a backward recurrence from, so that order n and the sum of all orders are good to 1e-34. At most
 * about 2 max(n, |z|) + 300, and near sqrt(n^2 + 80 |z|) for large |z| off the imaginary axis.
 */
export function backwardStart(n: number, z: ComplexPoint): number {
  const wanted = Math.min(besselGrowth(0, z) - DROP, besselGrowth(n, z) - DROP / 2);
  let low = n;
  let high = n + 16;
  const limit = 4 * (n + Math.hypot(z.re, z.im)) + 1000;
  while (besselGrowth(high, z) > wanted) {
    low = high;
    high += Math.max(16, high - n);
    if (low > limit) {
      throw new Problem(
        'NO_CONVERGENCE',
        `no start below order ${low} for order ${n} at ${z.re} + j ${z.im}`,
      );
    }
  }
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (besselGrowth(middle, z) > wanted) low = middle;
    else high = middle;
  }
  return high;
}
