/**
 * The first gate of an expression: only numbers, names and arithmetic signs pass, within bounds, and they are
 * written anew with single spaces, so that the parser behind meets nothing but these.
 */
import { Fault } from './fault.ts';
import { MAX_EXPRESSION_TOKENS, MAX_PARENTHESES } from './limits.ts';
import { quote } from './quote.ts';

const TOKEN = /\s+|(\d+\.?\d*(?:e[+-]?\d+)?|\.\d+(?:e[+-]?\d+)?)|([A-Za-z_]\w*)|([-+*/^(),])/iy;

/** Names that the parser would take for its own operators or constants, with what is meant here. */
const RENAMED: ReadonlyMap<string, string> = new Map([['in', 'inch']]);

/** Words of the parser's language; never names or units of a file. */
export const PARSER_WORDS: ReadonlySet<string> = new Set(
  'mod to in and or xor not end true false null undefined NaN Infinity'.split(' '),
);

/** Identifiers of a `plainUnits` text. */
export function identifiersOf(text: string): string[] {
  return text.match(/[A-Za-z_]\w*/g) ?? [];
}

/** Tokens of a `plainUnits` text, joined by single spaces. Throws EXPRESSION, TOO_LARGE or RANGE. */
export function safeExpression(text: string): string {
  const tokens: string[] = [];
  let open = 0;
  TOKEN.lastIndex = 0;
  while (TOKEN.lastIndex < text.length) {
    const at = TOKEN.lastIndex;
    const match = TOKEN.exec(text);
    if (match === null) {
      throw new Fault(
        'EXPRESSION',
        `can not read ${quote(text)}: ${quote(text[at])} has no place in a quantity`,
      );
    }
    const [, number, name, sign] = match;
    if (sign === '(' && ++open > MAX_PARENTHESES) {
      throw new Fault('TOO_LARGE', `more than ${MAX_PARENTHESES} open parentheses in an expression`);
    }
    if (sign === ')') open--;
    if (name !== undefined && PARSER_WORDS.has(name) && !RENAMED.has(name)) {
      const infinite = name === 'NaN' || name === 'Infinity';
      const why = infinite
        ? 'is not a finite number'
        : `can not be read: ${quote(name)} has no place in a quantity`;
      throw new Fault(infinite ? 'RANGE' : 'EXPRESSION', `${quote(text)} ${why}`);
    }
    const token = number ?? (name === undefined ? sign : (RENAMED.get(name) ?? name));
    if (token !== undefined) tokens.push(token);
    if (tokens.length > MAX_EXPRESSION_TOKENS) {
      throw new Fault('TOO_LARGE', `an expression of over ${MAX_EXPRESSION_TOKENS} parts; use let names`);
    }
  }
  if (open !== 0) {
    const why = 'a parenthesis without its partner';
    throw new Fault(
      'EXPRESSION',
      `can not read ${quote(text)}: ${why}; inside [ ] and { } put commas in quotes`,
    );
  }
  const plain = dropUnitOne(tokens);
  refuseSideBySide(text, plain);
  return plain.join(' ');
}

const isNumber = (token: string | undefined) => token !== undefined && /^[\d.]/.test(token);
const isName = (token: string | undefined) => token !== undefined && /^[A-Za-z_]/.test(token);

/** `0.0039 1/K` is how people write a reciprocal unit: the 1 after a number and before a unit goes. */
function dropUnitOne(tokens: readonly string[]): string[] {
  return tokens.filter(
    (t, k) => !(t === '1' && isNumber(tokens[k - 1]) && tokens[k + 1] === '/' && isName(tokens[k + 2])),
  );
}

/** What stands side by side is multiplied, which is not what `1 1/2 mm` and `g % 2` mean. */
function refuseSideBySide(text: string, tokens: readonly string[]): void {
  for (let k = 1; k < tokens.length; k++) {
    const [before, token] = [tokens[k - 1], tokens[k]];
    if (isNumber(before) && isNumber(token)) {
      throw new Fault(
        'EXPRESSION',
        `can not read ${quote(text)}: the numbers ${before} and ${token} side by side; write 1.5 mm or (1 + 1/2) mm`,
      );
    }
    if (before === 'percent' && (isNumber(token) || isName(token) || token === '(')) {
      throw new Fault(
        'EXPRESSION',
        `can not read ${quote(text.replaceAll('percent', '%'))}: % means a hundredth and stands after a number; write 50 % * gap; there is no remainder`,
      );
    }
  }
}
