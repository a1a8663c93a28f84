/** Texts that are no cross-section file at all, and slips too small for a file of their own. */
import { describe, expect, it } from 'vitest';
import { decodeText, MAX_FILE_BYTES } from '../../src/input/index.ts';
import { Problem } from '../../src/problem.ts';
import { lines, pair, problemsOf } from './helpers.ts';

function problemOf(action: () => unknown): Problem {
  try {
    action();
  } catch (error) {
    if (error instanceof Problem) return error;
    throw error;
  }
  throw new Error('no problem');
}

const bytes = (...values: number[]) => Uint8Array.from(values);
const utf16 = (text: string, big: boolean) => {
  const codes = Array.from(`\ufeff${text}`, (c) => c.charCodeAt(0));
  return Uint8Array.from(codes.flatMap((c) => (big ? [c >> 8, c & 255] : [c & 255, c >> 8])));
};

describe('decodeText', () => {
  it('reads UTF-8 with and without byte order mark, and UTF-16 with one', () => {
    const text = 'title: 60 °C';
    expect(decodeText(new TextEncoder().encode(text), 'f')).toBe(text);
    expect(decodeText(new TextEncoder().encode(`\ufeff${text}`), 'f')).toBe(text);
    expect(decodeText(utf16(text, false), 'f')).toBe(text);
    expect(decodeText(utf16(text, true), 'f')).toBe(text);
  });

  it('keeps a replacement character that is really in the text', () => {
    expect(decodeText(new TextEncoder().encode('a\ufffdb'), 'f')).toBe('a\ufffdb');
  });

  it('refuses a file over 10 MB with the limit', () => {
    const problem = problemOf(() => decodeText(new Uint8Array(MAX_FILE_BYTES + 1), 'big.yaml'));
    expect(problem.line()).toBe('big.yaml TOO_LARGE 10.0 MB; a cross-section file has at most 10 MB');
  });

  it.each([
    ['binary garbage', bytes(0x7f, 0x45, 0x4c, 0x46, 0, 0, 1), 'f:1:1 NOT_TEXT'],
    ['zeros in the second line', bytes(0x61, 0x0a, 0x62, 0), 'f:2:2 NOT_TEXT'],
    ['Latin-1', bytes(0x61, 0x0a, 0x36, 0x30, 0xb0, 0x43), 'f:2:3 NOT_TEXT'],
    ['UTF-16 without a mark', bytes(0x61, 0, 0x62, 0), 'f:1:2 NOT_TEXT'],
    ['a cut UTF-8 sequence', bytes(0x61, 0xe2, 0x82), 'f:1:2 NOT_TEXT'],
  ])('refuses %s', (_, data, start) => {
    expect(
      problemOf(() => decodeText(data, 'f'))
        .line()
        .slice(0, start.length),
    ).toBe(start);
  });
});

describe('texts that are no case', () => {
  it.each([
    ['', '1:1 MISSING the file is empty'],
    ['# nothing', '1:1 MISSING the file is empty'],
    ['just words', '1:1 WRONG_TYPE the file is the text "just words"'],
    ['[1, 2]', '1:1 WRONG_TYPE the file is a list'],
    ['a: 1\n---\nb: 2', '3:1 SYNTAX a second document'],
    ['%YAML 1.1\n---\na: 1', '1:1 SYNTAX YAML 1.1'],
    ['{"rimflow": 1,', '1:15 SYNTAX'],
    ['\u0000', '1:1 NOT_TEXT binary data'],
    ['['.repeat(100_000), '1:41 TOO_LARGE nested deeper than 40 levels'],
    ['- '.repeat(100_000), '1:80 TOO_LARGE nested deeper'],
    [`a: [${'1,'.repeat(400_000)}]`, '1:333334 TOO_LARGE over 500000 words'],
    ['x'.repeat(MAX_FILE_BYTES + 1), 'undefined:undefined TOO_LARGE over 10 MB'],
  ])('%.20s', async (text, start) => {
    const first = lines(await problemsOf(text))[0]!;
    expect(first.slice(0, start.length)).toBe(start);
  });
});

describe('small slips', () => {
  const good = pair('diameter: 1 mm');
  it.each([
    [
      'a missing version',
      good.replace('rimflow: 1', 'title: x'),
      ['1:1 FORMAT_VERSION format version is missing'],
    ],
    [
      'an unknown version',
      good.replace('rimflow: 1', 'rimflow: 2'),
      ['1:10 FORMAT_VERSION format version 2'],
    ],
    ['a tag', `${good}title: !!str 5`, ['8:14 SYNTAX a tag']],
    ['a tag of a language', `${good}title: !!js/function x`, ['8:22 SYNTAX a tag']],
    ['an alias of nothing', `${good}title: *b`, ['8:8 SYNTAX no anchor "b" before this alias']],
    ['an alias of itself', `${good}title: &a [*a]`, ['8:11 WRONG_TYPE', '8:12 CIRCULAR']],
    ['a key that is a list', `${good}? [a]\n: 1`, ['8:3 SYNTAX a key']],
    ['merge keys', `${good}<<: { title: x }`, ['8:1 UNKNOWN_KEY']],
    ['an empty section', `${good}materials:`, ['8:11 MISSING "materials" is missing']],
    [
      'no wires',
      good.replace(/ {2}[ab]: .*\n/g, '').replace('wires:', 'wires: {}'),
      ['2:8 MISSING no wires', '4:15 UNKNOWN_WIRE', '4:26 UNKNOWN_WIRE'],
    ],
    ['no loops', good.replace(/ {2}pair: .*\n/, '').replace('loops:', 'loops: {}'), ['5:8 MISSING no loops']],
    ['an empty list of frequencies', good.replace('[50 Hz]', '[]'), ['7:14 NO_FREQUENCIES']],
    ['an empty value of frequencies', good.replace('[50 Hz]', ''), ['7:14 NO_FREQUENCIES']],
    [
      'a word for frequencies',
      good.replace('[50 Hz]', 'all'),
      ['7:14 WRONG_TYPE "frequencies" is the text "all"; expected a list'],
    ],
    [
      'a log range from zero',
      good.replace('[50 Hz]', '{ from: 0 Hz, to: 1 kHz }'),
      ['7:22 RANGE a log scale can not begin at 0 Hz'],
    ],
    [
      'a range upside down',
      good.replace('[50 Hz]', '{ from: 1 MHz, to: 1 kHz }'),
      ['7:22 RANGE from is above to'],
    ],
    [
      'two steps',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 kHz, count: 3, per_decade: 3 }'),
      ['7:46 WRONG_TYPE per_decade and count'],
    ],
    [
      'linear without count',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 kHz, scale: linear }'),
      ['7:14 MISSING a linear scale needs count'],
    ],
    [
      'maps in place of words',
      good
        .replace('return: b', 'return: { b: c }')
        .replace('[0 mm, 0 mm]', '{ from: { b: c }, distance: {} }')
        .concat('title: {}'),
      [
        '3:36 WRONG_TYPE "from" is a map',
        '3:56 WRONG_TYPE "distance" is a map',
        '6:26 WRONG_TYPE "return" is a map',
        '8:8 WRONG_TYPE "title" is a map',
      ],
    ],
    [
      'a key without a value',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 Hz, count }'),
      ['7:38 MISSING "count"'],
    ],
    [
      'let names of the wrong kind',
      good
        .replace('diameter: 1 mm', 'gauge: yes, material: yes, insulation: yes')
        .replace('[0 mm, 0 mm]', '{ from: yes, distance: yes, touching: three }')
        .replace('return: b', 'return: yes, series: three')
        .concat('let: { yes: true, three: 3 }'),
      [
        '3:15 UNKNOWN_GAUGE',
        '3:30 UNKNOWN_MATERIAL',
        '3:47 EXPRESSION insulation: let name "yes" is "true", which is no quantity',
        '3:79 EXPRESSION distance: let name "yes" is "true"',
        '3:94 WRONG_TYPE touching: "3" is neither true nor false',
        '6:26 UNKNOWN_WIRE no wire "true"',
        '6:39 WRONG_TYPE series: "3" is neither',
      ],
    ],
    [
      'half a point',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 kHz, count: 2.5 }'),
      ['7:46 RANGE count: 2.5 is not a whole number'],
    ],
    [
      'no point',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 kHz, per_decade: 0 }'),
      ['7:51 RANGE per_decade'],
    ],
    [
      'a million points',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 kHz, per_decade: 90000 }'),
      ['7:51 TOO_LARGE over 100000 frequencies'],
    ],
    [
      'a scale of its own',
      good.replace('[50 Hz]', '{ from: 1 Hz, to: 1 kHz, scale: octave }'),
      ['7:46 WRONG_TYPE scale is octave'],
    ],
    [
      'a tolerance too tight',
      `${good}tolerance: 1e-20`,
      ['8:12 RANGE tolerance: "1e-20" is outside 1e-12 to 0.1'],
    ],
    ['a tolerance with a unit', `${good}tolerance: 1 mm`, ['8:12 UNIT tolerance: "1 mm" is a length']],
    [
      'a negative extra',
      good.replace('return: b', 'return: b, extra: { resistance: -1 ohm }'),
      ['6:50 RANGE resistance: "-1 ohm" is outside'],
    ],
    [
      'three coordinates',
      good.replace('[0 mm, 0 mm]', '[0 mm, 0 mm, 0 mm]'),
      ['3:28 WRONG_TYPE "at" is a list'],
    ],
    ['no place', good.replace(', at: [0 mm, 0 mm]', ''), ['3:3 MISSING "at" is missing']],
    [
      'a place without distance',
      good.replace('[0 mm, 0 mm]', '{ from: b }'),
      ['3:28 MISSING at: no distance'],
    ],
    [
      'touching and distance',
      good.replace('[0 mm, 0 mm]', '{ from: b, distance: 3 mm, touching: true }'),
      ['3:49 WRONG_TYPE touching and distance'],
    ],
    [
      'an unknown origin',
      good.replace('[0 mm, 0 mm]', '{ from: bb, distance: 3 mm }'),
      ['3:36 UNKNOWN_WIRE no wire "bb" to stand from'],
    ],
    [
      'no flag',
      good.replace('return: b', 'return: b, series: maybe'),
      ['6:37 WRONG_TYPE series: "maybe" is neither true nor false'],
    ],
    [
      'an override of no name',
      good,
      ['undefined:undefined NAME no let name "gap"; the file has no let names'],
      { gap: '1 mm' },
    ],
    [
      'an override misspelt',
      `${good}let: { gap: 1 mm }`,
      ['undefined:undefined NAME no let name "gpa" (did you mean "gap"?)'],
      { gpa: '1 mm' },
    ],
    [
      'coordinates too far out',
      good.replace('0 mm, 0 mm', '900000 m, 0 m').replace('[1 m', '[900000.0011 m'),
      ['4:28 RANGE wires "a" and "b" are 1.1 mm apart, too far from the origin'],
    ],
  ] as [string, string, string[], Record<string, string>?][])('%s', async (_, text, expected, set) => {
    const found = lines(await problemsOf(text, set));
    expect(found.map((line, k) => line.slice(0, expected[k]?.length))).toEqual(expected);
  });

  it('places an override at its option', async () => {
    const [problem] = await problemsOf(`${good}let: { gap: 1 mm }`.replace('1 m,', 'gap,'), { gap: '1 kg' });
    expect(problem?.line()).toMatch(/^--set gap UNIT let name "gap": "kg" is neither a unit/);
  });

  it('counts the tail of a very long list', async () => {
    const text = `${good}let: { ${Array.from({ length: 300 }, (_, k) => `${k}: 1`).join(', ')} }`;
    const problems = await problemsOf(text);
    expect(problems.length).toBe(201);
    expect(problems.at(-1)!.message).toBe('and 100 more problems');
  });
});
