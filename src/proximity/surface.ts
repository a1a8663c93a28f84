/**
 * The field that arrives at the surface of a body from all others, summed in closed form: no translation table and no
 * cut at the body's own order. Against the incoming amplitudes of a solution it is a witness of truncation.
 */
import type { ComplexVector } from '../complex/index.ts';
import type { Layout } from './layout.ts';
import type { ActiveModes } from './product.ts';

export interface SurfaceField {
  readonly layout: Layout;
  readonly active: ActiveModes;
  /** scaled outgoing amplitudes, as in a solution */
  readonly outgoing: ComplexVector;
  /** [A] of each body */
  readonly currents: ComplexVector;
}

/**
 * Vector potential from all other bodies at angle theta of body b's surface, in units of mu0/(4 pi) per ampere.
 *
 * @param theta [rad]
 * @returns [re, im]; logarithms of currents are in metres, so only its variation along a surface has a meaning
 */
export function incomingField(field: SurfaceField, b: number, theta: number): [number, number] {
  const { layout, active, outgoing, currents } = field;
  const modes = active.offsets[active.orders.length];
  const here = layout.circles[b];
  const x = here.x + here.radius * Math.cos(theta);
  const y = here.y + here.radius * Math.sin(theta);
  let sumRe = 0;
  let sumIm = 0;
  for (let j = 0; j < layout.circles.length; j++) {
    if (j === b) continue;
    const there = layout.circles[j];
    const wx = x - there.x;
    const wy = y - there.y;
    const d2 = wx * wx + wy * wy;
    sumRe -= currents.re[j] * Math.log(d2);
    sumIm -= currents.im[j] * Math.log(d2);
    // (a/w)^n for mode -n, its conjugate for +n
    const ur = (there.radius * wx) / d2;
    const ui = (-there.radius * wy) / d2;
    let pr = 1;
    let pi = 0;
    for (let n = 1; n <= active.orders[j]; n++) {
      const t = pr * ur - pi * ui;
      pi = pr * ui + pi * ur;
      pr = t;
      const plus = active.offsets[j] + n - 1;
      const minus = plus + modes;
      const s = 1 / Math.sqrt(n);
      sumRe +=
        s * (pr * (outgoing.re[minus] + outgoing.re[plus]) - pi * (outgoing.im[minus] - outgoing.im[plus]));
      sumIm +=
        s * (pr * (outgoing.im[minus] + outgoing.im[plus]) + pi * (outgoing.re[minus] - outgoing.re[plus]));
    }
  }
  return [sumRe, sumIm];
}
