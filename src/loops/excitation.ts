/** One frequency, one set of orders: multipoles and currents for one ampere in each loop. */
import type { ComplexVector } from '../complex/index.ts';
import { MU0 } from '../model/index.ts';
import {
  activeModes,
  type CurrentFeedback,
  type MultipoleSolution,
  type MultipoleSystem,
  productScratch,
  reflectionRoots,
  solveMultipoles,
} from '../proximity/index.ts';
import { solidInternalInductance } from '../skin/index.ts';
import { type FreeCurrents, freeCurrents, respond } from './free-currents.ts';
import type { PreparedCase } from './prepared.ts';

/** [H/m] all inductances inside the solver are in this unit. */
export const INDUCTANCE_UNIT = MU0 / (4 * Math.PI);

export interface Excitation {
  /** [A/A] of each wire */
  readonly currents: ComplexVector;
  /** [A/A] currents less their share at 0 Hz */
  readonly deviation: ComplexVector;
  readonly multipoles: MultipoleSolution;
}

export interface FrequencyPoint {
  /** [rad/s] */
  readonly omega: number;
  readonly system: MultipoleSystem;
  /** [1] logarithms and internal inductances, wires x wires, units of mu0/(4 pi) */
  readonly inductance: ComplexVector;
  readonly free: FreeCurrents | undefined;
}

/** K + L_int of all wires at omega [rad/s], in units of mu0/(4 pi). */
export function inductanceMatrix(prepared: PreparedCase, omega: number): ComplexVector {
  const { wires } = prepared.case;
  const n = wires.length;
  const re = Float64Array.from(prepared.layout.logarithms);
  const im = new Float64Array(n * n);
  const own = new Float64Array(2);
  for (let i = 0; i < n; i++) {
    solidInternalInductance(wires[i], omega, own);
    re[i * n + i] += own[0] / INDUCTANCE_UNIT;
    im[i * n + i] = own[1] / INDUCTANCE_UNIT;
  }
  return { re, im };
}

export function frequencyPoint(prepared: PreparedCase, omega: number, orders: Int32Array): FrequencyPoint {
  const { layout, circuit } = prepared;
  const inductance = inductanceMatrix(prepared, omega);
  const free = freeCurrents(circuit, inductance, omega * INDUCTANCE_UNIT);
  const active = activeModes(orders);
  const feedback: CurrentFeedback | undefined = free && ((a0, delta) => respond(free, a0, delta));
  const roots = reflectionRoots(prepared.case.wires, omega, active);
  return {
    omega,
    system: {
      layout,
      active,
      roots,
      feedback,
      scratch: productScratch(layout),
    },
    inductance,
    free,
  };
}

/** Solves loop `k` alone, one ampere. */
export function excite(
  prepared: PreparedCase,
  point: FrequencyPoint,
  k: number,
  relativeResidual: number,
): Excitation {
  const n = prepared.case.wires.length;
  const direct = prepared.circuit.directCurrents.subarray(k * n, (k + 1) * n);
  const start = { re: Float64Array.from(direct), im: new Float64Array(n) };
  const drive = { re: new Float64Array(n), im: new Float64Array(n) };
  const deviation = { re: new Float64Array(n), im: new Float64Array(n) };
  if (point.free) {
    multiplyReal(point.inductance, direct, drive);
    respond(point.free, drive, deviation);
    addTo(start, deviation);
  }
  const multipoles = solveMultipoles(point.system, start, relativeResidual, prepared.space);
  if (point.free) {
    // The deviation once more from the whole drive: it keeps its relative accuracy where it is small.
    addTo(drive, multipoles.orderZero);
    respond(point.free, drive, deviation);
  }
  const currents = {
    re: Float64Array.from(direct, (x, i) => x + deviation.re[i]),
    im: Float64Array.from(deviation.im),
  };
  return { currents, deviation, multipoles };
}

function multiplyReal(m: ComplexVector, x: Float64Array, out: ComplexVector): void {
  const n = x.length;
  for (let i = 0; i < n; i++) {
    let re = 0;
    let im = 0;
    for (let j = 0; j < n; j++) {
      re += m.re[i * n + j] * x[j];
      im += m.im[i * n + j] * x[j];
    }
    out.re[i] = re;
    out.im[i] = im;
  }
}

function addTo(a: ComplexVector, b: ComplexVector): void {
  for (let i = 0; i < a.re.length; i++) {
    a.re[i] += b.re[i];
    a.im[i] += b.im[i];
  }
}
