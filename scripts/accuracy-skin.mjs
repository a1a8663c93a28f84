// Errors of the functions of src/skin against the 40-digit fixtures of fixtures/bessel, worst and RMS by function and
// band of |z|, for orders 0 and 1 and above apart. Needs a fresh build (npm run build).
//   node scripts/accuracy-skin.mjs           prints the table
//   node scripts/accuracy-skin.mjs --write   records it in fixtures/bessel/accuracy.json, which a test holds
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const folder = fileURLToPath(new URL('../fixtures/bessel/', import.meta.url));

export const readRows = (name) => JSON.parse(readFileSync(`${folder}${name}`, 'utf8')).rows;

/** Relative error of one part; a part that is zero must be met exactly. */
function partError(got, wanted) {
  if (wanted === 0) return got === 0 ? 0 : Infinity;
  return Math.abs(got / wanted - 1);
}

/** The larger error of both parts; `got` = (re + j im) 2^exponent, `wanted` = [re, im, exponent]. */
function error(re, im, exponent, wanted) {
  const scale = 2 ** (exponent - wanted[2]);
  return Math.max(partError(re * scale, Number(wanted[0])), partError(im * scale, Number(wanted[1])));
}

/** Error of the complex number, for results whose part goes through zero. */
function modulusError(re, im, [wantedRe, wantedIm, exponent]) {
  const scale = 2 ** -exponent;
  const [a, b] = [Number(wantedRe), Number(wantedIm)];
  return Math.hypot(re * scale - a, im * scale - b) / Math.hypot(a, b);
}

/** True where both parts are normal doubles. */
function isNormal([re, im, exponent]) {
  const sizes = [re, im].map((part) => Math.abs(Number(part))).filter((size) => size > 0);
  return sizes.every((size) => Math.log2(size) + exponent > -1020 && Math.log2(size) + exponent < 1020);
}

/** Collects worst and RMS errors under keys. */
class Collector {
  entries = {};

  add(name, band, order, value) {
    const key = `${name} | ${band} | ${order < 2 ? 'n = 0, 1' : 'n >= 2'}`;
    this.entries[key] ??= { worst: 0, squares: 0, count: 0 };
    const entry = this.entries[key];
    entry.worst = Math.max(entry.worst, value);
    entry.squares += value * value;
    entry.count++;
  }

  summary() {
    return Object.fromEntries(
      Object.entries(this.entries).map(([key, { worst, squares, count }]) => [
        key,
        {
          worst: Number(worst.toPrecision(3)),
          rms: Number(Math.sqrt(squares / count).toPrecision(3)),
          count,
        },
      ]),
    );
  }
}

function measureFan(api, collector) {
  for (const { band, degrees, re, im, scaled, plain } of readRows('fan.json')) {
    const z = { re, im };
    const where = `|z| ${band}, ${degrees === 45 ? '45 degrees' : 'fan'}`;
    for (const [n, i, k] of scaled) {
      const gotI = api.besselIBinary(n, z);
      collector.add('e^-z I_n', where, n, error(gotI.value.re, gotI.value.im, gotI.exponent, i));
      const gotK = api.besselKBinary(n, z);
      collector.add('e^z K_n', where, n, error(gotK.value.re, gotK.value.im, gotK.exponent, k));
      if (isNormal(i)) {
        const value = api.besselIScaled(n, z);
        collector.add('e^-z I_n', where, n, error(value.re, value.im, 0, i));
      }
      if (isNormal(k)) {
        const value = api.besselKScaled(n, z);
        collector.add('e^z K_n', where, n, error(value.re, value.im, 0, k));
      }
    }
    for (const [n, i, k] of plain) {
      if (isNormal(i)) {
        const value = api.besselI(n, z);
        collector.add('I_n', where, n, error(value.re, value.im, 0, i));
      }
      if (isNormal(k)) {
        const value = api.besselK(n, z);
        collector.add('K_n', where, n, error(value.re, value.im, 0, k));
      }
    }
  }
  for (const { band, degrees, re, im, g } of readRows('fan-reflections.json')) {
    const where = `|z| ${band}, ${degrees === 45 ? '45 degrees' : 'fan'}`;
    for (const [n, one, fifty] of g) {
      const plain = api.reflectionOf(n, { re, im }, 1);
      collector.add('G_n, mu_r 1', where, n, error(plain.re, plain.im, 0, one));
      const magnetic = api.reflectionOf(n, { re, im }, 50);
      collector.add('G_n, mu_r 50', where, n, error(magnetic.re, magnetic.im, 0, fifty));
    }
  }
}

function bandOf(t) {
  const edges = [1e-12, 1e-6, 1e-2, 4, 100, 1936, 1e6, 1e10];
  const names = ['1e-6', '1e-3', '0.1', '2', '10', '44', '1e3', '1e5'];
  const k = edges.findIndex((edge) => t < edge);
  return `|q| ${k < 0 ? 'above 1e5' : `below ${names[k]}`}`;
}

function measureRay(api, collector) {
  const out = new Float64Array(2);
  const [re, im] = [new Float64Array(1500), new Float64Array(1500)];
  for (const { t, r, z, l } of readRows('ray.json')) {
    const band = bandOf(t);
    for (const [n, wanted] of r) {
      api.rayRatio(n, t, out);
      collector.add('r_n, plain double', band, n, error(out[0], out[1], 0, wanted));
    }
    for (const orders of [3, 60, 1500]) {
      for (const [mu, column] of [
        [1, 2],
        [300, 3],
      ]) {
        api.rayReflections(t, mu, orders, re, im);
        for (const row of r.filter(([n]) => n >= 1 && n <= orders)) {
          const [n, wanted] = [row[0], row[column]];
          const value =
            mu === 1 ? error(re[n - 1], im[n - 1], 0, wanted) : modulusError(re[n - 1], im[n - 1], wanted);
          collector.add(`G_n, plain double, mu_r ${mu}${mu === 1 ? '' : ', modulus'}`, band, n, value);
        }
      }
    }
    api.rayRatio(2, t, out);
    const norm = (4 + out[0]) ** 2 + out[1] ** 2;
    const inductance = [(4 * (4 + out[0])) / norm, (-4 * out[1]) / norm];
    collector.add('L_int', band, 0, error(inductance[0], inductance[1], 0, l));
    const [a, b] = [new Float64Array(1), new Float64Array(1)];
    api.internalImpedanceRatios(Float64Array.of(t), a, b);
    collector.add('Z_int/R_dc, many points', band, 0, error(a[0], b[0], 0, z));
  }
}

/** Table of worst and RMS errors: key -> { worst, rms, count }. */
export function measureAccuracy(api) {
  const collector = new Collector();
  measureFan(api, collector);
  measureRay(api, collector);
  return collector.summary();
}

async function main() {
  const load = (file) => import(new URL(`../dist/skin/${file}`, import.meta.url).href);
  const [functions, ray, reflections, pieces, edge, dd] = await Promise.all(
    [
      'bessel/functions.js',
      'bessel/ray-ratios.js',
      'reflections.js',
      'impedance-pieces.js',
      'solid-edge.js',
      'dd/index.js',
    ].map(load),
  );
  const table = measureAccuracy({
    ...functions,
    ...ray,
    ...reflections,
    ...pieces,
    reflectionOf: (n, z, mu) => edge.reflectionAt(n, dd.dc(z.re, z.im), mu),
  });
  const width = Math.max(...Object.keys(table).map((key) => key.length));
  for (const [key, { worst, rms, count }] of Object.entries(table)) {
    console.log(
      `${key.padEnd(width)}  worst ${worst.toExponential(1)}  rms ${rms.toExponential(1)}  (${count})`,
    );
  }
  if (process.argv.includes('--write')) {
    writeFileSync(`${folder}accuracy.json`, `${JSON.stringify(table, null, 1)}\n`);
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await main();
