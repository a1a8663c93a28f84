/** The stated error of R and L of each loop: truncation, iteration and rounding, each an upper estimate. */
import { norm2 } from '../complex/index.ts';
import { truncationTail } from '../proximity/index.ts';
import type { Excitation, FrequencyPoint } from './excitation.ts';

/** What may be wrong with the complex inductance of one loop, in units of mu0/(4 pi). */
export interface InductanceError {
  /** [1] of the real part */
  readonly re: number;
  /** [1] of the imaginary part */
  readonly im: number;
  /** [1] share of each body in the truncation of the real and of the imaginary part */
  readonly tailRe: Float64Array;
  readonly tailIm: Float64Array;
}

/**
 * [1] The first-order tail leaves out the coupling among the orders cut; over random layouts (radii 10:1, gaps
 * of 1 %) the true error stays below it times this factor (test/loops/honest-error.test.ts prints the worst).
 */
const COUPLING = 3;

/** [1] rounding of a sum of a few hundred terms in units of its largest */
const ROUNDING = 1e-14;

export function inductanceError(
  point: FrequencyPoint,
  alpha: Float64Array,
  excitation: Excitation,
): InductanceError {
  const { multipoles } = excitation;
  const tail = truncationTail(multipoles.scaled, point.system.active, alpha);
  const residual = norm2(multipoles.residual);
  const solver = multipoles.inverseNorm * residual * residual;
  const size = norm2(multipoles.scaled);
  const rounding = ROUNDING * size * size;
  const sum = (v: Float64Array) => v.reduce((s, x) => s + x, 0);
  return {
    re: COUPLING * sum(tail.re) + solver + rounding,
    im: COUPLING * sum(tail.im) + solver + rounding,
    tailRe: tail.re.map((x) => COUPLING * x),
    tailIm: tail.im.map((x) => COUPLING * x),
  };
}
