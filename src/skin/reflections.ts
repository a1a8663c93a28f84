/**
 * Reflection of the angular harmonic n of the field at a solid wire: outgoing = -G_n * incoming (A of both at the
 * surface), G_n = (Y_n - n)/(Y_n + n) with the surface response Y_n = q I_n'(q)/(mu_r I_n(q)) = (n + r_n)/mu_r:
 *
 *   G_n = (n + r_n - n mu_r) / (n + r_n + n mu_r),   and for mu_r = 1   G_n = r_n / (2n + r_n) = I_{n+1}/I_{n-1}.
 *
 * One backward recurrence serves all orders. For mu_r = 1 nothing cancels and each part keeps its relative accuracy; a
 * magnetic wire's Re G_n goes through zero near |q| = n mu_r, and there only |G_n| is accurate to rounding.
 */

import { uniformRatioStart } from './bessel/cutoffs.ts';
import { rayRatio_backward, rayRatio_uniform } from './bessel/ray-ratios.ts';
import { type RoundWire, squaredArgument } from './round-wire.ts';

const ratio = new Float64Array(2);

/**
 * G_n of the orders n = 1, 2, .., `orders`, at index n - 1. Limits: (1 - mu_r)/(1 + mu_r) at 0 Hz, 1 for a perfect
 * conductor.
 * @param omega [rad/s] >= 0
 * @param orders [1] >= 0
 * @param re receives Re G_n [1], length >= orders
 * @param im receives Im G_n [1], length >= orders
 * @throws Problem DOMAIN as `squaredArgument`
 */
export function solidReflections(
  wire: RoundWire,
  omega: number,
  orders: number,
  re: Float64Array,
  im: Float64Array,
): void {
  const t = squaredArgument(wire, omega);
  if (t === Infinity) {
    re.fill(1, 0, orders);
    im.fill(0, 0, orders);
    return;
  }
  rayReflections(t, wire.relativePermeability, orders, re, im);
}

/** As `solidReflections`, of T = |q|^2 [1] and mu_r [1] alone. */
export function rayReflections(
  t: number,
  relativePermeability: number,
  orders: number,
  re: Float64Array,
  im: Float64Array,
): void {
  if (orders < 1) return;
  const mu = relativePermeability;
  const start = uniformRatioStart(orders, t);
  rayRatio_uniform(start, t, ratio);
  rayRatio_backward(start, orders, t, ratio);
  let rRe = ratio[0]!;
  let rIm = ratio[1]!;
  for (let n = orders; n >= 1; n--) {
    const sumRe = n * (mu + 1) + rRe;
    const inverse = 1 / (sumRe * sumRe + rIm * rIm);
    const difference = rRe - n * (mu - 1);
    re[n - 1] = (difference * sumRe + rIm * rIm) * inverse;
    // r_Im times the difference of the two real parts, 2 n mu_r
    im[n - 1] = 2 * n * mu * rIm * inverse;
    const d = 2 * n + rRe;
    const f = t / (d * d + rIm * rIm);
    rRe = f * rIm;
    rIm = f * d;
  }
}
