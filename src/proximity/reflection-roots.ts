/** Square roots of the reflections of all active modes: the scaling that makes the system complex symmetric. */
import type { ComplexVector } from '../complex/index.ts';
import { type RoundWire, solidReflections } from '../skin/index.ts';
import type { ActiveModes } from './product.ts';

/**
 * sqrt(G_n) of each active mode (one sign; the other is the same). Either branch serves: a mode's sign cancels.
 *
 * @param omega [rad/s] >= 0
 */
export function reflectionRoots(
  bodies: readonly RoundWire[],
  omega: number,
  active: ActiveModes,
): ComplexVector {
  const modes = active.offsets[bodies.length];
  const re = new Float64Array(modes);
  const im = new Float64Array(modes);
  for (let b = 0; b < bodies.length; b++) {
    const from = active.offsets[b];
    const same = earlierTwin(bodies, b);
    if (same >= 0 && active.orders[same] >= active.orders[b]) {
      re.copyWithin(from, active.offsets[same], active.offsets[same] + active.orders[b]);
      im.copyWithin(from, active.offsets[same], active.offsets[same] + active.orders[b]);
      continue;
    }
    const end = active.offsets[b + 1];
    solidReflections(bodies[b], omega, end - from, re.subarray(from, end), im.subarray(from, end));
    for (let k = from; k < end; k++) squareRoot(re, im, k);
  }
  return { re, im };
}

/** Most bodies looked at for one of the same make: bundles repeat their neighbours. */
const TWIN_REACH = 8;

function earlierTwin(bodies: readonly RoundWire[], b: number): number {
  const me = bodies[b];
  for (let k = b - 1; k >= Math.max(0, b - TWIN_REACH); k--) {
    const other = bodies[k];
    if (
      other.radius === me.radius &&
      other.conductivity === me.conductivity &&
      other.relativePermeability === me.relativePermeability
    ) {
      return k;
    }
  }
  return -1;
}

/** Principal square root in place, both parts without cancellation. */
function squareRoot(re: Float64Array, im: Float64Array, k: number): void {
  const x = re[k];
  const y = im[k];
  if (x === 0 && y === 0) return;
  const size = Math.hypot(x, y);
  if (x >= 0) {
    const s = Math.sqrt((size + x) / 2);
    re[k] = s;
    im[k] = y / (2 * s);
  } else {
    const s = Math.sqrt((size - x) / 2) * (y < 0 ? -1 : 1);
    re[k] = y / (2 * s);
    im[k] = s;
  }
}
