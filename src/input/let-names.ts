/**
 * The `let` names of a file: checked names, overrides from `--set`, no cycles, each evaluated once and only when used
 * in an expression. A name that stands alone as a value means its value, whatever its kind.
 */
import { findMetal, metalNames, parseWireSize } from '../model/index.ts';
import { type Place, Problem } from '../problem.ts';
import { PARSER_WORDS } from './expression-tokens.ts';
import { FAMILIES } from './families.ts';
import { Fault, Reported } from './fault.ts';
import { FUNCTIONS } from './functions.ts';
import { dependencies, type LetGraph, type LetValue, letGraph } from './let-graph.ts';
import { MAX_LET_NAMES, MAX_NAME_LENGTH } from './limits.ts';
import { didYouMean } from './nearest.ts';
import type { Quantity } from './quantity.ts';
import { quote } from './quote.ts';
import { type LetNames, quantityOf, type Reading, reportAt, suggest } from './reading.ts';
import { isMapValue, valueAt } from './source.ts';
import { UNIT_NAMES, USUAL_UNIT_NAMES } from './unit-names.ts';

/** Names of no file, for readers before the let names are known. */
export const NO_LETS: LetNames = {
  suggest: (name) => didYouMean(name, USUAL_UNIT_NAMES),
  lookUp: () => undefined,
  resolve: (value) => value,
};

/** Why a let name is not allowed, or undefined. */
export function letNameFault(name: string): string | undefined {
  if (!/^[A-Za-z_]\w*$/.test(name)) return 'is no let name; use letters, digits and _, a letter first';
  if (name.length > MAX_NAME_LENGTH) return `is longer than ${MAX_NAME_LENGTH} characters`;
  if (UNIT_NAMES.has(name)) return 'is a unit; take another let name';
  if (metalNames().includes(name)) return 'is a built-in metal; take another let name';
  if (FUNCTIONS.has(name) || name === 'pi') return 'is a function or constant; take another let name';
  if (PARSER_WORDS.has(name) || name === 'at') return 'is reserved; take another let name';
  return undefined;
}

/** Reads `let`, applies the overrides and checks for cycles. */
export function readLetNames(reading: Reading, overrides: Readonly<Record<string, string>>): LetNames {
  const values = new Map<string, LetValue>();
  const places = new Map<string, Place>();
  const { source } = reading;
  const written = valueAt(source.data, ['let']);
  const keys = isMapValue(written) ? source.keys(['let']) : [];
  if (keys.length > MAX_LET_NAMES) {
    const text = `${keys.length} let names; the most is ${MAX_LET_NAMES}`;
    reportAt(reading, 'TOO_LARGE', text, source.place(['let']));
  }
  for (const name of keys.slice(0, MAX_LET_NAMES)) {
    const fault = letNameFault(name);
    if (fault !== undefined)
      reportAt(reading, 'NAME', `${quote(name)} ${fault}`, source.keyPlace(['let', name]));
    const value = valueAt(written, [name]);
    if (typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean') {
      values.set(name, value);
      places.set(name, source.place(['let', name]));
    }
  }
  for (const [name, value] of Object.entries(overrides)) {
    const place = { file: `--set ${name}` };
    if (!keys.includes(name)) {
      const known = keys.length === 0 ? 'the file has no let names' : `let names are ${keys.join(', ')}`;
      reportAt(reading, 'NAME', `no let name ${quote(name)}${suggest(reading, name, keys)}; ${known}`, place);
      continue;
    }
    values.set(name, value);
    places.set(name, place);
  }
  const words = new Set([...source.keys(['materials']), ...source.keys(['wires'])]);
  const graph = letGraph(values, words);
  for (const cycle of graph.cycles) {
    const shown = cycle.length > 10 ? [...cycle.slice(0, 10), '..'] : cycle;
    const text = `let names lead back to themselves: ${[...shown, cycle[0]].join(' -> ')}; give one of them a value`;
    reportAt(reading, 'CIRCULAR', text, places.get(cycle[0]!)!);
  }
  return letNames(reading, values, places, graph);
}

function letNames(
  reading: Reading,
  values: ReadonlyMap<string, LetValue>,
  places: ReadonlyMap<string, Place>,
  graph: LetGraph,
): LetNames {
  const known = new Map<string, Quantity | 'failed'>();

  function lookUp(name: string): Quantity | undefined {
    const value = values.get(name);
    if (value === undefined) return undefined;
    if (graph.unusable.has(name)) throw new Reported();
    // those it uses come first, so that a long chain of names is no deep recursion
    if (!known.has(name)) for (const used of dependencies(graph, name, known)) prepare(used);
    const quantity = known.get(name) ?? evaluate(name, value);
    known.set(name, quantity);
    if (quantity === 'failed') throw new Reported();
    return quantity;
  }

  /** A word among the names used stays without a value; whoever needs one says so. */
  function prepare(name: string): void {
    try {
      known.set(name, evaluate(name, values.get(name)!));
    } catch (error) {
      if (!(error instanceof Fault)) throw error;
    }
  }

  function evaluate(name: string, value: LetValue): Quantity | 'failed' {
    if (typeof value === 'number') return { value, dimension: FAMILIES.number.dimension, celsius: false };
    const text = String(value).trim();
    if (typeof value === 'boolean' || findMetal(text) !== undefined || parseWireSize(text) !== undefined) {
      throw new Fault('EXPRESSION', `let name ${quote(name)} is ${quote(value)}, which is no quantity`);
    }
    try {
      return quantityOf(text, reading.parser, api);
    } catch (error) {
      if (error instanceof Reported) return 'failed';
      if (!(error instanceof Fault)) throw error;
      reading.problems.push(
        new Problem(error.code, `let name ${quote(name)}: ${error.message}`, places.get(name)),
      );
      return 'failed';
    }
  }

  function resolve(value: unknown): unknown {
    let current = value;
    // a chain of names that stand for names is no longer than the list of names; cycles were reported
    for (let step = 0; step <= values.size && typeof current === 'string'; step++) {
      const name = current.trim();
      if (!values.has(name)) return current;
      if (graph.unusable.has(name)) return undefined;
      current = values.get(name);
    }
    return current;
  }

  const suggestFor = (name: string) => suggest(reading, name, [...values.keys(), ...USUAL_UNIT_NAMES]);
  const api: LetNames = { lookUp, suggest: suggestFor, resolve };
  return api;
}
