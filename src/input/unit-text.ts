/** One spelling for the many ways in which people write units: signs, superscripts and degrees become plain ASCII. */

const SIGNS: Readonly<Record<string, string>> = {
  '\u00b5': 'u', // micro sign
  '\u03bc': 'u', // Greek mu
  '\u2126': 'ohm', // ohm sign
  '\u03a9': 'ohm', // Greek omega
  '\u212a': 'K', // kelvin sign
  '\u212b': 'angstrom',
  '\u00c5': 'angstrom',
  '\u2103': ' degC ',
  '\u2212': '-', // minus sign
  '\u2013': '-', // en dash
  '\u00d7': '*',
  '\u00b7': '*', // middle dot
  '\u22c5': '*', // dot operator
  '\u2215': '/', // division slash
  '\u00a0': ' ',
  '\u2009': ' ',
  '\u202f': ' ',
  '%': ' percent ',
  '\u2030': ' *1e-3 ',
};
const SIGN = new RegExp(`[${Object.keys(SIGNS).join('')}]`, 'g');

const SUPERSCRIPTS = '\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079';
const SUPERSCRIPT = new RegExp(`([\u207a\u207b]?)([${SUPERSCRIPTS}]+)`, 'g');

/** `60°` -> `60 deg`, `17.2 nΩ·m` -> `17.2 nohm*m`, `1.5 mm²` -> `1.5 mm^2`, `S m⁻¹` -> `S m^-1`. */
export function plainUnits(text: string): string {
  return text
    .replace(SUPERSCRIPT, (_, sign: string, digits: string) => {
      const power = Array.from(digits, (digit) => SUPERSCRIPTS.indexOf(digit)).join('');
      return `^${sign === '\u207b' ? '-' : ''}${power}`;
    })
    .replace(SIGN, (sign) => SIGNS[sign]!)
    .replace(/\u00b0\s*C\b/g, ' degC ')
    .replace(/\u00b0\s*F\b/g, ' degF ')
    .replace(/\u00b0/g, ' deg ')
    .replace(/([A-Za-z]?)Ohms?\b/g, '$1ohm')
    .replace(/\s+/g, ' ')
    .trim();
}
