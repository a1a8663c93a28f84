/** Columns as people read them: one unit a column, digits in keeping with the stated error of each value. */
import type { FrequencyTable } from '../sweep/index.ts';
import { type Column, type ColumnKind, type TableChoices, tableColumns, unitsOf } from './columns.ts';
import { finite } from './csv.ts';
import { digitsWithin, engineering, fixed, type Scale, scaleOf } from './engineering.ts';

export interface DisplayColumn {
  readonly label: string;
  /** such as `mohm/m`; empty where the cells have their own or need none */
  readonly unit: string;
  readonly cells: readonly string[];
}

export interface Display {
  readonly columns: readonly DisplayColumn[];
  /** rows that miss the tolerance, with the mark that their frequency bears */
  readonly missed: readonly number[];
  /** one line: the stated errors */
  readonly errors: string;
}

/** Behind a frequency whose row misses the wanted tolerance. */
export const MISSED_MARK = '*';

/** Digits of values without a stated error of their own. */
const DETAIL_DIGITS = 5;

/** Decimals of currents per ampere. */
const CURRENT_DECIMALS = 6;

/** @throws Problem INTERNAL for a number that is not finite */
export function displayTable(table: FrequencyTable, choices: TableChoices): Display {
  const units = { ...unitsOf(choices), length: 'm' };
  const missed = Array.from(table.frequency.keys()).filter((i) =>
    table.loops.some((loop) => misses(loop.resistanceError[i]) || misses(loop.inductanceError[i])),
  );
  function misses(error: number): boolean {
    return !table.reached && !(error <= table.tolerance);
  }
  const columns = tableColumns(table, choices).map((column): DisplayColumn => {
    for (const value of column.values) if (value !== undefined) finite(value, column.name);
    const scaled = column.kind in units;
    const scale = scaled ? columnScale(column) : { prefix: '', factor: 1 };
    const unit = scaled
      ? `${scale.prefix}${units[column.kind as keyof typeof units]}`
      : unitOfKind(column.kind);
    const mark = (i: number) => (column.kind === 'frequency' && missed.includes(i) ? ` ${MISSED_MARK}` : '');
    const cells = column.values.map((value, i) =>
      value === undefined ? '-' : `${cell(column, value, i, scale)}${mark(i)}`,
    );
    return { label: column.label, unit, cells };
  });
  return { columns, missed, errors: errorLine(table) };
}

/** Of the middle between the smallest and the largest value on the log scale. */
function columnScale({ values }: Column): Scale {
  const sizes = values.filter((value) => value !== undefined && value !== 0).map((value) => Math.abs(value!));
  if (sizes.length === 0) return scaleOf(0);
  const least = sizes.reduce((a, b) => Math.min(a, b));
  const most = sizes.reduce((a, b) => Math.max(a, b));
  // rounded, so that a power of thousand stays one
  return scaleOf(Number((Math.sqrt(least) * Math.sqrt(most)).toPrecision(12)));
}

function unitOfKind(kind: ColumnKind): string {
  return kind === 'current' ? 'A/A' : '';
}

function cell(column: Column, value: number, i: number, scale: Scale): string {
  switch (column.kind) {
    case 'frequency':
      return engineering(value, 'Hz');
    case 'error':
      return value === 0 ? '0' : value.toExponential(1);
    case 'current':
      // no minus before a zero
      return value.toFixed(CURRENT_DECIMALS).replace(/^-(0\.0*)$/, '$1');
    default: {
      const digits = column.errors === undefined ? DETAIL_DIGITS : digitsWithin(column.errors[i]);
      return fixed(value, scale, digits);
    }
  }
}

function errorLine({ loops, tolerance, reached }: FrequencyTable): string {
  const most = (series: readonly Float64Array[]) =>
    series.flatMap((list) => [...list]).reduce((a, b) => Math.max(a, b), 0);
  const r = most(loops.map((loop) => loop.resistanceError));
  const l = most(loops.map((loop) => loop.inductanceError));
  const wanted = reached ? `within the wanted ${tolerance}` : `NOT within the wanted ${tolerance}`;
  return `largest stated error: ${r.toExponential(1)} of R, ${l.toExponential(1)} of L, ${wanted}`;
}

/** One line without control characters, so that a title can not move the cursor. */
export function plainLine(text: string): string {
  return text.replace(/\p{C}+/gu, ' ').trim();
}
