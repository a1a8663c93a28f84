/**
 * Coefficients of the uniform expansion of y = q I_nu'(q) / I_nu(q) for large w = sqrt(nu^2 + q^2):
 *
 *   y = w + sum_{m >= 1} a_m(P) w^(1-m),   P = nu^2 / w^2,   a_m = (1 - P) b_m(P), b_m of degree m - 1.
 *
 * It is the logarithmic derivative of Debye's expansion (DLMF 10.41.3 and 10.41.5; Olver 1954), got from the
 * Riccati equation q y' + y^2 = nu^2 + q^2 with q w' = w (1 - P), q P' = -2 P (1 - P):
 *
 *   2 a_m = -sum_{i=1}^{m-1} a_i a_{m-i} - (1 - P) [ (2 - m) a_{m-1} - 2 P a_{m-1}' ],   a_0 = 1.
 *
 * The denominators are powers of two, 2^(2m-1) at most, so the recurrence runs exactly in BigInt on 8^m a_m.
 */

const SCALE = 8n;

/** Rows m = 1, 2, .., count: coefficients [1] of P^0, P^1, .. of b_m. */
export function uniformRatioCoefficients(count: number): Float64Array[] {
  const a: bigint[][] = [[1n]];
  for (let m = 1; m <= count; m++) {
    const twice: bigint[] = new Array(m + 1).fill(0n);
    for (let i = 1; i < m; i++) subtractProduct(twice, a[i]!, a[m - i]!, 1n);
    const derived = a[m - 1]!.map((c, k) => BigInt(2 - m - 2 * k) * c);
    subtractProduct(twice, derived, [1n, -1n], SCALE);
    a.push(twice.map((c) => c / 2n));
  }
  return a.slice(1).map((row, index) => withoutFactor(row, SCALE ** BigInt(index + 1)));
}

/** target -= factor * u * v */
function subtractProduct(target: bigint[], u: readonly bigint[], v: readonly bigint[], factor: bigint): void {
  for (let i = 0; i < u.length; i++) {
    for (let k = 0; k < v.length; k++) target[i + k]! -= factor * u[i]! * v[k]!;
  }
}

/** Divides the scaled row by (1 - P) and by its scale. */
function withoutFactor(row: readonly bigint[], scale: bigint): Float64Array {
  const b = new Float64Array(row.length - 1);
  let sum = 0n;
  for (let k = 0; k < b.length; k++) {
    sum += row[k]!;
    b[k] = Number(sum) / Number(scale);
  }
  return b;
}
