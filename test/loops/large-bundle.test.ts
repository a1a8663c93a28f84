/** 37 wires, 61 frequencies to 1e-8: the time that is allowed, and the work that is recorded. */
import { expect, it } from 'vitest';
import ledger from '../../fixtures/solver/ledger.json' with { type: 'json' };
import { hexagon, measureHexagon, TOLERANCE } from './measure.ts';

it('a hexagon of 37 wires in 8 s', () => {
  expect(hexagon().wires.length).toBe(37);
  const { seconds, products, highestOrder, stated, reached } = measureHexagon();
  console.log(
    `37 wires, 61 points: ${seconds.toFixed(1)} s, ${products} products, orders to ${highestOrder}`,
  );
  expect(reached).toBe(61);
  expect(stated).toBeLessThanOrEqual(TOLERANCE);
  expect(seconds).toBeLessThan(8);
  expect(products).toBeLessThanOrEqual(1.05 * ledger.hexagon.products);
  expect(products, 'better, record it').toBeGreaterThan(ledger.hexagon.products / 4);
  expect(highestOrder).toBeLessThanOrEqual(ledger.hexagon.highestOrder);
});
