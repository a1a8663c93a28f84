/** Plain data of one case, in SI units: what `input` makes of a file and what the solver takes. */
import type { Caution } from '../problem.ts';

/** A solid round conductor parallel to z. */
export interface Wire {
  readonly name: string;
  /** [m] centre */
  readonly x: number;
  /** [m] centre */
  readonly y: number;
  /** [m] radius of the metal, > 0 */
  readonly radius: number;
  /** [S/m] at the wire's temperature, > 0; Infinity for a perfect conductor (no internal field) */
  readonly conductivity: number;
  /** [1] relative permeability, >= 1 */
  readonly relativePermeability: number;
  /** name of the material, for messages and `--detail` */
  readonly material: string;
  /** [°C] temperature of the metal */
  readonly temperature: number;
  /** [m] thickness of the insulation, >= 0 */
  readonly insulation: number;
}

/** Lumped parts of a loop beside the run itself. */
export interface LumpedExtra {
  /** [ohm] >= 0 */
  readonly resistance: number;
  /** [H] >= 0 */
  readonly inductance: number;
}

/** A go and return path; wires are given by their index in `Case.wires`. */
export interface Loop {
  readonly name: string;
  /** members are bonded (same volt drop), or in series one after the other */
  readonly go: readonly number[];
  readonly return: readonly number[];
  /** true: the members of `go` carry the same current one after the other, those of `return` likewise */
  readonly series: boolean;
  readonly extra: LumpedExtra;
}

/** A whole case. Wires in no loop and no bonded group carry no net current. */
export interface Case {
  readonly title: string;
  /** [m] of the run; undefined when only results per metre are wanted */
  readonly length: number | undefined;
  readonly wires: readonly Wire[];
  readonly loops: readonly Loop[];
  /** groups of wire indices joined at both ends but in no loop: same volt drop, no net current together */
  readonly bonded: readonly (readonly number[])[];
  /** [Hz] ascending, each >= 0, none twice */
  readonly frequencies: readonly number[];
  /** [1] wanted relative error of R and of L */
  readonly tolerance: number;
  /** what was assumed while reading */
  readonly cautions: readonly Caution[];
}
