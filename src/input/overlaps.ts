/**
 * No two wires may overlap or touch: metal keeps the smallest gap that is solved, insulation may touch but not
 * overlap (it can not in a drawing that is built; a slip of a coordinate shows here).
 */
import type { Wire } from '../model/index.ts';
import { SMALLEST_GAP } from './placement.ts';
import { quote } from './quote.ts';
import { type Reading, report } from './reading.ts';

/** Pairs listed; one misplaced wire can overlap many. */
const MOST_OVERLAPS = 50;

/** [1] decimals of a drawing are not exact in binary: contact of insulation within this is contact. */
const ROUNDING = 1e-9;

/** [1] share of a gap that the rounding of far coordinates may take. */
const GAP_ROUNDING = 1e-6;

export function checkOverlaps(reading: Reading, wires: readonly Wire[]): void {
  let found = 0;
  for (let j = 1; j < wires.length; j++) {
    for (let i = 0; i < j; i++) {
      const text = overlap(wires[i]!, wires[j]!);
      if (text === undefined) continue;
      if (++found > MOST_OVERLAPS) return;
      report(reading, text.code, text.text, ['wires', wires[j]!.name, 'at']);
    }
  }
}

function overlap(a: Wire, b: Wire): { code: 'OVERLAP' | 'RANGE'; text: string } | undefined {
  const distance = Math.hypot(a.x - b.x, a.y - b.y);
  const metal = a.radius + b.radius;
  const least = 2 * SMALLEST_GAP * Math.min(a.radius, b.radius);
  const gap = distance - metal;
  const pair = (length: string) => `wires ${quote(a.name)} and ${quote(b.name)} are ${length} apart`;
  if (gap < -ROUNDING * metal) {
    const [apart, sum] = differing(distance, metal);
    const text = `${pair(apart)} and their radii add to ${sum}; move one, or reduce a diameter`;
    return { code: 'OVERLAP', text };
  }
  if (gap < least - ROUNDING * metal) {
    const found = millimetres(Math.max(gap, 0));
    const wanted = `the smallest is ${millimetres(least)}, ${SMALLEST_GAP} of the smaller diameter`;
    return {
      code: 'OVERLAP',
      text: `${pair(millimetres(distance))} and leave a gap of ${found}; ${wanted}; move one`,
    };
  }
  const insulated = metal + a.insulation + b.insulation;
  if (distance < insulated * (1 - ROUNDING)) {
    const [apart, sum] = differing(distance, insulated);
    const text = `${pair(apart)} and their radii with insulation add to ${sum}; move one, or thin an insulation`;
    return { code: 'OVERLAP', text };
  }
  const far = Math.max(Math.abs(a.x), Math.abs(a.y), Math.abs(b.x), Math.abs(b.y));
  if (far * Number.EPSILON > GAP_ROUNDING * gap) {
    const where = `too far from the origin (${millimetres(far)}) to hold their gap of ${millimetres(gap)}`;
    return {
      code: 'RANGE',
      text: `${pair(millimetres(distance))}, ${where}; move the drawing to the origin`,
    };
  }
  return undefined;
}

/** Digits to show until two lengths differ; ROUNDING makes them differ in the last. */
const DIGITS = [6, 8, 10, 12];

/** Two lengths with as many digits as it takes to see which is the longer. */
function differing(a: number, b: number): [string, string] {
  const digits = DIGITS.find((n) => millimetres(a, n) !== millimetres(b, n));
  return [millimetres(a, digits), millimetres(b, digits)];
}

/** `1.88 mm` */
function millimetres(metres: number, digits = DIGITS[0]!): string {
  return `${Number((metres * 1e3).toPrecision(digits))} mm`;
}
