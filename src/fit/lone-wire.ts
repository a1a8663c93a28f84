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
import { besselJ1Zeros, type RoundWire, solidInternalInductance, solidResistanceDc } from '../skin/index.ts';
import type { Section, SectionCircuit } from './model.ts';

/**
 * @param wire solid and not perfect
 * @param count [1] zeros of J_1 taken, whole, at least one; each gives a section, and the rest one more
 * @returns the inside of the wire alone, per metre, with L_inf = 0: add the external inductance of its loop
 * @throws Problem DOMAIN for a perfect wire, or a wrong number of zeros
 */
export function loneWireCircuit(wire: RoundWire, count: number): SectionCircuit {
  const resistance = solidResistanceDc(wire);
  if (!(resistance > 0 && count >= 1)) {
    throw new Problem(
      'DOMAIN',
      `the exact circuit of a wire with R_dc = ${resistance} ohm/m from ${count} zeros of J_1; it needs a wire that ` +
        'is not perfect and at least one zero',
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
  for (const zero of besselJ1Zeros(count)) {
    const square = zero * zero;
    sections.push({ resistance, inductance: scale / square });
    first -= 1 / square;
    second -= 1 / (square * square);
  }
  sections.push({ resistance: (resistance * first * first) / second, inductance: scale * first });
  return { resistanceDc: resistance, inductanceInfinity: 0, sections };
}
