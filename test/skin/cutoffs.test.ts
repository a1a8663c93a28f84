/**
 * Method against method, on both sides of each limit of src/skin/bessel/cutoffs.ts. The names of the tests are those that
 * cutoffs.ts gives. All methods work with 31 digits; what they must share is stated beside each.
 */
import { describe, expect, test } from 'vitest';
import {
  BESSEL_K_SERIES_MODULUS,
  besselISeriesCutoff,
  FORWARD_AMPLIFICATION,
  HANKEL_MODULUS,
  uniformRatioStart,
} from '../../src/skin/bessel/cutoffs.ts';
import { besselI_forward, besselK_forward } from '../../src/skin/bessel/forward.ts';
import { forwardAmplification } from '../../src/skin/bessel/growth.ts';
import { besselI_asymptotic } from '../../src/skin/bessel/i-asymptotic.ts';
import { besselI_miller } from '../../src/skin/bessel/i-miller.ts';
import { besselI_series } from '../../src/skin/bessel/i-series.ts';
import { besselK_asymptotic } from '../../src/skin/bessel/k-asymptotic.ts';
import { besselK_series } from '../../src/skin/bessel/k-series.ts';
import { besselK_temme } from '../../src/skin/bessel/k-temme.ts';
import { rayRatio_backward, rayRatio_uniform } from '../../src/skin/bessel/ray-ratios.ts';
import { type DdComplex, dc, dcExp, dcNegate, scaledMultiply } from '../../src/skin/dd/index.ts';
import { distance } from './relative.ts';

const ANGLES = [0, 12, 30, 45, 60, 75, 88, 90, -45, -90];

function at(modulus: number, degrees: number): DdComplex {
  if (Math.abs(degrees) === 90) return dc(0, Math.sign(degrees) * modulus);
  const angle = (degrees * Math.PI) / 180;
  return dc(modulus * Math.cos(angle), modulus * Math.sin(angle));
}

test('uniform expansion and backward recurrence', () => {
  const direct = new Float64Array(2);
  const carried = new Float64Array(2);
  // around |q| = 44 at orders below 44, and around order 44 at |q| below
  const places: [number, number][] = [];
  for (const q of [43, 44, 45, 60]) for (const n of [0, 1, 2, 7, 16, 30, 43]) places.push([q, n]);
  for (const q of [1e-4, 0.1, 3, 20, 43]) for (const n of [44, 45, 60]) places.push([q, n]);
  for (const [q, n] of places) {
    const t = q * q;
    // 100 orders above the expansion is better by far, and the recurrence contracts what is left
    rayRatio_uniform(n + 100, t, carried);
    rayRatio_backward(n + 100, n, t, carried);
    rayRatio_uniform(n, t, direct);
    for (const part of [0, 1]) {
      // 5e-16 of the expansion (cutoffs.ts), 16 roundings of either side
      expect(Math.abs(direct[part]! / carried[part]! - 1), `|q| ${q} n ${n}`).toBeLessThan(2.5e-15);
    }
  }
  expect(uniformRatioStart(3, 43 * 43)).toBe(44);
  expect(uniformRatioStart(3, 45 * 45)).toBe(3);
  expect(uniformRatioStart(300, 1)).toBe(300);
});

test('series and backward recurrence of I_n', () => {
  for (const n of [0, 1, 2, 10, 40, 300]) {
    for (const share of [0.5, 0.99, 1.01, 2]) {
      const modulus = 2 * Math.sqrt(n + 1) * share;
      expect(besselISeriesCutoff(n, modulus)).toBe(share < 1);
      for (const degrees of ANGLES) {
        const z = at(modulus, degrees);
        const series = scaledMultiply(besselI_series(n, z), dcExp(dcNegate(z)));
        // at twice the limit the terms near the imaginary axis exceed the sum by e^(n + 1) for low orders: 1e-3 of it
        // for n = 2; above, the sum itself falls
        const allowed = share < 2 ? 1e-28 : n < 20 ? 1e-22 : Infinity;
        expect(distance(series, besselI_miller(n, z)), `n ${n} |z| ${modulus} ${degrees}`).toBeLessThan(
          allowed,
        );
      }
    }
  }
});

test('asymptotic expansion and backward recurrence of I_n', () => {
  for (const n of [0, 1]) {
    for (const modulus of [0.95 * HANKEL_MODULUS, HANKEL_MODULUS, 1.1 * HANKEL_MODULUS, 200]) {
      for (const degrees of ANGLES) {
        const z = at(modulus, degrees);
        const there = distance(besselI_asymptotic(n, z), besselI_miller(n, z));
        // least term e^-76 = 1e-33 at the lower end, 1e-31 per operation
        expect(there, `n ${n} |z| ${modulus} ${degrees}`).toBeLessThan(1e-29);
      }
    }
  }
});

test('forward and backward recurrence of I_n', () => {
  let above = 0;
  let below = 0;
  for (const modulus of [45, 300, 4000]) {
    for (const degrees of ANGLES) {
      const z = at(modulus, degrees);
      for (const n of [1, 2, 5, 15, 40, 60, 100, 180, 330, 700]) {
        const amplification = forwardAmplification(n, { re: z.re.hi, im: z.im.hi });
        // so that both sides of the limit are seen and 9 digits at least are left
        if (amplification > 50) continue;
        if (amplification > FORWARD_AMPLIFICATION) above++;
        else below++;
        const carried = besselI_forward(n, z, besselI_asymptotic(0, z), besselI_asymptotic(1, z));
        // some 1e-32 a step of either recurrence, and beside a zero of J_n on the axis ten times that
        const axis = Math.abs(degrees) === 90 ? 10 : 1;
        const allowed = 1e-30 * axis * (10 + n + modulus / 10) * Math.exp(Math.max(0, amplification));
        expect(distance(carried, besselI_miller(n, z)), `n ${n} |z| ${modulus} ${degrees}`).toBeLessThan(
          allowed,
        );
      }
    }
  }
  expect(above).toBeGreaterThan(5);
  expect(below).toBeGreaterThan(100);
});

describe('K_n', () => {
  test('series and backward recurrence of K_n', () => {
    for (const modulus of [0.5, 0.98, 1.02, 2, 4].map((share) => share * BESSEL_K_SERIES_MODULUS)) {
      for (const degrees of ANGLES) {
        const z = at(modulus, degrees);
        const { zero, one } = besselK_temme(z);
        const factor = dcExp(z);
        for (const n of [0, 1, 2, 9, 60, 400]) {
          const carried = n === 0 ? zero : besselK_forward(n, z, zero, one);
          const series = scaledMultiply(besselK_series(n, z), factor);
          // the parts of the series cancel by e^(2 Re z) of low orders
          const allowed = 1e-28 * Math.exp(2 * z.re.hi);
          expect(distance(series, carried), `n ${n} |z| ${modulus} ${degrees}`).toBeLessThan(allowed);
        }
      }
    }
  });

  test('asymptotic expansion and backward recurrence of K_n', () => {
    for (const modulus of [0.95 * HANKEL_MODULUS, HANKEL_MODULUS, 1.1 * HANKEL_MODULUS, 300]) {
      for (const degrees of ANGLES) {
        const z = at(modulus, degrees);
        const { zero, one } = besselK_temme(z);
        expect(distance(besselK_asymptotic(0, z), zero), `|z| ${modulus} ${degrees}`).toBeLessThan(1e-29);
        expect(distance(besselK_asymptotic(1, z), one), `|z| ${modulus} ${degrees}`).toBeLessThan(1e-29);
        // a third way to order 5: the expansion itself against the recurrence
        const five = besselK_forward(5, z, zero, one);
        expect(distance(besselK_asymptotic(5, z), five)).toBeLessThan(1e-28);
      }
    }
  });
});

test('a method outside of its range says so', () => {
  const outside = expect.objectContaining({ code: 'NO_CONVERGENCE' });
  expect(() => besselI_asymptotic(0, at(20, 45))).toThrow(outside);
  expect(() => besselK_asymptotic(60, at(45, 45))).toThrow(outside);
  expect(() => besselK_temme(at(0.1, 45))).toThrow(outside);
  expect(() => besselI_series(0, at(3000, 45))).toThrow(outside);
  expect(() => besselK_series(0, at(3000, 45))).toThrow(outside);
});
