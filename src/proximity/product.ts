/**
 * The product of the translation operator with a vector of outgoing amplitudes: the one hot loop of the solver.
 *
 * Modes cross: outgoing -m of j feeds incoming +n of i with the phase of D, outgoing +m feeds -n with its
 * conjugate. Each table is read once for both directions and both signs: eight multiply-adds an entry.
 * Vectors hold the +n modes of all bodies, then the -n modes, body after body.
 */
import type { ComplexVector } from '../complex/index.ts';
import type { Layout } from './layout.ts';
import type { TranslationTable } from './translation.ts';

/** Scratch of one product, reused. */
export interface ProductScratch {
  /** [1] four numbers a mode: (+re, +im, -re, -im), rotated into the frame of the pair */
  readonly inI: Float64Array;
  /** [1] likewise */
  readonly inJ: Float64Array;
  /** [1] likewise */
  readonly outJ: Float64Array;
}

export function productScratch(layout: Layout): ProductScratch {
  let most = 0;
  for (const n of layout.orders) most = Math.max(most, n);
  return {
    inI: new Float64Array(4 * most),
    inJ: new Float64Array(4 * most),
    outJ: new Float64Array(4 * most),
  };
}

/** Active orders at one frequency: a prefix of each body's modes, packed. */
export interface ActiveModes {
  readonly orders: Int32Array;
  /** first active mode of each body; the last entry is their number */
  readonly offsets: Int32Array;
}

export function activeModes(orders: Int32Array): ActiveModes {
  const offsets = new Int32Array(orders.length + 1);
  for (let i = 0; i < orders.length; i++) offsets[i + 1] = offsets[i] + orders[i];
  return { orders, offsets };
}

/** out = T x: incoming amplitudes at every body from the outgoing ones of all others. */
export function translate(
  layout: Layout,
  active: ActiveModes,
  x: ComplexVector,
  out: ComplexVector,
  scratch: ProductScratch,
): void {
  const { orders, offsets } = active;
  const modes = offsets[orders.length];
  const { inI, inJ, outJ } = scratch;
  out.re.fill(0);
  out.im.fill(0);
  for (const pair of layout.pairs) {
    const { i, j, table, phaseI, phaseJ } = pair;
    const rows = Math.min(orders[i], table.rows);
    const columns = Math.min(orders[j], table.columns);
    if (rows === 0 || columns === 0) continue;
    rotate(x, offsets[i], modes, phaseI, rows, inI);
    rotate(x, offsets[j], modes, phaseJ, columns, inJ);
    outJ.fill(0, 0, 4 * columns);
    // inI turns into the incoming amplitudes of i row by row: row n is read before it is overwritten.
    multiplyBothWays(table, rows, columns, inI, inJ, outJ);
    rotateAndAdd(inI, offsets[i], modes, phaseI, rows, out);
    rotateAndAdd(outJ, offsets[j], modes, phaseJ, columns, out);
  }
}

/** (re, im) of +n times conj(phase), of -n times phase; the sources feed the opposite sign. */
function rotate(
  x: ComplexVector,
  offset: number,
  modes: number,
  phase: Float64Array,
  count: number,
  to: Float64Array,
): void {
  const { re, im } = x;
  for (let n = 0, k = 0, at = offset; n < count; n++, k += 4, at++) {
    const c = phase[2 * n];
    const s = phase[2 * n + 1];
    const pr = re[at];
    const pi = im[at];
    const mr = re[modes + at];
    const mi = im[modes + at];
    to[k] = mr * c - mi * s;
    to[k + 1] = mr * s + mi * c;
    to[k + 2] = pr * c + pi * s;
    to[k + 3] = pi * c - pr * s;
  }
}

function multiplyBothWays(
  table: TranslationTable,
  rows: number,
  columns: number,
  inI: Float64Array,
  inJ: Float64Array,
  outJ: Float64Array,
): void {
  const { values, start, first } = table;
  for (let n = 0, k = 0; n < rows; n++, k += 4) {
    const a0 = inI[k];
    const a1 = inI[k + 1];
    const a2 = inI[k + 2];
    const a3 = inI[k + 3];
    let s0 = 0;
    let s1 = 0;
    let s2 = 0;
    let s3 = 0;
    const from = start[n];
    const end = Math.min(start[n + 1], from + columns - first[n]);
    for (let at = from, m = 4 * first[n]; at < end; at++, m += 4) {
      const t = values[at];
      s0 += t * inJ[m];
      s1 += t * inJ[m + 1];
      s2 += t * inJ[m + 2];
      s3 += t * inJ[m + 3];
      outJ[m] += t * a0;
      outJ[m + 1] += t * a1;
      outJ[m + 2] += t * a2;
      outJ[m + 3] += t * a3;
    }
    inI[k] = s0;
    inI[k + 1] = s1;
    inI[k + 2] = s2;
    inI[k + 3] = s3;
  }
}

/** Incoming +n gets phase times the first pair of numbers, -n the conjugate phase times the second. */
function rotateAndAdd(
  from: Float64Array,
  offset: number,
  modes: number,
  phase: Float64Array,
  count: number,
  out: ComplexVector,
): void {
  const { re, im } = out;
  for (let n = 0, k = 0, at = offset; n < count; n++, k += 4, at++) {
    const c = phase[2 * n];
    const s = phase[2 * n + 1];
    re[at] += from[k] * c - from[k + 1] * s;
    im[at] += from[k] * s + from[k + 1] * c;
    re[modes + at] += from[k + 2] * c + from[k + 3] * s;
    im[modes + at] += from[k + 3] * c - from[k + 2] * s;
  }
}
