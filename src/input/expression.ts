/**
 * Value of an expression such as `2*1.2 mm + gap`. mathjs parses (lazily loaded); the evaluation is a walk over a
 * closed list of node kinds, so that a file can call nothing beyond `functions.ts`, define nothing, and not run long:
 * the text is bounded, and every node costs a few operations.
 */
import { add, divide, multiply, negate, notCelsius, power, subtract } from './arithmetic.ts';
import { safeExpression } from './expression-tokens.ts';
import { DIMENSIONLESS, FAMILIES } from './families.ts';
import { Fault } from './fault.ts';
import { FUNCTIONS } from './functions.ts';
import type { ParsedNode } from './mathjs-subset.ts';
import { didYouMean } from './nearest.ts';
import { commonQuantity, type Quantity, ZERO_CELSIUS } from './quantity.ts';
import { quote } from './quote.ts';
import { UNIT_NAMES } from './unit-names.ts';
import { OWN_UNITS } from './units.ts';

/** The lazily loaded module; see `mathjs-subset.ts`. */
export type ExpressionParser = typeof import('./mathjs-subset.ts');

/** Names that stand for quantities; undefined for an unknown one. */
export interface NamedValues {
  lookUp(name: string): Quantity | undefined;
  /** ` (did you mean "x"?)` or nothing, for a name that is no quantity */
  suggest(name: string): string;
}

const number = (value: number): Quantity => ({
  value,
  dimension: DIMENSIONLESS,
  celsius: false,
});

const BINARY: ReadonlyMap<string, (a: Quantity, b: Quantity) => Quantity> = new Map([
  ['add', add],
  ['subtract', subtract],
  ['multiply', multiply],
  ['divide', divide],
  ['pow', power],
]);

/** Value of a `plainUnits` text. Throws Fault. */
export function evaluateExpression(text: string, parser: ExpressionParser, named: NamedValues): Quantity {
  const safe = safeExpression(text);
  let tree: ParsedNode;
  try {
    tree = parser.parseExpression(safe);
  } catch (error) {
    const comma = /^\s*[+-]?\d+,\d/.test(text) ? '; write decimals with a point' : '';
    const why = (error as Error).message.replace(/ \(char \d+\)$/, '');
    throw new Fault('EXPRESSION', `can not read ${quote(text)}: ${why}${comma}`);
  }
  return evaluate(tree, parser, named);
}

function evaluate(node: ParsedNode, parser: ExpressionParser, named: NamedValues): Quantity {
  const walk = (inner: ParsedNode) => evaluate(inner, parser, named);
  const value = evaluateNode(node, parser, named, walk);
  if (Number.isFinite(value.value)) return value;
  throw new Fault('RANGE', 'an expression without a finite value');
}

function evaluateNode(
  node: ParsedNode,
  parser: ExpressionParser,
  named: NamedValues,
  walk: (inner: ParsedNode) => Quantity,
): Quantity {
  const args = node.args ?? [];
  switch (node.type) {
    case 'ConstantNode':
      if (typeof node.value === 'number') return number(node.value);
      break;
    case 'ParenthesisNode':
      if (node.content !== undefined) return walk(node.content);
      break;
    case 'SymbolNode':
      return symbol(String(node.name), parser, named);
    case 'FunctionNode': {
      const call = FUNCTIONS.get(String(node.name));
      if (call !== undefined) return call(args.map(walk), String(node.name));
      const known = Array.from(FUNCTIONS.keys());
      const allowed = `functions are ${known.join(', ')}`;
      const near = didYouMean(String(node.name), known);
      throw new Fault('EXPRESSION', `no function ${quote(node.name)}${near}; ${allowed}`);
    }
    case 'OperatorNode': {
      const [a, b] = args;
      if (node.fn === 'unaryPlus') return walk(a!);
      if (node.fn === 'unaryMinus') return negate(walk(a!));
      const celsius = node.implicit === true ? literalCelsius(a!, b!) : undefined;
      if (celsius !== undefined) return celsius;
      const operation = BINARY.get(String(node.fn));
      if (operation !== undefined && a !== undefined && b !== undefined) return operation(walk(a), walk(b));
      break;
    }
  }
  throw new Fault('EXPRESSION', `${quote(node.op ?? node.type)} has no place in a quantity`);
}

/** `20 °C`: a number before degC is a point on the scale; degC anywhere else is the size of a degree. */
function literalCelsius(a: ParsedNode, b: ParsedNode): Quantity | undefined {
  if (b.type !== 'SymbolNode' || b.name !== 'degC') return undefined;
  const negative = a.type === 'OperatorNode' && a.fn === 'unaryMinus';
  const literal = negative ? a.args?.[0] : a;
  if (literal?.type !== 'ConstantNode' || typeof literal.value !== 'number') {
    return notCelsius({
      value: 0,
      dimension: FAMILIES.temperature.dimension,
      celsius: true,
    });
  }
  const value = (negative ? -literal.value : literal.value) + ZERO_CELSIUS;
  return { value, dimension: FAMILIES.temperature.dimension, celsius: true };
}

function symbol(name: string, parser: ExpressionParser, named: NamedValues): Quantity {
  const value = named.lookUp(name);
  if (value !== undefined) return value;
  if (name === 'pi') return number(Math.PI);
  if (name === 'degC') return { ...number(1), dimension: FAMILIES.temperature.dimension };
  const own = OWN_UNITS.get(name);
  if (own !== undefined)
    return {
      value: own.factor * 10 ** own.power,
      dimension: own.dimension,
      celsius: false,
    };
  if (UNIT_NAMES.has(name)) {
    // the common reader is exact (powers of ten in one rounding); mathjs knows the rest
    const common = commonQuantity(`1 ${name}`);
    if (common !== undefined) return common;
    const unit = parser.unitOf(name);
    return { value: unit.value, dimension: unit.dimension, celsius: false };
  }
  throw new Fault(
    'UNIT',
    `${quote(name)} is neither a unit nor a let name${hint(name) ?? named.suggest(name)}`,
  );
}

/** What people mean that write a unit in another way. */
function hint(name: string): string | undefined {
  if (name === 'C') return ' (write 60 °C)';
  if (/^(deg)?F$/.test(name)) return ' (degrees Fahrenheit are not read; convert to °C)';
  const [, unit, exponent] = /^([a-z]+)([23])$/.exec(name) ?? [];
  return unit !== undefined && UNIT_NAMES.has(unit) ? ` (write ${unit}^${exponent})` : undefined;
}
