/**
 * A solid round conductor alone, and the one number that its internal field depends on: q = k a with
 * k^2 = j omega mu sigma. All ratios of interest are functions of q^2 = j T, so the real T stands for q and no
 * square root is taken.
 */
import { MU0 } from '../model/index.ts';
import { Problem } from '../problem.ts';

/** A solid round conductor; a `Wire` of the model is one. */
export interface RoundWire {
  /** [m] > 0 */
  readonly radius: number;
  /** [S/m] > 0; Infinity for a perfect conductor */
  readonly conductivity: number;
  /** [1] >= 1 */
  readonly relativePermeability: number;
}

/** [H/m] permeability of the metal. */
export function permeability(wire: RoundWire): number {
  return MU0 * wire.relativePermeability;
}

/**
 * [1] T = omega mu sigma a^2 = |q|^2 = 2 (a/delta)^2; Infinity for a perfect conductor, at 0 Hz too (its internal
 * field is zero at any frequency, the limit of a growing conductivity).
 * @param omega [rad/s] >= 0
 * @throws Problem DOMAIN for an angular frequency below zero or not finite, or a wire outside its domain
 */
export function squaredArgument(wire: RoundWire, omega: number): number {
  const { radius, conductivity, relativePermeability } = wire;
  if (!(omega >= 0 && omega < Infinity)) {
    throw new Problem('DOMAIN', `angular frequency ${omega} rad/s; it must be finite and not below zero`);
  }
  if (!(radius > 0 && radius < Infinity && conductivity > 0 && relativePermeability >= 1)) {
    throw new Problem(
      'DOMAIN',
      `wire of radius ${radius} m, conductivity ${conductivity} S/m, relative permeability ${relativePermeability}; ` +
        'radius and conductivity must be above zero, the permeability at least 1',
    );
  }
  if (conductivity === Infinity) return Infinity;
  return omega * permeability(wire) * conductivity * radius * radius;
}
