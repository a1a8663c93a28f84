/**
 * The exact circuit of a lone solid wire's inside, by the partial fractions of its impedance over its decay rates p_k:
 *
 *   Z(s) / R_dc = 1 + sum_k s / (s + p_k),  p_k = j_{1,k}^2 / T,  T = mu sigma a^2  (DLMF 10.21, 10.33),
 *
 * sections with all resistors alike, R_dc. Those left out are closed by one more with their first two
 * moments, known from sum_k 1/j^2 = 1/8 and sum_k 1/j^4 = 1/192 (Lord Rayleigh 1874; DLMF 10.21(xiii)).
 * Good where |s| is well below the first rate left out. No fit is made, so it is a check of fits.
 */
import { Problem } from '../problem.ts';
import {
  type RoundWire,
  solidDecayRates,
  solidInternalInductance,
  solidResistanceDc,
} from '../skin/index.ts';
import type { Section, SectionCircuit } from './model.ts';

/**
 * @param wire solid and not perfect
 * @param count [1] rates taken, whole, at least one; each gives a section, and the rest one more
 * @returns the inside of the wire alone, per metre, with L_inf = 0: add the external inductance of its loop
 * @throws Problem DOMAIN for a perfect wire, or a wrong number of rates
 */
export function loneWireCircuit(wire: RoundWire, count: number): SectionCircuit {
  const resistance = solidResistanceDc(wire);
  if (!(resistance > 0 && count >= 1)) {
    throw new Problem(
      'DOMAIN',
      `the exact circuit of a wire with R_dc = ${resistance} ohm/m from ${count} decay rates; it needs a wire that is ` +
        'not perfect and at least one rate',
    );
  }
  // L_dc = mu / 8 pi = R_dc T / 8
  const low = new Float64Array(2);
  solidInternalInductance(wire, 0, low);
  const time = (8 * low[0]) / resistance;
  const sections: Section[] = [];
  // what is left of sum 1/p = T/8 and of sum 1/p^2 = T^2/192
  let first = time / 8;
  let second = (time * time) / 192;
  for (const rate of solidDecayRates(wire, count)) {
    sections.push({ resistance, inductance: resistance / rate });
    first -= 1 / rate;
    second -= 1 / (rate * rate);
  }
  sections.push({ resistance: (resistance * first * first) / second, inductance: resistance * first });
  return { resistanceDc: resistance, inductanceInfinity: 0, sections };
}
