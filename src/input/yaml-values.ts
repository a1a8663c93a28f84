/**
 * Nodes of a YAML document -> plain values with the place of each. Aliases are replaced by what they stand for, within
 * a bound on the number of values; keys of a map are compared here, as the composer's own check is quadratic.
 */
import {
  type Document,
  isAlias,
  isCollection,
  isMap,
  isScalar,
  isSeq,
  type YAMLMap,
  type YAMLSeq,
} from 'yaml';
import { type Place, Problem } from '../problem.ts';
import { MAX_VALUES } from './limits.ts';
import { quote } from './quote.ts';
import type { Path, Source } from './source.ts';

/** Keys that would reach into objects of JavaScript. */
const FORBIDDEN_KEYS: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype']);

/** Ends the conversion; the problem is reported. */
class TooMany extends Error {}

interface Spot {
  readonly key: number;
  readonly value: number;
  readonly keys: readonly string[];
}

const join = (path: Path): string => path.join('\u0001');

/** @returns the data with places; `source` is absent where aliases explode */
export function yamlValues(
  tree: Document.Parsed,
  placeAt: (offset: number) => Place,
): { source?: Source; problems: Problem[] } {
  const problems: Problem[] = [];
  const spots = new Map<string, Spot>();
  const anchors = new Map<string, unknown>();
  const open = new Set<unknown>();
  let values = 0;
  const report = (code: Problem['code'], what: string, offset: number) => {
    problems.push(new Problem(code, what, placeAt(offset)));
  };

  function convert(node: unknown, path: Path, keyOffset: number, outer: number): unknown {
    const start = isScalar(node) || isCollection(node) || isAlias(node) ? (node.range?.[0] ?? outer) : outer;
    if (++values > MAX_VALUES) {
      report('TOO_LARGE', `over ${MAX_VALUES} values with every alias written out; write less`, start);
      throw new TooMany();
    }
    let keys: readonly string[] = [];
    let value: unknown = node === null ? null : undefined;
    if (isAlias(node)) {
      const target = anchors.get(node.source);
      if (target === undefined) report('SYNTAX', `no anchor ${quote(node.source)} before this alias`, start);
      else if (open.has(target))
        report('CIRCULAR', `alias ${quote(node.source)} stands inside its own anchor`, start);
      else value = convert(target, path, keyOffset, start);
      // the place of an alias is where it is used, the keys are those of what it stands for
      keys = spots.get(join(path))?.keys ?? [];
    } else if (isScalar(node) || isCollection(node)) {
      if (node.anchor !== undefined) anchors.set(node.anchor, node);
      if (node.tag !== undefined)
        report('SYNTAX', `a tag (${quote(node.tag)}); tags have no use here`, start);
      open.add(node);
      if (isMap(node)) [value, keys] = convertMap(node, path, start);
      else if (isSeq(node)) value = convertList(node, path, start);
      else if (isScalar(node)) value = scalar(node.value, node.source);
      open.delete(node);
    }
    spots.set(join(path), { key: keyOffset, value: start, keys });
    return value;
  }

  function scalar(value: unknown, source: string | undefined): unknown {
    if (typeof value === 'bigint') return Number(value);
    // .nan and .inf go on as text, for the reader of the key to refuse
    return typeof value === 'number' && !Number.isFinite(value) ? String(source ?? value) : value;
  }

  function convertList(list: YAMLSeq, path: Path, start: number): unknown[] {
    return list.items.map((item, k) => convert(item, [...path, k], start, start));
  }

  function convertMap(map: YAMLMap, path: Path, start: number): [Record<string, unknown>, string[]] {
    const result: Record<string, unknown> = Object.create(null);
    const keys: string[] = [];
    for (const pair of map.items) {
      const keyNode = pair.key;
      const keyStart = (isScalar(keyNode) || isCollection(keyNode) ? keyNode.range?.[0] : undefined) ?? start;
      if (!isScalar(keyNode)) {
        report('SYNTAX', 'a key that is not a plain word', keyStart);
        continue;
      }
      const key = typeof keyNode.value === 'string' ? keyNode.value : String(keyNode.source ?? keyNode.value);
      if (FORBIDDEN_KEYS.has(key)) {
        report('NAME', `${quote(key)} is reserved; take another name`, keyStart);
        continue;
      }
      if (Object.hasOwn(result, key)) {
        report('DUPLICATE', `${quote(key)} stands twice in one map; rename or remove one`, keyStart);
        continue;
      }
      keys.push(key);
      result[key] = convert(pair.value, [...path, key], keyStart, keyStart);
    }
    return [result, keys];
  }

  let data: unknown;
  try {
    data = convert(tree.contents, [], 0, 0);
  } catch (error) {
    if (!(error instanceof TooMany)) throw error;
    return { problems };
  }

  const spot = (path: Path): Spot | undefined => {
    for (let length = path.length; length >= 0; length--) {
      const found = spots.get(join(path.slice(0, length)));
      if (found !== undefined) return found;
    }
    return undefined;
  };
  const source: Source = {
    data,
    // a missing value is shown at the key of the map it should be in
    place: (path) => {
      const exact = spots.get(join(path));
      return placeAt(exact?.value ?? spot(path)?.key ?? 0);
    },
    keyPlace: (path) => placeAt(spot(path)?.key ?? 0),
    keys: (path) => spots.get(join(path))?.keys ?? [],
  };
  return { source, problems };
}
