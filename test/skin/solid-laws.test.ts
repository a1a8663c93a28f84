/** Laws of the solid wire: the field inside against its equation, its energy and its heat; limits; the small rise of R. */
import { Complex } from 'complex.js';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readRows } from '../../scripts/accuracy-skin.mjs';
import {
  besselI,
  besselIRatio,
  type RoundWire,
  skinDepth,
  solidCurrentDensity,
  solidDecayRates,
  solidInteriorRatio,
  solidInternalImpedance,
  solidInternalImpedances,
  solidInternalInductance,
  solidReflection,
  solidReflections,
  solidResistanceDc,
  solidSurfaceImpedance,
} from '../../src/skin/index.ts';
import { integrate } from '../quadrature.ts';

const MU0 = 4e-7 * Math.PI;
const SEED = 90210;
const copper: RoundWire = { radius: 0.7e-3, conductivity: 58e6, relativePermeability: 1 };
const steel: RoundWire = { radius: 2e-3, conductivity: 7e6, relativePermeability: 150 };
const perfect: RoundWire = { ...copper, conductivity: Infinity };
const metals: [string, RoundWire][] = [
  ['copper', copper],
  ['steel', steel],
];

/** [rad/s] where a/delta has this value */
const omegaAt = (wire: RoundWire, ratio: number) =>
  (2 * (ratio / wire.radius) ** 2) / (MU0 * wire.relativePermeability * wire.conductivity);

function inductance(wire: RoundWire, omega: number): Complex {
  const out = new Float64Array(2);
  solidInternalInductance(wire, omega, out);
  return new Complex(out[0], out[1]);
}

describe.each(metals)('the field inside: %s', (_name, wire) => {
  const { radius: a, conductivity: sigma } = wire;
  test.each([0.01, 1, 4])('a/delta = %d: current, heat and energy', (ratio) => {
    const omega = omegaAt(wire, ratio);
    const ring = (r: number) => 2 * Math.PI * r;
    const J = (r: number) => solidCurrentDensity(wire, omega, r);
    const impedance = solidInternalImpedance(wire, omega);
    // one ampere
    expect(Math.abs(integrate((r) => J(r).re * ring(r), 0, a, 30) - 1)).toBeLessThan(1e-12);
    expect(Math.abs(integrate((r) => J(r).im * ring(r), 0, a, 30))).toBeLessThan(1e-12);
    const heat = integrate((r) => (J(r).abs() ** 2 * ring(r)) / sigma, 0, a, 30);
    expect(Math.abs(heat / impedance.re - 1)).toBeLessThan(1e-12);
    // H = enclosed current over the circumference (Ampere), energy mu H^2/2 against L_int/2
    const enclosed = (r: number) =>
      new Complex(
        integrate((s) => J(s).re * ring(s), 0, r, 24),
        integrate((s) => J(s).im * ring(s), 0, r, 24),
      );
    const mu = MU0 * wire.relativePermeability;
    const energy = integrate((r) => (mu * enclosed(r).abs() ** 2) / ring(r), 0, a, 24);
    expect(Math.abs(energy / inductance(wire, omega).re - 1)).toBeLessThan(1e-11);
  });

  test('each harmonic obeys F_n" + F_n\'/r - (n^2/r^2 + j omega mu sigma) F_n = 0', () => {
    const omega = omegaAt(wire, 3);
    const k2 = new Complex(0, omega * MU0 * wire.relativePermeability * sigma);
    const r = 0.6 * a;
    const h = 1e-3 * a;
    for (const n of [0, 1, 2, 5]) {
      const at = (s: number) => solidInteriorRatio(wire, omega, n, s);
      // five-point differences, of fourth order
      const [m2, m1, f, p1, p2] = [-2, -1, 0, 1, 2].map((k) => at(r + k * h));
      const first = m2
        .sub(m1.mul(8))
        .add(p1.mul(8))
        .sub(p2)
        .div(12 * h);
      const second = m1
        .add(p1)
        .mul(16)
        .sub(m2)
        .sub(p2)
        .sub(f.mul(30))
        .div(12 * h * h);
      const right = f.mul(k2.add((n * n) / (r * r)));
      expect(second.add(first.div(r)).sub(right).abs() / right.abs(), `n = ${n}`).toBeLessThan(1e-7);
      expect(at(a)).toEqual(new Complex(1, 0));
      // uniform gradient fields at 0 Hz
      expect(solidInteriorRatio(wire, 0, n, r).re).toBeCloseTo(0.6 ** n, 14);
    }
  });

  test('the reflection is what continuity of A and of H asks for', () => {
    const omega = omegaAt(wire, 2);
    const h = 1e-4 * a;
    for (const n of [1, 2, 7]) {
      const g = solidReflection(wire, omega, n);
      // slope inside by one-sided differences of fourth order
      const weights = [25, -48, 36, -16, 3];
      const slope = weights
        .reduce((sum, w, k) => sum.add(solidInteriorRatio(wire, omega, n, a - k * h).mul(w)), new Complex(0))
        .div(12 * h);
      // outside A = (r/a)^n - G (a/r)^n: its slope over its value, times mu_r, is that of the inside
      const outside = g
        .add(1)
        .mul(n / a)
        .div(g.neg().add(1));
      const inside = slope.div(wire.relativePermeability);
      expect(inside.sub(outside).abs() / outside.abs(), `n = ${n}`).toBeLessThan(1e-7);
    }
  });

  test('G_n of one call for all orders are those of one order each', () => {
    const [re, im] = [new Float64Array(30), new Float64Array(30)];
    for (const ratio of [1e-3, 0.8, 12, 3e3]) {
      const omega = omegaAt(wire, ratio);
      solidReflections(wire, omega, 30, re, im);
      for (const n of [1, 2, 30]) {
        const one = solidReflection(wire, omega, n);
        expect(one.sub(re[n - 1], im[n - 1]).abs() / one.abs()).toBeLessThan(3e-15);
        // G_n = I_{n+1}/I_{n-1} for mu_r = 1 (recurrence DLMF 10.29.1)
        if (wire.relativePermeability > 1 || ratio > 100) continue;
        // q = (1 + j) a/delta
        const q = { re: ratio, im: ratio };
        const quotient = besselIRatio(n - 1, q).mul(besselIRatio(n, q));
        expect(one.sub(quotient).abs() / one.abs()).toBeLessThan(1e-14);
      }
    }
  });
});

describe('limits', () => {
  test('0 Hz: R_dc and mu/(8 pi) whatever the radius', () => {
    for (const radius of [1e-6, 1e-4, 0.1]) {
      for (const relativePermeability of [1, 1000]) {
        const wire = { radius, conductivity: 58e6, relativePermeability };
        expect(inductance(wire, 0).re / ((MU0 * relativePermeability) / (8 * Math.PI))).toBeCloseTo(1, 14);
        expect(inductance(wire, 0).im + 0).toBe(0);
        expect(solidInternalImpedance(wire, 0).re).toBe(solidResistanceDc(wire));
        // 1/(sigma pi a^2)
        expect(solidResistanceDc(wire) * 58e6 * Math.PI * radius ** 2).toBeCloseTo(1, 14);
      }
    }
  });

  test.each(metals)('thin skin: Z -> (1 + j)/(2 pi a sigma delta) + R_dc/4: %s', (_name, wire) => {
    const omega = omegaAt(wire, 1e4);
    const thin = 1 / (2 * Math.PI * wire.radius * wire.conductivity * skinDepth(wire, omega));
    const z = solidInternalImpedance(wire, omega);
    expect((z.re - thin) / solidResistanceDc(wire)).toBeCloseTo(0.25, 4);
    expect(z.im / thin).toBeCloseTo(1, 8);
    expect(solidSurfaceImpedance(wire, omega).div(z).re).toBeCloseTo(2 * Math.PI * wire.radius, 14);
  });

  test('a perfect conductor carries nothing inside', () => {
    expect(solidInternalImpedance(perfect, 1e6)).toEqual(new Complex(0, 0));
    expect(solidReflection(perfect, 1e6, 3)).toEqual(new Complex(1, 0));
    expect(solidInteriorRatio(perfect, 1e6, 2, 0.5 * perfect.radius)).toEqual(new Complex(0, 0));
    expect(solidCurrentDensity(perfect, 1e6, 0.5 * perfect.radius)).toEqual(new Complex(0, 0));
    expect(skinDepth(perfect, 1e6)).toBe(0);
    const [re, im] = [new Float64Array(1).fill(7), new Float64Array(1).fill(7)];
    solidInternalImpedances(perfect, Float64Array.of(1e6), re, im);
    expect([re[0], im[0]]).toEqual([0, 0]);
  });

  test('decay rates are where the impedance has its poles: I_1(q) = 0 on the imaginary axis', () => {
    const rates = solidDecayRates(steel, 4);
    const time = MU0 * steel.relativePermeability * steel.conductivity * steel.radius ** 2;
    for (const rate of rates) {
      const y = Math.sqrt(rate * time);
      const before = besselI(1, { re: 0, im: y * (1 - 1e-14) }).im;
      const behind = besselI(1, { re: 0, im: y * (1 + 1e-14) }).im;
      expect(before * behind).toBeLessThan(0);
    }
  });
});

describe('over frequency', () => {
  test(`R never falls, L never rises, nothing is NaN from 0 Hz to 1 THz, seed ${SEED}`, () => {
    const wires = fc.record({
      radius: fc.double({ min: -6, max: -1, noNaN: true }).map((x) => 10 ** x),
      conductivity: fc.double({ min: 5, max: 8, noNaN: true }).map((x) => 10 ** x),
      relativePermeability: fc.double({ min: 0, max: 5, noNaN: true }).map((x) => 10 ** x),
    });
    fc.assert(
      fc.property(wires, (wire) => {
        let [rise, l] = [0, inductance(wire, 0).re];
        for (let f = 1e-3; f <= 1e12; f *= 10) {
          const omega = 2 * Math.PI * f;
          const value = inductance(wire, omega);
          const next = -omega * value.im;
          expect(next).toBeGreaterThan(rise);
          expect(value.re).toBeLessThanOrEqual(l);
          expect(value.re).toBeGreaterThan(0);
          [rise, l] = [next, value.re];
        }
      }),
      { seed: SEED, numRuns: 200 },
    );
  });

  test.each(metals)('many points at once are the single ones: %s', (_name, wire) => {
    const omega = Float64Array.from({ length: 400 }, (_, k) => omegaAt(wire, 10 ** (-4 + k / 50)));
    const [re, im] = [new Float64Array(400), new Float64Array(400)];
    solidInternalImpedances(wire, omega, re, im);
    omega.forEach((w, k) => {
      const one = solidInternalImpedance(wire, w);
      expect(Math.abs(re[k] / one.re - 1)).toBeLessThan(4e-15);
      expect(Math.abs(im[k] / one.im - 1)).toBeLessThan(4e-15);
    });
  });
});

test('R - R_dc keeps 1e-10 down to a/delta = 1e-3 (and 14 digits): 40-digit values of L_int 8 pi/mu', () => {
  let count = 0;
  let worst = 0;
  const unit: RoundWire = { radius: 1, conductivity: 1 / MU0, relativePermeability: 1 };
  for (const { t, l } of readRows('ray.json') as { t: number; l: [string, string, number] }[]) {
    // omega = T for this wire; a/delta = sqrt(T/2)
    if (t < 2e-6) continue;
    const wanted = -t * Number(l[1]) * 2 ** l[2] * (MU0 / (8 * Math.PI));
    const rise = -t * inductance(unit, t).im;
    worst = Math.max(worst, Math.abs(rise / wanted - 1));
    count++;
  }
  console.log(`R - R_dc: worst error ${worst.toExponential(1)} over ${count} points`);
  expect(count).toBeGreaterThan(35);
  expect(worst).toBeLessThan(1e-14);
});

test('the rise at a/delta = 1e-3 by its series: R_dc (x^4/192 - x^8/46080), x^2 = 2 (a/delta)^2 (Rayleigh 1886)', () => {
  for (const [, wire] of metals) {
    const omega = omegaAt(wire, 1e-3);
    const x4 = 2e-6 ** 2;
    const series = solidResistanceDc(wire) * (x4 / 192 - (x4 * x4) / 46080);
    expect(Math.abs((-omega * inductance(wire, omega).im) / series - 1)).toBeLessThan(1e-13);
  }
});

describe('what is refused: DOMAIN', () => {
  const domain = expect.objectContaining({ code: 'DOMAIN' });
  const out = new Float64Array(2);
  test('wires and frequencies', () => {
    const bad: RoundWire[] = [
      { ...copper, radius: 0 },
      { ...copper, radius: NaN },
      { ...copper, conductivity: -1 },
      { ...copper, relativePermeability: 0.5 },
    ];
    for (const wire of bad) {
      expect(() => solidInternalInductance(wire, 1, out)).toThrow(domain);
      expect(() => solidInternalImpedance(wire, 1)).toThrow(domain);
      expect(() => solidReflections(wire, 1, 1, out, out)).toThrow(domain);
      expect(() => solidDecayRates(wire, 1)).toThrow(domain);
    }
    for (const omega of [-1, NaN, Infinity]) {
      expect(() => solidInternalInductance(copper, omega, out)).toThrow(domain);
      expect(() => solidReflection(copper, omega, 1)).toThrow(domain);
      expect(() => solidInteriorRatio(copper, omega, 0, 0)).toThrow(domain);
      expect(() => skinDepth(copper, omega)).toThrow(domain);
      for (const wire of [copper, perfect]) {
        expect(() => solidInternalImpedances(wire, Float64Array.of(1, omega), out, out)).toThrow(domain);
      }
    }
    expect(() => skinDepth({ conductivity: 0, relativePermeability: 1 }, 1)).toThrow(domain);
    expect(() => solidDecayRates(perfect, 1)).toThrow(domain);
  });
  test('orders and radii', () => {
    for (const n of [0, -1, 1.5, 10_001]) expect(() => solidReflection(copper, 1, n)).toThrow(domain);
    for (const n of [-1, 0.5]) expect(() => solidInteriorRatio(copper, 1, n, 0)).toThrow(domain);
    for (const r of [-1e-9, 0.8e-3, NaN]) expect(() => solidInteriorRatio(copper, 1, 0, r)).toThrow(domain);
    expect(() => solidReflection({ ...copper, radius: 1e9 }, 1e12, 1)).toThrow(/perfect conductor/);
  });
});
