/**
 * The complex inductance of a pair of loops from two solutions, by the stationary functional
 *   Z_kl - R_dc = d_k R d_l + j w [ I_k (K + L_int) I_l + I_k a0_l + <y_k, r_l> ]:
 * its error is of second order in the residual r of the multipole equations.
 */
import { pairing } from '../proximity/index.ts';
import { type Excitation, type FrequencyPoint, INDUCTANCE_UNIT } from './excitation.ts';

/** Writes [re, im] of (Z_kl - R_dc)/(j omega mu0/(4 pi)) [1], symmetric in k and l. */
export function complexInductance(
  point: FrequencyPoint,
  wireResistance: Float64Array,
  a: Excitation,
  b: Excitation,
  out: Float64Array,
): void {
  const n = wireResistance.length;
  const { inductance } = point;
  let re = 0;
  let im = 0;
  const add = (ar: number, ai: number, br: number, bi: number) => {
    re += ar * br - ai * bi;
    im += ar * bi + ai * br;
  };
  for (let i = 0; i < n; i++) {
    let vr = 0;
    let vi = 0;
    for (let j = 0; j < n; j++) {
      const lr = inductance.re[i * n + j];
      const li = inductance.im[i * n + j];
      vr += lr * b.currents.re[j] - li * b.currents.im[j];
      vi += lr * b.currents.im[j] + li * b.currents.re[j];
    }
    // Half of each order: the two agree up to the residual, their mean is symmetric to the bit.
    const [za, zb] = [a.multipoles.orderZero, b.multipoles.orderZero];
    add(a.currents.re[i], a.currents.im[i], vr + zb.re[i] / 2, vi + zb.im[i] / 2);
    add(b.currents.re[i], b.currents.im[i], za.re[i] / 2, za.im[i] / 2);
  }
  const [ar, ai] = pairing(a.multipoles.scaled, b.multipoles.residual);
  const [br, bi] = pairing(b.multipoles.scaled, a.multipoles.residual);
  re += (ar + br) / 2;
  im += (ai + bi) / 2;
  const scale = point.omega * INDUCTANCE_UNIT;
  if (scale > 0) {
    for (let i = 0; i < n; i++) {
      const r = wireResistance[i] / scale;
      const dr = a.deviation.re[i] * b.deviation.re[i] - a.deviation.im[i] * b.deviation.im[i];
      const di = a.deviation.re[i] * b.deviation.im[i] + a.deviation.im[i] * b.deviation.re[i];
      // R d d / (j scale)
      re += r * di;
      im -= r * dr;
    }
  }
  out[0] = re;
  out[1] = im;
}
