/**
 * From samples to a circuit. For each number of sections three starts descend, and the best result stays:
 * the merged convex start, the circuit with one section fewer plus one where its error is largest, and
 * (where that size is to be returned) the circuit with one section more, its two likest merged. Random
 * starts found nothing better (test/fit/optimum.test.ts).
 */
import { Problem } from '../problem.ts';
import { type DescentResult, minimaxDescent } from './descent.ts';
import { type Parameters, relativeErrors, type Target, targetOf } from './error.ts';
import { measureErrors, type WorstErrors } from './measure.ts';
import type { SectionCircuit } from './model.ts';
import { checkSamples, type LoopSamples } from './samples.ts';
import { gridStart, mergeSections } from './start.ts';

/** A circuit with the record of how well it fits. */
export interface SectionModel extends SectionCircuit {
  /** first and last sample */
  readonly band: {
    /** [Hz] */
    readonly from: number;
    /** [Hz] */
    readonly to: number;
  };
  /** worst over the whole band; see `MeasuredErrors.stated` */
  readonly errors: WorstErrors;
  /** worst over the fitted frequencies */
  readonly fittedErrors: WorstErrors;
  /** worst over the frequencies between the fitted ones */
  readonly unseenErrors: WorstErrors;
  /** how many frequencies were fitted, and how many lie between them */
  readonly counts: {
    /** [1] */
    readonly fitted: number;
    /** [1] */
    readonly unseen: number;
  };
}

/** The size of the circuit: a number of sections, or the fewest that keep R and L within a relative error. */
export type FitSize = { readonly sections: number } | { readonly within: number };

/**
 * More sections than any band from 1 Hz to 1 THz needs for 0.01 %; each costs more time than the one
 * before.
 */
export const MOST_SECTIONS = 16;
/** Table values are good to about 1e-8: a circuit nearer to them than this would fit their rounding. */
export const LEAST_WITHIN = 1e-5;
/** Relative errors of this size are rounding. */
const ROUNDING = 1e-12;
/**
 * Each section brings the error down by a third at least, in trials on skin effect; five that bring less
 * than a tenth are a wall.
 */
const STALL = 5;
const STALL_PART = 0.9;
/** First resistance of an added section, as part of the loop's R - R_dc there. */
const ADDED_PART = 0.1;

/**
 * Fits R_dc + s L_inf + sum_k (R_k parallel L_k) to one loop: the least worst relative error of R and L,
 * R_dc kept as given. With `sections` the circuit has at most that many (fewer when the rest has nothing to
 * do); with `within` the fewest that meet it, counting the error between the samples too.
 * @throws Problem DOMAIN for samples that break the rules of `LoopSamples`, sections not an integer from 0
 *   to `MOST_SECTIONS`, or within not from `LEAST_WITHIN` to below 1
 * @throws Problem NOT_REACHED when `MOST_SECTIONS` do not meet `within`; the text has the error reached
 */
export function fitSections(samples: LoopSamples, size: FitSize): SectionModel {
  checkSamples(samples);
  checkSize(size);
  const target = targetOf(samples, 0, 2);
  const grid = gridStart(target);
  if ('sections' in size) return bestOfSize(samples, target, grid, size.sections);
  return fewestSections(samples, target, grid, size.within);
}

function bestOfSize(samples: LoopSamples, target: Target, grid: Parameters, sections: number): SectionModel {
  // two sizes below give the added-section start something to grow from
  let best: DescentResult | undefined;
  for (let n = Math.max(0, sections - 2); n <= sections; n++) {
    best = bestOf(target, grid, samples.resistanceDc, n, best);
  }
  const above = bestOf(target, grid, samples.resistanceDc, sections + 1, best);
  const shrunk = shrink(target, above, samples.resistanceDc, sections);
  return modelOf(samples, (shrunk.worst < best!.worst ? shrunk : best!).parameters);
}

function fewestSections(
  samples: LoopSamples,
  target: Target,
  grid: Parameters,
  within: number,
): SectionModel {
  let best: DescentResult | undefined;
  const reached: number[] = [];
  for (let n = 0; n <= MOST_SECTIONS && !stalled(reached); n++) {
    best = bestOf(target, grid, samples.resistanceDc, n, best);
    const model = modelOf(samples, best.parameters);
    reached.push(worst(model));
    if (reached[n] > within) continue;
    if (n === 0) return model;
    const smaller = modelOf(samples, shrink(target, best, samples.resistanceDc, n - 1).parameters);
    return worst(smaller) <= within ? smaller : model;
  }
  const { band, errors } = modelOf(samples, best!.parameters);
  throw new Problem(
    'NOT_REACHED',
    `no circuit of up to ${MOST_SECTIONS} sections is within ${percent(within)} ` +
      `from ${short(band.from)} Hz to ${short(band.to)} Hz; ${reached.length - 1} sections reach ${percent(errors.resistance)} in R and ` +
      `${percent(errors.inductance)} in L; allow a larger error or narrow the band`,
  );
}

/**
 * True when the last sections did next to nothing: then the samples themselves stand in the way, not the
 * size.
 */
function stalled(reached: readonly number[]): boolean {
  const n = reached.length - 1;
  return n >= STALL && reached[n] > STALL_PART * reached[n - STALL];
}

/** The better of the two starts for `sections` sections. */
function bestOf(
  target: Target,
  grid: Parameters,
  resistanceDc: number,
  sections: number,
  before: DescentResult | undefined,
): DescentResult {
  if (before !== undefined && before.worst < ROUNDING) return before;
  const merged = minimaxDescent(target, mergeSections(grid, resistanceDc, sections));
  if (before === undefined || merged.worst < ROUNDING) return merged;
  const grown = minimaxDescent(target, addSection(target, before.parameters));
  const better = grown.worst < merged.worst ? grown : merged;
  return better.worst < before.worst ? better : before;
}

/** Descent from the circuit of one section more with its two likest merged. */
function shrink(target: Target, above: DescentResult, resistanceDc: number, sections: number): DescentResult {
  return minimaxDescent(target, mergeSections(above.parameters, resistanceDc, sections));
}

/** A small section at the frequency where R or L is worst. */
function addSection(target: Target, parameters: Parameters): Parameters {
  const held = (parameters.length - 1) / 2;
  const count = target.omega.length;
  const errors = relativeErrors(target, parameters, new Float64Array(2 * count));
  let at = 0;
  for (let i = 1; i < errors.length; i++) if (Math.abs(errors[i]) > Math.abs(errors[at])) at = i;
  at %= count;
  const p = target.omega[at];
  // where R hardly rises, a section of a millionth of the reactance still has slopes to follow
  const r = Math.max(ADDED_PART * target.increment[at], 1e-6 * p * target.inductance[at]);
  const list = Array.from({ length: held }, (_, k) => ({
    r: parameters[k],
    p: parameters[held + k],
  }));
  list.push({ r, p });
  return Float64Array.from([...list.map((s) => s.r), ...list.map((s) => s.p), parameters[2 * held]]);
}

function modelOf(samples: LoopSamples, parameters: Parameters): SectionModel {
  const held = (parameters.length - 1) / 2;
  const { fitted, unseen, stated } = measureErrors(samples, parameters);
  const count = samples.frequency.length;
  const sections = Array.from({ length: held }, (_, k) => ({
    resistance: parameters[k],
    inductance: parameters[k] / parameters[held + k],
  }));
  return {
    resistanceDc: samples.resistanceDc,
    inductanceInfinity: parameters[2 * held],
    sections: sections.sort((a, b) => a.resistance / a.inductance - b.resistance / b.inductance),
    band: { from: samples.frequency[0], to: samples.frequency[count - 1] },
    errors: stated,
    fittedErrors: fitted,
    unseenErrors: unseen,
    counts: { fitted: (count + 1) / 2, unseen: (count - 1) / 2 },
  };
}

function worst(model: SectionModel): number {
  return Math.max(model.errors.resistance, model.errors.inductance);
}

function percent(part: number): string {
  return `${short(100 * part)} %`;
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)));
}

function checkSize(size: FitSize): void {
  if ('sections' in size) {
    if (Number.isInteger(size.sections) && size.sections >= 0 && size.sections <= MOST_SECTIONS) return;
    throw new Problem(
      'DOMAIN',
      `a circuit of ${size.sections} sections was asked for; allowed are 0 to ${MOST_SECTIONS}`,
    );
  }
  if (size.within >= LEAST_WITHIN && size.within < 1) return;
  throw new Problem(
    'DOMAIN',
    `an error within ${percent(size.within)} was asked for; ` +
      `allowed is from ${percent(LEAST_WITHIN)} to below 100 %`,
  );
}
