/** The table in Markdown, for a report. */
import type { FrequencyTable } from '../sweep/index.ts';
import type { TableChoices } from './columns.ts';
import { displayTable, MISSED_MARK, plainLine } from './display.ts';
import { cautionLine } from './text.ts';

/** @throws Problem INTERNAL for a number that is not finite */
export function tableToMarkdown(table: FrequencyTable, choices: TableChoices): string {
  const { columns, missed, errors } = displayTable(table, choices);
  const row = (cells: readonly string[]) => `| ${cells.map(escapeMarkdown).join(' | ')} |`;
  const lines = [
    ...(table.title === '' ? [] : [`## ${escapeMarkdown(plainLine(table.title))}`, '']),
    row(columns.map(({ label, unit }) => (unit === '' ? label : `${label} (${unit})`))),
    `|${columns.map(() => '---:').join('|')}|`,
    ...Array.from(table.frequency.keys(), (i) => row(columns.map(({ cells }) => cells[i]))),
    '',
    escapeMarkdown(`${errors[0].toUpperCase()}${errors.slice(1)}.`),
  ];
  if (missed.length > 0) {
    lines.push('', escapeMarkdown(`${MISSED_MARK} The stated error of this row is above the wanted one.`));
  }
  if (table.cautions.length > 0) {
    lines.push(
      '',
      'Cautions:',
      '',
      ...table.cautions.map((caution) => `- ${escapeMarkdown(cautionLine(caution))}`),
    );
  }
  return `${lines.join('\n')}\n`;
}

/** Signs that Markdown would take for markup get a backslash. */
export function escapeMarkdown(text: string): string {
  return text.replace(/[\\`*_[\]<>|#~]/g, '\\$&');
}
