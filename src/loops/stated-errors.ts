/** The stated errors of R, L and the mutual terms, relative to their values, from the errors of the complex inductance. */
import type { InductanceError } from './error-estimate.ts';
import { INDUCTANCE_UNIT } from './excitation.ts';
import type { LoopMatrices } from './matrices.ts';
import type { PreparedCase } from './prepared.ts';

export interface StatedErrors {
  /** [1] of each loop's R (absolute [ohm/m] where R is zero); not below the true error */
  readonly resistanceError: Float64Array;
  /** [1] of each loop's L; not below the true error */
  readonly inductanceError: Float64Array;
  /** [1] of Z_kl relative to sqrt(|Z_kk Z_ll|) and of L_kl relative to sqrt(L_kk L_ll), the larger; loops x loops */
  readonly mutualError: Float64Array;
  /** true when R and L of every loop are within the tolerance */
  readonly reached: boolean;
}

/** [1] no value is nearer than its own last digits */
const LAST_DIGITS = 4 * Number.EPSILON;

/** @param omega [rad/s] */
export function statedErrors(
  prepared: PreparedCase,
  omega: number,
  errors: readonly InductanceError[],
  { resistance, inductance }: LoopMatrices,
): StatedErrors {
  const { loops } = prepared.circuit;
  const { tolerance } = prepared.case;
  const scale = omega * INDUCTANCE_UNIT;
  const logarithms = logarithmRounding(prepared);
  const resistanceError = Float64Array.from(errors, (e, k) => {
    const value = resistance[k * loops + k];
    return value === 0 ? scale * e.im : LAST_DIGITS + (scale * e.im) / Math.abs(value);
  });
  const inductanceError = Float64Array.from(errors, (e, k) => {
    const value = Math.abs(inductance[k * loops + k]);
    return LAST_DIGITS + (INDUCTANCE_UNIT * e.re + logarithms) / value;
  });
  const reached = errors.every(
    (_, k) =>
      inductanceError[k] <= tolerance && (resistance[k * loops + k] === 0 || resistanceError[k] <= tolerance),
  );
  return {
    resistanceError,
    inductanceError,
    mutualError: mutualErrors(errors, resistance, inductance, omega, loops),
    reached,
  };
}

/** [H/m] Rounding of the logarithms, which cancel between go and return. */
function logarithmRounding(prepared: PreparedCase): number {
  let largest = 1;
  for (const x of prepared.layout.logarithms) largest = Math.max(largest, Math.abs(x));
  return 8 * Number.EPSILON * largest * INDUCTANCE_UNIT;
}

function mutualErrors(
  errors: readonly InductanceError[],
  resistance: Float64Array,
  inductance: Float64Array,
  omega: number,
  loops: number,
): Float64Array {
  const out = new Float64Array(loops * loops);
  const size = (k: number) => Math.hypot(resistance[k * loops + k], omega * inductance[k * loops + k]);
  for (let k = 0; k < loops; k++) {
    for (let l = 0; l < loops; l++) {
      const both =
        INDUCTANCE_UNIT *
        Math.sqrt(Math.hypot(errors[k].re, errors[k].im) * Math.hypot(errors[l].re, errors[l].im));
      const ofL = both / Math.sqrt(inductance[k * loops + k] * inductance[l * loops + l]);
      const zz = Math.sqrt(size(k) * size(l));
      out[k * loops + l] = 8 * Number.EPSILON + Math.max(ofL, zz === 0 ? 0 : (omega * both) / zz);
    }
  }
  return out;
}
