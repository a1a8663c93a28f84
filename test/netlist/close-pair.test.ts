/**
 * Netlists of loops with proximity effect, run by ngspice, against the solver at frequencies that no fit has seen, and in
 * time against the inverse Fourier transform of the solved impedance (no model in between).
 */
import { Complex } from 'complex.js';
import { describe, expect, test } from 'vitest';
import { fitSections } from '../../src/fit/index.ts';
import { netlistText } from '../../src/writers/index.ts';
import { type StoredCase, solve, solvedSamples, storedCases } from '../fit/solved.ts';
import { simulate, skipWithoutNgspice, statedError } from './ngspice.ts';
import { stepFromRealPart } from './transforms.ts';

const LENGTH = 3;
const EXTRA = { resistance: 2e-3, inductance: 15e-9 };

function named(name: string): StoredCase {
  return storedCases.find((entry) => entry.name === name)!;
}

async function netlistOf(entry: StoredCase, within: number, extra = { resistance: 0, inductance: 0 }) {
  const model = fitSections(await solvedSamples(entry), { within });
  const rest = { name: 'run', title: entry.name, loop: 'loop', version: 'test' };
  return netlistText({ ...rest, model, length: LENGTH, extra });
}

describe.skipIf(skipWithoutNgspice)('ngspice runs the netlist of', () => {
  test.each([
    ['1 mm pair, gap 0.1 mm', 0.01],
    ['radii 5 to 1', 0.001],
    ['copper pair beside a steel wire', 0.01],
    ['one wire amid six returns', 0.01],
    ['perfect pair beside a copper wire', 0.01],
  ])('%s: AC analysis within the stated error', async (name, within) => {
    const entry = named(name);
    const netlist = await netlistOf(entry, within, EXTRA);
    const circuit = ['I1 0 a DC 0 AC 1', 'X1 a 0 run', `.ac dec 11 ${entry.from} ${entry.to}`];
    // the last step of a decade sweep may round past the band
    const rows = simulate(netlist, circuit, 'v(a)').filter(([f]) => f <= entry.to);
    const truth = await solve(
      entry,
      rows.map(([f]) => f),
    );
    let [worstR, worstL] = [0, 0];
    for (const [i, [f, re, im]] of rows.entries()) {
      // the lumped parts are exact: taken off, the run alone must keep what the header says
      const r = (re - EXTRA.resistance) / LENGTH;
      const l = (im / (2 * Math.PI * f) - EXTRA.inductance) / LENGTH;
      worstR = Math.max(worstR, Math.abs(r / truth.resistance[i] - 1));
      worstL = Math.max(worstL, Math.abs(l / truth.inductance[i] - 1));
    }
    expect(rows.length).toBeGreaterThan(60);
    // 5 %: the slack that the project allows on the stated figure
    expect(worstR).toBeLessThan(1.05 * statedError(netlist, 'R'));
    expect(worstL).toBeLessThan(1.05 * statedError(netlist, 'L'));
    expect(worstR).toBeGreaterThan(0.5 * statedError(netlist, 'R'));
  });

  test.each([
    // the voltage starts at many times its final value, so 1 % of the latter wants a closer circuit
    { quantity: 'current', within: 0.01, source: 0.5, interval: 5e-9, end: 8e-6, first: 5e-8, tells: 0.003 },
    { quantity: 'voltage', within: 0.001, source: 1000, interval: 5e-9, end: 8e-6, first: 4e-7, tells: 0.1 },
  ] as const)('1 mm pair, gap 0.1 mm: step of $quantity within 1 % of its final value', async (step) => {
    const { quantity, within, source, interval, end, first, tells } = step;
    const entry = named('1 mm pair, gap 0.1 mm, eight decades');
    const netlist = await netlistOf(entry, within);
    const circuit = [
      `V1 in 0 PULSE(0 1 0 ${interval / 100} 1 1 2)`,
      `Rs in a ${source}`,
      'X1 a 0 run',
      '.options reltol=1e-6',
      `.tran ${interval} ${end} 0 ${interval}`,
    ];
    const rows = simulate(netlist, circuit, quantity === 'current' ? 'i(v1)' : 'v(a)');
    const frequencies = Array.from({ length: 901 }, (_, i) => 10 * 1e9 ** (i / 900));
    const table = await solve(entry, frequencies);
    const omega = frequencies.map((f) => 2 * Math.PI * f);
    // with Z / (source + Z) = 1 - source / (source + Z) both are a response that vanishes at high frequency
    const scale = quantity === 'current' ? 1 : -source;
    const offset = quantity === 'current' ? 0 : 1;
    const real = (r: (i: number) => number, l: (i: number) => number) =>
      omega.map((w, i) => scale * new Complex(LENGTH * r(i) + source, w * LENGTH * l(i)).inverse().re);
    const exact = real(
      (i) => table.resistance[i],
      (i) => table.inductance[i],
    );
    const naive = real(
      () => table.resistance[0],
      () => table.inductance[0],
    );
    const final = offset + scale / (table.resistance[0] * LENGTH + source);
    const worst = { netlist: 0, naive: 0, points: 0 };
    const shown = rows.filter(([t]) => t >= first);
    for (const [t, value] of shown.filter((_, k) => k % Math.ceil(shown.length / 50) === 0)) {
      const after = t - interval / 200;
      const told = offset + stepFromRealPart(omega, exact, after);
      const plain = offset + stepFromRealPart(omega, naive, after);
      worst.netlist = Math.max(
        worst.netlist,
        Math.abs((quantity === 'current' ? -value : value) - told) / final,
      );
      worst.naive = Math.max(worst.naive, Math.abs(plain - told) / final);
      worst.points++;
    }
    const text = [worst.netlist, worst.naive].map((part) => `${(100 * part).toPrecision(2)} %`);
    console.log(
      `${quantity}: netlist ${text[0]}, without skin and proximity effect ${text[1]} of the final value`,
    );
    expect(worst.points).toBeGreaterThan(40);
    expect(worst.naive).toBeGreaterThan(tells);
    expect(worst.netlist).toBeLessThan(0.01);
  });
});
