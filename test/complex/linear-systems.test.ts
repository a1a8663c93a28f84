/** LU, its condition estimate and GMRES against each other and against systems with a known answer. */
import { describe, expect, it } from 'vitest';
import {
  type ComplexVector,
  conditionEstimate,
  factoriseLu,
  gmres,
  KrylovSpace,
  solveLu,
  solveLuAdjoint,
} from '../../src/complex/index.ts';
import { seeded } from '../loops/case-builder.ts';

const SEED = 31;

function randomSystem(n: number, random: () => number) {
  const a = new Float64Array(2 * n * n).map(() => random() - 0.5);
  const x = new Float64Array(2 * n).map(() => random() - 0.5);
  return { a, x };
}

function multiply(a: Float64Array, x: Float64Array, n: number, adjoint = false): Float64Array {
  const b = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const at = adjoint ? 2 * (j * n + i) : 2 * (i * n + j);
      const ar = a[at];
      const ai = adjoint ? -a[at + 1] : a[at + 1];
      b[2 * i] += ar * x[2 * j] - ai * x[2 * j + 1];
      b[2 * i + 1] += ar * x[2 * j + 1] + ai * x[2 * j];
    }
  }
  return b;
}

const distance = (a: Float64Array, b: Float64Array) =>
  Math.sqrt(a.reduce((s, v, i) => s + (v - b[i]) ** 2, 0));

function binomial(n: number, k: number): number {
  let value = 1;
  for (let i = 1; i <= k; i++) value = (value * (n - k + i)) / i;
  return value;
}

/** Exact 1-norm condition: the inverse has whole elements (Choi 1983, Am. Math. Monthly 90, 301; from memory). */
function hilbertCondition(n: number): number {
  const columns = Array.from({ length: n }, (_, j) => j + 1);
  const norm = (element: (i: number, j: number) => number) =>
    Math.max(...columns.map((j) => columns.reduce((sum, i) => sum + Math.abs(element(i, j)), 0)));
  const inverse = (i: number, j: number) =>
    (i + j - 1) * binomial(n + i - 1, n - j) * binomial(n + j - 1, n - i) * binomial(i + j - 2, i - 1) ** 2;
  return norm((i, j) => 1 / (i + j - 1)) * norm(inverse);
}

describe(`complex systems, seed ${SEED}`, () => {
  it('LU solves A x = b and A^H x = b', () => {
    const random = seeded(SEED);
    for (const n of [1, 2, 3, 10, 40]) {
      const { a, x } = randomSystem(n, random);
      const b = multiply(a, x, n);
      const h = multiply(a, x, n, true);
      const lu = factoriseLu(Float64Array.from(a), n);
      solveLu(lu, b);
      solveLuAdjoint(lu, h);
      // backward stable: error below condition times rounding
      const bound = 100 * conditionEstimate(lu) * Number.EPSILON;
      expect(distance(b, x)).toBeLessThan(bound);
      expect(distance(h, x)).toBeLessThan(bound);
    }
  });

  it('LU swaps rows: zero and tiny pivots cost no digits', () => {
    for (const corner of [0, 1e-20]) {
      // [corner 1; 1 1] x = [1; 2]: x = [1; 1] but for the corner
      const x = new Float64Array([1, 0, 2, 0]);
      solveLu(factoriseLu(new Float64Array([corner, 0, 1, 0, 1, 0, 1, 0]), 2), x);
      expect([...x]).toEqual([1, 0, 1, 0]);
    }
  });

  it('refuses a singular matrix with its size', () => {
    const a = new Float64Array([1, 0, 2, 0, 2, 0, 4, 0]);
    expect(() => factoriseLu(a, 2)).toThrow(/order 2 is singular/);
  });

  it('estimates the condition of Hilbert matrices in the 1-norm', () => {
    for (const n of [3, 5, 10]) {
      const a = new Float64Array(2 * n * n);
      for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) a[2 * (i * n + j)] = 1 / (i + j + 1);
      const ratio = conditionEstimate(factoriseLu(a, n)) / hilbertCondition(n);
      // a lower bound that Hager's method (1984) seldom misses by more than a factor 3; rounding may raise it a little
      expect(ratio).toBeGreaterThan(0.3);
      expect(ratio).toBeLessThan(1.05);
    }
    // Choi 1983 through the formula below: 11/6 * 408
    expect(hilbertCondition(3)).toBeCloseTo(748, 9);
  });

  it('GMRES agrees with LU and its residual is the measured one', () => {
    const random = seeded(SEED + 1);
    for (const n of [3, 20, 60]) {
      const { a, x } = randomSystem(n, random);
      for (let i = 0; i < n; i++) a[2 * (i * n + i)] += 6;
      const b = multiply(a, x, n);
      const split = (v: Float64Array): ComplexVector => ({
        re: Float64Array.from({ length: n }, (_, i) => v[2 * i]),
        im: Float64Array.from({ length: n }, (_, i) => v[2 * i + 1]),
      });
      const join = (v: ComplexVector) =>
        Float64Array.from({ length: 2 * n }, (_, k) => (k % 2 === 0 ? v.re : v.im)[k >> 1]);
      const out = split(b);
      const result = gmres(
        (v, w) => {
          const p = split(multiply(a, join(v), n));
          w.re.set(p.re);
          w.im.set(p.im);
        },
        split(b),
        out,
        new KrylovSpace(),
        { relativeResidual: 1e-12, maxIterations: 100 },
      );
      expect(result.converged).toBe(true);
      const residual = distance(multiply(a, join(out), n), b) / Math.sqrt(b.reduce((s, v) => s + v * v, 0));
      expect(residual).toBeLessThan(2e-12);
      expect(distance(join(out), x)).toBeLessThan(1e-10);
    }
  });

  it('GMRES ends in as many steps as there are eigenvalues, over eight decades of them too', () => {
    // without a second orthogonalisation the basis loses its right angles, and it takes half as many more
    const n = 60;
    const eigenvalues = Float64Array.from({ length: n }, (_, i) => 10 ** ((-8 * i) / (n - 1)));
    const b = { re: new Float64Array(n).fill(1), im: new Float64Array(n).fill(0.5) };
    const x = { re: new Float64Array(n), im: new Float64Array(n) };
    const { iterations, converged } = gmres(
      (v, out) => {
        for (let i = 0; i < n; i++) {
          out.re[i] = eigenvalues[i] * v.re[i];
          out.im[i] = eigenvalues[i] * v.im[i];
        }
      },
      b,
      x,
      new KrylovSpace(),
      { relativeResidual: 1e-12, maxIterations: 100 },
    );
    expect([converged, iterations]).toEqual([true, n]);
    const residual = eigenvalues.map((value, i) => Math.hypot(value * x.re[i] - 1, value * x.im[i] - 0.5));
    expect(Math.max(...residual)).toBeLessThan(1e-8);
  });

  it('GMRES says that it ran out', () => {
    // a cyclic shift: no progress before the last step
    const n = 30;
    const b = { re: new Float64Array(n), im: new Float64Array(n) };
    b.re[0] = 1;
    const x = { re: new Float64Array(n), im: new Float64Array(n) };
    const result = gmres(
      (v, out) => {
        for (let i = 0; i < n; i++) {
          out.re[i] = v.re[(i + n - 1) % n];
          out.im[i] = v.im[(i + n - 1) % n];
        }
      },
      b,
      x,
      new KrylovSpace(),
      { relativeResidual: 1e-8, maxIterations: 10 },
    );
    expect(result.converged).toBe(false);
    expect(result.iterations).toBe(10);
    expect(result.relativeResidual).toBeCloseTo(1, 12);
  });
});
