// Fits the loops of fixtures/fit/cases.json from a fresh build in dist/: sections that 1 % and 0.1 % need, worst errors by
// number of sections, how far unseen frequencies lie above fitted ones, and the time of a fit against that of its table.
// `--write` records the figures in fixtures/fit/ledger.json, which test/fit/ledger.test.ts holds.
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { fitFrequencies, fitSections } from '../dist/fit/index.js';
import { frequencyTable } from '../dist/sweep/index.js';

const folder = fileURLToPath(new URL('../fixtures/fit/', import.meta.url));
const { cases } = JSON.parse(readFileSync(`${folder}cases.json`, 'utf8'));
const SIZES = [1, 2, 3, 4, 5, 6, 7, 8];
const WITHIN = [0.01, 0.005, 0.001];

function caseOf(stored, frequencies) {
  const wires = stored.wires.map(([x, y, radius, conductivity, relativePermeability], i) => ({
    name: `w${i}`,
    x,
    y,
    radius,
    conductivity: conductivity ?? Infinity,
    relativePermeability,
    material: 'test',
    temperature: 20,
    insulation: 0,
  }));
  const loop = {
    name: 'loop',
    go: stored.go,
    return: stored.return,
    series: stored.series ?? false,
    extra: { resistance: 0, inductance: 0 },
  };
  const rest = { title: stored.name, length: 1, bonded: [], tolerance: 1e-8, cautions: [] };
  return { ...rest, wires, loops: [loop], frequencies };
}

const timed = async (action) => {
  const start = performance.now();
  const value = await action();
  return [value, performance.now() - start];
};
const worst = ({ errors }) => Math.max(errors.resistance, errors.inductance);

const ledger = [];
for (const stored of cases) {
  const { frequency } = fitFrequencies(stored.from, stored.to);
  const [table, tableTime] = await timed(() => frequencyTable(caseOf(stored, Array.from(frequency))));
  const samples = { frequency, ...table.loops[0] };
  fitSections(samples, { within: 0.01 });
  console.log(`\n${stored.name}: ${stored.from} Hz to ${stored.to} Hz, ${frequency.length} frequencies`);
  const sections = {};
  for (const within of WITHIN) {
    const [model, time] = await timed(() => fitSections(samples, { within }));
    sections[within] = model.sections.length;
    const share = `${time.toFixed(0)} ms, ${(time / tableTime).toFixed(3)} of the table's time`;
    console.log(
      `  within ${within}: ${model.sections.length} sections (${worst(model).toExponential(2)}), ${share}`,
    );
  }
  const models = SIZES.map((n) => fitSections(samples, { sections: n }));
  const errors = models.map((model) => Number(worst(model).toPrecision(4)));
  const unseen = models.map((m) => m.unseenErrors.resistance / m.fittedErrors.resistance);
  console.log(`  worst error with 1, 2, ... sections: ${errors.map((e) => e.toExponential(2)).join(' ')}`);
  console.log(`  R at unseen over R at fitted frequencies: ${unseen.map((u) => u.toFixed(2)).join(' ')}`);
  ledger.push({ name: stored.name, sections, errors });
}

if (process.argv.includes('--write')) {
  const about =
    'Measured by scripts/bench-fit.mjs: fewest sections by wanted error; worst error with 1, 2, ... sections';
  const lines = ledger.map((entry) => `    ${JSON.stringify(entry)}`).join(',\n');
  writeFileSync(`${folder}ledger.json`, `{\n  "about": "${about}",\n  "fits": [\n${lines}\n  ]\n}\n`);
}
