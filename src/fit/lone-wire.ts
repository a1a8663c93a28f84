/**
 * The exact circuit of a lone solid wire's inside, by the partial fractions of q I_0(q) / (2 I_1(q)), q^2 =
 * s T, T = mu sigma a^2:
 *
 *   Z(s) / R_dc = 1 + sum_k s / (s + p_k),  p_k = j_{1,k}^2 / T,  j_{1,k} the zeros of J_1 (DLMF 10.21, 10.33),
 *
 * sections with all resistors alike, R_dc. Those left out are closed by one more with their first two
 * moments, known from sum_k 1/j^2 = 1/8 and sum_k 1/j^4 = 1/192 (Lord Rayleigh 1874; DLMF 10.21(xiii)).
 * Good where |s| T is well below the square of the first zero left out. No fit is made, so it is a check of
 * fits.
 */
import { Problem } from '../problem.ts';
import { type RoundWire, solidInternalInductance, solidResistanceDc } from '../skin/index.ts';
import type { Section, SectionCircuit } from './model.ts';

/**
 * @param wire solid and not perfect
 * @param zeros [1] the first zeros of J_1, rising, at least one; each gives a section, and the rest one more
 * @returns the inside of the wire alone, per metre, with L_inf = 0: add the external inductance of its loop
 * @throws Problem DOMAIN for a perfect wire, no zeros, or zeros that do not rise from above 0
 */
export function loneWireCircuit(wire: RoundWire, zeros: ArrayLike<number>): SectionCircuit {
  const resistance = solidResistanceDc(wire);
  if (!(resistance > 0 && zeros.length > 0)) {
    throw new Problem(
      'DOMAIN',
      `the exact circuit of a wire with R_dc = ${resistance} ohm/m from ${zeros.length} zeros of J_1; it needs ` +
        'a wire that is not perfect and at least one zero',
    );
  }
  // L_dc = mu / 8 pi = R_dc T / 8
  const low = new Float64Array(2);
  solidInternalInductance(wire, 0, low);
  const scale = 8 * low[0];
  const sections: Section[] = [];
  // what is left of the two sums, in units of p: sum 1/j^2 and sum 1/j^4
  let first = 1 / 8;
  let second = 1 / 192;
  for (let k = 0; k < zeros.length; k++) {
    const square = zeros[k] * zeros[k];
    if (!(zeros[k] > (k === 0 ? 0 : zeros[k - 1]))) {
      throw new Problem('DOMAIN', `zero ${k + 1} of J_1 is ${zeros[k]}; zeros must rise from above 0`);
    }
    sections.push({ resistance, inductance: scale / square });
    first -= 1 / square;
    second -= 1 / (square * square);
  }
  sections.push({ resistance: (resistance * first * first) / second, inductance: scale * first });
  return { resistanceDc: resistance, inductanceInfinity: 0, sections };
}
