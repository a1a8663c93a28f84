/**
 * e^-z I_n(z) by the backward recurrence I_{k-1} = I_{k+1} + (2k/z) I_k from a start far above (Miller 1952; Gautschi
 * 1967), made absolute by e^z = I_0 + 2 (I_1 + I_2 + ..)  (DLMF 10.35.5), a sum that does not cancel for Re z >= 0.
 * Good at any z; the depth grows like |z| near the imaginary axis and like sqrt(|z|) elsewhere (`backwardStart`).
 */
import {
  DC_ONE,
  DC_ZERO,
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcSize,
  dcTimes,
  type Scaled,
  scaled,
  scaledDivide,
} from '../dd/index.ts';
import { backwardStart } from './growth.ts';

/** Numbers above 2^400 are brought back, long before they overflow. */
const RESCALE = 400;

export function besselI_miller(n: number, z: DdComplex): Scaled {
  const twoOverZ = dcDivide(dc(2, 0), z);
  const start = backwardStart(n, { re: z.re.hi, im: z.im.hi });
  let above: DdComplex = DC_ZERO;
  let f: DdComplex = DC_ONE;
  // sum of the orders above the current one
  let sum: DdComplex = DC_ZERO;
  let rescaled = 0;
  let wanted: Scaled = { value: DC_ZERO, exponent: 0 };
  for (let k = start; ; k--) {
    if (k === n) wanted = scaled(f, rescaled);
    if (k === 0) break;
    sum = dcAdd(sum, f);
    const below = dcAdd(above, dcTimes(dcMultiply(twoOverZ, f), k));
    above = f;
    f = below;
    if (dcSize(f) > 2 ** RESCALE) {
      f = dcTimes(f, 2 ** -RESCALE);
      above = dcTimes(above, 2 ** -RESCALE);
      sum = dcTimes(sum, 2 ** -RESCALE);
      rescaled += RESCALE;
    }
  }
  return scaledDivide(wanted, scaled(dcAdd(f, dcTimes(sum, 2)), rescaled));
}
