/** Numbers for people: a power of thousand with its prefix, and as many digits as the error allows. */

const PREFIXES = ['a', 'f', 'p', 'n', 'u', 'm', '', 'k', 'M', 'G', 'T', 'P', 'E'];
const PLAIN = PREFIXES.indexOf('');

/** Digits shown at most; CSV and JSON have all of them. */
const MOST_DIGITS = 7;

export interface Scale {
  /** such as `m` or `` */
  readonly prefix: string;
  /** [1] of the prefix */
  readonly factor: number;
}

/** The prefix under which a value stands between 1 and 1000, as far as there are prefixes. */
export function scaleOf(value: number): Scale {
  if (value === 0) return { prefix: '', factor: 1 };
  const power = Math.floor(decimalExponent(value) / 3);
  const group = Math.max(-PLAIN, Math.min(PREFIXES.length - 1 - PLAIN, power));
  return { prefix: PREFIXES[group + PLAIN], factor: 10 ** (3 * group) };
}

/** `12.5893 kHz`: at most `digits` significant digits, no zeros behind. */
export function engineering(value: number, unit: string, digits = 6): string {
  const rounded = Number(value.toPrecision(digits));
  const { prefix, factor } = scaleOf(rounded);
  return `${Number((rounded / factor).toPrecision(digits))} ${prefix}${unit}`;
}

/** [1] Significant digits that a relative error leaves: the error is not above one unit of the last of them. */
export function digitsWithin(error: number): number {
  if (!(error > 0)) return MOST_DIGITS;
  return Math.max(1, Math.min(MOST_DIGITS, Math.floor(-Math.log10(error))));
}

/** A value in a scale with a number of significant digits, never in exponent form. */
export function fixed(value: number, scale: Scale, digits: number): string {
  const scaled = Number((value / scale.factor).toPrecision(digits));
  if (scaled === 0) return '0';
  const decimals = digits - 1 - decimalExponent(scaled);
  return scaled.toFixed(Math.max(0, Math.min(20, decimals)));
}

/** Exact at powers of ten, where a rounded logarithm may fall below. */
function decimalExponent(value: number): number {
  const text = value.toExponential();
  return Number(text.slice(text.indexOf('e') + 1));
}
