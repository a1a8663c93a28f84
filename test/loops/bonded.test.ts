/** Bonded wires: Kirchhoff's laws, shares at 0 Hz, groups bonded at both ends, accuracy of the currents. */
import { Complex } from 'complex.js';
import { describe, expect, it } from 'vitest';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import type { Case, Wire } from '../../src/model/index.ts';
import { caseOf, loop, seeded, wire } from './case-builder.ts';
import { randomLayout } from './random-layouts.ts';

const SEED = 8086;
const solve = (c: Case, f: number) => impedanceAt(prepareCase(c, f), f);
const perfect = { conductivity: Number.POSITIVE_INFINITY };

function current(z: ReturnType<typeof solve>, wires: number, k: number, i: number): Complex {
  return new Complex(z.currents.re[k * wires + i], z.currents.im[k * wires + i]);
}

/** Random layouts with some wires perfect; what the loop leaves over is one bonded group where it can be. */
function layouts(count: number, share: number): { case: Case; frequency: number }[] {
  const random = seeded(SEED);
  return Array.from({ length: count }, () => {
    const { case: c, frequency } = randomLayout(random);
    const wires: Wire[] = c.wires.map((w) => (random() < share ? { ...w, ...perfect } : w));
    const used = new Set([...c.loops[0].go, ...c.loops[0].return]);
    const rest = wires.map((_, i) => i).filter((i) => !used.has(i));
    return { case: { ...c, wires, bonded: rest.length > 1 ? [rest] : [] }, frequency };
  });
}

describe(`currents, seed ${SEED}`, () => {
  it('of a group add up to what its loop drives, perfect members or not', () => {
    let groups = 0;
    for (const { case: c, frequency } of layouts(60, 0.4)) {
      for (const f of [0, frequency]) {
        const z = solve(c, f);
        for (const [members, net] of [
          [c.loops[0].go, 1],
          [c.loops[0].return, -1],
          ...c.bonded.map((list) => [list, 0] as const),
        ] as const) {
          const sum = members.reduce((s, i) => s.add(current(z, c.wires.length, 0, i)), new Complex(0));
          expect(sum.sub(net).abs()).toBeLessThan(1e-12);
          groups++;
        }
      }
    }
    expect(groups).toBeGreaterThan(250);
  });

  it('are within the tolerance of those at a tolerance of 1e-12', () => {
    let worst = 0;
    for (const { case: c, frequency } of layouts(60, 0)) {
      const z = solve(c, frequency);
      const tight = solve({ ...c, tolerance: 1e-12 }, frequency);
      for (let i = 0; i < c.wires.length; i++) {
        const n = c.wires.length;
        worst = Math.max(
          worst,
          current(z, n, 0, i)
            .sub(current(tight, n, 0, i))
            .abs(),
        );
      }
    }
    console.log(`seed ${SEED}: currents off by ${worst.toExponential(1)} at most`);
    expect(worst).toBeLessThan(1e-8);
  });
});

describe('shares', () => {
  it('at 0 Hz go by conductance; perfect members take all, alike where they lie alike', () => {
    const aside = wire(0, 9e-3, 1e-3);
    const copper = solve(
      caseOf([wire(-3e-3, 0, 1e-3), wire(3e-3, 0, 0.5e-3), aside], [loop([0, 1], [2])]),
      0,
    );
    expect(copper.currents.re[0]).toBeCloseTo(0.8, 13);
    expect(copper.currents.re[1]).toBeCloseTo(0.2, 13);
    const mixed = [wire(-3e-3, 0, 1e-3, perfect), wire(3e-3, 0, 1e-3, perfect), wire(0, 4e-3, 1e-3), aside];
    const z = solve(caseOf(mixed, [loop([0, 1, 2], [3])]), 0);
    expect([...z.currents.re.slice(0, 3)].map((x) => Number(x.toFixed(12)))).toEqual([0.5, 0.5, 0]);
    // R of the return alone: 1/(sigma pi a^2)
    expect(z.resistance[0] * 58e6 * Math.PI * 1e-6).toBeCloseTo(1, 12);
  });
});

describe('a group bonded at both ends and driven by none', () => {
  const wires = [
    wire(0, 0, 1e-3),
    wire(2.4e-3, 0, 1e-3),
    wire(-0.5e-3, 2.5e-3, 0.7e-3),
    wire(3e-3, 2.2e-3, 0.9e-3, { conductivity: 34.8e6 }),
  ];
  it.each([50, 2e3, 1e5, 3e7])('is a shorted second loop: Z = Z_11 - Z_12^2/Z_22, at %d Hz', (f) => {
    const two = solve(caseOf(wires, [loop([0], [1]), loop([2], [3])]), f);
    const omega = 2 * Math.PI * f;
    const z = (i: number) => new Complex(two.resistance[i], omega * two.inductance[i]);
    const expected = z(0).sub(z(1).pow(2).div(z(3)));
    const bonded = solve(caseOf(wires, [loop([0], [1])], { bonded: [[2, 3]] }), f);
    expect(Math.abs(bonded.resistance[0] / expected.re - 1)).toBeLessThan(1e-8);
    expect(Math.abs((omega * bonded.inductance[0]) / expected.im - 1)).toBeLessThan(1e-8);
    const swirl = z(1).div(z(3)).neg();
    expect(current(bonded, 4, 0, 2).sub(swirl).abs()).toBeLessThan(1e-8);
    expect(current(bonded, 4, 0, 3).add(swirl).abs()).toBeLessThan(1e-8);
  });
  it('carries nothing at 0 Hz, lowers L above it, and raises R while it is weak', () => {
    const open = caseOf(wires, [loop([0], [1])]);
    const bonded = { ...open, bonded: [[2, 3]] };
    expect(solve(bonded, 0).resistance[0]).toBe(solve(open, 0).resistance[0]);
    expect(solve(bonded, 1e5).inductance[0]).toBeLessThan(0.99 * solve(open, 1e5).inductance[0]);
    expect(solve(bonded, 500).resistance[0]).toBeGreaterThan(1.001 * solve(open, 500).resistance[0]);
  });
});

describe('symmetry that leaves most orders empty does not hide the truncation', () => {
  it.each([6, 9, 12])('a wire in a ring of %d: the true error is within the stated one', (count) => {
    const ring = Array.from({ length: count }, (_, i) => {
      const t = (2 * Math.PI * i) / count;
      // neighbours 4 % of their diameter apart, 3 % of it around the wire inside
      const radius = 1e-3 / 1.04;
      return { x: Math.cos(t), y: Math.sin(t), radius, distance: 1e-3 / Math.sin(Math.PI / count) };
    });
    const inner = ring[0].distance - 1.06 * ring[0].radius;
    const wires = [
      wire(0, 0, inner),
      ...ring.map(({ x, y, radius, distance }) => wire(distance * x, distance * y, radius)),
    ];
    const c = caseOf(wires, [
      loop(
        [0],
        ring.map((_, i) => i + 1),
      ),
    ]);
    const reference = solve({ ...c, tolerance: 1e-12 }, 1e6);
    for (const tolerance of [0.1, 1e-2, 1e-3, 1e-4, 1e-6]) {
      const z = solve({ ...c, tolerance }, 1e6);
      const error = (mine: Float64Array, true_: Float64Array) => Math.abs(mine[0] / true_[0] - 1);
      expect(error(z.resistance, reference.resistance), `R, ${tolerance}`).toBeLessThanOrEqual(
        z.resistanceError[0],
      );
      expect(error(z.inductance, reference.inductance), `L, ${tolerance}`).toBeLessThanOrEqual(
        z.inductanceError[0],
      );
    }
  });
});

describe('circuits that can not be are refused by the solver itself', () => {
  const wires = [0, 1, 2, 3].map((i) => wire(4e-3 * i, 0, 1e-3));
  it.each([
    ['BOTH_SIDES', [loop([0, 1], [1])], {}],
    ['EMPTY_LOOP', [loop([], [1])], {}],
    ['EMPTY_LOOP', [], {}],
    ['EMPTY_LOOP', [loop([0, 1], [2], { series: true })], {}],
    ['GROUP_CONFLICT', [loop([0], [1, 2]), loop([0], [2])], {}],
    ['GROUP_CONFLICT', [loop([0], [1])], { bonded: [[1, 2]] }],
  ] as const)('%s', (code, loops, more) => {
    const c = caseOf(wires, [...loops], 'bonded' in more ? { bonded: more.bonded } : {});
    expect(() => prepareCase(c, 50)).toThrow(expect.objectContaining({ code }));
  });
});

it('wires that touch or overlap are refused by the solver itself: OVERLAP', () => {
  for (const d of [2e-3, 1.5e-3]) {
    const c = caseOf([wire(0, 0, 1e-3), wire(d, 0, 1e-3)], [loop([0], [1])]);
    expect(() => prepareCase(c, 50)).toThrow(expect.objectContaining({ code: 'OVERLAP' }));
  }
});
