/**
 * Good files, damaged at random: the reader ends in time, with a case or with problems of the closed list, each with a
 * place inside the text; never an exception. And good cases hold no NaN.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readCase } from '../../src/input/index.ts';
import type { Case } from '../../src/model/index.ts';
import { EXIT_STATUS, Problem } from '../../src/problem.ts';
import { fixture } from './helpers.ts';

const SEED = Number(process.env.FUZZ_SEED ?? 20_240);
const RUNS = Number(process.env.FUZZ_RUNS ?? 500);
/** [ms] of the whole search; a slow machine does fewer runs */
const TIME = 20_000;
/** [ms] one reading of a small file, with room for a busy machine */
const TIME_OF_ONE = 3000;

const good = ['good/contract.yaml', 'good/turns.yaml', 'good/common-return.yaml', 'good/exact.json'].map(
  fixture,
);

const HOSTILE = [
  '',
  ' ',
  '\n',
  '\t',
  '0',
  '-1',
  '1e999',
  '.nan',
  'NaN',
  'null',
  'true',
  '[]',
  '{}',
  '[',
  '}',
  ':',
  '- ',
  '? ',
  '|',
  '>',
  '"',
  "'",
  '*a',
  '&a',
  '!!js',
  '!!binary',
  '%YAML 1.1',
  '---',
  '...',
  '<<',
  '__proto__',
  'constructor',
  'toString',
  'mm',
  '°',
  '²',
  '1 kg',
  '0 mm',
  '-3 mm',
  '1e-300 mm',
  '1e300 mm',
  'f(x)=1',
  '2^2^2^2',
  'a',
  'plus',
  'plane',
  'bundles',
  'sets',
  'copper',
  'AWG 12',
  'AWG 999',
  'SWG',
  '50%',
  '{ from: plus, touching: true }',
  '{ from: go1, distance: 1 mm }',
  '[[go1, go2]]',
  '\ud800',
  '\ufeff',
  '\u2028',
  '🙂',
];

type Edit = readonly [kind: number, at: number, to: number, text: string];

/** Cuts, doubles, swaps or writes over a part of a text; `at` and `to` are shares of its length. */
function apply(text: string, [kind, at, to, insert]: Edit): string {
  const a = Math.floor(at * text.length);
  const b = Math.min(text.length, a + Math.floor(to * 12));
  const lines = text.split('\n');
  const line = Math.floor(at * lines.length);
  const other = Math.floor(to * lines.length);
  switch (kind) {
    case 0:
      return text.slice(0, a) + text.slice(b);
    case 1:
      return text.slice(0, a) + insert + text.slice(b);
    case 2:
      return text.slice(0, a) + insert + text.slice(a);
    case 3:
      return [...lines.slice(0, line), lines[line], ...lines.slice(line)].join('\n');
    case 4:
      return lines.map((l, k) => (k === line ? lines[other] : k === other ? lines[line] : l)).join('\n');
    case 5:
      return lines.filter((_, k) => k !== line).join('\n');
    default: {
      // a word of the file for another: the damage that keeps most of the shape
      const words = text.match(/[\w.°²]+/g) ?? [''];
      return text.replace(
        words[Math.floor(at * words.length)]!,
        insert || words[Math.floor(to * words.length)]!,
      );
    }
  }
}

// without bias: the default favours the ends of the file
const share = fc.noBias(fc.integer({ min: 0, max: 999_999 })).map((k) => k / 1e6);
const edit = fc.tuple(fc.nat(14), share, share, fc.constantFrom(...HOSTILE));
const damaged = fc
  .tuple(fc.constantFrom(...good), fc.array(edit, { minLength: 1, maxLength: 4 }))
  .map(([text, edits]) => edits.reduce(apply, text));

function checkCase(c: Case): void {
  const numbers = c.wires.flatMap((w) => [
    w.x,
    w.y,
    w.radius,
    w.relativePermeability,
    w.temperature,
    w.insulation,
  ]);
  for (const value of [...numbers, ...c.frequencies, c.tolerance, c.length ?? 1]) {
    expect(Number.isFinite(value)).toBe(true);
  }
  for (const w of c.wires) {
    expect(w.radius).toBeGreaterThan(0);
    expect(w.conductivity).toBeGreaterThan(0);
    expect(w.relativePermeability).toBeGreaterThanOrEqual(1);
  }
  for (let i = 0; i < c.wires.length; i++) {
    for (let j = 0; j < i; j++) {
      const [a, b] = [c.wires[i]!, c.wires[j]!];
      expect(Math.hypot(a.x - b.x, a.y - b.y)).toBeGreaterThan(a.radius + b.radius);
    }
  }
  for (const [k, f] of c.frequencies.entries())
    expect(f).toBeGreaterThan(k === 0 ? -1 : c.frequencies[k - 1]!);
  expect(c.frequencies.length).toBeGreaterThan(0);
  for (const loop of c.loops) {
    expect(loop.go.length).toBeGreaterThan(0);
    expect(loop.return.length).toBeGreaterThan(0);
    expect(loop.go.some((k) => loop.return.includes(k))).toBe(false);
    for (const k of [...loop.go, ...loop.return]) expect(c.wires[k]).toBeDefined();
  }
}

describe('damaged files', () => {
  it(`end in a case or in documented problems (seed ${SEED})`, async () => {
    await readCase(good[0]!, { file: 'warm-up' });
    const seen = new Map<string, number>();
    let slowest = 0;
    await fc.assert(
      fc.asyncProperty(damaged, async (text) => {
        const start = performance.now();
        const result = await readCase(text, { file: 'f.yaml' });
        slowest = Math.max(slowest, performance.now() - start);
        if (result.case !== undefined) {
          seen.set('case', (seen.get('case') ?? 0) + 1);
          checkCase(result.case);
          return;
        }
        const length = text.split(/\r\n|\n|\r/).length;
        expect(result.problems.length).toBeGreaterThan(0);
        for (const p of result.problems) {
          expect(p).toBeInstanceOf(Problem);
          expect(EXIT_STATUS[p.code]).toBe(2);
          expect(p.place?.line).toBeGreaterThanOrEqual(1);
          expect(p.place?.line).toBeLessThanOrEqual(length + 1);
          expect(p.place?.column).toBeGreaterThanOrEqual(1);
          expect(p.line()).not.toMatch(/\n/);
          if (!/undefined|NaN/.test(text)) expect(p.line()).not.toMatch(/undefined|\[object|NaN/);
          seen.set(p.code, (seen.get(p.code) ?? 0) + 1);
        }
      }),
      { seed: SEED, numRuns: RUNS, interruptAfterTimeLimit: TIME },
    );
    console.log(`seed ${SEED}, slowest ${slowest.toFixed(0)} ms:`, Object.fromEntries(seen));
    expect(slowest).toBeLessThan(TIME_OF_ONE);
    // the damage is of many kinds, or this proves little
    expect(seen.size).toBeGreaterThan(12);
    expect(seen.get('case')).toBeGreaterThan(0);
  }, 60_000);
});
