/** Loops and bonded groups of a file. */
import type { Loop, LumpedExtra } from '../model/index.ts';
import { type Group, reconcileGroups } from './groups.ts';
import { readNames } from './names.ts';
import { quote } from './quote.ts';
import { label, type Range, type Reading, readFlag, readQuantity, report, suggest } from './reading.ts';
import { isMapValue, type Path, valueAt } from './source.ts';

const RESISTANCE: Range = { min: 0, max: 1e12, text: '0 to 1e12 ohm' };
const INDUCTANCE: Range = { min: 0, max: 1e6, text: '0 to 1e6 H' };

export interface LoopsAndBonds {
  readonly loops: readonly Loop[];
  readonly bonded: readonly (readonly number[])[];
}

/** @param names of all wires; places in this list are what loops refer to */
export function readLoops(reading: Reading, names: readonly string[]): LoopsAndBonds {
  const index = new Map(names.map((name, k) => [name, k]));
  const loopNames = readNames(reading, 'loops');
  if (loopNames.length === 0 && isMapValue(valueAt(reading.source.data, ['loops']))) {
    report(reading, 'MISSING', 'no loops; give at least one, such as supply: { go: plus, return: minus }', [
      'loops',
    ]);
  }
  const sides: Group[] = [];
  const drafts = loopNames.map((name) => {
    const path: Path = ['loops', name];
    const series = readFlag(reading, [...path, 'series']) ?? false;
    const sideOf = (side: 'go' | 'return'): Group => ({
      label: `${side} of loop ${quote(name)}`,
      path: [...path, side],
      members: readWireList(reading, [...path, side], index),
      series,
    });
    const go = sideOf('go');
    const back = sideOf('return');
    const sound = checkSides(reading, name, go, back);
    sides.push(go, sound ? back : { ...back, members: [] });
    return { name, series, extra: readExtra(reading, [...path, 'extra']) };
  });
  const bonds = readBonded(reading, index);
  const reconciled = reconcileGroups(reading, [...sides, ...bonds], names);
  const loops = drafts.map((draft, k) => ({
    ...draft,
    go: reconciled[2 * k]!.members,
    return: reconciled[2 * k + 1]!.members,
  }));
  const ofLoops = new Set(loops.flatMap((loop) => [...loop.go, ...loop.return]));
  // a bonded list that is also a side of a loop is bonded there already
  const bonded = reconciled
    .slice(2 * drafts.length)
    .map((group) => group.members)
    .filter((members) => !members.some((wire) => ofLoops.has(wire)));
  return { loops, bonded };
}

/** Indices of the wires named at a path: one name or a list. Unknown names and repetitions are reported. */
function readWireList(reading: Reading, path: Path, index: ReadonlyMap<string, number>): number[] {
  const written = valueAt(reading.source.data, path);
  const list = Array.isArray(written) ? written : [written];
  const members = new Set<number>();
  list.forEach((item, k) => {
    // a wire of that name comes before a let name
    const name = typeof item === 'string' && index.has(item) ? item : reading.lets.resolve(item);
    // wrong kinds and circular let names were reported
    if ((typeof item !== 'string' && typeof item !== 'number') || name === undefined) return;
    const itemPath = Array.isArray(written) ? [...path, k] : path;
    const wire = index.get(String(name).trim());
    if (wire === undefined) reportUnknown(reading, String(name).trim(), index, itemPath);
    else if (members.has(wire)) {
      report(reading, 'DUPLICATE', `wire ${quote(name)} stands twice in one list; remove one`, itemPath);
    } else members.add(wire);
  });
  if (Array.isArray(written) && written.length === 0) {
    report(reading, 'EMPTY_LOOP', `${label(path)} is an empty list; name at least one wire`, path);
  }
  return Array.from(members);
}

function reportUnknown(reading: Reading, name: string, index: ReadonlyMap<string, number>, path: Path): void {
  if (name === 'plane') {
    report(reading, 'NOT_SUPPORTED', 'a return through the plane is not supported yet; name wires', path);
    return;
  }
  // members of bundles come from a section that is refused as a whole
  if (isMapValue(valueAt(reading.source.data, ['bundles']))) return;
  const near = suggest(reading, name, index.keys());
  report(reading, 'UNKNOWN_WIRE', `no wire ${quote(name)}${near}; name one of wires`, path);
}

/** @returns false for a wire on both sides, which no further check can add to */
function checkSides(reading: Reading, name: string, go: Group, back: Group): boolean {
  const returning = new Set(back.members);
  const both = go.members.find((wire) => returning.has(wire));
  if (both !== undefined) {
    const wire = quote(reading.source.keys(['wires'])[both]);
    const text = `loop ${quote(name)} has wire ${wire} on both sides; remove it from go or from return`;
    report(reading, 'BOTH_SIDES', text, back.path);
    return false;
  }
  const counts = [go.members.length, back.members.length];
  if (go.series && counts[0] !== counts[1] && counts[0]! > 0 && counts[1]! > 0) {
    const net = `${counts[0]} wires go and ${counts[1]} return, a net current of ${counts[0]! - counts[1]!} times its own`;
    report(reading, 'EMPTY_LOOP', `loop ${quote(name)} in series: ${net}; give as many as return`, go.path);
  }
  return true;
}

function readExtra(reading: Reading, path: Path): LumpedExtra {
  return {
    resistance: readQuantity(reading, [...path, 'resistance'], 'resistance', RESISTANCE) ?? 0,
    inductance: readQuantity(reading, [...path, 'inductance'], 'inductance', INDUCTANCE) ?? 0,
  };
}

function readBonded(reading: Reading, index: ReadonlyMap<string, number>): Group[] {
  const written = valueAt(reading.source.data, ['bonded']);
  if (!Array.isArray(written)) return [];
  const groups: Group[] = [];
  const seen = new Set<string>();
  written.forEach((list, k) => {
    if (!Array.isArray(list)) return;
    const path: Path = ['bonded', k];
    const members = readWireList(reading, path, index);
    if (list.length === 1) {
      report(
        reading,
        'EMPTY_LOOP',
        'a bonded group of one wire joins nothing; name at least two, or remove it',
        path,
      );
    }
    const key = [...members].sort((a, b) => a - b).join();
    if (seen.has(key) && members.length > 1) {
      report(reading, 'DUPLICATE', 'this bonded group stands twice; remove one', path);
      return;
    }
    seen.add(key);
    groups.push({
      label: `bonded group ${k + 1}`,
      path,
      members,
      series: false,
    });
  });
  return groups;
}
