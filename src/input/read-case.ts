/** The door: text of a file, data built in code, or the few values of a quick call -> a case. */
import type { Case } from '../model/index.ts';
import { Problem } from '../problem.ts';
import type { ReadResult } from './case-from-source.ts';
import { checkText } from './decode-text.ts';
import { FAMILIES, type Family } from './families.ts';
import { Fault, NeedsExpressions } from './fault.ts';
import { NO_LETS } from './let-names.ts';
import { valueIn } from './quantity.ts';
import { quote } from './quote.ts';
import { quantityOf, type Range } from './reading.ts';
import { plainSource } from './source.ts';

export interface ReadOptions {
  /** name of the file, for places */
  readonly file: string;
  /** values for `let` names, from `--set NAME=VALUE` */
  readonly set?: Readonly<Record<string, string>>;
}

/**
 * Reads a cross-section file (YAML 1.2 or JSON).
 * @returns the case in SI units, or all problems in the order of the file
 * @throws Problem INTERNAL, for a fault of the program only
 */
export async function readCase(text: string, options: ReadOptions): Promise<ReadResult> {
  try {
    checkText(text, options.file);
  } catch (error) {
    if (error instanceof Problem) return { problems: [error] };
    throw error;
  }
  const [{ readYaml }, { caseFromSource }] = await Promise.all([
    import('./yaml-document.ts'),
    import('./case-from-source.ts'),
  ]);
  const { source, problems } = readYaml(text, options.file);
  if (source === undefined) return { problems };
  return caseFromSource(source, problems, options.set ?? {});
}

/**
 * Reads a case built in code: the same keys and texts as in a file, as plain objects and lists.
 * Places of problems are paths such as `wires.plus.diameter`.
 */
export async function caseFromData(data: unknown): Promise<ReadResult> {
  const { caseFromSource } = await import('./case-from-source.ts');
  return caseFromSource(plainSource(data), [], {});
}

/** A go and return pair without a file; texts as in a file. */
export interface QuickPairOptions {
  readonly gauge?: string;
  readonly diameter?: string;
  /** distance of the centres */
  readonly spacing: string;
  readonly material?: string;
  readonly temperature?: string;
  readonly insulation?: string;
  readonly length?: string;
  /** lowest frequency */
  readonly from?: string;
  /** highest frequency */
  readonly to?: string;
  readonly tolerance?: string;
}

/** Loop `pair` of wires `go` and `return`, 10 Hz to 100 MHz where nothing else is said, 10 points a decade. @throws Problem, the first found */
export async function quickPair(options: QuickPairOptions): Promise<Case> {
  const { spacing, length, temperature, tolerance, from = '10 Hz', to = '100 MHz', ...size } = options;
  const given = (values: Record<string, string | undefined>) =>
    Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined));
  const wire = given({ ...size });
  const data = {
    rimflow: 1,
    title: `go and return pair, ${options.gauge ?? options.diameter ?? ''} at ${spacing}`,
    ...given({ length, temperature, tolerance }),
    wires: {
      go: { ...wire, at: ['0 mm', '0 mm'] },
      return: { ...wire, at: [spacing, '0 mm'] },
    },
    loops: { pair: { go: 'go', return: 'return' } },
    frequencies: { from, to, per_decade: 10 },
  };
  const names = new Map<string, string>([
    ['wires.return.at', '--spacing'],
    ['frequencies.from', '--from'],
    ['frequencies.to', '--to'],
  ]);
  for (const key of ['length', 'temperature', 'tolerance']) names.set(key, `--${key}`);
  for (const key of Object.keys(wire)) {
    names.set(`wires.go.${key}`, `--${key}`);
    names.set(`wires.return.${key}`, `--${key}`);
  }
  const { caseFromSource } = await import('./case-from-source.ts');
  const result = await caseFromSource(plainSource(data, names), [], {});
  if (result.case !== undefined) return result.case;
  throw result.problems[0]!;
}

/**
 * One quantity, such as the value of an option: [SI], °C for temperatures. A bare number is only right where the
 * family has no unit.
 * @throws Problem UNIT, RANGE, EXPRESSION, MISSING or TOO_LARGE, without a place
 */
export async function parseQuantity(text: string, family: Family, range?: Range): Promise<number> {
  const read = (parser?: Parameters<typeof quantityOf>[1]) => {
    const value = valueIn(family, quantityOf(text, parser, NO_LETS), quote(text));
    if (range === undefined || (value >= range.min && value <= range.max)) return value;
    const like = `${FAMILIES[family].name} such as ${FAMILIES[family].example}`;
    throw new Fault('RANGE', `${quote(text)} is outside ${range.text}; give ${like}`);
  };
  try {
    try {
      return read();
    } catch (error) {
      if (!(error instanceof NeedsExpressions)) throw error;
      return read(await import('./mathjs-subset.ts'));
    }
  } catch (error) {
    if (error instanceof Fault) throw new Problem(error.code, error.message);
    throw error;
  }
}
