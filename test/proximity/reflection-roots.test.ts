/** Roots of the reflections: their squares are G_n of each wire, whatever stands beside it in the list. */
import { expect, it } from 'vitest';
import { activeModes, reflectionRoots } from '../../src/proximity/index.ts';
import { solidReflection } from '../../src/skin/index.ts';
import { wire } from '../loops/case-builder.ts';

it('the square of each root is the reflection of its own wire and order', () => {
  const steel = { conductivity: 7e6, relativePermeability: 80 };
  const wires = [
    wire(0, 0, 1e-3),
    // the same make with more, as many and fewer orders
    wire(1, 0, 1e-3),
    wire(2, 0, 1e-3),
    // alike but for one property
    wire(3, 0, 1e-3, { relativePermeability: 80 }),
    wire(4, 0, 1e-3, steel),
    wire(5, 0, 1.1e-3),
    wire(6, 0, 1e-3, { conductivity: Number.POSITIVE_INFINITY }),
    wire(7, 0, 1e-3, steel),
  ];
  const active = activeModes(Int32Array.of(6, 12, 3, 3, 5, 2, 3, 9));
  for (const omega of [10, 3e4, 1e7, 1e11]) {
    const { re, im } = reflectionRoots(wires, omega, active);
    wires.forEach((w, b) => {
      for (let n = 1; n <= active.orders[b]; n++) {
        const k = active.offsets[b] + n - 1;
        const g = solidReflection(w, omega, n);
        const apart = Math.hypot(re[k] ** 2 - im[k] ** 2 - g.re, 2 * re[k] * im[k] - g.im);
        expect(apart / g.abs(), `wire ${b}, order ${n}, ${omega} rad/s`).toBeLessThan(4e-15);
      }
    });
  }
});
