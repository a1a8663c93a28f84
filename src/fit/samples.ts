/**
 * What a fit starts from: one loop's R and L at sampled frequencies, and the plan of those frequencies.
 * Samples with an even index are fitted, those with an odd index lie between them and are only measured: a
 * model that swings between the points it was fitted to shows it there.
 */
import { Problem } from '../problem.ts';

/**
 * One loop over frequency; all arrays have one entry a frequency. Per metre or for a run, alike throughout.
 */
export interface LoopSamples {
  /** [Hz] > 0, ascending, an odd count of at least 3: even indices are fitted, odd ones measured only */
  readonly frequency: Float64Array;
  /** [ohm/m] >= 0 */
  readonly resistance: Float64Array;
  /** [H/m] > 0 */
  readonly inductance: Float64Array;
  /** [ohm/m] >= 0, kept exactly in the model */
  readonly resistanceDc: number;
}

/** Where to sample a loop for a fit. */
export interface FitPlan {
  /** [Hz] ascending: fitted ones and those between them in turn, both ends of the band fitted */
  readonly frequency: Float64Array;
  /** [Hz] every second one, from the first */
  readonly fitted: Float64Array;
  /** [Hz] the others, halfway on the log scale */
  readonly unseen: Float64Array;
}

/**
 * Fitted frequencies a decade. A section's R and L change over about a decade, and the error of a good fit
 * has two or three extremes a decade: at 10 points the worst value between points is within some per cent
 * of the worst at them.
 */
const FITTED_PER_DECADE = 10;
/**
 * A narrow band still needs more samples than the model has parameters: two figures a point for up to 12
 * sections.
 */
const LEAST_INTERVALS = 14;

/**
 * Frequencies at which to solve a loop before `fitSections`.
 * @param from [Hz] > 0
 * @param to [Hz] > from
 * @throws Problem DOMAIN for a band that is empty, starts at or below zero, or is not finite
 */
export function fitFrequencies(from: number, to: number): FitPlan {
  if (!(from > 0 && to > from && Number.isFinite(to))) {
    throw new Problem(
      'DOMAIN',
      `the band of a fit is ${from} Hz to ${to} Hz; it must start above 0 Hz and end above its start`,
    );
  }
  const decades = Math.log10(to / from);
  const intervals = Math.max(LEAST_INTERVALS, Math.ceil(FITTED_PER_DECADE * decades - 1e-9));
  const frequency = Float64Array.from(
    { length: 2 * intervals + 1 },
    (_, i) => from * (to / from) ** (i / (2 * intervals)),
  );
  frequency[2 * intervals] = to;
  return {
    frequency,
    fitted: frequency.filter((_, i) => i % 2 === 0),
    unseen: frequency.filter((_, i) => i % 2 === 1),
  };
}

/** @throws Problem DOMAIN naming the first sample that breaks the rules of `LoopSamples` */
export function checkSamples(samples: LoopSamples): void {
  const { frequency, resistance, inductance, resistanceDc } = samples;
  const count = frequency.length;
  if (count < 3 || count % 2 === 0 || resistance.length !== count || inductance.length !== count) {
    throw new Problem(
      'DOMAIN',
      `a fit got ${count} frequencies, ${resistance.length} resistances and ` +
        `${inductance.length} inductances; it needs an odd count of at least 3, alike for all (see fitFrequencies)`,
    );
  }
  if (!(resistanceDc >= 0 && Number.isFinite(resistanceDc))) {
    throw new Problem(
      'DOMAIN',
      `a fit got a DC resistance of ${resistanceDc}; it must be finite and not below zero`,
    );
  }
  for (let i = 0; i < count; i++) {
    const f = frequency[i];
    const rising = f > (i === 0 ? 0 : frequency[i - 1]);
    const r = resistance[i];
    const l = inductance[i];
    if (!(rising && r >= 0 && l > 0 && Number.isFinite(f + r + l))) {
      throw new Problem(
        'DOMAIN',
        `sample ${i} of a fit is ${f} Hz, R = ${r}, L = ${l}; ` +
          'frequencies must rise from above 0, R >= 0, L > 0',
      );
    }
  }
}
