/** J_n of a real argument, J_n(x) = i^-n I_n(ix) (DLMF 10.27.6), and the positive zeros of J_1. */
import { Problem } from '../../problem.ts';
import { dcExp, type Scaled, scaledDivide, scaledMultiply, scaledToComplex } from '../dd/index.ts';
import { checkedArgument } from './argument.ts';
import { scaledBesselI } from './i.ts';

/** The real number J_n(x) in the real or imaginary part of the result, its sign apart. */
function rotated(n: number, x: number): { form: Scaled; sign: number } {
  const z = checkedArgument('besselJ', n, { re: 0, im: Math.abs(x) });
  const form = scaledMultiply(scaledBesselI(n, z), dcExp(z));
  // i^n is 1, i, -1, -i
  const sign = n % 4 < 2 ? 1 : -1;
  return { form, sign: x < 0 && n % 2 === 1 ? -sign : sign };
}

/**
 * J_n(x).
 * @param n [1] order, whole, 0 .. 10000
 * @param x [1] real, |x| to 1e9
 * @throws Problem DOMAIN for a wrong order or argument
 */
export function besselJ(n: number, x: number): number {
  const { form, sign } = rotated(n, x);
  const value = scaledToComplex(form);
  return sign * (n % 2 === 0 ? value.re : value.im);
}

/** Newton doubles the digits; McMahon's start has three for the first zero. */
const NEWTON_STEPS = 6;

/** [1] most zeros in one call */
const MAX_ZEROS = 100_000;

/** McMahon's expansion for the k-th zero of J_1 (DLMF 10.21.19 with mu = 4), 1.6e-4 off for k = 1, less for more. */
function mcMahonJ1(k: number): number {
  const beta = (k + 0.25) * Math.PI;
  const e = 1 / (8 * beta);
  return beta - e * (3 - e * e * (12 - e * e * (37728 / 5)));
}

/**
 * The first positive zeros j_{1,1} < j_{1,2} < .. of J_1, correctly rounded but for the last place: McMahon's start, then
 * Newton x - J_1/J_1' with J_1' = J_0 - J_1/x, both of 31 digits inside.
 * @param count [1] 0 .. 100000
 * @throws Problem DOMAIN for a wrong count
 */
export function besselJ1Zeros(count: number): Float64Array {
  if (!(Number.isInteger(count) && count >= 0 && count <= MAX_ZEROS)) {
    throw new Problem('DOMAIN', `besselJ1Zeros: ${count} zeros; a whole number from 0 to ${MAX_ZEROS}`);
  }
  const zeros = new Float64Array(count);
  for (let k = 1; k <= count; k++) zeros[k - 1] = polish(mcMahonJ1(k));
  return zeros;
}

function polish(start: number): number {
  let x = start;
  for (let step = 0; step < NEWTON_STEPS; step++) {
    // J_1 / J_0 = -j I_1 / I_0, real
    const quotient = scaledToComplex(scaledDivide(rotated(1, x).form, rotated(0, x).form)).im;
    const shift = quotient / (1 - quotient / x);
    const next = x - shift;
    // one more step would not change it: the digits double
    if (Math.abs(shift) < 1e-9 * x) return next;
    x = next;
  }
  throw new Problem('NO_CONVERGENCE', `besselJ1Zeros: no zero found near ${start} in ${NEWTON_STEPS} steps`);
}
