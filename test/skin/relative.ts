/** Distance of two numbers of 31 digits, relative to the second. */
import { DC_ONE, dcSubtract, type Scaled, scaled, scaledDivide } from '../../src/skin/dd/index.ts';

/** |a/b - 1| [1] */
export function distance(a: Scaled, b: Scaled): number {
  const quotient = scaledDivide(a, b);
  if (Math.abs(quotient.exponent) > 2) return Infinity;
  const factor = 2 ** quotient.exponent;
  const { re, im } = quotient.value;
  const difference = scaled(
    dcSubtract(
      { re: { hi: re.hi * factor, lo: re.lo * factor }, im: { hi: im.hi * factor, lo: im.lo * factor } },
      DC_ONE,
    ),
  );
  const { value, exponent } = difference;
  return Math.hypot(value.re.hi, value.im.hi) * 2 ** exponent;
}
