/**
 * The parser and the units of mathjs, and nothing else of it: no evaluation, so that no text of a file can reach its
 * functions. Imported lazily, only when a value is more than a number with a common unit: mathjs in full takes one to
 * two seconds to load.
 */
import { create, parseDependencies, UnitDependencies } from 'mathjs';
import type { Dimension } from './families.ts';

/** The parts of a parsed node that the evaluation looks at; the kinds it does not know it refuses. */
export interface ParsedNode {
  readonly type: string;
  readonly value?: unknown;
  readonly name?: string;
  readonly op?: string;
  readonly fn?: unknown;
  readonly implicit?: boolean;
  readonly args?: readonly ParsedNode[];
  readonly content?: ParsedNode;
}

const subset = create({ parseDependencies, UnitDependencies }, {}) as unknown as {
  parse(text: string): ParsedNode;
  Unit: new (value: number, name: string) => { value: number; dimensions: readonly number[] };
};

/** Parses an expression. Throws a SyntaxError of mathjs. */
export function parseExpression(text: string): ParsedNode {
  return subset.parse(text);
}

/** [SI] value of one of the named unit and its dimension; `name` must be a unit of mathjs. */
export function unitOf(name: string): { value: number; dimension: Dimension } {
  const unit = new subset.Unit(1, name);
  const d = unit.dimensions;
  // mathjs counts mass, length, time, current, temperature, luminous intensity, amount, angle, information
  return {
    value: unit.value,
    dimension: [d[0]!, d[1]!, d[2]!, d[3]!, d[4]!, d[7]!],
  };
}
