/** A whole case from plain data with places: every section read, every problem found, in the order of the file. */
import type { Case, Wire } from '../model/index.ts';
import { Problem } from '../problem.ts';
import type { ExpressionParser } from './expression.ts';
import { NeedsExpressions } from './fault.ts';
import { readFrequencies } from './frequencies.ts';
import { NO_LETS, readLetNames } from './let-names.ts';
import { MAX_PROBLEMS, MAX_SUGGESTIONS, MAX_TITLE_LENGTH } from './limits.ts';
import { readLoops } from './loops.ts';
import { readMaterials, TEMPERATURE } from './materials.ts';
import { checkOverlaps } from './overlaps.ts';
import { placeWires } from './placement.ts';
import { type Range, type Reading, readQuantity, report } from './reading.ts';
import { type Source, valueAt } from './source.ts';
import { checkStructure } from './structure.ts';
import { readWires } from './wires.ts';

/** A case, or the list of all problems in the order of the file. */
export type ReadResult =
  | { readonly case: Case; readonly problems?: undefined }
  | { readonly problems: readonly Problem[]; readonly case?: undefined };

/** Tighter than what double precision carries through a solution is no wish that can be met. */
const TOLERANCE: Range = { min: 1e-12, max: 0.1, text: '1e-12 to 0.1' };
const LENGTH: Range = { min: 1e-9, max: 1e9, text: '1 nm to 1e6 km' };

const DEFAULT_TOLERANCE = 1e-8;
const DEFAULT_TEMPERATURE = 20;

/**
 * @param early problems found before, such as keys that stand twice
 * @param overrides values for let names, from `--set`
 */
export async function caseFromSource(
  source: Source,
  early: readonly Problem[],
  overrides: Readonly<Record<string, string>>,
): Promise<ReadResult> {
  const known = [...early, ...checkStructure(source)];
  try {
    return readAll(source, known, overrides, undefined);
  } catch (error) {
    if (!(error instanceof NeedsExpressions)) throw error;
  }
  // some value is more than a number with a common unit: load the parser, and read again from the start
  const parser = await import('./mathjs-subset.ts');
  return readAll(source, known, overrides, parser);
}

function readAll(
  source: Source,
  known: readonly Problem[],
  overrides: Readonly<Record<string, string>>,
  parser: ExpressionParser | undefined,
): ReadResult {
  const reading: Reading = {
    source,
    problems: [...known],
    parser,
    lets: NO_LETS,
    suggestionsLeft: MAX_SUGGESTIONS,
  };
  reading.lets = readLetNames(reading, overrides);
  const temperature =
    readQuantity(reading, ['temperature'], 'temperature', TEMPERATURE) ?? DEFAULT_TEMPERATURE;
  const length = readQuantity(reading, ['length'], 'length', LENGTH);
  const tolerance = readQuantity(reading, ['tolerance'], 'number', TOLERANCE) ?? DEFAULT_TOLERANCE;
  const materials = readMaterials(reading);
  const drafts = readWires(reading, materials, temperature);
  const placement = placeWires(reading, drafts.wires);
  const wires: Wire[] = [];
  for (const draft of drafts.wires) {
    const centre = placement.centres.get(draft.name);
    const { name, radius, conductivity, material, insulation } = draft;
    if (centre === undefined || radius === undefined) continue;
    // a wire without a known metal still takes its room among the others
    wires.push({
      name,
      ...centre,
      radius,
      conductivity: conductivity ?? Number.NaN,
      relativePermeability: material?.relativePermeability ?? 1,
      material: material?.name ?? '',
      temperature: draft.temperature,
      insulation,
    });
  }
  checkOverlaps(reading, wires);
  // from the file, not the drafts: of too many wires none is read, yet all are known
  const names = source.keys(['wires']);
  const { loops, bonded } = readLoops(reading, names);
  const frequencies = readFrequencies(reading);
  const title = readTitle(reading);
  if (reading.problems.length > 0) return { problems: inOrder(reading.problems) };
  const whole = wires.length === names.length && wires.every((wire) => wire.conductivity > 0);
  if (!whole || frequencies.length === 0 || loops.some((loop) => loop.go.length * loop.return.length === 0)) {
    // a reader passed over a value without a word; better no result than one of half a file
    throw new Problem(
      'INTERNAL',
      'a part of the file was not understood, and no problem found',
      source.place([]),
    );
  }
  const cautions = [...drafts.cautions, ...placement.cautions];
  return {
    case: {
      title,
      length,
      wires,
      loops,
      bonded,
      frequencies,
      tolerance,
      cautions,
    },
  };
}

/** One line, whatever stood there: it goes into headers of results. */
function readTitle(reading: Reading): string {
  const value = valueAt(reading.source.data, ['title']);
  const title =
    typeof value !== 'string' && typeof value !== 'number' ? '' : String(value).replace(/\s+/g, ' ').trim();
  if (title.length > MAX_TITLE_LENGTH) {
    report(reading, 'RANGE', `a title of ${title.length} characters; the most is ${MAX_TITLE_LENGTH}`, [
      'title',
    ]);
  }
  return title;
}

/** By line and column, problems without a line first; the tail of a very long list is counted, not shown. */
function inOrder(problems: readonly Problem[]): Problem[] {
  const key = (p: Problem): [number, number] => [p.place?.line ?? 0, p.place?.column ?? 0];
  const sorted = [...problems].sort((a, b) => key(a)[0] - key(b)[0] || key(a)[1] - key(b)[1]);
  if (sorted.length <= MAX_PROBLEMS) return sorted;
  const next = sorted[MAX_PROBLEMS]!;
  const more = sorted.length - MAX_PROBLEMS;
  return [...sorted.slice(0, MAX_PROBLEMS), new Problem(next.code, `and ${more} more problems`, next.place)];
}
