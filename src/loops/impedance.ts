/**
 * Resistance and inductance of all loops at one frequency, to the tolerance of the case.
 *
 * Orders start from the prediction and are raised where the tails seen in the solution ask for it, until the
 * stated error of R and of L is within the tolerance or memory ends.
 */
import type { ComplexVector } from '../complex/index.ts';
import { Problem } from '../problem.ts';
import { MAX_ORDER, predictedOrders } from '../proximity/index.ts';
import { type InductanceError, inductanceError } from './error-estimate.ts';
import {
  type Excitation,
  excite,
  type FrequencyPoint,
  frequencyPoint,
  INDUCTANCE_UNIT,
} from './excitation.ts';
import { type PreparedCase, reachOrders } from './prepared.ts';
import { complexInductance } from './quadratic.ts';

export interface LoopImpedance {
  /** [Hz] */
  readonly frequency: number;
  /** [ohm/m] loops x loops, row major */
  readonly resistance: Float64Array;
  /** [ohm/m] R - R_dc, loops x loops */
  readonly resistanceIncrement: Float64Array;
  /** [H/m] loops x loops */
  readonly inductance: Float64Array;
  /** [1] of each loop's R (absolute [ohm/m] where R is zero); not below the true error */
  readonly resistanceError: Float64Array;
  /** [1] of each loop's L; not below the true error */
  readonly inductanceError: Float64Array;
  /** [1] of Z_kl relative to sqrt(|Z_kk Z_ll|) and of L_kl relative to sqrt(L_kk L_ll), the larger; loops x loops */
  readonly mutualError: Float64Array;
  /** [A/A] of each wire (column) for one ampere in each loop (row) */
  readonly currents: ComplexVector;
  /** [1] orders used, of each wire */
  readonly orders: Int32Array;
  /** [1] operator products of all loops, at the final orders */
  readonly iterations: number;
  /** true when every stated error is within the tolerance */
  readonly reached: boolean;
}

/** Rounds of raising the orders; each aims at the tolerance, two are usual. */
const MAX_ROUNDS = 12;

/** [1] residuals tried at first: the estimate of Z squares them */
const MIN_RESIDUAL = 1e-12;
const MAX_RESIDUAL = 1e-6;

/**
 * [1] share of the tolerance that the residual may take where currents are solved: their
 * error is of first order, up to 30 times the residual
 */
const CURRENT_SHARE = 1e-2;

/**
 * @param frequency [Hz] >= 0; 0 is the limit: resistance at direct current, low-frequency inductance
 * @throws Problem RANGE for a frequency that is negative or not finite
 */
export function impedanceAt(prepared: PreparedCase, frequency: number): LoopImpedance {
  if (!(frequency >= 0 && frequency < Number.POSITIVE_INFINITY)) {
    throw new Problem('RANGE', `frequency is ${frequency} Hz; it must be finite and not negative`);
  }
  const { tolerance, wires } = prepared.case;
  const omega = 2 * Math.PI * frequency;
  let orders = predictedOrders(wires, prepared.alpha, omega, tolerance);
  if (!reachOrders(prepared, orders)) orders = Int32Array.from(prepared.layout.orders);
  const shared = prepared.circuit.groups.some((members) => members.length > 1);
  let residual = shared
    ? Math.max(MIN_RESIDUAL, Math.min(MAX_RESIDUAL, CURRENT_SHARE * tolerance))
    : MAX_RESIDUAL;
  for (let round = 1; ; round++) {
    const point = frequencyPoint(prepared, omega, orders);
    const excitations = prepared.case.loops.map((_, k) => excite(prepared, point, k, residual));
    const result = assemble(prepared, point, excitations, frequency);
    if (result.impedance.reached || round === MAX_ROUNDS) return result.impedance;
    const raised = raisedOrders(prepared, result, orders);
    const finer = finerResidual(result, excitations, residual, tolerance, omega);
    if (raised === undefined && finer === residual) return result.impedance;
    residual = finer;
    if (raised !== undefined) {
      if (!reachOrders(prepared, raised)) return result.impedance;
      orders = raised;
    }
  }
}

interface Assembled {
  readonly impedance: LoopImpedance;
  readonly errors: readonly InductanceError[];
}

function assemble(
  prepared: PreparedCase,
  point: FrequencyPoint,
  excitations: readonly Excitation[],
  frequency: number,
): Assembled {
  const { circuit, alpha } = prepared;
  const { loops } = circuit;
  const wires = prepared.case.wires.length;
  const scale = point.omega * INDUCTANCE_UNIT;
  const resistance = new Float64Array(loops * loops);
  const resistanceIncrement = new Float64Array(loops * loops);
  const inductance = new Float64Array(loops * loops);
  const l = new Float64Array(2);
  // perfect conductors alone lose nothing: what the sums leave of it is rounding
  const lossless = circuit.wireResistance.every((r) => r === 0);
  for (let a = 0; a < loops; a++) {
    for (let b = a; b < loops; b++) {
      complexInductance(point, circuit.wireResistance, excitations[a], excitations[b], l);
      for (const at of [a * loops + b, b * loops + a]) {
        resistanceIncrement[at] = scale === 0 || lossless ? 0 : -scale * l[1];
        resistance[at] = circuit.directResistance[at] + resistanceIncrement[at];
        inductance[at] = INDUCTANCE_UNIT * l[0];
      }
    }
  }
  const errors = excitations.map((e) => {
    const error = inductanceError(point, alpha, e);
    return lossless ? { ...error, im: 0 } : error;
  });
  const diagonal = (m: Float64Array, k: number) => m[k * loops + k];
  const relative = (error: number, value: number) => (value === 0 ? error : error / Math.abs(value));
  const rounding = 4 * Number.EPSILON;
  const resistanceError = Float64Array.from(errors, (e, k) =>
    resistance[k * loops + k] === 0
      ? scale * e.im
      : rounding + relative(scale * e.im, diagonal(resistance, k)),
  );
  const inductanceErrors = Float64Array.from(
    errors,
    (e, k) =>
      rounding +
      relative(INDUCTANCE_UNIT * e.re, diagonal(inductance, k)) +
      logarithmRounding(prepared, inductance, k, loops),
  );
  const currents = {
    re: new Float64Array(loops * wires),
    im: new Float64Array(loops * wires),
  };
  excitations.forEach((e, k) => {
    currents.re.set(e.currents.re, k * wires);
    currents.im.set(e.currents.im, k * wires);
  });
  const { tolerance } = prepared.case;
  const reached = errors.every(
    (_, k) =>
      inductanceErrors[k] <= tolerance &&
      (resistance[k * loops + k] === 0 || resistanceError[k] <= tolerance),
  );
  return {
    errors,
    impedance: {
      frequency,
      resistance,
      resistanceIncrement,
      inductance,
      resistanceError,
      inductanceError: inductanceErrors,
      mutualError: mutualErrors(errors, resistance, inductance, point.omega, loops),
      currents,
      orders: point.system.active.orders,
      iterations: excitations.reduce((s, e) => s + e.multipoles.iterations, 0),
      reached,
    },
  };
}

/** [1] Rounding of the logarithms, which cancel between go and return. */
function logarithmRounding(
  prepared: PreparedCase,
  inductance: Float64Array,
  k: number,
  loops: number,
): number {
  const { logarithms } = prepared.layout;
  let largest = 1;
  for (const x of logarithms) largest = Math.max(largest, Math.abs(x));
  return (8 * Number.EPSILON * largest * INDUCTANCE_UNIT) / Math.abs(inductance[k * loops + k]);
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

/** [1] what a tail may keep of the tolerance after raising: below one, so that one round does */
const AIM = 0.3;

/** Orders raised at the bodies whose tails matter; undefined when truncation is not what is missing. */
function raisedOrders(prepared: PreparedCase, result: Assembled, orders: Int32Array): Int32Array | undefined {
  const { loops } = prepared.circuit;
  const { tolerance } = prepared.case;
  const { impedance, errors } = result;
  const scale = 2 * Math.PI * impedance.frequency * INDUCTANCE_UNIT;
  const bodies = orders.length;
  const raised = Int32Array.from(orders);
  let changed = false;
  for (let b = 0; b < bodies; b++) {
    let excess = 0;
    errors.forEach((e, k) => {
      const r = impedance.resistance[k * loops + k];
      const ofR = r === 0 ? 0 : (scale * e.tailIm[b]) / r;
      const ofL = (INDUCTANCE_UNIT * e.tailRe[b]) / Math.abs(impedance.inductance[k * loops + k]);
      excess = Math.max(excess, Math.max(ofR, ofL) / (AIM * tolerance));
    });
    // A body may hold its even share, or all of it where few bodies matter.
    const over = excess * Math.min(bodies, 8);
    if (over <= 1) continue;
    const more = Math.ceil(Math.log(over) / (2 * prepared.alpha[b])) + 1;
    raised[b] = Math.min(MAX_ORDER, orders[b] + Math.max(2, Math.min(more, orders[b])));
    changed ||= raised[b] > orders[b];
  }
  return changed ? raised : undefined;
}

/** A smaller residual where the iteration, not the orders, holds the error above the tolerance. */
function finerResidual(
  result: Assembled,
  excitations: readonly Excitation[],
  residual: number,
  tolerance: number,
  omega: number,
): number {
  const loops = excitations.length;
  let worst = 0;
  excitations.forEach((e, k) => {
    const r = result.impedance.resistance[k * loops + k];
    let norm = 0;
    const { re, im } = e.multipoles.residual;
    for (let i = 0; i < re.length; i++) norm += re[i] * re[i] + im[i] * im[i];
    const error = e.multipoles.inverseNorm * norm * INDUCTANCE_UNIT;
    const ofR = r === 0 ? 0 : (omega * error) / r;
    worst = Math.max(worst, ofR, error / Math.abs(result.impedance.inductance[k * loops + k]));
  });
  if (worst <= 0.1 * tolerance) return residual;
  return Math.max(MIN_RESIDUAL, residual * Math.sqrt((0.03 * tolerance) / worst));
}
