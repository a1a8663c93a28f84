/** CSV of RFC 4180: a header, lines ended by CRLF, numbers in their shortest form that reads back to the same. */
import { Problem } from '../problem.ts';

/** A column: a name with its unit, and one value a row; undefined leaves the field empty. */
export interface CsvColumn {
  readonly name: string;
  readonly values: readonly (string | number | undefined)[];
}

/** @throws Problem INTERNAL for a number that is not finite */
export function columnsToCsv(columns: readonly CsvColumn[]): string {
  const rows = columns[0]?.values.length ?? 0;
  const lines = [columns.map(({ name }) => csvField(name)).join(',')];
  for (let i = 0; i < rows; i++) {
    lines.push(columns.map(({ name, values }) => csvValue(values[i], name)).join(','));
  }
  return `${lines.join('\r\n')}\r\n`;
}

/** Fields with a comma, a quote or a line end are quoted, quotes inside doubled. */
export function csvField(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

function csvValue(value: string | number | undefined, name: string): string {
  if (typeof value === 'string') return csvField(value);
  return value === undefined ? '' : String(finite(value, name));
}

/** @throws Problem INTERNAL for NaN or an infinity: no result may hold one */
export function finite(value: number, name: string): number {
  if (Number.isFinite(value)) return value;
  throw new Problem('INTERNAL', `a result is not finite (${name} = ${value}); nothing was written`);
}
