/** Solid round wires and skin depths in print (fixtures/published/skin.json), through the public functions. */
import { describe, expect, test } from 'vitest';
import {
  type RoundWire,
  skinDepth,
  solidInternalImpedance,
  solidInternalInductance,
  solidResistanceDc,
  solidSurfaceImpedance,
} from '../../src/skin/index.ts';
import { lastDigit, origin, type PrintedValue, published } from './published.ts';

const MU0 = 4e-7 * Math.PI;
const INCH = 0.0254;
const FOOT = 0.3048;
/** [S/m] 100 % IACS, which most of these tables take for copper */
const COPPER = 58e6;
const wire: RoundWire = { radius: 1e-3, conductivity: COPPER, relativePermeability: 1 };

/** [rad/s] where x = a sqrt(omega mu sigma) */
const omegaOf = (x: number) => (x / wire.radius) ** 2 / (MU0 * wire.conductivity);
const resistanceRatio = (x: number) => solidInternalImpedance(wire, omegaOf(x)).re / solidResistanceDc(wire);
const reactanceRatio = (x: number) => solidInternalImpedance(wire, omegaOf(x)).im / solidResistanceDc(wire);

/** L_int over mu/(8 pi), and its loss part (R - R_dc)/(omega mu/(8 pi)) */
function inductanceRatio(x: number): [number, number] {
  const out = new Float64Array(2);
  solidInternalInductance(wire, omegaOf(x), out);
  return [(8 * Math.PI * out[0]) / MU0, (-8 * Math.PI * out[1]) / MU0];
}

function expectUnits(got: number, { value, printed, inputs }: PrintedValue, units: number): void {
  // rounding of the comparison itself
  const allowed = units * lastDigit(printed) + 4e-16 * Math.abs(value);
  expect(Math.abs(got - value), JSON.stringify(inputs)).toBeLessThanOrEqual(allowed);
}

describe('resistance and inductance', () => {
  const table = published('skin-solid-round-table');
  test(`skin-solid-round-table: ${origin(table)}`, () => {
    let rounded = 0;
    for (const entry of table.values) {
      const x = Number(entry.inputs.x);
      const got = entry.inputs.ratio === 'R/R0' ? resistanceRatio(x) : inductanceRatio(x)[0];
      // computed by hand in 1912: 8 of 228 entries are two or three units off, which long arithmetic confirms
      expectUnits(got, entry, 3);
      if (Math.abs(got - entry.value) <= 0.5 * lastDigit(entry.printed)) rounded++;
    }
    expect(table.values.length).toBe(228);
    expect(rounded).toBe(192);
  });

  const [increment, argument] = published('neher-mcgrath-skin').values;
  test(`neher-mcgrath-skin: ${origin(published('neher-mcgrath-skin'))}`, () => {
    expectUnits(resistanceRatio(Number(increment.inputs.x)) - 1, increment, 0.5);
    // x^2 = omega mu/(pi R_dc); the paper rounds 6.78 up to 6.80
    const resistance = Number(argument.inputs.Rdc_microohm_per_ft) * (1e-6 / FOOT);
    const x = Math.sqrt((2 * Math.PI * 60 * MU0) / (Math.PI * resistance));
    expectUnits(x, argument, 2.1);
  });

  const rf = published('terman-x-per-awg');
  test(`terman-x-per-awg: ${origin(rf)}`, () => {
    const ratio = rf.values.find(({ inputs }) => String(inputs.q).startsWith('R/R0'))!;
    // AWG 10 is 101.9 mil thick; read from a table of three figures
    const x = 0.271 * 101.9 * Math.sqrt(Number(ratio.inputs.f_MHz));
    expectUnits(resistanceRatio(x), ratio, 1);
    for (const { inputs, value } of rf.values) {
      if (inputs.d_mil === undefined) continue;
      const mine = Number(inputs.d_mil) * 1e-3 * (INCH / 2) * Math.SQRT2;
      const got = mine / skinDepth(wire, 2 * Math.PI * 1e6);
      // the factor 0.271 is rounded
      expect(Math.abs(got / value - 1), String(inputs.AWG)).toBeLessThan(5e-3);
    }
  });

  const series = published('skin-low-frequency-series');
  test(`skin-low-frequency-series: ${origin(series)}`, () => {
    // f(u) = c1 + c2 u + c3 u^2, u = x^4, through three points
    const coefficients = (f: (u: number) => number) => {
      const [u, v, w] = [0.01, 0.02, 0.04];
      const first = (f(v) - f(u)) / (v - u);
      const c3 = ((f(w) - f(v)) / (w - v) - first) / (w - u);
      const c2 = first - c3 * (u + v);
      return [f(u) - c2 * u - c3 * u * u, c2];
    };
    // R/R0 - 1 = x^2/8 of the loss part
    const [r4, r8] = coefficients((u) => (inductanceRatio(u ** 0.25)[1] * Math.sqrt(u)) / 8 / u);
    const [l4, l8] = coefficients((u) => (inductanceRatio(u ** 0.25)[0] - 1) / u);
    const got = [1 / r4, -1 / r8, -1 / l4, 13 / l8];
    series.values.forEach(({ value, inputs }, k) => {
      // what the next power of u leaves, and rounding in the fourth
      expect(Math.abs(got[k] / value - 1), JSON.stringify(inputs)).toBeLessThan(k % 2 === 0 ? 1e-7 : 2e-4);
    });
  });

  const asymptotic = published('skin-high-frequency-asymptotic');
  test(`skin-high-frequency-asymptotic: ${origin(asymptotic)}, exact ratios with mpmath at 60 digits`, () => {
    for (const { inputs, value, ...more } of asymptotic.values) {
      const x = Math.SQRT2 * Number(inputs.a_over_delta);
      // 15 digits
      expect(Math.abs(resistanceRatio(x) / Number(more.exact_R_ratio) - 1)).toBeLessThan(6e-15);
      expect(Math.abs(reactanceRatio(x) / Number(more.exact_X_over_R0) - 1)).toBeLessThan(6e-15);
      // the error of the formula is printed with three figures, down to the 12 digits of its values
      const off = (formula: number, mine: number, printed: unknown) =>
        expect(Math.abs(formula / mine - 1 - Number(printed)), `${inputs.a_over_delta}`).toBeLessThan(
          6e-3 * Math.abs(Number(printed)) + 1e-11,
        );
      off(value, resistanceRatio(x), more.rel_err_R);
      off(Number(more.asymptotic_X_over_R0), reactanceRatio(x), more.rel_err_X);
    }
  });

  const iec = published('iec60287-skin-factor');
  test(`iec60287-skin-factor: ${origin(iec)}`, () => {
    for (const { inputs, value, ...more } of iec.values) {
      const exact = resistanceRatio(Number(inputs.xs)) - 1;
      expect(Math.abs(exact - Number(more.bessel_value)), `${inputs.xs}`).toBeLessThanOrEqual(5.1e-9);
      // the formula of the standard is good to 0.6 % of R (its own statement)
      expect(Math.abs((1 + value) / (1 + exact) - 1), `${inputs.xs}`).toBeLessThan(6e-3);
    }
  });

  const textbook = published('textbook-rl-memory');
  test(`textbook-rl-memory: ${origin(textbook)}`, () => {
    const [direct, skin] = textbook.values;
    expectUnits(solidResistanceDc(wire) * 1e3, direct, 1);
    const omega = 2 * Math.PI * Number(skin.inputs.f_Hz);
    const exact = solidInternalImpedance(wire, omega).re * 1e3;
    expect(Math.abs(exact / Number(skin.bessel) - 1)).toBeLessThan(1e-14);
    // printed is the formula of a thin skin, R = R_s/(2 pi a), 3.3 % below
    expectUnits((1 / (COPPER * skinDepth(wire, omega) * 2 * Math.PI * wire.radius)) * 1e3, skin, 0.6);
  });
});

describe('skin depth and surface resistance', () => {
  for (const [id, units] of [
    // two of three are cut off, not rounded, in the book
    ['skin-depth-pozar', 1],
    ['skin-depth-copper-table', 0.5],
    ['skin-depth-more-memory', 0.5],
  ] as const) {
    const group = published(id);
    test(`${id}: ${origin(group)}`, () => {
      expect(group.values.length).toBeGreaterThan(1);
      for (const entry of group.values) {
        const { sigma_S_per_m: sigma, f_Hz: f, inch } = entry.inputs;
        const metal = { conductivity: Number(sigma ?? COPPER), relativePermeability: 1 };
        const depth = skinDepth(metal, 2 * Math.PI * Number(f));
        expectUnits(inch ? depth / INCH : depth, entry, units);
      }
    });
  }

  const itt = published('itt-copper-rf-constants');
  test(`itt-copper-rf-constants: ${origin(itt)}`, () => {
    // copper of 1.724 uohm cm
    const rod: RoundWire = { radius: INCH / 2, conductivity: 1 / 1.724e-8, relativePermeability: 1 };
    const omega = 2 * Math.PI;
    const depth = skinDepth(rod, omega);
    const surface = 1 / (rod.conductivity * depth);
    const got = [
      depth * 100,
      depth / INCH,
      surface,
      (surface / (Math.PI * INCH)) * FOOT,
      solidInternalImpedance(rod, omega * 1e8).re * FOOT,
    ];
    expect(itt.values.length).toBe(got.length);
    // two of five are a unit off
    itt.values.forEach((entry, k) => {
      expectUnits(got[k], entry, 1);
    });
    // the surface resistance of a thick rod is that of a plane, and delta/(2a) more (Russell 1909: R/R_dc = a/2 delta + 1/4)
    const thick = solidSurfaceImpedance(rod, omega * 1e12).re / (surface * 1e6) - 1;
    expect(thick / (depth / 1e6 / (2 * rod.radius))).toBeCloseTo(1, 5);
  });
});
