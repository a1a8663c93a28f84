/**
 * Laws that the field of a solution itself must obey, without the functional that gives R and L: volt drops taken from
 * the field at the surfaces, heat from the current density inside, flux from the field between the wires.
 */
import { Complex } from 'complex.js';
import { describe, expect, it } from 'vitest';
import {
  type Excitation,
  excite,
  type FrequencyPoint,
  frequencyPoint,
  INDUCTANCE_UNIT,
} from '../../src/loops/excitation.ts';
import { impedanceAt, type LoopImpedance, type PreparedCase, prepareCase } from '../../src/loops/index.ts';
import type { Case, Wire } from '../../src/model/index.ts';
import { incomingField } from '../../src/proximity/index.ts';
import {
  solidCurrentDensity,
  solidInteriorRatio,
  solidInternalImpedance,
  solidReflection,
} from '../../src/skin/index.ts';
import { gaussLegendre, integrate } from '../quadrature.ts';
import { caseOf, loop, seeded, wire } from './case-builder.ts';
import { randomLayout } from './random-layouts.ts';

const SEED = 4242;
const MU0 = 4e-7 * Math.PI;

interface Solved {
  readonly prepared: PreparedCase;
  readonly point: FrequencyPoint;
  readonly impedance: LoopImpedance;
  readonly loops: readonly Excitation[];
}

function solved(c: Case, frequency: number): Solved {
  const prepared = prepareCase(c, frequency);
  const impedance = impedanceAt(prepared, frequency);
  const point = frequencyPoint(prepared, 2 * Math.PI * frequency, impedance.orders);
  const loops = c.loops.map((_, k) => excite(prepared, point, k, 1e-13));
  return { prepared, point, impedance, loops };
}

/** Harmonic n of the field that arrives at wire b, exp(i n theta), in units of mu0/(4 pi). */
function arriving({ prepared, point }: Solved, excitation: Excitation, b: number): (n: number) => Complex {
  const field = {
    layout: prepared.layout,
    active: point.system.active,
    outgoing: excitation.multipoles.outgoing,
    currents: excitation.currents,
  };
  // aliases fall like exp(-alpha points)
  const points = Math.ceil(2 * point.system.active.orders[b] + 40 / prepared.alpha[b]);
  const samples = Array.from({ length: points }, (_, k) =>
    incomingField(field, b, (2 * Math.PI * k) / points),
  );
  return (n) => {
    let sum = new Complex(0);
    samples.forEach(([re, im], k) => {
      const angle = (-2 * Math.PI * ((n * k) % points)) / points;
      sum = sum.add(new Complex(re, im).mul(new Complex(Math.cos(angle), Math.sin(angle))));
    });
    return sum.div(points);
  };
}

/** [V/m] drop along wire b: E_z at its surface and the change of A there, means over the angle. */
function drop(s: Solved, excitation: Excitation, b: number): Complex {
  const { omega } = s.point;
  const w = s.prepared.case.wires[b];
  const current = new Complex(excitation.currents.re[b], excitation.currents.im[b]);
  const potential = arriving(s, excitation, b)(0).add(current.mul(-2 * Math.log(w.radius)));
  return current.mul(solidInternalImpedance(w, omega)).add(potential.mul(0, omega * INDUCTANCE_UNIT));
}

/** A random layout of at least four wires and two loops: a bonded pair, a return that both share, open wires. */
function twoLoops(random: () => number): { case: Case; frequency: number } {
  for (let attempt = 0; attempt < 1000; attempt++) {
    const { case: c, frequency } = randomLayout(random);
    const last = c.wires.length - 1;
    if (last < 3 || Math.max(...c.wires.map((w) => w.relativePermeability)) > 1) continue;
    const loops = [loop([0], [last]), loop([1, 2], [last])];
    return { case: { ...c, loops, tolerance: 1e-9 }, frequency };
  }
  throw new Error('no layout of four wires');
}

describe(`drops from the field, seed ${SEED}`, () => {
  it('reciprocity: the drop in one loop by the other, both ways and as the table says; bonded wires drop alike', () => {
    const random = seeded(SEED);
    let worst = 0;
    for (let layout = 0; layout < 25; layout++) {
      const { case: c, frequency } = twoLoops(random);
      const s = solved(c, frequency);
      const drops = s.loops.map((e) => c.wires.map((_, b) => drop(s, e, b)));
      const last = c.wires.length - 1;
      // [k][l]: volts in loop k for one ampere in loop l, from the field alone
      const z = [0, 1].map((k) => [0, 1].map((l) => drops[l][k].sub(drops[l][last])));
      const table = (k: number, l: number) =>
        new Complex(s.impedance.resistance[2 * k + l], s.point.omega * s.impedance.inductance[2 * k + l]);
      const size = (k: number, l: number) => Math.sqrt(table(k, k).abs() * table(l, l).abs());
      for (const [k, l] of [
        [0, 0],
        [0, 1],
        [1, 0],
        [1, 1],
      ]) {
        worst = Math.max(worst, z[k][l].sub(table(k, l)).abs() / size(k, l));
      }
      worst = Math.max(worst, z[0][1].sub(z[1][0]).abs() / size(0, 1));
      for (const l of [0, 1]) worst = Math.max(worst, drops[l][1].sub(drops[l][2]).abs() / size(1, l));
    }
    console.log(`seed ${SEED}: drops from the field differ from the table by ${worst.toExponential(1)}`);
    // orders and residual far below the tolerance of 1e-9: what is left is rounding
    expect(worst).toBeLessThan(1e-11);
  });
});

/** [W/m] heat in wire b: the volume integral of |J|^2/sigma, harmonic by harmonic. */
function heat(s: Solved, excitation: Excitation, b: number): number {
  const { omega, system } = s.point;
  const w = s.prepared.case.wires[b];
  const at = arriving(s, excitation, b);
  const nodes = gaussLegendre(48);
  const overSection = (density: (r: number) => Complex) =>
    nodes.reduce((sum, node) => sum + node.w * node.x * density(node.x * w.radius).abs() ** 2, 0) *
    (2 * Math.PI * w.radius ** 2);
  const current = Math.hypot(excitation.currents.re[b], excitation.currents.im[b]);
  let power = (current ** 2 * overSection((r) => solidCurrentDensity(w, omega, r))) / w.conductivity;
  for (let n = 1; n <= system.active.orders[b]; n++) {
    // A is continuous: incoming plus outgoing, B = -G C
    const inside = new Complex(1).sub(solidReflection(w, omega, n)).abs();
    const arrived = Math.hypot(at(n).abs(), at(-n).abs());
    const surface = omega * INDUCTANCE_UNIT * inside * arrived;
    power += w.conductivity * surface ** 2 * overSection((r) => solidInteriorRatio(w, omega, n, r));
  }
  return power;
}

describe('heat', () => {
  const copper = (x: number, y: number, radius: number, more: Partial<Wire> = {}) => wire(x, y, radius, more);
  const cases: [string, Case][] = [
    ['a close pair', caseOf([copper(0, 0, 1e-3), copper(2.2e-3, 0, 1e-3)], [loop([0], [1])])],
    [
      'unequal bonded wires and an open one',
      caseOf(
        [copper(0, 0, 1e-3), copper(2.5e-3, 0, 0.5e-3), copper(1e-3, 3e-3, 1e-3), copper(3e-3, 2e-3, 0.8e-3)],
        [loop([0, 1], [2])],
      ),
    ],
    [
      'a steel wire beside copper and aluminium',
      caseOf(
        [
          copper(0, 0, 1e-3),
          copper(2.5e-3, 0, 1e-3, { conductivity: 34.8e6 }),
          copper(1e-3, 2.6e-3, 0.9e-3, { conductivity: 7e6, relativePermeability: 60 }),
        ],
        [loop([0], [1])],
      ),
    ],
  ];
  it.each(cases)('the volume integral of |J|^2/sigma is the power at the terminals: %s', (_, c) => {
    for (const frequency of [50, 3e3, 3e4, 2e5]) {
      const s = solved({ ...c, tolerance: 1e-10 }, frequency);
      const inside = c.wires.reduce((sum, _wire, b) => sum + heat(s, s.loops[0], b), 0);
      expect(Math.abs(inside / s.impedance.resistance[0] - 1), `${frequency} Hz`).toBeLessThan(1e-9);
    }
  });
});

describe('flux between the facing surfaces of a pair at uniform current (common practice, no source)', () => {
  /** [Wb/A/m] B integrated from surface to surface, read off at an open wire so thin that it carries no field of its own. */
  function flux(a: number, d: number): number {
    const gap = d - 2 * a;
    const probe = 0.004 * gap;
    const density = (x: number) => {
      const wires = [wire(0, 0, a), wire(d, 0, a), wire(x, 0, probe)];
      const s = solved(caseOf(wires, [loop([0], [1])]), 0);
      // A = .. + 2 Re(c_1) (r/probe) cos theta, B_y = -dA/dx
      return (-2 * arriving(s, s.loops[0], 2)(1).re * INDUCTANCE_UNIT) / probe;
    };
    return integrate(density, a, d - a, 12);
  }

  it('is (mu0/pi) ln((d - a)/a), and vanishes when the wires touch', () => {
    const a = 1e-3;
    for (const d of [2.002e-3, 2.05e-3, 2.5e-3, 3e-3, 4e-3]) {
      expect(Math.abs(flux(a, d) / ((MU0 / Math.PI) * Math.log((d - a) / a)) - 1), `${d} m`).toBeLessThan(
        1e-9,
      );
    }
    // linear towards d = 2a: two points on the line through zero
    expect(flux(a, 2e-3 + 2e-8) / flux(a, 2e-3 + 1e-8)).toBeCloseTo(2, 4);
  });
});
