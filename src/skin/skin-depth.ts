/** Skin depth of a metal. */

import { MU0 } from '../model/index.ts';
import { Problem } from '../problem.ts';
import type { RoundWire } from './round-wire.ts';

/** What the skin depth asks of a wire. */
export type SkinMetal = Pick<RoundWire, 'conductivity' | 'relativePermeability'>;

/**
 * [m] delta = sqrt(2 / (omega mu sigma)), where the current density of a plane surface has fallen by e.
 * Infinity at 0 Hz; 0 for a perfect conductor.
 * @param omega [rad/s] >= 0
 * @throws Problem DOMAIN for a frequency below zero, a conductivity not above zero or a permeability below 1
 */
export function skinDepth(metal: SkinMetal, omega: number): number {
  const { conductivity, relativePermeability } = metal;
  if (!(omega >= 0 && omega < Infinity && conductivity > 0 && relativePermeability >= 1)) {
    throw new Problem(
      'DOMAIN',
      `skin depth at ${omega} rad/s, conductivity ${conductivity} S/m, relative permeability ${relativePermeability}; ` +
        'the frequency must be finite and not below zero, the conductivity above zero, the permeability at least 1',
    );
  }
  if (conductivity === Infinity) return 0;
  return Math.sqrt(2 / (omega * MU0 * relativePermeability * conductivity));
}
