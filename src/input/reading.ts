/**
 * What the readers of keys share: the source, the problems found so far, the `let` names and the expression parser.
 * A reader that can not make sense of a value reports it and returns undefined; values of the wrong shape were
 * reported before and are passed over.
 */
import { type ErrorCode, type Place, Problem } from '../problem.ts';
import { type ExpressionParser, evaluateExpression, type NamedValues } from './expression.ts';
import { FAMILIES, type Family } from './families.ts';
import { Fault, NeedsExpressions, Reported } from './fault.ts';
import { MAX_EXPRESSION_LENGTH } from './limits.ts';
import { didYouMean } from './nearest.ts';
import { commonQuantity, type Quantity, valueIn } from './quantity.ts';
import { quote } from './quote.ts';
import { type Path, type Source, valueAt } from './source.ts';
import { plainUnits } from './unit-text.ts';

/** The `let` names of a file; see `let-names.ts`. */
export interface LetNames extends NamedValues {
  /** What stands behind a value that is a let name alone, through all levels; the value itself otherwise. */
  resolve(value: unknown): unknown;
}

export interface Reading {
  readonly source: Source;
  readonly problems: Problem[];
  readonly parser: ExpressionParser | undefined;
  lets: LetNames;
  /** look-ups of a nearest name that may still be made */
  suggestionsLeft: number;
}

/** ` (did you mean "x"?)` or nothing; nothing too after the first unknown names of a file. */
export function suggest(reading: Reading, word: string, known: Iterable<string>): string {
  if (reading.suggestionsLeft <= 0) return '';
  reading.suggestionsLeft--;
  return didYouMean(word, known);
}

/** Adds a problem at the value of a path. */
export function report(reading: Reading, code: ErrorCode, text: string, path: Path): void {
  reportAt(reading, code, text, reading.source.place(path));
}

/** Adds a problem at a place. */
export function reportAt(reading: Reading, code: ErrorCode, text: string, place: Place): void {
  reading.problems.push(new Problem(code, text, place));
}

/** Limits of a value, with the words that messages use for them. */
export interface Range {
  readonly min: number;
  readonly max: number;
  /** such as `1 nm to 100 m` */
  readonly text: string;
}

/** Quantity behind a text. Throws Fault, Reported or NeedsExpressions. */
export function quantityOf(text: string, parser: ExpressionParser | undefined, named: NamedValues): Quantity {
  if (text.length > MAX_EXPRESSION_LENGTH) {
    const most = `the most is ${MAX_EXPRESSION_LENGTH}; use let names`;
    throw new Fault('TOO_LARGE', `an expression of ${text.length} characters, ${most}`);
  }
  const plain = plainUnits(text);
  if (/^[+-]?\.?(nan|inf|infinity)$/i.test(plain)) {
    throw new Fault('RANGE', `${quote(text)} is not a finite number; give one`);
  }
  if (plain === '') throw new Fault('MISSING', 'an empty text in place of a quantity');
  const common = commonQuantity(plain);
  if (common !== undefined) return common;
  const standing = named.lookUp(plain);
  if (standing !== undefined) return standing;
  if (parser === undefined) throw new NeedsExpressions();
  return evaluateExpression(plain, parser, named);
}

/** Runs a reader of one value; a fault becomes a problem at the path. */
export function guard<T>(reading: Reading, path: Path, read: () => T): T | undefined {
  try {
    return read();
  } catch (error) {
    if (error instanceof Reported) return undefined;
    if (!(error instanceof Fault)) throw error;
    report(reading, error.code, `${label(path)}: ${error.message}`, path);
    return undefined;
  }
}

/** `diameter`, or `at[0]` for a member of a list. */
export function label(path: Path): string {
  const last = path.at(-1);
  return typeof last === 'number' ? `${path.at(-2)}[${last}]` : String(last);
}

/** The value at a path with let names replaced. */
export function wordAt(reading: Reading, path: Path): unknown {
  return reading.lets.resolve(valueAt(reading.source.data, path));
}

/** `"gap" (5 kg)` where a let name stood, else the value itself. */
export function shown(typed: unknown, resolved: unknown): string {
  return typed === resolved ? quote(typed) : `${quote(typed)} (${String(resolved).slice(0, 40)})`;
}

/** [SI, °C for temperatures] the quantity at a path; undefined where it is missing or wrong (then reported). */
export function readQuantity(
  reading: Reading,
  path: Path,
  family: Family,
  range?: Range,
): number | undefined {
  const typed = valueAt(reading.source.data, path);
  const value = reading.lets.resolve(typed);
  if (typeof typed !== 'number' && typeof typed !== 'string') return undefined;
  return guard(reading, path, () => {
    const text = shown(typed, value);
    const quantity =
      typeof value === 'number'
        ? { value, dimension: FAMILIES.number.dimension, celsius: false }
        : quantityOf(String(typed), reading.parser, reading.lets);
    const result = valueIn(family, quantity, text);
    if (range !== undefined && !(result >= range.min && result <= range.max)) {
      throw new Fault('RANGE', `${text} is outside ${range.text}; give a value within`);
    }
    return result;
  });
}

/** A whole number at a path. */
export function readCount(reading: Reading, path: Path, range: Range): number | undefined {
  const value = readQuantity(reading, path, 'number', range);
  if (value === undefined || Number.isInteger(value)) return value;
  report(reading, 'RANGE', `${label(path)}: ${value} is not a whole number; give one`, path);
  return undefined;
}

/** A text at a path, let names replaced; numbers count as their digits. */
export function readText(reading: Reading, path: Path): string | undefined {
  const typed = valueAt(reading.source.data, path);
  const value = reading.lets.resolve(typed);
  if ((typeof typed !== 'string' && typeof typed !== 'number') || value === undefined) return undefined;
  const text = String(value).trim();
  if (text.length <= MAX_EXPRESSION_LENGTH) return text;
  const most = `the most is ${MAX_EXPRESSION_LENGTH}`;
  report(reading, 'TOO_LARGE', `${label(path)}: a text of ${text.length} characters; ${most}`, path);
  return undefined;
}

/** true or false at a path, false where it is missing; undefined where it is wrong (then reported). */
export function readFlag(reading: Reading, path: Path): boolean | undefined {
  if (valueAt(reading.source.data, path) === undefined) return false;
  const value = wordAt(reading, path);
  if (value === undefined || value === null || typeof value === 'boolean') return value ?? undefined;
  if (value === 'true' || value === 'false') return value === 'true';
  if (typeof value !== 'object') {
    report(reading, 'WRONG_TYPE', `${label(path)}: ${quote(value)} is neither true nor false`, path);
  }
  return undefined;
}
