/**
 * Multipoles of all bodies for given line currents, with the currents of bonded bodies solved alongside.
 *
 * Each harmonic obeys B = -G C. With y = B/sqrt(G) the system (1 + s T s) y = -s C I, s = sqrt(G), is complex
 * symmetric under the pairing of +n with -n and well conditioned; free currents enter through a feedback
 * delta(a0) linear in the order 0 of the multipole field. Method: GMRES without preconditioner.
 * Where it stagnates above the residual wanted, a factorisation (dense.ts) takes over if it fits in memory.
 */
import { type ComplexVector, gmres, type KrylovSpace } from '../complex/index.ts';
import { MAX_DENSE, solveDense } from './dense.ts';
import type { Layout } from './layout.ts';
import { addMonopoleFields, orderZero } from './monopole.ts';
import { type ActiveModes, type ProductScratch, translate } from './product.ts';

/** Writes the free part of the currents [A] caused by the multipoles' order 0 at each body. */
export type CurrentFeedback = (orderZero: ComplexVector, delta: ComplexVector) => void;

export interface MultipoleSystem {
  readonly layout: Layout;
  readonly active: ActiveModes;
  /** sqrt(G) of each active mode */
  readonly roots: ComplexVector;
  /** undefined when all currents are given */
  readonly feedback: CurrentFeedback | undefined;
  readonly scratch: ProductScratch;
}

export function zeros(length: number): ComplexVector {
  return { re: new Float64Array(length), im: new Float64Array(length) };
}

/** out = s x for both signs; may alias. */
export function scaleByRoots(roots: ComplexVector, x: ComplexVector, out: ComplexVector): void {
  const modes = roots.re.length;
  for (let k = 0; k < 2 * modes; k++) {
    const l = k < modes ? k : k - modes;
    const re = roots.re[l] * x.re[k] - roots.im[l] * x.im[k];
    out.im[k] = roots.re[l] * x.im[k] + roots.im[l] * x.re[k];
    out.re[k] = re;
  }
}

/** The operator v -> v + s T s v (+ s C delta(C^T s v) with free currents). */
export function multipoleOperator(system: MultipoleSystem): (v: ComplexVector, out: ComplexVector) => void {
  const { layout, active, roots, feedback, scratch } = system;
  const bodies = active.orders.length;
  const outgoing = zeros(2 * active.offsets[bodies]);
  const a0 = zeros(bodies);
  const delta = zeros(bodies);
  return (v, out) => {
    scaleByRoots(roots, v, outgoing);
    translate(layout, active, outgoing, out, scratch);
    if (feedback !== undefined) {
      orderZero(layout, active, outgoing, a0);
      feedback(a0, delta);
      addMonopoleFields(layout, active, delta, out);
    }
    scaleByRoots(roots, out, out);
    for (let k = 0; k < v.re.length; k++) {
      out.re[k] += v.re[k];
      out.im[k] += v.im[k];
    }
  };
}

export interface MultipoleSolution {
  /** y: outgoing amplitude over sqrt(G) */
  readonly scaled: ComplexVector;
  /** outgoing amplitudes */
  readonly outgoing: ComplexVector;
  /** order 0 of the multipole field at each body */
  readonly orderZero: ComplexVector;
  /** A y - b, measured: what the quadratic estimate needs */
  readonly residual: ComplexVector;
  /** [1] operator products; 0 for a factorisation */
  readonly iterations: number;
  /** [1] estimate of the norm of the inverse of the system */
  readonly inverseNorm: number;
}

/** Right side -s C I for given currents. */
export function multipoleRightSide(system: MultipoleSystem, currents: ComplexVector): ComplexVector {
  const { layout, active, roots } = system;
  const b = zeros(2 * active.offsets[active.orders.length]);
  addMonopoleFields(layout, active, currents, b);
  scaleByRoots(roots, b, b);
  for (let k = 0; k < b.re.length; k++) {
    b.re[k] = -b.re[k];
    b.im[k] = -b.im[k];
  }
  return b;
}

/** Most products of one solution: systems of this kind need 5 to 60. */
const MAX_ITERATIONS = 200;

/**
 * @param currents [A] of each body, before feedback
 * @param relativeResidual [1] wanted
 */
export function solveMultipoles(
  system: MultipoleSystem,
  currents: ComplexVector,
  relativeResidual: number,
  space: KrylovSpace,
  maxIterations = MAX_ITERATIONS,
): MultipoleSolution {
  const apply = multipoleOperator(system);
  const b = multipoleRightSide(system, currents);
  const scaled = zeros(b.re.length);
  const krylov = gmres(apply, b, scaled, space, { relativeResidual, maxIterations });
  if (!krylov.converged && b.re.length <= MAX_DENSE) return solveMultipolesDense(system, currents);
  return finishSolution(system, apply, b, scaled, krylov.iterations, krylov.inverseNorm);
}

/**
 * The same by a dense factorisation: the fallback, and the cross-check of the iteration.
 *
 * @param currents [A] of each body, before feedback
 */
export function solveMultipolesDense(system: MultipoleSystem, currents: ComplexVector): MultipoleSolution {
  const apply = multipoleOperator(system);
  const b = multipoleRightSide(system, currents);
  const { solution, inverseNorm } = solveDense(apply, b);
  return finishSolution(system, apply, b, solution, 0, inverseNorm);
}

/** Outgoing amplitudes, order 0 and the measured residual of a solution y. */
function finishSolution(
  system: MultipoleSystem,
  apply: (v: ComplexVector, out: ComplexVector) => void,
  b: ComplexVector,
  scaled: ComplexVector,
  iterations: number,
  inverseNorm: number,
): MultipoleSolution {
  const { layout, active, roots } = system;
  const residual = zeros(b.re.length);
  apply(scaled, residual);
  for (let k = 0; k < b.re.length; k++) {
    residual.re[k] -= b.re[k];
    residual.im[k] -= b.im[k];
  }
  const outgoing = zeros(b.re.length);
  scaleByRoots(roots, scaled, outgoing);
  const a0 = zeros(active.orders.length);
  orderZero(layout, active, outgoing, a0);
  return { scaled, outgoing, orderZero: a0, residual, iterations, inverseNorm };
}
