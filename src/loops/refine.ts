/**
 * What to refine where a stated error is above the tolerance: the orders of the wires whose tails matter, or the
 * residual of the iteration.
 */
import { MAX_ORDER } from '../proximity/index.ts';
import type { InductanceError } from './error-estimate.ts';
import { type Excitation, INDUCTANCE_UNIT } from './excitation.ts';
import type { PreparedCase } from './prepared.ts';

/** Values of a solution, and what is behind their errors. */
export interface Solved {
  /** [rad/s] */
  readonly omega: number;
  /** [ohm/m] loops x loops */
  readonly resistance: Float64Array;
  /** [H/m] loops x loops */
  readonly inductance: Float64Array;
  readonly errors: readonly InductanceError[];
  readonly excitations: readonly Excitation[];
}

/** [1] residuals tried: the estimate of Z squares them */
const MIN_RESIDUAL = 1e-12;
const MAX_RESIDUAL = 1e-6;

/**
 * [1] share of the tolerance that the residual may take where currents are solved: their
 * error is of first order, up to 30 times the residual
 */
const CURRENT_SHARE = 1e-2;

/** [1] residual to begin with. */
export function firstResidual(prepared: PreparedCase): number {
  const shared = prepared.circuit.groups.some((members) => members.length > 1);
  if (!shared) return MAX_RESIDUAL;
  return Math.max(MIN_RESIDUAL, Math.min(MAX_RESIDUAL, CURRENT_SHARE * prepared.case.tolerance));
}

/** [1] what a tail may keep of the tolerance after raising: below one, so that one round does */
const AIM = 0.3;

/** Orders raised at the bodies whose tails matter; undefined when truncation is not what is missing. */
export function raisedOrders(
  prepared: PreparedCase,
  result: Solved,
  orders: Int32Array,
): Int32Array | undefined {
  const { loops } = prepared.circuit;
  const { tolerance } = prepared.case;
  const { resistance, inductance, errors } = result;
  const scale = result.omega * INDUCTANCE_UNIT;
  const bodies = orders.length;
  const raised = Int32Array.from(orders);
  let changed = false;
  for (let b = 0; b < bodies; b++) {
    let excess = 0;
    errors.forEach((e, k) => {
      const r = resistance[k * loops + k];
      const ofR = r === 0 ? 0 : (scale * e.tailIm[b]) / r;
      const ofL = (INDUCTANCE_UNIT * e.tailRe[b]) / Math.abs(inductance[k * loops + k]);
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
export function finerResidual(
  { omega, resistance, inductance, excitations }: Solved,
  residual: number,
  tolerance: number,
): number {
  const loops = excitations.length;
  let worst = 0;
  excitations.forEach((e, k) => {
    const r = resistance[k * loops + k];
    let norm = 0;
    const { re, im } = e.multipoles.residual;
    for (let i = 0; i < re.length; i++) norm += re[i] * re[i] + im[i] * im[i];
    const error = e.multipoles.inverseNorm * norm * INDUCTANCE_UNIT;
    const ofR = r === 0 ? 0 : (omega * error) / r;
    worst = Math.max(worst, ofR, error / Math.abs(inductance[k * loops + k]));
  });
  if (worst <= 0.1 * tolerance) return residual;
  return Math.max(MIN_RESIDUAL, residual * Math.sqrt((0.03 * tolerance) / worst));
}
