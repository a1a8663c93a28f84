/**
 * The exact circuit of a lone wire: against the continued fraction and the solver's own internal impedance,
 * and as a check of fits.
 */
import { describe, expect, test } from 'vitest';
import { fitFrequencies, fitSections, loneWireCircuit, sectionImpedance } from '../../src/fit/index.ts';
import { Problem } from '../../src/problem.ts';
import { solidInternalInductance } from '../../src/skin/index.ts';
import { seriesOfPairs } from './wide-pair.ts';

const MU0 = 4e-7 * Math.PI;
const copper = { radius: 0.5e-3, conductivity: 58e6, relativePermeability: 1 };
const steel = { radius: 2e-3, conductivity: 7e6, relativePermeability: 200 };

/**
 * R and L inside one wire at a frequency: half a pair whose spacing is its radius, which has no external
 * part.
 */
function inside(wire: typeof copper, f: number): { r: number; l: number } {
  const { r, l } = seriesOfPairs([{ ...wire, spacing: wire.radius }], f);
  return { r: r / 2, l: l / 2 };
}

describe('the exact circuit', () => {
  test.each([
    ['copper', copper],
    ['steel', steel],
  ])('%s: all resistors alike but the closing one, L at 0 Hz is mu / 8 pi', (_name, wire) => {
    const circuit = loneWireCircuit(wire, 30);
    const resistance = 1 / (Math.PI * wire.conductivity * wire.radius ** 2);
    for (const section of circuit.sections.slice(0, -1))
      expect(section.resistance / resistance).toBeCloseTo(1, 14);
    const low = sectionImpedance(circuit, 0);
    expect(low.resistance / resistance).toBeCloseTo(1, 14);
    expect((low.inductance * 8 * Math.PI) / (MU0 * wire.relativePermeability)).toBeCloseTo(1, 14);
  });

  test('agrees with the continued fraction and with the ratio of Bessel functions, better with each section', () => {
    const before = { error: 1 };
    for (const count of [5, 10, 20, 40]) {
      const circuit = loneWireCircuit(copper, count);
      let error = 0;
      // up to a/delta = 5
      for (const f of [50, 1e3, 2e4, 1e5, 4.3e5]) {
        const { r, l } = inside(copper, f);
        const { resistance, inductance } = sectionImpedance(circuit, f);
        error = Math.max(error, Math.abs(resistance / r - 1), Math.abs(inductance / l - 1));
        const solved = new Float64Array(2);
        const omega = 2 * Math.PI * f;
        solidInternalInductance(copper, omega, solved);
        expect(solved[0] / l).toBeCloseTo(1, 12);
        expect((circuit.resistanceDc - omega * solved[1]) / r).toBeCloseTo(1, 12);
      }
      // what the closing section leaves is of third order in 1/p: ever smaller
      expect(error).toBeLessThan(before.error / 8);
      before.error = error;
    }
    expect(before.error).toBeLessThan(1e-7);
  });
});

describe('as a check of fits', () => {
  test('a fit of a band around the first corners finds the first sections of the exact circuit', () => {
    const exact = loneWireCircuit(copper, 60);
    const { frequency } = fitFrequencies(1e3, 2e6);
    const values = Array.from(frequency, (f) => inside(copper, f));
    const model = fitSections(
      {
        frequency,
        resistance: Float64Array.from(values, ({ r }) => r),
        inductance: Float64Array.from(values, ({ l }) => l),
        resistanceDc: exact.resistanceDc,
      },
      { sections: 6 },
    );
    // the fit knows nothing of the zeros of J_1; the second section already stands for a little more than
    // itself
    [1e-4, 1e-2].forEach((part, k) => {
      const [found, told] = [model.sections[k], exact.sections[k]];
      expect(Math.abs(found.resistance / told.resistance - 1)).toBeLessThan(part);
      expect(Math.abs(found.inductance / told.inductance - 1)).toBeLessThan(part);
    });
  });

  test.each([
    ['a perfect wire', { ...copper, conductivity: Infinity }, 1],
    ['no zeros', copper, 0],
    ['half a zero', copper, 1.5],
  ])('%s is refused', (_name, wire, count) => {
    try {
      loneWireCircuit(wire, count);
      expect.unreachable();
    } catch (problem) {
      expect((problem as Problem).code).toBe('DOMAIN');
      expect(problem).toBeInstanceOf(Problem);
    }
  });
});
