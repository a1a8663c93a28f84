/** The table over frequency is the solutions one by one, put into series. */
import { expect, it } from 'vitest';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import { frequencyTable } from '../../src/sweep/index.ts';
import { caseOf, loop, wire } from './case-builder.ts';

it('every series holds what each frequency alone gives', async () => {
  const wires = [wire(0, 0, 1e-3), wire(2.2e-3, 0, 1e-3), wire(1e-3, 2.4e-3, 0.8e-3), wire(9e-3, 0, 1e-3)];
  const loops = [loop([0], [2]), loop([1, 3], [2])];
  const frequencies = [0, 50, 3e4, 2e7];
  const c = caseOf(wires, loops, { frequencies });
  const table = await frequencyTable(c);
  expect(table.reached).toBe(true);
  expect(table.mutual.map(({ between }) => between)).toEqual([loops.map(({ name }) => name)]);
  frequencies.forEach((f, i) => {
    const z = impedanceAt(prepareCase(c, f), f);
    const near = (mine: number, alone: number, scale = Math.abs(alone)) =>
      // orders may be a little higher in a sweep
      expect(Math.abs(mine - alone)).toBeLessThanOrEqual(2e-8 * scale);
    table.loops.forEach((series, k) => {
      near(series.resistance[i], z.resistance[3 * k]);
      near(series.inductance[i], z.inductance[3 * k]);
      near(series.resistance[i] - series.resistanceDc, series.resistanceIncrement[i], series.resistance[i]);
      expect(series.resistanceError[i]).toBeGreaterThan(0);
      expect(series.inductanceError[i]).toBeGreaterThan(0);
      expect(Math.max(series.resistanceError[i], series.inductanceError[i])).toBeLessThanOrEqual(1e-8);
    });
    const [mutual] = table.mutual;
    near(mutual.resistance[i], z.resistance[1], Math.sqrt(z.resistance[0] * z.resistance[3]));
    near(mutual.inductance[i], z.inductance[1], Math.sqrt(z.inductance[0] * z.inductance[3]));
    expect(mutual.error[i]).toBeGreaterThan(0);
    expect(mutual.error[i]).toBeLessThan(1e-8);
    for (const { loop: name, wire: of, re, im } of table.currents) {
      const k = loops.findIndex((l) => l.name === name);
      const w = wires.findIndex((x) => x.name === of);
      near(re[i], z.currents.re[4 * k + w], 1);
      near(im[i], z.currents.im[4 * k + w], 1);
    }
  });
  // wires 0 and 2 in the first loop, 1, 3 and 2 in the second, and 1 and 3 swirl in the first
  expect(table.currents.length).toBe(7);
});
