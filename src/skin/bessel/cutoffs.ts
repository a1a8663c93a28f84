/**
 * Where each method takes over from another. Every limit is a named function, says where its figure comes from, and
 * names the test in test/skin/cutoffs.test.ts that holds both sides against each other around it.
 */

/**
 * [1] order from which the uniform expansion (16 terms) gives r_n on the ray q^2 = jT. Its error, measured against 60
 * digits: below 5e-16 in each part at any order where |q| >= 44, and at any q where the order is 44 or more; below
 * |q| = 44 the backward recurrence starts at that order and contracts what is left.
 * Test: "uniform expansion and backward recurrence".
 */
export function uniformRatioStart(order: number, t: number): number {
  return t >= UNIFORM_MODULUS * UNIFORM_MODULUS ? order : Math.max(order, UNIFORM_MODULUS);
}

const UNIFORM_MODULUS = 44;

/**
 * True where the power series of I_n is used: its terms fall from the first, |z|^2/4 <= n + 1, so nothing cancels.
 * Test: "series and backward recurrence of I_n".
 */
export function besselISeriesCutoff(n: number, modulus: number): boolean {
  return modulus * modulus <= 4 * (n + 1);
}

/**
 * [1] |z| from which Hankel's expansions give the orders 0 and 1: their least term is e^(-2|z|) = 1e-35.
 * Tests: "asymptotic expansion and backward recurrence of I_n", "asymptotic expansion and backward recurrence of K_n".
 */
export const HANKEL_MODULUS = 40;

/**
 * [1] largest logarithm of the error growth that the forward recurrence of I_n may have: e^30 = 1e13 leaves 18 of 31
 * digits. Test: "forward and backward recurrence of I_n".
 */
export const FORWARD_AMPLIFICATION = 30;

/**
 * [1] |z| up to which the power series of K_n is used: its parts cancel by e^(2|z|) = 55 there at most.
 * Test: "series and backward recurrence of K_n".
 */
export const BESSEL_K_SERIES_MODULUS = 2;
