/**
 * What the orders left out would still add to the impedance, seen from the orders kept.
 *
 * The functional I^T Z I is stationary, so adding order n to body i changes it by -G_n r_+n r_-n summed over both
 * signs, r the incoming field; in a converged solution that is t_n = 2 y_+n y_-n. The t_n fall at least like
 * exp(-2 alpha n) (pair.ts). The tail is the largest of the last orders, carried to the cut with that rate and
 * summed: an upper estimate where the skin depth makes them fall faster. The window spans the
 * orders that a symmetric surrounding may leave empty.
 */
import type { ComplexVector } from '../complex/index.ts';
import { tailFactor } from './orders.ts';
import type { ActiveModes } from './product.ts';

/** Tails of each body for one loop, in units of mu0/(4 pi). */
export interface TruncationTail {
  /** [1] of Re: the inductance */
  readonly re: Float64Array;
  /** [1] of Im: the resistance over omega mu0/(4 pi) */
  readonly im: Float64Array;
}

/** Orders looked back: a ring of twelve neighbours leaves eleven of twelve empty. */
const WINDOW = 14;

export function truncationTail(
  scaled: ComplexVector,
  active: ActiveModes,
  alpha: Float64Array,
): TruncationTail {
  const bodies = active.orders.length;
  const modes = active.offsets[bodies];
  const re = new Float64Array(bodies);
  const im = new Float64Array(bodies);
  for (let b = 0; b < bodies; b++) {
    if (alpha[b] === Number.POSITIVE_INFINITY) continue;
    const p = active.orders[b];
    const decay = Math.exp(-2 * alpha[b]);
    let carry = 1;
    let worstRe = 0;
    let worstIm = 0;
    for (let n = p; n >= 1 && n > p - WINDOW; n--) {
      const k = active.offsets[b] + n - 1;
      const l = k + modes;
      const tRe = 2 * (scaled.re[k] * scaled.re[l] - scaled.im[k] * scaled.im[l]);
      const tIm = 2 * (scaled.re[k] * scaled.im[l] + scaled.im[k] * scaled.re[l]);
      worstRe = Math.max(worstRe, Math.abs(tRe) * carry);
      worstIm = Math.max(worstIm, Math.abs(tIm) * carry);
      carry *= decay;
    }
    const factor = tailFactor(alpha[b], p);
    re[b] = worstRe * factor;
    im[b] = worstIm * factor;
  }
  return { re, im };
}
