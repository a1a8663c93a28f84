/**
 * The real translation table of one pair of bodies: outgoing order m of body j -> incoming order n of body i.
 *
 * (w - D)^-m = (-D)^-m sum_n C(m+n-1, n) (w/D)^n; with unknowns scaled by sqrt(order) the entry is
 *   t_nm = (n+m-1)! / ((n-1)! (m-1)! sqrt(n m)) u^n v^m,  u = a_i/|D|, v = a_j/|D|,
 * which is its own transpose for the opposite direction. The phases stand apart (phases.ts).
 * Built from p(n,m) = C(n+m, n) u^n v^m = u p(n-1,m) + v p(n,m-1): all terms positive, bounded by
 * (u+v)^(n+m) < 1, no overflow at any order; what underflows is negligible.
 */

/** Entries n <= orders of i, m <= orders of j: in each row the band of m that can matter. */
export interface TranslationTable {
  /** highest n kept */
  readonly rows: number;
  /** highest m kept */
  readonly columns: number;
  /** first m kept in row n-1, less one */
  readonly first: Int32Array;
  /** start of row n-1 in `values`; one more entry ends the last row */
  readonly start: Int32Array;
  /** [1] t_nm, row after row */
  readonly values: Float64Array;
}

export interface TranslationOptions {
  /** [1] a_i/|D| */
  readonly u: number;
  /** [1] a_j/|D| */
  readonly v: number;
  /** [1] decay rate of the coefficients of i and of j in their surroundings */
  readonly alphaI: number;
  readonly alphaJ: number;
  readonly ordersI: number;
  readonly ordersJ: number;
}

/**
 * [1] Entries are dropped where entry times the decay of both coefficients is below this: a few hundred such
 * terms stay under the rounding of the leading ones. (Dropping at 1e-12 is the largest safe value, measured.)
 */
const NEGLIGIBLE = 1e-15;

/**
 * [1] Least decay that counts for that. What is dropped of a row also enters the coefficient of that order, in the
 * impedance by its square: NEGLIGIBLE over this bounds it, 1e-10, however far the orders go.
 */
const LEAST_DECAY = 1e-5;

export function translationTable(o: TranslationOptions): TranslationTable {
  const { u, v } = o;
  const most = o.ordersJ;
  const first = new Int32Array(o.ordersI);
  const start = new Int32Array(o.ordersI + 1);
  const falling = new Float64Array(most + 1);
  for (let m = 1; m <= most; m++) falling[m] = Math.max(LEAST_DECAY, Math.exp(-o.alphaJ * m));
  // p(n-1, m-1) over m for the current n
  const p = new Float64Array(most + 1);
  p[0] = 1;
  for (let m = 1; m <= most; m++) p[m] = p[m - 1] * v;
  const row = new Float64Array(most);
  const chunks: Float64Array[] = [];
  let columns = 0;
  let rows = 0;
  for (let n = 1; n <= o.ordersI; n++) {
    if (n > 1) {
      p[0] *= u;
      for (let m = 1; m <= most; m++) p[m] = u * p[m] + v * p[m - 1];
    }
    const fallingI = Math.max(LEAST_DECAY, Math.exp(-o.alphaI * n));
    let from = -1;
    let to = 0;
    for (let m = 1; m <= most; m++) {
      const t = (p[m - 1] * u * v * (n + m - 1)) / Math.sqrt(n * m);
      row[m - 1] = t;
      if (t * falling[m] * fallingI > NEGLIGIBLE) {
        if (from < 0) from = m - 1;
        to = m;
      }
    }
    // The largest entry of a row falls with n: u/(1-v) < 1.
    if (from < 0) break;
    first[n - 1] = from;
    start[n] = start[n - 1] + to - from;
    chunks.push(row.slice(from, to));
    columns = Math.max(columns, to);
    rows = n;
  }
  const values = new Float64Array(start[rows]);
  for (let n = 0; n < rows; n++) values.set(chunks[n], start[n]);
  return { rows, columns, first, start, values };
}
