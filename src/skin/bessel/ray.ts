/** Points of the ray of 45 degrees with 31 digits, both parts the same to the last bit: powers lie exactly on axes and diagonals. */
import { DD_SQRT_HALF, type Dd, type DdComplex, dcSqrt, dd, ddTimes } from '../dd/index.ts';

const diagonal = (part: Dd): DdComplex => ({ re: part, im: part });

/** x e^(pi j/4) */
export function onRay(x: number): DdComplex {
  return diagonal(ddTimes(DD_SQRT_HALF, x));
}

/** sqrt(jT) */
export function onRayOfSquare(t: number): DdComplex {
  return diagonal(dcSqrt({ re: dd(t / 2), im: dd(0) }).re);
}
