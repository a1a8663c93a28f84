/**
 * The part of the currents of bonded wires that departs from their share at 0 Hz.
 *
 * All wires of a group have the same volt drop: with E = j w (mu0/4pi) e,
 *   (R/(j w mu0/4pi) + K + L_int) d - U e = -(what drives it),  U^T d = 0,
 * d nonzero only in groups with a choice. R x_dc is constant in a group, so it drops out and d stays
 * accurate however small. At 0 Hz only perfect members of one group have a choice left (their split is
 * the one of least energy); the same system without R gives it.
 */
import { type ComplexLu, type ComplexVector, factoriseLu, solveLu } from '../complex/index.ts';
import type { Circuit } from './circuit.ts';

export interface FreeCurrents {
  /** wires with a choice */
  readonly wires: Int32Array;
  readonly lu: ComplexLu;
}

/** Wires that can deviate from the direct-current split at this frequency, group by group. */
function groupsWithChoice(circuit: Circuit, omegaScale: number): Int32Array[] {
  const candidates =
    omegaScale > 0
      ? circuit.groups
      : circuit.groups.map((members) => members.filter((w) => circuit.wireResistance[w] === 0));
  return candidates.filter((members) => members.length >= 2);
}

/**
 * @param inductance [1] K + L_int in units of mu0/(4 pi): wires x wires
 * @param omegaScale [ohm/m] omega mu0/(4 pi); 0 for the limit at 0 Hz
 */
export function freeCurrents(
  circuit: Circuit,
  inductance: ComplexVector,
  omegaScale: number,
): FreeCurrents | undefined {
  const groups = groupsWithChoice(circuit, omegaScale);
  if (groups.length === 0) return undefined;
  const wires = Int32Array.from(groups.flatMap((members) => [...members]));
  const all = circuit.wireResistance.length;
  const n = wires.length + groups.length;
  const a = new Float64Array(2 * n * n);
  for (let r = 0; r < wires.length; r++) {
    for (let c = 0; c < wires.length; c++) {
      const from = wires[r] * all + wires[c];
      a[2 * (r * n + c)] = inductance.re[from];
      a[2 * (r * n + c) + 1] = inductance.im[from];
    }
    if (omegaScale > 0) a[2 * (r * n + r) + 1] -= circuit.wireResistance[wires[r]] / omegaScale;
  }
  let row = 0;
  groups.forEach((members, g) => {
    for (let k = 0; k < members.length; k++, row++) {
      a[2 * (row * n + wires.length + g)] = -1;
      a[2 * ((wires.length + g) * n + row)] = 1;
    }
  });
  return { wires, lu: factoriseLu(a, n) };
}

/** delta = response of the free currents to a drive at each wire (units of mu0/(4 pi) ampere); zero elsewhere. */
export function respond(free: FreeCurrents, drive: ComplexVector, delta: ComplexVector): void {
  const b = new Float64Array(2 * free.lu.n);
  free.wires.forEach((w, r) => {
    b[2 * r] = -drive.re[w];
    b[2 * r + 1] = -drive.im[w];
  });
  solveLu(free.lu, b);
  delta.re.fill(0);
  delta.im.fill(0);
  free.wires.forEach((w, r) => {
    delta.re[w] = b[2 * r];
    delta.im[w] = b[2 * r + 1];
  });
}
