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
