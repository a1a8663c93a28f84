/** `rimflow table` */
import { tableDetail } from '../sweep/index.ts';
import { runOf, TABLE_FORMATS, type TableFormat, tableText } from '../writers/index.ts';
import { inputCase } from './input-case.ts';
import type { Io } from './io.ts';
import type { CommonOptions, QuickOptions } from './options.ts';
import { checkOut, deliver, outPath } from './output.ts';
import { conclude, solve } from './solving.ts';

export interface TableOptions extends CommonOptions, QuickOptions {
  readonly withErrors?: boolean;
  readonly currents?: boolean;
  readonly total?: boolean;
  readonly detail?: boolean;
}

/** @returns exit status */
export async function runTable(file: string | undefined, options: TableOptions, io: Io): Promise<number> {
  checkOut(file, options, io);
  const { case: c } = await inputCase(file, options, io);
  const format = tableFormat(options, io);
  // before the work: a total without a length is refused at once
  const total = options.total === true ? { total: runOf(c) } : {};
  const table = await solve(c, options, io);
  const text = tableText(table, format, {
    ...total,
    ...(options.detail === true && { detail: tableDetail(c, table) }),
    withErrors: options.withErrors === true,
    currents: options.currents === true,
  });
  await deliver(text, `${table.frequency.length} frequencies, ${format}`, options, io);
  return conclude(table, format !== 'csv', options, io);
}

/** As asked for; else by the ending of --out (.json, .md); else text on a terminal and CSV everywhere else. */
function tableFormat(options: CommonOptions, io: Io): TableFormat {
  const asked = TABLE_FORMATS.find((format) => format === options.format);
  if (asked !== undefined) return asked;
  const path = outPath(options);
  if (path === undefined) return io.stdout.isTerminal ? 'text' : 'csv';
  if (/\.json$/i.test(path)) return 'json';
  return /\.(md|markdown)$/i.test(path) ? 'markdown' : 'csv';
}
