/** Resistance and inductance of all loops, own and mutual, from the solutions of one frequency. */
import { type Excitation, type FrequencyPoint, INDUCTANCE_UNIT } from './excitation.ts';
import type { PreparedCase } from './prepared.ts';
import { complexInductance } from './quadratic.ts';

export interface LoopMatrices {
  /** [ohm/m] loops x loops, row major */
  readonly resistance: Float64Array;
  /** [ohm/m] R - R_dc, loops x loops */
  readonly resistanceIncrement: Float64Array;
  /** [H/m] loops x loops */
  readonly inductance: Float64Array;
}

/** True for perfect conductors alone: they lose nothing, and what sums leave of a loss is rounding. */
export function isLossless(prepared: PreparedCase): boolean {
  return prepared.circuit.wireResistance.every((r) => r === 0);
}

export function loopMatrices(
  prepared: PreparedCase,
  point: FrequencyPoint,
  excitations: readonly Excitation[],
): LoopMatrices {
  const { circuit } = prepared;
  const { loops } = circuit;
  const scale = point.omega * INDUCTANCE_UNIT;
  const constant = scale === 0 || isLossless(prepared);
  const resistance = new Float64Array(loops * loops);
  const resistanceIncrement = new Float64Array(loops * loops);
  const inductance = new Float64Array(loops * loops);
  const l = new Float64Array(2);
  for (let a = 0; a < loops; a++) {
    for (let b = a; b < loops; b++) {
      complexInductance(point, circuit.wireResistance, excitations[a], excitations[b], l);
      for (const at of [a * loops + b, b * loops + a]) {
        resistanceIncrement[at] = constant ? 0 : -scale * l[1];
        resistance[at] = circuit.directResistance[at] + resistanceIncrement[at];
        inductance[at] = INDUCTANCE_UNIT * l[0];
      }
    }
  }
  return { resistance, resistanceIncrement, inductance };
}
