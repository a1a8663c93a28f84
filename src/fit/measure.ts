/**
 * The errors of a finished circuit over a band: at the fitted samples, at those between them, and at the
 * tops of the error between samples as a parabola through three neighbours tells them, so that the stated
 * figure also covers the frequencies not sampled.
 */
import { type Parameters, relativeErrors, targetOf } from './error.ts';
import type { LoopSamples } from './samples.ts';

/** Worst relative errors of R and of L. */
export interface WorstErrors {
  /** [1] */
  readonly resistance: number;
  /** [1] */
  readonly inductance: number;
}

export interface MeasuredErrors {
  /** over the fitted frequencies */
  readonly fitted: WorstErrors;
  /** over the frequencies between the fitted ones */
  readonly unseen: WorstErrors;
  /** over both, and over the tops between neighbouring samples: the figure to state */
  readonly stated: WorstErrors;
}

export function measureErrors(samples: LoopSamples, parameters: Parameters): MeasuredErrors {
  const target = targetOf(samples, 0, 1);
  const count = target.omega.length;
  const errors = relativeErrors(target, parameters, new Float64Array(2 * count));
  const logs = target.omega.map((w) => Math.log(w / target.omega[0]));
  const every = (values: Float64Array, first: number) => largest(values.filter((_, i) => i % 2 === first));
  const pair = (figure: (values: Float64Array) => number): WorstErrors => ({
    resistance: figure(errors.subarray(0, count)),
    inductance: figure(errors.subarray(count)),
  });
  return {
    fitted: pair((values) => every(values, 0)),
    unseen: pair((values) => every(values, 1)),
    stated: pair((values) => Math.max(largest(values), largestTop(logs, values))),
  };
}

function largest(values: Float64Array): number {
  return values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}

/**
 * Height of the highest top of |values| among parabolas through three neighbours whose middle one is the
 * largest.
 */
function largestTop(x: Float64Array, values: Float64Array): number {
  let most = 0;
  for (let i = 1; i + 1 < x.length; i++) {
    const sign = values[i] < 0 ? -1 : 1;
    const [a, b, c] = [sign * values[i - 1], sign * values[i], sign * values[i + 1]];
    if (a > b || c > b) continue;
    const left = (b - a) / (x[i] - x[i - 1]);
    const right = (c - b) / (x[i + 1] - x[i]);
    const bend = (right - left) / (x[i + 1] - x[i - 1]);
    if (!(bend < 0)) continue;
    // b + slope t + bend t^2 with the slope at the middle sample
    const slope = left + bend * (x[i] - x[i - 1]);
    most = Math.max(most, b - (slope * slope) / (4 * bend));
  }
  return most;
}
