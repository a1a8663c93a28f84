/**
 * The circuit of a loop: R_dc in series with L_inf and with sections, each R_k parallel to L_k:
 *   Z(s) = R_dc + s L_inf + sum_k R_k s / (s + p_k),  p_k = R_k / L_k
 * (R. M. Foster 1924, an RL one-port in series form).
 * With all R_k, L_k > 0 and R_dc, L_inf >= 0 it is passive whatever the values.
 */

/** One resistor parallel to one inductor. */
export interface Section {
  /** [ohm/m] > 0 */
  readonly resistance: number;
  /** [H/m] > 0 */
  readonly inductance: number;
}

/** A circuit without the record of how well it fits. */
export interface SectionCircuit {
  /** [ohm/m] >= 0, the exact direct-current resistance */
  readonly resistanceDc: number;
  /** [H/m] >= 0, what remains above the highest section */
  readonly inductanceInfinity: number;
  /** in the order of rising corner frequency R_k / (2 pi L_k) */
  readonly sections: readonly Section[];
}

/** R and L of a circuit at one frequency. */
export interface SeriesImpedance {
  /** [ohm/m] */
  readonly resistance: number;
  /** [H/m] */
  readonly inductance: number;
}

/**
 * R and L of the circuit at one frequency; inductance, not reactance, so that 0 Hz is a plain limit.
 * @param frequency [Hz] >= 0
 */
export function sectionImpedance(circuit: SectionCircuit, frequency: number): SeriesImpedance {
  const w = 2 * Math.PI * frequency;
  let resistance = circuit.resistanceDc;
  let inductance = circuit.inductanceInfinity;
  for (const section of circuit.sections) {
    const u = (w * section.inductance) / section.resistance;
    const below = 1 / (1 + u * u);
    resistance += section.resistance * (u < 1 ? u * u * below : 1 - below);
    inductance += section.inductance * below;
  }
  return { resistance, inductance };
}
