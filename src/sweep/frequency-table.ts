/** The table of R and L over the frequencies of a case: one solution each, geometry prepared once. */
import { impedanceAt, type LoopImpedance, prepareCase } from '../loops/index.ts';
import type { Case } from '../model/index.ts';
import type { Caution } from '../problem.ts';
import { Problem } from '../problem.ts';
import { caseCautions } from './cautions.ts';
import type { CurrentSeries, FrequencyTable, LoopSeries, MutualSeries } from './table.ts';

export interface SweepOptions {
  /** called after each frequency; a promise is awaited, so that a program can breathe and stop */
  readonly onProgress?: (done: number, total: number) => void | Promise<void>;
}

/**
 * Solves a case at all its frequencies.
 *
 * @throws Problem NO_FREQUENCIES for an empty list; as `prepareCase` and `impedanceAt`
 */
export async function frequencyTable(c: Case, options: SweepOptions = {}): Promise<FrequencyTable> {
  if (c.frequencies.length === 0)
    throw new Problem('NO_FREQUENCIES', 'the case has no frequencies; give at least one');
  const prepared = prepareCase(c, Math.max(...c.frequencies));
  const points: LoopImpedance[] = [];
  for (const f of c.frequencies) {
    points.push(impedanceAt(prepared, f));
    await options.onProgress?.(points.length, c.frequencies.length);
  }
  const count = c.loops.length;
  const series = (pick: (p: LoopImpedance) => number) => Float64Array.from(points, pick);
  const loops = c.loops.map((loop, k): LoopSeries => {
    const at = k * count + k;
    return {
      name: loop.name,
      resistance: series((p) => p.resistance[at]),
      inductance: series((p) => p.inductance[at]),
      resistanceIncrement: series((p) => p.resistanceIncrement[at]),
      resistanceDc: prepared.circuit.directResistance[at],
      resistanceError: series((p) => p.resistanceError[k]),
      inductanceError: series((p) => p.inductanceError[k]),
    };
  });
  const mutual: MutualSeries[] = [];
  for (let k = 0; k < count; k++) {
    for (let l = k + 1; l < count; l++) {
      mutual.push({
        between: [c.loops[k].name, c.loops[l].name],
        resistance: series((p) => p.resistance[k * count + l]),
        inductance: series((p) => p.inductance[k * count + l]),
        error: series((p) => p.mutualError[k * count + l]),
      });
    }
  }
  return {
    title: c.title,
    tolerance: c.tolerance,
    reached: points.every((p) => p.reached),
    frequency: Float64Array.from(c.frequencies),
    loops,
    mutual,
    currents: currentSeries(c, points),
    cautions: [...caseCautions(c), ...toleranceCaution(c, points)],
  };
}

/** Currents of the wires of each loop, and of every other wire that carries some. */
function currentSeries(c: Case, points: readonly LoopImpedance[]): CurrentSeries[] {
  const wires = c.wires.length;
  const out: CurrentSeries[] = [];
  c.loops.forEach((loop, k) => {
    c.wires.forEach((wire, i) => {
      const re = Float64Array.from(points, (p) => p.currents.re[k * wires + i]);
      const im = Float64Array.from(points, (p) => p.currents.im[k * wires + i]);
      if (re.some((x) => x !== 0) || im.some((x) => x !== 0))
        out.push({ loop: loop.name, wire: wire.name, re, im });
    });
  });
  return out;
}

function toleranceCaution(c: Case, points: readonly LoopImpedance[]): Caution[] {
  const missed = points.filter((p) => !p.reached);
  if (missed.length === 0) return [];
  const worst = Math.max(...missed.flatMap((p) => [...p.resistanceError, ...p.inductanceError]));
  return [
    {
      code: 'TOLERANCE',
      text: `the tolerance ${c.tolerance} was not reached at ${missed.length} of ${points.length} frequencies; the largest stated error is ${worst.toPrecision(2)}`,
      from_hz: Math.min(...missed.map((p) => p.frequency)),
    },
  ];
}
