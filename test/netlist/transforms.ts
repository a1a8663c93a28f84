/** Two ways from an impedance to a step response in time. */
import { Complex } from 'complex.js';

/**
 * Inverse Laplace transform by the fixed Talbot method: J. Abate, P. P. Valko, Int. J. Numer. Meth. Engng
 * 60 (2004) 979-993. Good to about 0.6 M digits of working precision lost and won: M = 24 in double
 * precision gives 1e-8 here.
 * @param transform F(s), analytic off the negative real axis
 * @param t [s] > 0
 */
export function fixedTalbot(transform: (s: Complex) => Complex, t: number, M = 24): number {
  const r = (2 * M) / (5 * t);
  let sum = 0.5 * Math.exp(r * t) * transform(new Complex(r, 0)).re;
  for (let k = 1; k < M; k++) {
    const theta = (k * Math.PI) / M;
    const cot = 1 / Math.tan(theta);
    const s = new Complex(r * theta * cot, r * theta);
    const sigma = theta + (theta * cot - 1) * cot;
    sum += s.mul(t).exp().mul(transform(s)).mul(new Complex(1, sigma)).re;
  }
  return (r / M) * sum;
}

/**
 * Step response from the real part of a transfer function on the frequency axis alone (A. Papoulis 1962,
 * The Fourier Integral, chapter 9): y(t) = (2/pi) int_0^inf Re H(w) sin(w t) / w dw, exact for Re H linear
 * between the samples. What lies below the first sample counts as constant, what lies above the last as
 * zero.
 * @param omega [rad/s] ascending
 * @param real Re H there
 */
export function stepFromRealPart(omega: readonly number[], real: readonly number[], t: number): number {
  // by parts: -int Si(w t) dH, with int Si(x) dx = x Si(x) + cos x
  const integral = (x: number) => x * sineIntegral(x) + Math.cos(x);
  let sum = real[real.length - 1] * sineIntegral(omega[omega.length - 1] * t);
  for (let i = 1; i < omega.length; i++) {
    const [a, b] = [omega[i - 1] * t, omega[i] * t];
    // over a short stretch the difference of integrals would cancel
    const mean =
      b - a < 1e-3 * Math.max(1, a) ? sineIntegral((a + b) / 2) : (integral(b) - integral(a)) / (b - a);
    sum -= (real[i] - real[i - 1]) * mean;
  }
  return (2 / Math.PI) * sum;
}

/** Si(x), x >= 0: power series below 6 (DLMF 6.6.5), continued fraction of E_1(i x) above (DLMF 6.9.1). */
export function sineIntegral(x: number): number {
  if (x < 6) {
    let term = x;
    let sum = x;
    for (let k = 1; k < 60; k++) {
      term *= -(x * x) / (2 * k * (2 * k + 1));
      sum += term / (2 * k + 1);
    }
    return sum;
  }
  // E_1(z) = e^-z / (z + 1/(1 + 1/(z + 2/(1 + 2/(z + ...))))), z = i x; Si = pi/2 + Im E_1(i x)
  const z = new Complex(0, x);
  let tail = z;
  for (let n = 60; n >= 1; n--)
    tail = z.add(new Complex(n, 0).div(new Complex(1, 0).add(new Complex(n, 0).div(tail))));
  return Math.PI / 2 + new Complex(Math.cos(x), -Math.sin(x)).div(tail).im;
}
