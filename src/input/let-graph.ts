/** Which let name uses which: cycles, and an order in which each comes after those it uses. No recursion: chains are long. */
import { identifiersOf } from './expression-tokens.ts';
import { MAX_EXPRESSION_LENGTH } from './limits.ts';
import { plainUnits } from './unit-text.ts';

export type LetValue = string | number | boolean;

export interface LetGraph {
  /** let names inside the value of a name */
  readonly uses: ReadonlyMap<string, readonly string[]>;
  /** each cycle once, from one of its names back to it */
  readonly cycles: readonly (readonly string[])[];
  /** names on a cycle or using one */
  readonly unusable: ReadonlySet<string>;
  /** position of a name in an order where those it uses come first */
  readonly rank: ReadonlyMap<string, number>;
}

/** @param words names of wires and materials: as a whole value they are words, whatever they contain */
export function letGraph(values: ReadonlyMap<string, LetValue>, words: ReadonlySet<string>): LetGraph {
  const uses = new Map<string, string[]>();
  for (const [name, value] of values) uses.set(name, namesIn(value, values, words));
  const cycles: string[][] = [];
  const unusable = new Set<string>();
  const rank = new Map<string, number>();
  const open = new Set<string>();
  for (const first of values.keys()) {
    if (rank.has(first)) continue;
    const stack: { name: string; next: number }[] = [{ name: first, next: 0 }];
    open.add(first);
    while (stack.length > 0) {
      const top = stack.at(-1)!;
      const used = uses.get(top.name)![top.next++];
      if (used === undefined) {
        if (uses.get(top.name)!.some((name) => unusable.has(name))) unusable.add(top.name);
        rank.set(top.name, rank.size);
        open.delete(top.name);
        stack.pop();
      } else if (open.has(used)) {
        const names = stack.map((entry) => entry.name);
        const cycle = names.slice(names.indexOf(used));
        for (const name of cycle) unusable.add(name);
        cycles.push(cycle);
      } else if (!rank.has(used)) {
        open.add(used);
        stack.push({ name: used, next: 0 });
      }
    }
  }
  return { uses, cycles, unusable, rank };
}

function namesIn(
  value: LetValue,
  values: ReadonlyMap<string, LetValue>,
  words: ReadonlySet<string>,
): string[] {
  // longer texts are refused when they are used
  if (typeof value !== 'string' || value.length > MAX_EXPRESSION_LENGTH || words.has(value.trim())) return [];
  return Array.from(new Set(identifiersOf(plainUnits(value)))).filter((word) => values.has(word));
}

/** The names that a name uses, directly or not, in the order of evaluation; those already `known` are left out. */
export function dependencies(graph: LetGraph, name: string, known: ReadonlyMap<string, unknown>): string[] {
  const found = new Set<string>();
  const stack = [name];
  for (let next = stack.pop(); next !== undefined; next = stack.pop()) {
    for (const used of graph.uses.get(next) ?? []) {
      if (found.has(used) || known.has(used)) continue;
      found.add(used);
      stack.push(used);
    }
  }
  return Array.from(found).sort((a, b) => graph.rank.get(a)! - graph.rank.get(b)!);
}
