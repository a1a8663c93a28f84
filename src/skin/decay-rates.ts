/**
 * How the currents that swirl in a solid wire die away by themselves, without net current: the poles of its internal
 * impedance Z = R_dc q I_0(q) / (2 I_1(q)), q^2 = s T, at s = -p_k, p_k = j_{1,k}^2 / T, j_{1,k} the zeros of J_1.
 */
import { Problem } from '../problem.ts';
import { besselJ1Zeros } from './bessel/j.ts';
import { type RoundWire, squaredArgument } from './round-wire.ts';

/**
 * [1/s] the slowest rates p_1 < p_2 < ..
 * @param count [1] how many, whole, 0 .. 100000
 * @throws Problem DOMAIN as `squaredArgument`, for a wrong count, and for a perfect conductor, which has none
 */
export function solidDecayRates(wire: RoundWire, count: number): Float64Array {
  const perRadian = squaredArgument(wire, 1);
  if (perRadian === Infinity) {
    throw new Problem(
      'DOMAIN',
      'decay rates of a perfect conductor; it has none, give a finite conductivity',
    );
  }
  return besselJ1Zeros(count).map((zero) => (zero * zero) / perRadian);
}
