/**
 * The stated error is honest: over seeded random layouts the true error, against a solution at much higher orders
 * and a residual at rounding, is never above it. Prints the worst ratio.
 */
import { expect, it } from 'vitest';
import ledger from '../../fixtures/solver/ledger.json' with { type: 'json' };
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import { seeded } from './case-builder.ts';
import { LAYOUTS, LAYOUTS_SEED, measureHonesty, TOLERANCE } from './measure.ts';
import { randomLayout } from './random-layouts.ts';

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

const ROUNDING_SEED = 99;

it(`rounding: the wires in another order differ by no more than both state, seed ${ROUNDING_SEED}`, () => {
  const random = seeded(ROUNDING_SEED);
  let worst = 0;
  for (let k = 0; k < 80; k++) {
    const { case: layout, frequency } = randomLayout(random);
    // all that is left of the error is rounding
    const c = { ...layout, tolerance: 1e-12 };
    const back = (i: number) => c.wires.length - 1 - i;
    const [loop] = c.loops;
    const turned = {
      ...c,
      wires: [...c.wires].reverse(),
      loops: [{ ...loop, go: loop.go.map(back), return: loop.return.map(back) }],
    };
    const [a, b] = [c, turned].map((each) => impedanceAt(prepareCase(each, frequency), frequency));
    worst = Math.max(
      worst,
      Math.abs(a.resistance[0] / b.resistance[0] - 1) / (a.resistanceError[0] + b.resistanceError[0]),
      Math.abs(a.inductance[0] / b.inductance[0] - 1) / (a.inductanceError[0] + b.inductanceError[0]),
    );
  }
  console.log(`seed ${ROUNDING_SEED}: difference over stated errors ${worst.toPrecision(2)}`);
  expect(worst).toBeLessThan(1);
});
