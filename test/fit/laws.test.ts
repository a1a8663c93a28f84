/**
 * Laws that hold for any passive series impedance of resistors and inductors, for the circuit and against
 * the exact table.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitFrequencies, fitSections, type SectionCircuit, sectionImpedance } from '../../src/fit/index.ts';
import { pairSamples, STEEL, seriesOfPairs, THIN_COPPER } from './wide-pair.ts';

const positive = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp);

const circuits: fc.Arbitrary<SectionCircuit> = fc.record({
  resistanceDc: fc.oneof(fc.constant(0), positive(1e-6, 10)),
  inductanceInfinity: fc.oneof(fc.constant(0), positive(1e-9, 1e-5)),
  sections: fc.array(fc.record({ resistance: positive(1e-6, 1e4), inductance: positive(1e-13, 1e-5) }), {
    maxLength: 8,
  }),
});

describe('any circuit', () => {
  test('R > 0 where there is a loss, R never falls and L never rises with frequency', () => {
    fc.assert(
      fc.property(circuits, positive(1e-2, 1e12), positive(1.0001, 100), (circuit, f, ratio) => {
        const a = sectionImpedance(circuit, f);
        const b = sectionImpedance(circuit, f * ratio);
        expect(a.resistance).toBeGreaterThanOrEqual(circuit.resistanceDc);
        // 1e-14: rounding of a sum of up to nine terms
        expect(b.resistance).toBeGreaterThanOrEqual(a.resistance * (1 - 1e-14));
        expect(b.inductance).toBeLessThanOrEqual(a.inductance * (1 + 1e-14));
      }),
      { seed: 20240611, numRuns: 500 },
    );
  });

  test('0 Hz and very high frequencies are the plain sums', () => {
    fc.assert(
      fc.property(circuits, (circuit) => {
        const low = sectionImpedance(circuit, 0);
        const all = circuit.sections.reduce((sum, s) => sum + s.inductance, circuit.inductanceInfinity);
        expect(low.resistance).toBe(circuit.resistanceDc);
        expect(low.inductance).toBeCloseTo(all, 16);
        const high = sectionImpedance(circuit, 1e30);
        const sum = circuit.sections.reduce((total, s) => total + s.resistance, circuit.resistanceDc);
        expect(Math.abs(high.resistance - sum)).toBeLessThanOrEqual(1e-14 * sum);
        expect(Math.abs(high.inductance - circuit.inductanceInfinity)).toBeLessThanOrEqual(1e-14 * all);
      }),
      { seed: 20240612, numRuns: 300 },
    );
  });

  test('agrees with complex arithmetic on its parts', () => {
    const circuit = {
      resistanceDc: 2,
      inductanceInfinity: 3e-6,
      sections: [{ resistance: 5, inductance: 7e-6 }],
    };
    const w = 2 * Math.PI * 1e5;
    // (j w L R) / (R + j w L) with the denominator made real
    const x = w * 7e-6;
    const { resistance, inductance } = sectionImpedance(circuit, 1e5);
    expect(resistance).toBeCloseTo(2 + (5 * x * x) / (25 + x * x), 13);
    expect(w * inductance).toBeCloseTo(w * 3e-6 + (25 * x) / (25 + x * x), 13);
  });
});

describe('details that later work rests on', () => {
  test('the small rise of R far below a corner keeps its digits', () => {
    const circuit = {
      resistanceDc: 0,
      inductanceInfinity: 1e-6,
      sections: [{ resistance: 4, inductance: 1e-6 }],
    };
    // R_k u^2 / (1 + u^2), u = w L_k / R_k
    for (const f of [1e-3, 1, 1e3]) {
      const u = (2 * Math.PI * f * 1e-6) / 4;
      expect(sectionImpedance(circuit, f).resistance / (4 * u * u)).toBeCloseTo(1 / (1 + u * u), 14);
    }
  });

  test('L_inf stays at zero where less would fit better', () => {
    const circuit: SectionCircuit = {
      resistanceDc: 0.01,
      inductanceInfinity: 0,
      sections: [1, 10].map((r) => ({ resistance: r, inductance: 1e-7 })),
    };
    const frequency = fitFrequencies(1e3, 1e9).frequency;
    const values = Array.from(frequency, (f) => sectionImpedance(circuit, f));
    // L falls faster than any circuit can: pulled down by up to half at the top of the band
    const samples = {
      frequency,
      resistance: Float64Array.from(values, (v) => v.resistance),
      inductance: Float64Array.from(values, (v, i) => v.inductance * (1 - i / 2 / frequency.length)),
      resistanceDc: 0.01,
    };
    for (const sections of [1, 2, 3]) {
      const model = fitSections(samples, { sections });
      expect(model.inductanceInfinity).toBeGreaterThanOrEqual(0);
      for (const f of [1e8, 1e9, 1e11]) expect(sectionImpedance(model, f).inductance).toBeGreaterThan(0);
    }
    expect(fitSections(samples, { sections: 2 }).inductanceInfinity).toBe(0);
  });
});

describe('Kramers and Kronig: the exact R over all frequencies gives the L of the circuit', () => {
  /**
   * L(w) - L(infinity) = (2/pi) P int_0^inf (R(v) - R(w)) / (v^2 - w^2) dv  (H. A. Kramers 1927, R. de L.
   * Kronig 1926; Z - s L_inf grows like sqrt(s), so the difference form converges). Midpoint rule in ln v,
   * with w halfway between two nodes; beyond x = v/w = X, R goes like sqrt(v): the rest is 2 R(w X) / X.
   */
  function inductanceFromResistance(resistance: (f: number) => number, f: number): number {
    const h = 0.05;
    let sum = 0;
    for (let k = -300; k < 300; k++) {
      const x = Math.exp((k + 0.5) * h);
      sum += ((resistance(f * x) - resistance(f)) / (x * x - 1)) * x * h;
    }
    const end = Math.exp(300 * h);
    sum += (2 * resistance(f * end)) / end;
    return ((2 / Math.PI) * sum) / (2 * Math.PI * f);
  }

  test.each([
    ['copper', THIN_COPPER, 10, 1e7, [1e2, 3e4, 2e5, 1e6]],
    ['steel', STEEL, 10, 1e7, [20, 1e3, 1e5]],
  ] as const)('%s', (_name, pair, from, to, frequencies) => {
    const model = fitSections(pairSamples([pair], from, to), { within: 1e-3 });
    // differences of L between two frequencies need no L(infinity)
    const exact = frequencies.map((f) => inductanceFromResistance((v) => seriesOfPairs([pair], v).r, f));
    const fitted = frequencies.map((f) => sectionImpedance(model, f).inductance);
    for (let i = 1; i < frequencies.length; i++) {
      const allowed = 2 * model.errors.inductance * fitted[0] + 2e-4 * Math.abs(exact[i] - exact[0]);
      expect(Math.abs(fitted[i] - fitted[0] - (exact[i] - exact[0]))).toBeLessThan(allowed);
      expect(Math.abs(exact[i] - exact[0])).toBeGreaterThan(4 * allowed);
    }
  });
});
