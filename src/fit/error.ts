/**
 * Relative errors of a circuit against samples, and their slopes in the logarithms of the sections' R_k and
 * p_k. The error of R counts against R, that of L against L. Where R is (nearly) nothing, as between
 * perfect conductors, it counts against the reactance instead.
 */
import type { LoopSamples } from './samples.ts';

/**
 * A circuit being fitted: R_k and p_k = R_k / L_k [rad/s] of N sections, then L_inf; 2 N + 1 numbers in one
 * array.
 */
export type Parameters = Float64Array;

/** What is fitted: the samples at chosen places, with the scale each error counts against. */
export interface Target {
  /** [rad/s] */
  readonly omega: Float64Array;
  /** [ohm/m] R - R_dc */
  readonly increment: Float64Array;
  /** [H/m] */
  readonly inductance: Float64Array;
  /** [ohm/m] > 0 */
  readonly resistanceScale: Float64Array;
}

/**
 * Below this part of the reactance a resistance is rounding of a sum that holds both: it counts against
 * that part.
 */
const LEAST_LOSS_ANGLE = 1e-12;

/** The samples with index `first`, `first + 2`, ...; or all, with step 1. */
export function targetOf(samples: LoopSamples, first: number, step: number): Target {
  const pick = (values: Float64Array) => values.filter((_, i) => i >= first && (i - first) % step === 0);
  const omega = pick(samples.frequency).map((f) => 2 * Math.PI * f);
  const resistance = pick(samples.resistance);
  const inductance = pick(samples.inductance);
  return {
    omega,
    increment: resistance.map((r) => r - samples.resistanceDc),
    inductance,
    resistanceScale: resistance.map((r, i) => Math.max(r, LEAST_LOSS_ANGLE * omega[i] * inductance[i])),
  };
}

/** [1] errors of R at every frequency, then errors of L; written to `out`, two entries a frequency. */
export function relativeErrors(target: Target, parameters: Parameters, out: Float64Array): Float64Array {
  const { omega, increment, inductance, resistanceScale } = target;
  const count = omega.length;
  const sections = (parameters.length - 1) / 2;
  for (let i = 0; i < count; i++) {
    let r = -increment[i];
    let l = parameters[2 * sections] - inductance[i];
    for (let k = 0; k < sections; k++) {
      const u = omega[i] / parameters[sections + k];
      const below = 1 / (1 + u * u);
      r += parameters[k] * u * u * below;
      l += (parameters[k] / parameters[sections + k]) * below;
    }
    out[i] = r / resistanceScale[i];
    out[count + i] = l / inductance[i];
  }
  return out;
}

/**
 * [1] slopes of `relativeErrors` by ln R_k, ln p_k and L_inf / `inductanceUnit`; row-major, 2 N + 1 columns.
 */
export function errorSlopes(
  target: Target,
  parameters: Parameters,
  inductanceUnit: number,
  out: Float64Array,
): void {
  const { omega, inductance, resistanceScale } = target;
  const count = omega.length;
  const width = parameters.length;
  const sections = (width - 1) / 2;
  for (let i = 0; i < count; i++) {
    const rowR = i * width;
    const rowL = (count + i) * width;
    for (let k = 0; k < sections; k++) {
      const u = omega[i] / parameters[sections + k];
      const below = 1 / (1 + u * u);
      const above = u * u * below;
      const r = parameters[k] / resistanceScale[i];
      const l = parameters[k] / parameters[sections + k] / inductance[i];
      out[rowR + k] = r * above;
      out[rowR + sections + k] = -2 * r * above * below;
      out[rowL + k] = l * below;
      out[rowL + sections + k] = l * below * (above - below);
    }
    out[rowR + width - 1] = 0;
    out[rowL + width - 1] = inductanceUnit / inductance[i];
  }
}

/** [1] largest magnitude among entries `from` (included) to `to` (excluded). */
export function worstOf(errors: Float64Array, from = 0, to = errors.length): number {
  let worst = 0;
  for (let i = from; i < to; i++) worst = Math.max(worst, Math.abs(errors[i]));
  return worst;
}
