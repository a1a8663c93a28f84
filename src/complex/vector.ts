/** Complex vectors as flat arrays. */

/** A complex vector as two flat arrays of one length. */
export interface ComplexVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** [1] Euclidean norm. */
export function norm2(v: ComplexVector): number {
  let sum = 0;
  for (let i = 0; i < v.re.length; i++) sum += v.re[i] * v.re[i] + v.im[i] * v.im[i];
  return Math.sqrt(sum);
}
