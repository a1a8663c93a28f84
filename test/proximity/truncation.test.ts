/** The tail of what is cut, against series summed to the end; orders of symmetric surroundings; predicted orders. */
import { describe, expect, it } from 'vitest';
import { activeModes, predictedOrders, truncationTail } from '../../src/proximity/index.ts';
import { tailFactor } from '../../src/proximity/orders.ts';
import { wire } from '../loops/case-builder.ts';

/** y of one body with 2 y_+n y_-n = weight(n), beside a second body without multipoles. */
function solution(order: number, weight: (n: number) => number) {
  const active = activeModes(Int32Array.of(order, 1));
  const modes = order + 1;
  const scaled = { re: new Float64Array(2 * modes), im: new Float64Array(2 * modes) };
  for (let n = 1; n <= order; n++) {
    scaled.re[n - 1] = weight(n) / 2;
    scaled.re[modes + n - 1] = 1;
  }
  return { active, scaled };
}

function sumFrom(first: number, term: (n: number) => number): number {
  let sum = 0;
  for (let n = first; n < first + 4000; n++) sum += term(n);
  return sum;
}

describe('truncation', () => {
  it.each([0.05, 0.3, 1.2])('the factor is the sum of (1 + k/p) exp(-2 alpha k): alpha %d', (alpha) => {
    for (const p of [2, 10, 77]) {
      const sum = sumFrom(1, (k) => (1 + k / p) * Math.exp(-2 * alpha * k));
      expect(tailFactor(alpha, p) / sum).toBeCloseTo(1, 12);
    }
  });

  it('is above the sum of the orders cut where they fall as n exp(-2 alpha n), as for perfect conductors', () => {
    for (const alpha of [0.05, 0.3, 1.2]) {
      for (const p of [4, 20, 60]) {
        const term = (n: number) => n * Math.exp(-2 * alpha * n);
        const { active, scaled } = solution(p, term);
        const tail = truncationTail(scaled, active, Float64Array.of(alpha, alpha));
        expect(tail.re[0] / sumFrom(p + 1, term)).toBeGreaterThanOrEqual(1 - 1e-12);
        expect(tail.im[0]).toBe(0);
      }
    }
  });

  it('sees the orders that a ring of up to twelve leaves, wherever the cut falls between them', () => {
    const alpha = 0.1;
    for (const fold of [2, 5, 12]) {
      const term = (n: number) => (n % fold === 0 ? Math.exp(-2 * alpha * n) : 0);
      for (let p = 12; p < 12 + fold; p++) {
        const { active, scaled } = solution(p, term);
        const { re } = truncationTail(scaled, active, Float64Array.of(alpha, alpha));
        expect(re[0], `fold ${fold}, cut at ${p}`).toBeGreaterThanOrEqual(sumFrom(p + 1, term));
      }
    }
  });
});

it('predicted orders grow with a closer gap, a higher frequency and a smaller tolerance', () => {
  const orders = (alpha: number, omega: number, tolerance: number) =>
    predictedOrders([wire(0, 0, 1e-3)], Float64Array.of(alpha), omega, tolerance)[0];
  expect(orders(0.1, 1e7, 1e-8)).toBeGreaterThan(orders(0.3, 1e7, 1e-8));
  expect(orders(0.1, 1e7, 1e-8)).toBeGreaterThan(orders(0.1, 1e4, 1e-8));
  expect(orders(0.1, 1e7, 1e-8)).toBeGreaterThan(orders(0.1, 1e7, 1e-4));
  // a wire without neighbours
  expect(orders(Number.POSITIVE_INFINITY, 1e7, 1e-8)).toBe(2);
});
