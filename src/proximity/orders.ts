/**
 * Orders of the multipole expansions: predicted from the geometry and the reflections, and raised after a solution.
 *
 * In a body whose coefficients fall like exp(-n alpha) the energy beyond order p is about
 * |G_p| exp(-2 p alpha) / (exp(2 alpha) - 1), in the resistance with a factor of n more (perfect conductors:
 * d/da of exp(-2 n alpha)). The prediction only sets the start: the tail measured in the solution decides.
 */
import { type RoundWire, solidReflections } from '../skin/index.ts';

/** [1] Highest order of any body: table memory bounds the pairs (layout.ts), this bounds a single wire. */
export const MAX_ORDER = 4000;

/** Least order: a dipole and a quadrupole, so that a tail can be seen. */
const MIN_ORDER = 2;

/** [1] share of the tolerance that the predicted tail may take */
const PREDICTED_SHARE = 0.03;

/** [1] sum over k >= 1 of (1 + k/p) exp(-2 alpha k): what follows order p when a factor n goes along. */
export function tailFactor(alpha: number, p: number): number {
  const q = Math.exp(-2 * alpha);
  const left = -Math.expm1(-2 * alpha);
  return q / left + q / (left * left * p);
}

/**
 * Order of each body at one frequency.
 *
 * @param omega [rad/s]
 * @param tolerance [1] wanted relative error
 */
export function predictedOrders(
  bodies: readonly RoundWire[],
  alpha: Float64Array,
  omega: number,
  tolerance: number,
): Int32Array {
  const orders = new Int32Array(bodies.length);
  for (let b = 0; b < bodies.length; b++) orders[b] = predictedOrder(bodies[b], alpha[b], omega, tolerance);
  return orders;
}

function predictedOrder(body: RoundWire, alpha: number, omega: number, tolerance: number): number {
  if (alpha === Number.POSITIVE_INFINITY) return MIN_ORDER;
  const wanted = Math.log(tolerance * PREDICTED_SHARE);
  let low = MIN_ORDER;
  let high = MAX_ORDER;
  // Upper bound with a full reflection, then bisection with the actual one: it falls with n.
  const level = (n: number, g: number) => Math.log(g * n * tailFactor(alpha, n)) - 2 * alpha * n;
  const re = new Float64Array(MAX_ORDER);
  const im = new Float64Array(MAX_ORDER);
  while (low < high && level(low, 1) > wanted && low * 2 < MAX_ORDER) low *= 2;
  high = Math.min(MAX_ORDER, low);
  low = MIN_ORDER;
  solidReflections(body, omega, high, re.subarray(0, high), im.subarray(0, high));
  while (low < high) {
    const n = (low + high) >> 1;
    if (level(n, Math.hypot(re[n - 1], im[n - 1])) > wanted) low = n + 1;
    else high = n;
  }
  return low;
}
