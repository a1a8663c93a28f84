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
import { wildLayout } from './wild-layouts.ts';

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

it.each([
  { seed: 1, layouts: 100 },
  // few, of errors below the last digit of L
  { seed: 10, layouts: 30 },
])('holds over wild layouts at tolerances from 1e-2 to 1e-10, mutual terms too: %o', ({ seed, layouts }) => {
  const random = seeded(seed);
  const worst = { own: 0, mutual: 0 };
  let mutual = 0;
  for (let k = 0; k < layouts; k++) {
    const { case: c, frequency } = wildLayout(random, [1e-2, 1e-3, 1e-5, 1e-8, 1e-10][k % 5]);
    const z = impedanceAt(prepareCase(c, frequency), frequency);
    const y = impedanceAt(prepareCase({ ...c, tolerance: 1e-12 }, frequency), frequency);
    const n = c.loops.length;
    for (let a = 0; a < n; a++) {
      const own = (mine: Float64Array, other: Float64Array, stated: Float64Array, told: Float64Array) => {
        const at = a * n + a;
        const scale = other[at] === 0 ? 1 : Math.abs(other[at]);
        return Math.abs(mine[at] - other[at]) / scale / (stated[a] + told[a]);
      };
      const r = own(z.resistance, y.resistance, z.resistanceError, y.resistanceError);
      const l = own(z.inductance, y.inductance, z.inductanceError, y.inductanceError);
      expect(Math.max(r, l), `layout ${k}, loop ${a}, ${frequency} Hz`).toBeLessThanOrEqual(1);
      worst.own = Math.max(worst.own, r, l);
    }
    if (n < 2) continue;
    const difference = Math.abs(z.inductance[1] - y.inductance[1]);
    const scale = Math.sqrt(y.inductance[0] * y.inductance[3]);
    worst.mutual = Math.max(worst.mutual, difference / scale / (z.mutualError[1] + y.mutualError[1]));
    mutual++;
  }
  console.log(
    `seed ${seed}: worst over stated ${worst.own.toPrecision(2)}, mutual ${worst.mutual.toPrecision(2)}`,
  );
  expect(mutual).toBeGreaterThan(layouts / 4);
  expect(worst.mutual).toBeLessThanOrEqual(1);
  expect(worst.mutual).toBeGreaterThan(0);
});
