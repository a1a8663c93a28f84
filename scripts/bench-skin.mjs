// Internal impedance of a solid wire at a million frequencies, one thread: solidInternalImpedances of a fresh build against
// the general-purpose routine of scipy, k/(2 pi a sigma) ive(0, q)/ive(1, q) on complex doubles. Same points, same run, in
// turns; prints the points a second of either (median), the ratio, and how far the results lie apart.
// Needs `npm run build` and Debian's python3-scipy (PYTHON names another interpreter). `--write` records the ratios in
// fixtures/bessel/speed.json; test/skin/batch-speed.test.ts holds the one that needs no scipy.
import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { solidInternalImpedances } from '../dist/skin/index.js';
import { frequencies, median, ratioToExponentials, SEED, wire } from './batch-speed.mjs';

const POINTS = 1_000_000;
const ROUNDS = 5;
// the bar: as many points a second as scipy, times this
const WANTED = 2;
const BANDS = [
  [1e-3, 1e4],
  [0.5, 50],
];

const PEER = `
import sys, time
import numpy as np
from scipy.special import ive
a, sigma, mu = ${wire.radius}, ${wire.conductivity}, 4e-7 * np.pi
for line in sys.stdin:
    path = line.strip()
    w = np.fromfile(path)
    start = time.perf_counter()
    k = np.sqrt(1j * w * mu * sigma)
    q = k * a
    z = k / (2 * np.pi * a * sigma) * (ive(0, q) / ive(1, q))
    seconds = time.perf_counter() - start
    z.tofile(path + '.z')
    print(seconds, flush=True)
`;

const folder = mkdtempSync(join(tmpdir(), 'rimflow-bench-'));
const peer = spawn(process.env.PYTHON ?? '/usr/bin/python3', ['-c', PEER], {
  stdio: ['pipe', 'pipe', 'inherit'],
  env: { ...process.env, OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1' },
});
// an interpreter that is missing or has no scipy is told below, once
peer.on('error', () => {});
peer.stdin.on('error', () => {});
const answers = createInterface({ input: peer.stdout })[Symbol.asyncIterator]();

async function peerSeconds(path) {
  peer.stdin.write(`${path}\n`);
  const { value, done } = await answers.next();
  if (!done) return Number(value);
  console.error('scipy gave no answer: apt-get install python3-scipy, or name an interpreter in PYTHON');
  rmSync(folder, { recursive: true, force: true });
  process.exit(1);
}

try {
  const recorded = {};
  console.log(`seed ${SEED}, ${POINTS} points, ${ROUNDS} rounds in turns, Node ${process.version}`);
  for (const [from, to] of BANDS) {
    const omega = frequencies(from, to, POINTS);
    const path = join(folder, 'omega');
    writeFileSync(path, omega);
    const [re, im] = [new Float64Array(POINTS), new Float64Array(POINTS)];
    const [own, other] = [[], []];
    for (let round = 0; round < ROUNDS; round++) {
      const start = performance.now();
      solidInternalImpedances(wire, omega, re, im);
      own.push((performance.now() - start) / 1000);
      other.push(await peerSeconds(path));
    }
    const bytes = readFileSync(`${path}.z`);
    const theirs = new Float64Array(bytes.buffer, bytes.byteOffset, 2 * POINTS);
    let apart = 0;
    for (let i = 0; i < POINTS; i++) {
      apart = Math.max(apart, Math.abs(re[i] / theirs[2 * i] - 1), Math.abs(im[i] / theirs[2 * i + 1] - 1));
    }
    const ratio = median(other) / median(own);
    const rate = (seconds) => (POINTS / seconds).toExponential(2);
    console.log(
      `a/delta ${from} .. ${to}: ${rate(median(own))} points/s, scipy ${rate(median(other))} points/s`,
    );
    console.log(
      `  first round ${rate(own[0])}, best ${rate(Math.min(...own))}; parts differ by up to ${apart.toExponential(1)}`,
    );
    console.log(`  ratio ${ratio.toFixed(1)} (wanted: ${WANTED})${ratio >= WANTED ? '' : '  NOT REACHED'}`);
    if (ratio < WANTED) process.exitCode = 1;
    recorded[`scipy's time over ours, a/delta ${from} .. ${to}`] = Number(ratio.toPrecision(2));
  }
  const exponentials = Number(ratioToExponentials(solidInternalImpedances).toPrecision(2));
  console.log(`an impedance takes the time of ${exponentials} exponentials`);
  if (process.argv.includes('--write')) {
    const ledger = new URL('../fixtures/bessel/speed.json', import.meta.url);
    writeFileSync(ledger, `${JSON.stringify({ ...recorded, exponentials }, null, 2)}\n`);
  }
} finally {
  peer.stdin.end();
  rmSync(folder, { recursive: true, force: true });
}
