/** R, L and current splits against finite elements, a method without multipoles (fixtures/fem/solid-wires.json). */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { impedanceAt, prepareCase } from '../../src/loops/index.ts';
import { caseOf, loop, wire } from './case-builder.ts';

interface Record {
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

const { records } = JSON.parse(
  readFileSync(new URL('../../fixtures/fem/solid-wires.json', import.meta.url), 'utf8'),
) as { records: Record[] };
const TOLERANCE = 1e-8;

describe('against finite elements', () => {
  it.each(records.map((r) => [`${r.case} a/delta ${r.a_over_delta}`, r] as const))('%s', (_, r) => {
    const wires = r.conductors_mm.map((c, i) =>
      wire(c.x * 1e-3, c.y * 1e-3, c.r * 1e-3, {
        name: `w${i}`,
        conductivity: c.sig,
        relativePermeability: c.mur,
      }),
    );
    const c = caseOf(wires, [loop(r.groups[0], r.groups[1])], { tolerance: TOLERANCE });
    const z = impedanceAt(prepareCase(c, r.freq_hz), r.freq_hz);
    expect(z.reached).toBe(true);
    const errorR = Math.abs(z.resistance[0] / r.R_ohm_per_m - 1);
    const errorL = Math.abs(z.inductance[0] / r.L_h_per_m - 1);
    expect(errorR).toBeLessThanOrEqual(r.rel_error_bar_R + z.resistanceError[0]);
    expect(errorL).toBeLessThanOrEqual(r.rel_error_bar_L + z.inductanceError[0]);
    for (const s of r.split ?? []) {
      const bar = (r.split_abs_error_bar as number) + TOLERANCE;
      expect(Math.abs(z.currents.re[s.conductor] - s.I_re)).toBeLessThanOrEqual(bar);
      expect(Math.abs(z.currents.im[s.conductor] - s.I_im)).toBeLessThanOrEqual(bar);
    }
  });

  it('has all six arrangements at five frequencies or more', () => {
    const cases = new Map<string, number>();
    for (const r of records) cases.set(r.case, (cases.get(r.case) ?? 0) + 1);
    expect([...cases.keys()].sort()).toEqual(['P1', 'P12', 'P2', 'P3', 'P4', 'P5']);
    expect(Math.min(...cases.values())).toBeGreaterThanOrEqual(5);
  });
});
