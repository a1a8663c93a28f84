/** The speed of many impedances at once, as a ratio to exponentials of the same run, against the recorded one. */
import { expect, test } from 'vitest';
import recorded from '../../fixtures/bessel/speed.json' with { type: 'json' };
import { ratioToExponentials } from '../../scripts/batch-speed.mjs';
import { solidInternalImpedances } from '../../src/skin/index.ts';

test('an impedance takes as many exponentials as recorded', () => {
  const ratio = ratioToExponentials(solidInternalImpedances);
  console.log(
    `an impedance takes the time of ${ratio.toFixed(1)} exponentials, recorded ${recorded.exponentials}`,
  );
  // 2.5: another processor, another load; scalar evaluation would be more than ten times slower
  expect(ratio).toBeLessThan(2.5 * recorded.exponentials);
  expect(ratio, 'better, record it').toBeGreaterThan(recorded.exponentials / 4);
});
