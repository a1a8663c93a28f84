/**
 * Measures the solver: finite elements, honesty of the stated error, work of a large bundle. The tests beside hold the
 * figures against fixtures/solver/ledger.json; scripts/bench-solver.mjs prints and records them.
 */
import { readFileSync } from 'node:fs';
import { impedanceAt, type LoopImpedance, prepareCase } from '../../src/loops/index.ts';
import type { Case } from '../../src/model/index.ts';
import { caseOf, loop, seeded, wire } from './case-builder.ts';
import { randomLayout } from './random-layouts.ts';

export const TOLERANCE = 1e-8;

/** One arrangement at one frequency of fixtures/fem/solid-wires.json. */
export interface FemRecord {
  case: string;
  geometry: string;
  freq_hz: number;
  a_over_delta: number;
  R_ohm_per_m: number;
  L_h_per_m: number;
  rel_error_bar_R: number;
  rel_error_bar_L: number;
  conductors_mm: { x: number; y: number; r: number; sig: number; mur: number }[];
  groups: number[][];
  split?: { conductor: number; I_re: number; I_im: number }[];
  split_abs_error_bar?: number;
}

export const femRecords = (
  JSON.parse(readFileSync(new URL('../../fixtures/fem/solid-wires.json', import.meta.url), 'utf8')) as {
    records: FemRecord[];
  }
).records;

export function solveFem(r: FemRecord): LoopImpedance {
  const wires = r.conductors_mm.map((c, i) =>
    wire(c.x * 1e-3, c.y * 1e-3, c.r * 1e-3, {
      name: `w${i}`,
      conductivity: c.sig,
      relativePermeability: c.mur,
    }),
  );
  const c = caseOf(wires, [loop(r.groups[0], r.groups[1])], { tolerance: TOLERANCE });
  return impedanceAt(prepareCase(c, r.freq_hz), r.freq_hz);
}

/** [1] worst distance of R and of L from finite elements, and from the bar with the stated error (at most 1), by arrangement */
export function measureFem(): Record<string, { error: number; ofAllowed: number }> {
  const out: Record<string, { error: number; ofAllowed: number }> = {};
  for (const r of femRecords) {
    const z = solveFem(r);
    out[r.case] ??= { error: 0, ofAllowed: 0 };
    const entry = out[r.case];
    for (const [error, allowed] of [
      [Math.abs(z.resistance[0] / r.R_ohm_per_m - 1), r.rel_error_bar_R + z.resistanceError[0]],
      [Math.abs(z.inductance[0] / r.L_h_per_m - 1), r.rel_error_bar_L + z.inductanceError[0]],
    ]) {
      entry.error = Math.max(entry.error, error);
      entry.ofAllowed = Math.max(entry.ofAllowed, error / allowed);
    }
  }
  return out;
}

export const LAYOUTS_SEED = 20260117;
export const LAYOUTS = 260;

export interface Honesty {
  /** [1] worst true error over stated error */
  ratio: number;
  /** [1] largest true error where the tolerance is 1e-8 */
  largest: number;
  /** layouts whose true error is above the stated one, or whose tolerance was not reached */
  failures: string[];
  /** the layout of the worst ratio */
  worst: string;
}

/** True errors over random layouts: against a solution at much higher orders and a residual at rounding. */
export function measureHonesty(): Honesty {
  const random = seeded(LAYOUTS_SEED);
  const out: Honesty = { ratio: 0, largest: 0, failures: [], worst: '' };
  for (let k = 0; k < LAYOUTS; k++) {
    const { case: c, frequency, smallestGap } = randomLayout(random);
    const tolerance = [1e-3, 1e-5, TOLERANCE, TOLERANCE][k % 4];
    const z = impedanceAt(prepareCase({ ...c, tolerance }, frequency), frequency);
    const reference = impedanceAt(prepareCase({ ...c, tolerance: 1e-12 }, frequency), frequency);
    const errorR = Math.abs(z.resistance[0] / reference.resistance[0] - 1);
    const errorL = Math.abs(z.inductance[0] / reference.inductance[0] - 1);
    const ratio = Math.max(errorR / z.resistanceError[0], errorL / z.inductanceError[0]);
    const of = (error: number, stated: number) => `${error.toExponential(1)} of ${stated.toExponential(1)}`;
    const text =
      `layout ${k}: ${c.wires.length} wires, gap ${smallestGap.toPrecision(2)}, ${frequency.toPrecision(3)} Hz, ` +
      `tolerance ${tolerance}: R ${of(errorR, z.resistanceError[0])}, L ${of(errorL, z.inductanceError[0])}, ` +
      `orders ${z.orders} against ${reference.orders}`;
    if (ratio > out.ratio) {
      out.ratio = ratio;
      out.worst = text;
    }
    if (tolerance === TOLERANCE) out.largest = Math.max(out.largest, errorR, errorL);
    if (!(ratio <= 1) || !z.reached) out.failures.push(text);
  }
  return out;
}

/** 37 wires of 1 mm in a hexagon, gap 5 % of the diameter, one half go and the other return, 10 Hz to 10 MHz. */
export function hexagon(): Case {
  const pitch = 1.05e-3;
  const wires = [];
  for (let q = -3; q <= 3; q++) {
    for (let r = Math.max(-3, -q - 3); r <= Math.min(3, 3 - q); r++) {
      wires.push(wire(pitch * (q + r / 2), pitch * r * Math.sqrt(0.75), 0.5e-3, { name: `w${q},${r}` }));
    }
  }
  const all = wires.map((_, i) => i);
  const frequencies = Array.from({ length: 61 }, (_, k) => 10 ** (1 + k / 10));
  return caseOf(wires, [loop(all.slice(0, 18), all.slice(18))], { frequencies, tolerance: TOLERANCE });
}

export interface BundleWork {
  /** [s] */
  seconds: number;
  /** [1] operator products of all frequencies */
  products: number;
  /** [1] */
  highestOrder: number;
  /** [1] largest stated error */
  stated: number;
  /** points that reached the tolerance */
  reached: number;
}

export function measureHexagon(): BundleWork {
  const c = hexagon();
  const start = performance.now();
  const prepared = prepareCase(c, Math.max(...c.frequencies));
  const points = c.frequencies.map((f) => impedanceAt(prepared, f));
  return {
    seconds: (performance.now() - start) / 1000,
    products: points.reduce((sum, z) => sum + z.iterations, 0),
    highestOrder: Math.max(...points.map((z) => Math.max(...z.orders))),
    stated: Math.max(...points.map((z) => Math.max(z.resistanceError[0], z.inductanceError[0]))),
    reached: points.filter((z) => z.reached).length,
  };
}
