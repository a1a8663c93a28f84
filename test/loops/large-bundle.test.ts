/** 37 wires, 61 frequencies to 1e-8: the time that is allowed, and the work that is recorded. */
import { expect, it } from 'vitest';
import ledger from '../../fixtures/solver/ledger.json' with { type: 'json' };
import { prepareCase } from '../../src/loops/index.ts';
import { caseOf, loop, wire } from './case-builder.ts';
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

it('a bundle beyond the memory is refused before it is built, in a moment: NOT_REACHED', () => {
  const wires = Array.from({ length: 2000 }, (_, i) =>
    wire(1.01e-3 * (i % 50), 1.01e-3 * Math.floor(i / 50), 0.5e-3, { name: `w${i}` }),
  );
  const c = caseOf(wires, [loop([0], [1])]);
  const start = performance.now();
  expect(() => prepareCase(c, 1e6)).toThrow(
    expect.objectContaining({ code: 'NOT_REACHED', message: expect.stringMatching(/^2000 wires .* GB/) }),
  );
  expect(performance.now() - start).toBeLessThan(5000);
});
