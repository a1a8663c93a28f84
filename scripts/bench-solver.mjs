// Accuracy and work of the solver: distance from finite elements, true over stated error on random layouts, a bundle of
// 37 wires, and the command as a whole process as a ratio to `node -e 0`. Needs a fresh build (npm run build).
//   node scripts/bench-solver.mjs           prints the figures
//   node scripts/bench-solver.mjs --write   records them in fixtures/solver/ledger.json, which test/loops holds
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { rolldown } from 'rolldown';

const path = (name) => fileURLToPath(new URL(`../${name}`, import.meta.url));

/** The measuring module of the tests as plain JavaScript, where it may import. */
async function measuring(folder) {
  const bundle = await rolldown({
    input: path('test/loops/measure.ts'),
    platform: 'node',
    external: [/^[^./]/],
    logLevel: 'silent',
    // it reads fixtures beside itself
    transform: {
      define: { 'import.meta.url': JSON.stringify(pathToFileURL(path('test/loops/measure.ts')).href) },
    },
  });
  const file = join(folder, 'measure.mjs');
  await bundle.write({ file, format: 'esm' });
  await bundle.close();
  return import(pathToFileURL(file).href);
}

const RUNS = 9;
const median = (values) => values.toSorted((a, b) => a - b)[values.length >> 1];
const PAIR = ['table', '--diameter', '1 mm', '--spacing', '3 mm'];

function seconds(args) {
  const start = performance.now();
  const { status, stderr } = spawnSync(process.execPath, args, { encoding: 'utf8' });
  if (status !== 0) throw new Error(`node ${args.join(' ')}: status ${status}: ${stderr}`);
  return (performance.now() - start) / 1000;
}

/** The table of a pair and `node -e 0`, in turns. */
function measureProcess() {
  const [own, bare] = [[], []];
  for (let run = 0; run < RUNS; run++) {
    own.push(seconds([path('dist/cli/bin.js'), ...PAIR]));
    bare.push(seconds(['-e', '0']));
  }
  return { own: median(own), bare: median(bare) };
}

const short = (value) => Number(value.toPrecision(3));
const folder = mkdtempSync(path('node_modules/.bench-'));
try {
  const measure = await measuring(folder);
  const fem = measure.measureFem();
  for (const [name, { error, ofAllowed }] of Object.entries(fem)) {
    console.log(
      `${name.padEnd(4)} from finite elements: ${error.toExponential(2)}, ${ofAllowed.toFixed(2)} of bar and stated error`,
    );
  }
  const random = measure.measureHonesty();
  console.log(`${measure.LAYOUTS} random layouts, seed ${measure.LAYOUTS_SEED}:`);
  console.log(`  largest error at tolerance 1e-8: ${random.largest.toExponential(2)} (wanted: 1e-8)`);
  console.log(`  worst true over stated error: ${random.ratio.toFixed(3)} (wanted: 1), ${random.worst}`);
  const hexagon = measure.measureHexagon();
  const { own, bare } = measureProcess();
  console.log(
    `37 wires, 61 points: ${hexagon.seconds.toFixed(1)} s (wanted: 8), ${(hexagon.seconds / bare).toFixed(0)} x node -e 0, ` +
      `${hexagon.products} products, orders to ${hexagon.highestOrder}, stated ${hexagon.stated.toExponential(1)}`,
  );
  console.log(
    `pair, 61 points, whole process: ${own.toFixed(2)} s (wanted: 0.5), ${(own / bare).toFixed(1)} x node -e 0 (wanted: 8)`,
  );
  if (process.argv.includes('--write')) {
    const ledger = {
      about:
        'Measured by scripts/bench-solver.mjs; fem: worst relative distance of R and L from finite elements',
      fem: Object.fromEntries(
        Object.entries(fem).map(([name, { error }]) => [name, { error: short(error) }]),
      ),
      random: { ratio: short(random.ratio), largest: short(random.largest) },
      hexagon: { products: hexagon.products, highestOrder: hexagon.highestOrder },
      pair: { ratio: short(own / bare) },
    };
    writeFileSync(path('fixtures/solver/ledger.json'), `${JSON.stringify(ledger, null, 2)}\n`);
  }
} finally {
  rmSync(folder, { recursive: true, force: true });
}
