/**
 * Descent on the worst relative error by successive linear programs: the errors are linearised in ln R_k,
 * ln p_k and L_inf, the minimax step within a trust box is taken when it lowers the true worst error, and
 * the box grows or shrinks by how well the linear model told that (K. Madsen 1975, J. Inst. Math. Appl. 16,
 * 321-328). Where the errors bend away from the linear model, the step is corrected with their true values
 * at its end (second-order correction: R. Fletcher 1982, Math. Programming Study 17, 61-76); without it the
 * descent creeps along curved valleys. Logs keep R_k and p_k positive; L_inf has a floor at 0. The worst
 * error never rises, so wherever the descent stops the circuit is valid and its error is known.
 */
import { errorSlopes, type Parameters, relativeErrors, type Target, worstOf } from './error.ts';
import { minimaxStep } from './minimax-lp.ts';

export interface DescentResult {
  readonly parameters: Parameters;
  /** [1] worst relative error over the target */
  readonly worst: number;
  /** [1] linearisations made */
  readonly steps: number;
}

/** Bound of the linearisations; 10 to 50 are usual (scripts/bench-fit.mjs prints them). */
const MOST_STEPS = 60;
/** Bound of the corrections of one step. */
const MOST_CORRECTIONS = 3;
/** Half width of the first box in ln R and ln p: a factor 1.6 each way. */
const FIRST_BOX = 0.5;
const WIDEST_BOX = 2;
/** Steps this small change an error by a thousandth of a millionth of itself at most. */
const NARROWEST_BOX = 1e-9;
/** The descent ends when the linear model promises less than this part of the error. */
const LEAST_GAIN = 1e-5;
/** Relative errors of this size are rounding of the sums behind them. */
const ROUNDING = 1e-13;
/** L_inf below this part of L at the top of the band is zero: it would be an element of rounding size. */
const LEAST_INDUCTANCE = 1e-12;
/**
 * Poles stay within this factor of the band: beyond, a section is a plain resistor or inductor to more
 * digits than matter.
 */
const POLE_MARGIN = 1e4;

interface Box {
  readonly low: Float64Array;
  readonly high: Float64Array;
}

export function minimaxDescent(target: Target, start: Parameters): DescentResult {
  const rows = 2 * target.omega.length;
  const unit = target.inductance[target.inductance.length - 1];
  const slopes = new Float64Array(rows * start.length);
  let here = trialAt(target, start);
  let size = FIRST_BOX;
  let held: Int32Array | undefined;
  let steps = 0;
  errorSlopes(target, start, unit, slopes);
  for (; steps < MOST_STEPS && size > NARROWEST_BOX && here.worst > ROUNDING; steps++) {
    const box = trustBox(target, here.parameters, unit, size);
    const linear = minimaxStep({ errors: here.errors, slopes, ...box }, held);
    held = linear.settled ? linear.held : undefined;
    const hoped = here.worst - linear.worst;
    if (!(hoped > LEAST_GAIN * here.worst)) {
      if (linear.settled) break;
      // ties that the exchanges could not leave; a smaller box has others
      size /= 4;
      continue;
    }
    const next = correctedTrial(target, here, slopes, box, linear, unit);
    const gain = (here.worst - next.worst) / hoped;
    // usual trust-region bounds (common practice): shrink below a quarter of the hoped gain, grow above
    // three quarters
    if (gain < 0.25) size = Math.min(size, worstOf(linear.step)) / 4;
    else if (gain > 0.75) size = Math.min(WIDEST_BOX, 2 * size);
    if (gain > 0) {
      here = next;
      errorSlopes(target, here.parameters, unit, slopes);
    }
  }
  return { parameters: here.parameters, worst: here.worst, steps };
}

interface Trial {
  readonly parameters: Parameters;
  readonly errors: Float64Array;
  readonly worst: number;
}

function trialAt(target: Target, parameters: Parameters): Trial {
  const errors = relativeErrors(target, parameters, new Float64Array(2 * target.omega.length));
  return { parameters, errors, worst: worstOf(errors) };
}

/** The trial at the end of the linear step, or of the best correction of it. */
function correctedTrial(
  target: Target,
  here: Trial,
  slopes: Float64Array,
  box: Box,
  linear: {
    readonly step: Float64Array;
    readonly worst: number;
    readonly held: Int32Array;
  },
  unit: number,
): Trial {
  let { step, held } = linear;
  let best = trialAt(target, moved(here.parameters, step, unit));
  for (let k = 0; k < MOST_CORRECTIONS && here.worst - best.worst < 0.9 * (here.worst - linear.worst); k++) {
    // the slopes of here through the errors found there
    const errors = best.errors.map((error, i) => {
      let told = 0;
      for (let j = 0; j < step.length; j++) told += slopes[i * step.length + j] * step[j];
      return error - told;
    });
    const corrected = minimaxStep({ errors, slopes, ...box }, held);
    const trial = trialAt(target, moved(here.parameters, corrected.step, unit));
    if (!(trial.worst < best.worst)) break;
    best = trial;
    step = corrected.step;
    held = corrected.held;
  }
  return best;
}

function trustBox(target: Target, parameters: Parameters, unit: number, size: number): Box {
  const last = parameters.length - 1;
  const low = new Float64Array(last + 1).fill(-size);
  const high = new Float64Array(last + 1).fill(size);
  const lowest = target.omega[0] / POLE_MARGIN;
  const highest = target.omega[target.omega.length - 1] * POLE_MARGIN;
  for (let k = last / 2; k < last; k++) {
    low[k] = Math.min(0, Math.max(-size, Math.log(lowest / parameters[k])));
    high[k] = Math.max(0, Math.min(size, Math.log(highest / parameters[k])));
  }
  low[last] = Math.max(-size, -parameters[last] / unit);
  return { low, high };
}

function moved(parameters: Parameters, step: Float64Array, unit: number): Parameters {
  const last = parameters.length - 1;
  const next = parameters.map((value, j) => (j < last ? value * Math.exp(step[j]) : value + unit * step[j]));
  if (next[last] < LEAST_INDUCTANCE * unit) next[last] = 0;
  return next;
}
