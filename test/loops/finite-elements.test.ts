/** R, L and current splits against finite elements, a method without multipoles (fixtures/fem/solid-wires.json). */
import { describe, expect, it } from 'vitest';
import ledger from '../../fixtures/solver/ledger.json' with { type: 'json' };
import { femRecords, measureFem, solveFem, TOLERANCE } from './measure.ts';

describe('against finite elements', () => {
  it.each(femRecords.map((r) => [`${r.case} a/delta ${r.a_over_delta}`, r] as const))('%s', (_, r) => {
    const z = solveFem(r);
    expect(z.reached).toBe(true);
    const errorR = Math.abs(z.resistance[0] / r.R_ohm_per_m - 1);
    const errorL = Math.abs(z.inductance[0] / r.L_h_per_m - 1);
    expect(errorR).toBeLessThanOrEqual(r.rel_error_bar_R + z.resistanceError[0]);
    expect(errorL).toBeLessThanOrEqual(r.rel_error_bar_L + z.inductanceError[0]);
    expect(Math.max(errorR, errorL)).toBeLessThanOrEqual(TOLERANCE);
    for (const s of r.split ?? []) {
      const bar = (r.split_abs_error_bar as number) + TOLERANCE;
      expect(Math.abs(z.currents.re[s.conductor] - s.I_re)).toBeLessThanOrEqual(bar);
      expect(Math.abs(z.currents.im[s.conductor] - s.I_im)).toBeLessThanOrEqual(bar);
    }
  });

  it('has all six arrangements at five frequencies or more', () => {
    const cases = new Map<string, number>();
    for (const r of femRecords) cases.set(r.case, (cases.get(r.case) ?? 0) + 1);
    expect([...cases.keys()].sort()).toEqual(['P1', 'P12', 'P2', 'P3', 'P4', 'P5']);
    expect(Math.min(...cases.values())).toBeGreaterThanOrEqual(5);
  });

  it('no arrangement is further off than recorded, nor four times nearer', () => {
    const measured = measureFem();
    expect(Object.keys(measured).sort()).toEqual(Object.keys(ledger.fem).sort());
    for (const [name, { error }] of Object.entries(measured)) {
      const held = ledger.fem[name as keyof typeof ledger.fem].error;
      // rounding of another machine
      expect(error, name).toBeLessThanOrEqual(1.02 * held + 1e-13);
      expect(error, `${name}: better, record it`).toBeGreaterThan(held / 4 - 1e-13);
    }
  });
});
