/** Centres of the wires: coordinates, or distance and angle from another wire, or touching it. */
import type { Caution } from '../problem.ts';
import { quote, quoteList } from './quote.ts';
import { type Range, type Reading, readFlag, readQuantity, readText, report, suggest } from './reading.ts';
import { isGiven, isMapValue, type Path, valueAt } from './source.ts';
import type { WireDraft } from './wires.ts';

/**
 * [1] Smallest gap between the metal of two wires, in diameters of the smaller one: what the solver is built and
 * tested for. Bare wires placed as touching stand at it.
 */
export const SMALLEST_GAP = 1e-3;

const COORDINATE: Range = { min: -1e6, max: 1e6, text: '-1000 km to 1000 km' };
/** [m] a distance of the centres; that it clears the wires is checked with all other pairs */
const DISTANCE: Range = { min: 1e-9, max: 1e6, text: '1 nm to 1000 km' };

export interface Point {
  /** [m] */
  readonly x: number;
  /** [m] */
  readonly y: number;
}

/** A place relative to another wire; `distance` [m] is undefined for touching wires. */
interface Relative {
  readonly from: string;
  readonly distance: number | undefined;
  /** [rad] */
  readonly angle: number;
}

export interface Placement {
  /** centre by name; missing where it could not be found */
  readonly centres: ReadonlyMap<string, Point>;
  readonly cautions: readonly Caution[];
}

export function placeWires(reading: Reading, wires: readonly WireDraft[]): Placement {
  const byName = new Map(wires.map((wire) => [wire.name, wire]));
  const centres = new Map<string, Point>();
  const relative = new Map<string, Relative>();
  for (const { name } of wires) {
    const at = readAt(reading, name, byName);
    if (at === undefined) continue;
    if ('from' in at) relative.set(name, at);
    else centres.set(name, at);
  }
  const atSmallestGap: string[] = [];
  const done = new Set<string>();
  for (const { name } of wires) {
    for (const next of chainTo(reading, name, relative, centres, done)) {
      const placed = placeRelative(next, relative.get(next)!, byName, centres);
      if (placed === undefined) continue;
      centres.set(next, placed.centre);
      if (placed.smallestGap) atSmallestGap.push(next);
    }
  }
  return { centres, cautions: smallestGapCaution(atSmallestGap) };
}

/** Wires that must be placed for this one, first the one that stands on a known centre. Cycles are reported once. */
function chainTo(
  reading: Reading,
  name: string,
  relative: ReadonlyMap<string, Relative>,
  centres: ReadonlyMap<string, Point>,
  done: Set<string>,
): string[] {
  const chain: string[] = [];
  let current = name;
  while (relative.has(current) && !centres.has(current) && !done.has(current)) {
    done.add(current);
    chain.push(current);
    current = relative.get(current)!.from;
  }
  const start = chain.indexOf(current);
  if (start >= 0) {
    const cycle = chain.slice(start);
    const shown = [...cycle.slice(0, 10), ...(cycle.length > 10 ? ['..'] : []), current].join(' -> ');
    const text = `wires placed from each other in a circle: ${shown}; give one of them coordinates`;
    report(reading, 'CIRCULAR', text, ['wires', current, 'at', 'from']);
  }
  return chain.reverse();
}

function placeRelative(
  name: string,
  at: Relative,
  byName: ReadonlyMap<string, WireDraft>,
  centres: ReadonlyMap<string, Point>,
): { centre: Point; smallestGap: boolean } | undefined {
  const origin = centres.get(at.from);
  const wire = byName.get(name);
  const other = byName.get(at.from);
  if (origin === undefined || wire === undefined || other === undefined) return undefined;
  let distance = at.distance;
  let smallestGap = false;
  if (distance === undefined) {
    if (wire.radius === undefined || other.radius === undefined) return undefined;
    const metal = wire.radius + other.radius;
    const least = metal + SMALLEST_GAP * 2 * Math.min(wire.radius, other.radius);
    const touching = metal + wire.insulation + other.insulation;
    smallestGap = touching < least;
    distance = Math.max(touching, least);
  }
  const centre = {
    x: origin.x + distance * snapped(Math.cos(at.angle)),
    y: origin.y + distance * snapped(Math.sin(at.angle)),
  };
  return { centre, smallestGap };
}

/** The cosine of 90° in binary is 6e-17; whole multiples of right angles are meant exactly. */
function snapped(ratio: number): number {
  if (Math.abs(ratio) < 1e-15) return 0;
  return Math.abs(Math.abs(ratio) - 1) < 1e-15 ? Math.sign(ratio) : ratio;
}

function readAt(
  reading: Reading,
  name: string,
  byName: ReadonlyMap<string, WireDraft>,
): Point | Relative | undefined {
  const path: Path = ['wires', name, 'at'];
  const key = (k: string | number): Path => [...path, k];
  const written = valueAt(reading.source.data, path);
  if (Array.isArray(written)) {
    const x = readQuantity(reading, key(0), 'length', COORDINATE);
    const y = readQuantity(reading, key(1), 'length', COORDINATE);
    return x === undefined || y === undefined ? undefined : { x, y };
  }
  if (!isMapValue(written)) return undefined;
  const from = readOrigin(reading, key('from'), byName);
  const angle = isGiven(written, 'angle') ? readQuantity(reading, key('angle'), 'angle') : 0;
  const distance = readQuantity(reading, key('distance'), 'length', DISTANCE);
  const touching = readFlag(reading, key('touching'));
  if (touching === undefined) return undefined;
  if (touching && isGiven(written, 'distance')) {
    report(reading, 'WRONG_TYPE', 'touching and distance exclude each other; give one', key('distance'));
    return undefined;
  }
  if (!touching && !isGiven(written, 'distance')) {
    report(reading, 'MISSING', 'at: no distance; give distance: 5 mm, or touching: true', path);
    return undefined;
  }
  if (from === undefined || angle === undefined || (!touching && distance === undefined)) return undefined;
  if (!byName.has(from)) {
    const near = suggest(reading, from, byName.keys());
    report(reading, 'UNKNOWN_WIRE', `no wire ${quote(from)} to stand from${near}`, key('from'));
    return undefined;
  }
  return { from, angle, distance: touching ? undefined : distance };
}

/** Name of the wire to stand from; a wire of that name comes before a let name. */
function readOrigin(
  reading: Reading,
  path: Path,
  byName: ReadonlyMap<string, WireDraft>,
): string | undefined {
  const typed = valueAt(reading.source.data, path);
  return typeof typed === 'string' && byName.has(typed) ? typed : readText(reading, path);
}

function smallestGapCaution(names: readonly string[]): Caution[] {
  if (names.length === 0) return [];
  const text = `bare wires can not touch: ${quoteList(names)} placed at the smallest gap, ${SMALLEST_GAP} of the smaller diameter`;
  return [{ code: 'SMALLEST_GAP', text }];
}
