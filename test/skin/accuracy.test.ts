/**
 * All Bessel functions, ratios and reflections against the 40-digit values of fixtures/bessel, and against the recorded
 * errors: worse fails, more than four times better must be recorded (node scripts/accuracy-skin.mjs --write).
 */
import { describe, expect, test } from 'vitest';
import ledger from '../../fixtures/bessel/accuracy.json' with { type: 'json' };
import { measureAccuracy } from '../../scripts/accuracy-skin.mjs';
import * as functions from '../../src/skin/bessel/functions.ts';
import * as ratios from '../../src/skin/bessel/ray-ratios.ts';
import { dc } from '../../src/skin/dd/index.ts';
import { internalImpedanceRatios } from '../../src/skin/impedance-pieces.ts';
import { rayReflections } from '../../src/skin/reflections.ts';
import { reflectionAt } from '../../src/skin/solid-edge.ts';

const measured = measureAccuracy({
  ...functions,
  ...ratios,
  rayReflections,
  internalImpedanceRatios,
  reflectionOf: (n: number, z: { re: number; im: number }, mu: number) => reflectionAt(n, dc(z.re, z.im), mu),
});

/** [1] what square roots of other machines may add to a recorded error */
const SLACK = 2.3e-16;

test('each part: 1e-14 for orders 0 and 1, 1e-13 for higher orders and reflections', () => {
  for (const [key, { worst, rms }] of Object.entries(measured)) {
    const strict = key.endsWith('n = 0, 1') && !key.startsWith('G_n');
    expect(worst, key).toBeLessThanOrEqual(strict ? 1e-14 : 1e-13);
    expect(rms, key).toBeLessThanOrEqual(worst);
  }
});

test('the fixtures reach over the whole range', () => {
  const keys = Object.keys(measured);
  for (const name of ['e^-z I_n', 'e^z K_n', 'I_n', 'K_n', 'G_n, mu_r 1', 'G_n, mu_r 50']) {
    for (const band of ['|z| 1e-8..1e-4', '|z| 2..10', '|z| 1e3..1e6']) {
      for (const angle of ['45 degrees', 'fan']) {
        // without the exponential they leave the range of a double there, but for the imaginary axis
        if (/^[IK]/.test(name) && band.startsWith('|z| 1e3') && angle !== 'fan') continue;
        expect(
          keys.some((key) => key.startsWith(`${name} | ${band}, ${angle}`)),
          `${name} ${band}`,
        ).toBe(true);
      }
    }
  }
  expect(Object.values(measured).reduce((sum, { count }) => sum + count, 0)).toBeGreaterThan(15_000);
});

describe('the ledger', () => {
  const recorded = ledger as Record<string, { worst: number; rms: number; count: number }>;

  test('holds the same entries', () => {
    expect(Object.keys(measured).sort()).toEqual(Object.keys(recorded).sort());
  });

  test('nothing is worse than recorded, nor four times better', () => {
    for (const [key, { worst, rms, count }] of Object.entries(measured)) {
      const held = recorded[key]!;
      expect(count, key).toBe(held.count);
      expect(worst, `${key}: worst`).toBeLessThanOrEqual(held.worst * 1.01 + SLACK);
      expect(rms, `${key}: rms`).toBeLessThanOrEqual(held.rms * 1.01 + SLACK);
      expect(worst, `${key}: better, record it`).toBeGreaterThanOrEqual(held.worst / 4);
    }
  });
});
