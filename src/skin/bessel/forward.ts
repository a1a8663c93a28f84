/**
 * Forward recurrences from the orders 0 and 1. For K_n it is stable at any z (K grows fastest); for I_n an error grows
 * by `forwardAmplification`, small for n up to |z| near the imaginary axis and up to about sqrt(|z|) elsewhere.
 */
import {
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcSize,
  dcSubtract,
  dcTimes,
  type Scaled,
  scaled,
} from '../dd/index.ts';

/** Numbers above 2^400 are brought back, long before they overflow. */
const RESCALE = 400;

/** y_{k+1} = y_{k-1} + sign (2k/z) y_k, up to order n */
function forward(n: number, z: DdComplex, zero: Scaled, one: Scaled, sign: 1 | -1): Scaled {
  if (n === 0) return zero;
  const factor = dcDivide(dc(2, 0), z);
  // both in units of 2^exponent
  let exponent = one.exponent;
  let below = dcTimes(zero.value, 2 ** (zero.exponent - exponent));
  let y = one.value;
  for (let k = 1; k < n; k++) {
    const step = dcTimes(dcMultiply(factor, y), k);
    const next = sign > 0 ? dcAdd(below, step) : dcSubtract(below, step);
    below = y;
    y = next;
    if (dcSize(y) > 2 ** RESCALE) {
      y = dcTimes(y, 2 ** -RESCALE);
      below = dcTimes(below, 2 ** -RESCALE);
      exponent += RESCALE;
    }
  }
  return scaled(y, exponent);
}

/** I_n from I_0 and I_1, or e^-z I_n from e^-z I_0 and e^-z I_1: I_{k+1} = I_{k-1} - (2k/z) I_k (DLMF 10.29.1). */
export function besselI_forward(n: number, z: DdComplex, zero: Scaled, one: Scaled): Scaled {
  return forward(n, z, zero, one, -1);
}

/** K_n from K_0 and K_1, or with e^z on all: K_{k+1} = K_{k-1} + (2k/z) K_k (DLMF 10.29.1). */
export function besselK_forward(n: number, z: DdComplex, zero: Scaled, one: Scaled): Scaled {
  return forward(n, z, zero, one, 1);
}
