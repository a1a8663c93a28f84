/** The package as users get it: version, entry points, command, no side effects, what a fresh machine installs. */
import { execFileSync } from 'node:child_process';
import { readdirSync, readFileSync, statSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { VERSION } from '../../src/version.ts';

const root = new URL('../..', import.meta.url);
const pack = JSON.parse(readFileSync(new URL('package.json', root), 'utf8'));

function node(...args: string[]): string {
  return execFileSync(process.execPath, args, { cwd: root, encoding: 'utf8' });
}

describe('package', () => {
  it('states one version everywhere', () => {
    expect(VERSION).toBe(pack.version);
    expect(node(pack.bin.rimflow, '--version')).toBe(`${pack.version}\n`);
  });

  it('is MIT, an ES module, for Node 20.19 and later', () => {
    expect([pack.license, pack.type, pack.engines.node]).toEqual(['MIT', 'module', '>=20.19']);
  });

  it('pins what it depends on', () => {
    for (const version of Object.values({ ...pack.dependencies, ...pack.devDependencies })) {
      expect(version).toMatch(/^\d+\.\d+\.\d+$/);
    }
  });

  it('depends on all that its library imports', () => {
    // the command is bundled; the imports of the tree beside it are left
    const files = readdirSync(new URL('dist', root), { recursive: true, encoding: 'utf8' });
    const imported = files
      .filter((file) => file.endsWith('.js') && !file.startsWith('cli'))
      .map((file) => readFileSync(new URL(`dist/${file}`, root), 'utf8'))
      .flatMap((text) =>
        [...text.matchAll(/^(?:import|export|\}).* from '([^'.][^']*)'/gm)].map(([, name]) => name),
      );
    expect(imported).toContain('zod');
    for (const name of imported) expect(Object.keys(pack.dependencies)).toContain(name);
  });

  it('is imported by its own name, types beside, nothing printed', () => {
    const names = node(
      '--input-type=module',
      '-e',
      "console.log(Object.keys(await import('rimflow')).join(' '))",
    ).trim();
    expect(names.split(' ')).toEqual(
      expect.arrayContaining([
        'readCase',
        'caseFromData',
        'frequencyTable',
        'fitSections',
        'tableText',
        'netlistText',
      ]),
    );
    expect(statSync(new URL(pack.exports['.'].types, root)).isFile()).toBe(true);
    expect(JSON.parse(readFileSync(new URL(pack.exports['./schema.json'], root), 'utf8')).title).toMatch(
      /rimflow/,
    );
  });

  it('has a command that can be started by itself', () => {
    expect(statSync(new URL(pack.bin.rimflow, root)).mode & 0o111).not.toBe(0);
    expect(readFileSync(new URL(pack.bin.rimflow, root), 'utf8')).toMatch(/^#!\/usr\/bin\/env node\n/);
  });
});
