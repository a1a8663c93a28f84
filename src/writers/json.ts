/** The table as JSON: one object, arrays of numbers on one line each. */
import type { FrequencyTable } from '../sweep/index.ts';
import { VERSION } from '../version.ts';
import { type TableChoices, unitsOf } from './columns.ts';
import { finite } from './csv.ts';
import { totalTable } from './total.ts';

/** @throws Problem INTERNAL for a number that is not finite */
export function tableToJson(given: FrequencyTable, choices: TableChoices): string {
  const { table, detail } = totalTable(given, choices);
  const loops = table.loops.map((loop, k) => {
    const more = detail?.loops[k];
    return [
      loop.name,
      {
        resistance: loop.resistance,
        inductance: loop.inductance,
        resistance_error: loop.resistanceError,
        inductance_error: loop.inductanceError,
        ...(more && {
          resistance_dc: more.resistanceDc,
          resistance_ratio: more.resistanceRatio ?? null,
          inductance_internal: more.internalInductance,
          inductance_external: more.externalInductance,
        }),
      },
    ];
  });
  return jsonText({
    rimflow: VERSION,
    title: table.title,
    tolerance: table.tolerance,
    reached: table.reached,
    unit: { frequency: 'Hz', ...unitsOf(choices), ...(detail && { skin_depth: 'm' }) },
    frequency: table.frequency,
    loops: Object.fromEntries(loops),
    mutual: table.mutual.map(({ between, resistance, inductance, error }) => ({
      between,
      resistance,
      inductance,
      error,
    })),
    ...(detail && {
      skin_depth: Object.fromEntries(
        // null at 0 Hz, where it has no bound
        detail.skinDepths.map(({ name, depth }) => [
          name,
          Array.from(depth, (d) => (d === Number.POSITIVE_INFINITY ? null : d)),
        ]),
      ),
    }),
    ...(choices.currents === true && { currents: currentsOf(table) }),
    cautions: table.cautions,
  });
}

function currentsOf(table: FrequencyTable): unknown {
  const wires = (name: string) =>
    table.currents
      .filter(({ loop }) => loop === name)
      .map(({ wire, re, im }) => [wire, Array.from(re, (value, i) => [value, im[i]])]);
  return Object.fromEntries(table.loops.map(({ name }) => [name, Object.fromEntries(wires(name))]));
}

/**
 * Indented JSON whose lists stand on one line each.
 * @throws Problem INTERNAL for a number that is not finite
 */
export function jsonText(value: unknown): string {
  return `${write(value, '', '')}\n`;
}

function write(value: unknown, indent: string, name: string): string {
  if (typeof value === 'number') return String(finite(value, name));
  if (value === null || typeof value !== 'object') return JSON.stringify(value);
  if (ArrayBuffer.isView(value)) return write(Array.from(value as Float64Array), indent, name);
  const inner = `${indent}  `;
  if (Array.isArray(value)) {
    const items = value.map((item) => write(item, inner, name));
    const objects = value.some((item) => item !== null && typeof item === 'object' && !Array.isArray(item));
    return objects ? `[\n${inner}${items.join(`,\n${inner}`)}\n${indent}]` : `[${items.join(', ')}]`;
  }
  const entries = Object.entries(value)
    .filter(([, item]) => item !== undefined)
    .map(
      ([key, item]) => `${JSON.stringify(key)}: ${write(item, inner, name === '' ? key : `${name}.${key}`)}`,
    );
  if (entries.length === 0) return '{}';
  return `{\n${inner}${entries.join(`,\n${inner}`)}\n${indent}}`;
}
