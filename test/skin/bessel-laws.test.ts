/** Laws of I_n, K_n, J_n over the right half plane, a second program on the real axis, and what is refused. */
import * as coarse from 'bessel';
import { Complex } from 'complex.js';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import zeros from '../../fixtures/bessel/zeros.json' with { type: 'json' };
import {
  type BinaryComplex,
  besselI,
  besselIBinary,
  besselIRatio,
  besselIScaled,
  besselJ,
  besselJ1Zeros,
  besselK,
  besselKBinary,
  besselKRatio,
  besselKScaled,
} from '../../src/skin/index.ts';

const SEED = 551077;
const runs = { seed: SEED, numRuns: 400 };

const order = fc.integer({ min: 0, max: 699 });
const anywhere = fc
  .tuple(fc.double({ min: -8, max: 6, noNaN: true }), fc.double({ min: -90, max: 90, noNaN: true }))
  .map(([decades, degrees]) => {
    const angle = (degrees * Math.PI) / 180;
    return { re: Math.max(0, 10 ** decades * Math.cos(angle)), im: 10 ** decades * Math.sin(angle) };
  });

const plain = ({ value, exponent }: BinaryComplex, shift: number) => value.mul(2 ** (exponent - shift));

/** |sum of the terms| over the sum of their moduli [1], whatever their size. */
function defect(terms: readonly BinaryComplex[]): number {
  const shift = Math.max(...terms.map(({ exponent }) => exponent));
  const values = terms.map((term) => plain(term, shift));
  const size = values.reduce((sum, value) => sum + value.abs(), 0);
  return values.reduce((sum, value) => sum.add(value), new Complex(0)).abs() / size;
}

const product = (a: BinaryComplex, b: BinaryComplex): BinaryComplex => ({
  value: a.value.mul(b.value),
  exponent: a.exponent + b.exponent,
});
const times = (a: BinaryComplex, factor: Complex): BinaryComplex => ({ ...a, value: a.value.mul(factor) });

// each value is rounded once, a product of two and their sum a few times more
const ROUNDING = 2e-15;

describe(`laws, seed ${SEED}`, () => {
  test('Wronskian I_n K_{n+1} + I_{n+1} K_n = 1/z (DLMF 10.28.2)', () => {
    fc.assert(
      fc.property(order, anywhere, (n, z) => {
        const terms = [
          product(besselIBinary(n, z), besselKBinary(n + 1, z)),
          product(besselIBinary(n + 1, z), besselKBinary(n, z)),
          { value: new Complex(z.re, z.im).inverse().neg(), exponent: 0 },
        ];
        expect(defect(terms)).toBeLessThan(ROUNDING);
      }),
      runs,
    );
  });

  test('recurrences (DLMF 10.29.1)', () => {
    fc.assert(
      fc.property(order, anywhere, (below, z) => {
        const n = below + 1;
        const factor = new Complex(2 * n).div(z.re, z.im);
        const I = [n - 1, n, n + 1].map((k) => besselIBinary(k, z));
        const K = [n - 1, n, n + 1].map((k) => besselKBinary(k, z));
        const minus = new Complex(-1);
        expect(defect([I[0], times(I[1], factor.neg()), times(I[2], minus)])).toBeLessThan(ROUNDING);
        expect(defect([K[2], times(K[1], factor.neg()), times(K[0], minus)])).toBeLessThan(ROUNDING);
      }),
      runs,
    );
  });

  test('conjugate arguments give conjugate values, to the bit', () => {
    fc.assert(
      fc.property(order, anywhere, (n, z) => {
        for (const f of [besselIBinary, besselKBinary]) {
          const [upper, lower] = [f(n, z), f(n, { re: z.re, im: -z.im })];
          expect([lower.exponent, lower.value.re, lower.value.im + 0]).toEqual([
            upper.exponent,
            upper.value.re,
            -upper.value.im + 0,
          ]);
        }
      }),
      runs,
    );
  });

  test('plain, scaled, binary forms and ratios are one function', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 40 }), anywhere, (n, z) => {
        fc.pre(Math.hypot(z.re, z.im) > 1e-4 && z.re < 600);
        const growth = new Complex(z.re, z.im).exp();
        const apart = (a: Complex, b: Complex) => a.sub(b).abs() / b.abs();
        // the exponential of complex.js at large |Im z| is good to an ulp of the angle
        const allowed = 1e-14 + 4e-16 * Math.abs(z.im);
        expect(apart(besselIScaled(n, z).mul(growth), besselI(n, z))).toBeLessThan(allowed);
        expect(apart(besselKScaled(n, z).div(growth), besselK(n, z))).toBeLessThan(allowed);
        expect(apart(plain(besselIBinary(n, z), 0), besselIScaled(n, z))).toBe(0);
        expect(apart(plain(besselKBinary(n, z), 0), besselKScaled(n, z))).toBe(0);
        expect(apart(besselIScaled(n, z).mul(besselIRatio(n, z)), besselIScaled(n + 1, z))).toBeLessThan(
          1e-14,
        );
        expect(apart(besselKScaled(n, z).mul(besselKRatio(n, z)), besselKScaled(n + 1, z))).toBeLessThan(
          1e-14,
        );
      }),
      runs,
    );
  });

  test('on the axes: real on the real one, i^n times real on the imaginary one', () => {
    for (const x of [1e-8, 0.3, 7, 55, 2e3]) {
      for (const n of [0, 1, 2, 5, 100]) {
        expect(besselIScaled(n, { re: x, im: 0 }).im).toBe(0);
        expect(besselKBinary(n, { re: x, im: 0 }).value.im).toBe(0);
        const vertical = besselI(n, { re: 0, im: x });
        expect(n % 2 === 0 ? vertical.im : vertical.re).toBe(0);
      }
    }
    expect(besselI(0, { re: 0, im: 0 })).toEqual(new Complex(1, 0));
    expect(besselI(3, { re: 0, im: 0 })).toEqual(new Complex(0, 0));
    expect(besselIRatio(3, { re: 0, im: 0 })).toEqual(new Complex(0, 0));
  });
});

describe('J_n of a real argument', () => {
  test('is the integral (1/pi) int_0^pi cos(n u - x sin u) du (DLMF 10.9.2)', () => {
    for (const x of [0.1, 2.5, -2.5, 17, 80]) {
      for (const n of [0, 1, 2, 3, 10, 41]) {
        // the trapezoidal rule is exact to rounding past |x| + n + 30 points
        const points = Math.ceil(Math.abs(x)) + n + 40;
        let sum = 0;
        for (let i = 0; i < points; i++) {
          const u = ((i + 0.5) * Math.PI) / points;
          sum += Math.cos(n * u - x * Math.sin(u));
        }
        expect(Math.abs(besselJ(n, x) - sum / points), `J_${n}(${x})`).toBeLessThan(1e-15);
      }
    }
  });

  test('zeros of J_1 to the last place (mpmath, 40 digits)', () => {
    const found = besselJ1Zeros(1000);
    const [{ j1 }] = zeros.rows;
    for (const [k, printed] of j1) {
      const zero = found[Number(k) - 1];
      expect(Math.abs(zero / Number(printed) - 1), `${k}`).toBeLessThan(2.3e-16);
    }
    expect(besselJ1Zeros(0).length).toBe(0);
  });
});

test('the polynomials of the package bessel on the real axis, where they are good to 1e-6', () => {
  for (const x of [1e-3, 0.2, 1, 3.7, 3.8, 12, 60]) {
    for (const n of [0, 1]) {
      const near = (mine: number, theirs: number, scale: number) =>
        expect(Math.abs(mine - theirs) / scale, `order ${n} at ${x}`).toBeLessThan(1e-6);
      const [i, k] = [besselI(n, { re: x, im: 0 }).re, besselK(n, { re: x, im: 0 }).re];
      near(i, coarse.besseli(x, n), i);
      near(k, coarse.besselk(x, n), k);
      near(besselJ(n, x), coarse.besselj(x, n), Math.min(1, Math.sqrt(2 / (Math.PI * x))));
    }
  }
});

describe('what is refused: DOMAIN', () => {
  const domain = expect.objectContaining({ code: 'DOMAIN' });
  const functions = [
    besselI,
    besselIScaled,
    besselIBinary,
    besselIRatio,
    besselK,
    besselKScaled,
    besselKBinary,
    besselKRatio,
  ];
  test.each(functions.map((f) => [f.name, f] as const))('%s', (_name, f) => {
    const one = { re: 1, im: 0 };
    for (const n of [-1, 0.5, NaN, 10_001]) expect(() => f(n, one)).toThrow(domain);
    for (const z of [
      { re: -1e-9, im: 0 },
      { re: NaN, im: 0 },
      { re: 1, im: NaN },
      { re: Infinity, im: 0 },
      { re: 1e10, im: 0 },
      { re: 1e-200, im: 0 },
    ]) {
      expect(() => f(0, z)).toThrow(domain);
    }
  });
  test('poles, and values above the range of a double', () => {
    const origin = { re: 0, im: 0 };
    for (const f of [besselK, besselKScaled, besselKBinary, besselKRatio])
      expect(() => f(0, origin)).toThrow(domain);
    expect(() => besselI(0, { re: 720, im: 0 })).toThrow(/2\^10\d\d, above the range/);
    expect(() => besselK(300, { re: 1e-3, im: 0 })).toThrow(/scaled form/);
    expect(besselK(0, { re: 800, im: 0 }).re).toBe(0);
    for (const bad of [-1, 2.5, NaN, 1e6]) expect(() => besselJ1Zeros(bad)).toThrow(domain);
    for (const x of [NaN, Infinity, 1e10]) expect(() => besselJ(0, x)).toThrow(domain);
    expect(() => besselJ(-1, 1)).toThrow(domain);
  });
});
