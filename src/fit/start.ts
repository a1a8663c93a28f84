/**
 * Convex start of a fit: on a fixed log grid of poles the relative errors are linear in R_k and L_inf, so
 * non-negative least squares finds the best sum of sections there, without a first guess. Its few groups of
 * neighbouring poles are then merged to the wanted number of sections (J. H. Ward 1963: the pair whose
 * merging costs least comes first).
 */
import type { Parameters, Target } from './error.ts';
import { nonNegativeLeastSquares } from './nnls.ts';

/**
 * Poles a decade: neighbouring responses then differ by some per cent, finer grids only split the same
 * weight.
 */
const POLES_PER_DECADE = 6;
/**
 * Decades beyond the band on each side: a pole there acts as a plain inductance or resistance within the
 * band.
 */
const DECADES_BEYOND = 1;

/** Best circuit on the grid: as many sections as least squares keeps, in the order of rising pole. */
export function gridStart(target: Target): Parameters {
  const { omega, increment, inductance, resistanceScale } = target;
  const count = omega.length;
  const ratio = (omega[count - 1] / omega[0]) * 10 ** (2 * DECADES_BEYOND);
  const intervals = Math.ceil(POLES_PER_DECADE * Math.log10(ratio));
  const first = omega[0] * 10 ** -DECADES_BEYOND;
  const poles = Float64Array.from({ length: intervals + 1 }, (_, j) => first * ratio ** (j / intervals));
  const rows = 2 * count;
  const columns = poles.length + 1;
  const values = new Float64Array(rows * columns);
  const scales = new Float64Array(columns);
  for (let j = 0; j < columns; j++) {
    const at = j * rows;
    for (let i = 0; i < count; i++) {
      const u = j < poles.length ? omega[i] / poles[j] : 0;
      const below = 1 / (1 + u * u);
      values[at + i] = (u * u * below) / resistanceScale[i];
      values[at + count + i] = (j < poles.length ? below / poles[j] : 1) / inductance[i];
    }
    let size = 0;
    for (let i = 0; i < rows; i++) size = Math.max(size, values[at + i]);
    scales[j] = 1 / size;
    for (let i = 0; i < rows; i++) values[at + i] /= size;
  }
  const rhs = Float64Array.from({ length: rows }, (_, i) =>
    i < count ? increment[i] / resistanceScale[i] : 1,
  );
  const x = nonNegativeLeastSquares({ rows, columns, values }, rhs);
  const kept = Array.from(poles.keys()).filter((j) => x[j] > 0);
  return Float64Array.from([
    ...kept.map((j) => x[j] * scales[j]),
    ...kept.map((j) => poles[j]),
    x[poles.length] * scales[poles.length],
  ]);
}

/**
 * The same circuit with at most `sections` sections. A section weighs as its part in R plus its part in L
 * at its own pole (a thick wire in series with a thin one shows in L alone); merging two adds their
 * resistances at the weighted mean of their log-poles.
 */
export function mergeSections(parameters: Parameters, resistanceDc: number, sections: number): Parameters {
  const held = (parameters.length - 1) / 2;
  const last = parameters[2 * held];
  let list = Array.from({ length: held }, (_, k) => ({
    r: parameters[k],
    p: parameters[held + k],
  }));
  list.sort((a, b) => a.p - b.p);
  const weight = list.map(({ r, p }) => {
    const whole = impedanceAt(list, resistanceDc, last, p);
    return 0.5 * (r / whole.r + r / p / whole.l);
  });
  if (sections === 0) list = [];
  while (list.length > sections) {
    let best = 0;
    let least = Infinity;
    for (let k = 0; k + 1 < list.length; k++) {
      const apart = Math.log(list[k + 1].p / list[k].p);
      const cost = ((weight[k] * weight[k + 1]) / (weight[k] + weight[k + 1])) * apart * apart;
      if (cost < least) {
        least = cost;
        best = k;
      }
    }
    const [a, b] = [list[best], list[best + 1]];
    const share = weight[best + 1] / (weight[best] + weight[best + 1]);
    const merged = { r: a.r + b.r, p: a.p * (b.p / a.p) ** share };
    list = [...list.slice(0, best), merged, ...list.slice(best + 2)];
    weight.splice(best, 2, weight[best] + weight[best + 1]);
  }
  return Float64Array.from([...list.map(({ r }) => r), ...list.map(({ p }) => p), last]);
}

function impedanceAt(
  list: readonly { r: number; p: number }[],
  resistanceDc: number,
  inductanceInfinity: number,
  omega: number,
): { r: number; l: number } {
  const sum = { r: resistanceDc, l: inductanceInfinity };
  for (const { r, p } of list) {
    const u = omega / p;
    sum.r += (r * u * u) / (1 + u * u);
    sum.l += r / p / (1 + u * u);
  }
  return sum;
}
