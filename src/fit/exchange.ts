/**
 * The exchanges: bring in the most broken constraint, drop the held one that keeps all multipliers
 * non-negative, until none is broken. The value rises with each. After many without gain the lowest index
 * goes in and out (R. G. Bland 1977), against cycles; the count is bounded in any case.
 */
import {
  exchangeRow,
  gradient,
  refreshInverse,
  rightSide,
  timesInverse,
  type Workspace,
} from './held-set.ts';

/** Bound of the exchanges, a held constraint; 2 to 10 are usual, over 60 were never of use. */
const MOST_EXCHANGES = 100;
/** Exchanges with rank-one updates before the inverse is made afresh. */
const REFRESH = 40;
/**
 * Exchanges without gain, for each held constraint, before the lowest-index rule sets in: a full turn of
 * the set is usual at the start.
 */
const PATIENCE = 3;
/** Multipliers sum to 1; this much of one is rounding. */
const MULTIPLIER_ROUNDING = 1e-13;
/** A share below this part of the largest is no pivot. */
const LEAST_PIVOT = 1e-9;

/**
 * Exchanges until no constraint is broken.
 * @param point receives (d, t)
 * @returns how many there were, and false for `settled` when they ran out: the point is then not the optimum
 */
export function exchangeToOptimum(
  work: Workspace,
  point: Float64Array,
): { readonly exchanges: number; readonly settled: boolean } {
  const size = work.n + 1;
  const row = new Float64Array(size);
  const share = new Float64Array(size);
  let idle = 0;
  let exchange = 0;
  for (; exchange < MOST_EXCHANGES * size; exchange++) {
    vertex(work, point);
    const entering = mostBroken(work, point, idle > PATIENCE * size);
    if (entering < 0) return { exchanges: exchange, settled: true };
    gradient(work, entering, row);
    // g = sum_k share_k g_k and cost = sum_k multiplier_k g_k over the held constraints
    timesInverse(row, work.inverse, share);
    timesInverse(work.cost, work.inverse, work.multipliers);
    const leaving = firstToZero(work, share, idle > PATIENCE * size);
    if (leaving < 0) break;
    idle = work.multipliers[leaving] > 0 ? 0 : idle + 1;
    work.isHeld[work.held[leaving]] = 0;
    work.isHeld[entering] = 1;
    work.held[leaving] = entering;
    if (exchange % REFRESH !== 0 || !refreshInverse(work)) exchangeRow(work.inverse, size, share, leaving);
  }
  return { exchanges: exchange, settled: false };
}

function vertex(work: Workspace, point: Float64Array): void {
  const size = work.n + 1;
  point.fill(0);
  for (let k = 0; k < size; k++) {
    const h = rightSide(work, work.held[k]);
    for (let j = 0; j < size; j++) point[j] += work.inverse[j * size + k] * h;
  }
}

/** Most broken constraint (or, with `lowest`, the first broken one), -1 when all hold to rounding. */
function mostBroken(
  { n, rows, problem, low, high, isHeld }: Workspace,
  point: Float64Array,
  lowest: boolean,
): number {
  const { errors, slopes } = problem;
  const t = point[n];
  // the sums behind an error have entries of order 1 at most: 1e-13 of that, and 1e-10 of the value itself
  let most = 1e-13 + 1e-10 * Math.abs(t);
  let at = -1;
  for (let i = 0; i < rows; i++) {
    let error = errors[i];
    for (let j = 0; j < n; j++) error += slopes[i * n + j] * point[j];
    const side = 2 * i + (error > 0 ? 0 : 1);
    if (Math.abs(error) - t > most && isHeld[side] === 0) {
      most = Math.abs(error) - t;
      at = side;
      if (lowest) return at;
    }
  }
  for (let j = 0; j < n; j++) {
    const below = low[j] - point[j];
    const above = point[j] - high[j];
    const side = 2 * (rows + j) + (below > above ? 0 : 1);
    if (Math.max(below, above) > most && isHeld[side] === 0) {
      most = Math.max(below, above);
      at = side;
      if (lowest) return at;
    }
  }
  return at;
}

/**
 * The held constraint whose multiplier reaches zero first as the new one's grows; -1 when none does. Among
 * those within rounding of the first, the one with the largest share goes, for a stable inverse (P. M. J.
 * Harris 1973, Math. Programming 5, 1-28).
 */
function firstToZero({ n, multipliers, held }: Workspace, share: Float64Array, lowest: boolean): number {
  const size = n + 1;
  const slack = lowest ? 0 : MULTIPLIER_ROUNDING;
  const pivot = LEAST_PIVOT * share.reduce((most, value) => Math.max(most, value), 0);
  let bound = Infinity;
  for (let k = 0; k < size; k++) {
    if (share[k] > pivot) bound = Math.min(bound, (Math.max(0, multipliers[k]) + slack) / share[k]);
  }
  let at = -1;
  for (let k = 0; k < size; k++) {
    if (!(share[k] > pivot && Math.max(0, multipliers[k]) / share[k] <= bound)) continue;
    if (at < 0 || (lowest ? held[k] < held[at] : share[k] > share[at])) at = k;
  }
  return at;
}
