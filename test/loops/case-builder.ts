/** Cases in code for the solver tests. */
import type { Case, Loop, Wire } from '../../src/model/index.ts';

/** [S/m] annealed copper, IACS */
export const COPPER = 58e6;

export function wire(x: number, y: number, radius: number, more: Partial<Wire> = {}): Wire {
  return {
    name: `w${x},${y}`,
    x,
    y,
    radius,
    conductivity: COPPER,
    relativePermeability: 1,
    material: 'copper',
    temperature: 20,
    insulation: 0,
    ...more,
  };
}

export function loop(go: number[], back: number[], more: Partial<Loop> = {}): Loop {
  return {
    name: `l${go}-${back}`,
    go,
    return: back,
    series: false,
    extra: { resistance: 0, inductance: 0 },
    ...more,
  };
}

export function caseOf(wires: Wire[], loops: Loop[], more: Partial<Case> = {}): Case {
  return {
    title: 'test',
    length: undefined,
    wires,
    loops,
    bonded: [],
    frequencies: [],
    tolerance: 1e-8,
    cautions: [],
    ...more,
  };
}

/** Seeded generator (mulberry32) so that a failure can be repeated. */
export function seeded(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
