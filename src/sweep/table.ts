/** The result of a frequency sweep: plain data, per metre of run, flat arrays in the order of `frequency`. */
import type { Caution } from '../problem.ts';

/** One loop over frequency; every array has one entry per frequency. */
export interface LoopSeries {
  readonly name: string;
  /** [ohm/m] */
  readonly resistance: Float64Array;
  /** [H/m] */
  readonly inductance: Float64Array;
  /** [ohm/m] R - R_dc, kept to full relative accuracy where it is small */
  readonly resistanceIncrement: Float64Array;
  /** [ohm/m] direct-current resistance */
  readonly resistanceDc: number;
  /** [1] estimated relative error of R, not below the true one; [ohm/m] where R is zero */
  readonly resistanceError: Float64Array;
  /** [1] estimated relative error of L, not below the true one */
  readonly inductanceError: Float64Array;
}

/** The mutual term of two loops over frequency. */
export interface MutualSeries {
  readonly between: readonly [string, string];
  /** [ohm/m] */
  readonly resistance: Float64Array;
  /** [H/m] */
  readonly inductance: Float64Array;
  /** [1] estimated error relative to sqrt(|Z_ii Z_jj|) */
  readonly error: Float64Array;
}

/** Currents of all wires for one ampere in one loop and none in the others. */
export interface CurrentSeries {
  readonly loop: string;
  readonly wire: string;
  /** [A/A] */
  readonly re: Float64Array;
  /** [A/A] */
  readonly im: Float64Array;
}

export interface FrequencyTable {
  readonly title: string;
  /** [1] wanted relative error */
  readonly tolerance: number;
  /** false when the tolerance was not met somewhere; the errors say where */
  readonly reached: boolean;
  /** [Hz] */
  readonly frequency: Float64Array;
  readonly loops: readonly LoopSeries[];
  /** one for each pair of loops, in file order */
  readonly mutual: readonly MutualSeries[];
  /** one for each loop and each wire that carries current in it */
  readonly currents: readonly CurrentSeries[];
  readonly cautions: readonly Caution[];
}
