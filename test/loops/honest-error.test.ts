/**
 * The stated error is honest: over seeded random layouts the true error, against a solution at much higher orders
 * and a residual at rounding, is never above it. Prints the worst ratio.
 */
import { describe, expect, it } from 'vitest';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import { seeded } from './case-builder.ts';
import { randomLayout } from './random-layouts.ts';

const SEED = 20260117;
const LAYOUTS = 260;

describe('stated error', () => {
  it(`holds over ${LAYOUTS} random layouts, seed ${SEED}`, () => {
    const random = seeded(SEED);
    let worst = { ratio: 0, text: '' };
    let largest = 0;
    const failures: string[] = [];
    const perTolerance = new Map<number, number>();
    for (let k = 0; k < LAYOUTS; k++) {
      const { case: c, frequency, smallestGap } = randomLayout(random);
      const tolerance = [1e-3, 1e-5, 1e-8, 1e-8][k % 4];
      const z = impedanceAt(prepareCase({ ...c, tolerance }, frequency), frequency);
      const reference = impedanceAt(prepareCase({ ...c, tolerance: 1e-12 }, frequency), frequency);
      const errorR = Math.abs(z.resistance[0] / reference.resistance[0] - 1);
      const errorL = Math.abs(z.inductance[0] / reference.inductance[0] - 1);
      const ratio = Math.max(errorR / z.resistanceError[0], errorL / z.inductanceError[0]);
      const text = `#${k} n ${c.wires.length} gap ${smallestGap.toPrecision(2)} f ${frequency.toPrecision(3)} tol ${tolerance} R ${errorR.toExponential(1)} of ${z.resistanceError[0].toExponential(1)}, L ${errorL.toExponential(1)} of ${z.inductanceError[0].toExponential(1)}; orders ${z.orders} vs ${reference.orders}; ref errors ${reference.resistanceError[0].toExponential(1)} it ${z.iterations}/${reference.iterations}`;
      if (ratio > worst.ratio) worst = { ratio, text };
      if (tolerance === 1e-8) largest = Math.max(largest, errorR, errorL);
      perTolerance.set(tolerance, Math.max(perTolerance.get(tolerance) ?? 0, ratio));
      if (!(ratio <= 1) || !z.reached) failures.push(text);
    }
    console.log(`seed ${SEED}: worst true/stated ${worst.ratio.toPrecision(3)} (${worst.text})`);
    console.log(`largest error at tolerance 1e-8: ${largest.toExponential(2)}`, perTolerance);
    expect(failures).toEqual([]);
    expect(largest).toBeLessThanOrEqual(1e-8);
  });
});
