/**
 * Resistance and inductance of all loops at one frequency, to the tolerance of the case.
 *
 * Orders start from the prediction and are raised where the tails seen in the solution ask for it, until the
 * stated error of R and of L is within the tolerance or memory ends.
 */
import type { ComplexVector } from '../complex/index.ts';
import { Problem } from '../problem.ts';
import { predictedOrders } from '../proximity/index.ts';
import { inductanceError } from './error-estimate.ts';
import { excite, frequencyPoint } from './excitation.ts';
import { isLossless, type LoopMatrices, loopMatrices } from './matrices.ts';
import { type PreparedCase, reachOrders } from './prepared.ts';
import { finerResidual, firstResidual, raisedOrders, type Solved } from './refine.ts';
import { type StatedErrors, statedErrors } from './stated-errors.ts';

/** Values, stated errors and currents of all loops at one frequency. */
export interface LoopImpedance extends LoopMatrices, StatedErrors {
  /** [Hz] */
  readonly frequency: number;
  /** [A/A] of each wire (column) for one ampere in each loop (row) */
  readonly currents: ComplexVector;
  /** [1] orders used, of each wire */
  readonly orders: Int32Array;
  /** [1] operator products of all loops, at the final orders */
  readonly iterations: number;
}

/** Rounds of raising the orders; each aims at the tolerance, two are usual. */
const MAX_ROUNDS = 12;

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
  let residual = firstResidual(prepared);
  for (let round = 1; ; round++) {
    const { impedance, solved } = solveLoops(prepared, frequency, orders, residual);
    if (impedance.reached || round === MAX_ROUNDS) return impedance;
    const raised = raisedOrders(prepared, solved, orders);
    const finer = finerResidual(solved, residual, tolerance);
    if (raised === undefined && finer === residual) return impedance;
    residual = finer;
    if (raised !== undefined) {
      if (!reachOrders(prepared, raised)) return impedance;
      orders = raised;
    }
  }
}

/** All loops at the given orders and residual. */
function solveLoops(
  prepared: PreparedCase,
  frequency: number,
  orders: Int32Array,
  residual: number,
): { readonly impedance: LoopImpedance; readonly solved: Solved } {
  const { circuit, alpha } = prepared;
  const omega = 2 * Math.PI * frequency;
  const point = frequencyPoint(prepared, omega, orders);
  const excitations = prepared.case.loops.map((_, k) => excite(prepared, point, k, residual));
  const lossless = isLossless(prepared);
  const errors = excitations.map((e) => {
    const error = inductanceError(point, alpha, e);
    return lossless ? { ...error, im: 0 } : error;
  });
  const matrices = loopMatrices(prepared, point, excitations);
  const wires = prepared.case.wires.length;
  const currents = {
    re: new Float64Array(circuit.loops * wires),
    im: new Float64Array(circuit.loops * wires),
  };
  excitations.forEach((e, k) => {
    currents.re.set(e.currents.re, k * wires);
    currents.im.set(e.currents.im, k * wires);
  });
  return {
    solved: { omega, ...matrices, errors, excitations },
    impedance: {
      frequency,
      ...matrices,
      ...statedErrors(prepared, omega, errors, matrices),
      currents,
      orders,
      iterations: excitations.reduce((s, e) => s + e.multipoles.iterations, 0),
    },
  };
}
