/** One door to the formats of a table. */
import type { FrequencyTable } from '../sweep/index.ts';
import { type TableChoices, tableColumns } from './columns.ts';
import { columnsToCsv } from './csv.ts';
import { tableToJson } from './json.ts';
import { tableToMarkdown } from './markdown.ts';
import { tableToText } from './text.ts';

export const TABLE_FORMATS = ['csv', 'json', 'markdown', 'text'] as const;
export type TableFormat = (typeof TABLE_FORMATS)[number];

/**
 * A table as text in one of the formats.
 * @throws Problem INTERNAL for a number that is not finite
 */
export function tableText(table: FrequencyTable, format: TableFormat, choices: TableChoices = {}): string {
  switch (format) {
    case 'csv':
      return columnsToCsv(tableColumns(table, choices));
    case 'json':
      return tableToJson(table, choices);
    case 'markdown':
      return tableToMarkdown(table, choices);
    case 'text':
      return tableToText(table, choices);
  }
}
