/** Seeded random layouts, the hard ones among them: radii up to 10:1, gaps down to 1 % of the smaller diameter. */
import type { Case, Wire } from '../../src/model/index.ts';
import { caseOf, loop, wire } from './case-builder.ts';

export interface RandomLayout {
  readonly case: Case;
  /** [Hz] */
  readonly frequency: number;
  /** [1] smallest gap over the smaller diameter */
  readonly smallestGap: number;
}

const METALS = [
  { conductivity: 58e6, relativePermeability: 1 },
  { conductivity: 34.8e6, relativePermeability: 1 },
  { conductivity: 15e6, relativePermeability: 1 },
  { conductivity: 7e6, relativePermeability: 100 },
];

/** A wire beside an earlier one at a chosen gap, where it overlaps no other; undefined after too many tries. */
function placeBeside(
  wires: readonly Wire[],
  radius: number,
  gap: number,
  random: () => number,
): [number, number] | undefined {
  for (let attempt = 0; attempt < 200; attempt++) {
    const host = wires[Math.floor(random() * wires.length)];
    const d = host.radius + radius + gap * 2 * Math.min(radius, host.radius);
    const angle = 2 * Math.PI * random();
    const x = host.x + d * Math.cos(angle);
    const y = host.y + d * Math.sin(angle);
    const clear = wires.every((w) => {
      const free = Math.hypot(w.x - x, w.y - y) - w.radius - radius;
      return w === host || free > gap * 2 * Math.min(w.radius, radius);
    });
    if (clear) return [x, y];
  }
  return undefined;
}

export function randomLayout(random: () => number): RandomLayout {
  const count = 2 + Math.floor(random() * 6);
  const base = 10 ** (-4 + 2 * random());
  const hard = random() < 0.5;
  const wires: Wire[] = [];
  let smallestGap = Number.POSITIVE_INFINITY;
  for (let i = 0; i < count; i++) {
    const radius = base * 10 ** (random() * (hard ? 1 : 0.5));
    const gap = hard && random() < 0.5 ? 0.01 : 10 ** (-2 + 2.5 * random());
    const at = i === 0 ? ([0, 0] as [number, number]) : placeBeside(wires, radius, gap, random);
    if (at === undefined) continue;
    if (i > 0) smallestGap = Math.min(smallestGap, gap);
    const metal = METALS[Math.floor(random() * (random() < 0.3 ? 4 : 3))];
    wires.push(wire(at[0], at[1], radius, { name: `w${i}`, ...metal }));
  }
  const n = wires.length;
  // One loop of random bonded sides; what is left over is open.
  const side = wires.map(() => Math.floor(random() * 3));
  side[0] = 0;
  side[n - 1] = 1;
  const members = (s: number) => side.flatMap((x, i) => (x === s ? [i] : []));
  // a/delta from 0.1 to 3000 for the base radius in copper
  const ratio = 10 ** (-1 + 4.5 * random());
  const frequency = (ratio / base) ** 2 / (Math.PI * 4e-7 * Math.PI * 58e6);
  return {
    case: caseOf(wires, [loop(members(0), members(1))]),
    frequency: Math.min(frequency, 1e12),
    smallestGap,
  };
}
