/**
 * The field in and at a solid wire for the library user: complex.js objects, one point a call. Inside, each harmonic goes
 * like I_n(kr), with k a = sqrt(jT) on the ray of 45 degrees. 31 digits inside: each part of each result is accurate to
 * about 1e-15, also the part of a magnetic wire's reflection that goes through zero.
 */
import { Complex } from 'complex.js';
import { Problem } from '../problem.ts';
import { MAX_MODULUS, MAX_ORDER } from './bessel/argument.ts';
import { scaledBesselI } from './bessel/i.ts';
import { scaledBesselRatio } from './bessel/i-ratio.ts';
import { onRayOfSquare } from './bessel/ray.ts';
import {
  type DdComplex,
  dc,
  dcAdd,
  dcExp,
  dcScale,
  dcSubtract,
  dcTimes,
  dd,
  ddDivide,
  scaled,
  scaledDivide,
  scaledMultiply,
  scaledToComplex,
  scaledToDd,
} from './dd/index.ts';
import { type RoundWire, squaredArgument } from './round-wire.ts';
import { solidInternalInductance, solidResistanceDc } from './solid.ts';

/**
 * Z_int [ohm/m], internal impedance: E_z at the surface over the net current.
 * @param omega [rad/s] >= 0
 * @throws Problem DOMAIN as `solidInternalInductance`
 */
export function solidInternalImpedance(wire: RoundWire, omega: number): Complex {
  const inductance = new Float64Array(2);
  solidInternalInductance(wire, omega, inductance);
  return new Complex(solidResistanceDc(wire) - omega * inductance[1]!, omega * inductance[0]!);
}

/**
 * [ohm] E_z / H at the surface of a wire that carries a net current, Z_int 2 pi a; for a thin skin (1 + j)/(sigma delta).
 * @param omega [rad/s] >= 0
 * @throws Problem DOMAIN as `solidInternalInductance`
 */
export function solidSurfaceImpedance(wire: RoundWire, omega: number): Complex {
  return solidInternalImpedance(wire, omega).mul(2 * Math.PI * wire.radius);
}

/**
 * G_n [1] of one order, as `solidReflections`, but each part accurate at any permeability.
 * @param omega [rad/s] >= 0
 * @param n [1] order, whole, >= 1
 * @throws Problem DOMAIN as `squaredArgument`, for a wrong order, and for |q| = |ka| above 1e9
 */
export function solidReflection(wire: RoundWire, omega: number, n: number): Complex {
  const q = rayArgument('solidReflection', wire, omega, n, 1);
  const mu = wire.relativePermeability;
  if (q === 'perfect') return new Complex(1, 0);
  if (q === 'static') return new Complex((1 - mu) / (1 + mu), 0);
  return reflectionAt(n, q, mu);
}

/** G_n = (n + r_n - n mu_r) / (n + r_n + n mu_r), r_n = q I_{n+1}(q) / I_n(q), for any q of the right half plane. */
export function reflectionAt(n: number, q: DdComplex, relativePermeability: number): Complex {
  const r = scaledToDd(scaledBesselRatio(n, q));
  const response = dcAdd(r, dc(n, 0));
  const matched = dcTimes(dc(n, 0), relativePermeability);
  // n - n mu_r first: exact for mu_r = 1, so that a small r_n is not lost in n
  const above = dcAdd(r, dcSubtract(dc(n, 0), matched));
  const result = scaledToComplex(scaledDivide(scaled(above), scaled(dcAdd(response, matched))));
  // q^2 real: so is G_n, what is left is rounding
  return q.re.hi === 0 || q.im.hi === 0 ? new Complex(result.re, 0) : result;
}

/**
 * F_n(r) / F_n(a) = I_n(kr) / I_n(ka) [1]: the harmonic n of E_z (n = 0) or of A (n >= 1), and of the current density of
 * that harmonic, at radius r over that at the surface. (r/a)^n at 0 Hz; 0 inside a perfect conductor.
 * @param omega [rad/s] >= 0
 * @param n [1] order, whole, >= 0
 * @param r [m] 0 .. radius
 * @throws Problem DOMAIN as `squaredArgument`, for a wrong order or radius, and for |ka| above 1e9
 */
export function solidInteriorRatio(wire: RoundWire, omega: number, n: number, r: number): Complex {
  if (!(r >= 0 && r <= wire.radius)) {
    throw new Problem('DOMAIN', `solidInteriorRatio: radius ${r} m; it must lie in 0 .. ${wire.radius} m`);
  }
  const q = rayArgument('solidInteriorRatio', wire, omega, n, 0);
  if (r === wire.radius) return new Complex(1, 0);
  if (q === 'perfect') return new Complex(0, 0);
  if (q === 'static') return new Complex((r / wire.radius) ** n, 0);
  const share = ddDivide(dd(r), dd(wire.radius));
  const inner = dcScale(q, share);
  const ratio = scaledDivide(scaledBesselI(n, inner), scaledBesselI(n, q));
  return scaledToComplex(scaledMultiply(ratio, dcExp(dcSubtract(inner, q))));
}

/**
 * [1/m2] density of the current at radius r for a net current of 1 A: sigma Z_int I_0(kr)/I_0(ka). Of a perfect conductor
 * it is 0 inside and not defined at the surface (NaN), where the current is a sheet.
 * Parameters and errors as `solidInteriorRatio`.
 */
export function solidCurrentDensity(wire: RoundWire, omega: number, r: number): Complex {
  const ratio = solidInteriorRatio(wire, omega, 0, r);
  if (wire.conductivity === Infinity) return r < wire.radius ? ratio : new Complex(NaN, NaN);
  return ratio.mul(solidInternalImpedance(wire, omega)).mul(wire.conductivity);
}

/** Below this |q| the field is that of 0 Hz to the last digit. */
const STATIC_MODULUS = 1e-100;

/** q = sqrt(jT), or which limit it is. */
function rayArgument(
  name: string,
  wire: RoundWire,
  omega: number,
  n: number,
  least: number,
): DdComplex | 'perfect' | 'static' {
  const t = squaredArgument(wire, omega);
  if (!(Number.isInteger(n) && n >= least && n <= MAX_ORDER)) {
    throw new Problem(
      'DOMAIN',
      `${name}: order ${n}; it must be a whole number from ${least} to ${MAX_ORDER}`,
    );
  }
  if (t === Infinity) return 'perfect';
  const modulus = Math.sqrt(t);
  if (modulus < STATIC_MODULUS) return 'static';
  if (modulus <= MAX_MODULUS) return onRayOfSquare(t);
  throw new Problem(
    'DOMAIN',
    `${name}: |ka| = ${modulus}, above ${MAX_MODULUS}; take the limit of a perfect conductor instead`,
  );
}
