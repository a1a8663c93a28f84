/**
 * Linear minimax step in a box: min over d of max_i |e_i + a_i . d|, low_j <= d_j <= high_j. As a linear
 * program in (d, t) it is solved by the exchange method, which is the simplex method on the dual (E. L.
 * Stiefel 1960, Numer. Math. 2, 1-17). The start is dual feasible, so there is no first phase: the largest
 * error, and for each variable the end of the box towards which that error falls. The box opens in two steps:
 * started at full width, the error that is far too large at one end is far too large with the other sign at
 * the other, both sides are held, and all vertices tie at t = 0.
 */
import { exchangeToOptimum } from './exchange.ts';
import { type MinimaxProblem, refreshInverse, timesInverse, type Workspace } from './held-set.ts';

export interface MinimaxStep {
  /** [1] d, within the box */
  readonly step: Float64Array;
  /**
   * [1] the worst error after the step, as the linear program has it: the least possible one where settled
   */
  readonly worst: number;
  /** [1] how many it took */
  readonly exchanges: number;
  /** false when the exchanges ran out: the step is within the box, but not the best one */
  readonly settled: boolean;
  /** the constraints that hold with equality at the optimum, for a warm start */
  readonly held: Int32Array;
}

/**
 * Part of the largest error that the traces in the cost may shift the optimum by, at most twice. Without
 * them 12 of 400 random fits met a step that cycled among ties.
 */
const TIE_BREAK = 1e-6;

/**
 * @param warm held constraints of a like problem solved before: used when they still are a dual-feasible
 * set
 */
export function minimaxStep(problem: MinimaxProblem, warm?: Int32Array): MinimaxStep {
  const n = problem.low.length;
  const size = n + 1;
  const work: Workspace = {
    n,
    rows: problem.errors.length,
    problem,
    low: Float64Array.from(problem.low),
    high: Float64Array.from(problem.high),
    inverse: new Float64Array(size * size),
    held: new Int32Array(size),
    isHeld: new Uint8Array(2 * (problem.errors.length + n)),
    cost: new Float64Array(size),
    multipliers: new Float64Array(size),
  };
  holdBox(work);
  let part = 1;
  if (warm === undefined || !holdAgain(work, warm)) {
    refreshInverse(work);
    part = firstPart(work);
  }
  for (const index of work.held) work.isHeld[index] = 1;
  const point = new Float64Array(size);
  let exchanges = 0;
  let settled = true;
  for (const share of part < 1 ? [part, 1] : [1]) {
    for (let j = 0; j < n; j++) {
      work.low[j] = share * problem.low[j];
      work.high[j] = share * problem.high[j];
    }
    const done = exchangeToOptimum(work, point);
    exchanges += done.exchanges;
    settled = done.settled;
    // a box that holds nothing back at its inner size changes nothing by growing
    if (!settled || work.held.every((index) => index < 2 * work.rows)) break;
  }
  const step = intoBox(point, problem);
  return { step, worst: worstAt(problem, step), exchanges, settled, held: work.held };
}

/** Takes over a held set; false, and the set of `holdBox` stays, when it is not dual feasible here. */
function holdAgain(work: Workspace, warm: Int32Array): boolean {
  const cold = Int32Array.from(work.held);
  work.held.set(warm);
  if (refreshInverse(work)) {
    timesInverse(work.cost, work.inverse, work.multipliers);
    if (work.multipliers.every((value) => value >= 0)) return true;
  }
  work.held.set(cold);
  return false;
}

/**
 * The part of the box in which the largest error keeps its sign wherever it goes: no two sides of one error
 * are then ever held.
 */
function firstPart({ n, rows, problem, held }: Workspace): number {
  const { errors, slopes, low, high } = problem;
  const worst = held[n] >> 1;
  let reach = 0;
  for (let j = 0; j < n; j++) reach += Math.abs(slopes[worst * n + j]) * Math.max(-low[j], high[j]);
  return rows > 0 && reach > 0 ? Math.min(1, (0.5 * Math.abs(errors[worst])) / reach) : 1;
}

/**
 * Dual-feasible first set: the largest error, and for each variable the end of the box towards which that
 * error falls.
 */
function holdBox({ n, rows, problem, held, cost }: Workspace): void {
  const { errors, slopes, low, high } = problem;
  let worst = 0;
  for (let i = 1; i < rows; i++) if (Math.abs(errors[i]) > Math.abs(errors[worst])) worst = i;
  const sign = errors[worst] >= 0 ? 1 : -1;
  for (let j = 0; j < n; j++) {
    const down = sign * slopes[worst * n + j] >= 0;
    held[j] = 2 * rows + 2 * j + (down ? 0 : 1);
    // golden-ratio steps: never equal, never far apart
    const trace =
      (TIE_BREAK * Math.abs(errors[worst]) * (1 + ((j * 0.618) % 1))) / (n * (high[j] - low[j] || 1));
    cost[j] = down ? trace : -trace;
  }
  held[n] = 2 * worst + (sign > 0 ? 0 : 1);
  cost[n] = 1;
}

function intoBox(point: Float64Array, { low, high }: MinimaxProblem): Float64Array {
  return low.map((least, j) => Math.min(high[j], Math.max(least, point[j])));
}

function worstAt({ errors, slopes, low }: MinimaxProblem, point: Float64Array): number {
  const n = low.length;
  let worst = 0;
  for (let i = 0; i < errors.length; i++) {
    let error = errors[i];
    for (let j = 0; j < n; j++) error += slopes[i * n + j] * point[j];
    worst = Math.max(worst, Math.abs(error));
  }
  return worst;
}
