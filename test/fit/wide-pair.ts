/**
 * Exact impedance of go and return wires so far apart that each keeps its round current: the test oracle of
 * fits and netlists. One wire inside: Z(s)/R_dc = q I_0(q) / (2 I_1(q)), q^2 = s mu sigma a^2, by the
 * continued fraction of I_1/I_0 (DLMF 10.33.1): Z/R_dc = 1 + r_1/2 with r_{n-1} = q^2 / (2 n + r_n).
 * Outside: L = (mu0/pi) ln(D/a). Needs q^2 alone, so it holds for any complex s off the poles, and for real
 * frequencies.
 */
import { Complex } from 'complex.js';
import { fitFrequencies, type LoopSamples } from '../../src/fit/index.ts';

/** Two equal wires, in SI units. */
export interface WidePair {
  /** [m] */
  readonly radius: number;
  /** [S/m] */
  readonly conductivity: number;
  /** [m] */
  readonly spacing: number;
  /** [1] */
  readonly relativePermeability?: number;
}

const MU0 = 4e-7 * Math.PI;

/** [ohm/m] both wires at 0 Hz */
export function pairResistanceDc(pair: WidePair): number {
  return 2 / (pair.conductivity * Math.PI * pair.radius ** 2);
}

/** [ohm/m] at a complex s [1/s] */
export function pairImpedance(pair: WidePair, s: Complex): Complex {
  const { radius, conductivity, spacing, relativePermeability = 1 } = pair;
  const q2 = s.mul(MU0 * relativePermeability * conductivity * radius ** 2);
  // r = q2 / (2 n + r), from where 2 n is well above |q|, in plain numbers for speed
  let re = 0;
  let im = 0;
  for (let n = Math.ceil(40 + 2 * Math.sqrt(q2.abs())); n >= 2; n--) {
    const below = (2 * n + re) ** 2 + im * im;
    const next = (q2.re * (2 * n + re) + q2.im * im) / below;
    im = (q2.im * (2 * n + re) - q2.re * im) / below;
    re = next;
  }
  const inside = new Complex(1 + re / 2, im / 2).mul(pairResistanceDc(pair));
  return inside.add(s.mul((MU0 / Math.PI) * Math.log(spacing / radius)));
}

/** R [ohm/m] and L [H/m] of pairs in series */
export function seriesOfPairs(pairs: readonly WidePair[], frequency: number): { r: number; l: number } {
  const w = 2 * Math.PI * frequency;
  const z = pairs.reduce((sum, pair) => sum.add(pairImpedance(pair, new Complex(0, w))), new Complex(0, 0));
  return { r: z.re, l: z.im / w };
}

/** Samples of pairs in series at the frequencies that a fit asks for. */
export function pairSamples(pairs: readonly WidePair[], from: number, to: number): LoopSamples {
  const { frequency } = fitFrequencies(from, to);
  const values = Array.from(frequency, (f) => seriesOfPairs(pairs, f));
  return {
    frequency,
    resistance: Float64Array.from(values, ({ r }) => r),
    inductance: Float64Array.from(values, ({ l }) => l),
    resistanceDc: pairs.reduce((sum, pair) => sum + pairResistanceDc(pair), 0),
  };
}

/** Copper, 1 mm diameter, 20 mm apart. */
export const THIN_COPPER: WidePair = { radius: 0.5e-3, conductivity: 58e6, spacing: 20e-3 };
export const THICK_COPPER: WidePair = { radius: 5e-3, conductivity: 58e6, spacing: 80e-3 };
export const HAIR_COPPER: WidePair = { radius: 0.05e-3, conductivity: 58e6, spacing: 20e-3 };
/** Linear permeability 200: R rises 14 times as early as in copper of that conductivity. */
export const STEEL: WidePair = { radius: 2e-3, conductivity: 7e6, spacing: 50e-3, relativePermeability: 200 };
