/** Physical laws that the impedance obeys whatever the numbers: properties over seeded random layouts. */
import { describe, expect, it } from 'vitest';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import type { Case, Wire } from '../../src/model/index.ts';
import { COPPER, caseOf, loop, seeded, wire } from './case-builder.ts';
import { randomLayout } from './random-layouts.ts';

const SEED = 4711;
const solve = (c: Case, f: number) => impedanceAt(prepareCase(c, f), f);

function layouts(count: number): ReturnType<typeof randomLayout>[] {
  const random = seeded(SEED);
  return Array.from({ length: count }, () => randomLayout(random));
}

/** A layout moved by a map of the plane. */
function moved(c: Case, map: (w: Wire) => Partial<Wire>): Case {
  return { ...c, wires: c.wires.map((w) => ({ ...w, ...map(w) })) };
}

function expectSame(a: Case, b: Case, f: number): void {
  const za = solve(a, f);
  const zb = solve(b, f);
  expect(Math.abs(zb.resistance[0] / za.resistance[0] - 1)).toBeLessThanOrEqual(
    za.resistanceError[0] + zb.resistanceError[0] + 1e-12,
  );
  expect(Math.abs(zb.inductance[0] / za.inductance[0] - 1)).toBeLessThanOrEqual(
    za.inductanceError[0] + zb.inductanceError[0] + 1e-12,
  );
}

describe(`laws, seed ${SEED}`, () => {
  it('translation, rotation and mirror change nothing', () => {
    for (const { case: c, frequency: f } of layouts(30)) {
      const size = Math.max(...c.wires.map((w) => Math.abs(w.x) + Math.abs(w.y) + w.radius));
      const t = 0.7;
      expectSame(
        c,
        moved(c, (w) => ({ x: w.x + 3 * size, y: w.y - 2 * size })),
        f,
      );
      expectSame(
        c,
        moved(c, (w) => ({
          x: w.x * Math.cos(t) - w.y * Math.sin(t),
          y: w.x * Math.sin(t) + w.y * Math.cos(t),
        })),
        f,
      );
      expectSame(
        c,
        moved(c, (w) => ({ y: -w.y })),
        f,
      );
    }
  });

  it('renumbering changes nothing', () => {
    for (const { case: c, frequency: f } of layouts(30)) {
      const n = c.wires.length;
      const l = c.loops[0];
      const back = (i: number) => n - 1 - i;
      expectSame(
        c,
        { ...c, wires: [...c.wires].reverse(), loops: [loop(l.go.map(back), l.return.map(back))] },
        f,
      );
    }
  });

  it('lengths times two and frequency over four: R times four and L the same, to the bit', () => {
    for (const { case: c, frequency: f } of layouts(30)) {
      const big = moved(c, (w) => ({ x: 2 * w.x, y: 2 * w.y, radius: 2 * w.radius }));
      const za = solve(c, f);
      const zb = solve(big, f / 4);
      expect(zb.resistance[0] * 4).toBe(za.resistance[0]);
      expect(zb.inductance[0]).toBe(za.inductance[0]);
    }
  });

  it('R never falls and L never rises with frequency, also with open wires around', () => {
    for (const { case: c } of layouts(20)) {
      const p = prepareCase(c, 1e9);
      let last = impedanceAt(p, 0);
      for (let f = 1; f <= 1e9; f *= 10) {
        const z = impedanceAt(p, f);
        const slack = 1e-13;
        expect(z.resistance[0]).toBeGreaterThanOrEqual(
          last.resistance[0] * (1 - slack - z.resistanceError[0] - last.resistanceError[0]),
        );
        expect(z.inductance[0]).toBeLessThanOrEqual(
          last.inductance[0] * (1 + slack + z.inductanceError[0] + last.inductanceError[0]),
        );
        expect(z.resistanceIncrement[0]).toBeGreaterThanOrEqual(0);
        last = z;
      }
    }
  });

  it('the resistance matrix of three loops is positive semi-definite, and any mix of loops is one loop', () => {
    const random = seeded(SEED);
    for (let k = 0; k < 20; k++) {
      const wires = [0, 1, 2, 3, 4, 5].map((i) => {
        const t = (Math.PI * i) / 3;
        return wire(3 * Math.cos(t) * 1e-3, 3 * Math.sin(t) * 1e-3, (0.4 + 0.9 * random()) * 1e-3, {
          name: `w${i}`,
        });
      });
      const f = 10 ** (2 + 7 * random());
      const three = solve(caseOf(wires, [loop([0], [1]), loop([2], [3]), loop([4], [5])]), f);
      const R = (i: number, j: number) => three.resistance[3 * i + j];
      const det3 =
        R(0, 0) * (R(1, 1) * R(2, 2) - R(1, 2) ** 2) -
        R(0, 1) * (R(0, 1) * R(2, 2) - R(1, 2) * R(0, 2)) +
        R(0, 2) * (R(0, 1) * R(1, 2) - R(1, 1) * R(0, 2));
      expect(R(0, 0)).toBeGreaterThan(0);
      expect(R(0, 0) * R(1, 1) - R(0, 1) ** 2).toBeGreaterThan(0);
      expect(det3).toBeGreaterThan(0);
      // Three loops in series: the sum of all entries, solved as one loop with three goes and returns.
      const series = solve(caseOf(wires, [loop([0, 2, 4], [1, 3, 5], { series: true })]), f);
      const sum = (m: Float64Array) => m.reduce((s, x) => s + x, 0);
      expect(Math.abs(series.resistance[0] / sum(three.resistance) - 1)).toBeLessThan(3e-8);
      expect(Math.abs(series.inductance[0] / sum(three.inductance) - 1)).toBeLessThan(3e-8);
    }
  });

  it('bonding is the parallel connection of the loops: 1/Z from the matrix of single loops', () => {
    // Two goes against one return: bonded Z from the 2 x 2 matrix with a common return.
    const wires = [wire(0, 0, 1e-3), wire(2.3e-3, 0.4e-3, 0.8e-3), wire(1e-3, 3e-3, 1.2e-3)];
    for (const f of [50, 1e3, 1e5, 1e7]) {
      const m = solve(caseOf(wires, [loop([0], [2]), loop([1], [2])]), f);
      const w = 2 * Math.PI * f;
      const z = (i: number) => ({ re: m.resistance[i], im: w * m.inductance[i] });
      const [a, b, d] = [z(0), z(1), z(3)];
      // Z = (a d - b^2)/(a + d - 2 b)
      const num = {
        re: a.re * d.re - a.im * d.im - b.re * b.re + b.im * b.im,
        im: a.re * d.im + a.im * d.re - 2 * b.re * b.im,
      };
      const den = { re: a.re + d.re - 2 * b.re, im: a.im + d.im - 2 * b.im };
      const s = den.re ** 2 + den.im ** 2;
      const both = solve(caseOf(wires, [loop([0, 1], [2])]), f);
      expect(Math.abs(both.resistance[0] / ((num.re * den.re + num.im * den.im) / s) - 1)).toBeLessThan(1e-7);
      expect(Math.abs((both.inductance[0] * w) / ((num.im * den.re - num.re * den.im) / s) - 1)).toBeLessThan(
        1e-7,
      );
    }
  });

  it('Kramers-Kronig: L at 0 Hz less L at the perfect-conductor limit is the integral of (R - R_dc)/w^2', () => {
    const a = 1e-3;
    const d = 2.5e-3;
    const c = caseOf([wire(0, 0, a), wire(d, 0, a)], [loop([0], [1])]);
    const p = prepareCase(c, 1e12);
    // L(0) - L(inf) = (2/pi) int (R - R_dc)/w^2 dw, trapezoid in ln w; above the band R grows like sqrt(w).
    const steps = 40;
    let integral = 0;
    let last = 0;
    const decades = 15;
    for (let k = 0; k <= decades * steps; k++) {
      const w = 10 ** (-2 + k / steps);
      const z = impedanceAt(p, w / (2 * Math.PI));
      last = z.resistanceIncrement[0] / w;
      integral += (k === 0 || k === decades * steps ? 0.5 : 1) * last * (Math.LN10 / steps);
    }
    integral += 2 * last;
    const drop = impedanceAt(p, 0).inductance[0] - 4e-7 * Math.acosh(d / (2 * a));
    expect(Math.abs(((2 / Math.PI) * integral) / drop - 1)).toBeLessThan(1e-6);
  });
});

describe('limits', () => {
  it('0 Hz is the limit of low frequencies, perfect and magnetic wires included', () => {
    const wires = [
      wire(0, 0, 1e-3),
      wire(2.5e-3, 0, 1e-3, { conductivity: 7e6, relativePermeability: 80 }),
      wire(0, 2.6e-3, 0.7e-3, { conductivity: Number.POSITIVE_INFINITY }),
      wire(2.5e-3, 2.5e-3, 0.6e-3, { conductivity: Number.POSITIVE_INFINITY }),
      wire(-2.5e-3, 0, 0.9e-3),
    ];
    for (const l of [
      loop([0], [1]),
      loop([0, 4], [1]),
      loop([2], [0]),
      loop([2, 3], [0]),
      loop([0, 2], [1, 4]),
    ]) {
      const c = caseOf(wires, [l]);
      const dc = solve(c, 0);
      const low = solve(c, 1e-6);
      expect(Math.abs(low.inductance[0] / dc.inductance[0] - 1)).toBeLessThan(1e-9);
      expect(Math.abs(low.resistance[0] / dc.resistance[0] - 1)).toBeLessThan(1e-9);
    }
  });

  it('internal inductance is mu0/(8 pi) a wire at 0 Hz whatever its radius', () => {
    // Faraday with uniform current: L = (mu0/2pi)(ln(d/a) + ln(d/b)) + 2 mu0/(8 pi); standard textbook result
    for (const [a, b] of [
      [1e-3, 1e-3],
      [1e-4, 2e-3],
      [5e-5, 9e-3],
    ]) {
      const d = 0.02;
      const { inductance } = solve(caseOf([wire(0, 0, a), wire(d, 0, b)], [loop([0], [1])]), 0);
      const internal = inductance[0] - 2e-7 * (Math.log(d / a) + Math.log(d / b));
      expect(Math.abs(internal / 1e-7 - 1)).toBeLessThan(1e-12);
    }
  });

  it('perfect conductors: L = (mu0/pi) acosh(d/2a) exactly, R = 0', () => {
    const a = 1e-3;
    for (const d of [2.002e-3, 2.1e-3, 3e-3, 1e-2, 1]) {
      const perfect = { conductivity: Number.POSITIVE_INFINITY };
      for (const f of [0, 1e6]) {
        const z = solve(caseOf([wire(0, 0, a, perfect), wire(d, 0, a, perfect)], [loop([0], [1])]), f);
        const exact = 4e-7 * Math.acosh(d / (2 * a));
        expect(Math.abs(z.inductance[0] / exact - 1)).toBeLessThanOrEqual(z.inductanceError[0]);
        expect(z.reached).toBe(true);
        expect(z.resistance[0]).toBe(0);
      }
    }
  });

  it('perfect conductors alone lose nothing, however many and however close: R is zero, not rounding', () => {
    const perfect = { conductivity: Number.POSITIVE_INFINITY };
    const wires = [
      wire(0, 0, 1.5e-3, perfect),
      wire(2.01e-3, 0, 0.5e-3, perfect),
      wire(-4e-3, 1e-3, 1e-3, perfect),
    ];
    for (const f of [0, 1e3, 1e9]) {
      const z = solve(caseOf(wires, [loop([0], [2]), loop([1], [2])]), f);
      expect(z.reached).toBe(true);
      expect([...z.resistance, ...z.resistanceError]).toEqual([0, 0, 0, 0, 0, 0]);
      expect(Math.max(...z.inductanceError)).toBeLessThanOrEqual(1e-8);
    }
  });

  it('unequal perfect conductors: L = (mu0/2pi) acosh((d^2 - a^2 - b^2)/2ab) (Smythe 1950, section 4.13)', () => {
    const perfect = { conductivity: Number.POSITIVE_INFINITY };
    for (const [a, b, gap] of [
      [1e-3, 1e-2, 2e-6],
      [1e-3, 1e-2, 2e-5],
      [1e-3, 3e-3, 1e-4],
    ]) {
      const d = a + b + gap;
      const z = solve(caseOf([wire(0, 0, a, perfect), wire(d, 0, b, perfect)], [loop([0], [1])]), 1e9);
      // cosh - 1 = gap (gap + 2a + 2b) / 2ab, by the gap for its digits
      const x = (gap * (gap + 2 * a + 2 * b)) / (2 * a * b);
      const exact = 2e-7 * Math.log1p(x + Math.sqrt(x * (2 + x)));
      // the drawing itself rounds the gap to 1e-16 of d
      const rounding = (1e-16 * d) / gap;
      expect(Math.abs(z.inductance[0] / exact - 1)).toBeLessThanOrEqual(z.inductanceError[0] + rounding);
      expect(z.reached).toBe(true);
    }
  });

  it('L grows with spacing, R falls (common practice, no source)', () => {
    let last = { R: Number.POSITIVE_INFINITY, L: 0 };
    for (const d of [2.05e-3, 2.2e-3, 3e-3, 5e-3, 1e-2, 0.1]) {
      const z = solve(caseOf([wire(0, 0, 1e-3), wire(d, 0, 1e-3)], [loop([0], [1])]), 1e5);
      expect(z.inductance[0]).toBeGreaterThan(last.L);
      expect(z.resistance[0]).toBeLessThan(last.R);
      last = { R: z.resistance[0], L: z.inductance[0] };
    }
  });

  it('gaps from 1e-3 of the diameter to 1e4 diameters reach the tolerance up to 1 THz', () => {
    const a = 0.5e-3;
    for (const gap of [1e-3, 1, 1e4]) {
      for (const f of [0, 50, 1e6, 1e12]) {
        const z = solve(caseOf([wire(0, 0, a), wire(2 * a * (1 + gap), 0, a)], [loop([0], [1])]), f);
        expect(z.reached).toBe(true);
        expect(Math.max(z.resistanceError[0], z.inductanceError[0])).toBeLessThanOrEqual(1e-8);
      }
    }
    expect(COPPER).toBe(58e6);
  });

  it('a tolerance of 1e-11 is reached: the iteration goes on as far as that asks for', () => {
    for (const f of [1e3, 1e6]) {
      const z = solve(
        caseOf([wire(0, 0, 1e-3), wire(2.01e-3, 0, 1e-3), wire(0, 2.05e-3, 1e-3)], [loop([0], [1])], {
          tolerance: 1e-11,
        }),
        f,
      );
      expect(z.reached).toBe(true);
      expect(Math.max(z.resistanceError[0], z.inductanceError[0])).toBeLessThanOrEqual(1e-11);
    }
  });

  it('R alone beyond the tolerance is not reached', () => {
    // at 1 THz R is a small part of Z, and its rounding so much larger
    const wires = [wire(0, 0, 0.5e-3), wire(1.001e-3, 0, 0.5e-3)];
    const z = solve(caseOf(wires, [loop([0], [1])], { tolerance: 1e-12 }), 1e12);
    expect(z.inductanceError[0]).toBeLessThan(1e-12);
    expect(z.resistanceError[0]).toBeGreaterThan(1e-12);
    expect(z.reached).toBe(false);
  });

  it('L alone beyond the tolerance is not reached', () => {
    const perfect = { conductivity: Number.POSITIVE_INFINITY };
    const c = caseOf([wire(0, 0, 1e-3, perfect), wire(2.1e-3, 0, 1e-3, perfect)], [loop([0], [1])]);
    expect(solve({ ...c, tolerance: 1e-17 }, 1e6).reached).toBe(false);
    expect(solve(c, 1e6).reached).toBe(true);
  });

  it('a tolerance below rounding is not claimed', () => {
    const z = solve(
      caseOf([wire(0, 0, 1e-3), wire(2.1e-3, 0, 1e-3)], [loop([0], [1])], { tolerance: 1e-17 }),
      1e6,
    );
    expect(z.reached).toBe(false);
    expect(z.resistanceError[0]).toBeLessThan(1e-10);
  });
});
