/** The documents are true: README examples print what they say, links lead somewhere, the demo leaves what it names. */
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { refresh } from '../../scripts/readme.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));
const read = (name: string) => readFileSync(join(root, name), 'utf8');

const NUMBER = /-?\d+(?:\.\d+)?(?:e[+-]?\d+)?/g;

describe('README.md', () => {
  it('shows the real output of its examples (else run node scripts/readme.mjs)', () => {
    const written = read('README.md');
    const real = refresh(written);
    expect(real.replace(NUMBER, '#')).toBe(written.replace(NUMBER, '#'));
    // the last of 16 digits may differ from machine to machine (Math.exp and its like)
    const numbers = (text: string) => [...text.matchAll(NUMBER)].map(([number]) => Number(number));
    const shown = numbers(written);
    numbers(real).forEach((value, i) => {
      expect(Math.abs(value - shown[i])).toBeLessThanOrEqual(1e-7 * Math.abs(value));
    });
    expect(written.match(/```console\n\$ rimflow [^\n]*\n[^`\n]/g)?.length).toBeGreaterThan(5);
  });
  it('names every exit status', () => {
    for (const status of [0, 1, 2, 3, 70, 74, 130])
      expect(read('README.md')).toMatch(new RegExp(`^\\| ${status} \\|`, 'm'));
  });
});

describe('links', () => {
  it.each(['README.md', 'DEVELOPERS.md', 'fixtures/README.md', 'fixtures/fit/README.md'])(
    'of %s lead somewhere',
    (name) => {
      for (const [, target] of read(name).matchAll(/\]\(([^)#]+)\)/g)) {
        expect([target, existsSync(join(root, dirname(name), target))]).toEqual([target, true]);
      }
    },
  );
  it('files that DEVELOPERS.md names are there', () => {
    for (const [, path] of read('DEVELOPERS.md').matchAll(/`((?:src|scripts|test|fixtures)\/[\w./-]+)`/g)) {
      expect([path, existsSync(join(root, path))]).toEqual([path, true]);
    }
  });
});

describe('scripts/demo', () => {
  it('leaves tables and a netlist under out/ and says what they mean', () => {
    const { status, stdout, stderr } = spawnSync('sh', ['scripts/demo'], { cwd: root, encoding: 'utf8' });
    expect([status, stderr]).toEqual([0, '']);
    expect(stdout).toMatch(/What the numbers mean/);
    expect(stdout).not.toMatch(/NaN|undefined|Infinity/);
    for (const name of [
      'pump.csv',
      'pump.json',
      'pump-run.md',
      'pump.cir',
      'lamps.csv',
      'lamps.md',
      'lamps.json',
    ]) {
      expect(stdout).toContain(name.startsWith('lamps') ? 'lamps.csv .md .json' : name);
      expect(statSync(join(root, 'out', name)).size).toBeGreaterThan(100);
    }
  });
});
