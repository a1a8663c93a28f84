/** The argument of the Bessel functions: order and point, checked once at the door. */
import { Problem } from '../../problem.ts';
import { type DdComplex, dc } from '../dd/index.ts';

/** A point that the functions take: a complex.js object, or any {re, im}. */
export interface ComplexPoint {
  /** [1] >= 0 */
  readonly re: number;
  /** [1] */
  readonly im: number;
}

/** [1] highest order: the work grows with it, and nothing physical asks for more. */
export const MAX_ORDER = 10_000;

/** [1] largest |z|: the reduction of e^z keeps all digits up to here (../dd/elementary.ts). */
export const MAX_MODULUS = 1e9;

/** [1] smallest |z| above 0: below, (z/2)^2 loses digits to underflow. */
export const MIN_MODULUS = 1e-140;

/**
 * The point in double-double form.
 * @throws Problem DOMAIN for an order that is not a whole number in 0 .. MAX_ORDER, or a point outside the right
 *   half plane or the limits of |z|
 */
export function checkedArgument(name: string, n: number, z: ComplexPoint): DdComplex {
  if (!(Number.isInteger(n) && n >= 0 && n <= MAX_ORDER)) {
    throw new Problem('DOMAIN', `${name}: order ${n}; it must be a whole number from 0 to ${MAX_ORDER}`);
  }
  const modulus = Math.hypot(z.re, z.im);
  const inside = modulus === 0 || (modulus >= MIN_MODULUS && modulus <= MAX_MODULUS);
  if (!(z.re >= 0 && inside)) {
    throw new Problem(
      'DOMAIN',
      `${name}: argument ${z.re} + j ${z.im}; its real part must not be below zero, and its modulus be 0 or from ` +
        `${MIN_MODULUS} to ${MAX_MODULUS}`,
    );
  }
  return dc(z.re, z.im);
}
