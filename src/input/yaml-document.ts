/**
 * YAML 1.2 or JSON text -> document, by the stages of `yaml` (lexer, parser, composer). Tokens and nesting are counted
 * while they are read: the composer recurses, and an exploding file must not get that far.
 */
import { Composer, type CST, type Document, Lexer, LineCounter, Parser } from 'yaml';
import { type Place, Problem } from '../problem.ts';
import { MAX_DEPTH, MAX_TOKENS } from './limits.ts';
import type { Source } from './source.ts';
import { yamlValues } from './yaml-values.ts';

/** Syntax errors listed; later ones mostly follow from the first. */
const MOST_SYNTAX_ERRORS = 5;

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
  lines.addNewLine(0);
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
  const tree = documents[0] as Document.Parsed | undefined;
  const errors = documents.flatMap((d) => d.errors);
  if (errors.length > 0 || tree === undefined) {
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
  if (tree.directives?.yaml.explicit === true && tree.directives.yaml.version !== '1.2') {
    return fail('SYNTAX', `YAML ${tree.directives.yaml.version}; the format is YAML 1.2`, 0);
  }
  return yamlValues(tree, placeAt);
}
