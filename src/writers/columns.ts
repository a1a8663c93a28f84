/** The columns of a table, in the order of the output: names carry the unit, values are SI. */
import type { FrequencyTable, LoopSeries, MutualSeries, TableDetail } from '../sweep/index.ts';
import type { Run } from './run.ts';
import { totalTable } from './total.ts';

/** What a table shows beside R and L per metre. */
export interface TableChoices {
  /** columns with the stated error beside each R and L; a table that missed its tolerance has them always */
  readonly withErrors?: boolean;
  /** the current of each wire, for one ampere in the loop */
  readonly currents?: boolean;
  /** values of the whole run in place of those per metre */
  readonly total?: Run;
  /** what stands behind R and L (see `tableDetail`) */
  readonly detail?: TableDetail;
}

export type ColumnKind = 'frequency' | 'resistance' | 'inductance' | 'error' | 'ratio' | 'length' | 'current';

export interface Column {
  /** as in CSV */
  readonly name: string;
  /** for people: without the unit */
  readonly label: string;
  readonly kind: ColumnKind;
  /** [SI] one entry a frequency; undefined where there is none, such as a skin depth at 0 Hz */
  readonly values: readonly (number | undefined)[];
  /** [1] stated relative error of each value; undefined where none is known */
  readonly errors?: Float64Array;
}

/** Ends of the names: per metre, or of the run. */
export function unitsOf(choices: TableChoices): { resistance: string; inductance: string } {
  return choices.total === undefined
    ? { resistance: 'ohm/m', inductance: 'H/m' }
    : { resistance: 'ohm', inductance: 'H' };
}

/** Frequency, then R and L (and errors) of each loop, mutual terms, details, currents. */
export function tableColumns(given: FrequencyTable, choices: TableChoices): Column[] {
  const { table, detail } = totalTable(given, choices);
  const errors = choices.withErrors === true || !table.reached;
  const units = unitsOf(choices);
  const ohm = units.resistance.replace('/', '_per_');
  const henry = units.inductance.replace('/', '_per_');
  const list = (values: Float64Array) => Array.from(values);
  const columns: Column[] = [
    { name: 'frequency_Hz', label: 'frequency', kind: 'frequency', values: list(table.frequency) },
  ];
  const error = (name: string, label: string, values: Float64Array): Column[] =>
    errors ? [{ name, label, kind: 'error', values: list(values) }] : [];
  for (const loop of table.loops) {
    const { name } = loop;
    columns.push(
      {
        name: `${name}_R_${ohm}`,
        label: `${name} R`,
        kind: 'resistance',
        values: list(loop.resistance),
        errors: loop.resistanceError,
      },
      {
        name: `${name}_L_${henry}`,
        label: `${name} L`,
        kind: 'inductance',
        values: list(loop.inductance),
        errors: loop.inductanceError,
      },
      ...error(`${name}_R_error`, `${name} R error`, loop.resistanceError),
      ...error(`${name}_L_error`, `${name} L error`, loop.inductanceError),
    );
  }
  for (const term of table.mutual) {
    const name = term.between.join('.');
    columns.push(
      {
        name: `${name}_R_${ohm}`,
        label: `${name} R`,
        kind: 'resistance',
        values: list(term.resistance),
        errors: mutualErrors(table, term).resistance,
      },
      {
        name: `${name}_L_${henry}`,
        label: `${name} L`,
        kind: 'inductance',
        values: list(term.inductance),
        errors: mutualErrors(table, term).inductance,
      },
      ...error(`${name}_error`, `${name} error`, term.error),
    );
  }
  if (detail !== undefined) columns.push(...detailColumns(detail, table.frequency.length, ohm, henry));
  if (choices.currents === true) {
    for (const { loop, wire, re, im } of table.currents) {
      columns.push(
        {
          name: `${loop}_I_${wire}_re_A_per_A`,
          label: `${loop} ${wire} Re I`,
          kind: 'current',
          values: list(re),
        },
        {
          name: `${loop}_I_${wire}_im_A_per_A`,
          label: `${loop} ${wire} Im I`,
          kind: 'current',
          values: list(im),
        },
      );
    }
  }
  return columns;
}

/** [1] of the values themselves: the stated error is relative to sqrt(|Z_ii Z_jj|), and of L to sqrt(L_ii L_jj). */
function mutualErrors(
  table: FrequencyTable,
  term: MutualSeries,
): Record<'resistance' | 'inductance', Float64Array> {
  const [a, b] = term.between.map((name) => table.loops.find((loop) => loop.name === name)!);
  const impedance = (loop: LoopSeries, i: number) =>
    Math.hypot(loop.resistance[i], 2 * Math.PI * table.frequency[i] * loop.inductance[i]);
  return {
    resistance: term.error.map(
      (e, i) => (e * Math.sqrt(impedance(a, i) * impedance(b, i))) / Math.abs(term.resistance[i]),
    ),
    inductance: term.error.map(
      (e, i) => (e * Math.sqrt(a.inductance[i] * b.inductance[i])) / Math.abs(term.inductance[i]),
    ),
  };
}

function detailColumns(detail: TableDetail, rows: number, ohm: string, henry: string): Column[] {
  const columns: Column[] = [];
  const list = (values: Float64Array) => Array.from(values);
  for (const { name, ...loop } of detail.loops) {
    columns.push(
      {
        name: `${name}_R_dc_${ohm}`,
        label: `${name} R dc`,
        kind: 'resistance',
        values: new Array<number>(rows).fill(loop.resistanceDc),
      },
      {
        name: `${name}_R_ratio`,
        label: `${name} R/R dc`,
        kind: 'ratio',
        values:
          loop.resistanceRatio === undefined
            ? new Array<undefined>(rows).fill(undefined)
            : list(loop.resistanceRatio),
      },
      {
        name: `${name}_L_internal_${henry}`,
        label: `${name} L internal`,
        kind: 'inductance',
        values: list(loop.internalInductance),
      },
      {
        name: `${name}_L_external_${henry}`,
        label: `${name} L external`,
        kind: 'inductance',
        values: list(loop.externalInductance),
      },
    );
  }
  for (const { name, depth } of detail.skinDepths) {
    columns.push({
      name: `skin_depth_${name}_m`,
      label: `skin depth ${name}`,
      kind: 'length',
      values: Array.from(depth, (d) => (d === Number.POSITIVE_INFINITY ? undefined : d)),
    });
  }
  return columns;
}
