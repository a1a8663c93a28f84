/**
 * Double-double numbers: an unevaluated sum hi + lo of two doubles with |lo| <= ulp(hi)/2, about 32 digits.
 * Exact sum: Knuth 1969 (two-sum); exact product: Dekker 1971 with Veltkamp's split; arithmetic: Dekker 1971 and
 * Hida, Li, Bailey 2001 (the "accurate" sum). Relative error of one operation below 2^-102.
 * Fails where an intermediate leaves 1e-290 .. 1e+300: callers keep their numbers near 1 and carry exponents apart
 * (scaled.ts). Not the hot path: plain immutable objects.
 */

export interface Dd {
  /** [1] leading part, the value rounded to double */
  readonly hi: number;
  /** [1] what is left */
  readonly lo: number;
}

export const DD_ZERO: Dd = { hi: 0, lo: 0 };
export const DD_ONE: Dd = { hi: 1, lo: 0 };

/** 2^27 + 1: splits a double into two halves of 26 bits. */
const SPLITTER = 134217729;

export function dd(value: number): Dd {
  return { hi: value, lo: 0 };
}

/** hi + lo for |a| >= |b| */
function quickTwoSum(a: number, b: number): Dd {
  const hi = a + b;
  return { hi, lo: b - (hi - a) };
}

/** a + b exactly */
export function twoSum(a: number, b: number): Dd {
  const hi = a + b;
  const shift = hi - a;
  return { hi, lo: a - (hi - shift) + (b - shift) };
}

/** The rounding error of the product p = a b. */
function productError(a: number, b: number, p: number): number {
  const ca = SPLITTER * a;
  const ah = ca - (ca - a);
  const al = a - ah;
  const cb = SPLITTER * b;
  const bh = cb - (cb - b);
  const bl = b - bh;
  return al * bl - (p - ah * bh - al * bh - ah * bl);
}

/** a b exactly */
export function twoProduct(a: number, b: number): Dd {
  const hi = a * b;
  return { hi, lo: productError(a, b, hi) };
}

export function ddAdd(a: Dd, b: Dd): Dd {
  const s = twoSum(a.hi, b.hi);
  const t = twoSum(a.lo, b.lo);
  const u = quickTwoSum(s.hi, s.lo + t.hi);
  return quickTwoSum(u.hi, u.lo + t.lo);
}

export function ddNegate(a: Dd): Dd {
  return { hi: -a.hi, lo: -a.lo };
}

export function ddSubtract(a: Dd, b: Dd): Dd {
  return ddAdd(a, ddNegate(b));
}

export function ddMultiply(a: Dd, b: Dd): Dd {
  const hi = a.hi * b.hi;
  return quickTwoSum(hi, productError(a.hi, b.hi, hi) + (a.hi * b.lo + a.lo * b.hi));
}

/** a times a double */
export function ddTimes(a: Dd, factor: number): Dd {
  const hi = a.hi * factor;
  return quickTwoSum(hi, productError(a.hi, factor, hi) + a.lo * factor);
}

/** Long division, three digits of 53 bits. */
export function ddDivide(a: Dd, b: Dd): Dd {
  const q1 = a.hi / b.hi;
  let rest = ddSubtract(a, ddTimes(b, q1));
  const q2 = rest.hi / b.hi;
  rest = ddSubtract(rest, ddTimes(b, q2));
  const q3 = rest.hi / b.hi;
  return ddAdd(quickTwoSum(q1, q2), dd(q3));
}

/** a times 2^k exactly, |k| <= 1000 */
export function ddShift(a: Dd, k: number): Dd {
  const factor = 2 ** k;
  return { hi: a.hi * factor, lo: a.lo * factor };
}
