/** Complex numbers of double-double parts; see real.ts. Each part of a product keeps its own exact zeros. */
import {
  DD_ONE,
  DD_ZERO,
  type Dd,
  dd,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddNegate,
  ddShift,
  ddSubtract,
  ddTimes,
} from './real.ts';

export interface DdComplex {
  /** [1] real part */
  readonly re: Dd;
  /** [1] imaginary part */
  readonly im: Dd;
}

export const DC_ZERO: DdComplex = { re: DD_ZERO, im: DD_ZERO };
export const DC_ONE: DdComplex = { re: DD_ONE, im: DD_ZERO };

export function dc(re: number, im: number): DdComplex {
  return { re: dd(re), im: dd(im) };
}

export function dcAdd(a: DdComplex, b: DdComplex): DdComplex {
  return { re: ddAdd(a.re, b.re), im: ddAdd(a.im, b.im) };
}

export function dcSubtract(a: DdComplex, b: DdComplex): DdComplex {
  return { re: ddSubtract(a.re, b.re), im: ddSubtract(a.im, b.im) };
}

export function dcNegate(a: DdComplex): DdComplex {
  return { re: ddNegate(a.re), im: ddNegate(a.im) };
}

export function dcConjugate(a: DdComplex): DdComplex {
  return { re: a.re, im: ddNegate(a.im) };
}

export function dcMultiply(a: DdComplex, b: DdComplex): DdComplex {
  return {
    re: ddSubtract(ddMultiply(a.re, b.re), ddMultiply(a.im, b.im)),
    im: ddAdd(ddMultiply(a.re, b.im), ddMultiply(a.im, b.re)),
  };
}

/** a times a double */
export function dcTimes(a: DdComplex, factor: number): DdComplex {
  return { re: ddTimes(a.re, factor), im: ddTimes(a.im, factor) };
}

/** a times a real */
export function dcScale(a: DdComplex, factor: Dd): DdComplex {
  return { re: ddMultiply(a.re, factor), im: ddMultiply(a.im, factor) };
}

/** j a */
export function dcTimesJ(a: DdComplex): DdComplex {
  return { re: ddNegate(a.im), im: a.re };
}

export function dcDivide(a: DdComplex, b: DdComplex): DdComplex {
  const k = -exponentOf(b);
  const c = dcShift(b, k);
  const norm = ddAdd(ddMultiply(c.re, c.re), ddMultiply(c.im, c.im));
  const product = dcMultiply(dcShift(a, k), dcConjugate(c));
  return { re: ddDivide(product.re, norm), im: ddDivide(product.im, norm) };
}

/** a divided by a double */
export function dcOver(a: DdComplex, divisor: number): DdComplex {
  const d = dd(divisor);
  return { re: ddDivide(a.re, d), im: ddDivide(a.im, d) };
}

/** a times 2^k exactly, |k| <= 1000 */
export function dcShift(a: DdComplex, k: number): DdComplex {
  return { re: ddShift(a.re, k), im: ddShift(a.im, k) };
}

/** [1] the larger modulus of the two parts, a measure of size that never overflows */
export function dcSize(a: DdComplex): number {
  return Math.max(Math.abs(a.re.hi), Math.abs(a.im.hi));
}

/** [1] k with 2^k near the size of a, within 1000 of zero; 0 for zero */
export function exponentOf(a: DdComplex): number {
  const size = dcSize(a);
  if (size === 0) return 0;
  return Math.max(-1000, Math.min(1000, Math.floor(Math.log2(size))));
}
