// Builds dist/: the library by tsc (ES modules and declarations, the tree mirrors the source), and the command as one
// bundle with lazy chunks, because finding and reading hundreds of small modules would take longer than the job.
// Builds beside and swaps the folders at the end, so that nobody meets half a build. `--if-stale` leaves a build alone
// that was made of the same files.
import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  chmodSync,
  copyFileSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { rolldown } from 'rolldown';

const root = fileURLToPath(new URL('..', import.meta.url));
const dist = join(root, 'dist');
const stamp = join(dist, '.made-of');

/** Hash of all that a build depends on. */
function origin() {
  const hash = createHash('sha256');
  const sources = readdirSync(join(root, 'src'), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name));
  const others = [
    'package.json',
    'package-lock.json',
    'tsconfig.json',
    'scripts/tsconfig.build.json',
    'scripts/build.mjs',
  ];
  for (const file of [...sources.sort(), ...others.map((name) => join(root, name))]) {
    hash.update(file).update('\0').update(readFileSync(file)).update('\0');
  }
  return hash.digest('hex');
}

async function bundleCommand(folder) {
  const bundle = await rolldown({
    input: { bin: join(root, 'src/cli/bin.ts'), 'solve-worker': join(root, 'src/cli/solve-worker.ts') },
    platform: 'node',
    logLevel: 'warn',
  });
  await bundle.write({
    dir: join(folder, 'cli'),
    format: 'esm',
    minify: true,
    entryFileNames: '[name].js',
    chunkFileNames: '[name]-[hash].js',
  });
  await bundle.close();
  chmodSync(join(folder, 'cli/bin.js'), 0o755);
}

/** What users and tests enter by: a build without one of them is none. */
const ENTRIES = ['index.js', 'index.d.ts', 'cli/bin.js', 'cli/solve-worker.js', 'input/case.schema.json'];

function isFresh(madeOf) {
  const whole = [stamp, ...ENTRIES.map((name) => join(dist, name))].every((file) => existsSync(file));
  return whole && readFileSync(stamp, 'utf8') === madeOf;
}

/** [1] tries to swap while another build does the same */
const SWAPS = 20;

/** Puts the new build in the place of the old one, which comes back where that fails. */
async function swapIn(beside, old) {
  for (let attempt = 1; ; attempt++) {
    try {
      if (existsSync(dist)) renameSync(dist, old);
      try {
        renameSync(beside, dist);
      } catch (error) {
        if (existsSync(old) && !existsSync(dist)) renameSync(old, dist);
        throw error;
      }
      return;
    } catch (error) {
      // another build took the old one away, or put its own there, between two steps
      const another = ['ENOENT', 'ENOTEMPTY', 'EEXIST'].includes(error.code) && existsSync(beside);
      if (!another || attempt === SWAPS) throw error;
      rmSync(old, { recursive: true, force: true });
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }
}

const madeOf = origin();
if (!(process.argv.includes('--if-stale') && isFresh(madeOf))) {
  const beside = join(root, 'node_modules', `.build-${process.pid}`);
  const old = `${beside}-old`;
  try {
    mkdirSync(beside, { recursive: true });
    const tsc = createRequire(import.meta.url).resolve('typescript/bin/tsc');
    // types are checked by scripts/check; a build only turns them into declarations
    const options = ['-p', join(root, 'scripts/tsconfig.build.json'), '--outDir', beside, '--noCheck'];
    execFileSync(process.execPath, [tsc, ...options], { stdio: 'inherit' });
    copyFileSync(join(root, 'src/input/case.schema.json'), join(beside, 'input/case.schema.json'));
    await bundleCommand(beside);
    writeFileSync(join(beside, '.made-of'), madeOf);
    await swapIn(beside, old);
  } catch (error) {
    // tsc has said what is wrong; anything else has not
    if (error.status === undefined) process.stderr.write(`${error.stack}\n`);
    process.stderr.write('the build failed; dist/ is as it was\n');
    process.exitCode = 1;
  } finally {
    for (const folder of [beside, old]) rmSync(folder, { recursive: true, force: true });
  }
}
