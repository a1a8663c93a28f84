/** A case made ready for any frequency: its terminal conditions, decay rates and (growing) geometry tables. */
import { KrylovSpace } from '../complex/index.ts';
import type { Case } from '../model/index.ts';
import { Problem } from '../problem.ts';
import { decayRates, type Layout, MAX_ORDER, predictedOrders, prepareLayout } from '../proximity/index.ts';
import { type Circuit, circuitOf } from './circuit.ts';

export interface PreparedCase {
  readonly case: Case;
  readonly circuit: Circuit;
  /** [1] slowest decay of the coefficients of each wire, over its neighbours */
  readonly alpha: Float64Array;
  readonly space: KrylovSpace;
  /** tables up to the highest orders asked for so far; replaced when more are needed */
  layout: Layout;
}

/**
 * Prepares the geometry once.
 *
 * @param highestFrequency [Hz] the tables are made for its orders; higher ones extend them later
 * @throws Problem as `circuitOf` and `prepareLayout`; EMPTY_LOOP for a case without loops
 */
export function prepareCase(c: Case, highestFrequency: number): PreparedCase {
  if (c.loops.length === 0)
    throw new Problem('EMPTY_LOOP', 'the case has no loop; name at least one go and return');
  const circuit = circuitOf(c);
  const alpha = decayRates(c.wires);
  const orders = predictedOrders(c.wires, alpha, 2 * Math.PI * highestFrequency, c.tolerance);
  return {
    case: c,
    circuit,
    alpha,
    space: new KrylovSpace(),
    layout: prepareLayout(c.wires, orders, alpha),
  };
}

/** Makes sure that the tables reach these orders; false when memory does not allow it. */
export function reachOrders(prepared: PreparedCase, wanted: Int32Array): boolean {
  const { layout } = prepared;
  if (wanted.every((p, i) => p <= layout.orders[i])) return true;
  if (wanted.some((p) => p > MAX_ORDER)) return false;
  // A little ahead, so that a sweep does not rebuild at every frequency.
  const orders = Int32Array.from(wanted, (p, i) =>
    Math.max(layout.orders[i], Math.min(MAX_ORDER, Math.ceil(1.1 * p) + 2)),
  );
  try {
    prepared.layout = prepareLayout(layout.circles, orders, prepared.alpha);
    return true;
  } catch (error) {
    if (error instanceof Problem && error.code === 'NOT_REACHED') return false;
    throw error;
  }
}
