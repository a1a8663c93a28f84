/**
 * Polynomial of a smooth function on an interval by interpolation in Chebyshev's points, given in powers of the local
 * variable -1 .. 1 for Horner's rule. The error of degree d falls like rho^-d, rho of the ellipse through the nearest pole.
 */

/**
 * @param f function at x [1] of the interval
 * @param from [1] lower end
 * @param to [1] upper end
 * @param degree [1] at most about 16: the change to powers multiplies rounding of the highest coefficients by 2^degree
 * @returns coefficients of s^0 .. s^degree, s = (2x - from - to) / (to - from)
 */
export function chebyshevPolynomial(
  f: (x: number) => number,
  from: number,
  to: number,
  degree: number,
): Float64Array {
  const points = degree + 1;
  const angles = Array.from({ length: points }, (_, i) => (Math.PI * (i + 0.5)) / points);
  const values = angles.map((angle) => f((from + to) / 2 + ((to - from) / 2) * Math.cos(angle)));
  const result = new Float64Array(points);
  // T_0 and T_1 in powers, then T_{k+1} = 2 s T_k - T_{k-1}
  let before = new Float64Array(points);
  let current = new Float64Array(points);
  before[0] = 1;
  if (degree > 0) current[1] = 1;
  for (let k = 0; k <= degree; k++) {
    let sum = 0;
    for (let i = 0; i < points; i++) sum += values[i]! * Math.cos(k * angles[i]!);
    const coefficient = ((k === 0 ? 1 : 2) * sum) / points;
    const chebyshev = k === 0 ? before : current;
    for (let i = 0; i <= k; i++) result[i]! += coefficient * chebyshev[i]!;
    if (k > 0) [before, current] = [current, following(before, current)];
  }
  return result;
}

function following(before: Float64Array, current: Float64Array): Float64Array<ArrayBuffer> {
  const next = new Float64Array(current.length);
  for (let i = 0; i < current.length; i++) next[i] = (i > 0 ? 2 * current[i - 1]! : 0) - before[i]!;
  return next;
}
