/** A complex number value * 2^exponent of any size: the orders of I_n and K_n span far more than the range of a double. */
import { Complex } from 'complex.js';
import {
  DC_ZERO,
  type DdComplex,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcShift,
  dcSize,
  exponentOf,
} from './complex.ts';

export interface Scaled {
  /** [1] of size near 1, or zero */
  readonly value: DdComplex;
  /** [1] integer */
  readonly exponent: number;
}

/** value 2^exponent with the value brought near 1 */
export function scaled(value: DdComplex, exponent = 0): Scaled {
  if (dcSize(value) === 0) return { value: DC_ZERO, exponent: 0 };
  const k = exponentOf(value);
  return { value: dcShift(value, -k), exponent: exponent + k };
}

export function scaledMultiply(a: Scaled, b: Scaled): Scaled {
  return scaled(dcMultiply(a.value, b.value), a.exponent + b.exponent);
}

export function scaledDivide(a: Scaled, b: Scaled): Scaled {
  return scaled(dcDivide(a.value, b.value), a.exponent - b.exponent);
}

/** A part so much smaller than the other that no digit of it is left after the sum: 2^-400. */
const LOST = 400;

export function scaledAdd(a: Scaled, b: Scaled): Scaled {
  const shift = b.exponent - a.exponent;
  if (dcSize(b.value) === 0 || (shift < -LOST && dcSize(a.value) !== 0)) return a;
  if (dcSize(a.value) === 0 || shift > LOST) return b;
  return scaled(dcAdd(a.value, dcShift(b.value, shift)), a.exponent);
}

/** a^n, n >= 0 an integer, by repeated squaring */
export function scaledPower(a: Scaled, n: number): Scaled {
  let result: Scaled = { value: { re: { hi: 1, lo: 0 }, im: { hi: 0, lo: 0 } }, exponent: 0 };
  let square = a;
  for (let k = n; k > 0; k = Math.floor(k / 2)) {
    if (k % 2 === 1) result = scaledMultiply(result, square);
    square = scaledMultiply(square, square);
  }
  return result;
}

/** x 2^k, rounded once unless subnormal; overflows to Infinity and underflows to 0. */
function ldexp(x: number, k: number): number {
  if (x === 0) return x;
  const clipped = Math.max(-4000, Math.min(4000, k));
  const half = Math.trunc(clipped / 4);
  return x * 2 ** half * 2 ** half * 2 ** half * 2 ** (clipped - 3 * half);
}

/** As a plain number; the exponent must lie within 1000 of zero, beyond it is 0 or Infinity. */
export function scaledToDd(a: Scaled): DdComplex {
  return dcShift(a.value, a.exponent);
}

/** Rounded to double: Infinity above 1.8e308, 0 below 4.9e-324. */
export function scaledToComplex(a: Scaled): Complex {
  return new Complex(ldexp(a.value.re.hi, a.exponent), ldexp(a.value.im.hi, a.exponent));
}
