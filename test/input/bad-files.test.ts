/** Each file of fixtures/input/bad says at its end which problems it must give: place, code and words. */
import { readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { EXIT_STATUS } from '../../src/problem.ts';
import { fixture, lines, problemsOf } from './helpers.ts';

const names = readdirSync(new URL('../../fixtures/input/bad', import.meta.url)).filter((n) =>
  n.endsWith('.yaml'),
);

const seen = new Set<string>();

describe('bad files: all problems at once, in the order of the file', () => {
  it.each(names)('%s', async (name) => {
    const text = fixture(`bad/${name}`);
    const expected = Array.from(text.matchAll(/^# expect (\d+:\d+ .*)$/gm), (match) => match[1]!);
    expect(expected.length).toBeGreaterThan(0);
    const problems = await problemsOf(text);
    for (const p of problems) seen.add(p.code);
    const found = lines(problems);
    // the expectation is the beginning of the line: the advice behind it may be reworded
    expect(found.map((line, k) => line.slice(0, expected[k]?.length))).toEqual(expected);
  });

  it('covers the codes that a file can lead to', () => {
    const ofFiles = Object.keys(EXIT_STATUS).filter(
      (code) =>
        EXIT_STATUS[code as keyof typeof EXIT_STATUS] === 2 &&
        // of the command line and of library calls; NOT_TEXT and FORMAT_VERSION are tested from text
        !['USAGE', 'DOMAIN', 'NO_LENGTH', 'NOT_TEXT', 'FORMAT_VERSION'].includes(code),
    );
    expect(Array.from(seen).sort()).toEqual(ofFiles.sort());
  });
});
