/** Values of a whole run: per metre times length, lumped parts added to a loop's own terms. */
import type { FrequencyTable, LoopSeries, TableDetail } from '../sweep/index.ts';
import type { Run } from './run.ts';

/**
 * The table and its details for a run, in ohm and H; as they are without one. Stated errors stay bounds: lumped parts
 * are exact, so they make the relative error of a loop smaller, in the measure that they make its R and L larger.
 */
export function totalTable(
  table: FrequencyTable,
  { total, detail }: { readonly total?: Run; readonly detail?: TableDetail },
): { table: FrequencyTable; detail: TableDetail | undefined } {
  if (total === undefined) return { table, detail };
  const { length } = total;
  const times = (values: Float64Array) => values.map((value) => value * length);
  const loops = table.loops.map((loop) => totalLoop(loop, total));
  return {
    table: {
      ...table,
      loops,
      mutual: table.mutual.map((term) => ({
        ...term,
        resistance: times(term.resistance),
        inductance: times(term.inductance),
      })),
    },
    detail: detail && {
      ...detail,
      loops: detail.loops.map((part, k) => {
        const { resistance, resistanceDc } = loops[k];
        return {
          name: part.name,
          resistanceDc,
          resistanceRatio: resistanceDc > 0 ? resistance.map((r) => r / resistanceDc) : undefined,
          internalInductance: times(part.internalInductance),
          externalInductance: times(part.externalInductance),
        };
      }),
    },
  };
}

function totalLoop(loop: LoopSeries, { length, extra }: Run): LoopSeries {
  const { resistance: r, inductance: l } = extra.get(loop.name) ?? { resistance: 0, inductance: 0 };
  const resistance = loop.resistance.map((value) => value * length + r);
  const inductance = loop.inductance.map((value) => value * length + l);
  return {
    name: loop.name,
    resistance,
    inductance,
    resistanceIncrement: loop.resistanceIncrement.map((value) => value * length),
    resistanceDc: loop.resistanceDc * length + r,
    resistanceError: loop.resistanceError.map((error, i) => {
      // of a zero R the error is absolute
      const absolute = error * length * (loop.resistance[i] === 0 ? 1 : loop.resistance[i]);
      return resistance[i] === 0 ? absolute : absolute / resistance[i];
    }),
    inductanceError: loop.inductanceError.map((error, i) =>
      inductance[i] === 0 ? error : (error * length * loop.inductance[i]) / inductance[i],
    ),
  };
}
