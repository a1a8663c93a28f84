/**
 * The geometry of a set of round bodies, prepared once for all frequencies: translation tables of every pair,
 * their phases, the fields of the line currents, and the logarithms of the distances.
 *
 * Conventions (design: many conductors): w = x + iy from the centre of body i; outgoing terms (a/w-bar)^n of mode +n
 * and (a/w)^n of mode -n; incoming (w/a)^n and (w-bar/a)^n; all amplitudes of A in units of mu0/(4 pi) per
 * ampere and scaled by sqrt(n). D is the centre of j seen from i, phi its angle.
 */
import { Problem } from '../problem.ts';
import { decayRate } from './pair.ts';
import { type TranslationTable, translationTable } from './translation.ts';

/** What proximity needs to know of a body's place and size. */
export interface Circle {
  /** [m] */
  readonly x: number;
  /** [m] */
  readonly y: number;
  /** [m] */
  readonly radius: number;
}

/** Body i < j and what couples them. */
export interface BodyPair {
  readonly i: number;
  readonly j: number;
  readonly table: TranslationTable;
  /** cos and sin of exp(-i n phi), n = 1.. rows: interleaved */
  readonly phaseI: Float64Array;
  /** (-1)^m exp(-i m phi), m = 1.. columns: interleaved */
  readonly phaseJ: Float64Array;
}

export interface Layout {
  readonly circles: readonly Circle[];
  /** highest order of each body */
  readonly orders: Int32Array;
  /** first mode of each body among all; the last entry is the number of modes of one sign */
  readonly offsets: Int32Array;
  /** [1] slowest decay of the coefficients of each body, over its neighbours */
  readonly alpha: Float64Array;
  readonly pairs: readonly BodyPair[];
  /**
   * [1] incoming mode +n at a body (row, all modes) from one ampere in each body (column): u^n exp(-i n phi)/sqrt(n).
   * Mode -n is its conjugate.
   */
  readonly monopoleRe: Float64Array;
  /** [1] imaginary parts of the same */
  readonly monopoleIm: Float64Array;
  /** [1] -2 ln(distance/reference), on the diagonal -2 ln(radius/reference); N x N */
  readonly logarithms: Float64Array;
}

/** Largest number of entries in all translation tables together (doubles): 800 MB. */
export const MAX_TABLE_ENTRIES = 1e8;

/** Largest number of modes times bodies: phases and fields of currents take 32 bytes of each, 1.6 GB. */
const MAX_MODES_TIMES_BODIES = 5e7;

/** [1] decay rates of all bodies; Infinity for a body alone. */
export function decayRates(circles: readonly Circle[]): Float64Array {
  const alpha = new Float64Array(circles.length).fill(Number.POSITIVE_INFINITY);
  for (let i = 0; i < circles.length; i++) {
    for (let j = 0; j < circles.length; j++) {
      if (i === j) continue;
      const a = circles[i];
      const b = circles[j];
      const d = Math.hypot(b.x - a.x, b.y - a.y);
      if (!(d > a.radius + b.radius)) {
        throw new Problem(
          'OVERLAP',
          `bodies ${i} and ${j} are ${d} m apart and their radii add to ${a.radius + b.radius} m`,
        );
      }
      alpha[i] = Math.min(alpha[i], decayRate(a.radius, b.radius, d));
    }
  }
  return alpha;
}

/**
 * Prepares a layout.
 *
 * @param orders highest order wanted of each body, >= 1
 * @throws Problem OVERLAP for bodies that touch or overlap, NOT_REACHED when the tables would not fit in memory
 */
export function prepareLayout(circles: readonly Circle[], orders: Int32Array, alpha: Float64Array): Layout {
  const count = circles.length;
  const offsets = new Int32Array(count + 1);
  for (let i = 0; i < count; i++) offsets[i + 1] = offsets[i] + orders[i];
  const modes = offsets[count];
  if (modes * count > MAX_MODES_TIMES_BODIES) {
    throw new Problem(
      'NOT_REACHED',
      `${count} wires with orders up to ${Math.max(...orders)} need ${(32e-9 * modes * count).toFixed(1)} GB for their ` +
        `geometry; the limit is ${32e-9 * MAX_MODES_TIMES_BODIES} GB: draw fewer wires, widen the smallest gaps or allow a ` +
        'larger tolerance',
    );
  }
  const monopoleRe = new Float64Array(modes * count);
  const monopoleIm = new Float64Array(modes * count);
  const logarithms = new Float64Array(count * count);
  const reference = referenceLength(circles);
  const pairs: BodyPair[] = [];
  let entries = 0;
  for (let i = 0; i < count; i++) {
    logarithms[i * count + i] = -2 * Math.log(circles[i].radius / reference);
    for (let j = i + 1; j < count; j++) {
      const dx = circles[j].x - circles[i].x;
      const dy = circles[j].y - circles[i].y;
      const d = Math.hypot(dx, dy);
      const log = -2 * Math.log(d / reference);
      logarithms[i * count + j] = log;
      logarithms[j * count + i] = log;
      const u = circles[i].radius / d;
      const v = circles[j].radius / d;
      const table = translationTable({
        u,
        v,
        alphaI: alpha[i],
        alphaJ: alpha[j],
        ordersI: orders[i],
        ordersJ: orders[j],
      });
      entries += table.values.length;
      if (entries > MAX_TABLE_ENTRIES) {
        throw new Problem(
          'NOT_REACHED',
          `the ${count} wires need more than ${MAX_TABLE_ENTRIES} table entries at orders up to ${Math.max(...orders)}; ` +
            'widen the smallest gaps or allow a larger tolerance',
        );
      }
      const phaseI = unitPowers(dx / d, -dy / d, orders[i]);
      const phaseJ = unitPowers(-dx / d, dy / d, orders[j]);
      fillMonopole(monopoleRe, monopoleIm, count, offsets[i], j, u, phaseI, orders[i]);
      fillMonopole(monopoleRe, monopoleIm, count, offsets[j], i, v, phaseJ, orders[j]);
      if (table.rows > 0) pairs.push({ i, j, table, phaseI, phaseJ });
    }
  }
  return {
    circles,
    orders,
    offsets,
    alpha,
    pairs,
    monopoleRe,
    monopoleIm,
    logarithms,
  };
}

/** [m] a length between the smallest and largest in the layout, so that the logarithms stay small. */
function referenceLength(circles: readonly Circle[]): number {
  let longest = circles[0].radius;
  for (const c of circles) longest = Math.max(longest, Math.hypot(c.x - circles[0].x, c.y - circles[0].y));
  return longest;
}

/** (c + i s)^n for n = 1..count, interleaved, by angle doubling errors of one rounding a step. */
function unitPowers(c: number, s: number, count: number): Float64Array {
  const out = new Float64Array(2 * count);
  let re = 1;
  let im = 0;
  for (let n = 0; n < count; n++) {
    const t = re * c - im * s;
    im = re * s + im * c;
    re = t;
    out[2 * n] = re;
    out[2 * n + 1] = im;
  }
  return out;
}

function fillMonopole(
  re: Float64Array,
  im: Float64Array,
  count: number,
  offset: number,
  source: number,
  ratio: number,
  phase: Float64Array,
  orders: number,
): void {
  let power = 1;
  for (let n = 1; n <= orders; n++) {
    power *= ratio;
    const size = power / Math.sqrt(n);
    const at = (offset + n - 1) * count + source;
    re[at] = size * phase[2 * n - 2];
    im[at] = size * phase[2 * n - 1];
  }
}
