/** Files made to take long: each must end in seconds with its problem, or be read. */
import { describe, expect, it } from 'vitest';
import { MAX_FILE_BYTES } from '../../src/input/index.ts';
import { caseOf, lines, problemsOf } from './helpers.ts';

/** [ms] with room for a busy machine; what these texts did before they were bounded took minutes */
const TIME = 15_000;
const LONG = MAX_FILE_BYTES - 200;

/** Text of about `length` characters. */
const fill = (part: string, length = LONG) => part.repeat(Math.floor(length / part.length));
const count = <T>(n: number, make: (k: number) => T): T[] => Array.from({ length: n }, (_, k) => make(k));
const names = (n: number) => count(n, (k) => `wire_with_a_rather_long_name_${k}`);
const wires = (list: string[], wire: (k: number) => object) =>
  Object.fromEntries(list.map((n, k) => [n, wire(k)]));
const grid = (k: number) => ({
  diameter: '1 mm',
  at: [`${(k % 50) * 2} mm`, `${Math.floor(k / 50) * 2} mm`],
});

describe('texts made to take long', () => {
  it.each([
    ['brackets', fill('['), 'TOO_LARGE nested deeper'],
    ['flow maps', fill('{a: '), 'TOO_LARGE nested deeper'],
    ['block maps', count(2000, (k) => `${' '.repeat(k)}a:`).join('\n'), 'TOO_LARGE nested deeper'],
    ['an open quote', `"${fill('a\n')}`, 'SYNTAX'],
    ['backslashes', `"${fill('\\')}`, 'SYNTAX'],
    ['anchors', fill('&a '), 'TOO_LARGE over 500000 words'],
    ['one long word', fill('a'), 'WRONG_TYPE'],
    ['folded lines', fill('a\n'), 'WRONG_TYPE'],
    ['many documents', fill('---\n'), 'TOO_LARGE over 500000 words'],
    [
      'an alias of many',
      `a: &a [${fill('1,', 100_000)}]\nb: [${fill('*a,', 3000)}]`,
      'TOO_LARGE over 250000 values',
    ],
    ['digits in a quantity', `rimflow: 1\nlength: ${fill('9')}!`, 'MISSING'],
    ['spaces in a resistance', `wires: { a: { resistance: "1${fill(' ')}x" } }`, 'FORMAT_VERSION'],
    [
      'a chain of let names',
      `let: {${count(1000, (k) => `a${k}: a${k + 1} * 2`).join(', ')}, a1000: 1 mm}\nlength: a0`,
      'FORMAT_VERSION',
    ],
    [
      'a doubling let',
      `let: {${count(900, (k) => `a${k}: a${k + 1} + a${k + 1}`).join(', ')}, a900: 1 mm}\nlength: a0`,
      'FORMAT_VERSION',
    ],
    ['unknown keys', count(60_000, (k) => `titl${k}: 1`).join('\n'), 'FORMAT_VERSION'],
    ['bad frequencies', `frequencies: [${fill('{}, ', 300_000)}]`, 'FORMAT_VERSION'],
    ['frequencies without unit', `frequencies: [${fill('1, ', 290_000)}]`, 'FORMAT_VERSION'],
  ])(
    '%s',
    async (_, text, start) => {
      const first = lines(await problemsOf(text))[0]!;
      expect(first.slice(first.indexOf(' ') + 1).slice(0, start.length)).toBe(start);
    },
    TIME,
  );

  it(
    'unknown wires everywhere',
    async () => {
      const list = names(1500);
      const text = JSON.stringify({
        rimflow: 1,
        wires: wires(list, (k) => ({ diameter: 'gapp', at: { from: `${list[k]}x`, distance: '3 mm' } })),
        loops: Object.fromEntries(list.map((n) => [`l-${n}`, { go: `${n}y`, return: `${n}z` }])),
        frequencies: ['50 Hz'],
      });
      expect((await problemsOf(text)).length).toBe(201);
    },
    TIME,
  );

  it(
    'two thousand wires in one place, in one chain, in one list',
    async () => {
      const list = names(2000);
      const loops = Object.fromEntries(count(20, (k) => [`l${k}`, { go: list.slice(1), return: list[0] }]));
      const heap = { rimflow: 1, wires: wires(list, () => grid(0)), loops, frequencies: ['50 Hz'] };
      const overlaps = (await problemsOf(JSON.stringify(heap))).filter((p) => p.code === 'OVERLAP');
      expect(overlaps.length).toBe(50);

      const chained = wires(list, (k) =>
        k === 1999 ? grid(0) : { diameter: '1 mm', at: { from: list[k + 1], touching: true } },
      );
      const chain = await caseOf(JSON.stringify({ ...heap, wires: chained }));
      expect(chain.wires[0]!.x).toBeCloseTo(1999 * 1.001e-3, 9);
      const many = names(2001);
      const problems = await problemsOf(JSON.stringify({ ...heap, wires: wires(many, grid) }));
      expect(problems.map((p) => p.message)).toEqual(['2001 wires; the most is 2000']);
    },
    2 * TIME,
  );
});
