/**
 * The stated error is honest: over seeded random layouts the true error, against a solution at much higher orders
 * and a residual at rounding, is never above it. Prints the worst ratio.
 */
import { expect, it } from 'vitest';
import ledger from '../../fixtures/solver/ledger.json' with { type: 'json' };
import { LAYOUTS, LAYOUTS_SEED, measureHonesty, TOLERANCE } from './measure.ts';

it(`holds over ${LAYOUTS} random layouts, seed ${LAYOUTS_SEED}`, () => {
  const { ratio, largest, failures, worst } = measureHonesty();
  console.log(`seed ${LAYOUTS_SEED}: worst true/stated ${ratio.toPrecision(3)} (${worst})`);
  console.log(`largest error at tolerance ${TOLERANCE}: ${largest.toExponential(2)}`);
  expect(failures).toEqual([]);
  expect(largest).toBeLessThanOrEqual(TOLERANCE);
  // near rounding the ratio is a matter of the last bits: a quarter more on another machine
  expect(ratio).toBeLessThanOrEqual(1.25 * ledger.random.ratio);
  expect(ratio, 'better, record it').toBeGreaterThan(ledger.random.ratio / 4);
  expect(largest).toBeLessThanOrEqual(1.25 * ledger.random.largest);
  expect(largest, 'better, record it').toBeGreaterThan(ledger.random.largest / 4);
});
