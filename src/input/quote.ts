/** How messages show what was typed. */

/** Longest stretch of the user's text in a message. */
const LONGEST = 60;

/** In double quotes, cut to a readable length, without control characters. */
export function quote(value: unknown): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is taken out
  const text = String(value).replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029]+/g, ' ');
  return `"${text.length > LONGEST ? `${text.slice(0, LONGEST)}…` : text}"`;
}

/** What kind of value was found, for "expected .., found ..". */
export function describeValue(value: unknown): string {
  if (value === undefined) return 'nothing';
  if (value === null) return 'an empty value';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'object') return 'a map';
  if (typeof value === 'string') return `the text ${quote(value)}`;
  return `${value}`;
}

/** `"a", "b" and 3 more` */
export function quoteList(names: readonly string[], most = 6): string {
  const shown = names.slice(0, most).map(quote).join(', ');
  return names.length > most ? `${shown} and ${names.length - most} more` : shown;
}
