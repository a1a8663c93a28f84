/**
 * YAML 1.2 or JSON text -> plain data with the place of every value, by the stages of `yaml` (lexer, parser,
 * composer), each bounded: tokens and nesting while they are read, values while aliases are replaced. Keys of a map
 * are compared here: the composer's own check is quadratic.
 */
import {
  Composer,
  type CST,
  type Document,
  isAlias,
  isCollection,
  isMap,
  isScalar,
  isSeq,
  Lexer,
  LineCounter,
  Parser,
  type YAMLMap,
  type YAMLSeq,
} from 'yaml';
import { type Place, Problem } from '../problem.ts';
import { MAX_DEPTH, MAX_TOKENS, MAX_VALUES } from './limits.ts';
import { quote } from './quote.ts';
import type { Path, Source } from './source.ts';

/** Syntax errors listed; later ones mostly follow from the first. */
const MOST_SYNTAX_ERRORS = 5;

/** Keys that would reach into objects of JavaScript. */
const FORBIDDEN_KEYS: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype']);

interface Spot {
  readonly key: number;
  readonly value: number;
  readonly keys: readonly string[];
}

const join = (path: Path): string => path.join('\u0001');

/** @returns the data; `problems` holds what was wrong, `source` is absent where nothing could be read */
export function readYaml(text: string, file: string): { source?: Source; problems: Problem[] } {
  const lines = new LineCounter();
  const placeAt = (offset: number): Place => {
    const { line, col } = lines.linePos(Math.max(0, Math.min(offset, text.length)));
    return { file, line: Math.max(1, line), column: Math.max(1, col) };
  };
  const fail = (code: 'SYNTAX' | 'TOO_LARGE', what: string, offset: number) => ({
    problems: [new Problem(code, what, placeAt(offset))],
  });

  const tokens: CST.Token[] = [];
  const parser = new Parser(lines.addNewLine);
  let count = 0;
  let offset = 0;
  for (const lexeme of new Lexer().lex(text)) {
    if (++count > MAX_TOKENS) {
      return fail('TOO_LARGE', `over ${MAX_TOKENS} words and signs, which is the limit`, offset);
    }
    for (const token of parser.next(lexeme)) tokens.push(token);
    // besides the document, each level of a block or flow collection is one entry of the stack
    if (parser.stack.length > MAX_DEPTH) {
      return fail('TOO_LARGE', `nested deeper than ${MAX_DEPTH} levels, which is the limit`, parser.offset);
    }
    offset = parser.offset;
  }
  for (const token of parser.end()) tokens.push(token);

  const documents = Array.from(
    new Composer({ uniqueKeys: false, version: '1.2', strict: true }).compose(tokens, true, text.length),
  );
  const document = documents[0] as Document.Parsed | undefined;
  const errors = documents.flatMap((d) => d.errors);
  if (errors.length > 0 || document === undefined) {
    const problems = errors
      .slice(0, MOST_SYNTAX_ERRORS)
      .map(
        (e) => new Problem('SYNTAX', `${e.message}; the file must be YAML 1.2 or JSON`, placeAt(e.pos[0])),
      );
    return { problems };
  }
  const second = documents[1];
  if (second !== undefined) {
    const at = second.contents?.range?.[0] ?? second.range[0];
    return fail('SYNTAX', 'a second document in one file; give one case a file', at);
  }
  if (document.directives?.yaml.explicit === true && document.directives.yaml.version !== '1.2') {
    return fail('SYNTAX', `YAML ${document.directives.yaml.version}; the format is YAML 1.2`, 0);
  }
  return toSource(document, placeAt);
}

/** Replaces nodes by plain values; aliases by what they stand for, as long as that stays small. */
function toSource(document: Document.Parsed, placeAt: (offset: number) => Place) {
  const problems: Problem[] = [];
  const spots = new Map<string, Spot>();
  const anchors = new Map<string, unknown>();
  const open = new Set<unknown>();
  let values = 0;
  const report = (code: Problem['code'], what: string, offset: number) => {
    problems.push(new Problem(code, what, placeAt(offset)));
  };

  class TooMany extends Error {}

  function convert(node: unknown, path: Path, keyOffset: number, outer: number): unknown {
    const start = isScalar(node) || isCollection(node) || isAlias(node) ? (node.range?.[0] ?? outer) : outer;
    if (++values > MAX_VALUES) {
      report('TOO_LARGE', `over ${MAX_VALUES} values with every alias written out; write less`, start);
      throw new TooMany();
    }
    let keys: readonly string[] = [];
    let value: unknown = null;
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
      else if (isScalar(node)) value = scalar(node.value, node.source, start);
      open.delete(node);
    }
    spots.set(join(path), { key: keyOffset, value: start, keys });
    return value;
  }

  function scalar(value: unknown, source: string | undefined, start: number): unknown {
    if (typeof value === 'bigint') return Number(value);
    if (typeof value === 'number' && !Number.isFinite(value)) {
      report('RANGE', `${quote(source ?? value)} is not a finite number; give one`, start);
      return undefined;
    }
    return value;
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
    data = convert(document.contents, [], 0, 0);
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
