/** The iteration against a dense factorisation, and the fallback where the iteration is cut short. */
import { describe, expect, it } from 'vitest';
import { KrylovSpace } from '../../src/complex/index.ts';
import { frequencyPoint } from '../../src/loops/excitation.ts';
import { prepareCase } from '../../src/loops/index.ts';
import { solveMultipoles, solveMultipolesDense } from '../../src/proximity/index.ts';
import { seeded } from '../loops/case-builder.ts';
import { randomLayout } from '../loops/random-layouts.ts';

const SEED = 55;

describe(`dense solution, seed ${SEED}`, () => {
  it('GMRES and LU agree; a cut iteration falls back', () => {
    const random = seeded(SEED);
    let tried = 0;
    let condition = 0;
    for (let k = 0; k < 40; k++) {
      const { case: c, frequency } = randomLayout(random);
      const prepared = prepareCase({ ...c, tolerance: 1e-6 }, frequency);
      if (prepared.layout.offsets[c.wires.length] > 200) continue;
      tried++;
      const point = frequencyPoint(prepared, 2 * Math.PI * frequency, prepared.layout.orders);
      const currents = {
        re: prepared.circuit.directCurrents.slice(0, c.wires.length),
        im: new Float64Array(c.wires.length),
      };
      const iterated = solveMultipoles(point.system, currents, 1e-13, new KrylovSpace());
      const dense = solveMultipolesDense(point.system, currents);
      const cut = solveMultipoles(point.system, currents, 1e-13, new KrylovSpace(), 1);
      const size = Math.max(...dense.scaled.re.map(Math.abs), ...dense.scaled.im.map(Math.abs));
      for (const s of [iterated, cut]) {
        const off = Math.max(
          ...s.scaled.re.map((v, i) =>
            Math.hypot(v - dense.scaled.re[i], s.scaled.im[i] - dense.scaled.im[i]),
          ),
        );
        expect(off).toBeLessThan(1e-11 * size);
      }
      if (iterated.iterations > 1) expect(cut.iterations).toBe(0);
      // the 1-norm estimate is above the 2-norm estimate on the space searched, within the square root of the size
      expect(iterated.inverseNorm).toBeLessThan(dense.inverseNorm * 1.5);
      condition = Math.max(condition, dense.inverseNorm);
    }
    console.log(`seed ${SEED}: ${tried} layouts, largest norm of the inverse ${condition.toPrecision(3)}`);
    expect(tried).toBeGreaterThan(10);
  });
});
