/**
 * Kelvin functions of order 0 and their derivatives, from I and K on the ray of 45 degrees (DLMF 10.61):
 *
 *   ber x + j bei x = J_0(x e^(3 pi j/4)) = I_0(x e^(pi j/4)),     ker x + j kei x = K_0(x e^(pi j/4)),
 *
 * the derivatives with I_0' = I_1, K_0' = -K_1 and the factor e^(pi j/4). The argument x e^(pi j/4) is taken with 31
 * digits, so each function keeps its relative accuracy, beside its zeros too.
 */
import { Problem } from '../../problem.ts';
import {
  DD_SQRT_HALF,
  type DdComplex,
  dcExp,
  dcNegate,
  type Scaled,
  scaledMultiply,
  scaledToComplex,
} from '../dd/index.ts';
import { MAX_MODULUS, MIN_MODULUS } from './argument.ts';
import { scaledBesselI } from './i.ts';
import { scaledBesselK } from './k.ts';
import { onRay } from './ray.ts';

/** The functions of the first kind, regular at 0. */
export interface KelvinFirst {
  /** [1] */
  readonly ber: number;
  /** [1] */
  readonly bei: number;
  /** [1] d ber / dx */
  readonly berPrime: number;
  /** [1] d bei / dx */
  readonly beiPrime: number;
}

/** The functions of the second kind. */
export interface KelvinSecond {
  /** [1] */
  readonly ker: number;
  /** [1] */
  readonly kei: number;
  /** [1] d ker / dx */
  readonly kerPrime: number;
  /** [1] d kei / dx */
  readonly keiPrime: number;
}

/** e^(pi j/4) */
const EIGHTH: Scaled = { value: { re: DD_SQRT_HALF, im: DD_SQRT_HALF }, exponent: 0 };
const MINUS_EIGHTH: Scaled = { value: dcNegate(EIGHTH.value), exponent: 0 };

function parts(name: string, x: number, result: Scaled): [number, number] {
  const { re, im } = scaledToComplex(result);
  // what is too small for a double is 0, without the sign of what it was
  if (Number.isFinite(re) && Number.isFinite(im)) return [re + 0, im + 0];
  throw new Problem(
    'DOMAIN',
    `${name}: x = ${x} gives a value above the range of a double; x may be about 1000`,
  );
}

/**
 * @param x [1] 0, or from 1e-140 up to about 1000
 * @throws Problem DOMAIN outside, and where a value is above 1.8e308
 */
export function kelvinFirst(x: number): KelvinFirst {
  if (x === 0) return { ber: 1, bei: 0, berPrime: 0, beiPrime: 0 };
  const z = checked('kelvinFirst', x);
  const factor = dcExp(z);
  const zero = scaledMultiply(scaledBesselI(0, z), factor);
  const one = scaledMultiply(scaledMultiply(scaledBesselI(1, z), factor), EIGHTH);
  const [ber, bei] = parts('kelvinFirst', x, zero);
  const [berPrime, beiPrime] = parts('kelvinFirst', x, one);
  return { ber, bei, berPrime, beiPrime };
}

/**
 * @param x [1] > 0, from 1e-140; values below 4.9e-324 (x above about 1050) are 0
 * @throws Problem DOMAIN outside
 */
export function kelvinSecond(x: number): KelvinSecond {
  const z = checked('kelvinSecond', x);
  const factor = dcExp(dcNegate(z));
  const zero = scaledMultiply(scaledBesselK(0, z), factor);
  const one = scaledMultiply(scaledMultiply(scaledBesselK(1, z), factor), MINUS_EIGHTH);
  const [ker, kei] = parts('kelvinSecond', x, zero);
  const [kerPrime, keiPrime] = parts('kelvinSecond', x, one);
  return { ker, kei, kerPrime, keiPrime };
}

function checked(name: string, x: number): DdComplex {
  if (x >= MIN_MODULUS && x <= MAX_MODULUS) return onRay(x);
  throw new Problem('DOMAIN', `${name}: x = ${x}; it must lie between ${MIN_MODULUS} and ${MAX_MODULUS}`);
}
