/**
 * What stands behind R and L: direct-current resistance, the inner and outer part of the inductance, skin depths.
 *
 * The internal inductance of a loop is that of its wires each alone, weighted by the currents they carry:
 * sum |i_k|^2 L_k (energy of the wires' own field; L_k by Schelkunoff 1934). The external one is the rest of L, so it
 * holds the field between the wires and, with proximity effect, what the neighbours change inside of them.
 */
import type { Case, Wire } from '../model/index.ts';
import { skinDepth, solidInternalInductance } from '../skin/index.ts';
import type { FrequencyTable } from './table.ts';

/** Details of one loop; arrays have one entry a frequency. */
export interface LoopDetail {
  readonly name: string;
  /** [ohm/m] */
  readonly resistanceDc: number;
  /** [1] R / R_dc; undefined where R_dc is zero */
  readonly resistanceRatio: Float64Array | undefined;
  /** [H/m] of its wires each alone */
  readonly internalInductance: Float64Array;
  /** [H/m] L less the internal inductance */
  readonly externalInductance: Float64Array;
}

/** Skin depth of one metal at one temperature. */
export interface SkinDepthSeries {
  /** name of the material; with that of its first wire behind a dot where a material stands at several temperatures */
  readonly name: string;
  /** [m] one entry a frequency; Infinity at 0 Hz */
  readonly depth: Float64Array;
}

export interface TableDetail {
  readonly loops: readonly LoopDetail[];
  readonly skinDepths: readonly SkinDepthSeries[];
}

/** The details of a table made from a case. */
export function tableDetail(c: Case, table: FrequencyTable): TableDetail {
  return {
    loops: table.loops.map((loop) => {
      const internal = internalInductance(c, table, loop.name);
      const { resistance, resistanceDc } = loop;
      return {
        name: loop.name,
        resistanceDc,
        resistanceRatio: resistanceDc > 0 ? resistance.map((r) => r / resistanceDc) : undefined,
        internalInductance: internal,
        externalInductance: loop.inductance.map((l, i) => l - internal[i]),
      };
    }),
    skinDepths: skinDepths(c.wires, table.frequency),
  };
}

function internalInductance(c: Case, table: FrequencyTable, loop: string): Float64Array {
  const total = new Float64Array(table.frequency.length);
  const out = new Float64Array(2);
  for (const series of table.currents) {
    if (series.loop !== loop) continue;
    const wire = c.wires.find(({ name }) => name === series.wire)!;
    table.frequency.forEach((f, i) => {
      solidInternalInductance(wire, 2 * Math.PI * f, out);
      total[i] += (series.re[i] ** 2 + series.im[i] ** 2) * out[0];
    });
  }
  return total;
}

/** [m] of every metal but `perfect`; one entry for each conductivity and permeability. */
function skinDepths(wires: readonly Wire[], frequency: Float64Array): SkinDepthSeries[] {
  const different = new Map<string, Wire>();
  for (const wire of wires) {
    const key = `${wire.material} ${wire.conductivity} ${wire.relativePermeability}`;
    if (wire.conductivity < Number.POSITIVE_INFINITY && !different.has(key)) different.set(key, wire);
  }
  const kinds = [...different.values()];
  return kinds.map((wire) => {
    const alike = kinds.filter(({ material }) => material === wire.material).length;
    return {
      name: alike === 1 ? wire.material : `${wire.material}.${wire.name}`,
      depth: frequency.map((f) => skinDepth(wire, 2 * Math.PI * f)),
    };
  });
}
