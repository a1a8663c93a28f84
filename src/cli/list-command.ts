/** `rimflow list` */
import { nearest } from '../input/index.ts';
import { IACS, listWireSizes, METALS } from '../model/index.ts';
import { Problem } from '../problem.ts';
import { type ListColumn, listText, TABLE_FORMATS } from '../writers/index.ts';
import type { Io } from './io.ts';
import type { CommonOptions } from './options.ts';
import { checkOut, deliver } from './output.ts';

const LISTS: Readonly<Record<string, () => ListColumn[]>> = { wires, materials };

/** @returns exit status */
export async function runList(what: string, options: CommonOptions, io: Io): Promise<number> {
  const make = Object.hasOwn(LISTS, what) ? LISTS[what] : undefined;
  if (make === undefined) {
    const near = nearest(what, Object.keys(LISTS));
    const hint = near === undefined ? '' : ` (did you mean "${near}"?)`;
    throw new Problem('USAGE', `there is no list of "${what}"${hint}; there are wires and materials`);
  }
  checkOut(undefined, options, io);
  const format = TABLE_FORMATS.find((name) => name === options.format) ?? 'text';
  const columns = make();
  await deliver(listText(columns, format), `${columns[0].values.length} rows, ${format}`, options, io);
  return 0;
}

function wires(): ListColumn[] {
  const sizes = listWireSizes();
  const area = ({ diameter }: { diameter: number }) => (Math.PI / 4) * diameter ** 2;
  return [
    { name: 'size', values: sizes.map(({ name }) => name) },
    { name: 'diameter_mm', values: sizes.map(({ diameter }) => digits(1e3 * diameter)) },
    { name: 'area_mm2', values: sizes.map((size) => digits(1e6 * area(size))) },
    { name: 'copper_20C_mohm_per_m', values: sizes.map((size) => digits(1e3 / (IACS * area(size)))) },
    {
      name: 'source',
      values: sizes.map(({ gauge }) =>
        gauge === 'AWG' ? 'ASTM B258' : 'British standard wire gauge (BS 3737), from memory',
      ),
    },
  ];
}

function materials(): ListColumn[] {
  const list = <T>(pick: (metal: (typeof METALS)[number]) => T) => METALS.map(pick);
  return [
    { name: 'name', values: list(({ name }) => name) },
    { name: 'resistivity_nohm_m', values: list(({ resistivity }) => digits(1e9 * resistivity)) },
    { name: 'coefficient_per_K', values: list((metal) => digits(metal.temperatureCoefficient)) },
    { name: 'at_C', values: list((metal) => metal.referenceTemperature) },
    { name: 'relative_permeability', values: list((metal) => metal.relativePermeability) },
    { name: 'other_names', values: list(({ aliases }) => aliases.join(' ')) },
    { name: 'source', values: list(({ source }) => source) },
  ];
}

function digits(value: number): number {
  return Number(value.toPrecision(7));
}
