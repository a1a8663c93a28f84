/** Loops of fixtures/fit/cases.json, solved with proximity effect, as samples for a fit. */
import stored from '../../fixtures/fit/cases.json' with { type: 'json' };
import { fitFrequencies, type LoopSamples } from '../../src/fit/index.ts';
import type { Case, Wire } from '../../src/model/index.ts';
import { frequencyTable } from '../../src/sweep/index.ts';

export type StoredCase = (typeof stored.cases)[number];

export const storedCases: readonly StoredCase[] = stored.cases;

function caseOf(entry: StoredCase, frequencies: readonly number[]): Case {
  const wires = entry.wires.map(([x, y, radius, conductivity, relativePermeability], i): Wire => {
    const rest = { material: 'test', temperature: 20, insulation: 0 };
    return {
      name: `w${i}`,
      x: x!,
      y: y!,
      radius: radius!,
      conductivity: conductivity ?? Infinity,
      relativePermeability: relativePermeability!,
      ...rest,
    };
  });
  const series = 'series' in entry && entry.series === true;
  const extra = { resistance: 0, inductance: 0 };
  const loop = { name: 'loop', go: entry.go, return: entry.return, series, extra };
  const rest = { title: entry.name, length: 1, bonded: [], tolerance: 1e-8, cautions: [] };
  return { ...rest, wires, loops: [loop], frequencies };
}

/** One loop of the table at given frequencies. */
export async function solve(entry: StoredCase, frequencies: ArrayLike<number>): Promise<LoopSamples> {
  const table = await frequencyTable(caseOf(entry, Array.from(frequencies)));
  const { resistance, inductance, resistanceDc } = table.loops[0];
  return { frequency: Float64Array.from(frequencies), resistance, inductance, resistanceDc };
}

/** Samples where a fit wants them. */
export function solvedSamples(entry: StoredCase): Promise<LoopSamples> {
  return solve(entry, fitFrequencies(entry.from, entry.to).frequency);
}
