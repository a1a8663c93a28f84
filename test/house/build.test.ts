/** scripts/build.mjs in a copy of the tree: what it leaves when nothing is stale, when it fails, and when two run at once. */
import { execFile } from 'node:child_process';
import {
  copyFileSync,
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));
let tree: string;
beforeAll(() => {
  tree = mkdtempSync(join(tmpdir(), 'rimflow-build-'));
  for (const name of ['package.json', 'package-lock.json', 'tsconfig.json']) {
    copyFileSync(join(root, name), join(tree, name));
  }
  for (const name of ['src', 'scripts']) cpSync(join(root, name), join(tree, name), { recursive: true });
  // a folder of its own for what a build keeps beside, the packages behind links
  mkdirSync(join(tree, 'node_modules'));
  for (const name of readdirSync(join(root, 'node_modules'))) {
    if (name.startsWith('.')) continue;
    symlinkSync(join(root, 'node_modules', name), join(tree, 'node_modules', name));
  }
});
afterAll(() => rmSync(tree, { recursive: true }));

function build(...args: string[]): Promise<{ status: number; err: string }> {
  return new Promise((resolve) => {
    execFile(process.execPath, ['scripts/build.mjs', ...args], { cwd: tree }, (error, _out, err) =>
      resolve({ status: error === null ? 0 : Number(error.code), err }),
    );
  });
}

const dist = (name = '') => join(tree, 'dist', name);
const madeAt = () => statSync(dist('.made-of')).mtimeMs;
const beside = () => readdirSync(join(tree, 'node_modules')).filter((name) => name.startsWith('.build'));
const works = () =>
  new Promise((resolve) => {
    execFile(process.execPath, [dist('cli/bin.js'), 'list', 'materials'], (error, out) =>
      resolve(error === null && out.includes('copper')),
    );
  });

describe('a build', () => {
  it('two at once leave one whole build and nothing beside', async () => {
    expect(await Promise.all([build(), build()])).toEqual([
      { status: 0, err: '' },
      { status: 0, err: '' },
    ]);
    expect(await works()).toBe(true);
    expect(beside()).toEqual([]);
  });
  it('--if-stale leaves a build alone, unless a file of it or behind it has changed', async () => {
    const first = madeAt();
    await build('--if-stale');
    expect(madeAt()).toBe(first);
    rmSync(dist('cli/bin.js'));
    await build('--if-stale');
    expect(await works()).toBe(true);
    const second = madeAt();
    expect(second).toBeGreaterThan(first);
    writeFileSync(
      join(tree, 'src/version.ts'),
      `${readFileSync(join(tree, 'src/version.ts'), 'utf8')}\n// changed\n`,
    );
    await build('--if-stale');
    expect(madeAt()).toBeGreaterThan(second);
  });
  it('that fails says so and leaves the old one as it was', async () => {
    const before = madeAt();
    const file = join(tree, 'src/cli/bin.ts');
    const text = readFileSync(file, 'utf8');
    writeFileSync(file, "import { nothing } from './not-there.ts';\nnothing();\n");
    const { status, err } = await build();
    expect([status, err.includes('the build failed; dist/ is as it was')]).toEqual([1, true]);
    expect(madeAt()).toBe(before);
    expect(await works()).toBe(true);
    expect(beside()).toEqual([]);
    writeFileSync(file, text);
  });
  it('recovers from one that was killed between its steps', async () => {
    rmSync(dist(), { recursive: true });
    mkdirSync(join(tree, 'node_modules/.build-1'));
    expect((await build('--if-stale')).status).toBe(0);
    expect(existsSync(dist('index.d.ts'))).toBe(true);
    expect(await works()).toBe(true);
  });
});
