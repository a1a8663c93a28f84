/**
 * e^z K_0(z) and e^z K_1(z) by Temme's backward recurrence (Temme 1975, J. Comput. Phys. 19, 324) for order 0. The
 * confluent functions U(n + 1/2, 1, 2z), weighted so that their sum is known (u_n below, all n >= 0), obey
 *
 *   u_{n-1} = n / (n - 1/2)^2 [ 2 (n + z) u_n - (n + 1) u_{n+1} ],      sum_n u_n = (2z)^(-1/2),
 *   e^z K_0 = sqrt(pi) u_0,      K_1 / K_0 = (z + 1/2 - u_1/u_0) / z.
 *
 * u_n falls like exp(-2 sqrt(2 n z)): depth near 800/|z|, twice that on the imaginary axis; useless near 0.
 */
import {
  DC_ONE,
  DC_ZERO,
  DD_PI,
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcOver,
  dcScale,
  dcSize,
  dcSqrt,
  dcSubtract,
  dcTimes,
  type Scaled,
  scaled,
  scaledMultiply,
} from '../dd/index.ts';
import { noConvergence } from './sums.ts';

/** e^z K_0 and e^z K_1 */
export interface ZeroAndOne {
  readonly zero: Scaled;
  readonly one: Scaled;
}

/** exp(-2 Re sqrt(2 n z)) = 1e-34 at the start; for large |z| the fall is that of an asymptotic series, 32 terms do. */
const DROP = 39;
const LEAST_STEPS = 32;
const MAX_STEPS = 5000;
const RESCALE = 2 ** 400;

/** @throws Problem NO_CONVERGENCE where |z| is so small that more than 5000 steps are needed */
export function besselK_temme(z: DdComplex): ZeroAndOne {
  const modulus = Math.hypot(z.re.hi, z.im.hi);
  // Re sqrt(z)^2 = (|z| + Re z) / 2
  const steps = Math.ceil((DROP * DROP) / (modulus + z.re.hi)) + LEAST_STEPS;
  if (!(steps <= MAX_STEPS)) throw noConvergence('besselK_temme', 0, z, MAX_STEPS);
  let above: DdComplex = DC_ZERO;
  let u: DdComplex = DC_ONE;
  let sum: DdComplex = DC_ZERO;
  for (let n = steps; n >= 1; n--) {
    sum = dcAdd(sum, u);
    const bracket = dcSubtract(dcMultiply(dcTimes(dcAdd(z, dc(n, 0)), 2), u), dcTimes(above, n + 1));
    above = u;
    u = dcOver(dcTimes(bracket, n), (n - 0.5) ** 2);
    if (dcSize(u) > RESCALE) {
      u = dcTimes(u, 1 / RESCALE);
      above = dcTimes(above, 1 / RESCALE);
      sum = dcTimes(sum, 1 / RESCALE);
    }
  }
  const root = dcSqrt(dcDivide(dcScale(dc(0.5, 0), DD_PI), z));
  const zero = scaled(dcMultiply(root, dcDivide(u, dcAdd(sum, u))));
  const ratio = dcDivide(dcSubtract(dcAdd(z, dc(0.5, 0)), dcDivide(above, u)), z);
  return { zero, one: scaledMultiply(zero, scaled(ratio)) };
}
