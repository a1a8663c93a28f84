/**
 * r_n = q I_{n+1}(q) / I_n(q) on the ray that a good conductor lives on, q^2 = jT with T >= 0 real (arg q = 45
 * degrees). Both parts of r_n are positive there (Mittag-Leffler: r_n = sum 2 q^2 / (q^2 + j_{n,k}^2)), and so are all
 * sums of the recurrence: each part keeps its own relative accuracy, however small.
 *
 * Key: n order, t = T, re + j im = r_n. Plain double, the hot path.
 */
import { uniformRatioStart } from './cutoffs.ts';
import { uniformRatioCoefficients } from './ratio-coefficients.ts';

/** [1] terms of the uniform expansion; 16 is where it is good from |w| = 44 on (see cutoffs.ts). */
const TERMS = 16;

const COEFFICIENTS = uniformRatioCoefficients(TERMS);

/** [1] a term this much smaller than the sum ends it: below half a unit in the last place of either part. */
const NEGLIGIBLE = 1e-20;

/**
 * r_n by the uniform expansion for large |nu^2 + q^2| (DLMF 10.41, Olver 1954), nu = n, written so that nothing cancels
 * for small q:   r = q^2 [ 1/(w + nu) + sum_m b_m(nu^2/w^2) w^(-m-1) ],  w^2 = nu^2 + jT.
 * Fails for small order and small |q| together: see `uniformRatioStart`.
 * @param out receives [re, im] at 0, 1
 */
export function rayRatio_uniform(n: number, t: number, out: Float64Array): void {
  // w = sqrt(n^2 + jt), real part first: no cancellation as n^2 >= 0
  const wRe = Math.sqrt((n * n + Math.hypot(n * n, t)) / 2);
  const wIm = t / (2 * wRe);
  const norm = Math.hypot(wRe, wIm);
  const vRe = wRe / norm / norm;
  const vIm = -wIm / norm / norm;
  // P = (n / w)^2
  const nv = n * vRe;
  const nw = n * vIm;
  const pRe = nv * nv - nw * nw;
  const pIm = 2 * nv * nw;
  const sumNorm = (wRe + n) ** 2 + wIm * wIm;
  let re = (wRe + n) / sumNorm;
  let im = -wIm / sumNorm;
  let powRe = vRe;
  let powIm = vIm;
  for (let m = 0; m < TERMS; m++) {
    const next = powRe * vRe - powIm * vIm;
    powIm = powRe * vIm + powIm * vRe;
    powRe = next;
    const b = COEFFICIENTS[m]!;
    let bRe = b[m]!;
    let bIm = 0;
    for (let k = m - 1; k >= 0; k--) {
      const hRe = bRe * pRe - bIm * pIm + b[k]!;
      bIm = bRe * pIm + bIm * pRe;
      bRe = hRe;
    }
    const termRe = bRe * powRe - bIm * powIm;
    const termIm = bRe * powIm + bIm * powRe;
    re += termRe;
    im += termIm;
    if (Math.abs(termRe) < NEGLIGIBLE * re && Math.abs(termIm) < NEGLIGIBLE * -im) break;
  }
  out[0] = -t * im;
  out[1] = t * re;
}

/**
 * Carries r from order `from` down to order `to`: r_{n-1} = q^2 / (2n + r_n). Stable downwards at any q (an error of
 * r_n is multiplied by -(I_n / I_{n-1})^2, not above 1 in modulus).
 * @param r [re, im] of r_from on entry, of r_to on return
 */
export function rayRatio_backward(from: number, to: number, t: number, r: Float64Array): void {
  let re = r[0]!;
  let im = r[1]!;
  for (let n = from; n > to; n--) {
    const d = 2 * n + re;
    const f = t / (d * d + im * im);
    re = f * im;
    im = f * d;
  }
  r[0] = re;
  r[1] = im;
}

/**
 * r_n for one order n >= 0 and any T >= 0.
 * @param out receives [re, im] at 0, 1
 */
export function rayRatio(n: number, t: number, out: Float64Array): void {
  const start = uniformRatioStart(n, t);
  rayRatio_uniform(start, t, out);
  rayRatio_backward(start, n, t, out);
}
