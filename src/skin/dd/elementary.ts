/**
 * exp, sine and cosine, logarithm and square root of double-double argument, to about 31 digits.
 * exp and trigonometric: reduction by ln 2 and pi/2 (constants in three and four doubles, so that arguments to 1e9
 * lose nothing), then the Taylor series. Logarithm and root: one Newton step from the double value, which doubles its
 * 16 digits.
 */
import { Problem } from '../../problem.ts';
import {
  DC_ONE,
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcNegate,
  dcOver,
  dcSubtract,
  dcTimes,
} from './complex.ts';
import {
  DD_ONE,
  type Dd,
  dd,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddNegate,
  ddSubtract,
  twoProduct,
} from './real.ts';
import { type Scaled, scaled } from './scaled.ts';

// digits of the constants: scripts/reference-bessel.py prints them (mpmath, 90 digits)
export const DD_PI: Dd = { hi: Math.PI, lo: 1.2246467991473532e-16 };
export const DD_EULER_GAMMA: Dd = { hi: 0.5772156649015329, lo: -4.942915152430645e-18 };
export const DD_SQRT_HALF: Dd = { hi: Math.SQRT1_2, lo: -4.833646656726457e-17 };
const LN2 = [Math.LN2, 2.3190468138462996e-17, 5.707708438416212e-34];
const HALF_PI = [1.5707963267948966, 6.123233995736766e-17, -1.4973849048591698e-33, 5.562271104316826e-50];

/** Terms of a Taylor series: 0.8^n / n! < 1e-34 from n = 29 on. */
const TAYLOR_TERMS = 30;

/** [1] largest argument of the reduction: its multiple of pi/2 must stay an exact integer with digits to spare. */
const REDUCTION_LIMIT = 1e10;

/** x - k (c_0 + c_1 + ..), the products exact */
function reduce(x: Dd, k: number, constant: readonly number[]): Dd {
  let rest = x;
  for (const part of constant) rest = ddSubtract(rest, twoProduct(k, part));
  return rest;
}

function multipleOf(x: Dd, unit: number): number {
  if (Math.abs(x.hi) <= REDUCTION_LIMIT) return Math.round(x.hi / unit);
  throw new Problem(
    'DOMAIN',
    `argument ${x.hi} of an exponential or sine; its modulus may be ${REDUCTION_LIMIT} at most`,
  );
}

/** e^x = value 2^exponent */
function ddExp(x: Dd): { value: Dd; exponent: number } {
  const exponent = multipleOf(x, LN2[0]!);
  const r = reduce(x, exponent, LN2);
  let sum = DD_ONE;
  for (let n = TAYLOR_TERMS; n >= 1; n--) sum = ddAdd(DD_ONE, ddDivide(ddMultiply(sum, r), dd(n)));
  return { value: sum, exponent };
}

/** [cos x, sin x] */
function ddCosSin(x: Dd): [Dd, Dd] {
  const k = multipleOf(x, HALF_PI[0]!);
  const r = reduce(x, k, HALF_PI);
  const minusSquare = ddNegate(ddMultiply(r, r));
  let cosine = DD_ONE;
  let sine = DD_ONE;
  for (let n = TAYLOR_TERMS; n >= 2; n -= 2) {
    cosine = ddAdd(DD_ONE, ddDivide(ddMultiply(cosine, minusSquare), dd(n * (n - 1))));
    sine = ddAdd(DD_ONE, ddDivide(ddMultiply(sine, minusSquare), dd(n * (n + 1))));
  }
  sine = ddMultiply(sine, r);
  const quarter = ((k % 4) + 4) % 4;
  if (quarter === 0) return [cosine, sine];
  if (quarter === 1) return [ddNegate(sine), cosine];
  if (quarter === 2) return [ddNegate(cosine), ddNegate(sine)];
  return [sine, ddNegate(cosine)];
}

/**
 * e^z with its exponent apart.
 * @throws Problem DOMAIN where a part of z is above 1e10
 */
export function dcExp(z: DdComplex): Scaled {
  const { value, exponent } = ddExp(z.re);
  const [cosine, sine] = ddCosSin(z.im);
  return scaled({ re: ddMultiply(value, cosine), im: ddMultiply(value, sine) }, exponent);
}

/** Principal logarithm of z != 0: w = w0 + d - d^2/2, d = z e^-w0 - 1. */
export function dcLog(z: DdComplex): DdComplex {
  const start = dc(Math.log(Math.hypot(z.re.hi, z.im.hi)), Math.atan2(z.im.hi, z.re.hi));
  const { value, exponent } = dcExp(dcNegate(start));
  const factor = 2 ** Math.trunc(exponent / 2);
  const ratio = dcTimes(dcTimes(dcMultiply(z, value), factor), 2 ** (exponent - Math.trunc(exponent / 2)));
  const d = dcSubtract(ratio, DC_ONE);
  return dcAdd(start, dcSubtract(d, dcOver(dcMultiply(d, d), 2)));
}

/** Principal root: s = s0 + (z - s0^2) / (2 s0). */
export function dcSqrt(z: DdComplex): DdComplex {
  const x = z.re.hi;
  const y = z.im.hi;
  if (x === 0 && y === 0) return z;
  const root = Math.sqrt((Math.hypot(x, y) + Math.abs(x)) / 2);
  const other = Math.abs(y) / (2 * root);
  const sign = y < 0 ? -1 : 1;
  const start = x >= 0 ? dc(root, sign * other) : dc(other, sign * root);
  return dcAdd(start, dcDivide(dcSubtract(z, dcMultiply(start, start)), dcTimes(start, 2)));
}
