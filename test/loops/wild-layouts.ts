/**
 * Seeded layouts beyond what people draw: radii up to 100:1, gaps down to 1e-3 of the smaller diameter, perfect and
 * strongly magnetic wires side by side, one or two loops, shared returns, groups bonded at both ends, 1 Hz to 1 THz.
 */
import type { Case, Loop, Wire } from '../../src/model/index.ts';
import { caseOf, loop, wire } from './case-builder.ts';

const LEAST_GAP = 1e-3;

export function wildLayout(random: () => number, tolerance: number): { case: Case; frequency: number } {
  const count = 2 + Math.floor(random() * 7);
  const base = 10 ** (-5 + 3 * random());
  const decades = random() < 0.4 ? 2 : 1;
  const wires: Wire[] = [];
  for (let i = 0; i < count; i++) {
    const radius = base * 10 ** (random() * decades * (random() < 0.3 ? 1 : 0.5));
    const at = i === 0 ? [0, 0] : placeBeside(wires, radius, random);
    if (at === undefined) continue;
    const metal = random();
    const perfect = metal < 0.1;
    wires.push(
      wire(at[0], at[1], radius, {
        name: `w${i}`,
        conductivity: perfect ? Number.POSITIVE_INFINITY : 10 ** (6 + 1.9 * random()),
        relativePermeability: metal > 0.8 ? 10 ** (4 * random()) : 1,
      }),
    );
  }
  return {
    case: caseOf(wires, ...loopsOf(wires.length, random(), tolerance)),
    frequency: random() < 0.1 ? 0 : 10 ** (12 * random()),
  };
}

function placeBeside(wires: readonly Wire[], radius: number, random: () => number): number[] | undefined {
  for (let attempt = 0; attempt < 300; attempt++) {
    const host = wires[Math.floor(random() * wires.length)];
    const gap = LEAST_GAP * 10 ** (random() < 0.5 ? 1.5 * random() : 4 * random());
    const d = host.radius + radius + gap * 2 * Math.min(radius, host.radius);
    const angle = 2 * Math.PI * random();
    const [x, y] = [host.x + d * Math.cos(angle), host.y + d * Math.sin(angle)];
    const clear = wires.every((w) => {
      const free = Math.hypot(w.x - x, w.y - y) - w.radius - radius;
      return free > 0.999 * LEAST_GAP * 2 * Math.min(w.radius, radius);
    });
    if (clear) return [x, y];
  }
  return undefined;
}

function loopsOf(wires: number, kind: number, tolerance: number): [Loop[], Partial<Case>] {
  const last = wires - 1;
  if (wires >= 4 && kind < 0.4) {
    const bonded = wires >= 6 ? [[3, 4]] : [];
    return [[loop([0], [last]), loop([1, 2], [last])], { tolerance, bonded }];
  }
  if (wires >= 4 && kind < 0.6) return [[loop([0], [1]), loop([2], [last])], { tolerance }];
  const go = Array.from({ length: Math.max(1, wires >> 1) }, (_, i) => i);
  return [[loop(go, [last])], { tolerance }];
}
