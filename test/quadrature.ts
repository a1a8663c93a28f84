/** Gauss-Legendre quadrature for tests that integrate a field. */

/**
 * Nodes in 0 .. 1 and weights of their sum 1, by Newton from Tricomi's start (DLMF 3.5.18; Abramowitz, Stegun 25.4.29).
 * Exact for polynomials to degree 2 count - 1.
 */
export function gaussLegendre(count: number): { x: number; w: number }[] {
  return Array.from({ length: count }, (_, k) => {
    let t = Math.cos((Math.PI * (k + 0.75)) / (count + 0.5));
    let slope = 0;
    for (let step = 0; step < 8; step++) {
      let [before, p] = [1, t];
      for (let n = 2; n <= count; n++) [before, p] = [p, ((2 * n - 1) * t * p - (n - 1) * before) / n];
      slope = (count * (before - t * p)) / (1 - t * t);
      t -= p / slope;
    }
    return { x: (1 + t) / 2, w: 1 / ((1 - t * t) * slope * slope) };
  });
}

/** Integral of f over from .. to. */
export function integrate(f: (x: number) => number, from: number, to: number, count = 20): number {
  return gaussLegendre(count).reduce((sum, { x, w }) => sum + w * f(from + (to - from) * x), 0) * (to - from);
}
