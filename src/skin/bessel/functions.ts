/**
 * The modified Bessel functions for the user: I_n(z), K_n(z), scaled forms and ratios, whole orders 0 .. 10000, Re z >= 0,
 * |z| up to 1e9. Real and imaginary part are each accurate to about 1e-15 relative, beside a zero of a part too: inside
 * all is double-double (31 digits), and the result is rounded once. What 31 digits may not hold is a part smaller than
 * 1e-15 of the other. For z on an axis the part that vanishes is exactly 0.
 *
 * Size: a part above 1.8e308 is a Problem DOMAIN; one below 4.9e-324 is 0, as everywhere in floating point, and
 * subnormal results have fewer digits. The scaled forms go further; the `Binary` forms reach any order and point.
 *
 * Two forms are scaled: e^-z I_n(z) and e^z K_n(z), with the full complex exponential (not its modulus), so that both
 * vary slowly and Wronskian and recurrence hold as they stand: I_n K_{n+1} + I_{n+1} K_n = 1/z.
 */
import { Complex } from 'complex.js';
import { Problem } from '../../problem.ts';
import {
  DC_ZERO,
  DD_PI,
  type DdComplex,
  dcExp,
  dcNegate,
  dcSize,
  dd,
  ddTimes,
  type Scaled,
  scaled,
  scaledDivide,
  scaledMultiply,
  scaledToComplex,
} from '../dd/index.ts';
import { type ComplexPoint, checkedArgument } from './argument.ts';
import { scaledBesselI } from './i.ts';
import { scaledBesselRatio } from './i-ratio.ts';
import { scaledBesselK } from './k.ts';

/** A number of any size: value * 2^exponent. */
export interface BinaryComplex {
  /** [1] of size near 1, or zero */
  readonly value: Complex;
  /** [1] whole */
  readonly exponent: number;
}

/** I_n(z) = I_n(-z) (-1)^n, real on the real axis, i^n times real on the imaginary one: rounding there is removed. */
function onAxis(n: number, z: ComplexPoint, result: Scaled): Scaled {
  const { re, im } = result.value;
  const zero = { hi: 0, lo: 0 };
  if (z.im === 0) return { value: { re, im: zero }, exponent: result.exponent };
  if (z.re !== 0) return result;
  const value = n % 2 === 0 ? { re, im: zero } : { re: zero, im };
  return { value, exponent: result.exponent };
}

function checkedI(name: string, n: number, z: ComplexPoint): Scaled {
  const scaledForm = scaledBesselI(n, checkedArgument(name, n, z));
  // e^-z is real on the real axis only
  return z.im === 0 ? onAxis(n, z, scaledForm) : scaledForm;
}

function checkedK(name: string, n: number, z: ComplexPoint): Scaled {
  const point = checkedArgument(name, n, z);
  if (dcSize(point) === 0) {
    throw new Problem('DOMAIN', `${name}: K_${n} has a pole at 0; give an argument other than 0`);
  }
  const scaledForm = scaledBesselK(n, point);
  return z.im === 0 ? onAxis(n, z, scaledForm) : scaledForm;
}

function finite(name: string, n: number, z: ComplexPoint, result: Scaled): Complex {
  const value = scaledToComplex(result);
  if (Number.isFinite(value.re) && Number.isFinite(value.im)) return value;
  throw new Problem(
    'DOMAIN',
    `${name}: order ${n} at ${z.re} + j ${z.im} is near 2^${result.exponent}, above the range of a double; ` +
      'use the scaled form, the one with a binary exponent, or a ratio',
  );
}

function binary(result: Scaled): BinaryComplex {
  return { value: scaledToComplex({ value: result.value, exponent: 0 }), exponent: result.exponent };
}

const exponential = (z: ComplexPoint, sign: 1 | -1): Scaled => {
  const point: DdComplex = { re: { hi: z.re, lo: 0 }, im: { hi: z.im, lo: 0 } };
  return dcExp(sign > 0 ? point : dcNegate(point));
};

/**
 * I_n(z).
 * @param n [1] order, whole
 * @param z [1] Re z >= 0
 * @throws Problem DOMAIN for a wrong order or point, or above 1.8e308 (near Re z = 713)
 */
export function besselI(n: number, z: ComplexPoint): Complex {
  const form = checkedI('besselI', n, z);
  return finite('besselI', n, z, onAxis(n, z, scaledMultiply(form, exponential(z, 1))));
}

/** e^-z I_n(z). Parameters and errors as `besselI`; never overflows. */
export function besselIScaled(n: number, z: ComplexPoint): Complex {
  return finite('besselIScaled', n, z, checkedI('besselIScaled', n, z));
}

/** e^-z I_n(z) with a binary exponent, of any size. Parameters and errors as `besselI`. */
export function besselIBinary(n: number, z: ComplexPoint): BinaryComplex {
  return binary(checkedI('besselIBinary', n, z));
}

/** I_{n+1}(z) / I_n(z). Parameters and errors as `besselI`; on the imaginary axis poles at the zeros of J_n. */
export function besselIRatio(n: number, z: ComplexPoint): Complex {
  const point = checkedArgument('besselIRatio', n, z);
  if (dcSize(point) === 0) return scaledToComplex(scaled(DC_ZERO));
  const ratio = scaledDivide(scaledBesselRatio(n, point), scaled(point));
  return finite('besselIRatio', n, z, onAxis(1, z, ratio));
}

/**
 * K_n(z).
 * @param n [1] order, whole
 * @param z [1] Re z >= 0, z != 0
 * @throws Problem DOMAIN for a wrong order or point, the pole at 0, or above 1.8e308 (high order near 0)
 */
export function besselK(n: number, z: ComplexPoint): Complex {
  const form = scaledMultiply(checkedK('besselK', n, z), exponential(z, -1));
  const value = finite('besselK', n, z, form);
  if (z.re !== 0) return value;
  const exact = regularPart(n, z);
  return n % 2 === 0 ? new Complex(value.re, exact.im) : new Complex(exact.re, value.im);
}

/**
 * K_n(iy) = -(pi/2) i^-n (Y_n(y) + i J_n(y)) for y > 0 (DLMF 10.27.8); J_n may be smaller than Y_n by more than 31 digits,
 * so its part is taken from i^-n J_n(y) = (-1)^n I_n(iy); below the axis the conjugate.
 */
function regularPart(n: number, z: ComplexPoint): Complex {
  const i = scaledMultiply(checkedI('besselK', n, z), exponential(z, 1));
  const factor = ddTimes(DD_PI, (z.im < 0 ? 0.5 : -0.5) * (n % 2 === 0 ? 1 : -1));
  return scaledToComplex(scaledMultiply(i, scaled({ re: dd(0), im: factor })));
}

/** e^z K_n(z). Parameters and errors as `besselK`. */
export function besselKScaled(n: number, z: ComplexPoint): Complex {
  return finite('besselKScaled', n, z, checkedK('besselKScaled', n, z));
}

/** e^z K_n(z) with a binary exponent, of any size. Parameters and errors as `besselK` but for the overflow. */
export function besselKBinary(n: number, z: ComplexPoint): BinaryComplex {
  return binary(checkedK('besselKBinary', n, z));
}

/** K_{n+1}(z) / K_n(z). Parameters and errors as `besselK`. */
export function besselKRatio(n: number, z: ComplexPoint): Complex {
  const above = checkedK('besselKRatio', n + 1, z);
  return finite('besselKRatio', n, z, scaledDivide(above, checkedK('besselKRatio', n, z)));
}
