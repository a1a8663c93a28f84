/**
 * Z_int / R_dc = 1 + r_1/2 of a solid wire as a function of T alone (q^2 = jT, x = |q| = sqrt(T)), by pieces for many
 * points at once. Poles of the function lie at x^2 = +-j j_{1,k}^2 only, so no nearer to x than x/sqrt(2) (and 2.7):
 *
 * - T < 4: 1 + T^2 P(T^2) + j T Q(T^2), P and Q polynomials: both parts keep their relative accuracy at any small T;
 * - x in 2 .. 64: one polynomial in x a part on each of 68 intervals, of width 1/2 below 8 and 1 above (rho > 21);
 * - x > 64: x e^(j pi/4)/2 + 1/4 + asymptotic series in 1/x (Russell 1909), its coefficients from Riccati's equation.
 *
 * The polynomials interpolate `rayRatio` and are made on the first use, within a millisecond or two.
 */
import { chebyshevPolynomial } from './bessel/chebyshev.ts';
import { rayRatio } from './bessel/ray-ratios.ts';

/** [1] T below which the even polynomials serve */
const SMALL = 4;
const SMALL_DEGREE = 10;

/** Intervals: x to y = 2x below 8 and x + 8 above, from y = 4 on, each of width 1 in y. */
const BEND = 8;
const FIRST = 4;
const LARGE = 64;
const INTERVALS = LARGE + BEND - FIRST;
const DEGREE = 11;

/** [1] terms in 1/x; the next is below 1e-17 of the sum at x = 64 */
const FAR_TERMS = 10;

export interface ImpedancePieces {
  /** (SMALL_DEGREE + 1) pairs of P, Q */
  readonly small: Float64Array;
  /** INTERVALS x (DEGREE + 1) pairs of real, imaginary part */
  readonly middle: Float64Array;
  /** FAR_TERMS pairs, of 1/x, 1/x^2, .. */
  readonly far: Float64Array;
}

let pieces: ImpedancePieces | undefined;

const ratio = new Float64Array(2);

/** r_1 / 2, one part */
function halfRatio(t: number, part: 0 | 1): number {
  rayRatio(1, t, ratio);
  return ratio[part]! / 2;
}

function interleave(target: Float64Array, offset: number, even: Float64Array, odd: Float64Array): void {
  for (let k = 0; k < even.length; k++) {
    target[offset + 2 * k] = even[k]!;
    target[offset + 2 * k + 1] = odd[k]!;
  }
}

function makePieces(): ImpedancePieces {
  const small = new Float64Array(2 * (SMALL_DEGREE + 1));
  const p = (u: number) => halfRatio(Math.sqrt(u), 0) / u;
  const q = (u: number) => halfRatio(Math.sqrt(u), 1) / Math.sqrt(u);
  const top = SMALL * SMALL;
  interleave(
    small,
    0,
    chebyshevPolynomial(p, 0, top, SMALL_DEGREE),
    chebyshevPolynomial(q, 0, top, SMALL_DEGREE),
  );
  const middle = new Float64Array(INTERVALS * 2 * (DEGREE + 1));
  for (let i = 0; i < INTERVALS; i++) {
    const y = FIRST + i;
    const from = y < 2 * BEND ? y / 2 : y - BEND;
    const to = y < 2 * BEND ? from + 0.5 : from + 1;
    const re = chebyshevPolynomial((x) => 1 + halfRatio(x * x, 0), from, to, DEGREE);
    const im = chebyshevPolynomial((x) => halfRatio(x * x, 1), from, to, DEGREE);
    interleave(middle, i * 2 * (DEGREE + 1), re, im);
  }
  return { small, middle, far: farCoefficients() };
}

/**
 * Z/R_dc = (1 + y)/2, y = q I_1'/I_1 = q sum c_m q^-m with, from q y' + y^2 = 1 + q^2,
 * 2 c_m = [m = 2] - (2 - m) c_{m-1} - sum_{0<i<m} c_i c_{m-i},  c_0 = 1;  q^(1-m) = x^(1-m) e^(-j pi (m-1)/4).
 */
function farCoefficients(): Float64Array {
  const c = [1];
  const far = new Float64Array(2 * FAR_TERMS);
  for (let m = 1; m <= FAR_TERMS + 1; m++) {
    let twice = (m === 2 ? 1 : 0) - (2 - m) * c[m - 1]!;
    for (let i = 1; i < m; i++) twice -= c[i]! * c[m - i]!;
    c.push(twice / 2);
    if (m < 2) continue;
    const angle = (-Math.PI * (m - 1)) / 4;
    far[2 * (m - 2)] = (c[m]! / 2) * Math.cos(angle);
    far[2 * (m - 2) + 1] = (c[m]! / 2) * Math.sin(angle);
  }
  return far;
}

/**
 * Z_int/R_dc for each T.
 * @param t [1] T >= 0, finite
 * @param re receives the real part [1], length of t
 * @param im receives the imaginary part [1], length of t; may be t itself
 */
export function internalImpedanceRatios(t: Float64Array, re: Float64Array, im: Float64Array): void {
  pieces ??= makePieces();
  const { small, middle, far } = pieces;
  for (let index = 0; index < t.length; index++) {
    const square = t[index]!;
    let a = 0;
    let b = 0;
    if (square < SMALL) {
      const s = (square * square) / ((SMALL * SMALL) / 2) - 1;
      for (let k = 2 * SMALL_DEGREE; k >= 0; k -= 2) {
        a = a * s + small[k]!;
        b = b * s + small[k + 1]!;
      }
      re[index] = 1 + square * square * a;
      im[index] = square * b;
      continue;
    }
    const x = Math.sqrt(square);
    if (x < LARGE) {
      const y = x < BEND ? 2 * x : x + BEND;
      const cell = Math.floor(y);
      const s = 2 * (y - cell) - 1;
      const base = (cell - FIRST) * 2 * (DEGREE + 1);
      for (let k = base + 2 * DEGREE; k >= base; k -= 2) {
        a = a * s + middle[k]!;
        b = b * s + middle[k + 1]!;
      }
      re[index] = a;
      im[index] = b;
      continue;
    }
    const v = 1 / x;
    for (let k = 2 * (FAR_TERMS - 1); k >= 0; k -= 2) {
      a = (a + far[k]!) * v;
      b = (b + far[k + 1]!) * v;
    }
    const main = x * Math.SQRT1_2 * 0.5;
    re[index] = main + 0.25 + a;
    im[index] = main + b;
  }
}
