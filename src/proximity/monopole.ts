/** The coupling of the line currents with the multipoles, both ways; the second is the transpose of the first. */
import type { ComplexVector } from '../complex/index.ts';
import type { Layout } from './layout.ts';
import type { ActiveModes } from './product.ts';

/** out += incoming amplitudes at all bodies from the currents of all bodies [A]. */
export function addMonopoleFields(
  layout: Layout,
  active: ActiveModes,
  currents: ComplexVector,
  out: ComplexVector,
): void {
  const bodies = layout.orders.length;
  const modes = active.offsets[bodies];
  const { re: cr, im: ci } = currents;
  for (let b = 0; b < bodies; b++) {
    for (let n = 0; n < active.orders[b]; n++) {
      const from = (layout.offsets[b] + n) * bodies;
      let rr = 0;
      let ii = 0;
      let ri = 0;
      let ir = 0;
      for (let j = 0; j < bodies; j++) {
        const mr = layout.monopoleRe[from + j];
        const mi = layout.monopoleIm[from + j];
        rr += mr * cr[j];
        ii += mi * ci[j];
        ri += mr * ci[j];
        ir += mi * cr[j];
      }
      const at = active.offsets[b] + n;
      out.re[at] += rr - ii;
      out.im[at] += ri + ir;
      out.re[modes + at] += rr + ii;
      out.im[modes + at] += ri - ir;
    }
  }
}

/** out = order 0 of the field of all multipoles at each body: the part that adds to its volt drop [A mu0/(4 pi)]. */
export function orderZero(
  layout: Layout,
  active: ActiveModes,
  outgoing: ComplexVector,
  out: ComplexVector,
): void {
  const bodies = layout.orders.length;
  const modes = active.offsets[bodies];
  const { re, im } = outgoing;
  out.re.fill(0);
  out.im.fill(0);
  for (let b = 0; b < bodies; b++) {
    for (let n = 0; n < active.orders[b]; n++) {
      const from = (layout.offsets[b] + n) * bodies;
      const at = active.offsets[b] + n;
      const sumRe = re[at] + re[modes + at];
      const sumIm = im[at] + im[modes + at];
      // i times the difference: (minus - plus) pairs with the imaginary part of the coupling
      const difRe = re[modes + at] - re[at];
      const difIm = im[modes + at] - im[at];
      for (let j = 0; j < bodies; j++) {
        const mr = layout.monopoleRe[from + j];
        const mi = layout.monopoleIm[from + j];
        out.re[j] += mr * sumRe - mi * difIm;
        out.im[j] += mr * sumIm + mi * difRe;
      }
    }
  }
}

/** The pairing under which the translation operator is symmetric: sum of a_+n b_-n + a_-n b_+n; returns [re, im]. */
export function pairing(a: ComplexVector, b: ComplexVector): [number, number] {
  const modes = a.re.length / 2;
  let re = 0;
  let im = 0;
  for (let k = 0; k < modes; k++) {
    const l = k + modes;
    re += a.re[k] * b.re[l] - a.im[k] * b.im[l] + a.re[l] * b.re[k] - a.im[l] * b.im[k];
    im += a.re[k] * b.im[l] + a.im[k] * b.re[l] + a.re[l] * b.im[k] + a.im[l] * b.re[k];
  }
  return [re, im];
}
