/** Raising of orders from a start that is far too low: the prediction is seldom short, so it is taken away here. */
import { expect, it } from 'vitest';
import { inductanceError } from '../../src/loops/error-estimate.ts';
import { excite, frequencyPoint } from '../../src/loops/excitation.ts';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import { loopMatrices } from '../../src/loops/matrices.ts';
import { reachOrders } from '../../src/loops/prepared.ts';
import { raisedOrders } from '../../src/loops/refine.ts';
import { statedErrors } from '../../src/loops/stated-errors.ts';
import { caseOf, loop, wire } from './case-builder.ts';

it('from order 2 the tolerance is reached within a few rounds, and only where tails matter', () => {
  const frequency = 1e6;
  const omega = 2 * Math.PI * frequency;
  // a close pair, and a wire far away that needs next to nothing
  const c = caseOf([wire(0, 0, 1e-3), wire(2.1e-3, 0, 1e-3), wire(0, 0.2, 1e-3)], [loop([0], [1])]);
  const prepared = prepareCase(c, frequency);
  const reference = impedanceAt(prepareCase({ ...c, tolerance: 1e-12 }, frequency), frequency);
  let orders = Int32Array.of(2, 2, 2);
  let rounds = 0;
  for (; rounds < 6; rounds++) {
    const point = frequencyPoint(prepared, omega, orders);
    const excitations = [excite(prepared, point, 0, 1e-12)];
    const errors = excitations.map((e) => inductanceError(point, prepared.alpha, e));
    const matrices = loopMatrices(prepared, point, excitations);
    const stated = statedErrors(prepared, omega, errors, matrices);
    const error = Math.abs(matrices.resistance[0] / reference.resistance[0] - 1);
    expect(error, `orders ${orders}`).toBeLessThanOrEqual(stated.resistanceError[0]);
    const raised = raisedOrders(prepared, { omega, ...matrices, errors, excitations }, orders);
    if (stated.reached) {
      expect(raised).toBeUndefined();
      break;
    }
    expect(raised).toBeDefined();
    expect(raised!.every((p, i) => p >= orders[i])).toBe(true);
    // the tables must hold them, or the next round would read past their end
    expect(reachOrders(prepared, raised!)).toBe(true);
    orders = Int32Array.from(raised!);
  }
  expect(rounds).toBeGreaterThan(0);
  expect(rounds).toBeLessThan(6);
  expect(orders[0]).toBeGreaterThan(10);
  expect(orders[2]).toBeLessThan(6);
});
