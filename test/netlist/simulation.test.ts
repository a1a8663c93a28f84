/**
 * A written netlist, run by ngspice, against the exact impedance of a wide pair: in frequency, and in time
 * by two transforms.
 */
import { Complex } from 'complex.js';
import { describe, expect, test } from 'vitest';
import { fitSections } from '../../src/fit/index.ts';
import { netlistText } from '../../src/writers/index.ts';
import {
  HAIR_COPPER,
  pairImpedance,
  pairSamples,
  STEEL,
  seriesOfPairs,
  THICK_COPPER,
  THIN_COPPER,
  type WidePair,
} from '../fit/wide-pair.ts';
import { simulate, skipWithoutNgspice, statedError } from './ngspice.ts';
import { fixedTalbot, sineIntegral, stepFromRealPart } from './transforms.ts';

const LENGTH = 12;

function netlistOf(pairs: readonly WidePair[], from: number, to: number, within: number): string {
  const model = fitSections(pairSamples(pairs, from, to), { within });
  return netlistText({
    name: 'run',
    title: 'Test run',
    loop: 'supply',
    model,
    length: LENGTH,
    version: 'test',
  });
}

describe('the transforms', () => {
  test('Si at published points', () => {
    // Abramowitz and Stegun 1964, table 5.1 (from memory: 1, pi, 10)
    expect(sineIntegral(1)).toBeCloseTo(0.946083070367183, 14);
    expect(sineIntegral(Math.PI)).toBeCloseTo(1.851937051982466, 13);
    expect(sineIntegral(10)).toBeCloseTo(1.658347594218874, 13);
    // both branches meet
    expect(sineIntegral(6 - 1e-9)).toBeCloseTo(sineIntegral(6 + 1e-9), 9);
  });

  test('both give 1 - exp(-t/T) for a first-order lag', () => {
    const omega = Array.from({ length: 1201 }, (_, i) => 1e-4 * 1e10 ** (i / 1200));
    const real = omega.map((w) => 1 / (1 + w * w));
    for (const t of [0.01, 0.3, 1, 4]) {
      const lag = (s: Complex) => new Complex(1, 0).div(s.mul(s.add(1)));
      expect(fixedTalbot(lag, t)).toBeCloseTo(1 - Math.exp(-t), 7);
      expect(stepFromRealPart(omega, real, t)).toBeCloseTo(1 - Math.exp(-t), 4);
    }
  });
});

describe.skipIf(skipWithoutNgspice)('ngspice runs the netlist', () => {
  test.each([
    ['1 mm pair', [THIN_COPPER], 10, 1e7, 0.01],
    ['1 mm pair, close', [THIN_COPPER], 1, 1e8, 0.001],
    ['steel', [STEEL], 10, 1e7, 0.01],
    ['thick and hair in series', [THICK_COPPER, HAIR_COPPER], 1, 1e9, 0.01],
    ['no section at all', [THIN_COPPER], 1, 1e3, 0.01],
  ] as const)(
    'AC analysis, %s: within the stated error of the exact R and L',
    (_name, pairs, from, to, within) => {
      const netlist = netlistOf(pairs, from, to, within);
      const rows = simulate(netlist, ['I1 0 a AC 1', 'X1 a 0 run', `.ac dec 37 ${from} ${to}`], 'v(a)');
      expect(rows.length).toBeGreaterThan(37 * Math.log10(to / from));
      let [worstR, worstL] = [0, 0];
      for (const [f, re, im] of rows) {
        const { r, l } = seriesOfPairs(pairs, f);
        worstR = Math.max(worstR, Math.abs(re / (LENGTH * r) - 1));
        worstL = Math.max(worstL, Math.abs(im / (2 * Math.PI * f * LENGTH * l) - 1));
      }
      // 5 %: the slack that the project allows on the stated figure
      expect(worstR).toBeLessThan(1.05 * statedError(netlist, 'R'));
      expect(worstL).toBeLessThan(1.05 * statedError(netlist, 'L'));
      // and the statement is no padding
      expect(worstR).toBeGreaterThan(0.9 * statedError(netlist, 'R'));
    },
  );

  /**
   * Worst distances from the exact response, in parts of the final value: of the netlist, of the second
   * transform, and of the same run without skin effect (L as at low frequency), which a useful check must
   * tell from the truth.
   */
  function stepErrors(step: StepCase): {
    netlist: number;
    transforms: number;
    naive: number;
    points: number;
  } {
    const { pair, from, to, source, interval, end, first, quantity } = step;
    const circuit = [
      `V1 in 0 PULSE(0 1 0 ${interval / 100} 1 1 2)`,
      `Rs in a ${source}`,
      'X1 a 0 run',
      '.options reltol=1e-6',
      `.tran ${interval} ${end} 0 ${interval}`,
    ];
    const rows = simulate(
      netlistOf([pair], from, to, 0.01),
      circuit,
      quantity === 'current' ? 'i(v1)' : 'v(a)',
    );
    const response = (run: Complex) => {
      const current = new Complex(1, 0).div(run.add(source));
      return quantity === 'current' ? current : run.mul(current);
    };
    const exact = (s: Complex) => response(pairImpedance(pair, s).mul(LENGTH));
    const low = seriesOfPairs([pair], 1e-3);
    const naive = (s: Complex) => response(s.mul(low.l).add(low.r).mul(LENGTH));
    const final = response(new Complex(low.r * LENGTH, 0)).re;
    // for the voltage, 1 - Re H falls to zero at high frequency as Re H of the current does
    const omega = Array.from({ length: 2501 }, (_, i) => 10 * 1e10 ** (i / 2500));
    const real = omega.map((w) => exact(new Complex(0, w)).re - (quantity === 'voltage' ? 1 : 0));
    const worst = { netlist: 0, transforms: 0, naive: 0, points: 0 };
    const shown = rows.filter(([t]) => t >= first);
    for (const [t, value] of shown.filter((_, k) => k % Math.ceil(shown.length / 45) === 0)) {
      // the source rises over a hundredth of the interval: its middle is the step
      const after = t - interval / 200;
      const told = fixedTalbot((s) => exact(s).div(s), after);
      const plain = fixedTalbot((s) => naive(s).div(s), after);
      const second = stepFromRealPart(omega, real, after) + (quantity === 'voltage' ? 1 : 0);
      worst.netlist = Math.max(
        worst.netlist,
        Math.abs((quantity === 'current' ? -value : value) - told) / final,
      );
      worst.transforms = Math.max(worst.transforms, Math.abs(second - told) / final);
      worst.naive = Math.max(worst.naive, Math.abs(plain - told) / final);
      worst.points++;
    }
    return worst;
  }

  // current after a voltage step: the inductance tells; voltage along the run behind a large resistor: the
  // rise of R tells, shown from where it has come down to a few times its final value, since the circuit is
  // good to 1 % of what is there
  test.each<StepCase>([
    {
      name: 'current, 1 mm pair',
      pair: THIN_COPPER,
      from: 10,
      to: 1e7,
      source: 1,
      interval: 5e-8,
      end: 1e-4,
      first: 5e-7,
      quantity: 'current',
      tells: 0,
    },
    {
      name: 'current, steel',
      pair: STEEL,
      from: 1,
      to: 1e7,
      source: 0.5,
      interval: 2e-7,
      end: 5e-4,
      first: 2e-6,
      quantity: 'current',
      tells: 0.05,
    },
    {
      name: 'voltage, 1 mm pair',
      pair: THIN_COPPER,
      from: 10,
      to: 1e8,
      source: 1000,
      interval: 1e-8,
      end: 1e-5,
      first: 3e-7,
      quantity: 'voltage',
      tells: 0.1,
    },
    {
      name: 'voltage, steel',
      pair: STEEL,
      from: 1,
      to: 1e7,
      source: 1000,
      interval: 1e-6,
      end: 1e-2,
      first: 5e-4,
      quantity: 'voltage',
      tells: 0.1,
    },
  ])('step response, $name: within 1 % of the final value of the exact one', (step) => {
    const { netlist, transforms, naive, points } = stepErrors(step);
    const shown = [netlist, transforms, naive].map((part) => `${(100 * part).toPrecision(2)} %`);
    console.log(
      `${step.name}: netlist ${shown[0]}, transforms apart ${shown[1]}, without skin effect ${shown[2]}`,
    );
    expect(points).toBeGreaterThan(40);
    expect(transforms).toBeLessThan(1e-3);
    expect(naive).toBeGreaterThanOrEqual(step.tells);
    expect(netlist).toBeLessThan(0.01);
  });
});

interface StepCase {
  readonly name: string;
  readonly pair: WidePair;
  /** [Hz] fitted band */
  readonly from: number;
  readonly to: number;
  /** [ohm] */
  readonly source: number;
  /** [s] of the simulation, its end, and the first time compared */
  readonly interval: number;
  readonly end: number;
  readonly first: number;
  readonly quantity: 'current' | 'voltage';
  /** [1] the least difference that skin effect must make here */
  readonly tells: number;
}
