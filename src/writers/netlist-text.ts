/**
 * Text that is safe inside a netlist: names of subcircuits, and comments that can neither leave their line
 * nor grow past 80 columns. Netlists are kept to printable ASCII, which every simulator reads alike.
 */

/** Columns of a line; older readers cut longer ones. */
const WIDTH = 80;
/** Leaves room for `.subckt NAME a1 b1`. */
const LONGEST_NAME = 60;

/** True for a letter followed by letters, digits and _, at most 60 characters in all. */
export function isSafeSubcircuitName(name: string): boolean {
  return /^[A-Za-z][A-Za-z0-9_]*$/.test(name) && name.length <= LONGEST_NAME;
}

/**
 * A subcircuit name from any text, such as the name of a file: accents dropped, other characters turned
 * into _, a letter in front. A safe name comes back unchanged.
 */
export function safeSubcircuitName(text: string): string {
  if (isSafeSubcircuitName(text)) return text;
  const plain = text
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^A-Za-z0-9]+/g, '_')
    .replace(/^_+|_+$/g, '');
  const named = /^[A-Za-z]/.test(plain) ? plain : `loop_${plain}`;
  return named.slice(0, LONGEST_NAME).replace(/_+$/, '');
}

/**
 * Signs that titles use and ASCII lacks: degree, ohm and Greek omega, micro and Greek mu, times, dashes,
 * lambda.
 */
const SPELLED: ReadonlyMap<string, string> = new Map([
  ['\u00b0', ' deg '],
  ['\u2126', 'ohm'],
  ['\u03a9', 'ohm'],
  ['\u00b5', 'u'],
  ['\u03bc', 'u'],
  ['\u00d7', 'x'],
  ['\u2013', '-'],
  ['\u2014', '-'],
  ['\u03bb', 'lambda'],
]);

/**
 * Printable ASCII on one line: accents dropped, control characters and line ends turned into spaces,
 * unknown signs into `?`.
 */
export function asciiText(text: string): string {
  const spelled = Array.from(text, (sign) => SPELLED.get(sign) ?? sign).join('');
  return Array.from(spelled.normalize('NFKD'), asciiSign).join('').replace(/ +/g, ' ').trim();
}

function asciiSign(sign: string): string {
  if (/[ -~]/.test(sign)) return sign;
  if (/\p{M}/u.test(sign)) return '';
  return /\s|\p{C}/u.test(sign) ? ' ' : '?';
}

/**
 * A paragraph as `*` comment lines of at most 80 columns, broken at spaces where there are any; leading
 * spaces are kept.
 */
export function commentLines(paragraph: string): string[] {
  const indent = /^ */.exec(paragraph)![0];
  const room = WIDTH - 2 - indent.length;
  const lines: string[] = [];
  let rest = paragraph.slice(indent.length);
  while (rest.length > room) {
    const space = rest.lastIndexOf(' ', room);
    const cut = space > 0 ? space : room;
    lines.push(rest.slice(0, cut));
    rest = rest.slice(cut).trimStart();
  }
  lines.push(rest);
  return lines.map((line) => `* ${indent}${line}`.trimEnd());
}
