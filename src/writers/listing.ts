/** Lists of words and numbers, such as the built-in metals, in the formats of a table. */
import { columnsToCsv } from './csv.ts';
import { jsonText } from './json.ts';
import { escapeMarkdown } from './markdown.ts';
import type { TableFormat } from './table.ts';
import { alignColumns } from './text.ts';

export interface ListColumn {
  /** with its unit, such as `diameter_mm` */
  readonly name: string;
  readonly values: readonly (string | number)[];
}

/** @throws Problem INTERNAL for a number that is not finite */
export function listText(columns: readonly ListColumn[], format: TableFormat): string {
  const rows = Array.from(columns[0].values.keys());
  switch (format) {
    case 'csv':
      return columnsToCsv(columns);
    case 'json':
      return jsonText(
        rows.map((i) => Object.fromEntries(columns.map(({ name, values }) => [name, values[i]]))),
      );
    case 'markdown': {
      const row = (cells: readonly (string | number)[]) =>
        `| ${cells.map((cell) => escapeMarkdown(String(cell))).join(' | ')} |`;
      const rule = columns.map(({ values }) => (typeof values[0] === 'number' ? '---:' : '---'));
      const lines = [row(columns.map(({ name }) => name)), `|${rule.join('|')}|`];
      return `${[...lines, ...rows.map((i) => row(columns.map(({ values }) => values[i])))].join('\n')}\n`;
    }
    case 'text': {
      const aligned = columns.map(({ name, values }) => ({
        head: [name],
        cells: values.map(String),
        left: typeof values[0] === 'string',
      }));
      return `${alignColumns(aligned).join('\n')}\n`;
    }
  }
}
