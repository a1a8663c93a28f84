/**
 * The small least-squares problem of the Krylov method: a Hessenberg matrix made triangular column by column by complex
 * Givens rotations (Saad & Schultz 1986, section 3.2). Column k of the triangular factor R holds rows 0..k, interleaved
 * (re, im).
 */

export interface Rotations {
  readonly c: Float64Array;
  readonly sRe: Float64Array;
  readonly sIm: Float64Array;
}

/** Room for `most` rotations. */
export function rotations(most: number): Rotations {
  return { c: new Float64Array(most), sRe: new Float64Array(most), sIm: new Float64Array(most) };
}

/** Earlier rotations on a new column: [c, s; -conj(s), c] with real c. */
export function applyRotations(column: Float64Array, k: number, r: Rotations): void {
  for (let j = 0; j < k; j++) {
    const ar = column[2 * j];
    const ai = column[2 * j + 1];
    const br = column[2 * j + 2];
    const bi = column[2 * j + 3];
    const sr = r.sRe[j];
    const si = r.sIm[j];
    column[2 * j] = r.c[j] * ar + sr * br - si * bi;
    column[2 * j + 1] = r.c[j] * ai + sr * bi + si * br;
    column[2 * j + 2] = r.c[j] * br - sr * ar - si * ai;
    column[2 * j + 3] = r.c[j] * bi - sr * ai + si * ar;
  }
}

/** The rotation that clears the subdiagonal entry of column k (real, not negative); returns the diagonal's size. */
export function makeRotation(column: Float64Array, k: number, r: Rotations): number {
  const ar = column[2 * k];
  const ai = column[2 * k + 1];
  const b = column[2 * k + 2];
  const a = Math.hypot(ar, ai);
  const size = Math.hypot(a, b);
  if (a === 0) {
    r.c[k] = 0;
    r.sRe[k] = 1;
    r.sIm[k] = 0;
    column[2 * k] = b;
    column[2 * k + 1] = 0;
  } else {
    r.c[k] = a / size;
    r.sRe[k] = (ar / a) * (b / size);
    r.sIm[k] = (ai / a) * (b / size);
    column[2 * k] = (ar / a) * size;
    column[2 * k + 1] = (ai / a) * size;
  }
  column[2 * k + 2] = 0;
  return size;
}

/** Rotation k on the right side. */
export function rotateRightSide(gRe: Float64Array, gIm: Float64Array, k: number, r: Rotations): void {
  const ar = gRe[k];
  const ai = gIm[k];
  gRe[k] = r.c[k] * ar;
  gIm[k] = r.c[k] * ai;
  gRe[k + 1] = -(r.sRe[k] * ar + r.sIm[k] * ai);
  gIm[k + 1] = -(r.sRe[k] * ai - r.sIm[k] * ar);
}

/** Solves R y = g. */
export function backSubstitute(
  columns: Float64Array[],
  gRe: Float64Array,
  gIm: Float64Array,
  n: number,
): Float64Array {
  const y = new Float64Array(2 * n);
  for (let i = n - 1; i >= 0; i--) {
    let sr = gRe[i];
    let si = gIm[i];
    for (let k = i + 1; k < n; k++) {
      const hr = columns[k][2 * i];
      const hi = columns[k][2 * i + 1];
      sr -= hr * y[2 * k] - hi * y[2 * k + 1];
      si -= hr * y[2 * k + 1] + hi * y[2 * k];
    }
    const dr = columns[i][2 * i];
    const di = columns[i][2 * i + 1];
    const d = dr * dr + di * di;
    if (d === 0) continue;
    y[2 * i] = (sr * dr + si * di) / d;
    y[2 * i + 1] = (si * dr - sr * di) / d;
  }
  return y;
}

/** Norm of the inverse of the triangular factor by three steps of the inverse power method. */
export function inverseNormEstimate(columns: Float64Array[], n: number): number {
  if (n === 0) return 1;
  let vRe = new Float64Array(n).fill(1 / Math.sqrt(n));
  let vIm = new Float64Array(n);
  let growth = 1;
  for (let step = 0; step < 3; step++) {
    const w = backSubstitute(columns, vRe, vIm, n);
    const z = forwardSubstituteAdjoint(columns, w, n);
    let size = 0;
    for (let i = 0; i < 2 * n; i++) size += z[i] * z[i];
    size = Math.sqrt(size);
    if (!(size > 0)) return growth;
    growth = Math.sqrt(size);
    vRe = new Float64Array(n);
    vIm = new Float64Array(n);
    for (let i = 0; i < n; i++) {
      vRe[i] = z[2 * i] / size;
      vIm[i] = z[2 * i + 1] / size;
    }
  }
  return growth;
}

/** Solves R^H z = w for the upper triangular R. */
function forwardSubstituteAdjoint(columns: Float64Array[], w: Float64Array, n: number): Float64Array {
  const z = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) {
    let sr = w[2 * i];
    let si = w[2 * i + 1];
    const column = columns[i];
    for (let k = 0; k < i; k++) {
      const hr = column[2 * k];
      const hi = -column[2 * k + 1];
      sr -= hr * z[2 * k] - hi * z[2 * k + 1];
      si -= hr * z[2 * k + 1] + hi * z[2 * k];
    }
    const dr = column[2 * i];
    const di = -column[2 * i + 1];
    const d = dr * dr + di * di;
    if (d === 0) continue;
    z[2 * i] = (sr * dr + si * di) / d;
    z[2 * i + 1] = (si * dr - sr * di) / d;
  }
  return z;
}
