/** The table for a terminal: aligned columns, units in the head, remarks below. */
import type { Caution } from '../problem.ts';
import type { FrequencyTable } from '../sweep/index.ts';
import type { TableChoices } from './columns.ts';
import { displayTable, MISSED_MARK, plainLine } from './display.ts';
import { engineering } from './engineering.ts';

/** Between two columns. */
const GAP = '   ';

/** @throws Problem INTERNAL for a number that is not finite */
export function tableToText(table: FrequencyTable, choices: TableChoices): string {
  const { columns, missed, errors } = displayTable(table, choices);
  const body = alignColumns(columns.map(({ label, unit, cells }) => ({ head: [label, unit], cells })));
  const title = plainLine(table.title);
  const below = [errors];
  if (missed.length > 0) below.push(`${MISSED_MARK} the stated error of this row is above the wanted one`);
  below.push(...table.cautions.map((caution) => `caution ${cautionLine(caution)}`));
  return `${[...(title === '' ? [] : [title, '']), ...body, '', ...below].join('\n')}\n`;
}

/** `CODE from 540 MHz: text` */
export function cautionLine({ code, text, from_hz }: Caution): string {
  const since = from_hz === undefined ? '' : ` from ${engineering(from_hz, 'Hz', 3)}`;
  return `${code}${since}: ${plainLine(text)}`;
}

export interface TextColumn {
  readonly head: readonly string[];
  readonly cells: readonly string[];
  /** true: to the left, as words are */
  readonly left?: boolean;
}

/** Lines of columns with heads; numbers stand with their points below each other. */
export function alignColumns(columns: readonly TextColumn[]): string[] {
  const lined = columns.map(({ head, cells, left }) => {
    // what stands behind the point, or behind the number where a unit follows
    const tail = (cell: string) => (/^-?\d+(\.\d+)?$/.test(cell) ? cell.length - cell.search(/\.|$/) : 0);
    const widest = cells.reduce((most, cell) => Math.max(most, tail(cell)), 0);
    const padded = cells.map((cell) =>
      /^-?\d+(\.\d+)?$/.test(cell) ? cell + ' '.repeat(widest - tail(cell)) : cell,
    );
    const all = [...head, ...padded];
    const width = all.reduce((most, cell) => Math.max(most, cell.length), 0);
    return all.map((cell) => (left === true ? cell.padEnd(width) : cell.padStart(width)));
  });
  const rows = lined[0]?.length ?? 0;
  return Array.from({ length: rows }, (_, i) =>
    lined
      .map((column) => column[i])
      .join(GAP)
      .trimEnd(),
  );
}
