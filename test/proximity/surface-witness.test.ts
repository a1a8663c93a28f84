/**
 * A second witness of every solution: the field of all other bodies at a body's surface, summed in closed form (no
 * translation table, no cut), taken apart into harmonics by a discrete Fourier transform.
 * Orders kept must agree with the tables (B = -G C); orders cut must carry less than the stated error.
 */
import { describe, expect, it } from 'vitest';
import { inductanceError } from '../../src/loops/error-estimate.ts';
import { excite, frequencyPoint } from '../../src/loops/excitation.ts';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import { incomingField } from '../../src/proximity/index.ts';
import { solidReflections } from '../../src/skin/index.ts';
import { seeded } from '../loops/case-builder.ts';
import { randomLayout } from '../loops/random-layouts.ts';

const SEED = 977;
const LAYOUTS = 60;

/** Harmonics 1..most of the incoming field at body b, both signs: c_n of exp(i n theta), interleaved. */
function harmonics(field: Parameters<typeof incomingField>[0], b: number, most: number) {
  const points = 4 * most;
  const samples = Array.from({ length: points }, (_, k) =>
    incomingField(field, b, (2 * Math.PI * k) / points),
  );
  const at = (n: number) => {
    let re = 0;
    let im = 0;
    samples.forEach(([vr, vi], k) => {
      const t = (-2 * Math.PI * ((n * k) % points)) / points;
      re += vr * Math.cos(t) - vi * Math.sin(t);
      im += vr * Math.sin(t) + vi * Math.cos(t);
    });
    return { re: re / points, im: im / points };
  };
  return at;
}

describe(`surface witness, seed ${SEED}`, () => {
  it(`agrees with the tables and with the stated error over ${LAYOUTS} layouts`, () => {
    const random = seeded(SEED);
    let worstTable = 0;
    let worstTail = 0;
    for (let layout = 0; layout < LAYOUTS; layout++) {
      const { case: c, frequency } = randomLayout(random);
      const prepared = prepareCase({ ...c, tolerance: 1e-6 }, frequency);
      const { orders } = impedanceAt(prepared, frequency);
      if (Math.max(...orders) > 150) continue;
      const omega = 2 * Math.PI * frequency;
      const point = frequencyPoint(prepared, omega, orders);
      const e = excite(prepared, point, 0, 1e-12);
      const { active } = point.system;
      const modes = active.offsets[orders.length];
      const field = {
        layout: prepared.layout,
        active,
        outgoing: e.multipoles.outgoing,
        currents: e.currents,
      };
      let cutRe = 0;
      let cutIm = 0;
      let scale = 0;
      for (let k = 0; k < modes; k++)
        scale = Math.max(scale, Math.hypot(e.multipoles.scaled.re[k], e.multipoles.scaled.im[k]));
      for (let b = 0; b < orders.length; b++) {
        const p = orders[b];
        const top = 2 * p + 4;
        const at = harmonics(field, b, top);
        const gr = new Float64Array(top);
        const gi = new Float64Array(top);
        solidReflections(c.wires[b], omega, top, gr, gi);
        for (let n = 1; n <= top; n++) {
          const plus = at(n);
          const minus = at(-n);
          const root = Math.sqrt(n);
          if (n <= p) {
            // -G C sqrt(n) against the outgoing amplitude
            const k = active.offsets[b] + n - 1;
            const br = -(gr[n - 1] * plus.re - gi[n - 1] * plus.im) * root;
            const bi = -(gr[n - 1] * plus.im + gi[n - 1] * plus.re) * root;
            const { outgoing } = e.multipoles;
            // Table entries are dropped by what they weigh in the impedance, which falls like exp(-alpha n).
            const weight = Math.exp(-prepared.alpha[b] * n) / scale;
            worstTable = Math.max(worstTable, weight * Math.hypot(br - outgoing.re[k], bi - outgoing.im[k]));
          } else {
            // energy 2 G r_+ r_- n of an order left out
            const pr = plus.re * minus.re - plus.im * minus.im;
            const pi = plus.re * minus.im + plus.im * minus.re;
            cutRe += 2 * n * (gr[n - 1] * pr - gi[n - 1] * pi);
            cutIm += 2 * n * (gr[n - 1] * pi + gi[n - 1] * pr);
          }
        }
      }
      const stated = inductanceError(point, prepared.alpha, e);
      worstTail = Math.max(worstTail, Math.abs(cutRe) / stated.re, Math.abs(cutIm) / stated.im);
    }
    console.log(
      `seed ${SEED}: tables off by ${worstTable.toExponential(1)}, energy cut over stated ${worstTail.toPrecision(2)}`,
    );
    // 1e-12 is the residual asked of the iteration; sums of some hundred rounded terms come on top.
    expect(worstTable).toBeLessThan(5e-12);
    expect(worstTail).toBeLessThan(1);
  });
});
