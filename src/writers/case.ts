/** A case as it was understood, for people and as JSON in SI units. */
import type { Case, Loop } from '../model/index.ts';
import { solidResistanceDc } from '../skin/index.ts';
import { plainLine } from './display.ts';
import { engineering } from './engineering.ts';
import { jsonText } from './json.ts';
import { alignColumns, cautionLine } from './text.ts';

/** Columns of the wires, loops and frequencies of a case. */
export function caseText(c: Case): string {
  const mm = (metres: number) => String(Number((metres * 1e3).toPrecision(8)));
  const column = (head: string, unit: string, cells: string[], left = false) => ({
    head: [head, unit],
    cells,
    left,
  });
  const wires = alignColumns([
    column(
      'wire',
      '',
      c.wires.map(({ name }) => name),
      true,
    ),
    column(
      'metal',
      '',
      c.wires.map(({ material }) => material),
      true,
    ),
    column(
      'x',
      'mm',
      c.wires.map(({ x }) => mm(x)),
    ),
    column(
      'y',
      'mm',
      c.wires.map(({ y }) => mm(y)),
    ),
    column(
      'diameter',
      'mm',
      c.wires.map(({ radius }) => mm(2 * radius)),
    ),
    column(
      'insulation',
      'mm',
      c.wires.map(({ insulation }) => mm(insulation)),
    ),
    column(
      'temperature',
      '°C',
      c.wires.map(({ temperature }) => String(Number(temperature.toPrecision(8)))),
    ),
    column(
      'R dc',
      '',
      c.wires.map((wire) => engineering(solidResistanceDc(wire), 'ohm/m', 5)),
    ),
  ]);
  const { frequencies } = c;
  const band =
    frequencies.length === 1
      ? engineering(frequencies[0], 'Hz')
      : `${frequencies.length} from ${engineering(frequencies[0], 'Hz')} to ${engineering(frequencies[frequencies.length - 1], 'Hz')}`;
  const lines = [
    ...(c.title === '' ? [] : [plainLine(c.title), '']),
    ...wires,
    '',
    ...c.loops.map((loop) => loopLine(loop, c)),
    ...c.bonded.map((group) => `bonded: ${names(group, c)}`),
    `length: ${c.length === undefined ? 'none, results are per metre' : engineering(c.length, 'm')}`,
    `frequencies: ${band}`,
    `tolerance: ${c.tolerance}`,
    ...c.cautions.map((caution) => `caution ${cautionLine(caution)}`),
  ];
  return `${lines.join('\n')}\n`;
}

function names(wires: readonly number[], c: Case): string {
  return wires.map((i) => c.wires[i].name).join(', ');
}

function loopLine(loop: Loop, c: Case): string {
  const { resistance, inductance } = loop.extra;
  const extra =
    resistance === 0 && inductance === 0
      ? ''
      : `; extra ${engineering(resistance, 'ohm')}, ${engineering(inductance, 'H')}`;
  return `loop ${loop.name}: go ${names(loop.go, c)}; return ${names(loop.return, c)}${loop.series ? '; in series' : ''}${extra}`;
}

/** The same as JSON; every key ends in its unit. */
export function caseJson(c: Case): string {
  const list = (wires: readonly number[]) => wires.map((i) => c.wires[i].name);
  return jsonText({
    title: c.title,
    length_m: c.length ?? null,
    wires: c.wires.map((wire) => ({
      name: wire.name,
      material: wire.material,
      x_m: wire.x,
      y_m: wire.y,
      radius_m: wire.radius,
      insulation_m: wire.insulation,
      temperature_C: wire.temperature,
      // null for a perfect conductor
      conductivity_S_per_m: wire.conductivity === Number.POSITIVE_INFINITY ? null : wire.conductivity,
      relative_permeability: wire.relativePermeability,
    })),
    loops: c.loops.map((loop) => ({
      name: loop.name,
      go: list(loop.go),
      return: list(loop.return),
      series: loop.series,
      extra_resistance_ohm: loop.extra.resistance,
      extra_inductance_H: loop.extra.inductance,
    })),
    bonded: c.bonded.map(list),
    frequencies_Hz: c.frequencies,
    tolerance: c.tolerance,
    cautions: c.cautions,
  });
}
