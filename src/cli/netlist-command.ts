/** `rimflow netlist` */
import { type FitSize, fitFrequencies, fitSections, LEAST_WITHIN, MOST_SECTIONS } from '../fit/index.ts';
import { parseQuantity } from '../input/index.ts';
import type { Case } from '../model/index.ts';
import { Problem } from '../problem.ts';
import { VERSION } from '../version.ts';
import { netlistText, safeSubcircuitName } from '../writers/index.ts';
import { inputCase } from './input-case.ts';
import type { Io } from './io.ts';
import type { CommonOptions, QuickOptions } from './options.ts';
import { checkOut, deliver, outPath } from './output.ts';
import { conclude, solve } from './solving.ts';

export interface NetlistOptions extends CommonOptions, QuickOptions {
  readonly sections?: string;
  readonly within?: string;
  readonly name?: string;
}

/** [1] Error of R and L that a netlist keeps when nothing is asked for. */
const DEFAULT_WITHIN = 0.01;

/** @returns exit status */
export async function runNetlist(file: string | undefined, options: NetlistOptions, io: Io): Promise<number> {
  const size = await fitSize(options);
  const given = options.name;
  if (given !== undefined && safeSubcircuitName(given) !== given) {
    throw new Problem(
      'NAME',
      `--name "${given}" is no name of a subcircuit: a letter, then letters, digits and _, at most 60; such as ` +
        safeSubcircuitName(given),
    );
  }
  checkOut(file, options, io);
  const input = await inputCase(file, options, io);
  const { length } = input.case;
  const loop = onlyLoop(input.case);
  if (length === undefined) {
    throw new Problem(
      'NO_LENGTH',
      'a netlist is for a run of some length and the case has none; add length: 12 m to the file, or --length to a pair',
    );
  }
  const [from, to] = band(input.case);
  const { frequency } = fitFrequencies(from, to);
  const table = await solve({ ...input.case, frequencies: Array.from(frequency) }, options, io);
  const { resistance, inductance, resistanceDc } = table.loops[0];
  const model = fitSections({ frequency, resistance, inductance, resistanceDc }, size);
  const path = outPath(options);
  const text = netlistText({
    name: given ?? safeSubcircuitName(input.name ?? loop.name),
    title: table.title,
    loop: loop.name,
    model,
    length,
    extra: loop.extra,
    version: VERSION,
    cautions: table.cautions,
    ...(path !== undefined && { fileName: path.slice(path.lastIndexOf('/') + 1) }),
  });
  const count = model.sections.length;
  await deliver(text, `${count} section${count === 1 ? '' : 's'}`, options, io);
  return conclude(table, true, options, io);
}

async function fitSize({ sections, within }: NetlistOptions): Promise<FitSize> {
  if (sections !== undefined && within !== undefined) {
    throw new Problem('USAGE', '--sections and --within exclude each other; give one');
  }
  if (sections !== undefined) {
    const count = Number(sections);
    if (!/^\d+$/.test(sections) || count > MOST_SECTIONS) {
      throw new Problem('USAGE', `--sections "${sections}" is no whole number from 0 to ${MOST_SECTIONS}`);
    }
    return { sections: count };
  }
  if (within === undefined) return { within: DEFAULT_WITHIN };
  const error = await parseQuantity(within, 'ratio');
  if (!(error >= LEAST_WITHIN && error < 1)) {
    throw new Problem(
      'RANGE',
      `--within "${within}" is outside ${100 * LEAST_WITHIN}% to below 100%; such as --within 1%`,
    );
  }
  return { within: error };
}

function onlyLoop(c: Case): Case['loops'][number] {
  if (c.loops.length === 1) return c.loops[0];
  throw new Problem(
    'NOT_SUPPORTED',
    `a netlist of ${c.loops.length} loops is not supported yet; keep one loop (wires in no loop may stay)`,
  );
}

/** [Hz] the lowest frequency above zero and the highest. */
function band({ frequencies }: Case): [number, number] {
  const positive = frequencies.filter((f) => f > 0);
  if (positive.length >= 2) return [positive[0], positive[positive.length - 1]];
  throw new Problem(
    'NO_FREQUENCIES',
    'a netlist holds over a band, and the case has fewer than two frequencies above 0 Hz; give frequencies: { from: 10 Hz, to: 10 MHz }',
  );
}
