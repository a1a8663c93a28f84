/**
 * Two round bodies seen from each other: how fast their multipole coefficients fall with the order.
 *
 * The images of images of two circles lie inside the pair of limit points of the pencil of circles through
 * them; seen from the centre of body i the limit point stands at a_i exp(-alpha_i) with
 * cosh alpha_i = (D^2 + a_i^2 - a_j^2)/(2 a_i D), so coefficients of order n fall like exp(-n alpha_i) at
 * worst (perfect conductors) and energies like exp(-2 n alpha_i). (Smythe 1950, section 4.13, bipolar circles.)
 */

/** [1] alpha_i of body i with radius `a` beside a body of radius `b`; centres `d` apart, a + b < d; all [m]. */
export function decayRate(a: number, b: number, d: number): number {
  // cosh alpha - 1, written with the gap so that close pairs keep their digits.
  const x = ((d - a - b) * (d - a + b)) / (2 * a * d);
  return Math.log1p(x + Math.sqrt(x * (2 + x)));
}
